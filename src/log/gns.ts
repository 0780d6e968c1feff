import {FixClass} from '../epochs/epochs.ts';
import type {FieldReader} from './field-reader.ts';
import {
  finishFix,
  takeAgeAndStation,
  takeSatellitesAndHdop,
  takeTimeAndPosition,
} from './fix-fields.ts';
import {classOfMode, rankOfClass} from './mode-indicator.ts';
import type {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';

/**
 * GNS: time, latitude, longitude, one mode letter per system, satellites, HDOP, altitude, geoid
 * separation, age of corrections, station, navigational status (not looked at: V in it means "not
 * provided").
 */
export function decodeGns(
  fields: FieldReader,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): Rejection {
  const row = fixes.count;
  takeTimeAndPosition(fields, fixes, decimals);
  fixes.fixClass[row] = worstClassUsed(fields);
  takeSatellitesAndHdop(fields, fixes);
  fields.decimalTo(fixes.altitudeM, row);
  if (fields.decimals > decimals.altitude) decimals.altitude = fields.decimals;
  fields.decimalTo(fixes.separationM, row);
  if (fields.decimals > decimals.separation) decimals.separation = fields.decimals;
  takeAgeAndStation(fields, fixes);
  return finishFix(fields, fixes);
}

/** The least of the classes of the systems in use; systems with mode N are not in use. */
function worstClassUsed(fields: FieldReader): FixClass {
  const length = fields.textLength();
  let worst: FixClass = length === 0 ? FixClass.unknown : FixClass.none;
  for (let k = 0; k < length; k += 1) {
    const one = classOfMode(fields.textByte(k));
    if (one === FixClass.none) continue;
    if (worst === FixClass.none || rankOfClass(one) < rankOfClass(worst)) worst = one;
  }
  fields.skip(1);
  return worst;
}
