/**
 * What the sentences of one batch of bytes say, as columns per kind of sentence: `count` rows, NaN
 * where a field is empty. Every row is decoded from its own line alone.
 *
 * A decoder fills the same arrays again and again. In memory that threads share, one thread fills
 * them and another reads them; the counts travel apart from them.
 */
interface Columns {
  count: number;
}

/** Positions of GGA and GNS, those without a position included. */
export interface FixColumns extends Columns {
  readonly timeOfDayS: Float64Array;
  readonly latitudeDeg: Float64Array;
  readonly longitudeDeg: Float64Array;
  readonly altitudeM: Float64Array;
  readonly separationM: Float64Array;
  readonly hdop: Float64Array;
  readonly correctionAgeS: Float64Array;
  /** 65535 when not given. */
  readonly stationId: Uint16Array;
  readonly fixClass: Uint8Array;
  /** 255 when not given. */
  readonly satellites: Uint8Array;
  /** The two letters, the first in the high byte. */
  readonly talker: Uint16Array;
  readonly lineFeedsBefore: Uint32Array;
}

/** Date and validity of RMC; its position only in batches where no GGA or GNS has one. */
export interface RmcColumns extends Columns {
  readonly timeOfDayS: Float64Array;
  readonly latitudeDeg: Float64Array;
  readonly longitudeDeg: Float64Array;
  /** Days since 1970-01-01, `NO_DATE` when absent. */
  readonly dateDays: Int32Array;
  /** A `SentenceStatus` value. */
  readonly status: Uint8Array;
  /** Class by the mode indicator; `FixClass.unknown` when the sentence has none. */
  readonly fixClass: Uint8Array;
  readonly talker: Uint16Array;
  readonly lineFeedsBefore: Uint32Array;
}

/** Positions of GLL, filled only in batches where no GGA or GNS has one. */
export interface GllColumns extends Columns {
  readonly timeOfDayS: Float64Array;
  readonly latitudeDeg: Float64Array;
  readonly longitudeDeg: Float64Array;
  readonly status: Uint8Array;
  readonly fixClass: Uint8Array;
  readonly lineFeedsBefore: Uint32Array;
}

export interface GstColumns extends Columns {
  readonly timeOfDayS: Float64Array;
  readonly sigmaLatitudeM: Float64Array;
  readonly sigmaLongitudeM: Float64Array;
  readonly sigmaAltitudeM: Float64Array;
}

export interface ZdaColumns extends Columns {
  readonly timeOfDayS: Float64Array;
  readonly dateDays: Int32Array;
}

export interface GsaColumns extends Columns {
  readonly pdop: Float64Array;
  readonly hdop: Float64Array;
  readonly vdop: Float64Array;
  /** How many elements of `SatelliteIdColumn` belong to the row. */
  readonly ids: Uint8Array;
}

/** The satellites of all GSA rows in their order, as system × 1024 + number. */
export interface SatelliteIdColumn extends Columns {
  readonly id: Uint16Array;
}

/** GSV sentences that the assembler may need, each from `$` to `*` in `GsvTextColumn`. */
export interface GsvColumns extends Columns {
  readonly bytes: Uint16Array;
  readonly lineFeedsBefore: Uint32Array;
}

export interface GsvTextColumn extends Columns {
  readonly byte: Uint8Array;
}

/** Kinds in the order of their sentences; each kind's rows are in the same order. */
export interface KindColumn extends Columns {
  readonly kind: Uint8Array;
}

/** What a sentence is to the reader, by its type. */
export const SentenceKind = {
  /** Verified and counted only. */
  ignored: 0,
  // Decoded at once.
  gga: 1,
  gns: 2,
  rmc: 3,
  gst: 4,
  gsa: 5,
  zda: 6,
  // Looked at only if needed.
  gsv: 7,
  gll: 8,
  dtm: 9,
  proprietary: 10,
} as const;
export type SentenceKind = (typeof SentenceKind)[keyof typeof SentenceKind];
export const SENTENCE_KINDS = 11;

/** Most decimals seen: of the minutes of angles and of heights in metres; −1 when none. */
export interface PrintedDecimals {
  latitude: number;
  longitude: number;
  altitude: number;
  separation: number;
}

export interface SentenceColumns {
  readonly order: KindColumn;
  readonly fixes: FixColumns;
  readonly rmc: RmcColumns;
  readonly gll: GllColumns;
  readonly gst: GstColumns;
  readonly zda: ZdaColumns;
  readonly gsa: GsaColumns;
  readonly gsaIds: SatelliteIdColumn;
  readonly gsv: GsvColumns;
  readonly gsvText: GsvTextColumn;
  /** By source of the position: heights and angles of GGA and GNS, angles of RMC, of GLL. */
  readonly decimals: {
    readonly fixes: PrintedDecimals;
    readonly rmc: PrintedDecimals;
    readonly gll: PrintedDecimals;
  };
}

/** The shortest sentence that is decoded: `$XXGGA*hh`. */
const SHORTEST_SENTENCE_BYTES = 9;

/** Rows that suffice for a batch of so many bytes, one spare row for the sentence in work. */
export function mostSentences(batchBytes: number): number {
  return Math.ceil(batchBytes / SHORTEST_SENTENCE_BYTES) + 1;
}

/**
 * Columns that hold whatever a batch of so many bytes can say.
 *
 * They are sized for the worst case; memory that is never written is not resident.
 */
export function createSentenceColumns(
  batchBytes: number,
  Memory: ArrayBufferConstructor | SharedArrayBufferConstructor = ArrayBuffer,
): SentenceColumns {
  const rows = mostSentences(batchBytes);
  const f64 = () => new Float64Array(new Memory(8 * rows));
  const i32 = () => new Int32Array(new Memory(4 * rows));
  const u32 = () => new Uint32Array(new Memory(4 * rows));
  const u16 = (count = rows) => new Uint16Array(new Memory(2 * count));
  const u8 = (count = rows) => new Uint8Array(new Memory(count));
  return {
    order: {count: 0, kind: u8()},
    fixes: {
      count: 0,
      timeOfDayS: f64(),
      latitudeDeg: f64(),
      longitudeDeg: f64(),
      altitudeM: f64(),
      separationM: f64(),
      hdop: f64(),
      correctionAgeS: f64(),
      stationId: u16(),
      fixClass: u8(),
      satellites: u8(),
      talker: u16(),
      lineFeedsBefore: u32(),
    },
    rmc: {
      count: 0,
      timeOfDayS: f64(),
      latitudeDeg: f64(),
      longitudeDeg: f64(),
      dateDays: i32(),
      status: u8(),
      fixClass: u8(),
      talker: u16(),
      lineFeedsBefore: u32(),
    },
    gll: {
      count: 0,
      timeOfDayS: f64(),
      latitudeDeg: f64(),
      longitudeDeg: f64(),
      status: u8(),
      fixClass: u8(),
      lineFeedsBefore: u32(),
    },
    gst: {
      count: 0,
      timeOfDayS: f64(),
      sigmaLatitudeM: f64(),
      sigmaLongitudeM: f64(),
      sigmaAltitudeM: f64(),
    },
    zda: {count: 0, timeOfDayS: f64(), dateDays: i32()},
    gsa: {count: 0, pdop: f64(), hdop: f64(), vdop: f64(), ids: u8()},
    gsaIds: {count: 0, id: u16(batchBytes)},
    gsv: {count: 0, bytes: u16(), lineFeedsBefore: u32()},
    gsvText: {count: 0, byte: u8(batchBytes)},
    decimals: {fixes: noDecimals(), rmc: noDecimals(), gll: noDecimals()},
  };
}

/** How many rows each part has, in the order of `PARTS`, and the decimals: all but the arrays. */
export interface ColumnCounts {
  readonly counts: readonly number[];
  readonly decimals: SentenceColumns['decimals'];
}

const PARTS = [
  'order',
  'fixes',
  'rmc',
  'gll',
  'gst',
  'zda',
  'gsa',
  'gsaIds',
  'gsv',
  'gsvText',
] as const;

/** What a thread has to be told, beside the memory it shares, to read the columns. */
export function countsOf(columns: SentenceColumns): ColumnCounts {
  return {counts: PARTS.map((part) => columns[part].count), decimals: columns.decimals};
}

/** Columns whose arrays another thread has filled, with the counts that it told. */
export function takeCounts(columns: SentenceColumns, {counts, decimals}: ColumnCounts): void {
  for (const [i, part] of PARTS.entries()) columns[part].count = counts[i] ?? 0;
  for (const source of ['fixes', 'rmc', 'gll'] as const) {
    Object.assign(columns.decimals[source], decimals[source]);
  }
}

export function noDecimals(): PrintedDecimals {
  return {latitude: -1, longitude: -1, altitude: -1, separation: -1};
}

export function clearSentenceColumns(columns: SentenceColumns): void {
  for (const part of PARTS) columns[part].count = 0;
  for (const decimals of [columns.decimals.fixes, columns.decimals.rmc, columns.decimals.gll]) {
    Object.assign(decimals, noDecimals());
  }
}
