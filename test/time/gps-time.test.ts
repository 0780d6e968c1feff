import {describe, expect, test} from 'vitest';
import {type CivilDate, daysFromCivil} from '../../src/time/calendar.ts';
import {
  decimalYear,
  gpsSecondsFromDecimalYear,
  gpsSecondsFromGpsCalendar,
  gpsSecondsFromGpsWeek,
  gpsSecondsFromUnix,
  gpsSecondsFromUtc,
  gpsSecondsOfUtcMidnight,
  gpsWeekFromGpsSeconds,
  isoUtc,
  leapSecondsKnownAt,
  unixFromGpsSeconds,
  utcFieldsFromGpsSeconds,
  utcFromGpsSeconds,
} from '../../src/time/gps-time.ts';
import {readReference} from '../reference/read.ts';

interface TimeReference {
  readonly utc_pairs: readonly {
    utc: string;
    gps_minus_utc: number;
    gps_week: number;
    tow_s: number;
    gps_seconds: number;
    unix: number;
  }[];
  readonly leap_second_itself: {utc: string; gps_week: number; tow_s: number};
  readonly gps_calendar_pairs: readonly {gps_calendar: string; gps_week: number; tow_s: number}[];
  readonly facts: {
    readonly rollovers_10bit: readonly {week: number; gps: string; utc: string}[];
  };
}
const reference = readReference<TimeReference>('time');

function fieldsOf(iso: string): {date: CivilDate; secondOfDay: number} {
  const part = (from: number, to: number) => Number(iso.slice(from, to));
  return {
    date: {year: part(0, 4), month: part(5, 7), day: part(8, 10)},
    secondOfDay: part(11, 13) * 3600 + part(14, 16) * 60 + part(17, 19),
  };
}

describe('GPS time', () => {
  test('reference: 22 UTC moments and their GPS week, time of week and Unix time, ERFA 2.0.0', () => {
    expect(reference.utc_pairs).toHaveLength(22);
    for (const row of reference.utc_pairs) {
      const {date, secondOfDay} = fieldsOf(row.utc);
      expect(gpsSecondsFromUtc(date, secondOfDay)).toBe(row.gps_seconds);
      expect(utcFromGpsSeconds(row.gps_seconds)).toEqual({date, secondOfDay});
      expect(isoUtc(row.gps_seconds)).toBe(row.utc);
      expect(gpsWeekFromGpsSeconds(row.gps_seconds)).toEqual({
        week: row.gps_week,
        secondOfWeek: row.tow_s,
      });
      expect(gpsSecondsFromGpsWeek({week: row.gps_week, secondOfWeek: row.tow_s})).toBe(
        row.gps_seconds,
      );
      expect(unixFromGpsSeconds(row.gps_seconds)).toBe(row.unix);
      expect(gpsSecondsFromUnix(row.unix)).toBe(row.gps_seconds);
    }
  });

  test('reference: the leap second of 2016 itself', () => {
    const {utc, gps_week, tow_s} = reference.leap_second_itself;
    const gpsSeconds = gpsSecondsFromGpsWeek({week: gps_week, secondOfWeek: tow_s});
    const {date, secondOfDay} = fieldsOf(utc);
    expect(secondOfDay).toBe(86_400);
    expect(gpsSecondsFromUtc(date, secondOfDay)).toBe(gpsSeconds);
    expect(isoUtc(gpsSeconds)).toBe(utc);
    expect(isoUtc(gpsSeconds + 0.999_9, 3)).toBe('2017-01-01T00:00:00.000Z');
    expect(isoUtc(gpsSeconds + 0.25, 2)).toBe('2016-12-31T23:59:60.25Z');
    expect(isoUtc(gpsSeconds - 0.4)).toBe('2016-12-31T23:59:60Z');
    expect(utcFieldsFromGpsSeconds(gpsSeconds + 0.5)).toEqual({
      year: 2016,
      month: 12,
      day: 31,
      hour: 23,
      minute: 59,
      second: 60.5,
    });
  });

  test('reference: 7 dates of the GPS calendar, and the rollovers of the 10-bit week', () => {
    expect(reference.gps_calendar_pairs).toHaveLength(7);
    for (const row of reference.gps_calendar_pairs) {
      const {date, secondOfDay} = fieldsOf(row.gps_calendar);
      const gpsSeconds = gpsSecondsFromGpsWeek({week: row.gps_week, secondOfWeek: row.tow_s});
      expect(gpsSecondsFromGpsCalendar(date, secondOfDay)).toBe(gpsSeconds);
    }
    for (const {week, utc} of reference.facts.rollovers_10bit) {
      expect(isoUtc(gpsSecondsFromGpsWeek({week, secondOfWeek: 0}))).toBe(utc.slice(0, 20));
    }
  });

  test('property: UTC there and back over every hour of 45 years', () => {
    let wrong = 0;
    for (let gpsSeconds = 0.5; gpsSeconds < 45 * 31_557_600; gpsSeconds += 3600) {
      const {date, secondOfDay} = utcFromGpsSeconds(gpsSeconds);
      if (gpsSecondsFromUtc(date, secondOfDay) !== gpsSeconds) wrong++;
    }
    expect(wrong).toBe(0);
  });

  test('times that do not exist give undefined', () => {
    expect(gpsSecondsFromUtc({year: 2016, month: 12, day: 31}, 86_400.9)).toBeDefined();
    expect(gpsSecondsFromUtc({year: 2016, month: 12, day: 31}, 86_401)).toBeUndefined();
    expect(gpsSecondsFromUtc({year: 2016, month: 12, day: 30}, 86_400)).toBeUndefined();
    expect(gpsSecondsFromUtc({year: 2016, month: 12, day: 30}, -1)).toBeUndefined();
    expect(gpsSecondsFromUtc({year: 2016, month: 12, day: 30}, Number.NaN)).toBeUndefined();
    expect(gpsSecondsFromUtc({year: 2016, month: 2, day: 30}, 0)).toBeUndefined();
    expect(gpsSecondsFromUtc({year: 1980, month: 1, day: 5}, 0)).toBeUndefined();
    expect(gpsSecondsFromGpsCalendar({year: 1980, month: 1, day: 5}, 0)).toBeUndefined();
    expect(gpsSecondsFromGpsCalendar({year: 2016, month: 12, day: 31}, 86_400)).toBeUndefined();
    expect(() => isoUtc(Number.NaN)).toThrow(RangeError);
  });

  test('rounding carries through minute, day and year', () => {
    const newYear = gpsSecondsOfUtcMidnight(daysFromCivil({year: 2026, month: 1, day: 1}));
    expect(isoUtc(newYear - 0.001, 2)).toBe('2026-01-01T00:00:00.00Z');
    expect(isoUtc(newYear - 0.01, 2)).toBe('2025-12-31T23:59:59.99Z');
    expect(isoUtc(newYear + 0.05, 1)).toMatch(/^2026-01-01T00:00:00\.[01]Z$/);
    expect(isoUtc(newYear + 3661)).toBe('2026-01-01T01:01:01Z');
  });

  test('decimal years there and back', () => {
    const noon = gpsSecondsFromUtc({year: 2025, month: 7, day: 2}, 43_200);
    expect(decimalYear(noon ?? 0)).toBe(2025.5);
    expect(gpsSecondsFromDecimalYear(2025.5)).toBe(noon);
    for (const year of [1994.123, 2016.9999, 2020, 2026.3397]) {
      expect(decimalYear(gpsSecondsFromDecimalYear(year))).toBeCloseTo(year, 10);
    }
  });

  test('after the expiry of the list UTC is an assumption', () => {
    expect(leapSecondsKnownAt(gpsSecondsFromDecimalYear(2026.3))).toBe(true);
    expect(leapSecondsKnownAt(gpsSecondsFromDecimalYear(2027.5))).toBe(false);
  });
});
