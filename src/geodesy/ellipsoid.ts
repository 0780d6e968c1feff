import {RADIANS_PER_DEGREE} from './angle.ts';

/**
 * An oblate ellipsoid of revolution, or a sphere.
 *
 * The derived quantities are made once by `ellipsoid()`; f = 1 / inverseFlattening, b = a (1 − f),
 * e² = f (2 − f), n = f / (2 − f). A sphere has f = 0 and an infinite inverse flattening.
 */
export interface Ellipsoid {
  readonly name: string;
  readonly semiMajorAxisM: number;
  readonly inverseFlattening: number;
  readonly flattening: number;
  readonly semiMinorAxisM: number;
  readonly eccentricitySquared: number;
  readonly thirdFlattening: number;
}

/**
 * @throws RangeError unless a is positive and finite and 1/f greater than 1 (infinite: a sphere)
 */
export function ellipsoid(
  semiMajorAxisM: number,
  inverseFlattening: number,
  name = `a ${semiMajorAxisM} m, 1/f ${inverseFlattening}`,
): Ellipsoid {
  if (!(semiMajorAxisM > 0 && Number.isFinite(semiMajorAxisM))) {
    throw new RangeError(`ellipsoid: semi-major axis must be positive, got ${semiMajorAxisM}`);
  }
  if (!(inverseFlattening > 1)) {
    throw new RangeError(`ellipsoid: 1/f must be greater than 1, got ${inverseFlattening}`);
  }
  const flattening = 1 / inverseFlattening;
  return {
    name,
    semiMajorAxisM,
    inverseFlattening,
    flattening,
    semiMinorAxisM: semiMajorAxisM * (1 - flattening),
    eccentricitySquared: flattening * (2 - flattening),
    thirdFlattening: flattening / (2 - flattening),
  };
}

/** Source: NIMA TR8350.2, 3rd edition (2000), Table 3.1; NGA.STND.0036 v1.0.0 (2014). */
export const WGS84 = ellipsoid(6_378_137, 298.257223563, 'WGS 84');

/** Source: H. Moritz (2000), Geodetic Reference System 1980, J. Geodesy 74, 128–133. */
export const GRS80 = ellipsoid(6_378_137, 298.257222101, 'GRS 80');

/** Radius of curvature in the prime vertical, N = a / √(1 − e² sin² φ). */
export function primeVerticalRadiusM({latitudeDeg}: {latitudeDeg: number}, e: Ellipsoid): number {
  const sinLat = Math.sin(latitudeDeg * RADIANS_PER_DEGREE);
  return e.semiMajorAxisM / Math.sqrt(1 - e.eccentricitySquared * sinLat * sinLat);
}

/** Radius of curvature in the meridian, M = a (1 − e²) / (1 − e² sin² φ)^(3/2). */
export function meridianRadiusM({latitudeDeg}: {latitudeDeg: number}, e: Ellipsoid): number {
  const sinLat = Math.sin(latitudeDeg * RADIANS_PER_DEGREE);
  const w2 = 1 - e.eccentricitySquared * sinLat * sinLat;
  return (e.semiMajorAxisM * (1 - e.eccentricitySquared)) / (w2 * Math.sqrt(w2));
}

/** Gaussian mean radius of curvature √(M N), the sphere that fits best at a latitude. */
export function gaussianRadiusM(place: {latitudeDeg: number}, e: Ellipsoid): number {
  return Math.sqrt(meridianRadiusM(place, e) * primeVerticalRadiusM(place, e));
}

/** The text of an ellipsoid that cannot be used, with what to write instead. */
export interface RefusedEllipsoid {
  readonly kind: 'refused';
  readonly message: string;
}

export interface ParsedEllipsoid {
  readonly kind: 'ellipsoid';
  readonly ellipsoid: Ellipsoid;
}

const NUMBER = /^\d+(\.\d*)?$/;
/** Half and twice the Earth; outside it somebody gave kilometres or feet. */
const PLAUSIBLE_AXIS_M = [3e6, 13e6] as const;

/**
 * An ellipsoid as a user writes it: `WGS84`, `GRS80`, or semi-major axis in metres and inverse
 * flattening, `6378388,297`; inverse flattening 0 is a sphere, as in PROJ and the EPSG dataset.
 */
export function parseEllipsoid(text: string): ParsedEllipsoid | RefusedEllipsoid {
  const name = text.replace(/[\s_-]/g, '').toUpperCase();
  if (name === 'WGS84') return {kind: 'ellipsoid', ellipsoid: WGS84};
  if (name === 'GRS80') return {kind: 'ellipsoid', ellipsoid: GRS80};
  const parts = text.split(',').map((part) => part.trim());
  const [axisText, inverseText] = parts;
  if (parts.length !== 2 || axisText === undefined || inverseText === undefined) {
    return refused(`need WGS84, GRS80, or a,1/f such as 6378388,297, found "${text}"`);
  }
  if (!NUMBER.test(axisText)) {
    return refused(`need the semi-major axis in metres before the comma, found "${axisText}"`);
  }
  if (!NUMBER.test(inverseText)) {
    return refused(`need the inverse flattening after the comma, found "${inverseText}"`);
  }
  return fromNumbers(Number(axisText), Number(inverseText));
}

function fromNumbers(semiMajorAxisM: number, inverse: number): ParsedEllipsoid | RefusedEllipsoid {
  if (semiMajorAxisM < PLAUSIBLE_AXIS_M[0] || semiMajorAxisM > PLAUSIBLE_AXIS_M[1]) {
    return refused(`need a semi-major axis in metres, such as 6378137, found ${semiMajorAxisM}`);
  }
  if (inverse === 0) return {kind: 'ellipsoid', ellipsoid: ellipsoid(semiMajorAxisM, Infinity)};
  if (inverse > 0 && inverse < 1) {
    return refused(`need the inverse flattening, found ${inverse}; write ${1 / inverse}`);
  }
  if (inverse > 1e6) {
    return refused(`need 1/f, found ${inverse}; is that the semi-minor axis? write a/(a − b)`);
  }
  if (inverse < 50) {
    return refused(`need the inverse flattening, about 298 for the Earth, found ${inverse}`);
  }
  return {kind: 'ellipsoid', ellipsoid: ellipsoid(semiMajorAxisM, inverse)};
}

function refused(message: string): RefusedEllipsoid {
  return {kind: 'refused', message};
}
