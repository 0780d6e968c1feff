import {nearestName} from './nearest-name.ts';
import {
  described,
  isBlank,
  type MappingNode,
  type Node,
  type Place,
  quoted,
  refuse,
} from './node.ts';

/**
 * What a place in a sheet or marks file may hold: how to read it, and how to tell an editor.
 *
 * One definition serves the reader, the JSON Schema and the blank sheet, so that they cannot
 * disagree.
 */
export interface Shape<T> {
  /** Reads a filled node; ends with an InputError that says what to write. */
  read(node: Node, place: Place): T;
  readonly schema: JsonSchema;
  /** What a filled place looks like, for messages. */
  readonly example: string;
  /** What the blank sheet says behind the explanation of a key: `, as 1.543 m`; empty for words. */
  readonly hint: string;
}

export type JsonSchema = {readonly [key: string]: JsonValue};
type JsonValue =
  | string
  | number
  | boolean
  | null
  | readonly JsonValue[]
  | {readonly [key: string]: JsonValue};

/** One key of a mapping, with the words that explain it. */
export interface Field<T> {
  readonly key: string;
  readonly shape: Shape<T>;
  readonly required: boolean;
  readonly says: string;
}

export type Fields = Readonly<Record<string, Field<unknown>>>;
export type ValueOf<F extends Fields> = {
  readonly [K in keyof F]: F[K] extends Field<infer T> ? T : never;
};

export interface MappingShape<F extends Fields> extends Shape<ValueOf<F>> {
  readonly fields: F;
}

export function isMapping(shape: Shape<unknown>): shape is MappingShape<Fields> {
  return 'fields' in shape;
}

/** A key that must be filled in. */
export function required<T>(key: string, shape: Shape<T>, says: string): Field<T> {
  return {key, shape, required: true, says};
}

/** A key that may be left out or left blank; both are `undefined`. */
export function optional<T>(key: string, shape: Shape<T>, says: string): Field<T | undefined> {
  return {key, shape, required: false, says};
}

/** A block of known keys. A block in which nothing is filled in counts as left out. */
export function mapping<F extends Fields>(fields: F, example: string): MappingShape<F> {
  return {
    fields,
    example,
    hint: '',
    schema: mappingSchema(fields),
    read: (node, place) => readMapping(fields, node, place, example),
  };
}

function readMapping<F extends Fields>(
  fields: F,
  node: Node,
  place: Place,
  example: string,
): ValueOf<F> {
  if (node.kind !== 'mapping') {
    refuse(
      place,
      node.lineNumber,
      `expected keys of its own, indented below, found ${described(node)}; write for example ${example}`,
    );
  }
  refuseUnknownKeys(
    node,
    Object.values(fields).map((field) => field.key),
    place,
  );
  const value: Record<string, unknown> = {};
  for (const [name, field] of Object.entries(fields)) {
    const entry = node.entries.find(({key}) => key === field.key);
    if (entry !== undefined && !isBlank(entry.value)) {
      value[name] = field.shape.read(entry.value, within(place, field.key));
    } else if (field.required) {
      refuse(
        place,
        entry?.lineNumber ?? node.lineNumber,
        `"${field.key}" is missing; write ${asWritten(field)}`,
      );
    } else {
      value[name] = undefined;
    }
  }
  return value as ValueOf<F>;
}

function refuseUnknownKeys(node: MappingNode, known: readonly string[], place: Place): void {
  for (const {key, lineNumber} of node.entries) {
    if (known.includes(key)) continue;
    const near = nearestName(key, known);
    const remedy =
      near === undefined ? `the keys here are: ${known.join(', ')}` : `did you mean "${near}"?`;
    refuse(place, lineNumber, `there is no key ${quoted(key)}; ${remedy}`);
  }
}

function asWritten({key, shape}: Field<unknown>): string {
  return `"${key}: ${shape.example}"`;
}

/** The place of a key inside a block. */
export function within(place: Place, key: string): Place {
  return {...place, trail: place.trail === '' ? key : `${place.trail}, ${key}`};
}

/** The line of a key in a block, or of the block where the key is left out. */
export function lineOfKey(node: Node, key: string): number {
  if (node.kind !== 'mapping') return node.lineNumber;
  return node.entries.find((entry) => entry.key === key)?.lineNumber ?? node.lineNumber;
}

function mappingSchema(fields: Fields): JsonSchema {
  const list = Object.values(fields);
  const needed = list.filter((field) => field.required).map((field) => field.key);
  return {
    type: ['object', 'null'],
    additionalProperties: false,
    ...(needed.length > 0 ? {required: needed} : {}),
    properties: Object.fromEntries(
      list.map(({key, shape, says}) => [key, {description: says, ...shape.schema}]),
    ),
  };
}

/** Several values of one kind. */
export function list<T>(of: Shape<T>, limits: {readonly most: number}): Shape<readonly T[]> {
  return {
    example: `[${of.example}]`,
    hint: `, as [${of.example}, ...]`,
    schema: {type: ['array', 'null'], maxItems: limits.most, items: of.schema},
    read: (node, place) => {
      if (node.kind !== 'list') {
        refuse(
          place,
          node.lineNumber,
          `expected a list, found ${described(node)}; write each item on its own line after "- "`,
        );
      }
      if (node.items.length > limits.most) {
        refuse(
          place,
          node.lineNumber,
          `expected at most ${limits.most} items, found ${node.items.length}; remove some`,
        );
      }
      return node.items.map((item, index) => {
        const here = {...place, trail: `${place.trail} (item ${index + 1})`};
        if (isBlank(item))
          refuse(here, item.lineNumber, `is blank; fill it in, as ${of.example}, or remove it`);
        return of.read(item, here);
      });
    },
  };
}
