import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {gunzipSync} from 'node:zlib';
import type {LogContents, ReadOptions, TableOptions} from '../../src/log/contents.ts';
import {createTableReader} from '../../src/log/table.ts';

const WGS84_TABLE: TableOptions = {
  columns: null,
  timeScale: null,
  startGpsSeconds: null,
  semiMajorAxisM: 6_378_137,
  inverseFlattening: 298.257223563,
};

export interface Asked extends Partial<TableOptions> {
  readonly date?: ReadOptions['date'];
}

function optionsWith({date = null, ...table}: Asked): ReadOptions {
  return {
    name: 'table.csv',
    date,
    trustAbsentChecksum: false,
    table: {...WGS84_TABLE, ...table},
  };
}

/** Reads the parts of one table in order. */
export function readParts(parts: readonly Uint8Array[], asked: Asked = {}): LogContents {
  const reader = createTableReader(optionsWith(asked));
  for (const part of parts) reader.add(part);
  return reader.finish();
}

/** Reads a table given as lines, each closed by a line feed. */
export function readLines(lines: readonly string[], asked: Asked = {}): LogContents {
  return readParts([new TextEncoder().encode(lines.map((line) => `${line}\n`).join(''))], asked);
}

/** A recording of test/real-logs; its origin and licence stand in the README there. */
export function realTable(name: string): Uint8Array {
  return gunzipSync(readFileSync(join(import.meta.dirname, '../real-logs', name)));
}

export function findingCodes({findings}: LogContents): string[] {
  return findings.map(({code}) => code);
}

/** used + ignored + rejected. */
export function linesAccounted({inputs: [input]}: LogContents): number {
  if (input === undefined) return Number.NaN;
  const sum = (counts: Readonly<Record<string, number>>): number =>
    Object.values(counts).reduce((total, count) => total + count, 0);
  return input.lines.used + sum(input.lines.ignored) + sum(input.lines.rejected);
}
