import {COMMA, DOT, isDigit, MINUS, PLUS} from './bytes.ts';

/** More than any sentence that is decoded has; further fields are not looked at. */
export const MOST_FIELDS = 40;
/** Digits that fit into a 32-bit integer. */
const MOST_DIGITS = 9;

/** What a field is. */
export const EMPTY = 0;
export const NUMBER = 1;
/** Neither empty nor a number. */
export const OTHER = 2;

/**
 * Where the fields of a sentence stand and what they are.
 *
 * Receivers print most sentences in the same layout again and again: only digits change. To see that
 * a layout fits takes a look at its commas, points and signs alone; learning one takes every byte.
 */
export class FieldLayout {
  /** Fields. */
  count = 0;
  // By field; empty from `count` on.
  readonly kinds = new Uint8Array(MOST_FIELDS);
  /** −1 and 1 for a number with that sign, 0 without. */
  readonly signs = new Int8Array(MOST_FIELDS);
  readonly wholeDigits = new Uint8Array(MOST_FIELDS);
  /** At most nine; more are not counted. */
  readonly decimals = new Uint8Array(MOST_FIELDS);
  /** By field, first byte from the start of the first field; one more for the end. */
  readonly starts = new Int32Array(MOST_FIELDS + 1);
  /** Bytes from the first field to `*`; −1 when the layout cannot be used again. */
  #length = -1;
  /** Place × 256 + byte of every comma, point and sign. */
  readonly #marks = new Int32Array(3 * MOST_FIELDS);
  #markCount = 0;

  /** Whether commas, points and signs of a sentence stand where this layout has them. */
  fits(bytes: Uint8Array, from: number, end: number): boolean {
    if (end - from !== this.#length) return false;
    const marks = this.#marks;
    const markCount = this.#markCount;
    for (let k = 0; k < markCount; k += 1) {
      const mark = marks[k] ?? 0;
      if (bytes[from + (mark >> 8)] !== (mark & 0xff)) return false;
    }
    return true;
  }

  learn(bytes: Uint8Array, from: number, end: number): void {
    this.#markCount = 0;
    this.#length = end - from;
    let count = 0;
    let at = from;
    while (at <= end && count < MOST_FIELDS) {
      this.starts[count] = at - from;
      let stop = at;
      while (stop < end && bytes[stop] !== COMMA) stop += 1;
      this.kinds[count] = this.#learnField(bytes, from, count, stop);
      if (stop < end) this.#mark(from, stop, COMMA);
      at = stop + 1;
      count += 1;
    }
    this.starts[count] = at - from;
    this.kinds.fill(EMPTY, count);
    // What stands behind the last field was not looked at, and need not be the same.
    if (at <= end) this.#length = -1;
    this.count = count;
  }

  /** Learns the field that ends at `stop`; returns what it is. */
  #learnField(bytes: Uint8Array, from: number, field: number, stop: number): number {
    const start = from + (this.starts[field] ?? 0);
    if (start === stop) return EMPTY;
    const first = bytes[start] ?? 0;
    const isSigned = first === MINUS || first === PLUS;
    const wholeStart = isSigned ? start + 1 : start;
    const wholeEnd = digitsEnd(bytes, wholeStart, stop);
    const hasPoint = wholeEnd < stop && bytes[wholeEnd] === DOT;
    const numberEnd = hasPoint ? digitsEnd(bytes, wholeEnd + 1, stop) : wholeEnd;
    const wholeDigits = wholeEnd - wholeStart;
    const decimals = hasPoint ? numberEnd - wholeEnd - 1 : 0;
    if (numberEnd < stop || wholeDigits > MOST_DIGITS || wholeDigits + decimals === 0) return OTHER;
    if (isSigned) this.#mark(from, start, first);
    if (hasPoint) this.#mark(from, wholeEnd, DOT);
    // Digits that are not counted would not be looked at the next time.
    if (decimals > MOST_DIGITS) this.#length = -1;
    this.signs[field] = isSigned ? (first === MINUS ? -1 : 1) : 0;
    this.wholeDigits[field] = wholeDigits;
    this.decimals[field] = Math.min(decimals, MOST_DIGITS);
    return NUMBER;
  }

  #mark(from: number, place: number, byte: number): void {
    this.#marks[this.#markCount] = ((place - from) << 8) | byte;
    this.#markCount += 1;
  }
}

function digitsEnd(bytes: Uint8Array, from: number, stop: number): number {
  let at = from;
  while (at < stop && isDigit(bytes[at] ?? 0)) at += 1;
  return at;
}
