import {EpochsBuilder} from '../epochs/builder.ts';
import type {Satellites} from '../epochs/epochs.ts';
import {InputError} from '../errors.ts';
import {BANG, HASH} from './bytes.ts';
import type {LogContents, LogFinding, LogReader, ReadOptions} from './contents.ts';
import {type Delimiter, isBlank, textOf} from './delimited.ts';
import {LineCutter} from './delimited-lines.ts';
import {TableAccount} from './table-account.ts';
import {
  type NamedColumns,
  namedColumns,
  positionColumns,
  sigmaColumns,
  timeColumns,
} from './table-columns.ts';
import type {PositionColumns, SigmaColumns, TableLayout} from './table-layout.ts';
import {inTimeOrder} from './table-order.ts';
import {GGA_QUALITIES, qualityLegend} from './table-quality.ts';
import {RowDecoder} from './table-rows.ts';
import {type HeadLine, isCommentText, type TableShape, tableShape} from './table-shape.ts';

/** Rows read before the columns are decided on, and bytes if rows are slow to come. */
const HEAD_ROWS = 200;
const HEAD_BYTES = 1 << 20;
const PERCENT = 0x25;
const SLASH = 0x2f;
const SEMICOLON = 0x3b;
/** Share of impossible positions above which a column, not a row, must be wrong. */
const MOST_IMPLAUSIBLE = 0.01;
const WEEKS_PER_ROLLOVER = 1024;
const SECONDS_PER_WEEK = 604_800;

/**
 * Reads a table of positions: one row per epoch, columns named by a header or by the options.
 *
 * The first rows decide on delimiter, decimal mark and columns; from then on rows are decoded in
 * place. Errors are thrown by `finish`, so that they do not depend on how the bytes were cut.
 */
export function createTableReader(options: ReadOptions): LogReader {
  return new TableReader(options);
}

/** A line of the head, kept until the layout is known. */
interface KeptLine {
  readonly bytes: Uint8Array;
  readonly tooLong: boolean;
}

class TableReader implements LogReader {
  readonly #options: ReadOptions;
  readonly #account = new TableAccount();
  readonly #builder = new EpochsBuilder();
  readonly #lines = new LineCutter((bytes, from, to, tooLong) =>
    this.#line(bytes, from, to, tooLong),
  );
  readonly #head: KeptLine[] = [];
  #headRows = 0;
  #headBytes = 0;
  #bytes = 0;
  #table: OpenTable | undefined;
  #failure: unknown;

  constructor(options: ReadOptions) {
    this.#options = options;
  }

  add(chunk: Uint8Array): void {
    this.#bytes += chunk.length;
    if (this.#failure === undefined) this.#lines.add(chunk);
  }

  finish(): LogContents {
    if (this.#failure === undefined) this.#lines.finish();
    if (this.#failure === undefined && this.#table === undefined) this.#decide();
    if (this.#failure !== undefined) throw this.#failure;
    const table = this.#table;
    if (table !== undefined) this.#requirePlausible(table);
    return this.#contents(table);
  }

  #line(bytes: Uint8Array, from: number, to: number, tooLong: boolean): void {
    if (this.#failure !== undefined) return;
    if (this.#table !== undefined) {
      this.#row(this.#table, bytes, from, to, tooLong);
      return;
    }
    const start = this.#head.length === 0 && hasByteOrderMark(bytes, from) ? from + 3 : from;
    this.#head.push({bytes: bytes.slice(start, to), tooLong});
    this.#headBytes += to - start;
    const mark = bytes[start];
    const isRow =
      to > start && mark !== HASH && mark !== PERCENT && mark !== BANG && mark !== SLASH;
    if (isRow) this.#headRows += 1;
    if (this.#headRows >= HEAD_ROWS || this.#headBytes >= HEAD_BYTES) this.#decide();
  }

  /** Decides on the layout, then takes the lines of the head as rows. */
  #decide(): void {
    try {
      this.#table = openTable(this.#head, this.#options, this.#builder);
    } catch (error) {
      this.#failure = error;
      return;
    }
    const head = this.#head.splice(0);
    for (const {bytes, tooLong} of head) {
      this.#row(this.#table, bytes, 0, bytes.length, tooLong);
    }
  }

  /** @param table undefined when the whole input holds no row */
  #row(
    table: OpenTable | undefined,
    bytes: Uint8Array,
    from: number,
    to: number,
    tooLong: boolean,
  ): void {
    const account = this.#account;
    account.total += 1;
    const lineNumber = account.total;
    if (tooLong) {
      account.reject('line too long', lineNumber, bytes, from, to);
      return;
    }
    let first = from;
    while (first < to && isBlank(bytes[first])) first += 1;
    if (first === to) {
      account.ignore('blank');
      return;
    }
    if (table?.headerLineNumbers.has(lineNumber) === true) {
      account.ignore('header');
      return;
    }
    if (isComment(bytes, first, to, table?.layout.delimiter ?? null)) {
      account.ignore('comment');
      return;
    }
    // Without a single row, what is neither blank nor a comment is a header.
    if (table === undefined) {
      account.ignore('header');
      return;
    }
    const reason = table.rows.take(bytes, from, to, lineNumber);
    if (reason === '') account.used += 1;
    else if (isHeaderAgain(table, () => textOf(bytes, from, to))) account.ignore('header');
    else account.reject(reason, lineNumber, bytes, from, to);
  }

  #requirePlausible({rows, columns}: OpenTable): void {
    const {count, first} = rows.implausible;
    const positions = this.#account.used + count;
    const systematic = count > positions / 2 || (count > 2 && count > positions * MOST_IMPLAUSIBLE);
    if (systematic) {
      throw columns.error(
        `${count} of ${positions} rows hold no possible position: ${first}; check the units and which columns are read`,
      );
    }
    const {used, rejectedLines, examples} = this.#account;
    const [example] = examples;
    const onlyEmpty = rejectedLines === (this.#account.rejected['no position'] ?? 0);
    if (used === 0 && example !== undefined && !onlyEmpty) {
      throw new InputError(
        `no row could be read; the first reason is "${example.reason}", found "${example.excerpt}"; the columns are ${columns.list()}`,
        {path: this.#options.name, lineNumber: example.lineNumber},
      );
    }
  }

  #contents(table: OpenTable | undefined): LogContents {
    const account = this.#account;
    const epochs = inTimeOrder(this.#builder.finish());
    const unknown = Number.NaN;
    return {
      inputs: [
        {
          name: this.#options.name,
          kind: 'table',
          bytes: this.#bytes,
          lines: {
            total: account.total,
            used: account.used,
            ignored: account.ignored,
            rejected: account.rejected,
          },
          rejectedLines: account.examples,
          betweenBytes: 0,
          sentences: {rows: account.used},
          checksums: {good: 0, bad: 0, absent: 0},
          lineEnds: this.#lines.lineEnds,
          firstGpsSeconds: epochs.gpsSeconds[0] ?? unknown,
          lastGpsSeconds: epochs.gpsSeconds[epochs.count - 1] ?? unknown,
        },
      ],
      epochs,
      satellites: noSatellites(),
      resolution: table?.rows.resolution() ?? {
        latitudeDeg: unknown,
        longitudeDeg: unknown,
        heightM: unknown,
        separationM: unknown,
      },
      findings: table === undefined ? [] : findingsOf(table, epochs.gpsSeconds[0] ?? unknown),
      timeScale: table?.layout.timeScale ?? 'utc',
      datumStated: null,
    };
  }
}

/** A table whose columns are decided on. */
interface OpenTable {
  readonly layout: TableLayout;
  readonly columns: NamedColumns;
  readonly rows: RowDecoder;
  readonly headerLineNumbers: ReadonlySet<number>;
  /** The first header line as it stands in the file; undefined without one. */
  readonly headerText: string | undefined;
  readonly findings: readonly LogFinding[];
}

/** @returns undefined when there is nothing but blank lines, comments and a header */
function openTable(
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
      {
        code: 'table-columns',
        severity: 'note',
        values: {used: columns.usedNames().join(', '), unused: columns.unusedNames().join(', ')},
      },
      ...chosen.findings,
      ...positionFindings(position, columns),
      ...sigmaFindings(sigmas),
      ...quality.findings,
    ],
  };
}

function qualityOf(columns: NamedColumns, lines: readonly HeadLine[], shape: TableShape) {
  const none: LogFinding[] = [];
  const isNumeric = columns.samples('quality').some((text) => /^\d+(\.0*)?$/.test(text));
  if (!isNumeric) return {classes: GGA_QUALITIES, findings: none};
  const comments = lines
    .map(({text}) => text)
    .filter((text) => isCommentText(text, shape.delimiter));
  const legend = qualityLegend(comments);
  const finding: LogFinding = {
    code: legend === undefined ? 'quality-as-gga' : 'quality-from-comment',
    severity: 'note',
    values: {column: columns.written('quality')},
  };
  return {classes: legend ?? GGA_QUALITIES, findings: [finding]};
}

function positionFindings(position: PositionColumns, columns: NamedColumns): LogFinding[] {
  if (position.kind === 'geocentric') return [];
  const {ellipsoidalHeight, altitude, separation} = position;
  if (ellipsoidalHeight !== null) {
    const column = ellipsoidalHeight.name;
    return columns.has('height')
      ? [{code: 'height-taken-as-ellipsoidal', severity: 'note', values: {column}}]
      : [];
  }
  if (altitude !== null && separation === null) {
    const values = {column: altitude.name};
    return [{code: 'altitude-without-separation', severity: 'caution', values}];
  }
  return [];
}

function sigmaFindings(sigmas: SigmaColumns | null): LogFinding[] {
  if (sigmas?.kind !== 'geocentric' || sigmas.xy !== null) return [];
  const values = {columns: [sigmas.x.name, sigmas.y.name, sigmas.z.name].join(', ')};
  return [{code: 'sigma-correlation-assumed-zero', severity: 'caution', values}];
}

function findingsOf(table: OpenTable, firstGpsSeconds: number): LogFinding[] {
  const findings = [...table.findings];
  const {zeroSigmas} = table.rows;
  if (zeroSigmas > 0) {
    findings.push({code: 'sigmas-zero', severity: 'note', values: {rows: zeroSigmas}});
  }
  const week = Math.floor(firstGpsSeconds / SECONDS_PER_WEEK);
  if (table.layout.time.kind === 'gps week' && week < WEEKS_PER_ROLLOVER) {
    findings.push({code: 'gps-week-below-1024', severity: 'caution', values: {week}});
  }
  return findings;
}

function isComment(
  bytes: Uint8Array,
  first: number,
  to: number,
  delimiter: Delimiter | null,
): boolean {
  const byte = bytes[first];
  if (byte === HASH || byte === PERCENT || byte === BANG) return true;
  if (byte === SLASH) return first + 1 < to && bytes[first + 1] === SLASH;
  return byte === SEMICOLON && delimiter !== 'semicolon';
}

/** Files that were put one behind the other repeat their header. */
function isHeaderAgain(table: OpenTable, text: () => string): boolean {
  return table.headerText !== undefined && text().trim() === table.headerText.trim();
}

function hasByteOrderMark(bytes: Uint8Array, from: number): boolean {
  return bytes[from] === 0xef && bytes[from + 1] === 0xbb && bytes[from + 2] === 0xbf;
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

function noSatellites(): Satellites {
  return {
    count: 0,
    gpsSeconds: new Float64Array(0),
    system: new Uint8Array(0),
    satelliteId: new Uint16Array(0),
    elevationDeg: new Float32Array(0),
    azimuthDeg: new Float32Array(0),
    carrierToNoiseDbHz: new Float32Array(0),
  };
}
