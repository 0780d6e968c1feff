import {quantiles} from '../../statistics/quantile.ts';

/** Five order statistics of one bin: every value lies between the first and the last. */
export interface FiveNumbers {
  readonly least: number;
  readonly p5: number;
  readonly median: number;
  readonly p95: number;
  readonly most: number;
}

/** The five numbers of a non-empty slice without NaN. */
export function fiveNumbers(values: Float64Array): FiveNumbers {
  let [least, most] = [values[0]!, values[0]!];
  for (let i = 1; i < values.length; i++) {
    if (values[i]! < least) least = values[i]!;
    if (values[i]! > most) most = values[i]!;
  }
  const [p5, median, p95] = quantiles(values, [0.05, 0.5, 0.95]);
  return {least, p5: p5!, median: median!, p95: p95!, most};
}
