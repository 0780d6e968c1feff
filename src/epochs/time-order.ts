import {takeEpochs} from './builder.ts';
import {EpochFlag, type Epochs} from './epochs.ts';

/** Where time ran back in the order of the log. */
export interface TimeBack {
  /** How often an epoch stood earlier in time than its predecessor. */
  readonly times: number;
  readonly largestS: number;
  /** Line of the first such epoch; 0 when there is none. */
  readonly firstLineNumber: number;
}

/** Flags every epoch that is earlier than its predecessor; times must be finite. */
export function flagOutOfOrder(epochs: Epochs): TimeBack {
  const {count, gpsSeconds, flags, lineNumber} = epochs;
  let times = 0;
  let largestS = 0;
  let firstLineNumber = 0;
  for (let i = 1; i < count; i++) {
    const backS = gpsSeconds[i - 1]! - gpsSeconds[i]!;
    if (backS <= 0) continue;
    flags[i]! |= EpochFlag.outOfOrder;
    if (times === 0) firstLineNumber = lineNumber[i]!;
    times++;
    if (backS > largestS) largestS = backS;
  }
  return {times, largestS, firstLineNumber};
}

/** The same epochs by time; epochs of the same time keep their order. */
export function inTimeOrder(epochs: Epochs): Epochs {
  const rows = rowsByTime(epochs.gpsSeconds);
  return rows === undefined ? epochs : takeEpochs(epochs, rows);
}

/**
 * The stable order of ascending times; undefined when they ascend already.
 *
 * Method: natural merge sort, which takes time in proportion to n log r for r ascending runs: logs
 * out of order consist of a few long runs.
 *
 * @param gpsSeconds n times, none NaN
 */
function rowsByTime(gpsSeconds: Float64Array): Uint32Array | undefined {
  const n = gpsSeconds.length;
  let starts = [0];
  for (let i = 1; i < n; i++) if (gpsSeconds[i]! < gpsSeconds[i - 1]!) starts.push(i);
  if (starts.length === 1) return undefined;
  let from: Uint32Array = Uint32Array.from({length: n}, (_, i) => i);
  let to: Uint32Array = new Uint32Array(n);
  while (starts.length > 1) {
    const merged: number[] = [];
    for (let r = 0; r < starts.length; r += 2) {
      const start = starts[r]!;
      merged.push(start);
      mergeRuns(gpsSeconds, from, to, [start, starts[r + 1] ?? n, starts[r + 2] ?? n]);
    }
    starts = merged;
    [from, to] = [to, from];
  }
  return from;
}

function mergeRuns(
  gpsSeconds: Float64Array,
  from: Uint32Array,
  to: Uint32Array,
  [start, middle, end]: readonly [number, number, number],
): void {
  let left = start;
  let right = middle;
  for (let k = start; k < end; k++) {
    const takeRight =
      left >= middle || (right < end && gpsSeconds[from[right]!]! < gpsSeconds[from[left]!]!);
    to[k] = takeRight ? from[right++]! : from[left++]!;
  }
}

/** What is the same in neighbouring epochs. */
export interface Sameness {
  readonly repeated: number;
  readonly frozen: number;
  /** Epochs of the longest frozen stretch, the one that it repeats included, and its duration. */
  readonly longestFrozenEpochs: number;
  readonly longestFrozenS: number;
}

/**
 * Flags epochs that repeat the time of the epoch before them, or its exact position at a later
 * time.
 *
 * @param epochs in time order
 */
export function flagRepeatedAndFrozen(epochs: Epochs): Sameness {
  const {count, gpsSeconds, flags} = epochs;
  let repeated = 0;
  let frozen = 0;
  let longestFrozenEpochs = 0;
  let longestFrozenS = 0;
  let runStart = 0;
  for (let i = 1; i < count; i++) {
    const sameTime = gpsSeconds[i] === gpsSeconds[i - 1];
    const samePosition = isSamePosition(epochs, i);
    if (sameTime) {
      flags[i]! |= EpochFlag.repeated;
      repeated++;
    } else if (samePosition) {
      flags[i]! |= EpochFlag.frozen;
      frozen++;
    }
    if (!samePosition) runStart = i;
    else if (gpsSeconds[i]! - gpsSeconds[runStart]! > longestFrozenS) {
      longestFrozenS = gpsSeconds[i]! - gpsSeconds[runStart]!;
      longestFrozenEpochs = i - runStart + 1;
    }
  }
  return {repeated, frozen, longestFrozenEpochs, longestFrozenS};
}

function isSamePosition(epochs: Epochs, i: number): boolean {
  const {latitudeDeg, longitudeDeg, altitudeM, ellipsoidalHeightM} = epochs;
  return (
    latitudeDeg[i] === latitudeDeg[i - 1] &&
    longitudeDeg[i] === longitudeDeg[i - 1] &&
    Object.is(altitudeM[i], altitudeM[i - 1]) &&
    Object.is(ellipsoidalHeightM[i], ellipsoidalHeightM[i - 1])
  );
}
