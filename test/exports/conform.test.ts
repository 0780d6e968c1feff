import {describe, expect, test} from 'vitest';
import {departureFrom} from '../../src/exports/conform.ts';
import {RESULT_SCHEMA} from '../../src/exports/schema.ts';
import {
  listOf,
  mapOf,
  NUMBER,
  object,
  oneOf,
  orNull,
  TEXT,
} from '../../src/exports/schema-parts.ts';
import {reducedSample} from './samples.ts';

describe('departure from a schema', () => {
  test('none in a document of our own, read back', () => {
    const {reduced} = reducedSample({name: 'mole-still.nmea', mark: 'MOLE', maxLines: 2000});
    const document = JSON.parse(JSON.stringify(reduced.result));
    expect(departureFrom(RESULT_SCHEMA, document)).toBeUndefined();
  });

  const schema = object({
    name: TEXT,
    kind: oneOf('a', 'b'),
    height: orNull(object({valueM: NUMBER})),
    pair: listOf(NUMBER, 2),
    counts: mapOf(NUMBER),
  });
  const good = {name: 'x', kind: 'a', height: {valueM: 1}, pair: [1, 2], counts: {one: 1}};

  test.each([
    [good, undefined],
    [{...good, height: null}, undefined],
    [
      {...good, name: 1},
      {path: 'name', wanted: 'text'},
    ],
    [
      {...good, kind: 'c'},
      {path: 'kind', wanted: 'a, b'},
    ],
    [
      {...good, height: {valueM: 'tall'}},
      {path: 'height.valueM', wanted: 'a number'},
    ],
    [
      {...good, pair: [1]},
      {path: 'pair', wanted: 'a list of 2'},
    ],
    [
      {...good, pair: [1, '2']},
      {path: 'pair[1]', wanted: 'a number'},
    ],
    [
      {...good, counts: {one: null}},
      {path: 'counts.one', wanted: 'a number'},
    ],
    [
      {...good, more: 1},
      {path: 'more', wanted: 'no such property'},
    ],
    [
      {...good, name: undefined},
      {path: 'name', wanted: 'text'},
    ],
    [[], {path: '', wanted: 'an object'}],
  ])('%j', (value, departure) => {
    expect(departureFrom(schema, value)).toEqual(departure);
  });
});
