import {describe, expect, test} from 'vitest';
import {BatchCutter} from '../../src/log/batch-cutter.ts';
import {BATCH_PADDING_BYTES, NmeaDecoder} from '../../src/log/decode.ts';
import {countsOf, createSentenceColumns, takeCounts} from '../../src/log/sentence-columns.ts';
import {decoded} from './decoded.ts';
import {bytesOf, gga, lines} from './nmea-text.ts';

describe('columns between threads', () => {
  test('a decoder fills the columns that it is given, and its own when none are', () => {
    const bytes = bytesOf(lines(gga('120000.00'), gga('120001.00')));
    const padded = new Uint8Array(bytes.length + BATCH_PADDING_BYTES);
    padded.set(bytes);
    const decoder = new NmeaDecoder({batchBytes: bytes.length, trustAbsentChecksum: false});
    const shared = createSentenceColumns(bytes.length, SharedArrayBuffer);
    expect(decoder.decode(padded, bytes.length, true, shared).columns).toBe(shared);
    expect(shared.fixes.count).toBe(2);
    expect(shared.fixes.timeOfDayS.buffer).toBeInstanceOf(SharedArrayBuffer);
    const own = decoder.decode(padded, bytes.length, true).columns;
    expect(own).not.toBe(shared);
    expect(own.fixes.latitudeDeg[1]).toBe(shared.fixes.latitudeDeg[1]);
  });

  test('the counts and decimals that travel make another view of the same memory equal', () => {
    const {columns} = decoded(bytesOf(lines(gga('120000.00'), gga('120001.00'))));
    const other = createSentenceColumns(1);
    takeCounts(other, structuredClone(countsOf(columns)));
    expect(countsOf(other)).toEqual(countsOf(columns));
    expect(other.fixes.count).toBe(2);
    expect(other.decimals.fixes.latitude).toBeGreaterThan(0);
  });
});

describe('preconditions', () => {
  test('bytes must be padded and aligned', () => {
    const decoder = new NmeaDecoder({batchBytes: 100, trustAbsentChecksum: false});
    expect(() => decoder.decode(new Uint8Array(10), 10, true)).toThrow(RangeError);
    expect(() => decoder.decode(new Uint8Array(new ArrayBuffer(200), 1), 10, true)).toThrow(
      RangeError,
    );
  });

  test('a batch holds at least two of the longest pieces', () => {
    expect(() => new BatchCutter(1000, () => undefined)).toThrow(RangeError);
  });
});
