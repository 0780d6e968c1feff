import {allanDeviation} from '../../statistics/allan.ts';
import type {PerAxis} from '../result.ts';
import type {UsedColumns} from './used-columns.ts';

/** Overlapping Allan deviation of the longest stretch without a hole. */
export interface AllanTable {
  /** Epochs of that stretch. */
  readonly epochs: number;
  /** Averaging times, each four times the last, while the stretch holds four of them. */
  readonly averagedS: readonly number[];
  readonly deviationM: PerAxis<readonly number[] | null>;
}

const LEAST_EPOCHS = 64;
const TIMES = 4;
/** Two epochs are neighbours when their distance is the interval to within this part of it. */
const NEIGHBOUR = 0.1;

/** undefined for a record that has no long enough stretch of evenly spaced epochs. */
export function allanTable(columns: UsedColumns, intervalS: number | null): AllanTable | null {
  if (intervalS === null || !(intervalS > 0)) return null;
  const [from, to] = longestStretch(columns, intervalS);
  const epochs = to - from;
  if (epochs < LEAST_EPOCHS) return null;
  const factors: number[] = [];
  for (let factor = 1; TIMES * factor <= epochs; factor *= TIMES) factors.push(factor);
  const axis = (valuesM: Float64Array) =>
    factors.map(
      (factor) => allanDeviation(valuesM.subarray(from, to), factor, 'overlapping')?.deviation ?? 0,
    );
  return {
    epochs,
    averagedS: factors.map((factor) => factor * intervalS),
    deviationM: {
      east: axis(columns.eastM),
      north: axis(columns.northM),
      up: columns.hasUp ? axis(columns.upM) : null,
    },
  };
}

/** First and behind the last of the epochs that follow one another at the interval. */
function longestStretch({count, gpsSeconds}: UsedColumns, intervalS: number): [number, number] {
  let best: [number, number] = [0, 0];
  let from = 0;
  for (let i = 1; i <= count; i++) {
    const isNeighbour =
      i < count &&
      Math.abs(gpsSeconds[i]! - gpsSeconds[i - 1]! - intervalS) < NEIGHBOUR * intervalS;
    if (isNeighbour) continue;
    if (i - from > best[1] - best[0]) best = [from, i];
    from = i;
  }
  return best;
}
