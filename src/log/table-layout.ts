import type {FixClass} from '../epochs/epochs.ts';
import type {Delimiter} from './delimited.ts';

/** A column of numbers: its place in the row and its factor to SI (or degrees). */
export interface NumberColumn {
  readonly field: number;
  readonly name: string;
  readonly factor: number;
}

/** The columns that date a row. */
export type TimeColumns =
  | {readonly kind: 'date and time'; readonly field: number}
  | {readonly kind: 'date'; readonly field: number}
  | {readonly kind: 'date and clock'; readonly dateField: number; readonly clockField: number}
  | {readonly kind: 'date and seconds'; readonly dateField: number; readonly seconds: NumberColumn}
  | {readonly kind: 'calendar'; readonly parts: CalendarColumns}
  | {
      readonly kind: 'day of year';
      readonly year: NumberColumn;
      readonly day: NumberColumn;
      readonly seconds: NumberColumn | null;
      readonly clockField: number | null;
    }
  | {readonly kind: 'gps week'; readonly week: NumberColumn; readonly seconds: NumberColumn}
  | {
      readonly kind: 'gps seconds' | 'unix' | 'modified Julian date' | 'decimal year' | 'elapsed';
      readonly value: NumberColumn;
    }
  /** Time of day alone; the date of the first row comes from the options. */
  | {readonly kind: 'clock'; readonly field: number};

export interface CalendarColumns {
  readonly year: NumberColumn;
  readonly month: NumberColumn;
  readonly day: NumberColumn;
  readonly hour: NumberColumn | null;
  readonly minute: NumberColumn | null;
  readonly second: NumberColumn | null;
}

export type PositionColumns =
  | {
      readonly kind: 'geocentric';
      readonly x: NumberColumn;
      readonly y: NumberColumn;
      readonly z: NumberColumn;
    }
  | {
      readonly kind: 'geodetic';
      readonly latitude: NumberColumn;
      readonly longitude: NumberColumn;
      /** Whether both angles are stated to be degrees, minutes and seconds in one field. */
      readonly sexagesimal: boolean;
      readonly ellipsoidalHeight: NumberColumn | null;
      readonly altitude: NumberColumn | null;
      readonly separation: NumberColumn | null;
    };

/** The table's own standard deviations: per local axis, or as a geocentric covariance. */
export type SigmaColumns =
  | {
      readonly kind: 'local';
      readonly east: NumberColumn | null;
      readonly north: NumberColumn | null;
      readonly up: NumberColumn | null;
      /** Whether the columns hold variances. */
      readonly squared: boolean;
    }
  | {
      readonly kind: 'geocentric';
      readonly x: NumberColumn;
      readonly y: NumberColumn;
      readonly z: NumberColumn;
      readonly squared: boolean;
      readonly xy: NumberColumn | null;
      readonly xz: NumberColumn | null;
      readonly yz: NumberColumn | null;
      /** Whether xy, xz and yz are correlations between −1 and 1, not covariances. */
      readonly correlations: boolean;
    };

/** How the rows of one table are understood. */
export interface TableLayout {
  readonly delimiter: Delimiter;
  readonly decimalMark: number;
  readonly fields: number;
  readonly time: TimeColumns;
  readonly timeScale: 'utc' | 'gps';
  readonly position: PositionColumns;
  readonly sigmas: SigmaColumns | null;
  readonly qualityField: number | null;
  /** What numbers in the quality column mean. */
  readonly qualityClasses: ReadonlyMap<number, FixClass>;
  readonly satellites: NumberColumn | null;
  readonly hdop: NumberColumn | null;
  readonly pdop: NumberColumn | null;
  readonly vdop: NumberColumn | null;
  readonly correctionAge: NumberColumn | null;
  readonly stationId: NumberColumn | null;
}
