import {FixClass} from '../epochs/epochs.ts';
import type {FieldReader} from './field-reader.ts';
import {
  finishFix,
  takeAgeAndStation,
  takeSatellitesAndHdop,
  takeTimeAndPosition,
} from './fix-fields.ts';
import {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';

const METRES = 0x4d; // M

/**
 * Class by the quality indicator 0 to 8.
 *
 * Source: NMEA 0183, GGA, as described in "NMEA Revealed" of the gpsd project (www/NMEA.adoc).
 */
const CLASS_OF_QUALITY: readonly FixClass[] = [
  FixClass.none,
  FixClass.autonomous,
  FixClass.differential,
  FixClass.precise,
  FixClass.fixed,
  FixClass.float,
  FixClass.notMeasured,
  FixClass.notMeasured,
  FixClass.notMeasured,
];

/**
 * GGA: time, latitude, longitude, quality, satellites, HDOP, altitude and its unit, geoid
 * separation and its unit, age of corrections, station.
 */
export function decodeGga(
  fields: FieldReader,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): Rejection {
  const row = fixes.count;
  takeTimeAndPosition(fields, fixes, decimals);
  const quality = fields.whole();
  fixes.fixClass[row] = CLASS_OF_QUALITY[quality] ?? FixClass.unknown;
  takeSatellitesAndHdop(fields, fixes);
  metresTo(fields, fixes.altitudeM, row);
  if (fields.decimals > decimals.altitude) decimals.altitude = fields.decimals;
  metresTo(fields, fixes.separationM, row);
  if (fields.decimals > decimals.separation) decimals.separation = fields.decimals;
  takeAgeAndStation(fields, fixes);
  return finishFix(fields, fixes);
}

/** A value and, in the next field, its unit; a value in another unit than metres is refused. */
function metresTo(fields: FieldReader, column: Float64Array, row: number): void {
  fields.decimalTo(column, row);
  const unit = fields.letter();
  if (unit !== METRES && unit !== 0 && !Number.isNaN(column[row])) fields.fault = Rejection.unit;
}
