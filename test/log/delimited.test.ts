import {describe, expect, test} from 'vitest';
import {type Delimiter, FieldSplitter, fieldTexts, MOST_FIELDS} from '../../src/log/delimited.ts';

describe('fieldTexts', () => {
  const rows: readonly (readonly [Delimiter, string, readonly string[]])[] = [
    ['comma', 'a,b,c', ['a', 'b', 'c']],
    ['comma', ' a , b ,c ', ['a', 'b', 'c']],
    ['comma', ',,', ['', '', '']],
    ['comma', '', ['']],
    ['comma', '"a,b", "c",d', ['a,b', 'c', 'd']],
    ['comma', '"never closed,b', ['"never closed', 'b']],
    ['comma', '""', ['']],
    ['semicolon', '1,5;2', ['1,5', '2']],
    ['tab', 'a\t\tb c', ['a', '', 'b c']],
    ['blanks', '  a  b\tc   ', ['a', 'b', 'c']],
    ['blanks', '"2026-05-04 10:00:00" 1', ['2026-05-04 10:00:00', '1']],
    ['blanks', '', []],
    ['comma', 'é,ü', ['é', 'ü']],
  ];

  test.each(rows)('%s: %j', (delimiter, line, expected) => {
    expect(fieldTexts(line, delimiter)).toEqual(expected);
  });
});

describe('FieldSplitter', () => {
  test('counts fields beyond those it can hold', () => {
    const bytes = new TextEncoder().encode('1,'.repeat(MOST_FIELDS + 10));
    const splitter = new FieldSplitter('comma');
    splitter.split(bytes, 0, bytes.length);
    expect(splitter.count).toBe(MOST_FIELDS + 11);
  });

  test('stays inside its range when a quote closes behind it', () => {
    const bytes = new TextEncoder().encode('"a,b\n"c');
    const splitter = new FieldSplitter('comma');
    splitter.split(bytes, 0, 4);
    expect(splitter.count).toBe(2);
    expect(splitter.end(1)).toBe(4);
  });

  test('splits the same row alike a second time', () => {
    const bytes = new TextEncoder().encode('a,b');
    const splitter = new FieldSplitter('comma');
    splitter.split(bytes, 0, 3);
    splitter.split(bytes, 0, 3);
    expect(splitter.count).toBe(2);
    expect(splitter.isEmpty(0)).toBe(false);
    expect(splitter.isEmpty(2)).toBe(true);
  });
});
