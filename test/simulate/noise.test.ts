import {describe, expect, test} from 'vitest';
import {ASPECT_REPEAT_S, type NoiseTerm, noiseSeries} from './noise.ts';
import {expectedSampleVariance} from './power-law.ts';
import {randomFrom} from './random.ts';

/** Standard deviation of the mean over that of one value, Gauss–Markov noise of window over tau. */
function meanOverSd(window: number, tau: number): number {
  const ratio = tau / window;
  return Math.sqrt(2 * ratio * (1 - ratio * (1 - Math.exp(-1 / ratio))));
}

// Windows in minutes against correlation times of 1, 5, 17 and 36 min. The formula is the double
// integral of exp(-|s - t|/tau) over the window (any textbook of random processes); the printed
// four digits were computed independently of this project's code.
const GAUSS_MARKOV_TABLE: readonly (readonly [number, readonly number[]])[] = [
  [3, [0.6749, 0.9092, 0.9714, 0.9863]],
  [30, [0.2539, 0.5272, 0.7753, 0.8784]],
  [60, [0.181, 0.3909, 0.641, 0.7849]],
  [240, [0.0911, 0.202, 0.3628, 0.505]],
  [1440, [0.0373, 0.0832, 0.1527, 0.2208]],
];
const TAUS_MIN = [1, 5, 17, 36];

describe('the mean of Gauss–Markov noise', () => {
  test('reference: the table by formula', () => {
    for (const [windowMin, row] of GAUSS_MARKOV_TABLE) {
      row.forEach((printed, k) => {
        expect(Math.abs(meanOverSd(windowMin, TAUS_MIN[k]!) - printed)).toBeLessThan(0.00005);
      });
    }
  });

  test('reference: the table by simulation, within four Monte-Carlo standard errors', () => {
    const replicates = 1000;
    for (const [windowMin, row] of GAUSS_MARKOV_TABLE) {
      row.forEach((printed, k) => {
        const tauS = TAUS_MIN[k]! * 60;
        // Thirty epochs a correlation time: the discrete mean is the continuous one to 2e-4.
        const intervalS = Math.min(tauS, windowMin * 60) / 30;
        const count = Math.round((windowMin * 60) / intervalS);
        const random = randomFrom(windowMin, `tau ${tauS}`);
        let squares = 0;
        for (let r = 0; r < replicates; r++) {
          const series = noiseSeries(
            [{kind: 'gauss-markov', sdM: 1, tauS}],
            count,
            intervalS,
            random,
          );
          squares += (series.reduce((sum, value) => sum + value, 0) / count) ** 2;
        }
        const simulated = Math.sqrt(squares / replicates);
        expect(Math.abs(simulated / printed - 1)).toBeLessThan(
          4 / Math.sqrt(2 * replicates) + 5e-4,
        );
      });
    }
  });

  test('reference: what a window of 3 min among 17 min correlation is worth', () => {
    expect(1 / meanOverSd(3, 17) ** 2).toBeCloseTo(1.06, 2);
    expect(1 / meanOverSd(60, 17) ** 2).toBeCloseTo(2.4, 1);
    expect(1 / meanOverSd(240, 17) ** 2).toBeCloseTo(7.6, 1);
  });
});

describe('power-law noise', () => {
  test('reference: the variogram of flicker noise is 4/pi times the sum of odd reciprocals', () => {
    // The integral of sin(kx)^2/sin(x) from 0 to pi/2 is 1 + 1/3 + ... + 1/(2k - 1).
    for (const n of [2, 5, 60]) {
      let sum = 0;
      let odd = 0;
      for (let k = 1; k < n; k++) {
        odd += 1 / (2 * k - 1);
        sum += (n - k) * (4 / Math.PI) * odd;
      }
      expect(expectedSampleVariance(0.5, n)).toBeCloseTo(sum / (n * n), 10);
    }
  });

  test.each([0.7, 1, 1.3])(
    'property: exponent %f has the promised scatter within an hour',
    (exponent) => {
      const term: NoiseTerm = {kind: 'power-law', exponent, sdInHourM: 1};
      const replicates = 150;
      const random = randomFrom(3, `exponent ${exponent}`);
      const variances = Array.from({length: replicates}, () => {
        const hour = noiseSeries([term], 720, 5, random);
        const mean = hour.reduce((sum, value) => sum + value, 0) / hour.length;
        return hour.reduce((sum, value) => sum + (value - mean) ** 2, 0) / hour.length;
      });
      const mean = variances.reduce((sum, value) => sum + value, 0) / replicates;
      const spread = Math.sqrt(
        variances.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (replicates - 1),
      );
      expect(Math.abs(mean - 1)).toBeLessThan((4 * spread) / Math.sqrt(replicates));
    },
  );

  test.each([0.7, 1, 1.3])('property: the spectrum falls with exponent %f', (exponent) => {
    const term: NoiseTerm = {kind: 'power-law', exponent, sdInHourM: 1};
    const random = randomFrom(4, `slope ${exponent}`);
    const low = [0, 0];
    for (let r = 0; r < 60; r++) {
      const series = noiseSeries([term], 4096, 5, random);
      // Power in two bands of equal relative width, a factor 16 apart.
      for (let k = 16; k < 24; k++) low[0]! += power(series, k);
      for (let k = 256; k < 384; k += 16) low[1]! += power(series, k);
    }
    const slope = Math.log(low[0]! / low[1]!) / Math.log(16);
    // 480 exponential variates a band: standard error of the log ratio 0.065, of the slope 0.023.
    expect(Math.abs(slope - exponent)).toBeLessThan(0.1);
  });
});

/** Power at k cycles a record, the record tapered by a sine arch against leakage. */
function power(series: Float64Array, k: number): number {
  let re = 0;
  let im = 0;
  const n = series.length;
  for (let i = 0; i < n; i++) {
    const tapered = series[i]! * Math.sin((Math.PI * (i + 0.5)) / n) ** 2;
    re += tapered * Math.cos((2 * Math.PI * k * i) / n);
    im += tapered * Math.sin((2 * Math.PI * k * i) / n);
  }
  return re * re + im * im;
}

describe('other kinds of noise', () => {
  const kinds: readonly (readonly [NoiseTerm, number])[] = [
    [{kind: 'white', sdM: 2}, 2],
    [{kind: 'gauss-markov', sdM: 2, tauS: 20}, 2],
    [{kind: 'student', sdM: 2, degrees: 6}, 2],
    [{kind: 'mixture', sdM: 1, wideSdM: 4, wideShare: 0.1}, Math.sqrt(0.9 + 1.6)],
    [{kind: 'oscillation', sdM: 2, periodS: 60, dampingS: 40}, 2],
    [{kind: 'chirps', count: 4, amplitudeM: 3, shortestS: 20, longestS: 80}, Math.sqrt(18)],
    [{kind: 'sidereal', sdM: 2, tauS: 20}, 2],
  ];
  test.each(kinds)('property: %o has its standard deviation', (term, sdM) => {
    const series = noiseSeries([term], 60_000, 1, randomFrom(5, term.kind));
    const squares = series.reduce((sum, value) => sum + value * value, 0);
    expect(Math.sqrt(squares / series.length) / sdM).toBeGreaterThan(0.93);
    expect(Math.sqrt(squares / series.length) / sdM).toBeLessThan(1.07);
  });

  test('property: sidereal noise repeats exactly and closes without a jump', () => {
    const term: NoiseTerm = {kind: 'sidereal', sdM: 1, tauS: 600};
    const series = noiseSeries([term], 2 * ASPECT_REPEAT_S, 1, randomFrom(6, 'sidereal'));
    expect(series[ASPECT_REPEAT_S + 1000]).toBe(series[1000]);
    // One step of this noise has standard deviation sqrt(2/600) = 0.058.
    expect(Math.abs(series[ASPECT_REPEAT_S]! - series[ASPECT_REPEAT_S - 1]!)).toBeLessThan(0.3);
  });

  test('property: a random walk scatters in an hour as promised', () => {
    const random = randomFrom(9, 'walk');
    let variance = 0;
    for (let r = 0; r < 600; r++) {
      const hour = noiseSeries([{kind: 'random-walk', sdInHourM: 1}], 720, 5, random);
      const mean = hour.reduce((sum, value) => sum + value, 0) / 720;
      variance += hour.reduce((sum, value) => sum + (value - mean) ** 2, 0) / 720 / 600;
    }
    // The variance of one such variance is about 0.8 of its square.
    expect(Math.abs(variance - 1)).toBeLessThan(4 * Math.sqrt(0.8 / 600));
  });

  test('property: kinds add up', () => {
    const sum = noiseSeries(
      [
        {kind: 'white', sdM: 3},
        {kind: 'gauss-markov', sdM: 4, tauS: 2},
      ],
      50_000,
      1,
      randomFrom(10, 'sum'),
    );
    const squares = sum.reduce((total, value) => total + value * value, 0);
    expect(Math.sqrt(squares / sum.length)).toBeCloseTo(5, 1);
  });
});
