import {COMMA, DOT, isDigit, MINUS, PLUS} from './bytes.ts';

/** More than any sentence that is decoded has; further fields are not looked at. */
export const MOST_FIELDS = 40;
/** Digits that fit into a 32-bit integer. */
const MOST_DIGITS = 9;

/**
 * What a field is, in bits: its kind, its sign, digits before the point (4 bits), decimals (4 bits).
 */
export const FieldShape = {
  empty: 0,
  number: 0x1000,
  /** Neither empty nor a number. */
  other: 0x2000,
  /** The first byte is a sign. */
  signed: 0x200,
  negative: 0x100,
  wholeDigits: 0xf0,
  decimals: 0x0f,
} as const;
const WHOLE_DIGITS_SHIFT = 4;

/** The shape of a whole number without sign of so many digits. */
export function wholeShape(digits: number): number {
  return FieldShape.number | (digits << WHOLE_DIGITS_SHIFT);
}

/**
 * Where the fields of a sentence stand and what they are.
 *
 * Receivers print most sentences in the same layout again and again: only digits change. To see that
 * a layout fits takes a look at its commas, points and signs alone; learning one takes every byte.
 */
export class FieldLayout {
  /** Fields. */
  count = 0;
  /** By field, `FieldShape` bits; empty from `count` on. */
  readonly shapes = new Int32Array(MOST_FIELDS);
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
    for (let k = 0; k < this.#markCount; k += 1) {
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
      this.shapes[count] = this.#shapeOf(bytes, from, at, stop);
      if (stop < end) this.#mark(from, stop, COMMA);
      at = stop + 1;
      count += 1;
    }
    this.starts[count] = at - from;
    this.shapes.fill(FieldShape.empty, count);
    // What stands behind the last field was not looked at, and need not be the same.
    if (at <= end) this.#length = -1;
    this.count = count;
  }

  #shapeOf(bytes: Uint8Array, from: number, start: number, stop: number): number {
    if (start === stop) return FieldShape.empty;
    let shape: number = FieldShape.number;
    let at = start;
    const sign = bytes[at] ?? 0;
    if (sign === MINUS || sign === PLUS) {
      shape |= FieldShape.signed | (sign === MINUS ? FieldShape.negative : 0);
      at += 1;
    }
    const wholeEnd = digitsEnd(bytes, at, stop);
    const hasPoint = wholeEnd < stop && bytes[wholeEnd] === DOT;
    const fractionEnd = hasPoint ? digitsEnd(bytes, wholeEnd + 1, stop) : wholeEnd;
    const wholeDigits = wholeEnd - at;
    let decimals = hasPoint ? fractionEnd - wholeEnd - 1 : 0;
    if (fractionEnd < stop || wholeDigits > MOST_DIGITS || wholeDigits + decimals === 0) {
      return FieldShape.other;
    }
    if ((shape & FieldShape.signed) !== 0) this.#mark(from, start, sign);
    if (hasPoint) this.#mark(from, wholeEnd, DOT);
    if (decimals > MOST_DIGITS) {
      decimals = MOST_DIGITS;
      this.#length = -1;
    }
    return shape | (wholeDigits << WHOLE_DIGITS_SHIFT) | decimals;
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
