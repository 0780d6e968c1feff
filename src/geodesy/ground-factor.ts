import {type Ellipsoid, gaussianRadiusM} from './ellipsoid.ts';

/**
 * Elevation factor: distance on the ellipsoid by distance on the ground, R / (R + h), with the
 * Gaussian mean radius at the latitude.
 *
 * Source: J. E. Stem (1989), State Plane Coordinate System of 1983, NOAA Manual NOS NGS 5 (cited,
 * not read), with the radius of the place instead of a mean radius: they differ by 0.03 ppm at 350 m.
 */
export function elevationFactor(
  place: {readonly latitudeDeg: number; readonly ellipsoidalHeightM: number},
  ellipsoid: Ellipsoid,
): number {
  const radiusM = gaussianRadiusM(place, ellipsoid);
  return radiusM / (radiusM + place.ellipsoidalHeightM);
}

/** Combined factor: grid distance = ground distance × combined factor, of a short line. */
export function combinedFactor(pointScale: number, elevation: number): number {
  return pointScale * elevation;
}
