import {addressLength} from './addresses.ts';
import {BANG, COMMA, DOLLAR, STAR, textEnd} from './bytes.ts';
import type {LogKind} from './contents.ts';

/** The first bytes of a log that are looked at. */
export const DETECT_BYTES = 65_536;

/**
 * What kind of log begins with these bytes: `nmea` when there is a sentence start (`$` or `!`, an
 * address and a comma) or when it is not text, as only NMEA has binary data between its sentences;
 * else `table`.
 *
 * @returns `utf-16` for text in two bytes a character, which neither reader takes
 */
export function detectLogKind(head: Uint8Array): LogKind | 'utf-16' {
  if ((head[0] === 0xff && head[1] === 0xfe) || (head[0] === 0xfe && head[1] === 0xff)) {
    return 'utf-16';
  }
  for (let at = 0; at < head.length; at += 1) {
    const byte = head[at];
    if (byte !== DOLLAR && byte !== BANG) continue;
    const length = addressLength(head, at + 1);
    const behind = head[at + 1 + length];
    if (length > 0 && (behind === COMMA || behind === STAR)) return 'nmea';
  }
  return hasBinary(head) ? 'nmea' : 'table';
}

function hasBinary(head: Uint8Array): boolean {
  let at = 0;
  while (at < head.length) {
    const end = head.indexOf(0x0a, at);
    // The last line may end inside a character.
    if (end < 0) return false;
    if (textEnd(head, at, end) < end) return true;
    at = end + 1;
  }
  return false;
}
