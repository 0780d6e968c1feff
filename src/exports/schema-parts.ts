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
