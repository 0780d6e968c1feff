/**
 * A record cut into at most 160 equal cells of time: what the covariance models are fitted to, so
 * that the cost after this one pass does not follow the number of epochs.
 */
export interface TimeCells {
  readonly widthS: number;
  readonly spanS: number;
  /** m cell numbers, ascending; cells with too few epochs are left out, gaps are missing cells. */
  readonly index: Int32Array;
  /** Epochs per cell. */
  readonly counts: Float64Array;
  /** Mean of each component per cell. */
  readonly means: readonly Float64Array[];
  /** Cells that the record would have without gaps. */
  readonly expected: number;
}

const MOST_CELLS = 160;
/** A cell with fewer than this part of the median count is left out. */
const FULL_SHARE = 0.3;

/**
 * @param elapsedS    n ascending times
 * @param components  columns of n values
 */
export function timeCells(
  elapsedS: Float64Array,
  components: readonly Float64Array[],
  spacingS: number,
): TimeCells {
  const firstS = elapsedS[0]!;
  const spanS = elapsedS[elapsedS.length - 1]! - firstS + spacingS;
  const expected = Math.max(1, Math.min(MOST_CELLS, Math.round(spanS / spacingS)));
  const widthS = spanS / expected;
  const counts = new Float64Array(expected);
  const sums = components.map(() => new Float64Array(expected));
  for (let i = 0; i < elapsedS.length; i++) {
    // Half a spacing keeps an epoch that stands on an edge from falling to either side by rounding.
    const at = Math.floor((elapsedS[i]! - firstS + spacingS / 2) / widthS);
    const cell = at < expected ? at : expected - 1;
    counts[cell]! += 1;
    for (let c = 0; c < sums.length; c++) sums[c]![cell]! += components[c]![i]!;
  }
  const filled = counts.filter((count) => count > 0).sort();
  const enough = FULL_SHARE * filled[filled.length >> 1]!;
  const index = Int32Array.from(counts.keys()).filter(
    (cell) => counts[cell]! > 0 && counts[cell]! >= enough,
  );
  return {
    widthS,
    spanS,
    index,
    counts: Float64Array.from(index, (cell) => counts[cell]!),
    means: sums.map((sum) => Float64Array.from(index, (cell) => sum[cell]! / counts[cell]!)),
    expected,
  };
}

/** Plain mean of values of cells. */
export function meanOfCells(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
