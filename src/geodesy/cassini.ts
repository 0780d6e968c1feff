import {RADIANS_PER_DEGREE, wrappedLongitudeDeg} from './angle.ts';
import type {Ellipsoid} from './ellipsoid.ts';
import {
  type PlanCoordinates,
  type PlanPosition,
  transverseMercator,
} from './transverse-mercator.ts';

/** A Cassini-Soldner grid, as the parameters of IOGP method 9806. */
export interface CassiniGrid {
  readonly ellipsoid: Ellipsoid;
  readonly originLatitudeDeg: number;
  readonly centralMeridianDeg: number;
  readonly falseEastingM: number;
  readonly falseNorthingM: number;
}

/**
 * The forward Cassini-Soldner projection.
 *
 * Method: the series of IOGP 373-7-2; the meridian arc M is the northing of a transverse Mercator of
 * scale 1 on its central meridian. Ours because proj4js 2.22.0 adds the fifth-order term of the
 * easting, which has to be subtracted: 1.6 mm at 2° from the meridian, growing with its fifth power.
 * Valid for: a few degrees from the central meridian, where such grids are used.
 * Source: IOGP Publication 373-7-2, method 9806, formulas; the sign of the fifth-order term agrees
 * with an expansion of the sphere's arcsin(cos φ sin λ).
 */
export function cassiniForward(grid: CassiniGrid): (place: PlanPosition) => PlanCoordinates {
  const {semiMajorAxisM: a, eccentricitySquared: e2} = grid.ellipsoid;
  const meridian = transverseMercator({...grid, scaleAtOrigin: 1, falseEastingM: 0});
  return ({latitudeDeg, longitudeDeg}) => {
    const latRad = latitudeDeg * RADIANS_PER_DEGREE;
    const sin = Math.sin(latRad);
    const cos = Math.cos(latRad);
    const tan = sin / cos;
    const fromMeridianDeg = wrappedLongitudeDeg(longitudeDeg - grid.centralMeridianDeg);
    // Symbols of the source: nu prime-vertical radius, A, T and C.
    const nu = a / Math.sqrt(1 - e2 * sin * sin);
    const A = fromMeridianDeg * RADIANS_PER_DEGREE * cos;
    const T = tan * tan;
    const C = (e2 * cos * cos) / (1 - e2);
    const {northingM: arcM} = meridian.forward({
      latitudeDeg,
      longitudeDeg: grid.centralMeridianDeg,
    });
    return {
      eastingM:
        grid.falseEastingM + nu * (A - (T * A ** 3) / 6 - ((8 - T + 8 * C) * T * A ** 5) / 120),
      northingM: arcM + nu * tan * (A ** 2 / 2 + ((5 - T + 6 * C) * A ** 4) / 24),
    };
  };
}
