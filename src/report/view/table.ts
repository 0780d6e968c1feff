import type {Cell} from './columns.ts';

/** A plain table: a caption, heads, rows that begin with their own head. */
export interface Table {
  readonly caption: string;
  readonly heads: readonly Head[];
  readonly rows: readonly Row[];
}

export interface Head {
  readonly text: string;
  readonly numeric: boolean;
}

export interface Row {
  readonly head: string;
  readonly cells: readonly Cell[];
  readonly total: boolean;
}

export function head(text: string): Head {
  return {text, numeric: false};
}

export function numberHead(text: string): Head {
  return {text, numeric: true};
}

export function row(name: string, cells: readonly Cell[], total = false): Row {
  return {head: name, cells, total};
}
