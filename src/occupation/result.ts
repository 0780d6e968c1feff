/**
 * The result document, `stillmark.result/1`: everything computed from one occupation, as plain
 * JSON-serialisable data.
 *
 * Lengths in metres, angles in degrees, covariances in m², times ISO 8601 UTC. `null` means "not
 * computed" and is explained by a notice whose `about` lists the path; nothing in it is ever
 * undefined, NaN, infinite or −0.
 */
export interface Result {
  readonly schema: 'stillmark.result/1';
  readonly program: {readonly name: 'stillmark'; readonly version: string};
  readonly command: 'reduce' | 'check';
  readonly inputs: readonly InputAccount[];
  readonly occupation: OccupationFacts;
  /** What the field sheet states, item by item in the sheet's order; null: not given. */
  readonly fieldSheet: readonly SheetItem[];
  /** What the marks file states of the mark, in the same way; empty without one. */
  readonly markRecord: readonly SheetItem[];
  readonly epochs: EpochAccount;
  readonly reference: Reference | null;
  readonly position: Position | null;
  readonly segments: readonly Segment[];
  readonly budget: readonly BudgetRow[];
  readonly scatter: {readonly aboutMean: Scatter; readonly aboutReference: Scatter} | null;
  readonly screening: Screening;
  readonly stability: Stability;
  readonly comparison: Comparison | null;
  /** `check` only; null for `reduce`. */
  readonly verdict: Verdict | null;
  readonly settings: Readonly<Record<string, Setting>>;
  readonly notices: readonly Notice[];
}

export type PerAxis<T = number> = {readonly east: T; readonly north: T; readonly up: T};
export type PerAxisXyz = {readonly x: number; readonly y: number; readonly z: number};
/** Covariance of east, north, up, row by row; null in the row and column of a height not known. */
export type Covariance3 = readonly (readonly (number | null)[])[];

/** What was read from one input: every line is used, ignored by type, or rejected for a reason. */
export interface InputAccount {
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly kind: 'nmea' | 'table';
  readonly lines: {
    readonly total: number;
    readonly used: number;
    readonly ignored: Readonly<Record<string, number>>;
    readonly rejected: Readonly<Record<string, number>>;
  };
  /** Bytes that belong to no line: binary between sentences. */
  readonly betweenBytes: number;
  readonly sentences: Readonly<Record<string, number>>;
  readonly firstUtc: string | null;
  readonly lastUtc: string | null;
}

export interface OccupationFacts {
  readonly mark: string | null;
  readonly setUpId: string | null;
  readonly startUtc: string | null;
  readonly endUtc: string | null;
  readonly antennaHeightM: number | null;
  readonly heightUsed: 'opening' | 'mean' | 'interpolated' | null;
}

export interface SheetItem {
  readonly section: string;
  readonly item: string;
  readonly value: string | null;
}

export interface EpochAccount {
  readonly read: number;
  readonly used: number;
  readonly screened: Readonly<Record<string, number>>;
  readonly firstUtc: string | null;
  readonly lastUtc: string | null;
  readonly intervalS: number | null;
  readonly gaps: readonly {
    readonly fromUtc: string;
    readonly toUtc: string;
    readonly durationS: number;
  }[];
  /** Distance between neighbouring values that the digits of the log can express. */
  readonly resolutionM: PerAxis<number | null>;
  /** Counts of all epochs read, by fix class. */
  readonly fixClasses: Readonly<Record<string, number>>;
}

/** The point that east, north and up are counted from. */
export interface Reference {
  readonly from: 'mark' | 'option' | 'mean';
  readonly name: string | null;
  readonly geodetic: GeodeticPosition;
  /** null when the reference has no ellipsoidal height. */
  readonly ecefM: PerAxisXyz | null;
}

export interface GeodeticPosition {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly ellipsoidalHeightM: number | null;
}

export interface GridPosition {
  readonly name: string;
  readonly eastingM: number;
  readonly northingM: number;
  readonly convergenceDeg: number;
  /** null for a grid whose scale depends on the direction. */
  readonly pointScale: number | null;
  readonly elevationFactor: number | null;
  readonly combinedFactor: number | null;
}

export type PointMeant =
  | 'mark'
  | 'antenna reference point'
  | 'phase centre'
  | 'antenna, point not stated';

export interface Position {
  readonly of: PointMeant;
  readonly frame: string | null;
  readonly frameFrom: 'sheet' | 'option' | 'assumed' | null;
  readonly coordinateEpoch: number | null;
  readonly observedUtc: string;
  readonly ecefM: PerAxisXyz | null;
  readonly geodetic: GeodeticPosition;
  readonly orthometricHeightM: number | null;
  /** Between both heights; null when no separation is known at the position. */
  readonly separation: Separation | null;
  readonly grid: GridPosition | null;
  readonly originEcefM: PerAxisXyz;
  readonly standardUncertaintyM: PerAxis<number | null> | null;
  readonly uncertainty95M:
    | (PerAxis<number | null> & {readonly horizontalRadius: number | null})
    | null;
  /** 95 % confidence ellipse of the horizontal position, budget included. */
  readonly ellipse95: Ellipse | null;
  readonly covarianceEnuM2: Covariance3 | null;
  readonly independentLooks: PerAxis<number | null> | null;
  readonly correlationTimeS: PerAxis<number | null> | null;
}

/** Ellipsoidal minus orthometric height, and the receiver's own for comparison. */
export interface Separation {
  readonly separationM: number;
  readonly from: 'geoid grid' | 'command line' | 'field sheet' | 'receiver';
  /** null: the receiver's own model, which logs do not name, or a number without one. */
  readonly model: string | null;
  /** As printed in the log; null: the log has none. */
  readonly receiverM: number | null;
}

export interface Ellipse {
  readonly semiMajorM: number;
  readonly semiMinorM: number;
  readonly azimuthDeg: number;
}

export interface Segment {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly epochs: number;
  readonly position: Position;
}

export type SharedBy = 'base' | 'service' | 'antenna' | 'frame' | 'geoid' | 'mark' | 'site' | null;

export interface BudgetRow {
  readonly source: string;
  /** null: a contribution that nobody gave, listed as "not included". */
  readonly standardUncertaintyM: PerAxis<number | null> | null;
  readonly sharedBy: SharedBy;
  readonly id: string | null;
  readonly from: string;
}

export interface Scatter {
  readonly observed: ScatterMeasures;
  readonly normalTheory: ScatterMeasures;
}

export interface ScatterMeasures {
  readonly standardDeviationM: PerAxis<number | null>;
  readonly drmsM: number | null;
  readonly cepM: number | null;
  readonly r95M: number | null;
  readonly ellipse: Ellipse | null;
}

/** The mean with and without screening, so that a mask that moves the answer is seen. */
export interface Screening {
  readonly fixClassKept: string | null;
  readonly withoutScreening: {
    readonly offsetFromResultM: PerAxis<number | null>;
    readonly epochs: number;
  } | null;
  /** Median of the receiver's (or table's) own standard deviations over the epochs used. */
  readonly receiverSigmaM: PerAxis<number | null> | null;
}

export type StabilityVerdict =
  | 'still'
  | 'drifting'
  | 'stepped'
  | 'settling'
  | 'travelling'
  | 'cannot tell';

export interface Drift {
  readonly rateMPerHour: number;
  readonly interval95MPerHour: readonly [number, number];
  /** Smallest rate that this record would have been claimed with 80 % probability. */
  readonly detectableMPerHour: number;
  readonly material: boolean;
}

export interface Step {
  readonly utc: string;
  readonly interval95Utc: readonly [string, string];
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number | null;
  readonly material: boolean;
  /** What the log shows at that moment, as codes: a fix-class change, a gap, … */
  readonly beside: readonly string[];
}

/** Settling toward a final value: what was still to come at the start. */
export interface SettlingFound {
  readonly timeConstantS: number;
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number | null;
  readonly material: boolean;
}

export interface Stability {
  readonly verdict: StabilityVerdict;
  readonly drift: PerAxis<Drift | null>;
  readonly steps: readonly Step[];
  /** null when no settling was found. */
  readonly settling: SettlingFound | null;
  readonly movementLimitM: {readonly horizontal: number | null; readonly up: number | null};
}

export type Decision = 'accept' | 'reject' | 'cannot tell';

export interface Requirement {
  readonly of: 'horizontal' | 'east' | 'north' | 'up';
  readonly toleranceM: number;
  readonly reason: string | null;
  readonly probabilityWithin: number | null;
  readonly decision: Decision;
}

export interface Candidate {
  readonly code: string;
  readonly title: string;
  readonly predictedM: PerAxis<number | null>;
  readonly misfit: number;
  readonly group: number;
  readonly advice: string;
}

/** One line of a transformation, so that a reader can redo it by hand. */
export interface FrameChangeStep {
  readonly what: string;
  readonly from: string;
  readonly to: string;
  readonly epoch: number;
  /** By name with unit: translations in mm, scale in parts per 1e9, rotations in milliarcseconds. */
  readonly parameters: Readonly<Record<string, number>>;
  /** The point after this step. */
  readonly ecefM: PerAxisXyz;
  readonly source: string;
}

/** How the measured position came into the frame and to the epoch of the mark. */
export interface FrameChange {
  readonly fromFrame: string;
  readonly fromEpoch: number | null;
  readonly toFrame: string;
  readonly toEpoch: number | null;
  /** Empty when both are the same. */
  readonly steps: readonly FrameChangeStep[];
  readonly ecefM: PerAxisXyz;
  /** Coordinates before minus after: the offset that comparing without these steps would show. */
  readonly mismatchM: PerAxis;
  readonly standardUncertaintyM: PerAxis;
}

/** What lies behind the candidates: what was asked, tested, and to be expected by accident. */
export interface DiagnosisFound {
  readonly asked: 'the offset is more than noise' | 'a tolerance is exceeded';
  /** One mistake in plan with one in height, where neither fits alone. */
  readonly pairs: readonly {
    readonly codes: readonly string[];
    readonly title: string;
    readonly predictedM: PerAxis<number | null>;
    readonly misfit: number;
  }[];
  /** How many predictions an offset of some other cause would match by accident. */
  readonly accidentalMatches: number;
  readonly accidentalWithinM: number;
  readonly accidentalOf: 'plan' | 'height' | 'plan and height' | null;
  readonly tested: readonly string[];
  readonly notTested: readonly {readonly code: string; readonly because: string}[];
}

/** Another occupation of the same mark: this one minus that one. */
export interface OtherSetup {
  /** File name of its result. */
  readonly name: string;
  readonly setUpId: string | null;
  readonly startUtc: string | null;
  readonly endUtc: string | null;
  /** From the middle of that record to the middle of this one. */
  readonly hoursEarlier: number;
  readonly differenceM: PerAxis<number | null> & {readonly horizontal: number | null};
  /** Of the difference, without what both share. */
  readonly uncertainty95M:
    | (PerAxis<number | null> & {readonly horizontalRadius: number | null})
    | null;
  readonly normalisedError: PerAxis<number | null> & {readonly horizontal: number | null};
  readonly agreement: 'agrees' | 'disagrees' | 'not tested';
  /** Rows of the budget that both share, so that they fall out of the difference. */
  readonly cancels: readonly string[];
}

export interface Comparison {
  readonly mark: string;
  readonly offsetM: PerAxis<number | null> & {readonly horizontal: number | null};
  readonly azimuthDeg: number | null;
  readonly requirements: readonly Requirement[];
  readonly normalisedError: PerAxis<number | null> & {readonly horizontal: number | null};
  readonly agreement: 'agrees' | 'disagrees' | 'not tested';
  readonly assumptions: readonly string[];
  /** null when a frame or epoch was not stated, so that nothing could be transformed. */
  readonly frameChange: FrameChange | null;
  /** Other occupations of the mark that were named, each set beside this one. */
  readonly otherSetups: readonly OtherSetup[];
  readonly candidates: readonly Candidate[];
  /** null when there is nothing to explain. */
  readonly diagnosis: DiagnosisFound | null;
}

export type Verdict = 'holds' | 'off' | 'moving' | 'cannot tell';

export interface Setting {
  readonly value: string | number | boolean | null;
  readonly from: 'command line' | 'field sheet' | 'default';
}

/** `absent` only says why a value is null: for readers of the document, not for a summary. */
export type Severity = 'concern' | 'caution' | 'note' | 'absent';

export interface Notice {
  readonly code: string;
  readonly severity: Severity;
  /** Paths into this document that the notice explains, such as `position.uncertainty95M`. */
  readonly about: readonly string[];
  readonly values: Readonly<Record<string, string | number | boolean | null>>;
  readonly text: string;
}
