/** The part of JSON Schema (draft 2020-12) that the documents of this program need. */
export type Schema =
  | ObjectSchema
  | MapSchema
  | ListSchema
  | {
      readonly type: 'string' | 'number' | 'integer' | 'boolean' | 'null';
      readonly description?: string;
    }
  | {readonly const: string}
  | {readonly enum: readonly (string | null)[]}
  | {readonly anyOf: readonly Schema[]};

export interface ObjectSchema {
  readonly type: 'object';
  readonly description?: string;
  readonly properties: Readonly<Record<string, Schema>>;
  readonly required: readonly string[];
  readonly additionalProperties: false;
}

/** An object whose names are data, such as counts by reason. */
export interface MapSchema {
  readonly type: 'object';
  readonly additionalProperties: Schema;
}

export interface ListSchema {
  readonly type: 'array';
  readonly items: Schema;
  readonly minItems?: number;
  readonly maxItems?: number;
}

export const TEXT: Schema = {type: 'string'};
export const NUMBER: Schema = {type: 'number'};
export const COUNT: Schema = {type: 'integer'};
export const FLAG: Schema = {type: 'boolean'};
export const NULL: Schema = {type: 'null'};

/** All properties are required and no others are allowed. */
export function object(properties: Readonly<Record<string, Schema>>): ObjectSchema {
  return {
    type: 'object',
    properties,
    required: Object.keys(properties),
    additionalProperties: false,
  };
}

export function mapOf(values: Schema): MapSchema {
  return {type: 'object', additionalProperties: values};
}

export function listOf(items: Schema, length?: number): ListSchema {
  return length === undefined
    ? {type: 'array', items}
    : {type: 'array', items, minItems: length, maxItems: length};
}

export function oneOf(...values: readonly (string | null)[]): Schema {
  return {enum: values};
}

export function orNull(schema: Schema): Schema {
  return {anyOf: [schema, NULL]};
}

/** A document's schema as it is published. */
export interface DocumentSchema extends ObjectSchema {
  readonly $schema: string;
  readonly title: string;
}

export const UTC: Schema = {type: 'string', description: 'UTC as ISO 8601, ending in Z'};
export const LENGTH_M: Schema = {type: 'number', description: 'metres'};
export const SCALAR: Schema = {
  anyOf: [TEXT, NUMBER, FLAG, NULL],
};

/** The same for east, north and up. */
export function perAxis(value: Schema): ObjectSchema {
  return object({east: value, north: value, up: value});
}

export const XYZ = object({x: LENGTH_M, y: LENGTH_M, z: LENGTH_M});
export const PROGRAM = object({name: {const: 'stillmark'}, version: TEXT});

export const NOTICE = object({
  code: TEXT,
  severity: oneOf('concern', 'caution', 'note', 'absent'),
  about: listOf(TEXT),
  values: mapOf(SCALAR),
  text: TEXT,
});
