import {convolveTail} from './fourier.ts';
import type {Random} from './random.ts';

export interface PowerLawOptions {
  /** The spectrum falls as frequency to the power of minus this; 1 is flicker noise. 0 to 3. */
  readonly exponent: number;
  /** Expected standard deviation about its own mean of a stretch of one hour. */
  readonly sdInHourM: number;
  /** The process started at zero this long before the first sample. */
  readonly startedBeforeS: number;
}

/**
 * Power-law noise by fractional differencing of order −exponent/2 of white noise.
 *
 * Source: Hosking (1981), Fractional differencing, Biometrika 68; Kasdin (1995), Proc. IEEE 83(5).
 */
export function powerLawSeries(
  options: PowerLawOptions,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const order = options.exponent / 2;
  const total = count + Math.round(options.startedBeforeS / intervalS);
  const kernel = new Float64Array(total);
  const white = new Float64Array(total);
  kernel[0] = 1;
  for (let k = 1; k < total; k++) kernel[k] = (kernel[k - 1]! * (k - 1 + order)) / k;
  for (let k = 0; k < total; k++) white[k] = random.normal();
  const hour = Math.max(2, Math.round(3600 / intervalS));
  const scale = options.sdInHourM / Math.sqrt(expectedSampleVariance(order, hour));
  return convolveTail(white, kernel, count).map((value) => value * scale);
}

/**
 * Expected variance about its own mean of n successive values of unit fractional noise.
 *
 * Method: the mean of (x_i − x_j)²/2 over all pairs. The variogram D(k) follows from the
 * autocovariance of the noise (order < 1/2) or of its differences (order ≥ 1/2):
 * gamma(0) = Gamma(1 − 2d)/Gamma(1 − d)², gamma(k) = gamma(k − 1) (k − 1 + d)/(k − d).
 * Source: Hosking (1981), theorem 1. For flicker noise D(k) = (4/pi) (1 + 1/3 + … + 1/(2k − 1)).
 */
export function expectedSampleVariance(order: number, n: number): number {
  const differenced = order >= 0.5;
  const d = differenced ? order - 1 : order;
  const variance = gamma(1 - 2 * d) / gamma(1 - d) ** 2;
  let covariance = variance;
  let step = variance;
  let variogram = 0;
  let sum = 0;
  for (let k = 1; k < n; k++) {
    variogram += step;
    covariance *= (k - 1 + d) / (k - d);
    step += 2 * covariance;
    sum += (n - k) * (differenced ? variogram : 2 * (variance - covariance));
  }
  return sum / (n * n);
}

/** Gamma function for x > 0: Stirling's series after shifting x above 10; relative error 1e-12. */
function gamma(x: number): number {
  let shifted = x;
  let divisor = 1;
  while (shifted < 10) divisor *= shifted++;
  const series = 1 / (12 * shifted) - 1 / (360 * shifted ** 3) + 1 / (1260 * shifted ** 5);
  const logarithm = (shifted - 0.5) * Math.log(shifted) - shifted + series;
  return (Math.sqrt(2 * Math.PI) * Math.exp(logarithm)) / divisor;
}
