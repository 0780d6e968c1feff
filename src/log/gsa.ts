import {SatelliteSystem} from '../epochs/epochs.ts';
import type {FieldReader} from './field-reader.ts';
import {Rejection} from './rejections.ts';
import {systemOfNumber, systemOfTalker} from './satellite-system.ts';
import type {GsaColumns, SatelliteIdColumn} from './sentence-columns.ts';

const SATELLITE_FIELDS = 12;

/**
 * GSA: selection, dimension, twelve satellites, PDOP, HDOP, VDOP and, since version 4.1, the
 * system.
 */
export function decodeGsa(
  fields: FieldReader,
  gsa: GsaColumns,
  ids: SatelliteIdColumn,
  talker: number,
): Rejection {
  const row = gsa.count;
  const firstId = ids.count;
  fields.skip(2);
  let count = firstId;
  for (let k = 0; k < SATELLITE_FIELDS; k += 1) {
    const number = fields.whole();
    // Some receivers fill empty places with zero.
    if (number <= 0) continue;
    ids.id[count] = number;
    count += 1;
  }
  fields.decimalTo(gsa.pdop, row);
  fields.decimalTo(gsa.hdop, row);
  fields.decimalTo(gsa.vdop, row);
  const stated = fields.hexDigit();
  if (fields.fault !== Rejection.none) return fields.fault;
  const system = stated >= 0 ? stated : systemOfTalker(talker);
  for (let k = firstId; k < count; k += 1) {
    const number = ids.id[k] ?? 0;
    const own = system === SatelliteSystem.unknown ? systemOfNumber(number) : system;
    ids.id[k] = (own % 64) * 1024 + (number % 1024);
  }
  gsa.ids[row] = count - firstId;
  ids.count = count;
  gsa.count = row + 1;
  return Rejection.none;
}
