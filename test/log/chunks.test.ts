import {isDeepStrictEqual} from 'node:util';
import {describe, expect, test} from 'vitest';
import {NmeaAssembler} from '../../src/log/assemble.ts';
import type {LogContents} from '../../src/log/contents.ts';
import {BATCH_PADDING_BYTES, NmeaDecoder} from '../../src/log/decode.ts';
import {nmeaContents} from '../../src/log/nmea-contents.ts';
import {BATCH_BYTES, createNmeaReader} from '../../src/log/read-nmea.ts';
import {
  countsOf,
  createSentenceColumns,
  noDecimals,
  type SentenceColumns,
  takeCounts,
} from '../../src/log/sentence-columns.ts';
import {accountOf, OPTIONS, readBytes, realLog} from './nmea-text.ts';
import {uglyLog} from './ugly.ts';

/** The same memory as another thread has it: the arrays, and neither counts nor decimals. */
function seenByAnother(columns: SentenceColumns): SentenceColumns {
  const parts = Object.entries(columns).map(([name, part]) => [name, {...part, count: 0}]);
  const decimals = {fixes: noDecimals(), rmc: noDecimals(), gll: noDecimals()};
  return {...Object.fromEntries(parts), decimals};
}

/** Decodes the stretches between the cuts by one decoder each, as workers would. */
function readInBatches(bytes: Uint8Array, cuts: readonly number[]): LogContents {
  const assembler = new NmeaAssembler();
  const decoder = new NmeaDecoder({batchBytes: bytes.length, trustAbsentChecksum: false});
  const edges = [0, ...cuts, bytes.length];
  for (let k = 0; k + 1 < edges.length; k += 1) {
    const part = bytes.subarray(edges[k], edges[k + 1]);
    const padded = new Uint8Array(part.length + BATCH_PADDING_BYTES);
    padded.set(part);
    const filled = createSentenceColumns(part.length, SharedArrayBuffer);
    const {account, datums} = decoder.decode(padded, part.length, k + 2 === edges.length, filled);
    // The arrays are shared memory; all else has travelled between threads.
    const columns = seenByAnother(filled);
    takeCounts(columns, structuredClone(countsOf(filled)));
    assembler.add({columns, account: structuredClone(account), datums});
  }
  return nmeaContents(assembler.finish(), {...OPTIONS, bytes: bytes.length});
}

function readParts(parts: readonly Uint8Array[]): LogContents {
  const reader = createNmeaReader(OPTIONS);
  for (const part of parts) reader.add(part);
  return reader.finish();
}

function lineStarts(bytes: Uint8Array): number[] {
  return [...bytes.keys()].filter((at) => at > 0 && bytes[at - 1] === 0x0a);
}

describe('a log read in parts', () => {
  const ugly = uglyLog();
  const whole = readBytes(ugly);

  test('the ugly log is worth the trouble', () => {
    const account = accountOf(whole);
    expect(ugly.length).toBeGreaterThan(5000);
    expect(account.rejected).toBeGreaterThanOrEqual(8);
    expect(account.betweenBytes).toBeGreaterThan(10);
    expect(whole.epochs.count).toBe(24);
    expect(whole.satellites.count).toBeGreaterThan(0);
  });

  test('property: split at every byte, it gives one and the same result', () => {
    let same = 0;
    for (let cut = 1; cut < ugly.length; cut += 1) {
      const parts = readParts([ugly.subarray(0, cut), ugly.subarray(cut)]);
      // The quick comparison first: the thorough one only to show where they differ.
      if (isDeepStrictEqual(parts, whole)) same += 1;
      else expect(parts, `cut at ${cut}`).toEqual(whole);
    }
    expect(same).toBe(ugly.length - 1);
  });

  test('property: in chunks of one byte, too', () => {
    expect(readBytes(ugly, {}, 1)).toEqual(whole);
  });

  test('property: decoded in two parts cut at any line start, it gives the same result', () => {
    for (const cut of lineStarts(ugly)) {
      expect(readInBatches(ugly, [cut]), `cut at ${cut}`).toEqual(whole);
    }
  });

  test('property: decoded line by line, too', () => {
    expect(readInBatches(ugly, lineStarts(ugly))).toEqual(whole);
  });

  test.each([
    's04-moving-no-fix-gaps.log.gz',
    's07-cold-start-no-geoid-time-back.log',
    's11-base-fixed-position-rtcm-mixed.bin.gz',
    's20-moored-bad-checksums-ais.log.gz',
    's22-marine-no-fix-then-fix-7dec.log',
  ])('property: %s gives the same in batches of any length', (file) => {
    const bytes = realLog(file);
    const starts = lineStarts(bytes);
    const expected = readBytes(bytes);
    for (const step of [7, 61, 500]) {
      const cuts = starts.filter((_, k) => k % step === step - 1);
      expect(readInBatches(bytes, cuts)).toEqual(expected);
    }
  });

  test('property: a log of GLL alone gives the same in batches of any length', () => {
    const bytes = realLog('s19-sailing-gll-zda-only.log.gz').subarray(0, 60_000);
    const expected = readBytes(bytes);
    const starts = lineStarts(bytes);
    for (const step of [1, 13]) {
      expect(
        readInBatches(
          bytes,
          starts.filter((_, k) => k % step === 0),
        ),
      ).toEqual(expected);
    }
  });

  test('property: binary data without line feeds, longer than a batch, is taken in pieces', () => {
    const log = new Uint8Array(3 * BATCH_BYTES + ugly.length).fill(0xd3);
    log[70_000] = 0x0a;
    log.set(ugly, log.length - ugly.length);
    const contents = readBytes(log, {}, 100_000);
    expect(contents).toEqual(readBytes(log, {}, 8191));
    const account = accountOf(contents);
    expect(account.used + account.ignored + account.rejected).toBe(account.total);
    expect(contents.epochs.count).toBeGreaterThan(20);
  });
});
