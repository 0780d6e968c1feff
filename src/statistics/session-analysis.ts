import type {RequiredTime} from './required-time.ts';

/** One static record, screened: east, north and, where the record has a height, up. */
export interface SessionInput {
  /** n ascending times. */
  readonly elapsedS: Float64Array;
  /** Two or three columns of n finite values, in one unit. */
  readonly components: readonly Float64Array[];
  /** Distance between neighbouring values the log can express, per component; 0 if unknown. */
  readonly resolutions: readonly number[];
}

/** Why a statement is missing, or what it rests on. */
export type SessionLimit =
  | 'too-short'
  | 'few-cells'
  | 'mostly-gaps'
  | 'no-spread'
  | 'resolution-dominates'
  | 'slow-errors'
  | 'few-looks';

export interface ComponentAnalysis {
  readonly mean: number;
  /** Half-width of the 95 % interval by scatter and correlation; undefined: cannot be told. */
  readonly halfWidth95: number | undefined;
  /** What rounding can hide beyond that; 0 when the digits are fine. */
  readonly quantisation95: number;
  readonly independentLooks: number | undefined;
  readonly correlationTimeS: number | undefined;
  readonly drift: DriftAnalysis | undefined;
}

export interface DriftAnalysis {
  readonly perS: number;
  readonly halfWidth95PerS: number;
  readonly pValue: number;
  /** Smallest drift that would be claimed with a probability of 80 %. */
  readonly detectablePerS: number;
}

export interface StepAnalysis {
  readonly elapsedS: number;
  readonly interval95S: readonly [number, number];
  /** Per component; undefined where the component could not be tested. */
  readonly sizes: readonly (number | undefined)[];
  readonly standardErrors: readonly (number | undefined)[];
}

/** Settling toward a final value: what was still to come at the start, per component. */
export interface SettlingAnalysis {
  readonly timeConstantS: number;
  readonly sizes: readonly (number | undefined)[];
}

export type Movement = 'none' | 'step' | 'drift' | 'settling' | 'cannot tell';

export interface SessionAnalysis {
  readonly components: readonly ComponentAnalysis[];
  /** Correlation of the errors of the first two means. */
  readonly planCorrelation: number;
  readonly movement: Movement;
  readonly steps: readonly StepAnalysis[];
  /** Present when the record settles. */
  readonly settling: SettlingAnalysis | undefined;
  /** Codes with the components that they concern. */
  readonly limits: readonly {readonly code: SessionLimit; readonly components: readonly number[]}[];
  /**
   * Half-widths of the 95 % intervals, per component, of the same record with some of its steps
   * taken out, or its drift: what they would be had that movement not happened.
   */
  readonly halfWidthsWithout: (movement: TakenOut) => readonly (number | undefined)[];
  /** Largest probability that the noise is slower than the record. */
  readonly slowProbability: number;
  /** Half-width of 95 % of the mean of one component after a part of the record, for a chart. */
  readonly halfWidth95After: (component: number, timeS: number) => number | undefined;
  /**
   * How long the record would have to be for a half-width of one component; undefined when this
   * record cannot tell.
   */
  readonly requiredTime: (component: number, target: number) => RequiredTime | undefined;
}

/** Movement to be thought away: steps by their number, the drift, or the settling. */
export interface TakenOut {
  readonly steps: readonly number[];
  readonly drift?: boolean;
  readonly settling?: boolean;
}
