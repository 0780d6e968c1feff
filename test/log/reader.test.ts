import {describe, expect, test} from 'vitest';
import {InputError} from '../../src/errors.ts';
import {detectLogKind} from '../../src/log/detect.ts';
import {createLogReader} from '../../src/log/reader.ts';
import {bytesOf, gga, lines, OPTIONS, REAL_NMEA_LOGS, readBytes, realLog} from './nmea-text.ts';

describe('the kind of a log', () => {
  test.each(REAL_NMEA_LOGS)('%s is NMEA', (file) => {
    expect(detectLogKind(realLog(file).subarray(0, 65_536))).toBe('nmea');
  });

  test.each([
    's16-neu-daily-mm.csv.gz',
    's17-ecef-daily-covariance-extract.txt.gz',
    's23-ecef-vehicle-5hz-33s-stop.txt.gz',
  ])('%s is a table', (file) => {
    expect(detectLogKind(realLog(file).subarray(0, 65_536))).toBe('table');
  });

  test.each([
    ['nothing', '', 'table'],
    ['a price in a table', 'x,y\n$12,3\n', 'table'],
    ['binary data before the first sentence', `\u0000\u0001\n${lines(gga('120000.00'))}`, 'nmea'],
    ['binary data alone', '\u0000\u0001\n\u0002\n', 'nmea'],
    ['a table with UTF-8', 'H\u00c3\u00b6he\n1\n', 'table'],
    ['UTF-16', '\u00ff\u00fe$\u0000', 'utf-16'],
    ['UTF-16 the other way round', '\u00fe\u00ff\u0000$', 'utf-16'],
  ])('%s', (_, text, kind) => {
    expect(detectLogKind(bytesOf(text))).toBe(kind);
  });
});

describe('createLogReader', () => {
  function read(bytes: Uint8Array, chunkBytes: number) {
    const reader = createLogReader(OPTIONS);
    for (let at = 0; at < bytes.length; at += chunkBytes) {
      reader.add(bytes.subarray(at, at + chunkBytes));
    }
    return reader.finish();
  }

  test.each([1000, 65_536, 1_000_000])('reads NMEA in chunks of %i bytes as one', (chunkBytes) => {
    const bytes = realLog('s02-about-at-rest-20min-q1.log.gz');
    expect(read(bytes, chunkBytes)).toEqual(readBytes(bytes));
  });

  test('reads a table', () => {
    const bytes = bytesOf('time,x,y,z\n2026-08-05T12:00:00Z,4051761.62,617191.11,4870822.73\n');
    expect(read(bytes, 10).inputs[0]?.kind).toBe('table');
  });

  test('refuses UTF-16 with a word on what to do', () => {
    expect(() => read(bytesOf('\u00ff\u00fe$\u0000'), 10)).toThrow(InputError);
  });
});
