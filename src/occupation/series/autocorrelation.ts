import {moments} from '../../statistics/moments.ts';
import type {PerAxis} from '../result.ts';
import type {UsedColumns} from './used-columns.ts';

/** How alike two epochs are that lie so far apart: 1 at lag 0, 0 for independent epochs. */
export interface Autocorrelation {
  /** Evenly spaced in the logarithm, from one interval to a quarter of the record. */
  readonly lagS: readonly number[];
  readonly value: PerAxis<readonly number[] | null>;
}

const LAGS = 48;
const LEAST_EPOCHS = 40;
/** Products taken per lag: enough to know a correlation to 0.002. */
const PRODUCTS = 250_000;
/** A record with more holes than this many empty slots per epoch is not put on a grid. */
const SLOTS_PER_EPOCH = 8;
/** Equal positions scatter by rounding only. */
const LEAST_DEVIATION_M = 1e-9;

/**
 * Method: epochs on a regular grid of the interval, holes left out; at each lag the mean product
 * of deviations from the mean of the record, over the variance (Box, Jenkins & Reinsel, Time
 * Series Analysis: sample autocorrelation). Long records take every k-th start.
 */
export function autocorrelationOf(columns: UsedColumns, intervalS: number | null) {
  if (columns.count < LEAST_EPOCHS || intervalS === null || !(intervalS > 0)) return null;
  const {gpsSeconds, count} = columns;
  const slots = Math.round((gpsSeconds[count - 1]! - gpsSeconds[0]!) / intervalS) + 1;
  if (slots > SLOTS_PER_EPOCH * count) return null;
  const lags = logarithmicLags(Math.floor(slots / 4));
  if (lags.length < 4) return null;
  const axis = (valuesM: Float64Array) => {
    const grid = new Float64Array(slots).fill(Number.NaN);
    const {mean, standardDeviation} = moments(valuesM)!;
    const deviation = standardDeviation ?? 0;
    if (!(deviation > LEAST_DEVIATION_M)) return null;
    for (let i = 0; i < count; i++) {
      const slot = Math.round((gpsSeconds[i]! - gpsSeconds[0]!) / intervalS);
      grid[slot] = (valuesM[i]! - mean) / deviation;
    }
    const values = lags.map((lag) => correlationAt(grid, lag));
    return values.every((value) => Number.isFinite(value)) ? values : null;
  };
  const value = {
    east: axis(columns.eastM),
    north: axis(columns.northM),
    up: columns.hasUp ? axis(columns.upM) : null,
  };
  if (value.east === null && value.north === null && value.up === null) return null;
  return {lagS: lags.map((lag) => lag * intervalS), value} satisfies Autocorrelation;
}

function logarithmicLags(longest: number): number[] {
  const lags = new Set<number>();
  for (let k = 0; k < LAGS; k++) lags.add(Math.round(longest ** (k / (LAGS - 1))));
  return [...lags].filter((lag) => lag >= 1 && lag <= longest);
}

function correlationAt(grid: Float64Array, lag: number): number {
  const pairs = grid.length - lag;
  const stride = Math.max(1, Math.floor(pairs / PRODUCTS));
  let sum = 0;
  let count = 0;
  for (let i = 0; i < pairs; i += stride) {
    const product = grid[i]! * grid[i + lag]!;
    if (!Number.isNaN(product)) {
      sum += product;
      count++;
    }
  }
  return count > 0 ? sum / count : Number.NaN;
}
