import {describe, expect, test} from 'vitest';
import {readReference} from '../reference/read.ts';
import {type Asked, findingCodes, readLines} from './table-text.ts';

interface UtcPair {
  readonly utc: string;
  readonly gps_week: number;
  readonly tow_s: number;
  readonly gps_seconds: number;
  readonly unix: number;
  readonly mjd_utc: string;
  readonly day_of_year: number;
}

const {utc_pairs: utcPairs, gps_calendar_pairs: gpsPairs} = readReference<{
  utc_pairs: readonly UtcPair[];
  gps_calendar_pairs: readonly {
    readonly gps_calendar: string;
    readonly gps_week: number;
    readonly tow_s: number;
    readonly mjd: number;
  }[];
}>('time');

const XYZ = '4051761.6268,617191.1131,4870822.7374';

/** The moment that the only row of a table is dated by. */
function momentOf(names: string, values: string, asked: Asked = {}): number {
  const {epochs} = readLines([`${names},x,y,z`, `${values},${XYZ}`], asked);
  expect(epochs.count).toBe(1);
  return epochs.gpsSeconds[0] ?? Number.NaN;
}

const UNTIL_2199 = utcPairs.filter(({utc}) => !utc.includes(':60'));

describe('reference: UTC and GPS time computed with ERFA 2.0.0 (test/reference/time.json)', () => {
  test('there are pairs to compare', () => {
    expect(UNTIL_2199.length).toBeGreaterThan(15);
    expect(gpsPairs.length).toBeGreaterThan(5);
  });

  test.each(UNTIL_2199)('$utc in every form of UTC', (pair) => {
    const {utc, gps_seconds: expected} = pair;
    const [date = '', clock = ''] = utc.replace('Z', '').split('T');
    const [hour, minute, second] = clock.split(':');
    const [year, month, day] = date.split('-');
    const secondOfDay = Number(hour) * 3600 + Number(minute) * 60 + Number(second);
    expect(momentOf('time', utc)).toBe(expected);
    expect(momentOf('time', `${date} ${clock}`)).toBe(expected);
    expect(momentOf('time', `${date.replaceAll('-', '')}T${clock}Z`)).toBe(expected);
    expect(momentOf('time', `${date}T${clock}+00:00`)).toBe(expected);
    expect(momentOf('date,time', `${date},${clock}`)).toBe(expected);
    expect(momentOf('date,time', `${date.replaceAll('-', '/')},${clock}`)).toBe(expected);
    expect(momentOf('date,hhmmss', `${date},${clock.replaceAll(':', '')}`)).toBe(expected);
    expect(momentOf('date,sod', `${date},${secondOfDay}`)).toBe(expected);
    expect(
      momentOf('year,month,day,hour,min,sec', [year, month, day, hour, minute, second].join()),
    ).toBe(expected);
    expect(momentOf('year,doy,sod', `${year},${pair.day_of_year},${secondOfDay}`)).toBe(expected);
    expect(momentOf('year,doy,time', `${year},${pair.day_of_year},${clock}`)).toBe(expected);
    expect(momentOf('unix', String(pair.unix))).toBe(expected);
    expect(momentOf('unix_ms', `${pair.unix}000`)).toBe(expected);
    // Eight decimals of a day, cut and not rounded, are 0.864 ms.
    expect(Math.abs(momentOf('mjd', pair.mjd_utc) - expected)).toBeLessThan(8.65e-4);
    expect(
      momentOf('time', clock, {date: {year: Number(year), month: Number(month), day: Number(day)}}),
    ).toBe(expected);
  });

  test.each(utcPairs)('$utc as GPS week $gps_week and seconds', (pair) => {
    expect(momentOf('gps_week,tow_s', `${pair.gps_week},${pair.tow_s}`)).toBe(pair.gps_seconds);
    expect(momentOf('week,tow_ms', `${pair.gps_week},${pair.tow_s * 1000}`)).toBe(pair.gps_seconds);
    expect(momentOf('gps_seconds', String(pair.gps_seconds))).toBe(pair.gps_seconds);
  });

  test.each(gpsPairs)('$gps_calendar on the GPS scale', (pair) => {
    const expected = pair.gps_week * 604_800 + pair.tow_s;
    expect(momentOf('time', pair.gps_calendar, {timeScale: 'gps'})).toBe(expected);
    expect(momentOf('time (GPST)', pair.gps_calendar)).toBe(expected);
    const [date, clock] = pair.gps_calendar.split('T');
    expect(momentOf('gps_date,time', `${date},${clock}`)).toBe(expected);
  });

  test('23:59:60 stands between its neighbours', () => {
    const before = momentOf('time', '2016-12-31T23:59:59Z');
    expect(momentOf('time', '2016-12-31T23:59:60Z')).toBe(before + 1);
    expect(momentOf('time', '2016-12-31T23:59:60.5Z')).toBe(before + 1.5);
    expect(momentOf('time', '2017-01-01T00:00:00Z')).toBe(before + 2);
  });
});

describe('times of a table', () => {
  const start = 1_400_000_000;

  test('an offset from UTC moves the moment', () => {
    expect(momentOf('time', '2026-05-04T12:30:00+02:00')).toBe(
      momentOf('time', '2026-05-04T10:30:00Z'),
    );
  });

  test('seconds, minutes and milliseconds since --start', () => {
    expect(momentOf('t', '12.5', {startGpsSeconds: start})).toBe(start + 12.5);
    expect(momentOf('time', '12.5', {startGpsSeconds: start})).toBe(start + 12.5);
    expect(momentOf('elapsed_ms', '12500', {startGpsSeconds: start})).toBe(start + 12.5);
    expect(momentOf('time [min]', '2', {startGpsSeconds: start})).toBe(start + 120);
  });

  test('a decimal year is a share of its own year', () => {
    // 2024 has 366 days: its middle is the start of day 184, the second of July.
    expect(momentOf('decimal_year', '2024.5')).toBe(momentOf('time', '2024-07-02T00:00:00Z'));
    expect(momentOf('year', '2024.5')).toBe(momentOf('time', '2024-07-02T00:00:00Z'));
  });

  test('a fraction of the day of year', () => {
    expect(momentOf('year,doy', '2026,124.25')).toBe(momentOf('time', '2026-05-04T06:00:00Z'));
  });

  test('times of day alone run on past midnight from --date, and say so', () => {
    const lines = ['time,x,y,z', `23:59:59,${XYZ}`, `00:00:00.5,${XYZ}`, `00:00:01Z,${XYZ}`];
    const {epochs} = readLines(lines, {date: {year: 2026, month: 5, day: 4}});
    const first = epochs.gpsSeconds[0] ?? Number.NaN;
    expect([...epochs.gpsSeconds]).toEqual([first, first + 1.5, first + 2]);
    expect([...epochs.flags].every((flags) => (flags & 32) !== 0)).toBe(true);
  });

  test('a scale that nobody states is taken as UTC, aloud', () => {
    const lines = ['time,x,y,z', `2026-05-04 10:00:00,${XYZ}`];
    const contents = readLines(lines);
    expect(contents.timeScale).toBe('utc');
    expect(findingCodes(contents)).toContain('time-scale-assumed');
    expect(findingCodes(readLines(lines, {timeScale: 'utc'}))).not.toContain('time-scale-assumed');
    const zoned = readLines(['time,x,y,z', `2026-05-04T10:00:00Z,${XYZ}`]);
    expect(findingCodes(zoned)).not.toContain('time-scale-assumed');
    expect(
      findingCodes(readLines(['time [utc],x,y,z', `2026-05-04T10:00:00,${XYZ}`])),
    ).not.toContain('time-scale-assumed');
  });

  test('a small week is doubted', () => {
    const doubted = readLines(['week,tow,x,y,z', `369,1,${XYZ}`]);
    expect(doubted.findings).toContainEqual({
      code: 'gps-week-below-1024',
      severity: 'caution',
      values: {week: 369},
    });
  });

  const refused: readonly (readonly [string, string, string])[] = [
    ['2026-02-30T10:00:00Z', 'time', 'unreadable time: no such day'],
    ['2026-05-04T25:00:00Z', 'time', 'unreadable time: no such time of day'],
    ['2026-05-04T10:00:60Z', 'time', 'unreadable time: no such leap second'],
    ['1979-05-04T10:00:00Z', 'time', 'unreadable time: before GPS time began'],
    ['', 'time', 'unreadable time: not a date and time'],
    ['yesterday', 'time', 'unreadable time: not a date'],
    ['2417,604800', 'gps_week,tow', 'unreadable time: out of range'],
    ['2417,', 'gps_week,tow', 'unreadable time: no number'],
    ['24.5,5', 'gps_week,tow', 'unreadable time: out of range'],
    ['2026,366', 'year,doy', 'unreadable time: no such day'],
    ['2026,13,1,0', 'year,month,day,hour', 'unreadable time: no such day'],
    ['2026,12,1,24', 'year,month,day,hour', 'unreadable time: no such time of day'],
    ['9e12', 'unix', 'unreadable time: out of range'],
    ['1950.5', 'decimal_year', 'unreadable time: out of range'],
    ['12', 'mjd', 'unreadable time: before GPS time began'],
    ['2026-05-04,90000', 'date,sod', 'unreadable time: out of range'],
  ];
  const good: Readonly<Record<string, string>> = {
    time: '2026-05-04T10:00:00Z',
    'gps_week,tow': '2417,100',
    'year,doy': '2026,124',
    'year,month,day,hour': '2026,5,4,10',
    unix: '1777888800',
    decimal_year: '2026.3',
    mjd: '61164.4',
    'date,sod': '2026-05-04,36000',
  };

  test.each(refused)('the row "%s" under %s is rejected: %s', (values, names, reason) => {
    const lines = [`${names},x,y,z`, `${good[names]},${XYZ}`, `${values},${XYZ}`];
    const {inputs, epochs} = readLines(lines);
    expect(inputs[0]?.lines.rejected).toEqual({[reason]: 1});
    expect(epochs.count).toBe(1);
  });

  test('a zone on a later row of a table in GPS time is rejected', () => {
    const lines = ['time,x,y,z', `2026-05-04T10:00:00,${XYZ}`];
    for (let k = 1; k < 60; k += 1)
      lines.push(`2026-05-04T10:00:${String(k).padStart(2, '0')},${XYZ}`);
    lines.push(`2026-05-04T10:01:00Z,${XYZ}`);
    const {inputs} = readLines(lines, {timeScale: 'gps'});
    expect(inputs[0]?.lines.rejected).toEqual({'unreadable time: time zone on a GPS time': 1});
  });
});
