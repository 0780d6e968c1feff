import {
  type CivilDate,
  civilFromDayOfYear,
  civilFromDays,
  daysFromCivil,
  daysInYear,
  isCivilDate,
  SECONDS_PER_DAY,
} from '../time/calendar.ts';
import {
  gpsSecondsFromGpsWeek,
  gpsSecondsFromUnix,
  gpsSecondsOfGpsMidnight,
  gpsSecondsOfUtcMidnight,
} from '../time/gps-time.ts';
import {
  joinDateAndTime,
  momentOf,
  parseDate,
  parseDateTime,
  type RefusedTime,
} from '../time/parse-time.ts';
import {isDigit, ZERO} from './bytes.ts';
import {type FieldSplitter, textOf} from './delimited.ts';
import {type NumberDecoder, NumberState} from './delimited-number.ts';
import type {CalendarColumns, NumberColumn, TableLayout} from './table-layout.ts';

const HYPHEN = 0x2d;
const SLASH = 0x2f;
const COLON = 0x3a;
const UPPER_T = 0x54;
const UPPER_Z = 0x5a;
const BLANK = 0x20;
/** Modified Julian Date of 1970-01-01. Source: ERFA, as in test/reference/c2_time.json; from memory. */
const MJD_OF_1970 = 40_587;
const SECONDS_PER_WEEK = 604_800;
const GPS_EPOCH_DAY = 3657;
/** Years in which satellite positioning had begun and will still be read by this program. */
const FIRST_YEAR = 1980;
const LAST_YEAR = 2199;

/**
 * Dates the rows of a table.
 *
 * The usual forms, `2026-05-04T10:20:30.5Z` and its parts, are decoded from the bytes; anything
 * else takes the way over `parse-time.ts`, so both read alike.
 */
export class TableClock {
  /** Why the last row could not be dated. */
  refusal: RefusedTime['reason'] | 'no number' | 'out of range' = 'not a date and time';
  readonly #layout: TableLayout;
  readonly #numbers: NumberDecoder;
  readonly #startGpsSeconds: number;
  #day: number;
  #dayKey = -1;
  #midnight = Number.NaN;
  #lastSecondOfDay = Number.NEGATIVE_INFINITY;

  constructor(
    layout: TableLayout,
    numbers: NumberDecoder,
    origin: {readonly startGpsSeconds: number | null; readonly date: CivilDate | null},
  ) {
    this.#layout = layout;
    this.#numbers = numbers;
    this.#startGpsSeconds = origin.startGpsSeconds ?? 0;
    this.#day = origin.date === null ? 0 : daysFromCivil(origin.date);
  }

  /** Seconds on the GPS scale; NaN with `refusal` when the row cannot be dated. */
  read(bytes: Uint8Array, fields: FieldSplitter): number {
    const {time} = this.#layout;
    switch (time.kind) {
      case 'date and time':
        return this.#dateTime(bytes, fields.start(time.field), fields.end(time.field));
      case 'date':
        return this.#date(bytes, fields, time.field);
      case 'date and clock':
        return this.#dateAndClock(bytes, fields, time.dateField, time.clockField);
      case 'date and seconds':
        return (
          this.#date(bytes, fields, time.dateField) + this.#secondOfDay(bytes, fields, time.seconds)
        );
      case 'calendar':
        return this.#calendar(bytes, fields, time.parts);
      case 'day of year':
        return this.#dayOfYear(bytes, fields, time);
      case 'gps week':
        return this.#gpsWeek(bytes, fields, time.week, time.seconds);
      case 'gps seconds':
        return this.#inRange(this.#number(bytes, fields, time.value));
      case 'unix':
        return this.#inRange(gpsSecondsFromUnix(this.#number(bytes, fields, time.value)));
      case 'modified Julian date':
        return this.#days(this.#number(bytes, fields, time.value) - MJD_OF_1970);
      case 'decimal year':
        return this.#decimalYear(this.#number(bytes, fields, time.value));
      case 'elapsed':
        return this.#startGpsSeconds + this.#number(bytes, fields, time.value);
      case 'clock':
        return this.#clockAlone(bytes, fields, time.field);
    }
  }

  /** `yyyy-mm-ddThh:mm:ss[.s][Z]`; any other form as text. */
  #dateTime(bytes: Uint8Array, from: number, to: number): number {
    const parted = bytes[from + 10];
    if (to - from >= 19 && (parted === UPPER_T || parted === BLANK)) {
      const zoned = bytes[to - 1] === UPPER_Z;
      const midnight = this.#midnightAt(bytes, from);
      const second = this.#clock(bytes, from + 11, zoned ? to - 1 : to);
      const mayBeZoned = !zoned || this.#layout.timeScale === 'utc';
      if (mayBeZoned && second >= 0 && !Number.isNaN(midnight)) return midnight + second;
    }
    if (from >= to) return this.#refuse('not a date and time');
    const parsed = parseDateTime(textOf(bytes, from, to));
    return parsed.kind === 'refused' ? this.#refuse(parsed.reason) : this.#moment(parsed);
  }

  #date(bytes: Uint8Array, fields: FieldSplitter, field: number): number {
    const from = fields.start(field);
    const to = fields.end(field);
    const midnight = to - from === 10 ? this.#midnightAt(bytes, from) : Number.NaN;
    if (!Number.isNaN(midnight)) return midnight;
    const parsed = parseDate(textOf(bytes, from, to));
    return parsed.kind === 'refused'
      ? this.#refuse(parsed.reason)
      : this.#days(daysFromCivil(parsed.date));
  }

  #dateAndClock(
    bytes: Uint8Array,
    fields: FieldSplitter,
    dateField: number,
    clockField: number,
  ): number {
    const dateFrom = fields.start(dateField);
    const dateTo = fields.end(dateField);
    const clockFrom = fields.start(clockField);
    const clockTo = fields.end(clockField);
    const second = this.#clock(bytes, clockFrom, clockTo);
    const midnight = dateTo - dateFrom === 10 ? this.#midnightAt(bytes, dateFrom) : Number.NaN;
    if (second >= 0 && !Number.isNaN(midnight)) return midnight + second;
    const parsed = joinDateAndTime(
      textOf(bytes, dateFrom, dateTo),
      textOf(bytes, clockFrom, clockTo),
    );
    return parsed.kind === 'refused' ? this.#refuse(parsed.reason) : this.#moment(parsed);
  }

  #secondOfDay(bytes: Uint8Array, fields: FieldSplitter, column: NumberColumn): number {
    const second = this.#number(bytes, fields, column);
    return second >= 0 && second <= SECONDS_PER_DAY ? second : this.#outOfRange(second);
  }

  #calendar(bytes: Uint8Array, fields: FieldSplitter, parts: CalendarColumns): number {
    const value = (column: NumberColumn | null): number =>
      column === null ? 0 : this.#number(bytes, fields, column);
    const date = {year: value(parts.year), month: value(parts.month), day: value(parts.day)};
    const hour = value(parts.hour);
    const minute = value(parts.minute);
    const second = value(parts.second);
    const secondOfDay = hour * 3600 + minute * 60 + second;
    if (Number.isNaN(secondOfDay)) return this.#refuse('no number');
    if (!isCivilDate(date) || date.year < FIRST_YEAR) return this.#refuse('no such day');
    const isClock =
      hour >= 0 && hour < 24 && minute >= 0 && minute < 60 && second >= 0 && second < 61;
    if (!isClock) return this.#refuse('no such time of day');
    return this.#moment({kind: 'date and time', date, secondOfDay, zoneStated: false});
  }

  #dayOfYear(
    bytes: Uint8Array,
    fields: FieldSplitter,
    columns: {
      readonly year: NumberColumn;
      readonly day: NumberColumn;
      readonly seconds: NumberColumn | null;
      readonly clockField: number | null;
    },
  ): number {
    const year = this.#number(bytes, fields, columns.year);
    const day = this.#number(bytes, fields, columns.day);
    if (!(year >= FIRST_YEAR && year <= LAST_YEAR) || Number.isNaN(day))
      return this.#outOfRange(day);
    const date = civilFromDayOfYear(year, Math.floor(day));
    if (date === undefined) return this.#refuse('no such day');
    const midnight = daysFromCivil(date);
    const ofDay = day - Math.floor(day);
    if (columns.seconds !== null) {
      return this.#days(midnight) + this.#secondOfDay(bytes, fields, columns.seconds);
    }
    if (columns.clockField === null) return this.#days(midnight + ofDay);
    const {clockField} = columns;
    const second = this.#clock(bytes, fields.start(clockField), fields.end(clockField));
    return second >= 0 ? this.#days(midnight) + second : this.#refuse('not a time of day');
  }

  #gpsWeek(
    bytes: Uint8Array,
    fields: FieldSplitter,
    weekColumn: NumberColumn,
    secondColumn: NumberColumn,
  ): number {
    const week = this.#number(bytes, fields, weekColumn);
    const secondOfWeek = this.#number(bytes, fields, secondColumn);
    if (Number.isNaN(week) || Number.isNaN(secondOfWeek)) return this.#refuse('no number');
    const isWeek = Number.isInteger(week) && week >= 0 && week < 20_000;
    const isSecond = secondOfWeek >= 0 && secondOfWeek < SECONDS_PER_WEEK;
    return isWeek && isSecond
      ? gpsSecondsFromGpsWeek({week, secondOfWeek})
      : this.#refuse('out of range');
  }

  #decimalYear(year: number): number {
    if (Number.isNaN(year)) return this.#refuse('no number');
    if (year < FIRST_YEAR || year > LAST_YEAR) return this.#refuse('out of range');
    const wholeYear = Math.floor(year);
    const firstDay = daysFromCivil({year: wholeYear, month: 1, day: 1});
    return this.#days(firstDay + (year - wholeYear) * daysInYear(wholeYear));
  }

  /** The date is that of the options; a time of day that runs back by half a day starts the next. */
  #clockAlone(bytes: Uint8Array, fields: FieldSplitter, field: number): number {
    const from = fields.start(field);
    const to = fields.end(field);
    let second = this.#clock(bytes, from, bytes[to - 1] === UPPER_Z ? to - 1 : to);
    if (!(second >= 0)) {
      const {year, month, day} = civilFromDays(this.#day);
      const parsed = joinDateAndTime(`${year}-${pad(month)}-${pad(day)}`, textOf(bytes, from, to));
      if (parsed.kind === 'refused') return this.#refuse(parsed.reason);
      second = parsed.secondOfDay;
    }
    if (second < this.#lastSecondOfDay - SECONDS_PER_DAY / 2) this.#day += 1;
    this.#lastSecondOfDay = second;
    return this.#days(this.#day) + second;
  }

  #number(bytes: Uint8Array, fields: FieldSplitter, {field, factor}: NumberColumn): number {
    const value = this.#numbers.decode(bytes, fields.start(field), fields.end(field));
    if (this.#numbers.state !== NumberState.present) this.refusal = 'no number';
    return value * factor;
  }

  /** Midnight of `yyyy-mm-dd` or `yyyy/mm/dd` on the scale of the table; NaN for another form. */
  #midnightAt(bytes: Uint8Array, from: number): number {
    const parting = bytes[from + 4];
    if ((parting !== HYPHEN && parting !== SLASH) || bytes[from + 7] !== parting) return Number.NaN;
    const year = twoDigits(bytes, from) * 100 + twoDigits(bytes, from + 2);
    const month = twoDigits(bytes, from + 5);
    const day = twoDigits(bytes, from + 8);
    const key = (year * 100 + month) * 100 + day;
    // A log stays on one day for long.
    if (key === this.#dayKey) return this.#midnight;
    if (!(year >= FIRST_YEAR) || !isCivilDate({year, month, day})) return Number.NaN;
    const midnight = this.#days(daysFromCivil({year, month, day}));
    this.#dayKey = key;
    this.#midnight = midnight;
    return midnight;
  }

  /** `hh:mm:ss[.s]` as seconds of the day; NaN for another form and for a leap second. */
  #clock(bytes: Uint8Array, from: number, to: number): number {
    if (to - from < 8 || bytes[from + 2] !== COLON || bytes[from + 5] !== COLON) return Number.NaN;
    if (!isDigit(bytes[from + 6] ?? 0)) return Number.NaN;
    const hour = twoDigits(bytes, from);
    const minute = twoDigits(bytes, from + 3);
    const second = this.#numbers.decode(bytes, from + 6, to);
    const isPlain = hour < 24 && minute < 60 && second < 60;
    return isPlain ? hour * 3600 + minute * 60 + second : Number.NaN;
  }

  #moment(parsed: Parameters<typeof momentOf>[0]): number {
    const moment = momentOf(parsed, this.#layout.timeScale);
    return moment.kind === 'moment' ? moment.gpsSeconds : this.#refuse(moment.reason);
  }

  /** A count of days since 1970-01-01, with a fraction, on the scale of the table. */
  #days(days: number): number {
    const whole = Math.floor(days);
    if (Number.isNaN(days)) return this.#refuse('no number');
    if (whole < GPS_EPOCH_DAY) return this.#refuse('before GPS time began');
    const midnight =
      this.#layout.timeScale === 'gps'
        ? gpsSecondsOfGpsMidnight(whole)
        : gpsSecondsOfUtcMidnight(whole);
    return midnight + (days - whole) * SECONDS_PER_DAY;
  }

  /** A moment of GPS time within the years that are believed. */
  #inRange(gpsSeconds: number): number {
    if (Number.isNaN(gpsSeconds)) return this.#refuse('no number');
    const years = gpsSeconds / SECONDS_PER_DAY / 365.25;
    return years >= 0 && years < LAST_YEAR - FIRST_YEAR ? gpsSeconds : this.#refuse('out of range');
  }

  #outOfRange(value: number): number {
    return this.#refuse(Number.isNaN(value) ? 'no number' : 'out of range');
  }

  #refuse(reason: TableClock['refusal']): number {
    this.refusal = reason;
    return Number.NaN;
  }
}

/** NaN unless both bytes are digits. */
function twoDigits(bytes: Uint8Array, at: number): number {
  const tens = bytes[at] ?? 0;
  const ones = bytes[at + 1] ?? 0;
  return isDigit(tens) && isDigit(ones) ? (tens - ZERO) * 10 + (ones - ZERO) : Number.NaN;
}

function pad(value: number): string {
  return String(value).padStart(2, '0');
}
