import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {gunzipSync} from 'node:zlib';
import type {LogContents, LogFinding, ReadOptions} from '../../src/log/contents.ts';
import {createNmeaReader} from '../../src/log/read-nmea.ts';

/** The options that a user gets who asks for nothing. */
export const OPTIONS: ReadOptions = {
  name: 'test.log',
  date: null,
  trustAbsentChecksum: false,
  table: {
    columns: null,
    timeScale: null,
    startGpsSeconds: null,
    semiMajorAxisM: 6_378_137,
    inverseFlattening: 298.257223563,
  },
};

/** A sentence with its checksum, without line end; `start` is `$` or `!`. */
export function sentence(body: string, start = '$'): string {
  let sum = 0;
  for (const byte of Buffer.from(body, 'latin1')) sum ^= byte;
  return `${start}${body}*${sum.toString(16).toUpperCase().padStart(2, '0')}`;
}

/** Lines with CR LF. */
export function lines(...bodies: readonly string[]): string {
  return bodies.map((body) => `${sentence(body)}\r\n`).join('');
}

/** A GGA body at 48.1° north, 11.5° east, with what differs from a plain fixed solution. */
export function gga(
  time: string,
  {talker = 'GN', quality = 4, satellites = '10', hdop = '0.8', east = '01131.0000000'} = {},
): string {
  const position = `4807.0380000,N,${east},E`;
  return `${talker}GGA,${time},${position},${quality},${satellites},${hdop},545.400,M,46.900,M,1.0,0123`;
}

export function rmc(time: string, date: string, status = 'A', talker = 'GN'): string {
  return `${talker}RMC,${time},${status},4807.0380000,N,01131.0000000,E,0.0,,${date},,,A`;
}

export function bytesOf(text: string): Uint8Array {
  return new Uint8Array(Buffer.from(text, 'latin1'));
}

/** Reads a log in chunks of the given size. */
export function readBytes(
  bytes: Uint8Array,
  options: Partial<ReadOptions> = {},
  chunkBytes = bytes.length,
): LogContents {
  const reader = createNmeaReader({...OPTIONS, ...options});
  for (let at = 0; at < bytes.length; at += chunkBytes) {
    reader.add(bytes.subarray(at, at + chunkBytes));
  }
  return reader.finish();
}

export function readText(text: string, options: Partial<ReadOptions> = {}): LogContents {
  return readBytes(bytesOf(text), options);
}

/** The account of a log of one input. */
export function accountOf({inputs}: LogContents) {
  const [input] = inputs;
  if (input === undefined) throw new Error('no input');
  const sum = (counts: Readonly<Record<string, number>>) =>
    Object.values(counts).reduce((a, b) => a + b, 0);
  const {total, used, ignored, rejected} = input.lines;
  return {...input, total, used, ignored: sum(ignored), rejected: sum(rejected)};
}

export function findingOf({findings}: LogContents, code: string): LogFinding | undefined {
  return findings.find((one) => one.code === code);
}

const FOLDER = join(import.meta.dirname, '../real-logs');

/** The bytes of a real log, unpacked. */
export function realLog(file: string): Uint8Array {
  const bytes = readFileSync(join(FOLDER, file));
  return new Uint8Array(file.endsWith('.gz') ? gunzipSync(bytes) : bytes);
}

export const REAL_NMEA_LOGS = [
  's01-rtk-fixed-static-2hz.nmea',
  's02-about-at-rest-20min-q1.log.gz',
  's03-ais-mixed-static-dgnss.log',
  's04-moving-no-fix-gaps.log.gz',
  's05-rtk-two-talkers-8dec-gap.log',
  's06-south-east-gst-signal-ids.log',
  's07-cold-start-no-geoid-time-back.log',
  's08-moving-south-east-drift.log',
  's09-poor-geometry-gns-gst-grs.log',
  's10-yacht-many-instruments.log.gz',
  's11-base-fixed-position-rtcm-mixed.bin.gz',
  's12-yd-talker-ais.log',
  's13-phone-prefixed-lines-12s.nmea',
  's14-moving-signal-ids.txt',
  's15-ais-tag-blocks.nmea',
  's19-sailing-gll-zda-only.log.gz',
  's20-moored-bad-checksums-ais.log.gz',
  's22-marine-no-fix-then-fix-7dec.log',
  's24-zero-positions-mss.log',
] as const;
