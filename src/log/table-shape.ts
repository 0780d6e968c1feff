import {InputError} from '../errors.ts';
import {COMMA, DOT} from './bytes.ts';
import {type Delimiter, fieldTexts} from './delimited.ts';
import {columnName} from './table-names.ts';
import {unitNamed} from './table-units.ts';

/** A line from the beginning of a table, before it is known what the table looks like. */
export interface HeadLine {
  readonly text: string;
  readonly lineNumber: number;
}

/** How the lines of a table are cut into fields, and the names that stand above them. */
export interface TableShape {
  readonly delimiter: Delimiter;
  /** The byte between units and tenths. */
  readonly decimalMark: number;
  /** Names in the order of the columns; null when the table carries none. */
  readonly header: readonly string[] | null;
  /** Names of units from a line of its own below the header, empty where none. */
  readonly units: readonly string[] | null;
  /** Lines that are neither rows nor comments. */
  readonly headerLineNumbers: ReadonlySet<number>;
  /** Fields of most rows. */
  readonly fields: number;
  /** Some rows, as texts. */
  readonly samples: readonly (readonly string[])[];
}

const COMMENT = /^\s*(#|%|!|\/\/|;)/;
const SEMICOLON_COMMENT = /^\s*;/;
/** Blanks last, because they also stand inside the fields of the others. */
const DELIMITERS: readonly Delimiter[] = ['semicolon', 'tab', 'comma', 'blanks'];
/** A time, a latitude and a longitude are the least that a row can hold. */
const FEWEST_FIELDS = 3;
const MOST_SAMPLES = 50;
const VALUE = /^[+-]?[.,]?\d/;
const COMMA_DECIMAL = /^[+-]?\d+,\d+$/;
const PARTED_AT_DECIMAL = /^\d+\s+[+-]?\d+$/;
const COMMA_GROUP = /^[+-]?[1-9]\d{0,2},\d{3}$/;
const COMMA_GROUPS = /^[+-]?[1-9]\d{0,2}(,\d{3}){2,}(\.\d*)?$/;
const POINT_DECIMAL = /^[+-]?\d*\.\d+$/;

export function isCommentText(text: string, delimiter: Delimiter | null): boolean {
  return COMMENT.test(text) && !(delimiter === 'semicolon' && SEMICOLON_COMMENT.test(text));
}

/**
 * Finds delimiter, decimal mark and header from the first lines of a table.
 *
 * @param lines   blank lines left out
 * @returns undefined when there is no row
 * @throws InputError when the lines have no common shape, or numbers could be read in two ways
 */
export function tableShape(lines: readonly HeadLine[], name: string): TableShape | undefined {
  const content = lines.filter(({text}) => !isCommentText(text, null));
  const first = content[0];
  if (first === undefined) return undefined;
  const found = commonDelimiter(content);
  if (found === undefined) {
    throw new InputError(
      `need rows with the same three or more columns, parted by comma, semicolon, tab or blanks; found "${excerpt(first.text)}"`,
      {path: name, lineNumber: first.lineNumber},
    );
  }
  const {delimiter, fields} = found;
  // A row whose first field is empty starts with the semicolon that parts the columns.
  const own =
    delimiter === 'semicolon' ? lines.filter((l) => !isCommentText(l.text, delimiter)) : content;
  const header = headerAbove(own, lines, delimiter, fields);
  const samples = own
    .filter(({lineNumber}) => !header.lineNumbers.has(lineNumber))
    .slice(0, MOST_SAMPLES)
    .map(({text}) => fieldTexts(text, delimiter));
  return {
    delimiter,
    decimalMark: decimalMark(samples, delimiter, name),
    header: header.names,
    units: header.units,
    headerLineNumbers: header.lineNumbers,
    fields,
    samples,
  };
}

function commonDelimiter(
  content: readonly HeadLine[],
): {delimiter: Delimiter; fields: number} | undefined {
  for (const delimiter of DELIMITERS) {
    const counts = content.map(({text}) => fieldTexts(text, delimiter).length);
    const {value, share} = commonest(counts);
    // In a short table the header, of another shape, may be half of the lines.
    if (value >= FEWEST_FIELDS && share >= 0.5) return {delimiter, fields: value};
  }
  return undefined;
}

/** The commonest count, of equally common ones the last met: rows follow the header. */
function commonest(counts: readonly number[]): {value: number; share: number} {
  const tally = new Map<number, number>();
  for (const count of counts) tally.set(count, (tally.get(count) ?? 0) + 1);
  let value = 0;
  let most = 0;
  for (const [count, times] of tally) {
    if (times >= most) {
      value = count;
      most = times;
    }
  }
  return {value, share: most / counts.length};
}

interface FoundHeader {
  readonly names: readonly string[] | null;
  readonly units: readonly string[] | null;
  readonly lineNumbers: ReadonlySet<number>;
}

function headerAbove(
  content: readonly HeadLine[],
  lines: readonly HeadLine[],
  delimiter: Delimiter,
  fields: number,
): FoundHeader {
  const first = content[0];
  const second = content[1];
  const names = first === undefined ? [] : fieldTexts(first.text, delimiter);
  if (first === undefined || !isHeader(names)) {
    const commented = commentedHeader(lines, first?.lineNumber ?? 0, delimiter, fields);
    return {
      names: commented?.names ?? null,
      units: null,
      lineNumbers: new Set(commented === undefined ? [] : [commented.lineNumber]),
    };
  }
  const below = second === undefined ? [] : fieldTexts(second.text, delimiter);
  if (second === undefined || !areUnits(below)) {
    return {names, units: null, lineNumbers: new Set([first.lineNumber])};
  }
  const units = below.map((text) => text.replace(/^[[({]|[\])}]$/g, '').replace(/^-$/, ''));
  return {names, units, lineNumbers: new Set([first.lineNumber, second.lineNumber])};
}

/** A header names its columns: no field begins like a number or a date. */
function isHeader(texts: readonly string[]): boolean {
  const filled = texts.filter((text) => text !== '');
  return filled.length >= 2 && !filled.some((text) => VALUE.test(text));
}

function areUnits(texts: readonly string[]): boolean {
  const bare = texts.map((text) => text.replace(/^[[({]|[\])}]$/g, ''));
  const filled = bare.filter((text) => text !== '' && text !== '-');
  return filled.length >= 2 && filled.every((text) => unitNamed(text) !== undefined);
}

/** The comment above the first row that has as many words as the rows and names most columns. */
function commentedHeader(
  lines: readonly HeadLine[],
  firstRow: number,
  delimiter: Delimiter,
  fields: number,
): {names: string[]; lineNumber: number} | undefined {
  let best: {names: string[]; lineNumber: number} | undefined;
  let most = 1;
  for (const {text, lineNumber} of lines) {
    if (lineNumber >= firstRow || !COMMENT.test(text)) continue;
    const names = fieldTexts(text.replace(COMMENT, ''), delimiter);
    // Date and time of a row parted by blanks may share one name.
    if (names.length !== fields && !(delimiter === 'blanks' && names.length === fields - 1))
      continue;
    const known = names.filter((name) => {
      const column = columnName(name);
      return column.kind === 'refused' || column.meaning !== null;
    }).length;
    if (known > most) {
      best = {names, lineNumber};
      most = known;
    }
  }
  return best;
}

/**
 * Which of point and comma stands before the decimals.
 *
 * A comma is believed only where semicolon or tab part the columns, no number has a point, and at
 * least one number cannot be thousands with a separator.
 */
function decimalMark(
  samples: readonly (readonly string[])[],
  delimiter: Delimiter,
  name: string,
): number {
  const texts = samples.flat();
  if (delimiter === 'comma' || delimiter === 'blanks') {
    // "1,5 2,5" parted at its commas leaves "5 2".
    const mixed = delimiter === 'blanks' ? COMMA_DECIMAL : PARTED_AT_DECIMAL;
    const withComma = texts.find((text) => mixed.test(text));
    if (withComma !== undefined) {
      throw new InputError(
        `cannot tell commas between columns from decimal commas beside "${withComma}"; write decimal points, or part the columns with semicolons`,
        {path: name},
      );
    }
    return DOT;
  }
  const groups = texts.find((text) => COMMA_GROUPS.test(text));
  const commas = texts.filter((text) => COMMA_DECIMAL.test(text));
  const points = texts.filter((text) => POINT_DECIMAL.test(text));
  const [comma] = commas;
  if (groups !== undefined) {
    throw new InputError(`need numbers without thousands separators, found "${groups}"`, {
      path: name,
    });
  }
  if (comma === undefined) return DOT;
  if (points[0] !== undefined) {
    throw new InputError(
      `found both "${comma}" and "${points[0]}"; need one decimal mark in the whole table`,
      {path: name},
    );
  }
  if (commas.every((text) => COMMA_GROUP.test(text))) {
    throw new InputError(
      `cannot tell whether "${comma}" has decimals or thousands; write decimal points`,
      {path: name},
    );
  }
  return COMMA;
}

/** The beginning of a line for a message. */
function excerpt(text: string): string {
  const shown = text.replace(/[^\x20-\x7e]/g, '·');
  return shown.length > 60 ? `${shown.slice(0, 60)}…` : shown;
}
