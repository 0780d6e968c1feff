import {EpochsBuilder} from '../epochs/builder.ts';
import type {Satellites} from '../epochs/epochs.ts';
import {flagOutOfOrder, flagRepeatedAndFrozen, inTimeOrder} from '../epochs/time-order.ts';
import {InputError} from '../errors.ts';
import {BANG, HASH} from './bytes.ts';
import type {LogContents, LogReader, ReadOptions} from './contents.ts';
import {type Delimiter, isBlank, textOf} from './delimited.ts';
import {LineCutter} from './delimited-lines.ts';
import {TableAccount} from './table-account.ts';
import {tableFindings} from './table-findings.ts';
import {type KeptLine, type OpenTable, openTable} from './table-open.ts';

/** Rows read before the columns are decided on, and bytes if rows are slow to come. */
const HEAD_ROWS = 200;
const HEAD_BYTES = 1 << 20;
const PERCENT = 0x25;
const SLASH = 0x2f;
const SEMICOLON = 0x3b;
/** Share of impossible positions above which a column, not a row, must be wrong. */
const MOST_IMPLAUSIBLE = 0.01;

/**
 * Reads a table of positions: one row per epoch, columns named by a header or by the options.
 *
 * The first rows decide on delimiter, decimal mark and columns; from then on rows are decoded in
 * place. Errors are thrown by `finish`, so that they do not depend on how the bytes were cut.
 */
export function createTableReader(options: ReadOptions): LogReader {
  return new TableReader(options);
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
    const read = this.#builder.finish();
    const timeBack = flagOutOfOrder(read);
    const epochs = inTimeOrder(read);
    const order = {timeBack, sameness: flagRepeatedAndFrozen(epochs)};
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
      findings: table === undefined ? [] : tableFindings(table, epochs, order, this.#options),
      timeScale: table?.layout.timeScale ?? 'utc',
      datumStated: null,
    };
  }
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
