import {copyFileSync, existsSync, readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {Ajv2020} from 'ajv/dist/2020.js';
import {beforeAll, describe, expect, test} from 'vitest';
import {COMBINATION_SCHEMA} from '../../src/exports/combination-schema.ts';
import {emptyFolder, sample, stillmark} from './run.ts';

const folder = emptyFolder();
const at = (name: string) => join(folder, name);

function check(name: string, log: string, ...words: string[]): void {
  const ran = stillmark([
    'check',
    sample(log),
    '--marks',
    sample('marks.yaml'),
    '--sheet',
    sample('sheet.yaml'),
    '--result',
    at(name),
    '--quiet',
    ...words,
  ]);
  expect(ran.stderr).toBe('');
}

beforeAll(() => {
  check('a.json', 'mole-still.nmea', '--to-utc', '2026-05-12T09:30:00');
  check('b.json', 'mole-still.nmea', '--from-utc', '2026-05-12T09:32:00');
  check('s.json', 'slip-jump.nmea', '--mark', 'SLIP', '--to-utc', '2026-05-12T10:37:00');
  check('moved.json', 'slip-jump.nmea', '--mark', 'SLIP');
});

describe('stillmark combine', () => {
  test('one position per mark, agreement and distances, in any order the same bytes', () => {
    const first = stillmark([
      'combine',
      at('a.json'),
      at('b.json'),
      at('s.json'),
      '--result',
      at('one.json'),
    ]);
    expect(first.status).toBe(0);
    expect(first.stdout).toContain('the 2 occupations agree');
    expect(first.stdout).toMatch(/MOLE to SLIP +312\.58/);
    const second = stillmark([
      'combine',
      at('s.json'),
      at('b.json'),
      at('a.json'),
      '--result',
      '-',
    ]);
    expect(second.stdout).toBe(readFileSync(at('one.json'), 'utf8'));
    const valid = new Ajv2020({strict: false}).compile(COMBINATION_SCHEMA);
    expect(valid(JSON.parse(second.stdout)), JSON.stringify(valid.errors)).toBe(true);
  });

  test('occupations that disagree give status 1', () => {
    const text = readFileSync(at('b.json'), 'utf8');
    const {position} = JSON.parse(text);
    // Twenty centimetres along x: another nail.
    const moved = text.replaceAll(String(position.ecefM.x), String(position.ecefM.x + 0.2));
    writeFileSync(at('other.json'), moved);
    const {status, stdout} = stillmark(['combine', at('a.json'), at('other.json')]);
    expect(status).toBe(1);
    expect(stdout).toContain('the 2 occupations disagree');
    expect(stdout).toMatch(/enlarged by \d/);
  });

  test('a record that moved is left out by name; nothing left gives status 3', () => {
    const {status, stdout} = stillmark(['combine', at('moved.json'), at('a.json')]);
    expect(status).toBe(0);
    expect(stdout).toContain('moved.json (it moved)');
    const alone = stillmark(['combine', at('moved.json'), '--result', at('none.json')]);
    expect(alone.status).toBe(3);
    expect(existsSync(at('none.json'))).toBe(true);
  });

  test.each<[string, () => readonly string[], RegExp]>([
    ['no file', () => [at('nowhere.json')], /no such file/],
    ['no JSON', () => [sample('marks.yaml')], /this is no JSON/],
    ['another document', () => [at('one.json')], /this is no result of this stillmark/],
    [
      'the same epochs twice',
      () => {
        copyFileSync(at('a.json'), at('copy.json'));
        return [at('a.json'), at('copy.json')];
      },
      /results of the same epochs/,
    ],
    ['an input as output', () => [at('a.json'), '--result', at('a.json')], /also an input/],
  ])('%s is refused with status 2', (_, words, message) => {
    const {status, stdout, stderr} = stillmark(['combine', ...words()]);
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toMatch(message);
    expect(stderr).not.toMatch(/\n\s+at /);
  });
});
