import type {Ellipsoid} from '../../geodesy/ellipsoid.ts';
import type {FrameAndEpoch} from '../../geodesy/frames.ts';
import type {PointMotion} from '../../geodesy/point-motion.ts';
import type {Projection} from '../../geodesy/projection.ts';
import type {Asked} from '../compare.ts';
import type {CovarianceM2} from '../covariance.ts';
import type {PerAxis} from '../result.ts';

/**
 * Everything that log, field sheet and marks file know about one check, as plain values.
 *
 * A fact that nobody gave is null (or an empty list): the hypotheses that need it are then listed
 * as not tested, never guessed.
 */
export interface DiagnosisInput {
  /** Measured minus reference at the mark, as `compareWithMark` has it; null: not compared. */
  readonly offsetM: PerAxis<number | null>;
  /** Of the offset: measured position with its budget plus the mark. Axes not compared: anything. */
  readonly covarianceM2: CovarianceM2;
  readonly asked: readonly Asked[];
  readonly ellipsoid: Ellipsoid;
  /** Plan of the mark as compared; null for a mark that has a height only. */
  readonly markPlan: PlanPlace | null;
  /** Ellipsoidal height near the mark, from the mark or else the measured one; null: not known. */
  readonly ellipsoidalHeightM: number | null;
  readonly antenna: AntennaFacts | null;
  readonly separation: SeparationFacts;
  /** Point laid off from the mark, as it was applied: `eccentricityOf` the sheet. */
  readonly offsetPoint: OffsetPoint | null;
  /** Bearing of magnetic north, clockwise from true north. */
  readonly declinationDeg: number | null;
  /** Of the mark or the sheet; null: the UTM zone of the place is tried. */
  readonly projection: Projection | null;
  readonly frames: FrameFacts;
  /** Step of the digits of the log on the ground. */
  readonly resolutionM: PerAxis<number | null>;
  /** Witness marks, and the other marks of the marks file. */
  readonly nearbyMarks: readonly NearbyMark[];
  /** Checks of other marks under the same base or service on the same day. */
  readonly otherMarkChecks: readonly OtherMarkCheck[];
  /** Other checks of this mark: other set-ups or sessions. */
  readonly sameMarkChecks: readonly SameMarkCheck[];
}

export interface PlanPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

export interface AntennaFacts {
  /** Antenna reference point above the mark as the readings give it. */
  readonly arpAboveMarkM: number | null;
  /** Height typed into the receiver. */
  readonly receiverHeightM: number | null;
  /** Who took the height off the positions, as far as log and sheet say. */
  readonly takenOffBy: 'stillmark' | 'receiver' | 'nobody' | 'not stated';
  /** First reading before the session, as it was written. */
  readonly reading: WrittenLength | null;
  /** Radius of the circle of the slant mark, and heights above the antenna reference point. */
  readonly plateRadiusM: number | null;
  readonly slantMarkAboveArpM: number | null;
  readonly phaseCentreAboveArpM: number | null;
  /** Reduced heights before and after the session, and which of them counts. */
  readonly openingM: number | null;
  readonly closingM: number | null;
  readonly heightUsed: 'opening' | 'mean' | 'interpolated' | null;
}

/** A length with the step of its last digit and the length of its unit: 1.532 m, 6.08 ft. */
export interface WrittenLength {
  readonly lengthM: number;
  readonly stepM: number;
  readonly unitM: number;
}

export interface SeparationFacts {
  /** Ellipsoidal minus orthometric height at the mark, one entry a source. */
  readonly known: readonly KnownSeparation[];
  /** The log has altitudes, but its separation field is empty. */
  readonly missingInLog: boolean;
}

export interface KnownSeparation {
  readonly source: 'log' | 'mark' | 'sheet' | 'geoid grid';
  readonly separationM: number;
}

export interface OffsetPoint {
  readonly eastM: number;
  readonly northM: number;
}

export interface FrameFacts {
  /** null: not stated; the comparison then took the frame of the other side. */
  readonly measured: FrameAndEpoch | null;
  readonly reference: FrameAndEpoch | null;
  /** Whether the measured position was transformed to the frame and epoch of the mark. */
  readonly transformed: boolean;
  /** Mean observing time as a decimal year. */
  readonly observedEpoch: number;
  /** How the mark moves, if anybody said so. */
  readonly motion: PointMotion | null;
}

/** Another mark or object that could have been taken for the mark, seen from the mark. */
export interface NearbyMark {
  readonly name: string;
  readonly position:
    | {readonly kind: 'offset'; readonly eastM: number; readonly northM: number}
    | {readonly kind: 'distance'; readonly distanceM: number};
  /** Height above the mark; null: not known. */
  readonly upM: number | null;
  /** Of each axis; null: 20 mm, the tape. */
  readonly standardUncertaintyM: number | null;
}

export interface OtherMarkCheck {
  readonly mark: string;
  readonly offsetM: PerAxis<number | null>;
  readonly covarianceM2: CovarianceM2;
  /** From that mark to this one; null: not known. */
  readonly fromItM: {readonly eastM: number; readonly northM: number} | null;
}

export interface SameMarkCheck {
  readonly offsetM: PerAxis<number | null>;
  readonly covarianceM2: CovarianceM2;
  /** Part of the covariance that both checks share: the mark, the base; null: nothing. */
  readonly sharedCovarianceM2: CovarianceM2 | null;
  /** Clockwise turn of tribrach or pole from this set-up to that one; null: not turned, or unknown. */
  readonly turnedDeg: number | null;
  /** From the middle of this session to the middle of that one. */
  readonly hoursLater: number | null;
}
