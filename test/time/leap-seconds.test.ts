import {describe, expect, test} from 'vitest';
import {daysFromCivil} from '../../src/time/calendar.ts';
import {
  gpsMinusUtcOnDay,
  hasLeapSecond,
  LEAP_SECONDS,
  leapSecondsKnownOnDay,
} from '../../src/time/leap-seconds.ts';
import {readReference} from '../reference/read.ts';

interface TimeReference {
  readonly leap_seconds: {
    readonly rows: readonly {utc_from: string; gps_minus_utc: number | null}[];
  };
}
const rows = readReference<TimeReference>('time').leap_seconds.rows;

describe('leap seconds', () => {
  test('reference: every entry of leap-seconds.list since 1980, no more and no fewer', () => {
    const sinceGps = rows.filter((row) => row.gps_minus_utc !== null);
    const ours = LEAP_SECONDS.map(({from, gpsMinusUtcS}) => ({
      utc_from: `${from.year}-${two(from.month)}-${two(from.day)}T00:00:00Z`,
      gps_minus_utc: gpsMinusUtcS,
    }));
    expect(ours).toEqual(sinceGps.map(({utc_from, gps_minus_utc}) => ({utc_from, gps_minus_utc})));
    expect(ours).toHaveLength(19);
  });

  test('the day before an entry ends with 23:59:60, no other day does', () => {
    for (const {from} of LEAP_SECONDS.slice(1)) {
      const day = daysFromCivil(from);
      expect(hasLeapSecond(day - 1)).toBe(true);
      expect(hasLeapSecond(day)).toBe(false);
      expect(hasLeapSecond(day - 2)).toBe(false);
    }
    expect(gpsMinusUtcOnDay(daysFromCivil({year: 1979, month: 5, day: 1}))).toBe(0);
  });

  test('the list is known to be complete until 28 June 2027', () => {
    expect(leapSecondsKnownOnDay(daysFromCivil({year: 2027, month: 6, day: 27}))).toBe(true);
    expect(leapSecondsKnownOnDay(daysFromCivil({year: 2027, month: 6, day: 28}))).toBe(false);
  });
});

function two(value: number): string {
  return String(value).padStart(2, '0');
}
