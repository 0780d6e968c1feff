import {medianInPlace} from './quantile.ts';

/** Turns a median absolute deviation into a standard deviation for normal data: 1/Φ⁻¹(3/4). */
export const SIGMA_PER_MAD = 1.482602218505602;

/** Columns of one record that are screened together. */
export interface ScreenedColumns {
  /** n times, not decreasing. */
  readonly elapsedS: Float64Array;
  /** Each n values without NaN; an epoch gross in one column is rejected in all. */
  readonly components: readonly Float64Array[];
  /** Per component, the distance between neighbouring values the log can express; 0 if unknown. */
  readonly resolutions: readonly number[];
}

const BLOCK_S = 15;
const BLOCK_EPOCHS = 8;
const LEAST_IN_BLOCK = 4;
const BLOCKS_IN_WINDOW = 9;
const NEIGHBOUR_SIGMAS = 4.5;
const RECORD_SIGMAS = 2;
const LEAST_EPOCHS = 11;
const CLOSING_S = 15;
const CLOSING_LEAST = 9;
const CLOSING_SHARE = 0.35;

/**
 * Flags the epochs that are gross: far from their neighbours and far on the scale of the record.
 *
 * Method: residuals from a running median of block medians (a block-wise Hampel identifier), limit
 * max(4.5 s, 2 g) + q/2 with s the robust deviation of the residuals, g that of the record and q
 * the resolution; then closing: an epoch goes too when more than 35 % of those within 15 s went,
 * which takes bursts whole. Never iterated, no share of the data is removed by rule. O(n).
 * Valid for: n ≥ 11; shorter records are not screened.
 * Source: Hampel (1974), JASA 69, 383-393 for the identifier; the constants were set by simulation
 * (false rejection ≤ 0.01 % on clean correlated noise).
 *
 * @returns n flags, 1 = rejected
 */
export function blockMedianScreen(columns: ScreenedColumns): Uint8Array {
  const {elapsedS, components, resolutions} = columns;
  const count = elapsedS.length;
  const rejected = new Uint8Array(count);
  if (count < LEAST_EPOCHS) return rejected;
  const blocks = layOutBlocks(elapsedS);
  const buffer = new Float64Array(count);
  const spreads: number[] = [];
  components.forEach((values, c) => {
    const residuals = residualsFromBlocks(values, elapsedS, blocks);
    const resolution = resolutions[c] ?? 0;
    const spread = Math.max(
      SIGMA_PER_MAD * medianAbsolute(residuals, buffer),
      resolution / Math.sqrt(12),
    );
    spreads.push(spread);
    const limit =
      Math.max(NEIGHBOUR_SIGMAS * spread, RECORD_SIGMAS * robustDeviation(values, buffer)) +
      resolution / 2;
    for (let i = 0; i < count; i++) if (Math.abs(residuals[i]!) > limit) rejected[i] = 1;
  });
  const closed = close(rejected, elapsedS);
  keepSteadyEnds(closed, columns, spreads);
  return closed;
}

/** A stretch at an end of the record must last this long to be a new place rather than a burst. */
const STEADY_S = 15;
/** How much more than the record it may spread about its own median. */
const STEADY_SPREADS = 3;

/**
 * Takes back the rejection of a whole end of the record that lies elsewhere but is as steady as the
 * rest: the positions jumped near the end, and that is for the step test to find, not to hide.
 */
function keepSteadyEnds(
  rejected: Uint8Array,
  {elapsedS, components}: ScreenedColumns,
  spreads: readonly number[],
): void {
  const count = rejected.length;
  let first = 0;
  while (first < count && rejected[first] === 1) first++;
  let last = count;
  while (last > 0 && rejected[last - 1] === 1) last--;
  for (const [from, to] of [
    [0, first],
    [last, count],
  ] as const) {
    if (to - from < LEAST_EPOCHS || to - from === count) continue;
    const lasts = elapsedS[to - 1]! - elapsedS[from]! >= STEADY_S;
    const steady = components.every((values, c) => {
      const part = values.subarray(from, to);
      return robustDeviation(part, new Float64Array(part.length)) <= STEADY_SPREADS * spreads[c]!;
    });
    if (lasts && steady) rejected.fill(0, from, to);
  }
}

/** Median spacing of times that do not decrease; undefined for fewer than two. */
export function medianSpacing(elapsedS: Float64Array): number | undefined {
  if (elapsedS.length < 2) return undefined;
  const spacing = new Float64Array(elapsedS.length - 1);
  for (let i = 0; i < spacing.length; i++) spacing[i] = elapsedS[i + 1]! - elapsedS[i]!;
  return medianInPlace(spacing, spacing.length);
}

/** 1.4826 times the median absolute deviation from the median, in a buffer of at least n. */
function robustDeviation(values: Float64Array, buffer: Float64Array): number {
  buffer.set(values);
  const centre = medianInPlace(buffer, values.length);
  for (let i = 0; i < values.length; i++) buffer[i] = Math.abs(values[i]! - centre);
  return SIGMA_PER_MAD * medianInPlace(buffer, values.length);
}

function medianAbsolute(values: Float64Array, buffer: Float64Array): number {
  for (let i = 0; i < values.length; i++) buffer[i] = Math.abs(values[i]!);
  return medianInPlace(buffer, values.length);
}

/** Blocks as ranges of epochs, with the mean time of each. */
interface Blocks {
  readonly from: Int32Array;
  readonly to: Int32Array;
  readonly middleS: Float64Array;
}

function layOutBlocks(elapsedS: Float64Array): Blocks {
  const widthS = Math.max(BLOCK_S, BLOCK_EPOCHS * (medianSpacing(elapsedS) ?? 0));
  const from: number[] = [];
  const to: number[] = [];
  const middleS: number[] = [];
  let start = 0;
  let block = 0;
  let times = 0;
  for (let i = 0; i <= elapsedS.length; i++) {
    const at = i < elapsedS.length ? Math.floor((elapsedS[i]! - elapsedS[0]!) / widthS) : -1;
    if (i > start && at !== block) {
      if (i - start >= LEAST_IN_BLOCK) {
        from.push(start);
        to.push(i);
        middleS.push(times / (i - start));
      }
      start = i;
      times = 0;
    }
    block = at;
    if (i < elapsedS.length) times += elapsedS[i]!;
  }
  if (from.length === 0) {
    // So sparse that no block fills: the record itself is the one block.
    return {
      from: Int32Array.of(0),
      to: Int32Array.of(elapsedS.length),
      middleS: Float64Array.of(elapsedS[0]!),
    };
  }
  return {
    from: Int32Array.from(from),
    to: Int32Array.from(to),
    middleS: Float64Array.from(middleS),
  };
}

function residualsFromBlocks(
  values: Float64Array,
  elapsedS: Float64Array,
  blocks: Blocks,
): Float64Array {
  const centres = runningMedian(blockMedians(values, blocks));
  const {middleS} = blocks;
  const last = middleS.length - 1;
  const residuals = new Float64Array(values.length);
  let k = 0;
  for (let i = 0; i < values.length; i++) {
    const t = elapsedS[i]!;
    while (k < last && middleS[k + 1]! <= t) k++;
    let centre = centres[k]!;
    if (k < last && t > middleS[k]!) {
      const share = (t - middleS[k]!) / (middleS[k + 1]! - middleS[k]!);
      centre += share * (centres[k + 1]! - centre);
    }
    residuals[i] = values[i]! - centre;
  }
  return residuals;
}

function blockMedians(values: Float64Array, blocks: Blocks): Float64Array {
  const medians = new Float64Array(blocks.from.length);
  for (let b = 0; b < medians.length; b++) {
    const block = values.slice(blocks.from[b]!, blocks.to[b]!);
    medians[b] = medianInPlace(block, block.length);
  }
  return medians;
}

/** Median over nine neighbours; at the ends the window slides inward and stays full. */
function runningMedian(values: Float64Array): Float64Array {
  const width = Math.min(BLOCKS_IN_WINDOW, values.length);
  const smooth = new Float64Array(values.length);
  const window = new Float64Array(width);
  for (let i = 0; i < values.length; i++) {
    const start = Math.min(Math.max(0, i - (width >> 1)), values.length - width);
    for (let j = 0; j < width; j++) window[j] = values[start + j]!;
    smooth[i] = medianInPlace(window, width);
  }
  return smooth;
}

function close(rejected: Uint8Array, elapsedS: Float64Array): Uint8Array {
  const closed = rejected.slice();
  let from = 0;
  let to = 0;
  let gross = 0;
  for (let i = 0; i < rejected.length; i++) {
    while (to < rejected.length && elapsedS[to]! <= elapsedS[i]! + CLOSING_S) {
      gross += rejected[to++]!;
    }
    while (elapsedS[from]! < elapsedS[i]! - CLOSING_S) gross -= rejected[from++]!;
    const near = to - from;
    if (near >= CLOSING_LEAST && gross > CLOSING_SHARE * near) closed[i] = 1;
  }
  return closed;
}
