import {InputError, UsageError} from '../errors.ts';
import {parseDate} from '../time/parse-time.ts';
import type {TableOptions} from './contents.ts';
import type {NumberColumn, PositionColumns, SigmaColumns} from './table-layout.ts';
import {ACCEPTED, type ColumnName, columnName, type Meaning} from './table-names.ts';
import type {TableShape} from './table-shape.ts';
import {isClock} from './table-texts.ts';

/** The named columns of a table: looked up by meaning, each meaning at most once. */
export class NamedColumns {
  readonly names: readonly string[];
  readonly #path: string;
  readonly #byMeaning = new Map<Meaning, {readonly column: ColumnName; readonly field: number}>();
  readonly #used = new Set<number>();
  readonly #samples: readonly (readonly string[])[];

  constructor(columns: readonly ColumnName[], shape: TableShape, path: string) {
    this.names = columns.map(({written}) => written);
    this.#path = path;
    this.#samples = shape.samples;
    columns.forEach((column, field) => {
      const {meaning} = column;
      if (meaning === null || meaning === 'skip') return;
      const other = this.#byMeaning.get(meaning);
      if (other !== undefined) {
        throw this.error(
          `the columns "${other.column.written}" and "${column.written}" mean the same; leave one out with --columns, writing - in its place`,
        );
      }
      this.#byMeaning.set(meaning, {column, field});
    });
  }

  has(...meanings: Meaning[]): boolean {
    return meanings.every((meaning) => this.#byMeaning.has(meaning));
  }

  written(meaning: Meaning): string {
    return this.#byMeaning.get(meaning)?.column.written ?? meaning;
  }

  timeScale(meaning: Meaning): 'utc' | 'gps' | null {
    return this.#byMeaning.get(meaning)?.column.timeScale ?? null;
  }

  isSexagesimal(meaning: Meaning): boolean {
    return this.#byMeaning.get(meaning)?.column.unit?.sexagesimal === true;
  }

  /** The place of a column that must be there, and is used from now on. */
  field(meaning: Meaning): number {
    const found = this.#byMeaning.get(meaning);
    if (found === undefined) throw new RangeError(`NamedColumns.field: no column of ${meaning}`);
    this.#used.add(found.field);
    return found.field;
  }

  number(meaning: Meaning): NumberColumn {
    const field = this.field(meaning);
    const column = this.#byMeaning.get(meaning)?.column;
    return {field, name: column?.written ?? meaning, factor: column?.unit?.factor ?? 1};
  }

  numberOrNull(meaning: Meaning): NumberColumn | null {
    return this.has(meaning) ? this.number(meaning) : null;
  }

  /** The texts of a column in the first rows, empty ones left out. */
  samples(meaning: Meaning): string[] {
    const field = this.#byMeaning.get(meaning)?.field;
    if (field === undefined) return [];
    return this.#samples.map((texts) => texts[field] ?? '').filter((text) => text !== '');
  }

  usedNames(): string[] {
    return this.names.filter((_, field) => this.#used.has(field));
  }

  unusedNames(): string[] {
    return this.names.filter((name, field) => !this.#used.has(field) && name !== '-');
  }

  error(message: string): InputError {
    return new InputError(`${message}; the columns are ${this.list()}`, {path: this.#path});
  }

  list(): string {
    const shown = this.names.slice(0, 20).map((name) => (name === '' ? '(no name)' : name));
    const more = this.names.length - shown.length;
    return `${shown.join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
  }
}

/** The columns under the names of the options or, failing those, of the header. */
export function namedColumns(shape: TableShape, options: TableOptions, path: string): NamedColumns {
  const given = options.columns;
  const written = given === null ? headerNames(shape, path) : givenNames(given, shape, path);
  const columns = written.map((text, field) => {
    const unit = given === null ? (shape.units?.[field] ?? '') : '';
    const column = columnName(unit === '' || /[[({<]/.test(text) ? text : `${text} [${unit}]`);
    if (column.kind === 'refused') throw new InputError(column.message, {path});
    if (given !== null && column.meaning === null) {
      throw new UsageError(
        `--columns: "${text}" is no known column name; use - for a column to leave out, or names such as ${exampleNames()}`,
      );
    }
    return column;
  });
  return new NamedColumns(columns, shape, path);
}

function exampleNames(): string {
  const examples: Meaning[] = [
    'time',
    'date',
    'gpsWeek',
    'secondOfWeek',
    'unixSeconds',
    'elapsed',
    'x',
    'y',
    'z',
    'latitude',
    'longitude',
    'ellipsoidalHeight',
    'altitude',
    'sigmaEast',
    'sigmaX',
    'correlationXy',
    'quality',
    'satellites',
  ];
  return examples.map((meaning) => ACCEPTED[meaning].names[0]).join(', ');
}

function headerNames(shape: TableShape, path: string): readonly string[] {
  if (shape.header === null) {
    throw new InputError(
      `found ${shape.fields} columns and no header that names them; give --columns with one name per column, such as time,x,y,z`,
      {path},
    );
  }
  const names = trimmedTo(shape.header, shape.fields);
  if (names.length === shape.fields || leavesEmptyEnd(names.length, shape)) return names;
  const parted = namesWithPartedTime(names, shape);
  if (parted !== undefined) return parted;
  throw new InputError(
    `the header names ${names.length} columns and the rows have ${shape.fields}; the header reads ${names.join(', ')}`,
    {path},
  );
}

/** Rows that end in a delimiter have an empty field that nothing names. */
function leavesEmptyEnd(names: number, {fields, samples}: TableShape): boolean {
  return names === fields - 1 && samples.every((texts) => (texts[fields - 1] ?? '') === '');
}

/** A header that ends in a delimiter has one empty name too many. */
function trimmedTo(names: readonly string[], fields: number): readonly string[] {
  return names.length === fields + 1 && names[names.length - 1] === '' ? names.slice(0, -1) : names;
}

/** Blanks inside the time part it into date and time of day under one name. */
function namesWithPartedTime(
  names: readonly string[],
  shape: TableShape,
): readonly string[] | undefined {
  if (shape.delimiter !== 'blanks' || names.length !== shape.fields - 1) return undefined;
  const at = names.findIndex((name) => {
    const column = columnName(name);
    return column.kind === 'column' && column.meaning === 'time';
  });
  const row = shape.samples[0] ?? [];
  const isParted =
    at >= 0 && parseDate(row[at] ?? '').kind === 'date' && isClock(row[at + 1] ?? '');
  if (!isParted) return undefined;
  const name = columnName(names[at] ?? '');
  const scale = name.kind === 'column' && name.timeScale !== null ? ` [${name.timeScale}]` : '';
  return [...names.slice(0, at), `date${scale}`, `time${scale}`, ...names.slice(at + 1)];
}

function givenNames(given: readonly string[], shape: TableShape, path: string): readonly string[] {
  const open = given[given.length - 1]?.trim() === '...';
  const names = open ? given.slice(0, -1) : given;
  const missing = shape.fields - names.length;
  if (open && missing >= 0) return [...names, ...Array.from({length: missing}, () => '-')];
  if (missing === 0 || leavesEmptyEnd(names.length, shape)) return names;
  throw new InputError(
    `--columns names ${names.length} columns and the rows have ${shape.fields}; write - for each column to leave out, or ... at the end`,
    {path},
  );
}

/** X, Y, Z or latitude, longitude and a height; both, or half of either, is refused. */
export function positionColumns(columns: NamedColumns): PositionColumns {
  const geocentric = (['x', 'y', 'z'] as const).filter((meaning) => columns.has(meaning));
  const geodetic = (['latitude', 'longitude'] as const).filter((meaning) => columns.has(meaning));
  if (geocentric.length > 0 && geodetic.length > 0) {
    throw columns.error(
      'found geocentric and geodetic columns and cannot choose; name one kind with --columns and write - for the other',
    );
  }
  if (geocentric.length === 3) {
    return {
      kind: 'geocentric',
      x: columns.number('x'),
      y: columns.number('y'),
      z: columns.number('z'),
    };
  }
  if (geodetic.length === 2) return geodeticColumns(columns);
  const local = columns.has('localEast') || columns.has('localNorth') || columns.has('localUp');
  const found = [...geocentric, ...geodetic].map((meaning) => columns.written(meaning));
  const partly = found.length > 0 ? `found only ${found.join(', ')}` : 'found neither';
  const hint = local
    ? '; east, north and up, or grid coordinates, are no position without their origin'
    : '';
  throw columns.error(`need x, y, z or latitude, longitude and height, ${partly}${hint}`);
}

function geodeticColumns(columns: NamedColumns): PositionColumns {
  const generic = columns.has('height');
  const stated = columns.has('ellipsoidalHeight');
  if (generic && stated) {
    throw columns.error(
      `found two heights, "${columns.written('height')}" and "${columns.written('ellipsoidalHeight')}"; name one with --columns`,
    );
  }
  const hasHeight = generic || stated || columns.has('altitude');
  const local = (['localUp', 'localEast', 'localNorth'] as const).find((m) => columns.has(m));
  if (!hasHeight && local !== undefined) {
    throw columns.error(
      `the columns "${columns.written('latitude')}" and "${columns.written('longitude')}" stand beside "${columns.written(local)}", which is a displacement, so they may be displacements too; a displacement is no position. If they are degrees, say so with --columns`,
    );
  }
  return {
    kind: 'geodetic',
    latitude: columns.number('latitude'),
    longitude: columns.number('longitude'),
    sexagesimal: columns.isSexagesimal('latitude') || columns.isSexagesimal('longitude'),
    ellipsoidalHeight: stated
      ? columns.number('ellipsoidalHeight')
      : columns.numberOrNull('height'),
    altitude: columns.numberOrNull('altitude'),
    separation: columns.numberOrNull('separation'),
  };
}

/** The table's own standard deviations; those of the local axes are taken before geocentric ones. */
export function sigmaColumns(columns: NamedColumns): SigmaColumns | null {
  if (columns.has('sigmaEast') || columns.has('sigmaNorth') || columns.has('sigmaUp')) {
    return {
      kind: 'local',
      east: columns.numberOrNull('sigmaEast'),
      north: columns.numberOrNull('sigmaNorth'),
      up: columns.numberOrNull('sigmaUp'),
      squared: false,
    };
  }
  if (columns.has('varianceEast') || columns.has('varianceNorth') || columns.has('varianceUp')) {
    return {
      kind: 'local',
      east: columns.numberOrNull('varianceEast'),
      north: columns.numberOrNull('varianceNorth'),
      up: columns.numberOrNull('varianceUp'),
      squared: true,
    };
  }
  const squared = columns.has('varianceX', 'varianceY', 'varianceZ');
  if (!squared && !columns.has('sigmaX', 'sigmaY', 'sigmaZ')) return null;
  const covariances = columns.has('covarianceXy', 'covarianceXz', 'covarianceYz');
  const correlations =
    !covariances && columns.has('correlationXy', 'correlationXz', 'correlationYz');
  return {
    kind: 'geocentric',
    x: columns.number(squared ? 'varianceX' : 'sigmaX'),
    y: columns.number(squared ? 'varianceY' : 'sigmaY'),
    z: columns.number(squared ? 'varianceZ' : 'sigmaZ'),
    squared,
    correlations,
    xy: covariances
      ? columns.number('covarianceXy')
      : correlations
        ? columns.number('correlationXy')
        : null,
    xz: covariances
      ? columns.number('covarianceXz')
      : correlations
        ? columns.number('correlationXz')
        : null,
    yz: covariances
      ? columns.number('covarianceYz')
      : correlations
        ? columns.number('correlationYz')
        : null,
  };
}
