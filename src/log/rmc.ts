import {FixClass} from '../epochs/epochs.ts';
import {classOfMode} from './mode-indicator.ts';
import {Rejection} from './rejections.ts';
import type {PrintedDecimals, RmcColumns} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';
import {SentenceStatus, statusOf} from './status.ts';

/**
 * RMC: time, status, latitude, longitude, speed, course, date, magnetic variation, mode. The
 * position is passed over: `decodeRmcPosition` takes it where nothing better exists. The
 * navigational status at the end is not looked at: V in it means "not provided".
 */
export function decodeRmc(fields: SentenceFields, rmc: RmcColumns): Rejection {
  const row = rmc.count;
  fields.timeOfDayTo(rmc.timeOfDayS, row, 0);
  rmc.status[row] = statusOf(fields.letter(1));
  rmc.dateDays[row] = fields.shortDateDays(8);
  const mode = fields.letter(11);
  rmc.fixClass[row] = mode === 0 ? FixClass.unknown : classOfMode(mode);
  rmc.latitudeDeg[row] = Number.NaN;
  rmc.longitudeDeg[row] = Number.NaN;
  if (fields.fault !== Rejection.none) return fields.fault;
  rmc.count = row + 1;
  return Rejection.none;
}

/** The position of a row decoded before; it stays absent when it cannot be read. */
export function decodeRmcPosition(
  fields: SentenceFields,
  rmc: RmcColumns,
  row: number,
  decimals: PrintedDecimals,
): void {
  fields.latitudeTo(rmc.latitudeDeg, row, 2);
  fields.longitudeTo(rmc.longitudeDeg, row, 4);
  const sum = Math.abs(rmc.latitudeDeg[row] ?? 0) + Math.abs(rmc.longitudeDeg[row] ?? 0);
  const isEmptyZero = sum === 0 && rmc.status[row] === SentenceStatus.void;
  if (fields.fault !== Rejection.none || Number.isNaN(sum) || isEmptyZero) {
    rmc.latitudeDeg[row] = Number.NaN;
    rmc.longitudeDeg[row] = Number.NaN;
    return;
  }
  decimals.latitude = Math.max(decimals.latitude, fields.decimals(2));
  decimals.longitude = Math.max(decimals.longitude, fields.decimals(4));
}
