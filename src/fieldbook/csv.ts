import {InputError} from '../errors.ts';

export interface CsvTable {
  readonly header: readonly CsvCell[];
  readonly rows: readonly CsvRow[];
}

export interface CsvRow {
  /** As many cells as the header has. */
  readonly cells: readonly CsvCell[];
  readonly lineNumber: number;
}

/** One cell; its line differs from the row's when a quoted cell before it holds a line end. */
export interface CsvCell {
  readonly text: string;
  readonly lineNumber: number;
}

/**
 * A table in comma-separated values: header, then rows of as many cells.
 *
 * The separator is the one of comma, semicolon and tab that the header holds most of. Blank lines
 * and lines beginning with "# " are skipped ("#4" is the name of a mark). Blanks around a cell are dropped unless it is quoted.
 * Source: RFC 4180 (2005), section 2; semicolons, tabs and comments are common practice, no source.
 *
 * @throws InputError for a quote that is never closed, text beside quotes, or a row of other length
 */
export function readCsv(text: string, path: string): CsvTable {
  const separator = separatorOf(text);
  const [header, ...rows] = rowsOf(text, separator, path);
  if (header === undefined) {
    throw new InputError(
      'expected a header line with the names of the columns, found an empty table',
      {
        path,
        lineNumber: 1,
      },
    );
  }
  for (const row of rows) {
    if (row.cells.length === header.cells.length) continue;
    const remedy =
      row.cells.length > header.cells.length
        ? 'put text with separators into quotes, and write numbers with a decimal point'
        : 'leave a cell blank, but keep its separator';
    throw new InputError(
      `expected ${header.cells.length} cells as in the header, found ${row.cells.length}; ${remedy}`,
      {path, lineNumber: row.lineNumber},
    );
  }
  return {header: header.cells, rows};
}

function separatorOf(text: string): string {
  const header = text.split(/\r\n|\n|\r/).find((line) => line.trim() !== '' && !isComment(line, 0));
  const bare = (header ?? '').replace(/"[^"]*"/g, '');
  const count = (separator: string) => bare.split(separator).length;
  return [',', ';', '\t'].reduce((best, next) => (count(next) > count(best) ? next : best));
}

function rowsOf(text: string, separator: string, path: string): CsvRow[] {
  const rows: CsvRow[] = [];
  let at = 0;
  let lineNumber = 1;
  while (at < text.length) {
    if (isComment(text, at)) {
      while (at < text.length && !isLineEnd(text[at])) at++;
      at += text[at] === '\r' && text[at + 1] === '\n' ? 2 : 1;
      lineNumber++;
      continue;
    }
    const rowLine = lineNumber;
    const cells: CsvCell[] = [];
    let more = true;
    while (more) {
      const cell = cellAt(text, at, separator, {path, lineNumber});
      cells.push({text: cell.text, lineNumber});
      lineNumber += cell.lineEndsInside;
      at = cell.end;
      more = text[at] === separator;
      if (more) at++;
    }
    if (text[at] === '\r' && text[at + 1] === '\n') at++;
    at++;
    lineNumber++;
    const only = cells.length === 1 ? cells[0]?.text : undefined;
    if (only !== '') rows.push({cells, lineNumber: rowLine});
  }
  return rows;
}

interface CellEnd {
  readonly text: string;
  /** Index of the separator or line end behind the cell. */
  readonly end: number;
  readonly lineEndsInside: number;
}

function cellAt(
  text: string,
  start: number,
  separator: string,
  place: {readonly path: string; readonly lineNumber: number},
): CellEnd {
  let begin = start;
  while (text[begin] === ' ') begin++;
  if (text[begin] !== '"') {
    let end = begin;
    while (end < text.length && text[end] !== separator && !isLineEnd(text[end])) end++;
    return {text: text.slice(begin, end).trim(), end, lineEndsInside: 0};
  }
  let close = begin + 1;
  while (close < text.length && (text[close] !== '"' || text[close + 1] === '"')) {
    close += text[close] === '"' ? 2 : 1;
  }
  if (close >= text.length) {
    throw new InputError('a quote opens here and is never closed; close it', place);
  }
  let end = close + 1;
  while (text[end] === ' ') end++;
  if (end < text.length && text[end] !== separator && !isLineEnd(text[end])) {
    throw new InputError(
      'text follows a closing quote; put the whole cell into quotes, and write a quote inside it twice',
      place,
    );
  }
  const inside = text.slice(begin + 1, close);
  return {
    text: inside.replaceAll('""', '"'),
    end,
    lineEndsInside: (inside.match(/\r\n|\n|\r/g) ?? []).length,
  };
}

function isComment(text: string, at: number): boolean {
  return text[at] === '#' && /[\s#]/.test(text[at + 1] ?? ' ');
}

function isLineEnd(character: string | undefined): boolean {
  return character === '\n' || character === '\r';
}
