import {describe, expect, test} from 'vitest';
import {meanUncertainties} from '../../src/statistics/mean-uncertainty.ts';
import {fitModels, type ModelFit, withSwings} from '../../src/statistics/model-fits.ts';
import {searchedSwings, swingModels} from '../../src/statistics/swing-models.ts';
import {timeCells} from '../../src/statistics/time-cells.ts';
import {randomFrom} from '../simulate/random.ts';

const SPAN_S = 7200;

/** Two hours at 1 Hz: white noise of one unit, and a sinusoid. */
function record(amplitude: number, periodS: number) {
  const random = randomFrom(7, 'swing');
  const elapsedS = Float64Array.from({length: SPAN_S}, (_, i) => i);
  const column = () =>
    elapsedS.map((s) => random.normal() + amplitude * Math.sin((2 * Math.PI * s) / periodS));
  return timeCells(elapsedS, [column(), column()], 1);
}

describe('the models', () => {
  test('searched periods reach from five cells to a third of the record', () => {
    const periods = searchedSwings(45, SPAN_S).map(({swing}) => swing?.periodS ?? Number.NaN);
    expect(Math.min(...periods)).toBeCloseTo(5 * 45, 9);
    expect(Math.max(...periods)).toBeCloseTo(SPAN_S / 3, 9);
  });

  test('a record of too few cells has no swing to be searched', () => {
    expect(searchedSwings(45, 14 * 45)).toHaveLength(0);
  });

  test('property: their priors are those of the shares, however many times stand for each', () => {
    const swing = {share: 1, periodS: 600, dampingS: 900};
    const total = (spanS: number) =>
      swingModels(45, spanS, swing).reduce((sum, {logPrior}) => sum + Math.exp(logPrior), 0);
    expect(total(SPAN_S)).toBeCloseTo(total(10 * SPAN_S), 9);
  });
});

describe('a record that swings', () => {
  test('is fitted by more models, one that does not by none more', () => {
    const still = record(0, 600);
    const fits = fitModels(still);
    expect(withSwings(fits, still)).toBe(fits);
    const swinging = record(3, 600);
    const plain = fitModels(swinging);
    const all = withSwings(plain, swinging);
    expect(all.length).toBeGreaterThan(plain.length);
    const best = all.reduce((a, b) =>
      b.components[0]!.logLikelihood > a.components[0]!.logLikelihood ? b : a,
    );
    // The nearest period searched is at most a quarter of an octave away.
    expect(Math.abs(Math.log2(best.model.swing!.periodS / 600))).toBeLessThanOrEqual(0.26);
  });

  test('has a mean that is known better than the grid alone would have it', () => {
    const cells = record(3, 600);
    const plain = fitModels(cells);
    const width = (fits: readonly ModelFit[]) =>
      meanUncertainties(cells, fits, [0, 0], 'plan')[0]!.halfWidth95;
    expect(width(withSwings(plain, cells))).toBeLessThan(0.5 * width(plain));
    // White noise alone would have 1.96 / √7200; what the swing may hide is not nothing.
    expect(width(withSwings(plain, cells))).toBeGreaterThan(1.96 / Math.sqrt(SPAN_S));
  });
});
