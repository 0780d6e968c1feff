import {daysFromCivil, isCivilDate} from '../time/calendar.ts';
import {hexValue} from './bytes.ts';
import {EMPTY, FieldLayout, NUMBER, OTHER} from './field-layout.ts';
import {Rejection} from './rejections.ts';

/** By decimals; a double holds them exactly. */
const POWERS_OF_TEN = Float64Array.from({length: 10}, (_, exponent) => 10 ** exponent);

/** Layouts that are kept of each kind of sentence, by their length. */
const LAYOUTS_PER_KIND = 64;
const KINDS = 16;

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
 * Method: the layout of the sentence, which tells where its fields stand, is found among those of
 * earlier sentences of its kind, or learned. Decoders then ask for fields by their index; a field that
 * turns out to be of another shape than the layout says has the layout learned anew. An empty or
 * missing field is absent: NaN, or the value that the method names. A field that is there but
 * cannot be what it should be sets `fault`, at which the decoder looks once, at its end.
 *
 * Doubles are written to columns, not returned: a returned one may be put on the heap.
 *
 * Accuracy: digits before and behind the point are gathered as two integers. With up to 15 digits
 * together, the quotient that makes the value is one of two exact numbers, and so the double
 * nearest to what is printed; 16 to 18 digits may miss it by one unit in the last place. Decimals
 * beyond the ninth are passed over (2 µm of latitude).
 */
export class SentenceFields {
  /** Why the sentence cannot be believed; `Rejection.none` while all is well. */
  fault: Rejection = Rejection.none;
  #bytes: Uint8Array = new Uint8Array(0);
  #view = new DataView(this.#bytes.buffer);
  #from = 0;
  #end = 0;
  readonly #layouts: Array<FieldLayout | undefined> = Array(KINDS * LAYOUTS_PER_KIND).fill(
    undefined,
  );
  #layout = new FieldLayout();
  /** Whether the layout was learned from this very sentence. */
  #isLearned = false;
  // The number read last.
  #sign = 0;
  #whole = 0;
  #wholeDigits = 0;
  #fraction = 0;
  #decimals = 0;

  get count(): number {
    return this.#layout.count;
  }

  /**
   * Begins with a sentence.
   *
   * @param from the first byte of the first field, at least four bytes from the beginning
   * @param end  the place of `*`
   * @param kind a `SentenceKind`: sentences of one kind have similar layouts
   */
  begin(bytes: Uint8Array, from: number, end: number, kind: number): void {
    if (bytes !== this.#bytes) {
      this.#bytes = bytes;
      this.#view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    }
    this.#from = from;
    this.#end = end;
    this.fault = Rejection.none;
    const slot = kind * LAYOUTS_PER_KIND + ((end - from) & (LAYOUTS_PER_KIND - 1));
    let layout = this.#layouts[slot];
    if (layout === undefined) {
      layout = new FieldLayout();
      this.#layouts[slot] = layout;
    }
    this.#layout = layout;
    this.#isLearned = !layout.fits(bytes, from, end);
    if (this.#isLearned) layout.learn(bytes, from, end);
  }

  /** Decimals of a number, of the minutes of an angle; −1 when absent. */
  decimals(field: number): number {
    return this.#layout.kinds[field] === NUMBER ? (this.#layout.decimals[field] ?? 0) : -1;
  }

  /** Whether there is anything in the field. */
  isGiven(field: number): boolean {
    return this.#layout.kinds[field] !== EMPTY;
  }

  /** The first byte; 0 when absent. */
  letter(field: number): number {
    return this.isGiven(field) ? this.byte(field, 0) : 0;
  }

  /** The number of bytes. */
  length(field: number): number {
    if (!this.isGiven(field)) return 0;
    const {starts} = this.#layout;
    return (starts[field + 1] ?? 0) - (starts[field] ?? 0) - 1;
  }

  /** The byte at a place in a field, from 0. */
  byte(field: number, place: number): number {
    return this.#bytes[this.#from + (this.#layout.starts[field] ?? 0) + place] ?? 0;
  }

  /** One hexadecimal digit; −1 when absent or anything else. */
  hexDigit(field: number): number {
    return hexValue(this.letter(field));
  }

  /** A whole number without sign; −1 when absent. */
  whole(field: number): number {
    const kind = this.#read(field);
    if (kind === EMPTY) return -1;
    if (kind !== NUMBER || this.#decimals > 0 || this.#sign !== 0) this.fault = Rejection.number;
    return this.#whole;
  }

  /** A station that is a number; −1 when absent or named by letters, as some services do. */
  stationId(field: number): number {
    const isWhole = this.#read(field) === NUMBER && this.#decimals === 0 && this.#sign === 0;
    return isWhole ? this.#whole : -1;
  }

  decimalTo(column: Float64Array, row: number, field: number): void {
    const kind = this.#read(field);
    if (kind === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    if (kind !== NUMBER) this.fault = Rejection.number;
    const power = POWERS_OF_TEN[this.#decimals] ?? 1;
    const size = (this.#whole * power + this.#fraction) / power;
    column[row] = this.#sign < 0 ? -size : size;
  }

  /** `hhmmss.s` as seconds of the UTC day; 235960 gives 86400. */
  timeOfDayTo(column: Float64Array, row: number, field: number): void {
    const kind = this.#read(field);
    if (kind === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    const whole = this.#whole;
    const power = POWERS_OF_TEN[this.#decimals] ?? 1;
    const hour = Math.trunc(whole / 10_000);
    const minute = Math.trunc(whole / 100) % 100;
    const second = ((whole % 100) * power + this.#fraction) / power;
    const isLeapSecond = second >= 60 && second < 61 && hour === 23 && minute === 59;
    const isTime = hour < 24 && minute < 60 && (second < 60 || isLeapSecond);
    if (!isTime || kind !== NUMBER || this.#wholeDigits !== 6 || this.#sign !== 0) {
      this.fault = Rejection.time;
    }
    column[row] = hour * 3600 + minute * 60 + second;
  }

  /** Two fields: `ddmm.mmmm` and N or S. */
  latitudeTo(column: Float64Array, row: number, field: number): void {
    this.#angleTo(column, row, field, 90);
    const hemisphere = this.letter(field + 1);
    if (hemisphere === SOUTH) column[row] = -(column[row] ?? 0);
    else if (hemisphere !== NORTH && this.isGiven(field)) this.fault = Rejection.position;
  }

  /** Two fields: `dddmm.mmmm` and E or W. */
  longitudeTo(column: Float64Array, row: number, field: number): void {
    this.#angleTo(column, row, field, 180);
    const hemisphere = this.letter(field + 1);
    if (hemisphere === WEST) column[row] = -(column[row] ?? 0);
    else if (hemisphere !== EAST && this.isGiven(field)) this.fault = Rejection.position;
  }

  #angleTo(column: Float64Array, row: number, field: number, limitDeg: number): void {
    const kind = this.#read(field);
    if (kind === EMPTY) {
      column[row] = Number.NaN;
      return;
    }
    const power = POWERS_OF_TEN[this.#decimals] ?? 1;
    const degrees = Math.trunc(this.#whole / 100);
    const minutes = ((this.#whole % 100) * power + this.#fraction) / power;
    const angleDeg = degrees + minutes / 60;
    if (kind !== NUMBER || this.#sign !== 0 || minutes >= 60 || angleDeg > limitDeg) {
      this.fault = Rejection.position;
    }
    column[row] = angleDeg;
  }

  /** `ddmmyy` as days since 1970-01-01; `NO_DATE` if absent. */
  shortDateDays(field: number): number {
    if (this.whole(field) < 0) return NO_DATE;
    const whole = this.#whole;
    if (this.#wholeDigits !== 6) this.fault = Rejection.date;
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

  /** Reads the digits of a field, if it is a number; returns what it is. */
  #read(field: number): number {
    const layout = this.#layout;
    const kind = layout.kinds[field] ?? EMPTY;
    if (kind === EMPTY) return kind;
    if (kind === NUMBER) {
      const sign = layout.signs[field] ?? 0;
      const wholeDigits = layout.wholeDigits[field] ?? 0;
      const decimals = layout.decimals[field] ?? 0;
      const start = this.#from + (layout.starts[field] ?? 0) + (sign === 0 ? 0 : 1);
      const whole = digitsAt(this.#view, start, wholeDigits);
      const fraction = decimals === 0 ? 0 : digitsAt(this.#view, start + wholeDigits + 1, decimals);
      this.#sign = sign;
      this.#whole = whole;
      this.#wholeDigits = wholeDigits;
      this.#fraction = fraction;
      this.#decimals = decimals;
      if (whole >= 0 && fraction >= 0) return kind;
    }
    if (this.#isLearned) return OTHER;
    this.#isLearned = true;
    layout.learn(this.#bytes, this.#from, this.#end);
    return this.#read(field);
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

/** The number that so many digits make, at most nine; negative when a byte among them is no digit. */
function digitsAt(view: DataView, from: number, digits: number): number {
  const end = from + digits;
  if (digits <= 4) return fourDigitsBefore(view, end, digits);
  const low = fourDigitsBefore(view, end, 4);
  const middle = fourDigitsBefore(view, end - 4, Math.min(digits - 4, 4));
  const high = digits > 8 ? fourDigitsBefore(view, end - 8, digits - 8) : 0;
  return (low | middle | high) < 0 ? -1 : high * 100_000_000 + middle * 10_000 + low;
}

/**
 * The number that up to four digits before a place make; negative when a byte among them is none.
 *
 * Method: four bytes are taken as one word, in which pairs of digits and then both pairs are put
 * together by one multiplication each (bench "decode": a fifth less time than digit by digit).
 */
function fourDigitsBefore(view: DataView, end: number, digits: number): number {
  if (digits === 0) return 0;
  const unused = (4 - digits) * 8;
  // The bytes before the digits become zero, as leading digits would.
  const word = ((view.getUint32(end - 4, true) ^ 0x30303030) >>> unused) << unused;
  // A byte above nine has its high bit set, or gets it by adding 0x80 − 10.
  if ((((word + 0x76767676) | word) & 0x80808080) !== 0) return -1;
  const pairs = (Math.imul(word, 10) + (word >>> 8)) & 0x00ff00ff;
  return (Math.imul(pairs, 100) + (pairs >>> 16)) & 0xffff;
}
