import {describe, expect, test} from 'vitest';
import {isoUtc} from '../../src/time/gps-time.ts';
import {
  joinDateAndTime,
  momentOf,
  parseDate,
  parseDateTime,
  parseTimeOfDay,
} from '../../src/time/parse-time.ts';

function utcOf(text: string, timeScale: 'utc' | 'gps' = 'utc'): string {
  const parsed = parseDateTime(text);
  if (parsed.kind === 'refused') return parsed.reason;
  const moment = momentOf(parsed, timeScale);
  return moment.kind === 'refused' ? moment.reason : isoUtc(moment.gpsSeconds, 3);
}

describe('dates', () => {
  test.each([
    ['2026-05-04', 2026, 5, 4],
    ['2026/5/4', 2026, 5, 4],
    ['2026.05.04', 2026, 5, 4],
    ['20260504', 2026, 5, 4],
    ['2026-124', 2026, 5, 4],
    [' 2024-02-29 ', 2024, 2, 29],
  ])('%s is understood', (text, year, month, day) => {
    expect(parseDate(text)).toEqual({kind: 'date', date: {year, month, day}});
  });

  test.each([
    ['04.05.2026', 'day and month could be swapped'],
    ['04/05/2026', 'day and month could be swapped'],
    ['5-4-2026', 'day and month could be swapped'],
    ['04.05.26', 'two-digit year'],
    ['2025-02-29', 'no such day'],
    ['2025-366', 'no such day'],
    ['2025-000', 'no such day'],
    ['2026-13-01', 'no such day'],
    ['2026-05/04', 'not a date'],
    ['yesterday', 'not a date'],
    ['', 'not a date'],
  ])('%s is refused: %s', (text, reason) => {
    expect(parseDate(text)).toEqual({kind: 'refused', reason});
  });
});

describe('times of day', () => {
  test.each([
    ['10:20:30', 620, 30],
    ['10:20:30.25', 620, 30.25],
    ['10:20:30,25', 620, 30.25],
    ['1:02', 62, 0],
    ['102030.5', 620, 30.5],
    ['23:59:60.9', 1439, 60.9],
  ])('%s is understood', (text, minuteOfDay, secondOfMinute) => {
    expect(parseTimeOfDay(text)).toEqual({kind: 'time of day', minuteOfDay, secondOfMinute});
  });

  test.each([
    ['24:00:00', 'no such time of day'],
    ['10:60:00', 'no such time of day'],
    ['10:20:61', 'no such time of day'],
    ['10.20.30', 'not a time of day'],
    ['noon', 'not a time of day'],
  ])('%s is refused: %s', (text, reason) => {
    expect(parseTimeOfDay(text)).toEqual({kind: 'refused', reason});
  });
});

describe('date and time', () => {
  test.each([
    ['2026-05-04T10:20:30Z', '2026-05-04T10:20:30.000Z'],
    ['2026-05-04 10:20:30.5', '2026-05-04T10:20:30.500Z'],
    ['2026-05-04t10:20:30z', '2026-05-04T10:20:30.000Z'],
    ['2026/05/04  10:20:30 UTC', '2026-05-04T10:20:30.000Z'],
    ['2026-05-04T10:20:30+02:00', '2026-05-04T08:20:30.000Z'],
    ['2026-05-04T01:20:30+0530', '2026-05-03T19:50:30.000Z'],
    ['2026-12-31T23:20:30-03', '2027-01-01T02:20:30.000Z'],
    ['20260504T102030Z', '2026-05-04T10:20:30.000Z'],
    ['2016-12-31T23:59:60Z', '2016-12-31T23:59:60.000Z'],
    ['2017-01-01T00:59:60+01:00', '2016-12-31T23:59:60.000Z'],
    ['2016-12-31T23:59:60+01:00', 'no such leap second'],
    ['2015-12-31T23:59:60Z', 'no such leap second'],
    ['2026-05-04T10:20:30+15:00', 'no such time of day'],
    ['2026-05-04', 'not a date and time'],
    ['2026-05-04T', 'not a date and time'],
    ['2026-05-04T10:20:30 local', 'not a time of day'],
    ['04.05.2026 10:20:30', 'day and month could be swapped'],
    ['1979-05-04T10:20:30Z', 'before GPS time began'],
    ['1980-01-05T10:20:30Z', 'before GPS time began'],
  ])('%s → %s', (text, expected) => {
    expect(utcOf(text)).toBe(expected);
  });

  test('GPS-scale times have no leap second and no zone', () => {
    expect(utcOf('2026-05-04T10:20:48', 'gps')).toBe('2026-05-04T10:20:30.000Z');
    expect(utcOf('2026-05-04T10:20:48Z', 'gps')).toBe('time zone on a GPS time');
    expect(utcOf('2016-12-31T23:59:60', 'gps')).toBe('no such leap second');
  });

  test('two fields of a table join', () => {
    expect(joinDateAndTime('2026-05-04', '10:20:30.5')).toEqual({
      kind: 'date and time',
      date: {year: 2026, month: 5, day: 4},
      secondOfDay: 37_230.5,
      zoneStated: false,
    });
    expect(joinDateAndTime('2026-05-04', '')).toEqual({
      kind: 'refused',
      reason: 'not a time of day',
    });
  });
});
