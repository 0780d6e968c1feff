import {openSync, readdirSync, readFileSync, statSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {isDeepStrictEqual} from 'node:util';
import {gunzipSync} from 'node:zlib';
import {describe, expect, test} from 'vitest';
import type * as DecodeThreads from '../../src/cli/decode-threads.ts';
import {createLogReader} from '../../src/log/reader.ts';
import {OPTIONS} from '../log/nmea-text.ts';
import {uglyLog} from '../log/ugly.ts';
import {emptyFolder} from './run.ts';

/*
 * The threads run the built modules, as a user's do. Whatever a log holds, dividing it must not
 * show: the contents are compared with those of one thread, array by array.
 */
const BUILT = '../../dist/cli/decode-threads.js';
const {readDivided, openDivisible} = (await import(BUILT)) as typeof DecodeThreads;
const folder = emptyFolder();
const REAL_LOGS = join(import.meta.dirname, '../real-logs');

function file(name: string, bytes: Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, bytes);
  return path;
}

function inOneThread(bytes: Uint8Array) {
  const reader = createLogReader(OPTIONS);
  reader.add(bytes);
  return reader.finish();
}

async function divided(path: string, stretchBytes: number) {
  const log = {path, descriptor: openSync(path, 'r'), sizeBytes: statSync(path).size, stretchBytes};
  return readDivided(log, OPTIONS, () => undefined);
}

/** A binary stretch without a line feed, longer than any batch, between two ordinary logs. */
function withBinary(bytes: Uint8Array): Uint8Array {
  return Buffer.concat([bytes, new Uint8Array(700_000).fill(0xd3), bytes]);
}

const ugly = uglyLog();
const logs: readonly (readonly [string, Uint8Array])[] = [
  ['the ugly log', ugly],
  ['the ugly log without its last line end', ugly.subarray(0, ugly.length - 9)],
  ['the ugly log around 700 kB of binary data', withBinary(ugly)],
  ['one line', Buffer.from('$GPZDA,120000.00,04,05,2026,00,00*6D\r\n')],
  ...readdirSync(REAL_LOGS)
    .filter((name) => /\.(nmea|log|log\.gz|bin\.gz|txt)$/.test(name))
    .map((name): [string, Uint8Array] => {
      const bytes = readFileSync(join(REAL_LOGS, name));
      return [name, name.endsWith('.gz') ? gunzipSync(bytes) : bytes];
    }),
];

describe('a log that several threads decode', () => {
  test.each(logs)(
    '%s gives the same contents',
    async (name, bytes) => {
      const expected = inOneThread(bytes);
      const path = file(name.replace(/\W/g, '-'), bytes);
      // Stretches shorter than a line, of a few lines, and longer than a batch.
      for (const stretchBytes of bytes.length > 1e5 ? [9973, 300_007] : [37, 4096]) {
        const {contents, file: read} = await divided(path, stretchBytes);
        expect(isDeepStrictEqual(contents, expected), `${stretchBytes}`).toBe(true);
        expect(read.bytes).toBe(bytes.length);
      }
    },
    120_000,
  );

  test('the fingerprint is that of the file', async () => {
    const path = file('abc.nmea', Buffer.from('abc'));
    // NIST FIPS 180-4, the example "abc" of SHA-256.
    expect((await divided(path, 2)).file.sha256).toBe(
      'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad',
    );
  });

  test('progress ends with the whole log', async () => {
    const path = file('progress.nmea', ugly);
    const log = {path, descriptor: openSync(path, 'r'), sizeBytes: ugly.length, stretchBytes: 1000};
    const seen: number[] = [];
    await readDivided(log, OPTIONS, (bytes) => seen.push(bytes));
    expect(seen.at(-1)).toBe(ugly.length);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
  });

  test('short logs, packed ones and standard input are not divided', () => {
    expect(openDivisible(file('short.nmea', ugly))).toBeUndefined();
    expect(openDivisible('-')).toBeUndefined();
  });
});
