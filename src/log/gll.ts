import {FixClass} from '../epochs/epochs.ts';
import type {FieldReader} from './field-reader.ts';
import {classOfMode} from './mode-indicator.ts';
import {Rejection} from './rejections.ts';
import type {GllColumns, PrintedDecimals} from './sentence-columns.ts';
import {SentenceStatus, statusOf} from './status.ts';

/**
 * GLL: latitude, longitude, time, status, mode. Looked at only where no better position exists, so
 * a sentence that cannot be read leaves its row absent and is not rejected.
 */
export function decodeGll(
  fields: FieldReader,
  gll: GllColumns,
  row: number,
  decimals: PrintedDecimals,
): void {
  fields.latitudeTo(gll.latitudeDeg, row);
  const latitudeDecimals = fields.decimals;
  fields.longitudeTo(gll.longitudeDeg, row);
  const longitudeDecimals = fields.decimals;
  fields.timeOfDayTo(gll.timeOfDayS, row);
  const status = statusOf(fields.letter());
  const mode = fields.letter();
  gll.status[row] = status;
  gll.fixClass[row] = mode === 0 ? FixClass.unknown : classOfMode(mode);
  const sum = Math.abs(gll.latitudeDeg[row] ?? 0) + Math.abs(gll.longitudeDeg[row] ?? 0);
  const isEmptyZero = sum === 0 && status === SentenceStatus.void;
  if (fields.fault !== Rejection.none || Number.isNaN(sum) || isEmptyZero) {
    gll.latitudeDeg[row] = Number.NaN;
    gll.longitudeDeg[row] = Number.NaN;
    return;
  }
  decimals.latitude = Math.max(decimals.latitude, latitudeDecimals);
  decimals.longitude = Math.max(decimals.longitude, longitudeDecimals);
}
