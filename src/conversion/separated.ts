/** What stands between the cells of a row. */
export type Separator = ',' | ';' | '\t' | ' ';

/** The separator that a line holds most of; blanks where it holds none of the others. */
export function separatorOf(line: string): Separator {
  const bare = line.replace(/"[^"]*"/g, '');
  const count = (separator: Separator) => bare.split(separator).length - 1;
  const most = ([',', ';', '\t'] as const).reduce((best, next) =>
    count(next) > count(best) ? next : best,
  );
  return count(most) > 0 ? most : ' ';
}

/**
 * The cells of a row, quotes and all, so that what is only copied stays what it is.
 *
 * Source: RFC 4180 (2005), section 2, except that a cell holds no line end.
 */
export function splitCells(line: string, separator: Separator): string[] {
  if (separator === ' ') return line.trim().match(/"(?:[^"]|"")*"|\S+/g) ?? [];
  if (!line.includes('"')) return line.split(separator);
  const cells: string[] = [];
  let start = 0;
  let quoted = false;
  for (let i = 0; i <= line.length; i++) {
    if (line[i] === '"') quoted = !quoted;
    else if (i === line.length || (!quoted && line[i] === separator)) {
      cells.push(line.slice(start, i));
      start = i + 1;
    }
  }
  return cells;
}

/** Cells as a row; between blanks, a cell with a blank in it is quoted and an empty one is "". */
export function joinCells(cells: readonly string[], separator: Separator): string {
  if (separator !== ' ') return cells.join(separator);
  return cells.map((cell) => (/^[^\s"]+$|^"/.test(cell) ? cell : `"${cell}"`)).join(' ');
}
