import {parseUnsafeNmeaSentence} from 'nmea-simple';

/** The code of WGS 84 in DTM. */
export const WGS84 = 'W84';

/** Fields of DTM, the address included. */
const DTM_FIELDS = 9;

/**
 * The datum of a DTM sentence in words: the code of the local datum with its subdivision and, when
 * they are not zero, the offsets to the reference datum.
 *
 * The library turns empty fields into zero, which is right here and only here: an offset that is
 * not printed is none. It knows only some datum codes, so the code is taken as printed.
 *
 * @param sentence `$--DTM,…` without checksum; missing fields count as empty
 * @returns        such as `W84`, `P90` or `999 CH95, offsets 0.08 m …`; undefined without a code
 */
export function datumOfDtm(sentence: string): string | undefined {
  const fields = sentence.split(',');
  const code = fields[1] ?? '';
  if (code === '') return undefined;
  const subdivision = fields[2] ?? '';
  const name = subdivision === '' || code === WGS84 ? code : `${code} ${subdivision}`;
  const padded = [...fields, ...Array(DTM_FIELDS).fill('')].slice(0, DTM_FIELDS).join(',');
  const packet = parseUnsafeNmeaSentence(padded);
  if (packet.sentenceId !== 'DTM') return undefined;
  const offsets = [
    [packet.offsetLatitude * 60, 'minutes north'],
    [packet.offsetLongitude * 60, 'minutes east'],
    [packet.offsetAltitudeMeters, 'm up'],
  ] as const;
  const given = offsets.filter(([value]) => value !== 0 && !Number.isNaN(value));
  if (given.length === 0) return name;
  return `${name} with offsets ${given.map(([value, unit]) => `${printed(value)} ${unit}`).join(', ')}`;
}

/** Seven decimals, more than any receiver prints, so that the division by 60 leaves no tail. */
function printed(value: number): string {
  return String(Number(value.toFixed(7)));
}
