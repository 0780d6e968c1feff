import type {FieldReader} from './field-reader.ts';
import {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';

/** The fields that GGA and GNS share, each written to the row that is being filled. */

const MOST_SATELLITES = 254;
const NO_SATELLITES = 255;
const NO_STATION = 65_535;

export function takeTimeAndPosition(
  fields: FieldReader,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): void {
  const row = fixes.count;
  fields.timeOfDayTo(fixes.timeOfDayS, row);
  fields.latitudeTo(fixes.latitudeDeg, row);
  if (fields.decimals > decimals.latitude) decimals.latitude = fields.decimals;
  fields.longitudeTo(fixes.longitudeDeg, row);
  if (fields.decimals > decimals.longitude) decimals.longitude = fields.decimals;
}

export function takeSatellitesAndHdop(fields: FieldReader, fixes: FixColumns): void {
  const row = fixes.count;
  const satellites = fields.whole();
  fixes.satellites[row] = satellites < 0 ? NO_SATELLITES : Math.min(satellites, MOST_SATELLITES);
  fields.decimalTo(fixes.hdop, row);
}

export function takeAgeAndStation(fields: FieldReader, fixes: FixColumns): void {
  const row = fixes.count;
  fields.decimalTo(fixes.correctionAgeS, row);
  const station = fields.stationId();
  fixes.stationId[row] = station < 0 || station > NO_STATION ? NO_STATION : station;
}

/** Accepts the row when all of its fields could be read and belong together. */
export function finishFix(fields: FieldReader, fixes: FixColumns): Rejection {
  if (fields.fault !== Rejection.none) return fields.fault;
  const row = fixes.count;
  const latitudeDeg = fixes.latitudeDeg[row] ?? Number.NaN;
  const longitudeDeg = fixes.longitudeDeg[row] ?? Number.NaN;
  const timeOfDayS = fixes.timeOfDayS[row] ?? Number.NaN;
  if (Number.isNaN(latitudeDeg) !== Number.isNaN(longitudeDeg)) return Rejection.position;
  if (!Number.isNaN(latitudeDeg) && Number.isNaN(timeOfDayS)) return Rejection.positionWithoutTime;
  fixes.count = row + 1;
  return Rejection.none;
}
