import {readdirSync, readFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {Ajv2020} from 'ajv/dist/2020.js';
import {describe, expect, test} from 'vitest';
import {CONTENTS_SCHEMA, RESULT_SCHEMA} from '../../src/exports/schema.ts';
import {covers, nullPaths} from '../../src/occupation/explain-nulls.ts';
import {stillmark} from './run.ts';

const FOLDER = resolve(import.meta.dirname, '../real-logs');
const LOGS = readdirSync(FOLDER).filter((name) => /^s\d\d-|\.snx$/.test(name));

/** What reading each needs beyond its name: a date, or the meaning of bare columns. */
const OPTIONS: Record<string, readonly string[]> = {
  s19: ['--date', '2014-08-01'],
  s23: ['--columns', '-,seconds,x,y,z,...', '--start', '2013-05-01T10:00:00'],
};

function optionsFor(name: string): readonly string[] {
  return OPTIONS[name.slice(0, 3)] ?? [];
}

/** Tables that hold no positions of one point, and are refused by name. */
const REFUSED = ['s16', 'sin'];
/** As the index of the recordings has it: over 50 m or over 1 knot. */
const MOVING = ['s04', 's08', 's10', 's13', 's14', 's19', 's23'];
const WITHOUT_POSITIONS = ['s15', 's24'];

const ajv = new Ajv2020({strict: false});
const validResult = ajv.compile(RESULT_SCHEMA);
const validContents = ajv.compile(CONTENTS_SCHEMA);

describe.each(LOGS)('%s', (name) => {
  const number = name.slice(0, 3);
  const path = join(FOLDER, name);

  test('passes through contents', () => {
    const {status, stdout, stderr} = stillmark([
      'contents',
      path,
      ...optionsFor(name),
      '--result',
      '-',
    ]);
    expect(stderr).not.toMatch(/^\s+at /m);
    if (REFUSED.includes(number)) {
      expect(status).toBe(2);
      return;
    }
    expect(status).toBe(0);
    const contents = JSON.parse(stdout);
    expect(validContents(contents), JSON.stringify(validContents.errors)).toBe(true);
    for (const {lines} of contents.inputs) {
      const sum = (counts: Record<string, number>) =>
        Object.values(counts).reduce((total, count) => total + count, 0);
      expect(lines.used + sum(lines.ignored) + sum(lines.rejected)).toBe(lines.total);
    }
  });

  test('is reduced to a position, or called what it is', () => {
    const {status, stdout, stderr} = stillmark([
      'reduce',
      path,
      ...optionsFor(name),
      '--result',
      '-',
    ]);
    expect(stderr).not.toMatch(/^\s+at /m);
    if (REFUSED.includes(number)) {
      expect(status).toBe(2);
      expect(stderr).toContain(name);
      return;
    }
    const result = JSON.parse(stdout);
    expect(validResult(result), JSON.stringify(validResult.errors)).toBe(true);
    const {read, used, screened} = result.epochs;
    const left = Object.values<number>(screened).reduce((sum, count) => sum + count, 0);
    expect(used + left).toBe(read);
    const told = result.notices.flatMap(({about}: {about: string[]}) => about);
    const unexplained = [...nullPaths(result, '')].filter(
      (nullPath) => !told.some((known: string) => covers(known, nullPath)),
    );
    expect(unexplained).toEqual([]);
    if (MOVING.includes(number)) {
      expect(result.stability.verdict).toBe('travelling');
      expect(result.position).toBeNull();
      expect(status).toBe(3);
    } else if (WITHOUT_POSITIONS.includes(number)) {
      expect(result.segments).toEqual([]);
      expect(status).toBe(3);
    } else {
      expect(result.stability.verdict).not.toBe('travelling');
      expect(result.segments.length).toBeGreaterThan(0);
      expect(status).toBe(0);
    }
  });
});

test('every recording of the index is here', () => {
  const index = readFileSync(join(FOLDER, 'README.md'), 'utf8');
  expect(LOGS.length).toBe(23);
  for (const name of LOGS) expect(index).toContain(name.slice(0, 3));
});
