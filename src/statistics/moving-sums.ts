import {fisherTail} from './distribution.ts';
import {medianInPlace} from './quantile.ts';
import {SIGMA_PER_MAD} from './robust.ts';

/** A jump that the difference of neighbouring means shows. */
export interface MovingSumStep {
  readonly pValue: number;
  /** Seconds after the first epoch, on the grid of the moving means. */
  readonly atS: number;
  /** Window on either side that showed it best. */
  readonly windowS: number;
  /** Difference of the means after and before, one per component. */
  readonly jump: readonly number[];
}

/** A jump is claimed below this p-value. */
export const MOVING_SUM_P = 0.05;

const MOST_BINS = 20_000;
const SHORTEST_WINDOW_S = 4;
const SHORTEST_WINDOW_BINS = 5;
const WINDOWS_IN_RECORD = 20;
const STEPS_IN_WINDOW = 8;
const MOST_LOCAL_SCALES = 8;
/** Windows in the record, and effective degrees of freedom a window, of the maximum. */
const TRIALS_PER_WINDOW = 5;
const FREEDOM_PER_WINDOW = 0.6;
/** A knock stays: with windows so much longer the jump must still be there. */
const PERSISTENCE = {factor: 4, leastS: 60, mostOfRecord: 1 / 4, share: 0.5};

/** The record in narrow bins, as running sums, so that any mean is a difference. */
interface Binned {
  readonly binS: number;
  readonly bins: number;
  readonly spanS: number;
  readonly counts: Float64Array;
  readonly sums: readonly Float64Array[];
  readonly medianCount: number;
}

/**
 * The most significant jump by moving sums at many scales, scaled by the record's own spread of
 * such differences, so that correlated noise is its own yardstick.
 *
 * Method: differences of neighbouring window means, windows from seconds to a twentieth of the
 * record; scale by the median of their absolute values, over the record and over parts of it; the
 * maximum of the joint square against F with 3 degrees of freedom; a jump that is gone with longer
 * windows is an excursion and not a step.
 * Source: the moving-sum statistic of Eichinger & Kirch (2018), Bernoulli 24, 526-564; scaling and
 * constants set by simulation.
 */
export function movingSumStep(
  elapsedS: Float64Array,
  components: readonly Float64Array[],
  spacingS: number,
): MovingSumStep | undefined {
  const binned = binnedRecord(elapsedS, components, spacingS);
  const scales: number[] = [];
  const longestS = binned.spanS / WINDOWS_IN_RECORD;
  for (
    let h = Math.max(SHORTEST_WINDOW_S, SHORTEST_WINDOW_BINS * binned.binS);
    h <= longestS;
    h *= 2
  ) {
    scales.push(h);
  }
  const hits = scales
    .flatMap((windowS) => {
      const hit = largestJump(binned, windowS);
      return hit === undefined ? [] : [hit];
    })
    .sort((a, b) => a.pValue - b.pValue);
  const lasting = hits.find((hit) => persists(binned, hit));
  if (lasting === undefined) return undefined;
  return {
    pValue: Math.min(1, lasting.pValue * scales.length),
    atS: lasting.atS,
    windowS: lasting.windowS,
    jump: lasting.jump,
  };
}

interface Hit extends MovingSumStep {
  readonly scaled: readonly number[];
  readonly spread: readonly number[];
}

function binnedRecord(
  elapsedS: Float64Array,
  components: readonly Float64Array[],
  spacingS: number,
): Binned {
  const firstS = elapsedS[0]!;
  const spanS = elapsedS[elapsedS.length - 1]! - firstS + spacingS;
  const binS = Math.max(spacingS, spanS / MOST_BINS);
  const bins = Math.ceil(spanS / binS);
  const counts = new Float64Array(bins + 1);
  const sums = components.map(() => new Float64Array(bins + 1));
  for (let i = 0; i < elapsedS.length; i++) {
    const at = Math.min(bins - 1, Math.floor((elapsedS[i]! - firstS + spacingS / 2) / binS));
    counts[at + 1]! += 1;
    for (let c = 0; c < sums.length; c++) {
      sums[c]![at + 1]! += components[c]![i]! - components[c]![0]!;
    }
  }
  const perBin = counts.slice(1).filter((count) => count > 0);
  const medianCount = medianInPlace(perBin, perBin.length);
  for (let b = 1; b <= bins; b++) {
    counts[b]! += counts[b - 1]!;
    for (const sum of sums) sum[b]! += sum[b - 1]!;
  }
  return {binS, bins, spanS, counts, sums, medianCount};
}

/** Difference of the means of `width` bins after and before a bin edge; undefined when half empty. */
function jumpAt(binned: Binned, edge: number, width: number): number[] | undefined {
  const {counts, sums, bins, medianCount} = binned;
  if (edge - width < 0 || edge + width > bins) return undefined;
  const before = counts[edge]! - counts[edge - width]!;
  const after = counts[edge + width]! - counts[edge]!;
  const least = (width * medianCount) / 2;
  if (before < least || after < least) return undefined;
  return sums.map(
    (sum) => (sum[edge + width]! - sum[edge]!) / after - (sum[edge]! - sum[edge - width]!) / before,
  );
}

function largestJump(binned: Binned, windowS: number): Hit | undefined {
  const width = Math.max(1, Math.round(windowS / binned.binS));
  const stride = Math.max(1, Math.round(width / STEPS_IN_WINDOW));
  const edges: number[] = [];
  const jumps: number[][] = [];
  for (let edge = width; edge + width <= binned.bins; edge += stride) {
    const jump = jumpAt(binned, edge, width);
    if (jump === undefined) continue;
    edges.push(edge);
    jumps.push(jump);
  }
  if (jumps.length < 2) return undefined;
  const spreads = binned.sums.map((_, c) => localSpreads(binned, windowS, edges, jumps, c));
  let best: Hit | undefined;
  let largest = 0;
  edges.forEach((edge, i) => {
    const jump = jumps[i]!;
    const spread = spreads.map((spreadAt) => spreadAt(edge));
    const scaled = jump.map((value, c) => (spread[c]! > 0 ? value / spread[c]! : 0));
    const square = scaled.reduce((sum, value) => sum + value * value, 0);
    if (square > largest) {
      largest = square;
      best = {pValue: 1, atS: edge * binned.binS, windowS, jump, scaled, spread};
    }
  });
  if (best === undefined) return undefined;
  const windows = binned.spanS / windowS;
  const tail = fisherTail(largest / 3, 3, FREEDOM_PER_WINDOW * windows);
  return {...best, pValue: Math.min(1, tail * TRIALS_PER_WINDOW * windows)};
}

/**
 * Spread of the differences of one component near an edge: that of the whole record, or of the part
 * of the record around the edge where that is larger, so that a noisy part is no step.
 */
function localSpreads(
  binned: Binned,
  windowS: number,
  edges: readonly number[],
  jumps: readonly number[][],
  component: number,
): (edge: number) => number {
  const size = jumps.map((jump) => Math.abs(jump[component]!));
  const whole = spreadOf(size);
  const parts = Math.min(
    MOST_LOCAL_SCALES,
    Math.floor(binned.spanS / (WINDOWS_IN_RECORD * windowS)),
  );
  if (parts < 2) return () => whole;
  const partBins = binned.bins / parts;
  const local = Array.from({length: parts}, (_, part) =>
    spreadOf(size.filter((_, i) => Math.floor(edges[i]! / partBins) === part)),
  );
  return (edge) => {
    const at = Math.min(parts - 1, Math.max(0, edge / partBins - 0.5));
    const left = Math.floor(at);
    const right = Math.min(parts - 1, left + 1);
    const between = local[left]! + (at - left) * (local[right]! - local[left]!);
    return Math.max(whole, between);
  };
}

function spreadOf(sizes: readonly number[]): number {
  if (sizes.length === 0) return 0;
  const copy = Float64Array.from(sizes);
  return SIGMA_PER_MAD * medianInPlace(copy, copy.length);
}

function persists(binned: Binned, hit: Hit): boolean {
  const windowS = Math.min(
    Math.max(PERSISTENCE.factor * hit.windowS, PERSISTENCE.leastS),
    binned.spanS * PERSISTENCE.mostOfRecord,
  );
  const edge = Math.round(hit.atS / binned.binS);
  const wanted = Math.round(windowS / binned.binS);
  const width = Math.max(1, Math.min(wanted, edge, binned.bins - edge));
  const longer = jumpAt(binned, edge, width);
  if (longer === undefined) return false;
  let along = 0;
  let own = 0;
  hit.scaled.forEach((scaled, c) => {
    const spread = hit.spread[c]!;
    if (spread > 0) along += (scaled * longer[c]!) / spread;
    own += scaled * scaled;
  });
  return along >= PERSISTENCE.share * own;
}

/** When a step happened, refined on single epochs, with its 95 % interval. */
export interface StepTime {
  readonly atS: number;
  readonly interval95S: readonly [number, number];
}

const REFINE_WINDOWS = 3;
const NEAR_WINDOWS = 1.6;
/** 95 % of the likelihood ratio of a change point: −2 ln(1 − √0.95); Hansen (2000), Econometrica 68. */
const CHANGE_POINT_95 = 7.352;

/**
 * The moment that splits the epochs around a hit best: the largest between-group square of the
 * component with the larger jump.
 *
 * @param atS, windowS  where the jump was found, seconds after the first epoch
 */
export function refineStepTime(
  elapsedS: Float64Array,
  values: Float64Array,
  atS: number,
  windowS: number,
): StepTime {
  const firstS = elapsedS[0]!;
  const from = firstIndex(elapsedS, firstS + atS - REFINE_WINDOWS * windowS);
  const to = firstIndex(elapsedS, firstS + atS + REFINE_WINDOWS * windowS);
  const n = to - from;
  const fallback = {
    atS: firstS + atS,
    interval95S: [firstS + atS - windowS, firstS + atS + windowS],
  } as const;
  if (n < 4) return fallback;
  const total = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) total[i + 1] = total[i]! + (values[from + i]! - values[from]!);
  const gain = (i: number) => {
    const centred = total[i]! - (total[n]! * i) / n;
    return (centred * centred * n) / (i * (n - i));
  };
  let best = 0;
  for (let i = 1; i < n; i++) {
    const nearS = Math.abs(elapsedS[from + i]! - firstS - atS);
    if (nearS <= NEAR_WINDOWS * windowS && (best === 0 || gain(i) > gain(best))) best = i;
  }
  if (best === 0) return fallback;
  const least = gain(best) - CHANGE_POINT_95 * noiseVariance(values, from, best, n, total);
  let low = best;
  let high = best;
  while (low > 1 && gain(low - 1) >= least) low--;
  while (high < n - 1 && gain(high + 1) >= least) high++;
  return {
    atS: between(elapsedS, from + best),
    interval95S: [elapsedS[from + low - 1]!, elapsedS[from + high]!],
  };
}

/** A step falls between the last epoch before and the first one after it. */
function between(elapsedS: Float64Array, index: number): number {
  return (elapsedS[index - 1]! + elapsedS[index]!) / 2;
}

/** Long-run variance of the epochs about the two means, from the first lag of their correlation. */
function noiseVariance(
  values: Float64Array,
  from: number,
  split: number,
  n: number,
  total: Float64Array,
): number {
  const origin = values[from]!;
  const means = [total[split]! / split, (total[n]! - total[split]!) / (n - split)];
  let square = 0;
  let lagged = 0;
  let previous = 0;
  for (let i = 0; i < n; i++) {
    const value = values[from + i]! - origin - means[i < split ? 0 : 1]!;
    square += value * value;
    if (i > 0 && i !== split) lagged += value * previous;
    previous = value;
  }
  const correlation = Math.min(0.95, Math.max(0, lagged / square));
  return ((square / Math.max(1, n - 2)) * (1 + correlation)) / (1 - correlation);
}

function firstIndex(elapsedS: Float64Array, timeS: number): number {
  let low = 0;
  let high = elapsedS.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (elapsedS[middle]! < timeS) low = middle + 1;
    else high = middle;
  }
  return low;
}
