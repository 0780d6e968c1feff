import type {FieldReader} from './field-reader.ts';
import {Rejection} from './rejections.ts';
import type {ZdaColumns} from './sentence-columns.ts';

/** ZDA: time, day, month, year; the local zone is passed over, as all times here are UTC. */
export function decodeZda(fields: FieldReader, zda: ZdaColumns): Rejection {
  const row = zda.count;
  fields.timeOfDayTo(zda.timeOfDayS, row);
  zda.dateDays[row] = fields.longDateDays();
  if (fields.fault !== Rejection.none) return fields.fault;
  zda.count = row + 1;
  return Rejection.none;
}
