/**
 * The sum of a column, as if carried in twice the precision.
 *
 * Method: Kahan's compensated sum in Neumaier's form, which stays right when a term exceeds the sum.
 * Accuracy: |error| ≤ 2 ulp of the result + n² · 1e-32 · Σ|x|.
 * Source: Neumaier (1974), ZAMM 54, 39-51, method IV.
 *
 * @param values n values; NaN passes through
 * @param kept   n flags, 1 = use; absent = use all
 */
export function sum(values: Float64Array, kept?: Uint8Array): number {
  let total = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    if (kept !== undefined && kept[i] === 0) continue;
    const value = values[i]!;
    const next = total + value;
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total;
    total = next;
  }
  return total + lost;
}
