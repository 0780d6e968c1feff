import {describe, expect, test} from 'vitest';
import {readYaml} from '../../src/fieldbook/yaml.ts';

const read = (text: string) => readYaml(text, 'x.yaml');

describe('readYaml', () => {
  test('scalars stay what was written', () => {
    const words = ['NO', '0012', '1e3', '12:30:00', '0x1f', '2026-05-04', '.inf', '1_000', 'yes'];
    const {entries} = read(words.map((word, i) => `key ${i}: ${word}`).join('\n'));
    expect(entries.map(({value}) => value.kind === 'scalar' && value.text)).toEqual(words);
  });

  test('nothing, ~ and null are blank', () => {
    const {entries} = read('a:\nb: ~\nc: null\nd: ""\ne: {f}\n');
    expect(entries.slice(0, 4).map(({value}) => value.kind === 'scalar' && value.text)).toEqual([
      '',
      '',
      '',
      '',
    ]);
    expect(entries[4]?.value).toMatchObject({
      kind: 'mapping',
      entries: [{key: 'f', value: {text: ''}}],
    });
  });

  test('every key and value has its line', () => {
    const {entries} = read('# head\na: 1\n\nb:\n  - x\n  - {c: 2,\n     d: 3}\n');
    expect(entries.map(({lineNumber}) => lineNumber)).toEqual([2, 4]);
    const list = entries[1]?.value;
    expect(list?.kind === 'list' && list.items.map((item) => item.lineNumber)).toEqual([5, 6]);
    const inner = list?.kind === 'list' ? list.items[1] : undefined;
    expect(inner?.kind === 'mapping' && inner.entries.map((e) => e.lineNumber)).toEqual([6, 7]);
  });

  test('a comment needs a blank on both sides of #', () => {
    const {entries} = read('a: P4 # the pillar\nb: P#4\nc: # nothing\n#d: 1\ne:\n  #f: 2\n');
    expect(entries.map(({value}) => value.kind === 'scalar' && value.text)).toEqual([
      'P4',
      'P#4',
      '',
      '',
    ]);
  });

  test('long text may be quoted or a block', () => {
    const {entries} = read('a: "windy\n  later calm"\nb: |\n  one\n  two\nc: >\n  one\n  two\n');
    expect(entries.map(({value}) => value.kind === 'scalar' && value.text)).toEqual([
      'windy later calm',
      'one\ntwo',
      'one two',
    ]);
  });

  test('an empty text is an empty block', () => {
    expect(read('').entries).toEqual([]);
    expect(read('# only a comment\n').entries).toEqual([]);
  });

  test('CRLF counts as one line end', () => {
    expect(read('a: 1\r\nb: 2\r\n').entries.map((e) => e.lineNumber)).toEqual([1, 2]);
  });
});
