import type {Epochs} from './epochs.ts';

/** Epochs per block: a block is 5.4 MB, and joining the blocks copies each column once. */
const BLOCK_EPOCHS = 65_536;
/** The first block is small, as most logs are short, unless it is known how many may come. */
const FIRST_BLOCK_EPOCHS = 4096;
/** Epochs prepared at a time: memory that is never reached is never touched. */
const PREPARED_EPOCHS = 4096;

/** One array per column of `Epochs`, all of the same length. */
export type EpochColumns = Omit<Epochs, 'count'>;
type ColumnName = keyof EpochColumns;
type Column = EpochColumns[ColumnName];

/** How each column is made, and what stands in it where nothing was given. */
const COLUMNS: {readonly [Name in ColumnName]: ColumnKind<EpochColumns[Name]>} = {
  gpsSeconds: {create: (n) => new Float64Array(n), absent: Number.NaN},
  latitudeDeg: {create: (n) => new Float64Array(n), absent: Number.NaN},
  longitudeDeg: {create: (n) => new Float64Array(n), absent: Number.NaN},
  ellipsoidalHeightM: {create: (n) => new Float64Array(n), absent: Number.NaN},
  altitudeM: {create: (n) => new Float64Array(n), absent: Number.NaN},
  separationM: {create: (n) => new Float32Array(n), absent: Number.NaN},
  fixClass: {create: (n) => new Uint8Array(n), absent: 0},
  satellites: {create: (n) => new Uint8Array(n), absent: 255},
  hdop: {create: (n) => new Float32Array(n), absent: Number.NaN},
  pdop: {create: (n) => new Float32Array(n), absent: Number.NaN},
  vdop: {create: (n) => new Float32Array(n), absent: Number.NaN},
  correctionAgeS: {create: (n) => new Float32Array(n), absent: Number.NaN},
  stationId: {create: (n) => new Uint16Array(n), absent: 65_535},
  sigmaEastM: {create: (n) => new Float32Array(n), absent: Number.NaN},
  sigmaNorthM: {create: (n) => new Float32Array(n), absent: Number.NaN},
  sigmaUpM: {create: (n) => new Float32Array(n), absent: Number.NaN},
  flags: {create: (n) => new Uint16Array(n), absent: 0},
  inputIndex: {create: (n) => new Uint8Array(n), absent: 0},
  lineNumber: {create: (n) => new Uint32Array(n), absent: 0},
};

interface ColumnKind<T> {
  readonly create: (length: number) => T;
  readonly absent: number;
}

const COLUMN_NAMES = Object.keys(COLUMNS) as ColumnName[];

/** Before the first epoch nothing is allocated: most builders of a reader stay empty. */
const NO_BLOCK: EpochColumns = createBlock(0);

/**
 * Columns that grow by one epoch at a time, in blocks that are joined once at the end.
 *
 * `add` makes room for an epoch of which nothing is known and returns its row in `block`, where
 * the caller writes what the log gives. Memory: 83 bytes per epoch; while joining, one column more.
 * A builder that was told how many epochs may come takes them in one block, which is not joined and
 * costs nothing for what does not come.
 */
export class EpochsBuilder {
  #blocks: Block[] = [];
  #block: EpochColumns = NO_BLOCK;
  #row = 0;
  #rows = 0;
  #prepared = 0;
  #countBefore = 0;
  readonly #firstBlockEpochs: number;

  /** @param mostEpochs how many may come, if that is known; more are no error */
  constructor(mostEpochs = FIRST_BLOCK_EPOCHS) {
    this.#firstBlockEpochs = Math.max(mostEpochs, FIRST_BLOCK_EPOCHS);
  }

  get count(): number {
    return this.#countBefore + this.#row;
  }

  /** The columns being filled, from the first `add` on; other ones when those are full. */
  get block(): EpochColumns {
    return this.#block;
  }

  add(): number {
    if (this.#row === this.#rows) {
      this.#countBefore += this.#rows;
      this.#rows = this.#rows === 0 ? this.#firstBlockEpochs : BLOCK_EPOCHS;
      this.#row = 0;
      this.#prepared = 0;
      this.#block = createBlock(this.#rows);
      this.#blocks.push({from: this.#countBefore, columns: {...this.#block}});
    }
    const row = this.#row;
    if (row === this.#prepared) {
      this.#prepared = Math.min(this.#rows, row + PREPARED_EPOCHS);
      fillAbsent(this.#block, row, this.#prepared);
    }
    this.#row += 1;
    return row;
  }

  /** The epochs added so far, in the order of adding; the builder is empty afterwards. */
  finish(): Epochs {
    const {count} = this;
    const blocks = this.#blocks;
    this.#blocks = [];
    this.#block = NO_BLOCK;
    this.#row = 0;
    this.#rows = 0;
    this.#prepared = 0;
    this.#countBefore = 0;
    return sharingAbsent({count, ...mapColumns((name) => joined(name, blocks, count))});
  }
}

/**
 * The epochs of the given rows, in the order given; a row may occur more than once.
 *
 * @param rows indexes below `epochs.count`
 */
export function takeEpochs(epochs: Epochs, rows: Uint32Array): Epochs {
  return {
    count: rows.length,
    ...mapColumns((name) => {
      const from = epochs[name];
      const to = COLUMNS[name].create(rows.length);
      for (let k = 0; k < rows.length; k += 1) to[k] = from[rows[k]!]!;
      return to;
    }),
  };
}

/** One after the other, in the order given. */
export function concatEpochs(parts: readonly Epochs[]): Epochs {
  const count = parts.reduce((sum, part) => sum + part.count, 0);
  return {
    count,
    ...mapColumns((name) => {
      const to = COLUMNS[name].create(count);
      let at = 0;
      for (const part of parts) {
        to.set(part[name], at);
        at += part.count;
      }
      return to;
    }),
  };
}

function createBlock(length: number): EpochColumns {
  return mapColumns((name) => COLUMNS[name].create(length));
}

/** Writes "not given" into rows of which nothing is known yet. */
function fillAbsent(block: EpochColumns, from: number, to: number): void {
  for (const name of COLUMN_NAMES) {
    const {absent} = COLUMNS[name];
    if (absent !== 0) block[name].fill(absent, from, to);
  }
}

/** A part of the columns, which goes when they have been joined. */
interface Block {
  readonly from: number;
  readonly columns: {-readonly [Name in ColumnName]?: EpochColumns[Name]};
}

/** Joins one column and lets go of its parts, so that only one column exists twice at a time. */
function joined(name: ColumnName, blocks: readonly Block[], count: number): Column {
  const [only, second] = blocks;
  const whole = only?.columns[name];
  if (second === undefined && whole !== undefined) return whole.subarray(0, count);
  const to = COLUMNS[name].create(count);
  for (const {from, columns} of blocks) {
    const part = columns[name];
    if (part === undefined) continue;
    to.set(part.subarray(0, Math.min(part.length, count - from)), from);
    delete columns[name];
  }
  return to;
}

/** All columns of which nothing was given become one: most logs leave several empty. */
function sharingAbsent(epochs: Epochs): Epochs {
  const absent = COLUMN_NAMES.filter((name) => isAbsent(epochs[name]));
  const [first] = absent;
  if (first === undefined) return epochs;
  return {...epochs, ...Object.fromEntries(absent.map((name) => [name, epochs[first]]))};
}

/** Columns of other types are small. */
function isAbsent(column: Column): boolean {
  if (!(column instanceof Float32Array)) return false;
  let at = 0;
  while (at < column.length && Number.isNaN(column[at]!)) at++;
  return at === column.length;
}

function mapColumns(make: (name: ColumnName) => Column): EpochColumns {
  const entries = COLUMN_NAMES.map((name) => [name, make(name)] as const);
  return Object.fromEntries(entries) as unknown as EpochColumns;
}
