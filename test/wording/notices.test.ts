import {readdirSync, readFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {describe, expect, test} from 'vitest';
import {ANTENNA_SENTENCES} from '../../src/wording/antenna-notices.ts';
import {COMBINATION_SENTENCES} from '../../src/wording/combination-notices.ts';
import {LOG_SENTENCES} from '../../src/wording/log-notices.ts';
import {MISSING_SENTENCES, noticeText, RECORD_SENTENCES} from '../../src/wording/notices.ts';

const SRC = resolve(import.meta.dirname, '../../src');
const ALL = {
  ...ANTENNA_SENTENCES,
  ...COMBINATION_SENTENCES,
  ...LOG_SENTENCES,
  ...RECORD_SENTENCES,
  ...MISSING_SENTENCES,
};

/** Every code that the sources raise, by the ways in which they are written. */
function codesRaised(): string[] {
  const folders = ['log', 'occupation', 'statistics'];
  const sources = folders.flatMap((folder) =>
    readdirSync(join(SRC, folder), {withFileTypes: true})
      .filter((entry) => entry.isFile() && entry.name.endsWith('.ts'))
      .map((entry) => readFileSync(join(entry.parentPath, entry.name), 'utf8')),
  );
  const patterns = [
    /finding\(\s*'([a-z0-9-]+)'/g,
    /\bcode: '([a-z0-9-]+)'/g,
    /notices\.add\([^)]*?'(?:concern|caution|note)',\s*'([a-z0-9-]+)'/g,
    /notGiven\('([a-z0-9-]+)'\)/g,
    /untold\(known, '([a-z-]+)'\)/g,
  ];
  return sources.flatMap((source) =>
    patterns.flatMap((pattern) => [...source.matchAll(pattern)].map((match) => match[1]!)),
  );
}

/** Values of every name that the sentence may ask for: numbers where it wants them, else a word. */
function valuesFor(code: string): Record<string, string | number> {
  const numbers: Record<string, number> = {};
  const values = new Proxy(numbers, {
    get: (known, name) =>
      known[String(name)] ?? (String(name).endsWith('MPerHour') ? 0.01 : 'word'),
  });
  for (;;) {
    try {
      noticeText(code, values);
      return values;
    } catch (error) {
      const name = /no number (\w+)/.exec(String(error))?.[1];
      if (name === undefined) throw error;
      numbers[name] = 1.25;
    }
  }
}

describe('notices', () => {
  test('every code that is raised has a sentence', () => {
    const raised = new Set(codesRaised());
    expect(raised.size).toBeGreaterThan(50);
    expect([...raised].filter((code) => !Object.hasOwn(ALL, code))).toEqual([]);
  });

  test('every sentence has a code that is raised', () => {
    const text = readdirSync(SRC, {recursive: true, withFileTypes: true})
      .filter((entry) => entry.isFile() && !entry.parentPath.includes('wording'))
      .map((entry) => readFileSync(join(entry.parentPath, entry.name), 'utf8'))
      .join('\n');
    expect(Object.keys(ALL).filter((code) => !text.includes(`'${code}'`))).toEqual([]);
  });

  test.each(Object.keys(ALL))('%s is a whole sentence', (code) => {
    const text = noticeText(code, valuesFor(code));
    expect(text).toMatch(/^[A-Z0-9].*[.]$/s);
    expect(text).not.toMatch(/undefined|NaN|null|\(\)|\s\s/);
  });

  test('nobody says that the tripod moved', () => {
    for (const code of Object.keys(ALL)) {
      expect(noticeText(code, valuesFor(code))).not.toMatch(/tripod moved|antenna moved/);
    }
  });
});
