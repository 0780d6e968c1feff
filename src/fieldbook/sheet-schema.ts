import type {JsonSchema} from './shape.ts';
import {sheetShape} from './sheet-shape.ts';

/**
 * The field sheet as a JSON Schema, so that an editor completes keys and marks mistakes.
 *
 * Made from the same keys that the reader uses. An editor sees the types of YAML's core schema,
 * where the reader sees text; what depends on several keys at once only the reader checks.
 * Source: JSON Schema draft-07 (2018).
 */
export function sheetSchema(): JsonSchema {
  return {
    $schema: 'http://json-schema.org/draft-07/schema#',
    title: 'stillmark field sheet',
    ...sheetShape.schema,
  };
}
