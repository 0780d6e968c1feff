import type {FieldReader} from './field-reader.ts';
import {Rejection} from './rejections.ts';
import type {GstColumns} from './sentence-columns.ts';

/**
 * GST: time, RMS of the ranges, error ellipse (three fields), then the standard deviations of
 * latitude, longitude and altitude in metres. The ellipse is passed over: it is left empty or
 * contradicts the standard deviations in many logs.
 */
export function decodeGst(fields: FieldReader, gst: GstColumns): Rejection {
  const row = gst.count;
  fields.timeOfDayTo(gst.timeOfDayS, row);
  fields.skip(4);
  fields.decimalTo(gst.sigmaLatitudeM, row);
  fields.decimalTo(gst.sigmaLongitudeM, row);
  fields.decimalTo(gst.sigmaAltitudeM, row);
  if (fields.fault !== Rejection.none) return fields.fault;
  gst.count = row + 1;
  return Rejection.none;
}
