import {describe, expect, test} from 'vitest';
import {canonicalJson, resultJson} from '../../src/exports/json.ts';
import {listOf, mapOf, NUMBER, object, orNull, TEXT} from '../../src/exports/schema-parts.ts';
import {STILL_HOUR} from '../report/fixtures.ts';
import {invented} from './samples.ts';

const SCHEMA = object({
  name: TEXT,
  counts: mapOf(NUMBER),
  place: orNull(object({x: NUMBER, list: listOf(NUMBER)})),
});

describe('canonicalJson', () => {
  test('properties stand in the order of the schema, names that are data in that of their letters', () => {
    const document = {place: {list: [1], x: 2}, counts: {b: 1, a: 2, B: 3}, name: 'n'};
    const text = canonicalJson(document, SCHEMA);
    expect(text).toBe(
      `${JSON.stringify({name: 'n', counts: {B: 3, a: 2, b: 1}, place: {x: 2, list: [1]}}, undefined, 2)}\n`,
    );
  });

  test('a name that is special to objects is a name like any other', () => {
    const counts = JSON.parse('{"__proto__": 1, "constructor": 2}');
    const text = canonicalJson({name: '', counts, place: null}, SCHEMA);
    expect(text).toContain('"__proto__": 1');
  });

  const faults: readonly (readonly [string, unknown, string])[] = [
    ['NaN', {name: 'n', counts: {a: Number.NaN}, place: null}, 'counts.a is NaN'],
    ['infinity', {name: 'n', counts: {}, place: {x: Infinity, list: []}}, 'place.x is Infinity'],
    [
      'negative zero',
      {name: 'n', counts: {}, place: {x: 0, list: [1, -0]}},
      'place.list[1] is negative zero',
    ],
    ['undefined', {name: undefined, counts: {}, place: null}, 'name is undefined'],
    ['a missing property', {name: 'n', place: null}, 'counts is undefined'],
    [
      'a surplus property',
      {name: 'n', counts: {}, place: null, more: 1},
      'more is a property without a place',
    ],
    ['a function', {name: () => 1, counts: {}, place: null}, 'name is function'],
    ['a list for an object', {name: 'n', counts: [], place: null}, 'counts is a list'],
    ['an object for a number', {name: 'n', counts: {a: {}}, place: null}, 'counts.a is an object'],
  ];

  test.each(faults)('%s is refused with its path', (_, document, message) => {
    expect(() => canonicalJson(document, SCHEMA)).toThrow(message);
    expect(() => canonicalJson(document, SCHEMA)).toThrow(RangeError);
  });

  test('numbers read back as the same double', () => {
    const numbers = [0.1, 1 / 3, 4051761.6267707, 5e-324, 1.7976931348623157e308, 123456789012];
    const text = canonicalJson({name: '', counts: {}, place: {x: 1, list: numbers}}, SCHEMA);
    expect(JSON.parse(text).place.list).toEqual(numbers);
  });
});

describe('resultJson', () => {
  test('does not depend on the order in which a result was put together', () => {
    const result = invented(STILL_HOUR);
    const reversed = Object.fromEntries(
      Object.entries(result).reverse(),
    ) as unknown as typeof result;
    expect(resultJson(reversed)).toBe(resultJson(result));
    expect(resultJson(result).startsWith('{\n  "schema": "stillmark.result/1",')).toBe(true);
  });
});
