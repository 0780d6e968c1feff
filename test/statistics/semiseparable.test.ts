import {describe, expect, test} from 'vitest';
import {type NoiseModel, noiseModels, termsOf} from '../../src/statistics/noise-models.ts';
import {gaussMarkovMean, swingMean} from '../../src/statistics/required-time.ts';
import {factorOf, whiten} from '../../src/statistics/semiseparable.ts';
import {searchedSwings, swingModels} from '../../src/statistics/swing-models.ts';
import type {TimeCells} from '../../src/statistics/time-cells.ts';

/** Cells with gaps and unequal counts. */
function irregularCells(): TimeCells {
  const index = Int32Array.from([0, 1, 2, 5, 6, 9, 10, 11, 12, 20, 21, 22, 25, 26, 40, 41, 42, 43]);
  return {
    widthS: 11.25,
    spanS: 11.25 * 44,
    index,
    counts: Float64Array.from(index, (cell) => 4 + ((cell * 7) % 9)),
    means: [Float64Array.from(index, (cell) => Math.sin(cell) + 0.1 * cell)],
    expected: 44,
  };
}

/** The covariance written out, element by element. */
function dense(model: NoiseModel, cells: TimeCells): number[][] {
  const terms = termsOf(model, cells.widthS);
  const median = cells.counts.slice().sort()[cells.counts.length >> 1]!;
  return Array.from(cells.index, (from, i) =>
    Array.from(cells.index, (to, j) => {
      if (i === j) {
        const white = (model.whiteShare * median) / cells.counts[i]!;
        return terms.reduce((sum, {atZero}) => sum + atZero, white);
      }
      const lag = Math.abs(from - to);
      return terms.reduce(
        (sum, {beyond, sine, turn, decay}) =>
          sum + decay ** lag * (beyond * Math.cos(turn * lag) + sine * Math.sin(turn * lag)),
        0,
      );
    }),
  );
}

/** log |V| and aᵀ V⁻¹ b by the textbook Cholesky factor. */
function byCholesky(v: number[][], a: Float64Array, b: Float64Array) {
  const n = v.length;
  const lower = v.map((row) => row.map(() => 0));
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = v[i]![j]!;
      for (let k = 0; k < j; k++) sum -= lower[i]![k]! * lower[j]![k]!;
      lower[i]![j] = i === j ? Math.sqrt(sum) : sum / lower[j]![j]!;
    }
  }
  const forward = (right: Float64Array) => {
    const x = new Float64Array(n);
    for (let i = 0; i < n; i++) {
      let sum = right[i]!;
      for (let k = 0; k < i; k++) sum -= lower[i]![k]! * x[k]!;
      x[i] = sum / lower[i]![i]!;
    }
    return x;
  };
  const [x, y] = [forward(a), forward(b)];
  return {
    logDeterminant: 2 * lower.reduce((sum, row, i) => sum + Math.log(row[i]!), 0),
    product: x.reduce((sum, value, i) => sum + value * y[i]!, 0),
  };
}

describe('the factor of a covariance of white noise and exponentials', () => {
  const cells = irregularCells();
  const {widthS, spanS} = cells;
  const swing = {share: 1, periodS: 8 * widthS, dampingS: 11 * widthS};
  const swings = [...searchedSwings(widthS, spanS), ...swingModels(widthS, spanS, swing)];

  test.each([
    ['the grid', noiseModels(widthS, spanS)],
    ['models with a swing', swings],
  ])('property: agrees with the dense Cholesky factor to 1e-10, gaps included: %s', (_, models) => {
    expect(models.length).toBeGreaterThan(200);
    const ones = new Float64Array(cells.index.length).fill(1);
    let worst = 0;
    for (const model of models) {
      const factor = factorOf(model, cells);
      const exact = byCholesky(dense(model, cells), ones, cells.means[0]!);
      const [a, b] = [whiten(factor, ones), whiten(factor, cells.means[0]!)];
      const product = a.reduce((sum, value, i) => sum + value * b[i]!, 0);
      worst = Math.max(
        worst,
        Math.abs(factor.logDeterminant - exact.logDeterminant),
        Math.abs(product / exact.product - 1),
      );
    }
    expect(worst).toBeLessThanOrEqual(1e-10);
  });

  test('property: a term is the covariance of cell averages of a Gauss–Markov process', () => {
    const [widthS, tauS] = [30, 100];
    const model = {whiteShare: 0, flickerShare: 0, correlationTimeS: tauS, logPrior: 0};
    const [term] = termsOf(model, widthS);
    // Double integral of exp(−|s − t|/τ) over two cells, by the midpoint rule.
    const steps = 400;
    const average = (lag: number) => {
      let sum = 0;
      for (let i = 0; i < steps; i++) {
        for (let j = 0; j < steps; j++) {
          sum += Math.exp(-Math.abs(lag * widthS + ((i - j) * widthS) / steps) / tauS);
        }
      }
      return sum / steps ** 2;
    };
    expect(term!.atZero).toBeCloseTo(average(0), 5);
    expect(term!.beyond * term!.decay).toBeCloseTo(average(1), 6);
    expect(term!.beyond * term!.decay ** 3).toBeCloseTo(average(3), 6);
  });
});

describe('the mean of a damped oscillation over a window', () => {
  test.each([
    [600, 900, 30],
    [600, 900, 3600],
    [300, 1200, 7200],
  ])(
    'period %i s, damping %i s, over %i s: the double sum of its covariance',
    (periodS, dampingS, timeS) => {
      const n = 40_000;
      let sum = 0;
      for (let k = 0; k < n; k++) {
        const lagS = ((k + 0.5) * timeS) / n;
        const covariance = Math.exp(-lagS / dampingS) * Math.cos((2 * Math.PI * lagS) / periodS);
        sum += (2 * (1 - lagS / timeS) * covariance) / n;
      }
      expect(swingMean({share: 1, periodS, dampingS}, timeS)).toBeCloseTo(sum, 7);
    },
  );

  test('a short window is one look', () => {
    expect(swingMean({share: 1, periodS: 600, dampingS: 900}, 0.001)).toBeCloseTo(1, 5);
  });
});

describe('the mean of a Gauss–Markov series over a window', () => {
  /** σ of the mean over σ, by the formula, to the four printed decimals; T and τ in minutes. */
  const TABLE: readonly (readonly [number, readonly number[]])[] = [
    [3, [0.6749, 0.9092, 0.9714, 0.9863]],
    [30, [0.2539, 0.5272, 0.7753, 0.8784]],
    [60, [0.181, 0.3909, 0.641, 0.7849]],
    [240, [0.0911, 0.202, 0.3628, 0.505]],
    [1440, [0.0373, 0.0832, 0.1527, 0.2208]],
  ];

  test.each(TABLE)(
    'reference: √{(2τ/T)[1 − (τ/T)(1 − e^(−T/τ))]}, T = %i min, computed independently',
    (minutes, row) => {
      [1, 5, 17, 36].forEach((tau, i) => {
        expect(
          Math.abs(Math.sqrt(gaussMarkovMean(tau * 60, minutes * 60)) - row[i]!),
        ).toBeLessThanOrEqual(0.5e-4);
      });
    },
  );

  test('property: a short window is one look, a long one 2τ/T of it', () => {
    expect(gaussMarkovMean(100, 0.001)).toBeCloseTo(1, 5);
    expect(gaussMarkovMean(1, 1e6) * 1e6).toBeCloseTo(2, 4);
  });
});
