import {MINUS, PLUS, ZERO} from './bytes.ts';
import {textOf} from './delimited.ts';

/** Powers of ten that a double holds exactly. */
const EXACT_POWERS = Array.from({length: 23}, (_, power) => Number(`1e${power}`));
/** So many digits always make an integer below 2^53. */
const EXACT_DIGITS = 15;

/** What people and programs write where a number is missing. */
const ABSENT = /^(nan|n\/?a|null|none|-+|\*+|\?+|\.+)$/i;
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([ed][+-]?\d{1,3})?$/i;

export const NumberState = {present: 0, absent: 1, unreadable: 2} as const;
export type NumberState = (typeof NumberState)[keyof typeof NumberState];

/**
 * Decodes the number in a byte range, correctly rounded as `Number` of its text would be.
 *
 * Method: up to 15 digits are gathered as an exact integer and scaled once by an exact power of
 * ten, so that a single rounding happens; longer ones, and exponents, take the way over the text.
 * Source: W. D. Clinger, How to read floating point numbers accurately, PLDI 1990,
 * doi:10.1145/93542.93557 (the exact case).
 */
export class NumberDecoder {
  state: NumberState = NumberState.absent;
  /** Digits behind the decimal mark of the last number, an exponent taken into account. */
  decimals = 0;
  readonly #mark: number;

  /** @param decimalMark the byte that stands between units and tenths */
  constructor(decimalMark: number) {
    this.#mark = decimalMark;
  }

  /** NaN unless `state` says that a number is present. */
  decode(bytes: Uint8Array, from: number, to: number): number {
    this.decimals = 0;
    if (from >= to) {
      this.state = NumberState.absent;
      return Number.NaN;
    }
    const sign = bytes[from];
    let at = sign === MINUS || sign === PLUS ? from + 1 : from;
    const first = at;
    let mantissa = 0;
    let digit = at < to ? (bytes[at] ?? 0) - ZERO : -1;
    while (digit >= 0 && digit <= 9) {
      mantissa = mantissa * 10 + digit;
      at += 1;
      digit = at < to ? (bytes[at] ?? 0) - ZERO : -1;
    }
    let digits = at - first;
    if (at < to && bytes[at] === this.#mark) {
      at += 1;
      const behind = at;
      digit = at < to ? (bytes[at] ?? 0) - ZERO : -1;
      while (digit >= 0 && digit <= 9) {
        mantissa = mantissa * 10 + digit;
        at += 1;
        digit = at < to ? (bytes[at] ?? 0) - ZERO : -1;
      }
      this.decimals = at - behind;
      digits += this.decimals;
    }
    if (at < to || digits === 0 || digits > EXACT_DIGITS) return this.#decodeText(bytes, from, to);
    this.state = NumberState.present;
    const value = mantissa / (EXACT_POWERS[this.decimals] ?? 1);
    return sign === MINUS ? -value : value;
  }

  #decodeText(bytes: Uint8Array, from: number, to: number): number {
    const written = textOf(bytes, from, to);
    this.decimals = 0;
    if (ABSENT.test(written)) {
      this.state = NumberState.absent;
      return Number.NaN;
    }
    const mark = String.fromCharCode(this.#mark);
    // Where the comma has the decimals, a point parts thousands, and those are not read.
    const text = mark === '.' ? written : written.replace('.', '?').replace(mark, '.');
    if (!NUMBER.test(text)) return this.#unreadable();
    // Fortran writes the exponent of a double as D.
    const [mantissa = '', exponent = '0'] = text.split(/[ed]/i);
    const point = mantissa.indexOf('.');
    const behind = point < 0 ? 0 : mantissa.length - point - 1;
    this.decimals = Math.max(0, behind - Number(exponent));
    const value = Number(`${mantissa}e${exponent}`);
    if (!Number.isFinite(value)) return this.#unreadable();
    this.state = NumberState.present;
    return value;
  }

  #unreadable(): number {
    this.decimals = 0;
    this.state = NumberState.unreadable;
    return Number.NaN;
  }
}
