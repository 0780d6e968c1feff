import type {Cell} from './columns.ts';

/** A plain table: a caption, heads, rows that begin with their own head. */
export interface Table {
  readonly caption: string;
  readonly heads: readonly Head[];
  readonly rows: readonly Row[];
  /** Whether a phone shows it as a list. */
  readonly stacks: boolean;
}

/** The same table, ready to be shown as a list: every cell knows the head of its column. */
export function stacking(table: Omit<Table, 'stacks'>): Table {
  const labels = table.heads.slice(1).map(({text}) => text);
  const rows = table.rows.map((line) => ({
    ...line,
    cells: line.cells.map((cell, i) => ({...cell, label: labels[i] ?? ''})),
  }));
  return {...table, rows, stacks: true};
}

/** A table that keeps its form and scrolls sideways where it does not fit. */
export function fixedTable(table: Omit<Table, 'stacks'>): Table {
  return {...table, stacks: false};
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
