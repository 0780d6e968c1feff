import {UsageError} from '../errors.ts';
import {columnName, type Meaning} from '../log/table-names.ts';
import type {Form, FormKind} from './form.ts';

/** Where in a row the three numbers stand, and what turns them into metres. */
export interface ListLayout {
  /** Indices of the first, second and third number; −1: the list has no height. */
  readonly columns: readonly [number, number, number];
  /** What turns a number as written into the unit of the form. */
  readonly factors: readonly [number, number, number];
  readonly columnCount: number;
  /** The other columns by index, in their order. */
  readonly others: readonly number[];
  /** Where among the others the converted numbers go. */
  readonly coordinatesAfter: number;
  readonly names: readonly string[];
  /** A column whose name does not say above what its heights are; null: none. */
  readonly vagueHeight: string | null;
}

const LOOKS_LIKE_NUMBER = /^[-+]?\d/;

/** What each form calls its numbers; the third may be missing in plan lists. */
const MEANINGS: Readonly<Record<FormKind, readonly (readonly Meaning[])[]>> = {
  geocentric: [['x'], ['y'], ['z']],
  geodetic: [['latitude'], ['longitude'], ['ellipsoidalHeight', 'height']],
  local: [['localEast'], ['localNorth'], ['localUp', 'height']],
  grid: [['localEast'], ['localNorth'], ['ellipsoidalHeight', 'height']],
};
const EXAMPLES: Readonly<Record<FormKind, string>> = {
  geocentric: 'x,y,z',
  geodetic: 'latitude,longitude,height',
  local: 'east,north,up',
  grid: 'easting,northing,height',
};
const MAY_LACK_HEIGHT: readonly FormKind[] = ['geodetic', 'grid'];

/** The form of the numbers that a header names; undefined when it cannot tell. */
export function formOfHeader(names: readonly string[]): 'geocentric' | 'geodetic' | undefined {
  const meanings = names.map(meaningOf);
  const has = (...wanted: readonly Meaning[]) => wanted.every((one) => meanings.includes(one));
  const geocentric = has('x', 'y', 'z');
  const geodetic = has('latitude', 'longitude');
  if (geocentric === geodetic) return undefined;
  return geocentric ? 'geocentric' : 'geodetic';
}

function meaningOf(name: string): Meaning | null {
  const read = columnName(name);
  return read.kind === 'refused' ? null : read.meaning;
}

/**
 * The layout of a list whose columns have these names.
 *
 * @throws UsageError for a column that is missing or there twice, an unknown unit, and heights that
 *         are not above the ellipsoid
 */
export function layoutOf(
  names: readonly string[],
  {kind, axes, units, unitSizes}: Form,
): ListLayout {
  const read = names.map((name) => {
    const column = columnName(name);
    if (column.kind === 'refused') throw new UsageError(column.message);
    return column;
  });
  const columns: number[] = [];
  const factors: number[] = [];
  for (const [i, meanings] of MEANINGS[kind].entries()) {
    const axis = axes[i] ?? '';
    const found = read.flatMap(({meaning, written}, index) =>
      (meaning !== null && meanings.includes(meaning)) || isNamed(written, axis, units[i])
        ? [index]
        : [],
    );
    const [index, second] = found;
    if (second !== undefined) {
      throw new UsageError(
        `two columns hold the ${axis}: "${names[index ?? 0]}" and "${names[second]}"; rename one`,
      );
    }
    columns.push(index ?? -1);
    const unit = index === undefined ? null : (read[index]?.unit ?? null);
    factors.push(unit === null ? 1 : unit.factor / (unitSizes[i] ?? 1));
  }
  requireColumns(names, kind, columns);
  const taken = new Set(columns);
  const others = read.flatMap(({meaning}, index) =>
    taken.has(index) || meaning === 'skip' ? [] : [index],
  );
  const first = Math.min(...columns.filter((index) => index >= 0));
  return {
    columns: [columns[0]!, columns[1]!, columns[2]!],
    factors: [factors[0]!, factors[1]!, factors[2]!],
    columnCount: names.length,
    others,
    coordinatesAfter: others.filter((index) => index < first).length,
    names,
    vagueHeight: read[columns[2] ?? -1]?.meaning === 'height' ? (names[columns[2]!] ?? null) : null,
  };
}

/** A grid may call its axes otherwise: westing, southing; only in its own unit. */
function isNamed(written: string, axis: string, unit = ''): boolean {
  const name = written.trim().toLowerCase();
  return name === axis || name === columnTitle(axis, unit);
}

/** A name of a column that says what it holds and in which unit, such as `x_m`. */
export function columnTitle(axis: string, unit: string): string {
  return `${axis}_${unit.replaceAll('-', '_')}`;
}

function requireColumns(names: readonly string[], kind: FormKind, columns: readonly number[]) {
  const [first = -1, second = -1, third = -1] = columns;
  const enough = MAY_LACK_HEIGHT.includes(kind) || third >= 0;
  const shown = names.map((name) => `"${name}"`).join(', ');
  if (first < 0 || second < 0 || !enough) {
    if (names.some((name) => LOOKS_LIKE_NUMBER.test(name))) {
      throw new UsageError(
        `need a header line with the names of the columns, found ${shown}; name them with ` +
          `--columns, such as --columns name,${EXAMPLES[kind]}`,
      );
    }
    throw new UsageError(
      `need the columns ${EXAMPLES[kind]} of ${kind} coordinates, found ${shown}; name the columns ` +
        'with --columns, and the kind of coordinates with --from',
    );
  }
  const altitude = names.findIndex((name) => meaningOf(name) === 'altitude');
  if (third < 0 && altitude >= 0) {
    throw new UsageError(
      `"${names[altitude]}" is a height above the geoid; add the separation of the geoid and name ` +
        'the column ellipsoidal_height, or leave the column out',
    );
  }
}
