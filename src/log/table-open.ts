import type {EpochsBuilder} from '../epochs/builder.ts';
import type {FixClass} from '../epochs/epochs.ts';
import {InputError} from '../errors.ts';
import type {LogFinding, ReadOptions} from './contents.ts';
import {textOf} from './delimited.ts';
import {finding} from './findings.ts';
import {type NamedColumns, namedColumns, positionColumns, sigmaColumns} from './table-columns.ts';
import {positionFindings, sigmaFindings} from './table-findings.ts';
import type {TableLayout} from './table-layout.ts';
import {GGA_QUALITIES, qualityLegend} from './table-quality.ts';
import {RowDecoder} from './table-rows.ts';
import {type HeadLine, isCommentText, type TableShape, tableShape} from './table-shape.ts';
import {timeColumns} from './table-time-columns.ts';

/** A line of the head, kept until the layout is known. */
export interface KeptLine {
  readonly bytes: Uint8Array;
  readonly tooLong: boolean;
}

/** A table whose columns are decided on. */
export interface OpenTable {
  readonly layout: TableLayout;
  readonly columns: NamedColumns;
  readonly rows: RowDecoder;
  readonly headerLineNumbers: ReadonlySet<number>;
  /** The first header line as it stands in the file; undefined without one. */
  readonly headerText: string | undefined;
  readonly findings: readonly LogFinding[];
}

/**
 * Decides on shape and columns from the first lines of a table.
 *
 * @returns undefined when there is nothing but blank lines, comments and a header
 * @throws InputError when the lines can be read in two ways, or in none; UsageError when the options
 *         contradict them
 */
export function openTable(
  head: readonly KeptLine[],
  options: ReadOptions,
  builder: EpochsBuilder,
): OpenTable | undefined {
  const lines: HeadLine[] = [];
  head.forEach(({bytes, tooLong}, k) => {
    requireText(bytes, k + 1, options.name);
    const text = textOf(bytes, 0, bytes.length);
    if (!tooLong && text.trim() !== '') lines.push({text, lineNumber: k + 1});
  });
  const shape = tableShape(lines, options.name);
  if (shape === undefined || shape.samples.length === 0) return undefined;
  const columns = namedColumns(shape, options.table, options.name);
  const chosen = timeColumns(columns, options.table, options.date !== null);
  const position = positionColumns(columns);
  const sigmas = sigmaColumns(columns);
  const quality = qualityOf(columns, lines, shape);
  const layout: TableLayout = {
    delimiter: shape.delimiter,
    decimalMark: shape.decimalMark,
    fields: columns.names.length,
    time: chosen.time,
    timeScale: chosen.timeScale,
    position,
    sigmas,
    qualityField: columns.has('quality') ? columns.field('quality') : null,
    qualityClasses: quality.classes,
    satellites: columns.numberOrNull('satellites'),
    hdop: columns.numberOrNull('hdop'),
    pdop: columns.numberOrNull('pdop'),
    vdop: columns.numberOrNull('vdop'),
    correctionAge: columns.numberOrNull('correctionAge'),
    stationId: columns.numberOrNull('stationId'),
  };
  const [firstHeaderLine] = shape.headerLineNumbers;
  return {
    layout,
    columns,
    rows: new RowDecoder(layout, options, builder),
    headerLineNumbers: shape.headerLineNumbers,
    headerText: lines.find(({lineNumber}) => lineNumber === firstHeaderLine)?.text,
    findings: [
      finding('table-columns', 'note', {
        used: columns.usedNames().join(', '),
        unused: columns.unusedNames().join(', '),
      }),
      ...chosen.findings,
      ...positionFindings(position, columns),
      ...sigmaFindings(sigmas),
      ...quality.findings,
    ],
  };
}

/** What the numbers of the quality column mean, if it has numbers. */
function qualityOf(
  columns: NamedColumns,
  lines: readonly HeadLine[],
  shape: TableShape,
): {classes: ReadonlyMap<number, FixClass>; findings: readonly LogFinding[]} {
  const isNumeric = columns.samples('quality').some((text) => /^\d+(\.0*)?$/.test(text));
  if (!isNumeric) return {classes: GGA_QUALITIES, findings: []};
  const comments = lines
    .map(({text}) => text)
    .filter((text) => isCommentText(text, shape.delimiter));
  const legend = qualityLegend(comments);
  const code = legend === undefined ? 'quality-as-gga' : 'quality-from-comment';
  return {
    classes: legend ?? GGA_QUALITIES,
    findings: [finding(code, 'note', {column: columns.written('quality')})],
  };
}

function requireText(bytes: Uint8Array, lineNumber: number, path: string): void {
  const isUtf16 =
    (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  if (lineNumber === 1 && isUtf16) {
    throw new InputError('this table is written in UTF-16; save it as UTF-8', {path, lineNumber});
  }
  if (bytes.includes(0)) {
    throw new InputError('this is no text: it holds zero bytes; a table must be plain text', {
      path,
      lineNumber,
    });
  }
}
