import {describe, expect, test} from 'vitest';
import {readCsv} from '../../src/fieldbook/csv.ts';

const texts = (text: string) =>
  readCsv(text, 'x.csv').rows.map(({cells}) => cells.map((c) => c.text));

describe('readCsv', () => {
  test('reference: RFC 4180, section 2, rules 1 to 7', () => {
    const header = 'a,b,c\r\n';
    expect(texts(`${header}aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n`)).toEqual([
      ['aaa', 'bbb', 'ccc'],
      ['zzz', 'yyy', 'xxx'],
    ]);
    expect(texts(`${header}aaa,bbb,ccc\r\nzzz,yyy,xxx`)).toHaveLength(2);
    expect(texts(`${header}"aaa","bbb","ccc"\r\nzzz,yyy,xxx`)[0]).toEqual(['aaa', 'bbb', 'ccc']);
    expect(texts(`${header}"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx`)[0]).toEqual([
      'aaa',
      'b\r\nbb',
      'ccc',
    ]);
    expect(texts(`${header}"aaa","b""bb","ccc"`)[0]).toEqual(['aaa', 'b"bb', 'ccc']);
  });

  test('the separator is that of the header', () => {
    expect(texts('a;b\n"1,5";2\n')).toEqual([['1,5', '2']]);
    expect(texts('a\tb\n1\t2\n')).toEqual([['1', '2']]);
    expect(texts('"a;b;c",d\n1,2\n')).toEqual([['1', '2']]);
  });

  test('line ends LF, CRLF and CR count alike', () => {
    for (const end of ['\n', '\r\n', '\r']) {
      const {rows} = readCsv(['a,b', '1,2', '3,4', ''].join(end), 'x.csv');
      expect(rows.map(({lineNumber}) => lineNumber)).toEqual([2, 3]);
    }
  });

  test('lines are counted through quoted line ends, comments and blank lines', () => {
    const {header, rows} = readCsv('# made "by hand\n\na,b\n"1\n1",2\n# x\n3,4\n', 'x.csv');
    expect(header[0]).toEqual({text: 'a', lineNumber: 3});
    expect(rows.map(({lineNumber}) => lineNumber)).toEqual([4, 7]);
    expect(rows[0]?.cells[1]).toEqual({text: '2', lineNumber: 5});
  });

  test('a mark called #4 is no comment', () => {
    expect(texts('a,b\n#4,1\n')).toEqual([['#4', '1']]);
  });

  test('a last cell may be empty', () => {
    expect(texts('a,b\n1,\n')).toEqual([['1', '']]);
    expect(texts('a,b\n1,')).toEqual([['1', '']]);
  });
});
