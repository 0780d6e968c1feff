import {covarianceEnuFromEcef} from '../geodesy/covariance.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {localFrame} from '../geodesy/local.ts';
import type {Geodetic, Matrix3} from '../geodesy/types.ts';

/** Diagonal and off-diagonal parts as a table gives them. */
export interface GivenCovariance {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly xy: number;
  readonly xz: number;
  readonly yz: number;
}

/** Standard deviations along east, north and up; undefined for a matrix that is no covariance. */
export function localSigmas(
  given: GivenCovariance,
  form: {readonly squared: boolean; readonly correlations: boolean},
  place: Geodetic,
  ellipsoid: Ellipsoid,
): {eastM: number; northM: number; upM: number} | undefined {
  const covariance = covarianceOf(given, form);
  if (covariance === undefined) return undefined;
  const frame = localFrame(
    {...place, ellipsoidalHeightM: place.ellipsoidalHeightM || 0},
    ellipsoid,
  );
  const [e, n, u] = covarianceEnuFromEcef(covariance, frame);
  // A rounded covariance may be a little indefinite; what has no root is left out.
  if (!(e[0] > 0 && n[1] > 0 && u[2] > 0)) return undefined;
  return {eastM: Math.sqrt(e[0]), northM: Math.sqrt(n[1]), upM: Math.sqrt(u[2])};
}

function covarianceOf(
  {x, y, z, xy, xz, yz}: GivenCovariance,
  {squared, correlations}: {readonly squared: boolean; readonly correlations: boolean},
): Matrix3 | undefined {
  if (!(x > 0 && y > 0 && z > 0)) return undefined;
  const sx = squared ? Math.sqrt(x) : x;
  const sy = squared ? Math.sqrt(y) : y;
  const sz = squared ? Math.sqrt(z) : z;
  const cxy = correlations ? xy * sx * sy : xy;
  const cxz = correlations ? xz * sx * sz : xz;
  const cyz = correlations ? yz * sy * sz : yz;
  const isPossible =
    Math.abs(cxy) <= sx * sy && Math.abs(cxz) <= sx * sz && Math.abs(cyz) <= sy * sz;
  if (!isPossible) return undefined;
  return [
    [sx * sx, cxy, cxz],
    [cxy, sy * sy, cyz],
    [cxz, cyz, sz * sz],
  ];
}
