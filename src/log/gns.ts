import {FixClass} from '../epochs/epochs.ts';
import {
  finishFix,
  takeAgeAndStation,
  takeSatellitesAndHdop,
  takeTimeAndPosition,
} from './fix-fields.ts';
import {classOfMode, rankOfClass} from './mode-indicator.ts';
import type {Rejection} from './rejections.ts';
import type {FixColumns, PrintedDecimals} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

const MODES = 5;
const ALTITUDE = 8;
const SEPARATION = 9;

/**
 * GNS: time, latitude, longitude, one mode letter per system, satellites, HDOP, altitude, geoid
 * separation, age of corrections, station, navigational status (not looked at: V in it means "not
 * provided").
 */
export function decodeGns(
  fields: SentenceFields,
  fixes: FixColumns,
  decimals: PrintedDecimals,
): Rejection {
  const row = fixes.count;
  takeTimeAndPosition(fields, fixes, decimals);
  fixes.fixClass[row] = worstClassUsed(fields);
  takeSatellitesAndHdop(fields, fixes);
  fields.decimalTo(fixes.altitudeM, row, ALTITUDE);
  fields.decimalTo(fixes.separationM, row, SEPARATION);
  decimals.altitude = Math.max(decimals.altitude, fields.decimals(ALTITUDE));
  decimals.separation = Math.max(decimals.separation, fields.decimals(SEPARATION));
  takeAgeAndStation(fields, fixes, 10);
  return finishFix(fields, fixes);
}

/** The least of the classes of the systems in use; systems with mode N are not in use. */
function worstClassUsed(fields: SentenceFields): FixClass {
  const length = fields.length(MODES);
  let worst: FixClass = length === 0 ? FixClass.unknown : FixClass.none;
  for (let k = 0; k < length; k += 1) {
    const one = classOfMode(fields.byte(MODES, k));
    if (one === FixClass.none) continue;
    if (worst === FixClass.none || rankOfClass(one) < rankOfClass(worst)) worst = one;
  }
  return worst;
}
