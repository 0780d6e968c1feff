import {describe, expect, test} from 'vitest';
import {flickerTimes, noiseModels, termsOf} from '../../src/statistics/noise-models.ts';

const WIDTH_S = 30;

/**
 * Covariance of the averages of two cells `lag` apart, by double integration of exp(−|s − t|/τ):
 * one integral over the distance of the two times with its triangular weight, by Simpson's rule.
 */
function integrated(lag: number, tauS: number, periodS = Number.POSITIVE_INFINITY): number {
  const kernel = (u: number) => {
    const apartS = Math.abs(lag * WIDTH_S + u);
    const covariance = Math.exp(-apartS / tauS) * Math.cos((2 * Math.PI * apartS) / periodS);
    return (1 - Math.abs(u) / WIDTH_S) * covariance;
  };
  // The kernel has a corner at zero, so each side is integrated by itself.
  return (simpson(kernel, -WIDTH_S, 0) + simpson(kernel, 0, WIDTH_S)) / WIDTH_S;
}

function simpson(f: (x: number) => number, from: number, to: number): number {
  const steps = 4000;
  const step = (to - from) / steps;
  let sum = f(from) + f(to);
  for (let i = 1; i < steps; i++) sum += (i % 2 === 1 ? 4 : 2) * f(from + i * step);
  return (sum * step) / 3;
}

describe('property: terms are covariances of cell averages, against numerical integration', () => {
  test.each([20, 30, 100, 1000, 86_400])('Gauss–Markov process of %d s', (tauS) => {
    const model = {whiteShare: 0.3, flickerShare: 0, correlationTimeS: tauS, logPrior: 0};
    const [term] = termsOf(model, WIDTH_S);
    expect(term!.atZero / (0.7 * integrated(0, tauS))).toBeCloseTo(1, 9);
    for (const lag of [1, 2, 5]) {
      const value = term!.beyond * term!.decay ** lag;
      expect(value / (0.7 * integrated(lag, tauS))).toBeCloseTo(1, 9);
    }
  });

  test.each([
    [150, 100],
    [600, 900],
    [1500, 6000],
  ])('oscillation of period %i s, damped in %i s', (periodS, dampingS) => {
    const swing = {share: 0.9, periodS, dampingS};
    const shares = {whiteShare: 0.3, flickerShare: 0, correlationTimeS: 1000};
    const [term, below] = termsOf({...shares, swing, logPrior: 0}, WIDTH_S);
    expect(term!.atZero / (0.63 * integrated(0, dampingS, periodS))).toBeCloseTo(1, 9);
    for (const lag of [1, 2, 7]) {
      const turned = term!.turn * lag;
      const between = term!.beyond * Math.cos(turned) + term!.sine * Math.sin(turned);
      const value = between * term!.decay ** lag;
      expect(value).toBeCloseTo(0.63 * integrated(lag, dampingS, periodS), 9);
    }
    expect(below!.atZero / (0.07 * integrated(0, 1000))).toBeCloseTo(1, 9);
  });

  test('flicker noise is the average of processes in octaves', () => {
    const model = {whiteShare: 0, flickerShare: 1, correlationTimeS: undefined, logPrior: 0};
    const terms = termsOf(model, WIDTH_S);
    const times = flickerTimes(WIDTH_S);
    expect(terms).toHaveLength(times.length);
    for (const lag of [0, 1, 7]) {
      const found = terms.reduce(
        (sum, {atZero, beyond, decay}) => sum + (lag === 0 ? atZero : beyond * decay ** lag),
        0,
      );
      const wanted = times.reduce((sum, tauS) => sum + integrated(lag, tauS), 0) / times.length;
      expect(found / wanted).toBeCloseTo(1, 8);
    }
  });

  test('shares add up: a slow process has its share of the variance, flicker the rest', () => {
    const model = {whiteShare: 0.2, flickerShare: 0.4, correlationTimeS: 1e9, logPrior: 0};
    const [own, ...flicker] = termsOf(model, WIDTH_S);
    expect(own!.atZero).toBeCloseTo(0.8 * 0.6, 6);
    const slowest = flicker[flicker.length - 1]!;
    expect(slowest.atZero * flicker.length).toBeCloseTo(0.8 * 0.4, 3);
  });
});

test('property: flicker noise has one level per octave of time', () => {
  const model = {whiteShare: 0, flickerShare: 1, correlationTimeS: undefined, logPrior: 0};
  const terms = termsOf(model, 1);
  const covariance = (lag: number) =>
    terms.reduce((sum, {beyond, decay}) => sum + beyond * decay ** lag, 0);
  // 1/f: the covariance falls by the same amount from each lag to twice that lag.
  const falls = [16, 64, 256, 1024, 4096].map((lag) => covariance(lag) - covariance(2 * lag));
  for (const fall of falls) expect(Math.abs(fall / falls[2]! - 1)).toBeLessThanOrEqual(0.03);
});

describe('the grid of models', () => {
  const models = noiseModels(11.25, 1800);

  test('white noise alone is in it once, every other model has a correlated part', () => {
    const white = models.filter(({whiteShare}) => whiteShare === 1);
    expect(white).toHaveLength(1);
    expect(termsOf(white[0]!, 11.25)).toEqual([]);
    for (const model of models) {
      if (model.whiteShare < 1) expect(termsOf(model, 11.25).length).toBeGreaterThan(0);
    }
  });

  test('correlation times reach from less than a cell to an hour or the record', () => {
    const reach = (spanS: number) => {
      const times = noiseModels(11.25, spanS).flatMap(({correlationTimeS}) =>
        correlationTimeS === undefined ? [] : [correlationTimeS],
      );
      return [Math.min(...times), Math.max(...times)];
    };
    expect(reach(1800)[0]).toBeLessThan(11.25);
    expect(reach(1800)[1]).toBeCloseTo(3600, 6);
    expect(reach(86_400)[1]).toBeCloseTo(86_400, 6);
  });

  test('property: the prior of a pair of shares does not depend on how many times stand for it', () => {
    const shareOf = (spanS: number) =>
      noiseModels(11.25, spanS)
        .filter(({whiteShare, flickerShare}) => whiteShare === 0.4 && flickerShare === 0.1)
        .reduce((sum, {logPrior}) => sum + Math.exp(logPrior), 0);
    expect(shareOf(86_400)).toBeCloseTo(shareOf(1800), 12);
    expect(shareOf(1800)).toBeGreaterThan(0);
  });
});
