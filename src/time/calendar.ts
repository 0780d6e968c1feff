/** A date of the Gregorian calendar; months and days count from 1. */
export interface CivilDate {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

export const SECONDS_PER_DAY = 86_400;

const DAYS_PER_ERA = 146_097; // 400 Gregorian years
const DAYS_FROM_ERA_TO_1970 = 719_468; // 0000-03-01 to 1970-01-01

/**
 * Days from 1970-01-01 to a date, negative before it.
 *
 * Method: years start in March, so that the leap day is the last day of a year; eras of 400 years
 * make every division one of non-negative integers.
 * Valid for: any integer year; month and day are believed (`isCivilDate` checks them).
 * Source: the March-based year is common practice, no source; checked day by day against the
 * proleptic Gregorian calendar of ECMA-262 and the Modified Julian Dates of the reference.
 */
export function daysFromCivil({year, month, day}: CivilDate): number {
  const marchYear = month <= 2 ? year - 1 : year;
  const era = Math.floor(marchYear / 400);
  const yearOfEra = marchYear - era * 400;
  const monthFromMarch = (month + 9) % 12;
  const dayOfMarchYear = Math.floor((153 * monthFromMarch + 2) / 5) + day - 1;
  const dayOfEra =
    yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfMarchYear;
  return era * DAYS_PER_ERA + dayOfEra - DAYS_FROM_ERA_TO_1970;
}

/** The date that lies so many whole days after 1970-01-01; the inverse of `daysFromCivil`. */
export function civilFromDays(daysSince1970: number): CivilDate {
  const shifted = daysSince1970 + DAYS_FROM_ERA_TO_1970;
  const era = Math.floor(shifted / DAYS_PER_ERA);
  const dayOfEra = shifted - era * DAYS_PER_ERA;
  // Days that leap days have added so far are taken out, so that 365 divides what is left.
  const yearOfEra = Math.floor(
    (dayOfEra -
      Math.floor(dayOfEra / 1460) +
      Math.floor(dayOfEra / 36_524) -
      Math.floor(dayOfEra / 146_096)) /
      365,
  );
  const dayOfMarchYear =
    dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfMarchYear + 2) / 153);
  const day = dayOfMarchYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1;
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0);
  return {year, month, day};
}

function isLeapYear(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
}

export function daysInYear(year: number): number {
  return isLeapYear(year) ? 366 : 365;
}

export function daysInMonth(year: number, month: number): number {
  if (month === 2) return isLeapYear(year) ? 29 : 28;
  return month === 4 || month === 6 || month === 9 || month === 11 ? 30 : 31;
}

/** Whether the three numbers name a day that exists. */
export function isCivilDate({year, month, day}: CivilDate): boolean {
  return (
    Number.isInteger(year) &&
    Number.isInteger(month) &&
    Number.isInteger(day) &&
    month >= 1 &&
    month <= 12 &&
    day >= 1 &&
    day <= daysInMonth(year, month)
  );
}

/** Day of the year, 1 for the first of January. */
export function dayOfYear(date: CivilDate): number {
  return daysFromCivil(date) - daysFromCivil({year: date.year, month: 1, day: 1}) + 1;
}

/** The date of a day of the year; undefined when the year has no such day. */
export function civilFromDayOfYear(year: number, dayNumber: number): CivilDate | undefined {
  if (!Number.isInteger(dayNumber) || dayNumber < 1 || dayNumber > daysInYear(year)) {
    return undefined;
  }
  return civilFromDays(daysFromCivil({year, month: 1, day: 1}) + dayNumber - 1);
}

/**
 * A moment as a decimal year: the part of the year that has passed, by the length of that year.
 *
 * Source: the form in which frames state coordinate epochs (2010.0, 2026.34); common practice, no
 * source. The leap second's own 86400 s of the day is the start of the next day here, which is
 * 3e-8 of a year.
 */
export function decimalYearOfDate(date: CivilDate, secondOfDay: number): number {
  const days = dayOfYear(date) - 1 + secondOfDay / SECONDS_PER_DAY;
  return date.year + days / daysInYear(date.year);
}
