import {mixtureHalfWidth, mixtureOf} from './mixture.ts';
import {dot, type ModelFit, modelWeights, type Pooling} from './model-fits.ts';
import type {TimeCells} from './time-cells.ts';

/** How well the mean of one component is known from the record alone. */
export interface MeanUncertainty {
  /** Half-width of the 95 % interval about the plain mean of the epochs. */
  readonly halfWidth95: number;
  /** Posterior weights of the models, for the time that a wish would take. */
  readonly weights: Float64Array;
  /** Probability that the noise is slower than the record can show. */
  readonly slowProbability: number;
}

/**
 * The 95 % interval of the mean of each component, averaged over the noise models.
 *
 * Method: per model the generalised least-squares mean and its Student distribution; their mixture
 * by posterior weight; the interval is centred on the plain mean that is reported.
 *
 * @param plainMeans  mean of the epochs used, per component
 */
export function meanUncertainties(
  cells: TimeCells,
  fits: readonly ModelFit[],
  plainMeans: readonly number[],
  pooling: Pooling,
): MeanUncertainty[] {
  const freedom = cells.index.length - 1;
  const weights = modelWeights(
    fits.map(({model}) => model.logPrior),
    fits.map(({components}) => components.map(({logLikelihood}) => logLikelihood)),
    pooling,
  );
  return weights.map((componentWeights, c) => {
    const mixture = mixtureOf(
      componentWeights,
      Float64Array.from(fits, ({components}) => components[c]!.mean),
      Float64Array.from(fits, ({components}) => components[c]!.standardError),
      freedom,
    );
    return {
      halfWidth95: mixtureHalfWidth(mixture, plainMeans[c]!, 0.95),
      weights: componentWeights,
      slowProbability: slowProbability(fits, componentWeights, cells.spanS),
    };
  });
}

/** A correlation time beyond this part of the record has hardly been seen to end. */
const SLOW_PART = 1 / 6;
const SLOW_FLICKER = 0.4;

function slowProbability(fits: readonly ModelFit[], weights: Float64Array, spanS: number): number {
  let slow = 0;
  fits.forEach(({model: {whiteShare, flickerShare, correlationTimeS}}, m) => {
    const ownShare = (1 - whiteShare) * (1 - flickerShare);
    const flicker = (1 - whiteShare) * flickerShare;
    const slowProcess = (correlationTimeS ?? 0) > SLOW_PART * spanS && ownShare > flicker;
    const slowFlicker = whiteShare < 1 && flickerShare >= SLOW_FLICKER;
    if (slowProcess || slowFlicker) slow += weights[m]!;
  });
  return slow;
}

/** Whitened correlations are estimates of few degrees of freedom; they are drawn in a little. */
const CORRELATION_SHRINK = 0.9;

/** Correlation of the errors of two components, from their residuals at the best common model. */
export function errorCorrelation(fits: readonly ModelFit[], a: number, b: number): number {
  const best = fits.reduce((one, other) =>
    jointLog(other, a, b) > jointLog(one, a, b) ? other : one,
  );
  const [x, y] = [best.components[a]!.residuals, best.components[b]!.residuals];
  return (CORRELATION_SHRINK * dot(x, y)) / Math.sqrt(dot(x, x) * dot(y, y));
}

function jointLog({model, components}: ModelFit, a: number, b: number): number {
  return model.logPrior + components[a]!.logLikelihood + components[b]!.logLikelihood;
}
