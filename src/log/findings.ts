import type {LogFinding} from './contents.ts';

/**
 * What a reader may find, by code, with the values that tell how much of it. Seconds are those of
 * the GPS scale; positions and heights are in metres; texts are as printed in the log.
 */
export interface FindingValues {
  // Dates.
  /** No sentence has a date and none was given: times stand on a placeholder day. */
  'no-date': {placeholderDate: string};
  /** No sentence has a date; the one that was given is used. */
  'date-assumed': {date: string};
  /** The log has a date of its own, which beats the one that was given. */
  'date-overridden': {logDate: string; givenDate: string};
  /** Dates that contradict those around them and were not believed. */
  'date-conflict': {dates: number};
  /** Only sentences without a valid position have dates. */
  'date-doubtful': {date: string};
  /** The date lies so far back that it may be a week count that has run over. */
  'rollover-suspected': {date: string; dateAfterRollover: string; because: string};
  /** 23:59:60 occurs; `known` tells whether the list of leap seconds has it on that day. */
  'leap-second-seen': {times: number; known: boolean};
  // Order and repetition.
  'time-back': {times: number; largestS: number; firstLineNumber: number};
  /** Epochs at the time of the epoch before them. */
  'repeated-epochs': {epochs: number};
  /** Epochs that repeat the position before them exactly; the longest stretch of them. */
  'frozen-run': {epochs: number; longestEpochs: number; longestS: number};
  /** Epochs that several talkers gave, of which one position each was kept. */
  'two-talkers': {epochs: number; talkers: string};
  /** Two steps of time are both common. */
  'mixed-rates': {commonS: number; commonShare: number; otherS: number; otherShare: number};
  // Positions and heights.
  /** GGA and GNS sentences without a position. */
  'no-position': {sentences: number};
  /** Positions of exactly 0° 0°, not believed. */
  'zero-position': {sentences: number};
  /** Epochs without any height, whichever sentence they come from. */
  'height-absent': {epochs: number; ofEpochs: number};
  /** Epochs with an altitude and without the separation that makes it an ellipsoidal height. */
  'separation-absent': {epochs: number; ofEpochs: number};
  'separation-changes': {smallestM: number; largestM: number; changes: number};
  /** Positions come from RMC or GLL alone and have no height. */
  'plan-only': {source: 'RMC' | 'GLL'; epochs: number};
  /** Counts of twelve that may stand for more. */
  'satellites-at-least': {epochs: number};
  /** The steps between the positions that the digits can express, at that latitude. */
  'resolution-coarse': {northM: number; eastM: number; upM: number | null};
  /** DTM names another datum than WGS 84, or offsets. */
  'datum-not-wgs84': {datum: string};
  /** DTM names several datums in one log. */
  'datum-changes': {datums: string};
  // Tables: names of columns as they stand in the table or were given, parted by commas.
  'table-columns': {used: string; unused: string};
  /** Rows are dated by the day alone and stand at its midnight. */
  'date-without-time': {column: string};
  /** Nobody says on which scale the times are. */
  'time-scale-assumed': {timeScale: 'utc'; columns: string};
  /** A week below 1024 may be counted modulo 1024. */
  'gps-week-below-1024': {week: number};
  /** A column named as a height, and no more. */
  'height-taken-as-ellipsoidal': {column: string};
  'altitude-without-separation': {column: string};
  /** Numbers in the quality column were read as those of GGA, or as a comment explains them. */
  'quality-as-gga': {column: string};
  'quality-from-comment': {column: string};
  /** Sigmas of X, Y and Z without their correlations. */
  'sigma-correlation-assumed-zero': {columns: string};
  'sigmas-zero': {rows: number};
  // Lines.
  'checksum-absent': {lines: number; trusted: boolean};
  'bad-checksums': {lines: number; ofLines: number};
  'last-line-cut': Record<string, never>;
  'binary-between': {bytes: number};
  // Several logs.
  /** Epochs of a later log at times that an earlier one has already. */
  'logs-overlap': {epochs: number};
  'datums-differ': {datums: string};
  /** Largest and smallest step of latitude in degrees. */
  'resolutions-differ': {coarsestDeg: number; finestDeg: number};
}

export function finding<Code extends keyof FindingValues>(
  code: Code,
  severity: LogFinding['severity'],
  values: FindingValues[Code],
): LogFinding {
  return {code, severity, values: {...values}};
}
