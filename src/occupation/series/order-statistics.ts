/** Five order statistics of one bin: every value lies between the first and the last. */
export interface FiveNumbers {
  readonly least: number;
  readonly p5: number;
  readonly median: number;
  readonly p95: number;
  readonly most: number;
}

/**
 * The five numbers of a non-empty slice, which is sorted in place.
 *
 * Method: linear interpolation between order statistics at (n − 1) p (Hyndman & Fan 1996, type 7).
 */
export function fiveNumbers(values: Float64Array): FiveNumbers {
  values.sort();
  return {
    least: values[0]!,
    p5: interpolated(values, 0.05),
    median: interpolated(values, 0.5),
    p95: interpolated(values, 0.95),
    most: values[values.length - 1]!,
  };
}

function interpolated(sorted: Float64Array, p: number): number {
  const place = (sorted.length - 1) * p;
  const below = Math.floor(place);
  const low = sorted[below]!;
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
  return low + (place - below) * (high - low);
}

/** Mean and sample standard deviation about it, by two passes; n ≥ 1. */
export function meanAndDeviation(values: Float64Array): {mean: number; deviation: number} {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i]!;
  const mean = sum / values.length;
  let squares = 0;
  for (let i = 0; i < values.length; i++) squares += (values[i]! - mean) ** 2;
  const deviation = values.length > 1 ? Math.sqrt(squares / (values.length - 1)) : 0;
  return {mean, deviation};
}
