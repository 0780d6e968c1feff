import {
  type CivilDate,
  civilFromDays,
  daysFromCivil,
  daysInYear,
  decimalYearOfDate,
  isCivilDate,
  SECONDS_PER_DAY,
} from './calendar.ts';
import {gpsMinusUtcOnDay, hasLeapSecond, leapSecondsKnownOnDay} from './leap-seconds.ts';

/*
 * GPS time is one continuous count here, `gpsSeconds`: seconds since 1980-01-06T00:00:00 GPS, which
 * was also midnight UTC. Elapsed times are plain differences, across leap seconds too. A double
 * near 1.5e9 resolves 2.4e-7 s.
 * Source: IS-GPS-200 (epoch, week of 604,800 s, TAI − GPS = 19 s).
 */

/** 1980-01-06, in days since 1970-01-01. */
export const GPS_EPOCH_DAY = 3657;
const SECONDS_PER_WEEK = 604_800;

/** A UTC date and time of day; `secondOfDay` reaches 86400 ≤ s < 86401 during a leap second. */
export interface UtcTime {
  readonly date: CivilDate;
  readonly secondOfDay: number;
}

/** The same with the time of day split; `second` is 60 ≤ s < 61 during a leap second. */
export interface UtcFields extends CivilDate {
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
}

export interface GpsWeek {
  /** Full week number, not reduced modulo 1024. */
  readonly week: number;
  readonly secondOfWeek: number;
}

/** `gpsSeconds` at 00:00:00 UTC of a day counted from 1970-01-01: the offset for hot loops. */
export function gpsSecondsOfUtcMidnight(daysSince1970: number): number {
  return (daysSince1970 - GPS_EPOCH_DAY) * SECONDS_PER_DAY + gpsMinusUtcOnDay(daysSince1970);
}

/** `gpsSeconds` at 00:00:00 of the GPS scale of a day counted from 1970-01-01. */
export function gpsSecondsOfGpsMidnight(daysSince1970: number): number {
  return (daysSince1970 - GPS_EPOCH_DAY) * SECONDS_PER_DAY;
}

/**
 * `gpsSeconds` of a UTC date and time of day.
 *
 * @returns undefined for a date that does not exist or lies before GPS time, and for a second of
 *          the day outside 0 ≤ s < 86400, unless that day ends with a leap second (s < 86401)
 */
export function gpsSecondsFromUtc(date: CivilDate, secondOfDay: number): number | undefined {
  if (!isCivilDate(date)) return undefined;
  const day = daysFromCivil(date);
  if (day < GPS_EPOCH_DAY || !(secondOfDay >= 0)) return undefined;
  const length = hasLeapSecond(day) ? SECONDS_PER_DAY + 1 : SECONDS_PER_DAY;
  return secondOfDay < length ? gpsSecondsOfUtcMidnight(day) + secondOfDay : undefined;
}

/** `gpsSeconds` of a date and time of day on the GPS scale, whose days all have 86,400 s. */
export function gpsSecondsFromGpsCalendar(
  date: CivilDate,
  secondOfDay: number,
): number | undefined {
  if (!isCivilDate(date) || !(secondOfDay >= 0 && secondOfDay < SECONDS_PER_DAY)) return undefined;
  const day = daysFromCivil(date);
  return day < GPS_EPOCH_DAY ? undefined : gpsSecondsOfGpsMidnight(day) + secondOfDay;
}

/** The UTC date and time of day; exact to the resolution of `gpsSeconds`. */
export function utcFromGpsSeconds(gpsSeconds: number): UtcTime {
  // The GPS day is the UTC day or, in the first seconds after GPS midnight, the day after it.
  const gpsDay = Math.floor(gpsSeconds / SECONDS_PER_DAY) + GPS_EPOCH_DAY;
  const day = gpsSeconds < gpsSecondsOfUtcMidnight(gpsDay) ? gpsDay - 1 : gpsDay;
  return {date: civilFromDays(day), secondOfDay: gpsSeconds - gpsSecondsOfUtcMidnight(day)};
}

/** UTC in calendar and clock fields, 23:59:60 included. */
export function utcFieldsFromGpsSeconds(gpsSeconds: number): UtcFields {
  const {date, secondOfDay} = utcFromGpsSeconds(gpsSeconds);
  const minuteOfDay = Math.min(Math.floor(secondOfDay / 60), 24 * 60 - 1);
  return {
    ...date,
    hour: Math.floor(minuteOfDay / 60),
    minute: minuteOfDay % 60,
    second: secondOfDay - minuteOfDay * 60,
  };
}

/**
 * UTC as ISO 8601, such as `2026-05-04T10:20:30Z` or with decimals `2026-05-04T10:20:30.250Z`.
 *
 * Rounded to the nearest unit of the last decimal on the continuous scale, so that a carry runs
 * through minutes, days and leap seconds alike.
 *
 * @param decimals 0 to 6; the count resolves no more
 */
export function isoUtc(gpsSeconds: number, decimals = 0): string {
  if (!Number.isFinite(gpsSeconds)) {
    throw new RangeError(`isoUtc: gpsSeconds must be finite, got ${gpsSeconds}`);
  }
  const unitsPerSecond = 10 ** decimals;
  const whole = Math.floor(gpsSeconds);
  const units = Math.round((gpsSeconds - whole) * unitsPerSecond);
  const carry = units === unitsPerSecond;
  const utc = utcFieldsFromGpsSeconds(carry ? whole + 1 : whole);
  const fraction = decimals === 0 ? '' : `.${digits(carry ? 0 : units, decimals)}`;
  const date = `${digits(utc.year, 4)}-${digits(utc.month, 2)}-${digits(utc.day, 2)}`;
  const time = `${digits(utc.hour, 2)}:${digits(utc.minute, 2)}:${digits(utc.second, 2)}`;
  return `${date}T${time}${fraction}Z`;
}

function digits(value: number, width: number): string {
  return String(value).padStart(width, '0');
}

export function gpsWeekFromGpsSeconds(gpsSeconds: number): GpsWeek {
  const week = Math.floor(gpsSeconds / SECONDS_PER_WEEK);
  return {week, secondOfWeek: gpsSeconds - week * SECONDS_PER_WEEK};
}

/** `gpsSeconds` of a full week number and the second of that week. */
export function gpsSecondsFromGpsWeek({week, secondOfWeek}: GpsWeek): number {
  return week * SECONDS_PER_WEEK + secondOfWeek;
}

/** Decimal year of the UTC moment, such as 2026.3397. */
export function decimalYear(gpsSeconds: number): number {
  const {date, secondOfDay} = utcFromGpsSeconds(gpsSeconds);
  return decimalYearOfDate(date, secondOfDay);
}

/**
 * `gpsSeconds` of a decimal year of UTC.
 *
 * Accuracy: a double near 2026 resolves 2.3e-13 years, 7 µs.
 */
export function gpsSecondsFromDecimalYear(year: number): number {
  const wholeYear = Math.floor(year);
  const seconds = (year - wholeYear) * daysInYear(wholeYear) * SECONDS_PER_DAY;
  const dayOffset = Math.floor(seconds / SECONDS_PER_DAY);
  const day = daysFromCivil({year: wholeYear, month: 1, day: 1}) + dayOffset;
  return gpsSecondsOfUtcMidnight(day) + (seconds - dayOffset * SECONDS_PER_DAY);
}

/**
 * Unix time, which repeats its count during a leap second (IEEE Std 1003.1, "Seconds Since the
 * Epoch"): 23:59:60 gives the number of the 00:00:00 that follows.
 */
export function unixFromGpsSeconds(gpsSeconds: number): number {
  const {date, secondOfDay} = utcFromGpsSeconds(gpsSeconds);
  return daysFromCivil(date) * SECONDS_PER_DAY + secondOfDay;
}

/** `gpsSeconds` of Unix time; a count that stands for two moments is taken as the later one. */
export function gpsSecondsFromUnix(unixSeconds: number): number {
  const day = Math.floor(unixSeconds / SECONDS_PER_DAY);
  return gpsSecondsOfUtcMidnight(day) + (unixSeconds - day * SECONDS_PER_DAY);
}

/** Whether the leap-second list covers the moment; if not, its UTC may be a second off. */
export function leapSecondsKnownAt(gpsSeconds: number): boolean {
  return leapSecondsKnownOnDay(daysFromCivil(utcFromGpsSeconds(gpsSeconds).date));
}
