import {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

/** The fields that GGA and GNS share: time and position 0 to 4, satellites 6, HDOP 7. */

const MOST_SATELLITES = 254;
const NO_SATELLITES = 255;
const NO_STATION = 65_535;

export function takeTimeAndPosition(
  fields: SentenceFields,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): void {
  const row = fixes.count;
  fields.timeOfDayTo(fixes.timeOfDayS, row, 0);
  fields.latitudeTo(fixes.latitudeDeg, row, 1);
  fields.longitudeTo(fixes.longitudeDeg, row, 3);
  decimals.latitude = Math.max(decimals.latitude, fields.decimals(1));
  decimals.longitude = Math.max(decimals.longitude, fields.decimals(3));
}

export function takeSatellitesAndHdop(fields: SentenceFields, fixes: FixColumns): void {
  const row = fixes.count;
  const satellites = fields.whole(6);
  fixes.satellites[row] = satellites < 0 ? NO_SATELLITES : Math.min(satellites, MOST_SATELLITES);
  fields.decimalTo(fixes.hdop, row, 7);
}

export function takeAgeAndStation(
  fields: SentenceFields,
  fixes: FixColumns,
  ageField: number,
): void {
  const row = fixes.count;
  fields.decimalTo(fixes.correctionAgeS, row, ageField);
  const station = fields.stationId(ageField + 1);
  fixes.stationId[row] = station < 0 || station > NO_STATION ? NO_STATION : station;
}

/** Accepts the row when all of its fields could be read and belong together. */
export function finishFix(fields: SentenceFields, fixes: FixColumns): Rejection {
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
