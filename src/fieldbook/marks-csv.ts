import {InputError} from '../errors.ts';
import type {CsvCell, CsvRow} from './csv.ts';
import {markFields} from './mark-shape.ts';
import {bare, nearestName} from './nearest-name.ts';
import type {MappingEntry, MappingNode} from './node.ts';
import {isUnit} from './quantity.ts';
import {isMapping} from './shape.ts';

/** Where the cells of a column go: a key, or a key inside a block, and the unit of bare numbers. */
interface Column {
  readonly block: string | null;
  readonly key: string;
  readonly unit: string;
}

/** The blocks of a mark whose keys can be columns, such as "standard uncertainty east". */
const BLOCKS = ['velocity', 'standard uncertainty', 'tolerance'];
const NOT_COLUMNS = [...BLOCKS, 'covariance', 'witness marks', 'other names'];

/**
 * The columns that a header names: keys of the marks file, with blanks, hyphens or underscores, and
 * perhaps a unit behind them: `ellipsoidal height m`, `easting (us-ft)`, `velocity_east [mm/yr]`.
 *
 * @throws InputError for a column that is not known, or named twice
 */
export function readColumns(header: readonly CsvCell[], path: string): Column[] {
  const known = knownColumns();
  const seen = new Set<string>();
  return header.map(({text, lineNumber}) => {
    const column = columnNamed(text, known);
    if (column === undefined) {
      const near = nearestName(splitUnit(text).name, [...known.keys()]);
      const remedy =
        near === undefined
          ? `the columns are: ${[...known.keys()].join(', ')}`
          : `did you mean "${near}"?`;
      throw new InputError(`there is no column "${text}"; ${remedy}`, {path, lineNumber});
    }
    const name = `${column.block} ${column.key}`;
    if (seen.has(name)) {
      throw new InputError(`column "${text}" stands twice; keep one of them`, {path, lineNumber});
    }
    seen.add(name);
    return column;
  });
}

/** A row as the block of keys that a YAML file would hold in its place. */
export function mappingFromRow(row: CsvRow, columns: readonly Column[], path: string): MappingNode {
  const entries: MappingEntry[] = [];
  const blocks = new Map<string, MappingEntry[]>();
  row.cells.forEach(({text, lineNumber}, index) => {
    const column = columns[index];
    if (column === undefined) return;
    if (column.unit !== '' && /[a-z]$/i.test(text)) {
      throw new InputError(
        `${column.key}: the column is in ${column.unit}, found "${text}"; write the number alone`,
        {path, lineNumber},
      );
    }
    const entry: MappingEntry = {
      key: column.key,
      lineNumber,
      value: {kind: 'scalar', text: withUnit(text, column.unit), lineNumber},
    };
    if (column.block === null) entries.push(entry);
    else blocks.set(column.block, [...(blocks.get(column.block) ?? []), entry]);
  });
  for (const [key, inside] of blocks) {
    const lineNumber = inside[0]?.lineNumber ?? row.lineNumber;
    entries.push({key, lineNumber, value: {kind: 'mapping', entries: inside, lineNumber}});
  }
  return {kind: 'mapping', entries, lineNumber: row.lineNumber};
}

function withUnit(text: string, unit: string): string {
  return text === '' || unit === '' ? text : `${text} ${unit}`;
}

function knownColumns(): Map<string, Column> {
  const columns = new Map<string, Column>();
  for (const {key, shape} of Object.values(markFields)) {
    if (!NOT_COLUMNS.includes(key)) columns.set(key, {block: null, key, unit: ''});
    if (!BLOCKS.includes(key) || !isMapping(shape)) continue;
    for (const inner of Object.values(shape.fields)) {
      columns.set(`${key} ${inner.key}`, {block: key, key: inner.key, unit: ''});
    }
  }
  return columns;
}

function columnNamed(text: string, known: ReadonlyMap<string, Column>): Column | undefined {
  const plain = found(text, known);
  if (plain !== undefined) return plain;
  const {name, unit} = splitUnit(text);
  const column = found(name, known);
  return column === undefined ? undefined : {...column, unit};
}

function found(text: string, known: ReadonlyMap<string, Column>): Column | undefined {
  for (const [name, column] of known) {
    if (bare(name) === bare(text)) return column;
  }
  return undefined;
}

/** The unit at the end of a column name, in brackets or behind a blank or underscore. */
function splitUnit(text: string): {readonly name: string; readonly unit: string} {
  const parts = /^(.*?)(?:[\s_]+|[\s_]*[[(]\s*)((?:us-)?[a-z]+(?:\/yr)?)\s*[\])]?\s*$/i.exec(text);
  const unit = parts?.[2] ?? '';
  const known = isUnit(unit.replace(/\/yr$/, ''));
  return known ? {name: parts?.[1] ?? '', unit} : {name: text, unit: ''};
}
