import {describe, expect, test} from 'vitest';
import {
  civilFromDayOfYear,
  civilFromDays,
  dayOfYear,
  daysFromCivil,
  daysInMonth,
  decimalYearOfDate,
  isCivilDate,
} from '../../src/time/calendar.ts';
import {readReference} from '../reference/read.ts';

interface TimeReference {
  readonly utc_pairs: readonly {utc: string; mjd_utc: string; day_of_year: number}[];
}
const {utc_pairs} = readReference<TimeReference>('time');

function dateOf(iso: string) {
  return {
    year: Number(iso.slice(0, 4)),
    month: Number(iso.slice(5, 7)),
    day: Number(iso.slice(8, 10)),
  };
}

describe('calendar', () => {
  test('reference: Modified Julian Dates and days of the year of 22 moments, ERFA 2.0.0', () => {
    expect(utc_pairs).toHaveLength(22);
    for (const {utc, mjd_utc, day_of_year} of utc_pairs) {
      // MJD 40587 is 1970-01-01.
      expect(daysFromCivil(dateOf(utc)) + 40_587).toBe(Math.floor(Number(mjd_utc)));
      expect(dayOfYear(dateOf(utc))).toBe(day_of_year);
      expect(civilFromDayOfYear(dateOf(utc).year, day_of_year)).toEqual(dateOf(utc));
    }
  });

  test('reference: every day from 1600 to 2400 is that of the calendar of ECMA-262', () => {
    const first = Date.UTC(1600, 0, 1) / 86_400_000;
    const last = Date.UTC(2400, 11, 31) / 86_400_000;
    let checked = 0;
    for (let days = first; days <= last; days++) {
      const date = new Date(days * 86_400_000);
      const expected = {
        year: date.getUTCFullYear(),
        month: date.getUTCMonth() + 1,
        day: date.getUTCDate(),
      };
      const found = civilFromDays(days);
      if (
        found.year !== expected.year ||
        found.month !== expected.month ||
        found.day !== expected.day ||
        daysFromCivil(expected) !== days
      ) {
        expect(found).toEqual(expected);
      }
      checked++;
    }
    expect(checked).toBe(292_560);
  });

  test('days that do not exist are known as such', () => {
    expect(isCivilDate({year: 2024, month: 2, day: 29})).toBe(true);
    expect(isCivilDate({year: 2000, month: 2, day: 29})).toBe(true);
    expect(isCivilDate({year: 2025, month: 2, day: 29})).toBe(false);
    expect(isCivilDate({year: 1900, month: 2, day: 29})).toBe(false);
    expect(isCivilDate({year: 2025, month: 13, day: 1})).toBe(false);
    expect(isCivilDate({year: 2025, month: 0, day: 1})).toBe(false);
    expect(isCivilDate({year: 2025, month: 4, day: 31})).toBe(false);
    expect(isCivilDate({year: 2025, month: 4, day: 0})).toBe(false);
    expect(isCivilDate({year: 2025.5, month: 4, day: 1})).toBe(false);
    expect(daysInMonth(2025, 12)).toBe(31);
    expect(civilFromDayOfYear(2025, 366)).toBeUndefined();
    expect(civilFromDayOfYear(2024, 366)).toEqual({year: 2024, month: 12, day: 31});
    expect(civilFromDayOfYear(2024, 0)).toBeUndefined();
  });

  test('a decimal year divides the year by its own length', () => {
    expect(decimalYearOfDate({year: 2026, month: 1, day: 1}, 0)).toBe(2026);
    expect(decimalYearOfDate({year: 2025, month: 7, day: 2}, 43_200)).toBe(2025.5);
    expect(decimalYearOfDate({year: 2024, month: 7, day: 2}, 0)).toBe(2024.5);
  });
});
