import type {Combination} from '../occupation/combination.ts';
import type {ContentsResult} from '../occupation/contents-result.ts';
import type {Result} from '../occupation/result.ts';
import {COMBINATION_SCHEMA} from './combination-schema.ts';
import {CONTENTS_SCHEMA, RESULT_SCHEMA} from './schema.ts';
import type {Schema} from './schema-parts.ts';

/** The result document as text. */
export function resultJson(result: Result): string {
  return canonicalJson(result, RESULT_SCHEMA);
}

/** The combination of several results as text. */
export function combinationJson(combination: Combination): string {
  return canonicalJson(combination, COMBINATION_SCHEMA);
}

/** The document of `contents` as text. */
export function contentsJson(contents: ContentsResult): string {
  return canonicalJson(contents, CONTENTS_SCHEMA);
}

/**
 * JSON text that depends on nothing but the values: properties in the order of the schema, names
 * that are data in the order of their code units, numbers in the shortest form that reads back as
 * the same double (ECMA-262, Number::toString).
 *
 * @throws RangeError naming the path of a value that is no part of such a document: undefined, NaN,
 *         an infinity, −0, or a property that the schema does not know or misses
 */
export function canonicalJson(document: unknown, schema: Schema): string {
  return `${JSON.stringify(inOrder(document, schema, ''), undefined, 2)}\n`;
}

function inOrder(value: unknown, schema: Schema, path: string): unknown {
  switch (typeof value) {
    case 'string':
    case 'boolean':
      return value;
    case 'number':
      if (Object.is(value, -0)) throw misfit(path, 'negative zero');
      if (!Number.isFinite(value)) throw misfit(path, String(value));
      return value;
    case 'object':
      return value === null ? null : composite(value, schema, path);
    default:
      throw misfit(path, typeof value);
  }
}

function composite(value: object, schema: Schema, path: string): unknown {
  const part = compositeSchema(schema);
  if (Array.isArray(value)) {
    if (part === undefined || !('items' in part)) throw misfit(path, 'a list');
    return value.map((item, k) => inOrder(item, part.items, `${path}[${k}]`));
  }
  if (part === undefined || !('additionalProperties' in part)) throw misfit(path, 'an object');
  const entries = Object.entries(value);
  const names = new Map<string, unknown>(entries);
  if (!('properties' in part)) {
    const sorted = entries.sort(([a], [b]) => (a < b ? -1 : 1));
    return asObject(
      sorted.map(([name, item]) => [
        name,
        inOrder(item, part.additionalProperties, `${path}.${name}`),
      ]),
    );
  }
  const unknown = entries.find(([name]) => !Object.hasOwn(part.properties, name));
  if (unknown !== undefined) throw misfit(joined(path, unknown[0]), 'a property without a place');
  return asObject(
    Object.entries(part.properties).map(([name, own]) => [
      name,
      inOrder(names.get(name), own, joined(path, name)),
    ]),
  );
}

/** The branch for objects and lists of a schema that may allow null as well. */
function compositeSchema(schema: Schema): Schema | undefined {
  if ('anyOf' in schema)
    return schema.anyOf.map(compositeSchema).find((part) => part !== undefined);
  return 'items' in schema || 'additionalProperties' in schema ? schema : undefined;
}

/** Without a prototype a name such as `__proto__` is a name like any other. */
function asObject(entries: readonly (readonly [string, unknown])[]): object {
  const object: Record<string, unknown> = Object.create(null);
  for (const [name, value] of entries) object[name] = value;
  return object;
}

function joined(path: string, name: string): string {
  return path === '' ? name : `${path}.${name}`;
}

function misfit(path: string, found: string): RangeError {
  return new RangeError(`canonicalJson: ${path === '' ? 'the document' : path} is ${found}`);
}
