import {probabilityInCircle} from '../statistics/accuracy-measures.ts';
import {NORMAL_95, normalWithin} from '../statistics/distribution.ts';
import {type CovarianceM2, covarianceSum, planeOf} from './covariance.ts';
import type {Comparison, Decision, FrameChange, PerAxis, Requirement} from './result.ts';

/** χ² with 2 degrees of freedom and normal, at 95 %. */
const CHI_SQUARE_2_AT_95 = 5.991464547107982;
/** Accept at or above this probability, reject at or below its complement: JCGM 106:2012, 8. */
const SURE = 0.95;

/** What is asked of an offset, before it is decided. */
export interface Asked {
  readonly of: Requirement['of'];
  readonly toleranceM: number;
  readonly reason: string | null;
}

export interface ComparisonInput {
  readonly mark: string;
  /** Measured minus reference, reduced to the mark; a component that cannot be compared is null. */
  readonly offsetM: PerAxis<number | null>;
  /** Of the measured position, budget included; null when the record cannot tell. */
  readonly covarianceM2: CovarianceM2 | null;
  /** Of the mark; null when nobody gave one, and it counts as exact. */
  readonly markCovarianceM2: CovarianceM2 | null;
  readonly asked: readonly Asked[];
  readonly assumptions: readonly string[];
  readonly frameChange: FrameChange | null;
}

/** The offset from a known mark, what it means against the tolerances, and whether both agree. */
export function compareWithMark(input: ComparisonInput): Comparison {
  const {offsetM, asked, mark, assumptions} = input;
  const {covarianceM2, markCovarianceM2} = input;
  const total = covarianceM2 === null ? null : covarianceSum(covarianceM2, markCovarianceM2);
  const horizontal = horizontalM(offsetM);
  const normalisedError = normalisedErrors(offsetM, total);
  return {
    mark,
    offsetM: {...offsetM, horizontal},
    azimuthDeg: azimuthDeg(offsetM),
    requirements: asked.map((one) => decided(one, offsetM, total)),
    normalisedError,
    agreement: agreement(normalisedError, input.markCovarianceM2),
    assumptions,
    frameChange: input.frameChange,
    otherSetups: [],
    candidates: [],
    diagnosis: null,
  };
}

/**
 * Whether a tolerance could be accepted at all with this uncertainty, the offset being zero. When
 * it could not, no measurement of this length decides it.
 */
export function couldPass(asked: Asked, covarianceM2: CovarianceM2): boolean {
  const probability = probabilityWithin(asked, {east: 0, north: 0, up: 0}, covarianceM2);
  return probability !== null && probability >= SURE;
}

function horizontalM({east, north}: PerAxis<number | null>): number | null {
  return east === null || north === null ? null : Math.hypot(east, north);
}

function azimuthDeg({east, north}: PerAxis<number | null>): number | null {
  if (east === null || north === null || (east === 0 && north === 0)) return null;
  const degrees = (Math.atan2(east, north) * 180) / Math.PI;
  return degrees < 0 ? degrees + 360 : degrees;
}

function decided(
  asked: Asked,
  offsetM: PerAxis<number | null>,
  covarianceM2: CovarianceM2 | null,
): Requirement {
  const probability =
    covarianceM2 === null ? null : probabilityWithin(asked, offsetM, covarianceM2);
  return {...asked, probabilityWithin: probability, decision: decision(probability)};
}

function decision(probability: number | null): Decision {
  if (probability === null) return 'cannot tell';
  if (probability >= SURE) return 'accept';
  return probability <= 1 - SURE ? 'reject' : 'cannot tell';
}

/** Probability that the true offset lies within the tolerance: JCGM 106:2012, 7. */
function probabilityWithin(
  {of, toleranceM}: Asked,
  offsetM: PerAxis<number | null>,
  covarianceM2: CovarianceM2,
): number | null {
  if (of === 'horizontal') {
    const {east, north} = offsetM;
    if (east === null || north === null) return null;
    return probabilityInCircle({
      radius: toleranceM,
      east,
      north,
      covariance: planeOf(covarianceM2),
    });
  }
  const axis = AXIS[of];
  const offset = offsetM[of];
  const varianceM2 = covarianceM2[axis]![axis]!;
  return offset === null || !Number.isFinite(varianceM2)
    ? null
    : normalWithin(toleranceM, offset, Math.sqrt(varianceM2));
}

const AXIS = {east: 0, north: 1, up: 2} as const;

/** Each axis and the plan in terms of its own 95 % uncertainty; null where that is not known. */
export function normalisedErrors(
  offsetM: PerAxis<number | null>,
  covarianceM2: CovarianceM2 | null,
): Comparison['normalisedError'] {
  const axis = (name: 'east' | 'north' | 'up') => {
    const offset = offsetM[name];
    const varianceM2 = covarianceM2?.[AXIS[name]]?.[AXIS[name]];
    return offset === null || varianceM2 === undefined || !(varianceM2 > 0)
      ? null
      : Math.abs(offset) / (NORMAL_95 * Math.sqrt(varianceM2));
  };
  return {
    east: axis('east'),
    north: axis('north'),
    up: axis('up'),
    horizontal: horizontalNormalisedError(offsetM, covarianceM2),
  };
}

/** √(dᵀ C⁻¹ d / χ²₂(95 %)): at most one when the offset lies within the joint 95 % ellipse. */
function horizontalNormalisedError(
  {east, north}: PerAxis<number | null>,
  covarianceM2: CovarianceM2 | null,
): number | null {
  if (east === null || north === null || covarianceM2 === null) return null;
  const {eastEast, eastNorth, northNorth} = planeOf(covarianceM2);
  const determinant = eastEast * northNorth - eastNorth * eastNorth;
  if (!(determinant > 0)) return null;
  const square =
    (northNorth * east * east - 2 * eastNorth * east * north + eastEast * north * north) /
    determinant;
  return Math.sqrt(square / CHI_SQUARE_2_AT_95);
}

function agreement(
  {horizontal, up}: Comparison['normalisedError'],
  markCovarianceM2: CovarianceM2 | null,
): Comparison['agreement'] {
  const tested = [horizontal, up].filter((error) => error !== null);
  if (markCovarianceM2 === null || tested.length === 0) return 'not tested';
  return tested.every((error) => error <= 1) ? 'agrees' : 'disagrees';
}
