import {daysFromCivil, isCivilDate, SECONDS_PER_DAY} from '../time/calendar.ts';
import {COMMA, DOT, hexValue, MINUS, PLUS, ZERO} from './bytes.ts';
import {Rejection} from './rejections.ts';

/** 10^0 to 10^22, the powers of ten that a double holds exactly. */
const POWERS_OF_TEN = Float64Array.from({length: 23}, (_, exponent) => Number(`1e${exponent}`));

/** Digits that fit into a 32-bit integer. */
const MOST_DIGITS = 9;

const NORTH = 0x4e;
const SOUTH = 0x53;
const EAST = 0x45;
const WEST = 0x57;

/** `dateDays` of a sentence without a date. */
export const NO_DATE = -0x8000_0000;

/**
 * Reads the fields of one sentence from its bytes, from left to right, without making strings.
 *
 * An empty or missing field is absent: NaN, or the value that the method names. A field that is
 * there but cannot be what it should be sets `fault`, at which the decoder looks once, at its end.
 *
 * Doubles are written to columns, not returned: a returned one may be put on the heap.
 *
 * Accuracy: the digits before and behind the point are gathered as two integers of up to nine
 * digits. With up to 15 digits together the quotient below is that of two exact numbers, and so
 * the double nearest to the printed one; 16 to 18 digits may miss it by one unit in the last place.
 * Decimals beyond the ninth are passed over (2 µm of latitude).
 */
export class FieldReader {
  /** Why the sentence cannot be believed; `Rejection.none` while all is well. */
  fault: Rejection = Rejection.none;
  /** Decimals of the number read last, of the minutes after an angle; −1 when it was absent. */
  decimals = 0;
  #bytes: Uint8Array = new Uint8Array(0);
  #at = 0;
  #end = 0;
  // The number read last.
  #negative = false;
  #whole = 0;
  #wholeDigits = 0;
  #fraction = 0;

  /** Starts at the first field; `end` is the place of `*`, and the byte there must be readable. */
  begin(bytes: Uint8Array, from: number, end: number): void {
    this.#bytes = bytes;
    this.#at = from;
    this.#end = end;
    this.fault = Rejection.none;
  }

  /** Passes over so many fields. */
  skip(fields: number): void {
    const bytes = this.#bytes;
    const end = this.#end;
    let left = fields;
    let at = this.#at;
    while (left > 0 && at < end) {
      if (bytes[at] === COMMA) left -= 1;
      at += 1;
    }
    this.#at = left > 0 ? end + 1 : at;
  }

  /** The first byte of the next field; 0 when it is absent. */
  letter(): number {
    const byte = this.#at < this.#end ? (this.#bytes[this.#at] ?? 0) : COMMA;
    this.skip(1);
    return byte === COMMA ? 0 : byte;
  }

  /** Where the next field starts. */
  get place(): number {
    return this.#at;
  }

  /** Bytes of the next field, which stays the next one. */
  textLength(): number {
    let at = this.#at;
    while (at < this.#end && this.#bytes[at] !== COMMA) at += 1;
    return at - Math.min(this.#at, at);
  }

  /** A byte of the next field, counted from 0. */
  textByte(index: number): number {
    return this.#bytes[this.#at + index] ?? 0;
  }

  /** Fields that are left, the next one included. */
  fieldsLeft(): number {
    let fields = this.#at <= this.#end ? 1 : 0;
    for (let at = this.#at; at < this.#end; at += 1) if (this.#bytes[at] === COMMA) fields += 1;
    return fields;
  }

  /** One hexadecimal digit; −1 when absent or anything else. */
  hexDigit(): number {
    return hexValue(this.letter());
  }

  /** A whole number without sign; −1 when absent. */
  whole(): number {
    if (!this.#number()) return -1;
    if (this.decimals > 0 || this.#negative) this.fault = Rejection.number;
    return this.#whole;
  }

  /** A station that is a number; −1 when absent or named by letters, as some services do. */
  stationId(): number {
    const before = this.fault;
    const station = this.whole();
    if (this.fault === before) return station;
    this.fault = before;
    return -1;
  }

  decimalTo(column: Float64Array, row: number): void {
    if (!this.#number()) {
      column[row] = Number.NaN;
      return;
    }
    const power = POWERS_OF_TEN[this.decimals] ?? 1;
    const size = (this.#whole * power + this.#fraction) / power;
    column[row] = this.#negative ? -size : size;
  }

  /** `hhmmss.s` as seconds of the UTC day; 235960 gives 86400. */
  timeOfDayTo(column: Float64Array, row: number): void {
    if (!this.#number()) {
      column[row] = Number.NaN;
      return;
    }
    const power = POWERS_OF_TEN[this.decimals] ?? 1;
    const hour = Math.trunc(this.#whole / 10_000);
    const minute = Math.trunc(this.#whole / 100) % 100;
    const second = ((this.#whole % 100) * power + this.#fraction) / power;
    const isLeapSecond = second >= 60 && second < 61 && hour === 23 && minute === 59;
    const isTime = hour < 24 && minute < 60 && (second < 60 || isLeapSecond);
    if (!isTime || this.#negative || this.#wholeDigits !== 6) this.fault = Rejection.time;
    column[row] = isLeapSecond
      ? SECONDS_PER_DAY + (second - 60)
      : hour * 3600 + minute * 60 + second;
  }

  /** Two fields: `ddmm.mmmm` and N or S. */
  latitudeTo(column: Float64Array, row: number): void {
    this.#angleTo(column, row);
    const hemisphere = this.#hemisphere(NORTH, SOUTH);
    column[row] = (column[row] ?? 0) * hemisphere;
    if (Math.abs(column[row] ?? 0) > 90) this.fault = Rejection.position;
  }

  /** Two fields: `dddmm.mmmm` and E or W. */
  longitudeTo(column: Float64Array, row: number): void {
    this.#angleTo(column, row);
    const hemisphere = this.#hemisphere(EAST, WEST);
    column[row] = (column[row] ?? 0) * hemisphere;
    if (Math.abs(column[row] ?? 0) > 180) this.fault = Rejection.position;
  }

  /** `ddmmyy` as days since 1970-01-01, years 80 to 99 in the last century; `NO_DATE` if absent. */
  shortDateDays(): number {
    if (!this.#number()) return NO_DATE;
    if (this.decimals > 0 || this.#negative || this.#wholeDigits !== 6) this.fault = Rejection.date;
    const shortYear = this.#whole % 100;
    // GPS time began in 1980.
    const year = shortYear < 80 ? 2000 + shortYear : 1900 + shortYear;
    const month = Math.trunc(this.#whole / 100) % 100;
    return this.#daysOf(year, month, Math.trunc(this.#whole / 10_000));
  }

  /** Three fields: day, month, year; `NO_DATE` unless all three are there. */
  longDateDays(): number {
    const day = this.whole();
    const month = this.whole();
    const year = this.whole();
    return day < 0 || month < 0 || year < 0 ? NO_DATE : this.#daysOf(year, month, day);
  }

  #daysOf(year: number, month: number, day: number): number {
    if (isCivilDate({year, month, day})) return daysFromCivil({year, month, day});
    this.fault = Rejection.date;
    return NO_DATE;
  }

  #angleTo(column: Float64Array, row: number): void {
    if (!this.#number()) {
      column[row] = Number.NaN;
      return;
    }
    const power = POWERS_OF_TEN[this.decimals] ?? 1;
    const degrees = Math.trunc(this.#whole / 100);
    const minutes = ((this.#whole % 100) * power + this.#fraction) / power;
    if (minutes >= 60 || this.#negative) this.fault = Rejection.position;
    column[row] = degrees + minutes / 60;
  }

  /** The sign of the angle just read; it may be missing only with the angle. */
  #hemisphere(positive: number, negative: number): number {
    const letter = this.letter();
    if (letter === positive) return 1;
    if (letter !== negative && this.#wholeDigits > 0) this.fault = Rejection.position;
    return -1;
  }

  /** Gathers sign, digits and decimals of one field and passes over it; false when it is empty. */
  #number(): boolean {
    const bytes = this.#bytes;
    const end = this.#end;
    let at = this.#at;
    this.decimals = -1;
    this.#wholeDigits = 0;
    this.#fraction = 0;
    let byte = at < end ? (bytes[at] ?? 0) : COMMA;
    if (byte === COMMA) {
      this.#at = at < end ? at + 1 : end + 1;
      return false;
    }
    this.#negative = byte === MINUS;
    if (byte === MINUS || byte === PLUS) at += 1;
    const first = at;
    let value = 0;
    byte = (bytes[at] ?? 0) - ZERO;
    while (byte >= 0 && byte <= 9) {
      value = (Math.imul(value, 10) + byte) | 0;
      at += 1;
      byte = (bytes[at] ?? 0) - ZERO;
    }
    this.#whole = value;
    const wholeDigits = at - first;
    let decimals = 0;
    if (byte === DOT - ZERO) {
      const point = at;
      value = 0;
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
        value = this.#gather(point + 1, MOST_DIGITS);
      }
      this.#fraction = value;
    }
    this.#wholeDigits = wholeDigits;
    this.decimals = decimals;
    const isNumber = wholeDigits + decimals > 0 && wholeDigits <= MOST_DIGITS;
    if (isNumber && (at >= end || byte === COMMA - ZERO)) {
      this.#at = at + 1;
    } else {
      this.fault = Rejection.number;
      this.#at = at;
      this.skip(1);
    }
    return true;
  }

  #gather(from: number, digits: number): number {
    let value = 0;
    for (let k = 0; k < digits; k += 1) value = value * 10 + ((this.#bytes[from + k] ?? 0) - ZERO);
    return value;
  }
}
