import type {Epochs, Satellites} from '../epochs/epochs.ts';

/** Everything that reading one or several joined logs yields. */
export interface LogContents {
  readonly inputs: readonly InputLog[];
  readonly epochs: Epochs;
  readonly satellites: Satellites;
  readonly resolution: LogResolution;
  readonly findings: readonly LogFinding[];
  /**
   * The time scale in which the log gave its times. `gps` means that the leap-second table was used
   * to print UTC.
   */
  readonly timeScale: 'utc' | 'gps';
  /** The datum that DTM names when it is not W84 without offsets; positions are in that datum. */
  readonly datumStated: string | null;
}

export type LogKind = 'nmea' | 'table';

/** The account of one input: used + ignored + rejected = total. */
export interface InputLog {
  readonly name: string;
  readonly kind: LogKind;
  readonly bytes: number;
  readonly lines: {
    readonly total: number;
    readonly used: number;
    /** By sentence type (`GLL`, `!AIVDM`, `proprietary`), `blank`, `comment`, `header`. */
    readonly ignored: Readonly<Record<string, number>>;
    readonly rejected: Readonly<Record<string, number>>;
  };
  /** Examples of rejected lines, the first few of each reason. */
  readonly rejectedLines: readonly RejectedLine[];
  readonly betweenBytes: number;
  /** Counts by talker and type, such as `GNGGA`; for a table `rows`. */
  readonly sentences: Readonly<Record<string, number>>;
  readonly checksums: {readonly good: number; readonly bad: number; readonly absent: number};
  readonly lineEnds: Readonly<Record<'CRLF' | 'LF' | 'CR CR LF' | 'none', number>>;
  readonly firstGpsSeconds: number;
  readonly lastGpsSeconds: number;
}

export interface RejectedLine {
  readonly lineNumber: number;
  readonly reason: string;
  /** At most 80 characters, control characters replaced. */
  readonly excerpt: string;
}

/** Smallest steps that the digits of the log can express; NaN where unknown. */
export interface LogResolution {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly heightM: number;
  readonly separationM: number;
}

/** Something about the log that the user should know, as a code with values; worded elsewhere. */
export interface LogFinding {
  readonly code: string;
  readonly severity: 'concern' | 'caution' | 'note';
  readonly values: Readonly<Record<string, string | number | boolean | null>>;
}

export interface ReadOptions {
  /** Base name, for the account. */
  readonly name: string;
  /** Date of the first epoch, used when the log carries none. */
  readonly date: {readonly year: number; readonly month: number; readonly day: number} | null;
  /** Whether sentences without a checksum are believed. */
  readonly trustAbsentChecksum: boolean;
  /** Size of the log where it is known beforehand, so that its columns need not grow. */
  readonly sizeBytes?: number | undefined;
  readonly table: TableOptions;
}

export interface TableOptions {
  /** Names given by the user for the columns in their order; null: from the header. */
  readonly columns: readonly string[] | null;
  readonly timeScale: 'utc' | 'gps' | null;
  /** GPS seconds of the origin that "seconds since start" counts from. */
  readonly startGpsSeconds: number | null;
  readonly semiMajorAxisM: number;
  readonly inverseFlattening: number;
}

/**
 * A reader takes the bytes of one input in order, in chunks of any size, and ends with its contents.
 *
 * `finish` throws `InputError` only when nothing usable can be said about the input; a log without
 * a single position is a result with zero epochs.
 */
export interface LogReader {
  add(chunk: Uint8Array): void;
  finish(): LogContents;
}
