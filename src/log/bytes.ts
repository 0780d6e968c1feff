/** The bytes that have a meaning in NMEA 0183, by name. */
export const LF = 0x0a;
export const CR = 0x0d;
export const BANG = 0x21;
export const HASH = 0x23;
export const DOLLAR = 0x24;
export const STAR = 0x2a;
export const PLUS = 0x2b;
export const COMMA = 0x2c;
export const MINUS = 0x2d;
export const DOT = 0x2e;
export const ZERO = 0x30;
const NINE = 0x39;
const UPPER_A = 0x41;
const UPPER_Z = 0x5a;

export function isUpperLetter(byte: number): boolean {
  return byte >= UPPER_A && byte <= UPPER_Z;
}

export function isDigit(byte: number): boolean {
  return byte >= ZERO && byte <= NINE;
}

/** The value of a hexadecimal digit of either case; −1 for any other byte. */
export function hexValue(byte: number): number {
  if (isDigit(byte)) return byte - ZERO;
  const upper = byte & ~0x20;
  return upper >= UPPER_A && upper <= UPPER_A + 5 ? upper - UPPER_A + 10 : -1;
}

/**
 * Where the text that starts at `from` ends: the first byte before `to` that is neither printable
 * ASCII, a tab, a carriage return nor part of a well-formed UTF-8 sequence; `to` when all is text.
 *
 * Source of the UTF-8 ranges: The Unicode Standard, table 3-7 (well-formed byte sequences); the
 * finer limits of the second byte after E0, ED, F0 and F4 are left out, as nothing is decoded.
 */
export function textEnd(bytes: Uint8Array, from: number, to: number): number {
  let at = from;
  while (at < to) {
    const byte = bytes[at] ?? 0;
    const length = textLength(byte);
    if (length === 0 || at + length > to) return at;
    for (let k = 1; k < length; k += 1) {
      if (((bytes[at + k] ?? 0) & 0xc0) !== 0x80) return at;
    }
    at += length;
  }
  return to;
}

/** Bytes of the character that a byte of text begins; 0 when it begins none. */
function textLength(byte: number): number {
  if (byte < 0x80) return (byte >= 0x20 && byte < 0x7f) || byte === 0x09 || byte === CR ? 1 : 0;
  if (byte >= 0xc2 && byte <= 0xdf) return 2;
  if (byte >= 0xe0 && byte <= 0xef) return 3;
  return byte >= 0xf0 && byte <= 0xf4 ? 4 : 0;
}

/** A range of bytes as ASCII; anything else shows as `·`. For people, never for decoding. */
export function asciiOf(bytes: Uint8Array, from: number, to: number): string {
  let text = '';
  for (let at = from; at < to; at += 1) {
    const byte = bytes[at] ?? 0;
    text += byte >= 0x20 && byte < 0x7f ? String.fromCharCode(byte) : '·';
  }
  return text;
}
