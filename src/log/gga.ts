import {FixClass} from '../epochs/epochs.ts';
import {
  finishFix,
  takeAgeAndStation,
  takeSatellitesAndHdop,
  takeTimeAndPosition,
} from './fix-fields.ts';
import {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

const METRES = 0x4d; // M
const ALTITUDE = 8;
const SEPARATION = 10;

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
  fields: SentenceFields,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): Rejection {
  const row = fixes.count;
  takeTimeAndPosition(fields, fixes, decimals);
  const quality = fields.whole(5);
  fixes.fixClass[row] = CLASS_OF_QUALITY[quality] ?? FixClass.unknown;
  takeSatellitesAndHdop(fields, fixes);
  fields.decimalTo(fixes.altitudeM, row, ALTITUDE);
  fields.decimalTo(fixes.separationM, row, SEPARATION);
  checkMetres(fields, ALTITUDE);
  checkMetres(fields, SEPARATION);
  decimals.altitude = Math.max(decimals.altitude, fields.decimals(ALTITUDE));
  decimals.separation = Math.max(decimals.separation, fields.decimals(SEPARATION));
  takeAgeAndStation(fields, fixes, 12);
  return finishFix(fields, fixes);
}

/** A height is followed by its unit; a height in another unit than metres is refused. */
function checkMetres(fields: SentenceFields, field: number): void {
  const unit = fields.letter(field + 1);
  if (unit !== METRES && unit !== 0 && fields.isGiven(field)) fields.fault = Rejection.unit;
}
