/** Covariance of an east and a north coordinate, in squared units of the coordinates. */
export interface PlaneCovariance {
  readonly eastEast: number;
  readonly eastNorth: number;
  readonly northNorth: number;
}

/** Standard error ellipse: 39.35 % for normal errors, times 2.4477 for 95 %. */
export interface ErrorEllipse {
  readonly semiMajor: number;
  readonly semiMinor: number;
  /** Bearing of the major axis, clockwise from north, 0 ≤ azimuth < 180; undefined for a circle. */
  readonly azimuthDeg: number | undefined;
}

/**
 * Axes and direction of the error ellipse of a horizontal position.
 *
 * Method: eigenvalues of the 2×2 covariance; the smaller as determinant over the larger, which
 * keeps its digits when the ellipse is thin.
 * Source: Ghilani & Wolf, Adjustment Computations, chapter 19 (from memory).
 */
export function errorEllipse(covariance: PlaneCovariance): ErrorEllipse {
  const {eastEast, eastNorth, northNorth} = covariance;
  const mean = (eastEast + northNorth) / 2;
  const reach = Math.hypot((northNorth - eastEast) / 2, eastNorth);
  const larger = mean + reach;
  const smaller = larger > 0 ? (eastEast * northNorth - eastNorth * eastNorth) / larger : 0;
  const azimuthDeg = (Math.atan2(2 * eastNorth, northNorth - eastEast) * 90) / Math.PI;
  return {
    semiMajor: Math.sqrt(Math.max(0, larger)),
    semiMinor: Math.sqrt(Math.max(0, smaller)),
    azimuthDeg: reach === 0 ? undefined : (azimuthDeg + 180) % 180,
  };
}
