import {describe, expect, test} from 'vitest';
import {besideUtc, formatLocal, isTimeZone, spanBesideUtc} from '../../src/wording/time-zone.ts';

describe('the clock of a place beside UTC', () => {
  test('reference: IANA time zone database, summer and winter of Europe/Berlin', () => {
    expect(formatLocal('2026-05-12T09:12:00.500Z', 'Europe/Berlin')).toBe('2026-05-12 11:12:00');
    expect(formatLocal('2026-01-12T09:12:00Z', 'Europe/Berlin')).toBe('2026-01-12 10:12:00');
    // A zone of three quarters of an hour, and midnight as 00.
    expect(formatLocal('2026-05-12T18:15:00Z', 'Asia/Kathmandu')).toBe('2026-05-13 00:00:00');
  });

  test('the date stands with the clock where it is another one', () => {
    expect(besideUtc('2026-05-12T09:12:00Z', 'Europe/Berlin')).toBe(' (11:12:00 in Europe/Berlin)');
    expect(besideUtc('2026-05-12T23:12:00Z', 'Europe/Berlin')).toBe(
      ' (2026-05-13 01:12:00 in Europe/Berlin)',
    );
    expect(besideUtc('2026-05-12T09:12:00Z', null)).toBe('');
  });

  test('a span across the change to summer time', () => {
    expect(spanBesideUtc('2026-03-29T00:30:00Z', '2026-03-29T01:30:00Z', 'Europe/Berlin')).toBe(
      ' (01:30:00 to 03:30:00 in Europe/Berlin)',
    );
    expect(spanBesideUtc('2026-05-12T21:00:00Z', '2026-05-12T23:00:00Z', 'Europe/Berlin')).toBe(
      ' (23:00:00 to 2026-05-13 01:00:00 in Europe/Berlin)',
    );
    expect(spanBesideUtc('2026-05-12T21:00:00Z', '2026-05-12T23:00:00Z', null)).toBe('');
  });

  test('names that are no zone', () => {
    expect(isTimeZone('Europe/Berlin')).toBe(true);
    expect(isTimeZone('Atlantis/Port')).toBe(false);
    expect(isTimeZone('')).toBe(false);
  });
});
