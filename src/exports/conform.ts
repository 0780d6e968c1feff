import type {Schema} from './schema-parts.ts';

/** Where a document departs from its schema, in words for the one who wrote it. */
export interface Departure {
  /** Such as `position.geodetic.latitudeDeg`; empty for the document itself. */
  readonly path: string;
  readonly wanted: string;
}

/** The first place where a document read back departs from its schema; undefined: nowhere. */
export function departureFrom(schema: Schema, value: unknown, path = ''): Departure | undefined {
  if ('const' in schema) return value === schema.const ? undefined : {path, wanted: schema.const};
  if ('enum' in schema) {
    const allowed: readonly unknown[] = schema.enum;
    return allowed.includes(value) ? undefined : {path, wanted: schema.enum.join(', ')};
  }
  if ('anyOf' in schema) {
    const found = schema.anyOf.map((one) => departureFrom(one, value, path));
    if (found.includes(undefined)) return undefined;
    // The one that got deepest is the one that was meant.
    return found.reduce((a, b) => ((b?.path.length ?? 0) > (a?.path.length ?? 0) ? b : a));
  }
  if ('items' in schema) {
    if (!Array.isArray(value)) return {path, wanted: 'a list'};
    const {minItems = 0, maxItems = Number.POSITIVE_INFINITY} = schema;
    if (value.length < minItems || value.length > maxItems) {
      return {path, wanted: `a list of ${minItems}`};
    }
    return firstOf(value.entries(), (item, i) =>
      departureFrom(schema.items, item, `${path}[${i}]`),
    );
  }
  if (!('additionalProperties' in schema)) {
    return isOfType(value, schema.type) ? undefined : {path, wanted: TYPE_WORDS[schema.type]};
  }
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return {path, wanted: 'an object'};
  }
  const members = new Map<string, unknown>(Object.entries(value));
  if (!('properties' in schema)) {
    return firstOf(members, (item, name) =>
      departureFrom(schema.additionalProperties, item, joined(path, name)),
    );
  }
  for (const name of members.keys()) {
    if (!Object.hasOwn(schema.properties, name)) {
      return {path: joined(path, name), wanted: 'no such property'};
    }
  }
  return firstOf(Object.entries(schema.properties), (own, name) =>
    departureFrom(own, members.get(name), joined(path, name)),
  );
}

function firstOf<K, V>(
  entries: Iterable<readonly [K, V]>,
  look: (value: V, key: K) => Departure | undefined,
): Departure | undefined {
  for (const [key, value] of entries) {
    const found = look(value, key);
    if (found !== undefined) return found;
  }
  return undefined;
}

function isOfType(value: unknown, type: string): boolean {
  if (type === 'null') return value === null;
  if (type === 'integer') return Number.isInteger(value);
  return typeof value === type;
}

function joined(path: string, name: string): string {
  return path === '' ? name : `${path}.${name}`;
}

const TYPE_WORDS = {
  string: 'text',
  number: 'a number',
  integer: 'a whole number',
  boolean: 'true or false',
  null: 'null',
} as const;
