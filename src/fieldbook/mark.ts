import type {Matrix3} from '../geodesy/types.ts';

/** A point whose coordinates are known from elsewhere, as its data sheet states them. */
export interface Mark {
  readonly name: string;
  readonly otherNames: readonly string[];
  /** Line of the marks file on which the mark begins. */
  readonly lineNumber: number;
  readonly description: string | undefined;
  readonly coordinates: MarkCoordinates;
  /** Name of the frame as written, such as "ITRF2020" or "GDA2020"; never guessed. */
  readonly frame: string | undefined;
  /** Decimal year that the coordinates belong to. */
  readonly coordinateEpoch: number | undefined;
  /** Height system of the orthometric height, by name. */
  readonly verticalDatum: string | undefined;
  readonly geoidModel: string | undefined;
  /** Ellipsoidal minus orthometric height at the mark. */
  readonly separationM: number | undefined;
  readonly velocity: MarkVelocity | undefined;
  readonly uncertainty: MarkUncertainty | undefined;
  readonly tolerance: MarkTolerance | undefined;
  readonly witnessMarks: readonly WitnessMark[];
}

/** Heights stand beside every kind of plan; a mark may have plan only, or a height only. */
export type MarkCoordinates = (
  | GeocentricCoordinates
  | GeodeticCoordinates
  | GridCoordinates
  | HeightOnly
) & {
  readonly orthometricHeightM: number | undefined;
};

export interface GeocentricCoordinates {
  readonly kind: 'geocentric';
  readonly xM: number;
  readonly yM: number;
  readonly zM: number;
}

export interface GeodeticCoordinates {
  readonly kind: 'geodetic';
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly ellipsoidalHeightM: number | undefined;
}

export interface GridCoordinates {
  readonly kind: 'grid';
  /** The projection as written; what it may be is the business of geodesy. */
  readonly projection: string;
  readonly eastingM: number;
  readonly northingM: number;
  readonly ellipsoidalHeightM: number | undefined;
}

export interface HeightOnly {
  readonly kind: 'height only';
  readonly ellipsoidalHeightM: number | undefined;
}

export type MarkVelocity =
  | {
      readonly axes: 'enu';
      readonly eastMPerYear: number;
      readonly northMPerYear: number;
      readonly upMPerYear: number;
    }
  | {
      readonly axes: 'xyz';
      readonly xMPerYear: number;
      readonly yMPerYear: number;
      readonly zMPerYear: number;
    };

/** One standard uncertainty per axis (not 95 %), or a whole covariance matrix. */
export type MarkUncertainty =
  | {
      readonly kind: 'standard';
      readonly eastM: number | undefined;
      readonly northM: number | undefined;
      readonly upM: number | undefined;
    }
  | {
      readonly kind: 'covariance';
      readonly axes: 'enu' | 'xyz';
      readonly covarianceM2: Matrix3;
      /** False when only the three variances were given and the rest is taken as zero. */
      readonly correlationsKnown: boolean;
    };

/** What a check must hold, and who says so. */
export interface MarkTolerance {
  /** Radius. */
  readonly horizontalM: number | undefined;
  readonly eastM: number | undefined;
  readonly northM: number | undefined;
  readonly upM: number | undefined;
  readonly reason: string | undefined;
}

/** Another mark or object nearby that could be taken for the mark, seen from the mark. */
export interface WitnessMark {
  readonly name: string;
  readonly lineNumber: number;
  readonly position: WitnessPosition | undefined;
  readonly upM: number | undefined;
}

export type WitnessPosition =
  | {readonly kind: 'offset'; readonly eastM: number; readonly northM: number}
  | {
      readonly kind: 'distance and bearing';
      readonly distanceM: number;
      readonly bearingDeg: number;
      readonly bearingFrom: BearingFrom;
    }
  | {readonly kind: 'distance'; readonly distanceM: number};

export type BearingFrom = 'true north' | 'grid north' | 'magnetic north';
