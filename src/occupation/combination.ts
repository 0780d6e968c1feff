import type {CovarianceM2} from './covariance.ts';
import type {Notice, PerAxis, PerAxisXyz, Position} from './result.ts';

/**
 * The combination document, `stillmark.combination/1`: several occupations as one position per
 * mark. Units and conventions are those of the result document.
 */
export interface Combination {
  readonly schema: 'stillmark.combination/1';
  readonly program: {readonly name: 'stillmark'; readonly version: string};
  /** In the order of their names. */
  readonly marks: readonly CombinedMark[];
  /** Between each two marks, in the order of `marks`. */
  readonly distances: readonly MarkDistance[];
  /** Results that could not take part. */
  readonly leftOut: readonly {readonly name: string; readonly because: string}[];
  readonly notices: readonly Notice[];
}

export interface CombinedMark {
  readonly name: string;
  readonly of: Position['of'];
  readonly frame: string | null;
  readonly coordinateEpoch: number | null;
  readonly geodetic: {
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly ellipsoidalHeightM: number;
  };
  readonly ecefM: PerAxisXyz;
  readonly standardUncertaintyM: PerAxis;
  readonly uncertainty95M: PerAxis & {readonly horizontalRadius: number};
  /** East, north and up. */
  readonly covarianceEnuM2: CovarianceM2;
  /** Whether the occupations agree within their own uncertainties; one alone is not tested. */
  readonly agreement: 'agrees' | 'disagrees' | 'not tested';
  /** Probability of so much disagreement by accident, in plan and in height; null: not tested. */
  readonly accident: {readonly plan: number | null; readonly up: number | null};
  /** Factor on what the occupations do not share, where they disagree; 1 where they agree. */
  readonly enlargedBy: {readonly plan: number; readonly up: number};
  /** Contributions that all occupations share: no repetition makes them smaller or shows them. */
  readonly shared: readonly string[];
  readonly occupations: readonly CombinedOccupation[];
}

export interface CombinedOccupation {
  readonly name: string;
  readonly setUpId: string | null;
  readonly startUtc: string;
  readonly endUtc: string;
  readonly epochs: number;
  /** This occupation minus the combination. */
  readonly differenceM: PerAxis & {readonly horizontal: number};
  readonly weight: PerAxis;
  /** Difference from the others over its 95 % uncertainty; null for one alone. */
  readonly normalisedError: PerAxis<number | null>;
}

/** From one mark to another, in the local horizon of the first. */
export interface MarkDistance {
  readonly from: string;
  readonly to: string;
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
  /** Ellipsoidal heights, second minus first: not `upM`, from which the Earth curves away. */
  readonly heightDifferenceM: number;
  /** Along the straight line through space. */
  readonly spatialM: number;
  readonly azimuthDeg: number;
  readonly uncertainty95M: {readonly spatial: number; readonly height: number};
  /** Contributions that both share and that fall out of the difference. */
  readonly cancels: readonly string[];
}
