import {Rejection} from './rejections.ts';
import type {ZdaColumns} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

/** ZDA: time, day, month, year; the local zone is passed over, as all times here are UTC. */
export function decodeZda(fields: SentenceFields, zda: ZdaColumns): Rejection {
  const row = zda.count;
  fields.timeOfDayTo(zda.timeOfDayS, row, 0);
  zda.dateDays[row] = fields.longDateDays(1);
  if (fields.fault !== Rejection.none) return fields.fault;
  zda.count = row + 1;
  return Rejection.none;
}
