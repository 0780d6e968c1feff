import type {Epochs, Satellites} from '../epochs/epochs.ts';
import {isoUtc} from '../time/gps-time.ts';
import type {PerAxis} from './result.ts';
import {type AllanTable, allanTable} from './series/allan-table.ts';
import {type Autocorrelation, autocorrelationOf} from './series/autocorrelation.ts';
import {type Histogram, histogramOf} from './series/histogram.ts';
import {type PlanCells, planCells} from './series/plan-cells.ts';
import {type Settling, type SettlingHalfWidth, settlingOf} from './series/settling.ts';
import {type SignalBins, signalBins} from './series/signal-bins.ts';
import {type Sky, skyOf} from './series/sky.ts';
import {type TimeBins, timeBins} from './series/time-bins.ts';
import {type UsedColumns, usedColumns} from './series/used-columns.ts';

/**
 * What the charts draw: a digest of the columns whose size does not follow the number of epochs.
 *
 * Lengths in metres about the reference of the result, times in seconds since the first epoch
 * read, angles in degrees. A part is null where the record has no data for it.
 */
export interface ChartSeries {
  /** When the first epoch was, read or used; null when none was read. */
  readonly startUtc: string | null;
  /** From the first to the last epoch read. */
  readonly spanS: number;
  /** Means of the parts that movement split the record into; one part when it did not. */
  readonly parts: readonly PartMean[];
  readonly plan: PlanCells | null;
  readonly overTime: {readonly wide: TimeBins; readonly narrow: TimeBins} | null;
  readonly histograms: PerAxis<Histogram | null>;
  readonly settling: Settling | null;
  readonly autocorrelation: Autocorrelation | null;
  readonly allan: AllanTable | null;
  readonly sky: Sky | null;
  readonly signal: {readonly wide: SignalBins; readonly narrow: SignalBins} | null;
}

/** The mean of the epochs used from one time to another. */
export interface PartMean {
  readonly fromS: number;
  readonly toS: number;
  readonly meanM: PerAxis<number | null>;
}

export interface SeriesInput {
  readonly epochs: Epochs;
  /** 1 where the epoch is used; as long as the columns. */
  readonly used: Uint8Array;
  /** About the reference, one per epoch read; NaN where the log gives no position or no height. */
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  readonly satellites: Satellites;
  readonly intervalS: number | null;
  /** Steps that the digits of the log can express, so that cells and bins hold whole steps. */
  readonly resolutionM: PerAxis<number | null>;
  /** First and last epoch of each part, UTC. */
  readonly parts: readonly {readonly fromUtc: string; readonly toUtc: string}[];
  /** Half-width of the 95 % interval of the mean of a record of this length; null: not known. */
  readonly settlingHalfWidthM: SettlingHalfWidth | null;
}

const WIDE_BINS = 360;
const NARROW_BINS = 120;
const WIDE_SIGNAL_BINS = 180;
const NARROW_SIGNAL_BINS = 80;

/** Digests the columns for the charts in a few passes over them. */
export function buildSeries(input: SeriesInput): ChartSeries {
  const {epochs, satellites, intervalS} = input;
  const columns = usedColumns(input);
  const firstS = epochs.count > 0 ? (epochs.gpsSeconds[0] ?? 0) : 0;
  const lastS = epochs.count > 0 ? (epochs.gpsSeconds[epochs.count - 1] ?? 0) : 0;
  const spanS = lastS - firstS;
  const time = {gpsSeconds: epochs.gpsSeconds, firstS, spanS, intervalS: intervalS ?? 1};
  const binned = (bins: number) => timeBins({...input, ...time, bins});
  const signals = (bins: number) => signalBins({epochs, satellites, ...time, bins});
  const wideSignal = signals(WIDE_SIGNAL_BINS);
  return {
    startUtc: epochs.count > 0 ? isoUtc(firstS, 3) : null,
    spanS,
    parts: input.parts.map((part) => partMean(part, columns, firstS)),
    plan: planCells(columns, input.resolutionM),
    overTime: columns.count > 0 ? {wide: binned(WIDE_BINS), narrow: binned(NARROW_BINS)} : null,
    histograms: {
      east: histogramOf(columns.eastM, input.resolutionM.east),
      north: histogramOf(columns.northM, input.resolutionM.north),
      up: columns.hasUp ? histogramOf(columns.upM, input.resolutionM.up) : null,
    },
    settling: settlingOf(columns, input.settlingHalfWidthM),
    autocorrelation: autocorrelationOf(columns, intervalS),
    allan: allanTable(columns, intervalS),
    sky: skyOf(satellites, firstS, spanS),
    signal: wideSignal === null ? null : {wide: wideSignal, narrow: signals(NARROW_SIGNAL_BINS)!},
  };
}

/** UTC is printed to the millisecond. */
const PRINTED_S = 0.0005;

function partMean(
  {fromUtc, toUtc}: {readonly fromUtc: string; readonly toUtc: string},
  {count, gpsSeconds, hasUp, ...columns}: UsedColumns,
  firstS: number,
): PartMean {
  const startMs = Date.parse(isoUtc(firstS, 3));
  const fromS = (Date.parse(fromUtc) - startMs) / 1000;
  const toS = (Date.parse(toUtc) - startMs) / 1000;
  let epochs = 0;
  let [east, north, up] = [0, 0, 0];
  for (let i = 0; i < count; i++) {
    const elapsedS = gpsSeconds[i]! - firstS;
    if (elapsedS < fromS - PRINTED_S || elapsedS > toS + PRINTED_S) continue;
    epochs++;
    // Running means: large offsets cost no digits.
    east += (columns.eastM[i]! - east) / epochs;
    north += (columns.northM[i]! - north) / epochs;
    up += (columns.upM[i]! - up) / epochs;
  }
  const known = epochs > 0;
  const meanM = {
    east: known ? east : null,
    north: known ? north : null,
    up: known && hasUp ? up : null,
  };
  return {fromS, toS, meanM};
}
