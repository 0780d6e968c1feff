import type {LocalFrame} from './local.ts';
import type {Matrix3} from './types.ts';

/** Rows: east, north and up in geocentric axes. Source: IOGP 373-7-2, method 9836. */
function rotationToEnu({sinLat, cosLat, sinLon, cosLon}: LocalFrame): Matrix3 {
  return [
    [-sinLon, cosLon, 0],
    [-sinLat * cosLon, -sinLat * sinLon, cosLat],
    [cosLat * cosLon, cosLat * sinLon, sinLat],
  ];
}

/** Covariance in east, north, up of one given in geocentric axes: R C Rᵀ. */
export function covarianceEnuFromEcef(covarianceM2: Matrix3, frame: LocalFrame): Matrix3 {
  return rotated(covarianceM2, rotationToEnu(frame));
}

/** Covariance in geocentric axes of one given in east, north, up: Rᵀ C R. */
export function covarianceEcefFromEnu(covarianceM2: Matrix3, frame: LocalFrame): Matrix3 {
  const [e, n, u] = rotationToEnu(frame);
  return rotated(covarianceM2, [
    [e[0], n[0], u[0]],
    [e[1], n[1], u[1]],
    [e[2], n[2], u[2]],
  ]);
}

/** R C Rᵀ; the two halves are made equal, because C is symmetric and stays so. */
function rotated(c: Matrix3, r: Matrix3): Matrix3 {
  const entry = (i: 0 | 1 | 2, j: 0 | 1 | 2): number => {
    let sum = 0;
    for (let k = 0; k < 3; k++) {
      for (let l = 0; l < 3; l++) sum += r[i][k]! * c[k]![l]! * r[j][l]!;
    }
    return sum;
  };
  const en = entry(0, 1);
  const eu = entry(0, 2);
  const nu = entry(1, 2);
  return [
    [entry(0, 0), en, eu],
    [en, entry(1, 1), nu],
    [eu, nu, entry(2, 2)],
  ];
}
