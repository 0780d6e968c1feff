import {DEGREES_PER_RADIAN, RADIANS_PER_DEGREE} from './angle.ts';
import type {Ellipsoid} from './ellipsoid.ts';
import type {Ecef, Geodetic} from './types.ts';

/**
 * Geocentric coordinates of a geodetic position.
 *
 * Accuracy: 1e-8 m up to heights of 40,000 km, against 80-digit values.
 * Source: IOGP Publication 373-7-2, method 9602 (geographic/geocentric conversions).
 */
export function ecefFromGeodetic(position: Geodetic, ellipsoid: Ellipsoid): Ecef {
  const latRad = position.latitudeDeg * RADIANS_PER_DEGREE;
  const lonRad = position.longitudeDeg * RADIANS_PER_DEGREE;
  const sinLat = Math.sin(latRad);
  const e2 = ellipsoid.eccentricitySquared;
  const primeVerticalM = ellipsoid.semiMajorAxisM / Math.sqrt(1 - e2 * sinLat * sinLat);
  const axisDistanceM = (primeVerticalM + position.ellipsoidalHeightM) * Math.cos(latRad);
  return {
    xM: axisDistanceM * Math.cos(lonRad),
    yM: axisDistanceM * Math.sin(lonRad),
    zM: (primeVerticalM * (1 - e2) + position.ellipsoidalHeightM) * sinLat,
  };
}

/**
 * Geodetic position of a point given in geocentric coordinates: the nearest point of the ellipsoid
 * gives latitude and longitude, the distance to it the height.
 *
 * Method: outside the deep interior two passes of Bowring's iteration for the tangent of the
 * reduced latitude, which converge from below the sea floor to beyond the satellites; in the deep
 * interior, where that iteration fails, the equation of the foot point.
 * Valid for: every point. On the axis the longitude is 0; where two foot points are equally near
 * (equatorial plane, inside the evolute) the northern one is taken; the centre is latitude +90,
 * height −b. NaN gives NaN.
 * Accuracy: 2e-8 m and 2e-14 rad against 80-digit values, from −10 km to 40,000 km; next to the
 * evolute the latitude itself is ill-conditioned, the position still good to 6e-8 m.
 * Source: B. R. Bowring (1976), Transformation from spatial to geographical coordinates, Survey
 * Review 23, 323–327; doi:10.1179/sre.1976.23.181.323. Height: the same author (1985), The accuracy
 * of geodetic latitude and height equations, Survey Review 28, 202–206. Both from memory.
 */
export function geodeticFromEcef({xM, yM, zM}: Ecef, ellipsoid: Ellipsoid): Geodetic {
  const p = Math.sqrt(xM * xM + yM * yM);
  const lonRad = p === 0 ? 0 : Math.atan2(yM, xM);
  const b = ellipsoid.semiMinorAxisM;
  const r = Math.sqrt(p * p + zM * zM);
  if (r < DEEP * b) return deepGeodetic(p, zM, lonRad, ellipsoid);

  const a = ellipsoid.semiMajorAxisM;
  const e2 = ellipsoid.eccentricitySquared;
  const axesRatio = 1 - ellipsoid.flattening;
  const sineTermM = (e2 * b) / (axesRatio * axesRatio); // e'² b
  const cosineTermM = e2 * a;
  // Reduced latitude beta as a vector (cosine part, sine part), so that the poles need no care.
  let cosBeta = p * axesRatio;
  let sinBeta = zM * (1 + sineTermM / r);
  let northward = 0;
  let outward = 0;
  for (let pass = 0; pass < 2; pass++) {
    const length = Math.sqrt(cosBeta * cosBeta + sinBeta * sinBeta);
    const c = cosBeta / length;
    const s = sinBeta / length;
    northward = zM + sineTermM * s * s * s;
    outward = p - cosineTermM * c * c * c;
    cosBeta = outward;
    sinBeta = northward * axesRatio;
  }
  const length = Math.sqrt(northward * northward + outward * outward);
  const sinLat = northward / length;
  const cosLat = outward / length;
  // Not p / cos φ − N, which loses every digit near the poles.
  const heightM = p * cosLat + zM * sinLat - a * Math.sqrt(1 - e2 * sinLat * sinLat);
  return {
    latitudeDeg: Math.atan2(northward, outward) * DEGREES_PER_RADIAN,
    longitudeDeg: lonRad * DEGREES_PER_RADIAN,
    ellipsoidalHeightM: heightM,
  };
}

/** Below this part of the semi-minor axis, 640 km deep, the foot point is found by its equation. */
const DEEP = 0.9;

/**
 * The same in the deep interior, by the equation of the foot point.
 *
 * Method: the foot point is (a² p / (t + a²), b² z / (t + b²)) with the largest root t of
 * (a p / (t + a²))² + (b z / (t + b²))² = 1. In u = t + b² the left side falls and is convex, so
 * Newton's method, started where it is at least 1, walks to the root without overshooting.
 * Source: D. Eberly, Distance from a Point to an Ellipse, an Ellipsoid, or a Hyperellipsoid
 * (Geometric Tools), section 2.3 for the equation; from memory.
 */
function deepGeodetic(p: number, zM: number, lonRad: number, ellipsoid: Ellipsoid): Geodetic {
  const a = ellipsoid.semiMajorAxisM;
  const b = ellipsoid.semiMinorAxisM;
  const focalM2 = ellipsoid.eccentricitySquared * a * a; // a² − b²
  const longitudeDeg = lonRad * DEGREES_PER_RADIAN;
  const z = Math.abs(zM);
  const ap = a * p;
  const bz = b * z;
  if (z === 0 && ap <= focalM2) {
    // Between the foci of the evolute the two foot points mirror each other: the northern one.
    const footP = focalM2 === 0 ? 0 : (a * ap) / focalM2;
    const footZ = b * Math.sqrt(1 - (footP / a) ** 2);
    const heightM = -Math.sqrt((footP - p) ** 2 + footZ ** 2);
    const latRad = Math.atan2(footZ / (b * b), footP / (a * a));
    return {latitudeDeg: latRad * DEGREES_PER_RADIAN, longitudeDeg, ellipsoidalHeightM: heightM};
  }

  let u = Math.max(bz, ap - focalM2);
  for (let pass = 0; pass < 100; pass++) {
    const outward = ap / (u + focalM2);
    const northward = bz / u;
    const excess = outward * outward + northward * northward - 1;
    const slope = (outward * outward) / (u + focalM2) + (northward * northward) / u;
    const step = excess / (2 * slope);
    u += step;
    if (!(step > u * Number.EPSILON)) break;
  }
  const outward = p / (u + focalM2);
  const northward = z / u;
  const length = Math.sqrt(outward * outward + northward * northward);
  const latRad = Math.atan2(zM < 0 ? -northward : northward, outward);
  return {
    latitudeDeg: latRad * DEGREES_PER_RADIAN,
    longitudeDeg,
    ellipsoidalHeightM: (u - b * b) * length,
  };
}
