import {Ajv2020} from 'ajv/dist/2020.js';
import {describe, expect, test} from 'vitest';
import {contentsJson, resultJson} from '../../src/exports/json.ts';
import {CONTENTS_SCHEMA, RESULT_SCHEMA} from '../../src/exports/schema.ts';
import type {Schema} from '../../src/exports/schema-parts.ts';
import {DAY_WITH_JUMP, FLOAT_MINUTES, HEIGHT_BLUNDER, STILL_HOUR} from '../report/fixtures.ts';
import {contentsSample, invented, reducedSample} from './samples.ts';

const ajv = new Ajv2020({strict: true, allErrors: true});
const validResult = ajv.compile(RESULT_SCHEMA);
const validContents = ajv.compile(CONTENTS_SCHEMA);

const RESULTS = [
  ['an hour that is still', invented(STILL_HOUR)],
  ['a day with a jump', invented({...DAY_WITH_JUMP, seconds: 14_400})],
  ['minutes without heights', invented(FLOAT_MINUTES)],
  ['a blunder in height', invented(HEIGHT_BLUNDER)],
  [
    'MOLE, checked',
    reducedSample({name: 'mole-still.nmea', mark: 'MOLE', maxLines: 6000}).reduced.result,
  ],
  ['the ugly log', reducedSample({name: 'quay-ugly.log', mark: null}).reduced.result],
  [
    'CHAPEL, a table',
    reducedSample({name: 'chapel-ecef.csv', mark: 'CHAPEL', frame: 'ITRF2020', maxLines: 900})
      .reduced.result,
  ],
] as const;

describe('the published schema of the result', () => {
  test.each(RESULTS)('%s is valid, read back from its text', (_, result) => {
    const document = JSON.parse(resultJson(result));
    expect(validResult(document), JSON.stringify(validResult.errors, undefined, 1)).toBe(true);
    expect(document).toEqual(JSON.parse(JSON.stringify(result)));
  });

  test('every object is closed: one property more or less is refused', () => {
    const document = JSON.parse(resultJson(RESULTS[0][1]));
    let tried = 0;
    for (const {object, name} of objectsOf(document, RESULT_SCHEMA)) {
      object.surplus = 1;
      expect(validResult(document)).toBe(false);
      delete object.surplus;
      const kept = object[name];
      delete object[name];
      expect(validResult(document)).toBe(false);
      object[name] = kept;
      tried += 1;
    }
    expect(tried).toBeGreaterThan(30);
    expect(validResult(document)).toBe(true);
  });

  test('a number for a text, a wrong word and a short covariance are refused', () => {
    const document = JSON.parse(resultJson(RESULTS[0][1]));
    expect(validResult({...document, verdict: 'fine'})).toBe(false);
    expect(validResult({...document, inputs: [{...document.inputs[0], name: 5}]})).toBe(false);
    const position = {
      ...document.position,
      covarianceEnuM2: [
        [1, 0],
        [0, 1],
      ],
    };
    expect(validResult({...document, position})).toBe(false);
  });
});

describe('the published schema of contents', () => {
  test.each(['mole-still.nmea', 'quay-ugly.log', 'chapel-ecef.csv'])('%s is valid', (name) => {
    const document = JSON.parse(contentsJson(contentsSample(name, 6000)));
    expect(validContents(document), JSON.stringify(validContents.errors, undefined, 1)).toBe(true);
  });
});

/** Every object of a document that the schema closes, with the name of one of its properties. */
function objectsOf(
  value: unknown,
  schema: Schema,
): {object: Record<string, unknown>; name: string}[] {
  if ('anyOf' in schema) return schema.anyOf.flatMap((part) => objectsOf(value, part));
  if (typeof value !== 'object' || value === null) return [];
  if (Array.isArray(value)) {
    return 'items' in schema ? value.flatMap((item) => objectsOf(item, schema.items)) : [];
  }
  if (!('properties' in schema)) return [];
  const object = value as Record<string, unknown>;
  const inside = Object.entries(schema.properties).flatMap(([name, part]) =>
    objectsOf(object[name], part),
  );
  return [{object, name: schema.required[0] ?? ''}, ...inside];
}
