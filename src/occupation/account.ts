import {type Epochs, SatelliteSystem, type Satellites} from '../epochs/epochs.ts';
import {DEGREES_PER_RADIAN} from '../geodesy/angle.ts';
import {type Ellipsoid, meridianRadiusM, primeVerticalRadiusM} from '../geodesy/ellipsoid.ts';
import {orderStatisticInPlace} from '../statistics/quantile.ts';
import {isoUtc} from '../time/gps-time.ts';
import type {SystemSummary} from './contents-result.ts';
import type {EpochAccount, InputAccount, PerAxis} from './result.ts';
import {countReasons, countUsed, fixClassName} from './screen.ts';

/** What reading found out about one input, by the names that reading uses. */
interface InputRead {
  readonly name: string;
  readonly kind: 'nmea' | 'table';
  readonly lines: InputAccount['lines'];
  readonly betweenBytes: number;
  readonly sentences: Readonly<Record<string, number>>;
  readonly firstGpsSeconds: number;
  readonly lastGpsSeconds: number;
}

export function inputAccount(
  input: InputRead,
  file: {readonly bytes: number; readonly sha256: string},
): InputAccount {
  const {name, kind, lines, betweenBytes, sentences} = input;
  return {
    name,
    bytes: file.bytes,
    sha256: file.sha256,
    kind,
    lines: {
      total: lines.total,
      used: lines.used,
      ignored: byName(lines.ignored),
      rejected: byName(lines.rejected),
    },
    betweenBytes,
    sentences: byName(sentences),
    firstUtc: utcOrNull(input.firstGpsSeconds),
    lastUtc: utcOrNull(input.lastGpsSeconds),
  };
}

function byName(counts: Readonly<Record<string, number>>): Record<string, number> {
  return Object.fromEntries(Object.entries(counts).sort(([a], [b]) => (a < b ? -1 : 1)));
}

function utcOrNull(gpsSeconds: number): string | null {
  return Number.isFinite(gpsSeconds) ? isoUtc(gpsSeconds, 3) : null;
}

/** A gap is at least this many intervals long, and at least this long. */
const GAP_INTERVALS = 1.5;
const SHORTEST_GAP_S = 1.5;
/** No more gaps than this are listed, the longest ones. */
const GAPS_LISTED = 500;

export interface Resolution {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly heightM: number;
}

/**
 * How many epochs were read and used, when, how often, with which gaps.
 *
 * @param reason  screening codes, one per epoch; gaps and interval are those of the epochs read
 */
export function epochAccount(
  epochs: Epochs,
  reason: Uint8Array,
  resolution: Resolution,
  ellipsoid: Ellipsoid,
): EpochAccount {
  const first = reason.indexOf(0);
  const last = reason.lastIndexOf(0);
  const intervalS = medianIntervalS(epochs);
  return {
    read: epochs.count,
    used: countUsed(reason),
    screened: countReasons(reason),
    firstUtc: first < 0 ? null : isoUtc(epochs.gpsSeconds[first]!, 3),
    lastUtc: last < 0 ? null : isoUtc(epochs.gpsSeconds[last]!, 3),
    intervalS,
    gaps: gapsOf(epochs, intervalS),
    resolutionM: resolutionM(epochs, resolution, ellipsoid),
    fixClasses: fixClassCounts(epochs),
  };
}

/** Median step between epochs at different times; null for fewer than two of them. */
export function medianIntervalS(epochs: Epochs): number | null {
  const steps = new Float64Array(Math.max(0, epochs.count - 1));
  let count = 0;
  for (let i = 1; i < epochs.count; i++) {
    const stepS = epochs.gpsSeconds[i]! - epochs.gpsSeconds[i - 1]!;
    if (stepS > 0) steps[count++] = stepS;
  }
  if (count === 0) return null;
  const medianS = orderStatisticInPlace(steps.subarray(0, count), count >> 1);
  // Times carry at most a few decimals; what is left of the subtraction is no information.
  return Number(medianS.toFixed(4));
}

function gapsOf(epochs: Epochs, intervalS: number | null): EpochAccount['gaps'] {
  if (intervalS === null) return [];
  const longerThanS = Math.max(GAP_INTERVALS * intervalS, SHORTEST_GAP_S);
  const gaps: {from: number; durationS: number}[] = [];
  for (let i = 1; i < epochs.count; i++) {
    const durationS = epochs.gpsSeconds[i]! - epochs.gpsSeconds[i - 1]!;
    if (durationS > longerThanS) gaps.push({from: i - 1, durationS});
  }
  const longest = gaps.sort((a, b) => b.durationS - a.durationS || a.from - b.from);
  return longest
    .slice(0, GAPS_LISTED)
    .sort((a, b) => a.from - b.from)
    .map(({from, durationS}) => ({
      fromUtc: isoUtc(epochs.gpsSeconds[from]!, 3),
      toUtc: isoUtc(epochs.gpsSeconds[from + 1]!, 3),
      durationS: Number(durationS.toFixed(3)),
    }));
}

function resolutionM(
  epochs: Epochs,
  resolution: Resolution,
  ellipsoid: Ellipsoid,
): PerAxis<number | null> {
  if (epochs.count === 0) return {east: null, north: null, up: null};
  const place = {latitudeDeg: middleFinite(epochs.latitudeDeg)};
  const parallelRadiusM =
    primeVerticalRadiusM(place, ellipsoid) * Math.cos(place.latitudeDeg / DEGREES_PER_RADIAN);
  return {
    east: finiteOrNull((resolution.longitudeDeg / DEGREES_PER_RADIAN) * parallelRadiusM),
    north: finiteOrNull(
      (resolution.latitudeDeg / DEGREES_PER_RADIAN) * meridianRadiusM(place, ellipsoid),
    ),
    up: finiteOrNull(resolution.heightM),
  };
}

function middleFinite(column: Float64Array): number {
  let finite = 0;
  for (let i = 0; i < column.length; i++) if (Number.isFinite(column[i]!)) finite++;
  let before = finite >> 1;
  for (let i = 0; i < column.length; i++) {
    if (Number.isFinite(column[i]!) && before-- === 0) return column[i]!;
  }
  return Number.NaN;
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

function fixClassCounts(epochs: Epochs): Record<string, number> {
  const counts = new Uint32Array(8);
  for (let i = 0; i < epochs.count; i++) counts[epochs.fixClass[i]!]! += 1;
  const named: Record<string, number> = {};
  counts.forEach((count, fixClass) => {
    if (count > 0) named[fixClassName(fixClass)] = count;
  });
  return named;
}

const SYSTEM_NAMES: Record<number, string> = {
  [SatelliteSystem.unknown]: 'system not stated',
  [SatelliteSystem.gps]: 'GPS',
  [SatelliteSystem.glonass]: 'GLONASS',
  [SatelliteSystem.galileo]: 'Galileo',
  [SatelliteSystem.beidou]: 'BeiDou',
  [SatelliteSystem.qzss]: 'QZSS',
  [SatelliteSystem.navic]: 'NavIC',
};

/** Numbers of satellites are below this. */
const SATELLITE_NUMBERS = 65_536;

/** Satellites seen and median signal strength, per system, in the order of their numbers. */
export function satelliteSummary(satellites: Satellites): SystemSummary[] {
  const rows = new Uint32Array(256);
  for (let i = 0; i < satellites.count; i++) rows[satellites.system[i]!]! += 1;
  return [...rows.keys()]
    .filter((system) => rows[system]! > 0)
    .map((system) => systemSummary(satellites, system, rows[system]!));
}

function systemSummary(satellites: Satellites, system: number, rows: number): SystemSummary {
  const seen = new Uint8Array(SATELLITE_NUMBERS);
  const strengths = new Float64Array(rows);
  let count = 0;
  let known = 0;
  for (let i = 0; i < satellites.count; i++) {
    if (satellites.system[i] !== system) continue;
    const number = satellites.satelliteId[i]!;
    if (seen[number] === 0) count++;
    seen[number] = 1;
    const strength = satellites.carrierToNoiseDbHz[i]!;
    if (!Number.isNaN(strength)) strengths[known++] = strength;
  }
  return {
    system: SYSTEM_NAMES[system] ?? 'system not stated',
    satellites: count,
    medianCarrierToNoiseDbHz:
      known === 0 ? null : orderStatisticInPlace(strengths.subarray(0, known), known >> 1),
  };
}
