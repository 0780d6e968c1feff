import {execFile} from 'node:child_process';
import {existsSync, writeFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {beforeAll, describe, expect, test} from 'vitest';
import {
  bytesOf,
  type Case,
  malformedCsvMarks,
  malformedSheets,
  malformedYamlMarks,
} from '../fieldbook/malformed-cases.ts';
import {emptyFolder, type Ran, sample} from './run.ts';

/*
 * Every malformed sheet and marks file through the command: one clear message with line and remedy,
 * exit status 2, nothing written.
 */
const COMMAND = resolve(import.meta.dirname, '../../dist/cli/main.js');
const folder = emptyFolder();
const log = sample('mole-still.nmea');

interface Try {
  readonly malformed: Case;
  readonly path: string;
  readonly words: readonly string[];
}

const tries: readonly Try[] = [
  ...malformedSheets.map((malformed, i) => {
    const path = join(folder, `sheet-${i}.yaml`);
    return {malformed, path, words: ['reduce', log, '--sheet', path]};
  }),
  ...malformedYamlMarks.map((malformed, i) => {
    const path = join(folder, `marks-${i}.yaml`);
    return {malformed, path, words: ['check', log, '--mark', 'P1', '--marks', path]};
  }),
  ...malformedCsvMarks.map((malformed, i) => {
    const path = join(folder, `marks-${i}.csv`);
    return {malformed, path, words: ['check', log, '--mark', 'P1', '--marks', path]};
  }),
];

const ran = new Map<Try, Ran>();

function run({words, path}: Try): Promise<Ran> {
  const outputs = ['--result', `${path}.json`, '--report', `${path}.html`];
  return new Promise((done) => {
    execFile('node', [COMMAND, ...words, ...outputs], (error, stdout, stderr) => {
      done({status: typeof error?.code === 'number' ? error.code : 0, stdout, stderr});
    });
  });
}

/** As many at a time as the smallest machine has cores. */
const AT_A_TIME = 2;

beforeAll(async () => {
  for (const {malformed, path} of tries) writeFileSync(path, bytesOf(malformed));
  for (let i = 0; i < tries.length; i += AT_A_TIME) {
    const some = tries.slice(i, i + AT_A_TIME);
    const results = await Promise.all(some.map(run));
    for (const [k, one] of some.entries()) ran.set(one, results[k]!);
  }
}, 300_000);

describe('a malformed file', () => {
  test.each(tries.map((one) => [one.malformed[0], one] as const))('%s', (_, one) => {
    const {status, stdout, stderr} = ran.get(one)!;
    const [, , line, remedy] = one.malformed;
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr.trim().split('\n')).toHaveLength(1);
    expect(stderr).toContain(`${one.path}, line ${line}: `);
    expect(stderr).toMatch(remedy);
    expect(existsSync(`${one.path}.json`) || existsSync(`${one.path}.html`)).toBe(false);
  });
});
