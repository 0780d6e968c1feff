import type {Mark} from '../fieldbook/mark.ts';
import {covarianceEnuFromEcef} from '../geodesy/covariance.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {geodeticFromEcef} from '../geodesy/geocentric.ts';
import {type LocalFrame, localFrame} from '../geodesy/local.ts';
import type {CovarianceM2} from './covariance.ts';
import {planOfGrid} from './grid-position.ts';

/** A known mark as the comparison needs it: plan, heights and covariance, each only if known. */
export interface MarkPlace {
  readonly name: string;
  readonly plan: {readonly latitudeDeg: number; readonly longitudeDeg: number} | null;
  readonly ellipsoidalHeightM: number | null;
  readonly orthometricHeightM: number | null;
  readonly covarianceM2: CovarianceM2 | null;
}

export function markPlace(mark: Mark, ellipsoid: Ellipsoid): MarkPlace {
  const {plan, ellipsoidalHeightM} = planAndHeight(mark, ellipsoid);
  const orthometricHeightM = mark.coordinates.orthometricHeightM ?? null;
  return {
    name: mark.name,
    plan,
    ellipsoidalHeightM: ellipsoidalHeightM ?? raised(orthometricHeightM, mark.separationM),
    orthometricHeightM,
    covarianceM2: covarianceOf(mark, plan, ellipsoid),
  };
}

/** The ellipsoidal height of a mark with a height above the geoid and its separation. */
function raised(orthometricHeightM: number | null, separationM: number | undefined): number | null {
  return orthometricHeightM === null || separationM === undefined
    ? null
    : orthometricHeightM + separationM;
}

function planAndHeight(
  {coordinates}: Mark,
  ellipsoid: Ellipsoid,
): Pick<MarkPlace, 'plan' | 'ellipsoidalHeightM'> {
  switch (coordinates.kind) {
    case 'geocentric': {
      const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = geodeticFromEcef(
        coordinates,
        ellipsoid,
      );
      return {plan: {latitudeDeg, longitudeDeg}, ellipsoidalHeightM};
    }
    case 'geodetic': {
      const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = coordinates;
      return {plan: {latitudeDeg, longitudeDeg}, ellipsoidalHeightM: ellipsoidalHeightM ?? null};
    }
    case 'grid': {
      const {projection, eastingM, northingM, ellipsoidalHeightM} = coordinates;
      const plan = planOfGrid(projection, eastingM, northingM);
      return {plan, ellipsoidalHeightM: ellipsoidalHeightM ?? null};
    }
    case 'height only':
      return {plan: null, ellipsoidalHeightM: coordinates.ellipsoidalHeightM ?? null};
  }
}

/**
 * Covariance of the mark in its own east, north, up. An axis without a stated uncertainty counts
 * as exact; null when none has one.
 */
function covarianceOf(
  {uncertainty}: Mark,
  plan: MarkPlace['plan'],
  ellipsoid: Ellipsoid,
): CovarianceM2 | null {
  if (uncertainty === undefined) return null;
  if (uncertainty.kind === 'standard') {
    const {eastM, northM, upM} = uncertainty;
    if (eastM === undefined && northM === undefined && upM === undefined) return null;
    return [
      [(eastM ?? 0) ** 2, 0, 0],
      [0, (northM ?? 0) ** 2, 0],
      [0, 0, (upM ?? 0) ** 2],
    ];
  }
  if (uncertainty.axes === 'enu' || plan === null) return uncertainty.covarianceM2;
  return covarianceEnuFromEcef(uncertainty.covarianceM2, frameAt(plan, ellipsoid));
}

/** The local frame of a plan position; its height does not turn the axes. */
export function frameAt(
  plan: {readonly latitudeDeg: number; readonly longitudeDeg: number},
  ellipsoid: Ellipsoid,
  ellipsoidalHeightM = 0,
): LocalFrame {
  return localFrame({...plan, ellipsoidalHeightM}, ellipsoid);
}
