import {describe, expect, test} from 'vitest';
import {BatchCutter} from '../../src/log/batch-cutter.ts';
import {buffersOfBatch, NmeaDecoder, packBatch} from '../../src/log/decode.ts';
import {decoded} from './decoded.ts';
import {bytesOf, gga, lines} from './nmea-text.ts';

describe('batches between threads', () => {
  const batch = decoded(bytesOf(lines(gga('120000.00'), gga('120001.00'))));

  test('a packed batch is no longer than its rows', () => {
    const {fixes, gst, order} = packBatch(batch).columns;
    expect(fixes.latitudeDeg).toHaveLength(2);
    expect(fixes.latitudeDeg.buffer.byteLength).toBe(16);
    expect(order.kind).toHaveLength(2);
    expect(gst.timeOfDayS).toHaveLength(0);
  });

  test('its buffers can be handed over and arrive unchanged', () => {
    const packed = packBatch(batch);
    const expected = structuredClone(packed);
    const arrived = structuredClone(packed, {transfer: buffersOfBatch(packed)});
    expect(arrived).toEqual(expected);
    expect(packed.columns.fixes.latitudeDeg).toHaveLength(0);
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
