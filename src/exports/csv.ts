import type {Epochs} from '../epochs/epochs.ts';
import {fixClassName, SCREEN_REASONS} from '../occupation/screen.ts';
import {gpsWeekFromGpsSeconds, isoUtc} from '../time/gps-time.ts';
import {fixed} from '../wording/numbers.ts';

/** The columns of one occupation and what was computed beside them, all of one length. */
export interface EpochTable {
  readonly epochs: Epochs;
  /** East, north and up about the reference of the result; NaN where not computed. */
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  /** Screening codes, 0 for the epochs used. */
  readonly reason: Uint8Array;
}

const ROWS_PER_CHUNK = 2000;
const NOT_GIVEN_SATELLITES = 255;

const HEADER = [
  'utc',
  'gps_week',
  'gps_tow_s',
  'latitude_deg',
  'longitude_deg',
  'ellipsoidal_height_m',
  'altitude_m',
  'east_m',
  'north_m',
  'up_m',
  'fix',
  'satellites',
  'hdop',
  'correction_age_s',
  'sigma_east_m',
  'sigma_north_m',
  'sigma_up_m',
  'used',
  'reason',
  'input',
  'line',
];

/**
 * The epoch table as CSV (RFC 4180, but with LF): one row per epoch read, in time order, in chunks
 * of some thousand rows so that a long log never becomes one text.
 *
 * Fields that the log did not give are empty. No field can hold a comma or a quote.
 */
export function* epochCsv(table: EpochTable): Generator<string> {
  yield `${HEADER.join(',')}\n`;
  const {count} = table.epochs;
  for (let from = 0; from < count; from += ROWS_PER_CHUNK) {
    const to = Math.min(count, from + ROWS_PER_CHUNK);
    let chunk = '';
    for (let i = from; i < to; i += 1) chunk += row(table, i);
    yield chunk;
  }
}

function row({epochs, eastM, northM, upM, reason}: EpochTable, i: number): string {
  const gpsSeconds = epochs.gpsSeconds[i]!;
  const {week, secondOfWeek} = gpsWeekFromGpsSeconds(gpsSeconds);
  const satellites = epochs.satellites[i]!;
  const code = reason[i]!;
  const fields = [
    isoUtc(gpsSeconds, 3),
    week,
    fixed(secondOfWeek, 3),
    given(epochs.latitudeDeg[i]!, 10),
    given(epochs.longitudeDeg[i]!, 10),
    given(epochs.ellipsoidalHeightM[i]!, 4),
    given(epochs.altitudeM[i]!, 4),
    given(eastM[i]!, 4),
    given(northM[i]!, 4),
    given(upM[i]!, 4),
    fixClassName(epochs.fixClass[i]!),
    satellites === NOT_GIVEN_SATELLITES ? '' : satellites,
    given(epochs.hdop[i]!, 2),
    given(epochs.correctionAgeS[i]!, 1),
    given(epochs.sigmaEastM[i]!, 4),
    given(epochs.sigmaNorthM[i]!, 4),
    given(epochs.sigmaUpM[i]!, 4),
    code === 0 ? 1 : 0,
    code === 0 ? '' : (SCREEN_REASONS[code] ?? code),
    epochs.inputIndex[i]! + 1,
    epochs.lineNumber[i]!,
  ];
  return `${fields.join(',')}\n`;
}

function given(value: number, decimals: number): string {
  return Number.isNaN(value) ? '' : fixed(value, decimals);
}
