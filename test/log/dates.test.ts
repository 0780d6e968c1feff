import {describe, expect, test} from 'vitest';
import {EpochFlag} from '../../src/epochs/epochs.ts';
import type {LogContents} from '../../src/log/contents.ts';
import {isoUtc} from '../../src/time/gps-time.ts';
import {findingOf, gga, lines, readText, rmc} from './nmea-text.ts';

function times({epochs}: LogContents): string[] {
  return [...epochs.gpsSeconds].map((gpsSeconds) => isoUtc(gpsSeconds));
}

describe('dates', () => {
  test('reach the epochs before and behind them', () => {
    const contents = readText(
      lines(gga('120000.00'), gga('120001.00'), rmc('120001.00', '050826'), gga('120002.00')),
    );
    expect(times(contents)).toEqual([
      '2026-08-05T12:00:00Z',
      '2026-08-05T12:00:01Z',
      '2026-08-05T12:00:02Z',
    ]);
  });

  test('go on across midnight, and reach back across it', () => {
    const bodies = [gga('235959.00'), gga('000000.00'), 'GNZDA,000000.00,01,03,2028,00,00'];
    expect(times(readText(lines(...bodies)))).toEqual([
      '2028-02-29T23:59:59Z',
      '2028-03-01T00:00:00Z',
    ]);
    const forward = [gga('235959.00'), rmc('235959.00', '311226'), gga('000000.00')];
    expect(times(readText(lines(...forward)))).toEqual([
      '2026-12-31T23:59:59Z',
      '2027-01-01T00:00:00Z',
    ]);
  });

  test('a time that runs back over midnight is a day earlier', () => {
    const bodies = [
      gga('235959.00'),
      rmc('235959.00', '311226'),
      gga('000000.00'),
      gga('235958.00'),
      gga('000001.00'),
    ];
    const contents = readText(lines(...bodies));
    expect(times(contents)[0]).toBe('2026-12-31T23:59:58Z');
    expect(findingOf(contents, 'time-back')?.values).toMatchObject({times: 1, largestS: 2});
  });

  test('hold from where a log was interrupted for days', () => {
    const bodies = [
      ...[gga('180000.00'), rmc('180000.00', '050826'), gga('180001.00')],
      // Two days and fifteen hours later; the first epoch comes before its date.
      ...[gga('090000.00'), gga('090001.00'), rmc('090001.00', '080826')],
      ...[gga('090002.00'), rmc('090002.00', '080826')],
    ];
    expect(times(readText(lines(...bodies)))).toEqual([
      '2026-08-05T18:00:00Z',
      '2026-08-05T18:00:01Z',
      '2026-08-08T09:00:00Z',
      '2026-08-08T09:00:01Z',
      '2026-08-08T09:00:02Z',
    ]);
  });

  test('a single date at the end, behind an interruption, is believed', () => {
    const bodies = [gga('180000.00'), rmc('180000.00', '050826'), gga('090000.00')];
    const contents = readText(lines(...bodies, rmc('090000.00', '080826')));
    expect(times(contents).at(-1)).toBe('2026-08-08T09:00:00Z');
  });

  test('a single date that contradicts its neighbours is not believed', () => {
    const bodies = ['050826', '050826', '040826', '050826'].flatMap((date, k) => [
      gga(`12000${k}.00`),
      rmc(`12000${k}.00`, date),
    ]);
    const contents = readText(lines(...bodies));
    expect(times(contents)).toEqual([0, 1, 2, 3].map((k) => `2026-08-05T12:00:0${k}Z`));
    expect(findingOf(contents, 'date-conflict')?.values).toEqual({dates: 1});
  });

  test('a date that is wrong once at the very end is not believed', () => {
    const bodies = ['050826', '050826', '060826'].flatMap((date, k) => [
      gga(`12000${k}.00`),
      rmc(`12000${k}.00`, date),
    ]);
    const contents = readText(lines(...bodies));
    expect(times(contents).at(-1)).toBe('2026-08-05T12:00:02Z');
    expect(findingOf(contents, 'date-conflict')?.values).toEqual({dates: 1});
  });

  test('a first date that all others contradict is not believed', () => {
    const bodies = ['010100', '050826', '050826', '050826'].flatMap((date, k) => [
      gga(`12000${k}.00`),
      rmc(`12000${k}.00`, date),
    ]);
    const contents = readText(lines(...bodies));
    expect(times(contents)[0]).toBe('2026-08-05T12:00:00Z');
    expect(findingOf(contents, 'date-conflict')?.values).toEqual({dates: 1});
  });

  test('the date before a fix is believed only if there is no other', () => {
    const cold = [rmc('115958.00', '060180', 'V'), rmc('115959.00', '060180', 'V')];
    const fixed = [gga('120000.00'), rmc('120000.00', '050826')];
    expect(times(readText(lines(...cold, ...fixed)))).toEqual(['2026-08-05T12:00:00Z']);
    const doubtful = readText(lines(rmc('115958.00', '050826', 'V'), gga('120000.00')));
    expect(times(doubtful)).toEqual(['2026-08-05T12:00:00Z']);
    expect(findingOf(doubtful, 'date-doubtful')?.values).toEqual({date: '2026-08-05'});
  });

  test('the date of RMC goes before that of ZDA', () => {
    for (const order of [0, 1]) {
      const bodies = [rmc('120000.00', '050826'), 'GNZDA,120000.00,06,08,2026,00,00'];
      const contents = readText(
        lines(gga('120000.00'), ...(order === 0 ? bodies : [...bodies].reverse())),
      );
      expect(times(contents)).toEqual(['2026-08-05T12:00:00Z']);
    }
  });

  test('of ZDA with two digits of the year, as some instruments print it', () => {
    expect(times(readText(lines(gga('120000.00'), 'GPZDA,120000,05,08,26,-02,00')))).toEqual([
      '2026-08-05T12:00:00Z',
    ]);
  });

  test('before GPS time are what a receiver prints that does not know the date', () => {
    const contents = readText(lines(gga('120000.00'), 'GPZDA,120000.00,01,01,1970,00,00'));
    expect(findingOf(contents, 'no-date')).toBeDefined();
  });
});

describe('a log without a date', () => {
  const text = lines(gga('235959.00'), gga('000000.00'));

  test('stands on a placeholder day, and says so', () => {
    const contents = readText(text);
    expect(times(contents)).toEqual(['1980-01-06T23:59:59Z', '1980-01-07T00:00:00Z']);
    expect(findingOf(contents, 'no-date')).toEqual({
      code: 'no-date',
      severity: 'concern',
      values: {placeholderDate: '1980-01-06'},
    });
  });

  test('takes the date that is given for its first epoch, and says so', () => {
    const contents = readText(text, {date: {year: 2026, month: 8, day: 5}});
    expect(times(contents)).toEqual(['2026-08-05T23:59:59Z', '2026-08-06T00:00:00Z']);
    expect(findingOf(contents, 'date-assumed')?.values).toEqual({date: '2026-08-05'});
    expect(contents.epochs.flags.every((flags) => (flags & EpochFlag.dateAssumed) !== 0)).toBe(
      true,
    );
  });

  test('a date of its own beats the given one, with a notice', () => {
    const own = lines(gga('120000.00'), rmc('120000.00', '050826'));
    const contents = readText(own, {date: {year: 2025, month: 1, day: 1}});
    expect(times(contents)).toEqual(['2026-08-05T12:00:00Z']);
    expect(findingOf(contents, 'date-overridden')?.values).toEqual({
      logDate: '2026-08-05',
      givenDate: '2025-01-01',
    });
    expect(contents.epochs.flags[0]! & EpochFlag.dateAssumed).toBe(0);
    const agreeing = readText(own, {date: {year: 2026, month: 8, day: 5}});
    expect(findingOf(agreeing, 'date-overridden')).toBeUndefined();
  });
});

describe('leap seconds and rollovers', () => {
  test('reference: IERS Bulletin C 52: 23:59:60 on 31 December 2016 lasts one second', () => {
    const stamps = ['235959.00', '235960.00', '000000.00'];
    const bodies = stamps.map((time) => gga(time));
    const contents = readText(lines(rmc('235958.00', '311216'), ...bodies));
    const {gpsSeconds} = contents.epochs;
    expect([...gpsSeconds].map((t) => t - gpsSeconds[0]!)).toEqual([0, 1, 2]);
    expect(times(contents)).toEqual([
      '2016-12-31T23:59:59Z',
      '2016-12-31T23:59:60Z',
      '2017-01-01T00:00:00Z',
    ]);
    expect(findingOf(contents, 'leap-second-seen')?.values).toEqual({times: 1, known: true});
  });

  test('a leap second that the list does not know is told', () => {
    const contents = readText(lines(rmc('235958.00', '050826'), gga('235960.50')));
    expect(findingOf(contents, 'leap-second-seen')?.values).toEqual({times: 1, known: false});
  });

  test('a date before the first rollover is suspected', () => {
    const contents = readText(lines(gga('120000.00'), rmc('120000.00', '201296')));
    expect(findingOf(contents, 'rollover-suspected')?.values).toEqual({
      date: '1996-12-20',
      // 1024 weeks later.
      dateAfterRollover: '2016-08-05',
      because: 'before the first rollover',
    });
  });

  test('a date from before Galileo in a log with Galileo is suspected, another is not', () => {
    const gsv = 'GAGSV,1,1,01,13,45,100,40';
    const early = readText(lines(gga('120000.00'), rmc('120000.00', '201204'), gsv));
    expect(findingOf(early, 'rollover-suspected')?.values).toMatchObject({because: 'GAGSV'});
    const late = readText(lines(gga('120000.00'), rmc('120000.00', '201214'), gsv));
    expect(findingOf(late, 'rollover-suspected')).toBeUndefined();
  });
});
