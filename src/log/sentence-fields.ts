import {daysFromCivil, isCivilDate} from '../time/calendar.ts';
import {COMMA, DOT, hexValue, MINUS, PLUS, ZERO} from './bytes.ts';
import {Rejection} from './rejections.ts';

/** 10^0 to 10^22, the powers of ten that a double holds exactly. */
const POWERS_OF_TEN = Float64Array.from({length: 23}, (_, exponent) => Number(`1e${exponent}`));

/** Digits that fit into a 32-bit integer. */
const MOST_DIGITS = 9;
/** More than any sentence that is decoded has; further ones are not looked at. */
const MOST_FIELDS = 40;

// The shape of a field: what it is, its sign, digits before the point, decimals.
const EMPTY = 0;
const NUMBER = 0x1000;
const OTHER = 0x2000;
const NEGATIVE = 0x100;
const WHOLE_DIGITS_SHIFT = 4;
const DIGITS_MASK = 0xf;

const NORTH = 0x4e;
const SOUTH = 0x53;
const EAST = 0x45;
const WEST = 0x57;

const FIRST_GPS_DAY = daysFromCivil({year: 1980, month: 1, day: 6});

/** `dateDays` of a sentence without a date. */
export const NO_DATE = -0x8000_0000;

/**
 * The fields of one sentence, counted from 0 behind the address, read from its bytes without making
 * strings.
 *
 * Method: one pass over the bytes notes for every field whether it is empty, a number or something
 * else, and gathers the digits before and behind the point as two integers. Decoders then ask for
 * fields by their index. An empty or missing field is absent: NaN, or the value that the method
 * names. A field that is there but cannot be what it should be sets `fault`, at which the decoder
 * looks once, at its end.
 *
 * Doubles are written to columns, not returned: a returned one may be put on the heap.
 *
 * Accuracy: with up to 15 digits together, the quotient that makes the value is one of two exact
 * numbers, and so the double nearest to what is printed; 16 to 18 digits may miss it by one unit in
 * the last place. Decimals beyond the ninth are passed over (2 µm of latitude).
 */
export class SentenceFields {
  /** Why the sentence cannot be believed; `Rejection.none` while all is well. */
  fault: Rejection = Rejection.none;
  #bytes: Uint8Array = new Uint8Array(0);
  #count = 0;
  readonly #shapes = new Int32Array(MOST_FIELDS + 1);
  readonly #starts = new Int32Array(MOST_FIELDS + 2);
  readonly #wholes = new Int32Array(MOST_FIELDS + 1);
  readonly #fractions = new Int32Array(MOST_FIELDS + 1);

  get count(): number {
    return this.#count;
  }

  /**
   * Splits a sentence.
   *
   * @param from the first byte of the first field
   * @param end  the place of `*`; the byte there must be readable
   */
  split(bytes: Uint8Array, from: number, end: number): void {
    const shapes = this.#shapes;
    const starts = this.#starts;
    const wholes = this.#wholes;
    const fractions = this.#fractions;
    let count = 0;
    let at = from;
    while (at <= end && count < MOST_FIELDS) {
      starts[count] = at;
      let byte = at < end ? (bytes[at] ?? 0) : COMMA;
      if (byte === COMMA) {
        shapes[count] = EMPTY;
      } else {
        let shape = NUMBER;
        if (byte === MINUS || byte === PLUS) {
          if (byte === MINUS) shape |= NEGATIVE;
          at += 1;
        }
        const first = at;
        let value = 0;
        byte = (bytes[at] ?? 0) - ZERO;
        while (byte >= 0 && byte <= 9) {
          value = (Math.imul(value, 10) + byte) | 0;
          at += 1;
          byte = (bytes[at] ?? 0) - ZERO;
        }
        const wholeDigits = at - first;
        wholes[count] = value;
        value = 0;
        let decimals = 0;
        if (byte === DOT - ZERO) {
          const point = at;
          at += 1;
          byte = (bytes[at] ?? 0) - ZERO;
          while (byte >= 0 && byte <= 9) {
            value = (Math.imul(value, 10) + byte) | 0;
            at += 1;
            byte = (bytes[at] ?? 0) - ZERO;
          }
          decimals = at - point - 1;
          if (decimals > MOST_DIGITS) {
            decimals = MOST_DIGITS;
            value = firstDigits(bytes, point + 1, MOST_DIGITS);
          }
        }
        fractions[count] = value;
        const isEnd = at >= end || byte === COMMA - ZERO;
        if (!isEnd || wholeDigits > MOST_DIGITS || wholeDigits + decimals === 0) {
          shape = OTHER;
          while (at < end && bytes[at] !== COMMA) at += 1;
        }
        shapes[count] = shape | (wholeDigits << WHOLE_DIGITS_SHIFT) | decimals;
      }
      at += 1;
      count += 1;
    }
    starts[count] = at;
    for (let k = count; k < this.#count; k += 1) shapes[k] = EMPTY;
    this.#bytes = bytes;
    this.#count = count;
    this.fault = Rejection.none;
  }

  /** Decimals of a number, of the minutes of an angle; −1 when absent. */
  decimals(field: number): number {
    const shape = this.#shapes[field] ?? EMPTY;
    return shape === EMPTY ? -1 : shape & DIGITS_MASK;
  }

  /** The first byte; 0 when absent. */
  letter(field: number): number {
    if ((this.#shapes[field] ?? EMPTY) === EMPTY) return 0;
    return this.#bytes[this.#starts[field] ?? 0] ?? 0;
  }

  /** The number of bytes. */
  length(field: number): number {
    if ((this.#shapes[field] ?? EMPTY) === EMPTY) return 0;
    return (this.#starts[field + 1] ?? 0) - (this.#starts[field] ?? 0) - 1;
  }

  /** The byte at a place in a field, from 0. */
  byte(field: number, place: number): number {
    return this.#bytes[(this.#starts[field] ?? 0) + place] ?? 0;
  }

  /** One hexadecimal digit; −1 when absent or anything else. */
  hexDigit(field: number): number {
    return hexValue(this.letter(field));
  }

  /** A whole number without sign; −1 when absent. */
  whole(field: number): number {
    const shape = this.#shapes[field] ?? EMPTY;
    if (shape === EMPTY) return -1;
    if ((shape & ~(DIGITS_MASK << WHOLE_DIGITS_SHIFT)) !== NUMBER) this.fault = Rejection.number;
    return this.#wholes[field] ?? 0;
  }

  /** A station that is a number; −1 when absent or named by letters, as some services do. */
  stationId(field: number): number {
    const shape = this.#shapes[field] ?? EMPTY;
    const isWhole = (shape & ~(DIGITS_MASK << WHOLE_DIGITS_SHIFT)) === NUMBER;
    return isWhole ? (this.#wholes[field] ?? 0) : -1;
  }

  decimalTo(column: Float64Array, row: number, field: number): void {
    const shape = this.#shapes[field] ?? EMPTY;
    if (shape === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    if ((shape & NUMBER) === 0) this.fault = Rejection.number;
    const power = POWERS_OF_TEN[shape & DIGITS_MASK] ?? 1;
    const size = ((this.#wholes[field] ?? 0) * power + (this.#fractions[field] ?? 0)) / power;
    column[row] = (shape & NEGATIVE) === 0 ? size : -size;
  }

  /** `hhmmss.s` as seconds of the UTC day; 235960 gives 86400. */
  timeOfDayTo(column: Float64Array, row: number, field: number): void {
    const shape = this.#shapes[field] ?? EMPTY;
    if (shape === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    const whole = this.#wholes[field] ?? 0;
    const power = POWERS_OF_TEN[shape & DIGITS_MASK] ?? 1;
    const hour = Math.trunc(whole / 10_000);
    const minute = Math.trunc(whole / 100) % 100;
    const second = ((whole % 100) * power + (this.#fractions[field] ?? 0)) / power;
    const isLeapSecond = second >= 60 && second < 61 && hour === 23 && minute === 59;
    if (hour > 23 || minute > 59 || (second >= 60 && !isLeapSecond)) this.fault = Rejection.time;
    if ((shape & ~DIGITS_MASK) !== (NUMBER | (6 << WHOLE_DIGITS_SHIFT)))
      this.fault = Rejection.time;
    column[row] = hour * 3600 + minute * 60 + second;
  }

  /** Two fields: `ddmm.mmmm` and N or S. */
  latitudeTo(column: Float64Array, row: number, field: number): void {
    this.#angleTo(column, row, field, 90);
    const hemisphere = this.letter(field + 1);
    if (hemisphere === SOUTH) column[row] = -(column[row] ?? 0);
    else if (hemisphere !== NORTH && this.letter(field) !== 0) this.fault = Rejection.position;
  }

  /** Two fields: `dddmm.mmmm` and E or W. */
  longitudeTo(column: Float64Array, row: number, field: number): void {
    this.#angleTo(column, row, field, 180);
    const hemisphere = this.letter(field + 1);
    if (hemisphere === WEST) column[row] = -(column[row] ?? 0);
    else if (hemisphere !== EAST && this.letter(field) !== 0) this.fault = Rejection.position;
  }

  #angleTo(column: Float64Array, row: number, field: number, limitDeg: number): void {
    const shape = this.#shapes[field] ?? EMPTY;
    if (shape === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    const whole = this.#wholes[field] ?? 0;
    const power = POWERS_OF_TEN[shape & DIGITS_MASK] ?? 1;
    const degrees = Math.trunc(whole / 100);
    const minutes = ((whole % 100) * power + (this.#fractions[field] ?? 0)) / power;
    const angleDeg = degrees + minutes / 60;
    if ((shape & (NUMBER | NEGATIVE)) !== NUMBER || minutes >= 60 || angleDeg > limitDeg) {
      this.fault = Rejection.position;
    }
    column[row] = angleDeg;
  }

  /** `ddmmyy` as days since 1970-01-01, `NO_DATE` if absent. */
  shortDateDays(field: number): number {
    const shape = this.#shapes[field] ?? EMPTY;
    if (shape === EMPTY) return NO_DATE;
    if (shape !== (NUMBER | (6 << WHOLE_DIGITS_SHIFT))) this.fault = Rejection.date;
    const whole = this.#wholes[field] ?? 0;
    const year = fullYear(whole % 100);
    return this.#daysOf(year, Math.trunc(whole / 100) % 100, Math.trunc(whole / 10_000));
  }

  /**
   * Three fields: day, month, year; `NO_DATE` unless all three are there. Some instruments print two
   * digits of the year.
   */
  longDateDays(field: number): number {
    const day = this.whole(field);
    const month = this.whole(field + 1);
    const year = this.whole(field + 2);
    if (day < 0 || month < 0 || year < 0) return NO_DATE;
    return this.#daysOf(this.length(field + 2) === 2 ? fullYear(year) : year, month, day);
  }

  /** A date before GPS time is what a receiver prints that does not know the date. */
  #daysOf(year: number, month: number, day: number): number {
    const date = {year, month, day};
    if (!isCivilDate(date)) {
      this.fault = Rejection.date;
      return NO_DATE;
    }
    const days = daysFromCivil(date);
    return days < FIRST_GPS_DAY ? NO_DATE : days;
  }
}

/** The year that two digits stand for: GPS time began in 1980. */
function fullYear(shortYear: number): number {
  return shortYear < 80 ? 2000 + shortYear : 1900 + shortYear;
}

function firstDigits(bytes: Uint8Array, from: number, digits: number): number {
  let value = 0;
  for (let k = 0; k < digits; k += 1) value = value * 10 + ((bytes[from + k] ?? 0) - ZERO);
  return value;
}
