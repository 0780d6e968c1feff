import {SatelliteSystem} from '../epochs/epochs.ts';
import {Rejection} from './rejections.ts';
import {systemOfNumber, systemOfTalker} from './satellite-system.ts';
import type {GsaColumns, SatelliteIdColumn} from './sentence-columns.ts';
import type {SentenceFields} from './sentence-fields.ts';

const FIRST_SATELLITE = 2;
const FIRST_DILUTION = FIRST_SATELLITE + 12;

/**
 * GSA: selection, dimension, twelve satellites, PDOP, HDOP, VDOP and, since version 4.1, the
 * system.
 */
export function decodeGsa(
  fields: SentenceFields,
  gsa: GsaColumns,
  ids: SatelliteIdColumn,
  talker: number,
): Rejection {
  const row = gsa.count;
  const firstId = ids.count;
  let count = firstId;
  for (let field = FIRST_SATELLITE; field < FIRST_DILUTION; field += 1) {
    const number = fields.whole(field);
    // Some receivers fill empty places with zero.
    if (number <= 0) continue;
    ids.id[count] = number;
    count += 1;
  }
  fields.decimalTo(gsa.pdop, row, FIRST_DILUTION);
  fields.decimalTo(gsa.hdop, row, FIRST_DILUTION + 1);
  fields.decimalTo(gsa.vdop, row, FIRST_DILUTION + 2);
  const stated = fields.hexDigit(FIRST_DILUTION + 3);
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
