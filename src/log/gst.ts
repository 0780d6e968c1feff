import {Rejection} from './rejections.ts';
import type {GstColumns} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

/**
 * GST: time, RMS of the ranges, error ellipse (three fields), then the standard deviations of
 * latitude, longitude and altitude in metres. The ellipse is passed over: it is left empty or
 * contradicts the standard deviations in many logs.
 */
export function decodeGst(fields: SentenceFields, gst: GstColumns): Rejection {
  const row = gst.count;
  fields.timeOfDayTo(gst.timeOfDayS, row, 0);
  fields.decimalTo(gst.sigmaLatitudeM, row, 5);
  fields.decimalTo(gst.sigmaLongitudeM, row, 6);
  fields.decimalTo(gst.sigmaAltitudeM, row, 7);
  if (fields.fault !== Rejection.none) return fields.fault;
  gst.count = row + 1;
  return Rejection.none;
}
