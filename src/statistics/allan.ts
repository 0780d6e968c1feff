/** Deviations of the means of neighbouring stretches, by how long the stretches are. */
export interface AllanDeviation {
  /** Epochs averaged into one value. */
  readonly factor: number;
  readonly deviation: number;
}

/**
 * Allan deviation of evenly spaced values: how much the mean of m values differs from the mean of
 * the next m. It falls with 1/√m for white noise and levels off where the noise is slow.
 *
 * Method: σ²(m) = ½ ⟨(ȳₖ₊₁ − ȳₖ)²⟩ over neighbouring, not overlapping means (plain), or over all pairs
 * that the record has (overlapping); running sums, O(n) a factor.
 * Source: Riley (2008), Handbook of Frequency Stability Analysis, NIST SP 1065, equations 7 and 11.
 *
 * @param values  n values at equal spacing
 * @returns       undefined when the record holds fewer than two stretches
 */
export function allanDeviation(
  values: Float64Array,
  factor: number,
  kind: 'plain' | 'overlapping',
): AllanDeviation | undefined {
  if (!Number.isInteger(factor) || factor < 1) {
    throw new RangeError(`allanDeviation: factor must be a whole number from 1 up, got ${factor}`);
  }
  const n = values.length;
  if (n < 2 * factor) return undefined;
  const sums = new Float64Array(n + 1);
  // About the first value, so that the sums stay small.
  for (let i = 0; i < n; i++) sums[i + 1] = sums[i]! + (values[i]! - values[0]!);
  const stride = kind === 'plain' ? factor : 1;
  let squares = 0;
  let pairs = 0;
  for (let i = 0; i + 2 * factor <= n; i += stride) {
    const difference = (sums[i + 2 * factor]! - 2 * sums[i + factor]! + sums[i]!) / factor;
    squares += difference * difference;
    pairs++;
  }
  return {factor, deviation: Math.sqrt(squares / (2 * pairs))};
}
