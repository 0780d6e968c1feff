import {FixClass} from '../epochs/epochs.ts';
import {classOfMode} from './mode-indicator.ts';
import {Rejection} from './rejections.ts';
import type {GllColumns, PrintedDecimals} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';
import {SentenceStatus, statusOf} from './status.ts';

/**
 * GLL: latitude, longitude, time, status, mode. Looked at only where no better position exists, so
 * a sentence that cannot be read leaves its row absent and is not rejected.
 */
export function decodeGll(
  fields: SentenceFields,
  gll: GllColumns,
  row: number,
  decimals: PrintedDecimals,
): void {
  fields.latitudeTo(gll.latitudeDeg, row, 0);
  fields.longitudeTo(gll.longitudeDeg, row, 2);
  fields.timeOfDayTo(gll.timeOfDayS, row, 4);
  const status = statusOf(fields.letter(5));
  const mode = fields.letter(6);
  gll.status[row] = status;
  gll.fixClass[row] = mode === 0 ? FixClass.unknown : classOfMode(mode);
  const sum = Math.abs(gll.latitudeDeg[row] ?? 0) + Math.abs(gll.longitudeDeg[row] ?? 0);
  const isEmptyZero = sum === 0 && status === SentenceStatus.void;
  if (fields.fault !== Rejection.none || Number.isNaN(sum) || isEmptyZero) {
    gll.latitudeDeg[row] = Number.NaN;
    gll.longitudeDeg[row] = Number.NaN;
    return;
  }
  decimals.latitude = Math.max(decimals.latitude, fields.decimals(0));
  decimals.longitude = Math.max(decimals.longitude, fields.decimals(2));
}
