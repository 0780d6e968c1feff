import {describe, expect, test} from 'vitest';
import {InputError} from '../../src/errors.ts';
import {readMarks} from '../../src/fieldbook/marks.ts';
import {readSheet} from '../../src/fieldbook/sheet.ts';

import {
  bytesOf,
  type Case,
  malformedCsvMarks,
  malformedSheets,
  malformedYamlMarks,
} from './malformed-cases.ts';

function refusalOf(read: () => unknown): InputError {
  try {
    read();
  } catch (error) {
    if (error instanceof InputError) return error;
    throw error;
  }
  throw new Error('expected a refusal, but the file was read');
}

function expectRefusal(error: InputError, path: string, [, , line, remedy]: Case) {
  expect(error.message).toMatch(remedy);
  expect(error.lineNumber).toBe(line);
  expect(error.path).toBe(path);
  expect(error.message).not.toContain('\n');
  expect(error.message).not.toMatch(/\.$|^Error|undefined|\[object/);
}

describe('readSheet refuses', () => {
  test.each(malformedSheets)('%s', (...malformed) => {
    const error = refusalOf(() => readSheet(bytesOf(malformed), 'day.yaml'));
    expectRefusal(error, 'day.yaml', malformed);
  });
});

describe('readMarks refuses, in YAML,', () => {
  test.each(malformedYamlMarks)('%s', (...malformed) => {
    const error = refusalOf(() => readMarks(bytesOf(malformed), 'marks.yaml'));
    expectRefusal(error, 'marks.yaml', malformed);
  });
});

describe('readMarks refuses, in CSV,', () => {
  test.each(malformedCsvMarks)('%s', (...malformed) => {
    const error = refusalOf(() => readMarks(bytesOf(malformed), 'marks.csv'));
    expectRefusal(error, 'marks.csv', malformed);
  });
});

test('there are more than sixty of them', () => {
  const all = [...malformedSheets, ...malformedYamlMarks, ...malformedCsvMarks];
  expect(all.length).toBeGreaterThan(60);
});
