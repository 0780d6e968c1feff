import type {NoiseTerm} from '../simulate/noise.ts';

/**
 * The record that would really be needed: the time after which 1.96 times the true standard
 * deviation of the mean of white and Gauss–Markov noise reaches a target. Bisection in the logarithm.
 */
export function trueRequiredS(
  terms: readonly NoiseTerm[],
  intervalS: number,
  targetM: number,
): number {
  let low = Math.log(1);
  let high = Math.log(1e9);
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    const halfWidthM = 1.96 * Math.sqrt(varianceOfMean(terms, intervalS, Math.exp(middle)));
    if (halfWidthM > targetM) low = middle;
    else high = middle;
  }
  return Math.exp(high);
}

/** Variance of the mean over a duration; the integral of the autocovariance of each term. */
function varianceOfMean(terms: readonly NoiseTerm[], intervalS: number, durationS: number): number {
  return terms.reduce((sum, term) => {
    if (term.kind === 'white') return sum + (term.sdM ** 2 * intervalS) / durationS;
    if (term.kind !== 'gauss-markov') throw new RangeError(`no closed form for ${term.kind}`);
    const ratio = term.tauS / durationS;
    const shrunk = 2 * ratio * (1 + ratio * Math.expm1(-1 / ratio));
    return sum + term.sdM ** 2 * shrunk;
  }, 0);
}
