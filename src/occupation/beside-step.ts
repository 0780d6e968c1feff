import type {Epochs} from '../epochs/epochs.ts';
import {orderStatisticInPlace} from '../statistics/quantile.ts';

/** What the log itself shows around the time of a jump: something to look at, not its cause. */
export type BesideStep =
  | 'fix class change'
  | 'gap in the record'
  | 'correction station change'
  | 'satellites change'
  | 'old corrections'
  | 'geoid separation change';

/** How far around the time of a step the log is searched, at least. */
const SEARCH_S = 5;
const GAP_INTERVALS = 3;
/** The number of satellites must change by at least this to be worth a word. */
const SATELLITE_CHANGE = 2;
/** Corrections older than this many times the median age of the record, and than this. */
const OLD_AGE_FACTOR = 3;
const OLD_AGE_S = 5;

/**
 * The changes in the log between `fromGpsSeconds` and `toGpsSeconds`, widened by a few seconds.
 * All epochs are searched, the ones left out by screening too: a lost fix is seen in them.
 */
export function besideStep(
  epochs: Epochs,
  fromGpsSeconds: number,
  toGpsSeconds: number,
  intervalS: number,
): BesideStep[] {
  const reachS = Math.max(SEARCH_S, 3 * intervalS);
  const first = firstAtOrAfter(epochs.gpsSeconds, fromGpsSeconds - reachS);
  const end = firstAtOrAfter(epochs.gpsSeconds, toGpsSeconds + reachS);
  const found: BesideStep[] = [];
  if (changes(epochs.fixClass, first, end)) found.push('fix class change');
  if (hasGap(epochs.gpsSeconds, first, end, intervalS)) found.push('gap in the record');
  if (changes(epochs.stationId, first, end)) found.push('correction station change');
  if (spread(epochs.satellites, first, end) >= SATELLITE_CHANGE) found.push('satellites change');
  if (hasOldCorrections(epochs.correctionAgeS, first, end)) found.push('old corrections');
  if (changes(epochs.separationM, first, end)) found.push('geoid separation change');
  return found;
}

function firstAtOrAfter(gpsSeconds: Float64Array, time: number): number {
  let low = 0;
  let high = gpsSeconds.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (gpsSeconds[middle]! < time) low = middle + 1;
    else high = middle;
  }
  return low;
}

function changes(
  column: Uint8Array | Uint16Array | Float32Array,
  first: number,
  end: number,
): boolean {
  for (let i = first + 1; i < end; i++) {
    const [before, now] = [column[i - 1]!, column[i]!];
    if (before !== now && !(Number.isNaN(before) || Number.isNaN(now))) return true;
  }
  return false;
}

function spread(satellites: Uint8Array, first: number, end: number): number {
  let fewest = 255;
  let most = 0;
  for (let i = first; i < end; i++) {
    const count = satellites[i]!;
    if (count === 255) continue;
    fewest = Math.min(fewest, count);
    most = Math.max(most, count);
  }
  return Math.max(0, most - fewest);
}

function hasGap(gpsSeconds: Float64Array, first: number, end: number, intervalS: number): boolean {
  for (let i = Math.max(1, first); i < end; i++) {
    if (gpsSeconds[i]! - gpsSeconds[i - 1]! > GAP_INTERVALS * intervalS) return true;
  }
  return false;
}

function hasOldCorrections(ageS: Float32Array, first: number, end: number): boolean {
  const old = ageS.subarray(first, end).filter((age) => age > OLD_AGE_S);
  // The median of a long record is worth looking for only where something is old.
  if (old.length === 0) return false;
  const all = Float64Array.from(ageS).filter(Number.isFinite);
  const medianS = orderStatisticInPlace(all, all.length >> 1);
  return old.some((age) => age > OLD_AGE_FACTOR * medianS);
}
