import {type CivilDate, daysFromCivil} from './calendar.ts';

/** From midnight UTC of a date, GPS time runs ahead of UTC by so many seconds. */
export interface LeapSecondEntry {
  readonly from: CivilDate;
  readonly gpsMinusUtcS: number;
}

/**
 * GPS minus UTC since GPS time began.
 *
 * Source: IERS Bulletin C, in the form of the file leap-seconds.list as distributed with tzdata
 * 2025b and, unchanged, 2026f; TAI − UTC of that list less the constant 19 s of TAI − GPS
 * (IS-GPS-200).
 */
export const LEAP_SECONDS: readonly LeapSecondEntry[] = [
  {from: {year: 1980, month: 1, day: 1}, gpsMinusUtcS: 0},
  {from: {year: 1981, month: 7, day: 1}, gpsMinusUtcS: 1},
  {from: {year: 1982, month: 7, day: 1}, gpsMinusUtcS: 2},
  {from: {year: 1983, month: 7, day: 1}, gpsMinusUtcS: 3},
  {from: {year: 1985, month: 7, day: 1}, gpsMinusUtcS: 4},
  {from: {year: 1988, month: 1, day: 1}, gpsMinusUtcS: 5},
  {from: {year: 1990, month: 1, day: 1}, gpsMinusUtcS: 6},
  {from: {year: 1991, month: 1, day: 1}, gpsMinusUtcS: 7},
  {from: {year: 1992, month: 7, day: 1}, gpsMinusUtcS: 8},
  {from: {year: 1993, month: 7, day: 1}, gpsMinusUtcS: 9},
  {from: {year: 1994, month: 7, day: 1}, gpsMinusUtcS: 10},
  {from: {year: 1996, month: 1, day: 1}, gpsMinusUtcS: 11},
  {from: {year: 1997, month: 7, day: 1}, gpsMinusUtcS: 12},
  {from: {year: 1999, month: 1, day: 1}, gpsMinusUtcS: 13},
  {from: {year: 2006, month: 1, day: 1}, gpsMinusUtcS: 14},
  {from: {year: 2009, month: 1, day: 1}, gpsMinusUtcS: 15},
  {from: {year: 2012, month: 7, day: 1}, gpsMinusUtcS: 16},
  {from: {year: 2015, month: 7, day: 1}, gpsMinusUtcS: 17},
  {from: {year: 2017, month: 1, day: 1}, gpsMinusUtcS: 18},
];

/** Until this date the list is known to be complete; after it the last value is an assumption. */
export const LEAP_SECONDS_EXPIRE: CivilDate = {year: 2027, month: 6, day: 28};

/** Where the list comes from, in the words of the report. */
export const LEAP_SECONDS_SOURCE =
  'IERS leap-seconds.list, last entry 2017-01-01, valid to 2027-06-28';

const START_DAYS = LEAP_SECONDS.map((entry) => daysFromCivil(entry.from));
const OFFSETS_S = LEAP_SECONDS.map((entry) => entry.gpsMinusUtcS);
const EXPIRY_DAY = daysFromCivil(LEAP_SECONDS_EXPIRE);

/**
 * GPS minus UTC during a day, in seconds; the day is counted from 1970-01-01.
 *
 * Valid for: days from 1980-01-01; earlier days get the value of 1980 (0).
 */
export function gpsMinusUtcOnDay(daysSince1970: number): number {
  // Backwards, because logs are of today: the first comparison nearly always decides.
  for (let i = START_DAYS.length - 1; i > 0; i--) {
    if (daysSince1970 >= START_DAYS[i]!) return OFFSETS_S[i]!;
  }
  return OFFSETS_S[0]!;
}

/** Whether the day ends with 23:59:60. */
export function hasLeapSecond(daysSince1970: number): boolean {
  return gpsMinusUtcOnDay(daysSince1970 + 1) > gpsMinusUtcOnDay(daysSince1970);
}

/** Whether the list is known to be complete on that day. */
export function leapSecondsKnownOnDay(daysSince1970: number): boolean {
  return daysSince1970 < EXPIRY_DAY;
}
