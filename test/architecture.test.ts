import {readdirSync, readFileSync} from 'node:fs';
import {dirname, join, relative, resolve, sep} from 'node:path';
import {describe, expect, test} from 'vitest';

/** Which folder of src/ may import which; a folder that is not listed here fails. */
const ALLOWED: Record<string, readonly string[]> = {
  time: [],
  geodesy: [],
  statistics: [],
  epochs: ['time', 'geodesy'],
  log: ['epochs', 'time', 'geodesy'],
  fieldbook: ['time', 'geodesy'],
  occupation: ['epochs', 'time', 'geodesy', 'statistics', 'fieldbook'],
  conversion: ['log', 'geodesy'],
  wording: [],
  report: ['occupation', 'wording', 'time', 'geodesy'],
  exports: ['occupation', 'epochs', 'wording', 'time', 'geodesy'],
  cli: [
    'time',
    'geodesy',
    'statistics',
    'epochs',
    'log',
    'fieldbook',
    'occupation',
    'conversion',
    'wording',
    'report',
    'exports',
  ],
};

/** The only files below cli/ and report/ that may import a package or a Node module. */
const PACKAGES: Record<string, readonly string[]> = {
  'geodesy/projection.ts': ['proj4'],
  'log/uncommon.ts': ['nmea-simple'],
  'fieldbook/yaml.ts': ['yaml'],
};

const SRC = resolve(import.meta.dirname, '../src');

interface Import {
  readonly file: string;
  readonly target: string;
}

function importsOf(path: string): Import[] {
  const text = readFileSync(path, 'utf8');
  const file = relative(SRC, path).split(sep).join('/');
  // The formatter puts a blank behind `from`; a key called 'bearing from' has none.
  const pattern = /(?:from|import)(?:\s+|\s*\(\s*)'([^']+)'/g;
  return [...text.matchAll(pattern)].map((match) => ({file, target: match[1]!}));
}

const files = readdirSync(SRC, {recursive: true, withFileTypes: true})
  .filter((entry) => entry.isFile() && entry.name.endsWith('.ts'))
  .map((entry) => join(entry.parentPath, entry.name));
const imports = files.flatMap(importsOf);

function folderOf(file: string): string {
  return file.includes('/') ? file.slice(0, file.indexOf('/')) : '';
}

describe('imports run one way', () => {
  test('there is something to check', () => {
    expect(files.length).toBeGreaterThan(10);
    expect(imports.length).toBeGreaterThan(10);
  });

  test('every folder of src/ is listed', () => {
    for (const file of files) {
      const folder = folderOf(relative(SRC, file).split(sep).join('/'));
      if (folder !== '') expect(Object.keys(ALLOWED)).toContain(folder);
    }
  });

  test('no folder imports upward', () => {
    const upward = imports
      .filter(({target}) => target.startsWith('.'))
      .map(({file, target}) => {
        const reached = relative(SRC, resolve(SRC, dirname(file), target))
          .split(sep)
          .join('/');
        return {file, reached, from: folderOf(file), to: folderOf(reached)};
      })
      .filter(({from, to, reached}) => reached !== 'errors.ts' && from !== to)
      .filter(({from, to}) => from !== '' && !ALLOWED[from]!.includes(to));
    expect(upward).toEqual([]);
  });

  test('the core imports nothing from Node or npm but in the files named for it', () => {
    const strange = imports
      .filter(({target}) => !target.startsWith('.'))
      .filter(({file}) => !['cli', 'report'].includes(folderOf(file)))
      .filter(({file, target}) => !(PACKAGES[file] ?? []).includes(target));
    expect(strange).toEqual([]);
  });

  test('only report/assets.ts touches files outside cli/', () => {
    const touching = imports.filter(
      ({file, target}) =>
        target.startsWith('node:') && folderOf(file) !== 'cli' && file !== 'report/assets.ts',
    );
    expect(touching).toEqual([]);
  });
});
