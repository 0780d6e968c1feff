/**
 * The value below which the fraction p of a column lies, interpolated linearly between order
 * statistics: position p (n − 1) counted from the smallest (Hyndman & Fan 1996, type 7).
 *
 * Method: selection in place of a full sort, expected O(n).
 *
 * @param values n ≥ 1 values, untouched; NaN is refused, because its order would be arbitrary
 */
export function quantile(values: Float64Array, p: number): number {
  return quantiles(values, [p])[0]!;
}

/** The median of a column; see `quantile`. */
export function median(values: Float64Array): number {
  return quantile(values, 0.5);
}

/** Several quantiles of one column from one working copy; see `quantile`. */
export function quantiles(values: Float64Array, ps: readonly number[]): number[] {
  return quantilesInPlace(values.slice(), ps);
}

/** Several quantiles of a column that is left partly sorted; see `quantile`. */
export function quantilesInPlace(values: Float64Array, ps: readonly number[]): number[] {
  refuse(values);
  for (const p of ps) {
    if (!(p >= 0 && p <= 1)) throw new RangeError(`quantile: p must be in 0..1, got ${p}`);
  }
  return ps.map((p) => quantileInPlace(values, p));
}

/**
 * The median of the first `count` values of a buffer, which is left partly sorted.
 * For loops that own their buffer; the values are not checked for NaN.
 */
export function medianInPlace(buffer: Float64Array, count: number): number {
  return quantileInPlace(buffer.subarray(0, count), 0.5);
}

/**
 * The value that a full sort would put at an index, without sorting: `values.sort()[rank]` in O(n).
 * The values, none of them NaN, are left partly sorted.
 */
export function orderStatisticInPlace(values: Float64Array, rank: number): number {
  select(values, rank, 0, values.length - 1);
  return values[rank]!;
}

function refuse(values: Float64Array): void {
  if (values.length === 0) throw new RangeError('quantile: need at least one value');
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i]!)) throw new RangeError(`quantile: value ${i} is NaN`);
  }
}

function quantileInPlace(work: Float64Array, p: number): number {
  const position = p * (work.length - 1);
  const rank = Math.floor(position);
  select(work, rank, 0, work.length - 1);
  const low = work[rank]!;
  const fraction = position - rank;
  if (fraction === 0) return low;
  let high = Number.POSITIVE_INFINITY;
  for (let i = rank + 1; i < work.length; i++) if (work[i]! < high) high = work[i]!;
  return low + fraction * (high - low);
}

/** Above this length a sample narrows the range before partitioning (value of the source). */
const SAMPLE_ABOVE = 600;

/**
 * Rearranges work[left..right] so that work[rank] is the value a full sort would put there, with
 * nothing larger before it and nothing smaller behind it.
 * Source: Floyd & Rivest (1975), Algorithm 489, Comm. ACM 18, 173.
 */
function select(work: Float64Array, rank: number, left: number, right: number): void {
  let from = left;
  let to = right;
  while (to > from) {
    if (to - from > SAMPLE_ABOVE) {
      const n = to - from + 1;
      const i = rank - from + 1;
      const z = Math.log(n);
      const s = 0.5 * Math.exp((2 * z) / 3);
      const sd = 0.5 * Math.sqrt((z * s * (n - s)) / n) * Math.sign(i - n / 2);
      const sampleFrom = Math.max(from, Math.floor(rank - (i * s) / n + sd));
      const sampleTo = Math.min(to, Math.floor(rank + ((n - i) * s) / n + sd));
      select(work, rank, sampleFrom, sampleTo);
    }
    const pivot = work[rank]!;
    let i = from;
    let j = to;
    swap(work, from, rank);
    if (work[to]! > pivot) swap(work, to, from);
    while (i < j) {
      swap(work, i, j);
      i++;
      j--;
      while (work[i]! < pivot) i++;
      while (work[j]! > pivot) j--;
    }
    if (work[from] === pivot) swap(work, from, j);
    else swap(work, ++j, to);
    if (j <= rank) from = j + 1;
    if (rank <= j) to = j - 1;
  }
}

function swap(work: Float64Array, i: number, j: number): void {
  const kept = work[i]!;
  work[i] = work[j]!;
  work[j] = kept;
}
