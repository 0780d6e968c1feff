import {RADIANS_PER_DEGREE} from './angle.ts';
import type {Ellipsoid} from './ellipsoid.ts';
import {ecefFromGeodetic, geodeticFromEcef} from './geocentric.ts';
import type {Ecef, Enu, Geodetic} from './types.ts';

/**
 * East, north and up at an origin: a right-handed frame whose up is the ellipsoid's normal.
 *
 * At a pole the meridian of the origin's longitude says where north is.
 */
export interface LocalFrame {
  readonly origin: Geodetic;
  readonly originEcef: Ecef;
  readonly ellipsoid: Ellipsoid;
  readonly sinLat: number;
  readonly cosLat: number;
  readonly sinLon: number;
  readonly cosLon: number;
}

/** @throws RangeError unless the origin has all three coordinates */
export function localFrame(origin: Geodetic, ellipsoid: Ellipsoid): LocalFrame {
  const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = origin;
  if (!Number.isFinite(latitudeDeg + longitudeDeg + ellipsoidalHeightM)) {
    throw new RangeError(
      `localFrame: origin must be finite, got ${latitudeDeg}, ${longitudeDeg}, ${ellipsoidalHeightM}`,
    );
  }
  const latRad = latitudeDeg * RADIANS_PER_DEGREE;
  const lonRad = longitudeDeg * RADIANS_PER_DEGREE;
  return {
    origin,
    originEcef: ecefFromGeodetic(origin, ellipsoid),
    ellipsoid,
    sinLat: Math.sin(latRad),
    cosLat: Math.cos(latRad),
    sinLon: Math.sin(lonRad),
    cosLon: Math.cos(lonRad),
  };
}

/** The frame at a point given in geocentric coordinates. */
export function localFrameAtEcef(origin: Ecef, ellipsoid: Ellipsoid): LocalFrame {
  return {...localFrame(geodeticFromEcef(origin, ellipsoid), ellipsoid), originEcef: origin};
}

/** A geocentric difference turned into east, north, up. Source: IOGP 373-7-2, method 9836. */
export function enuFromEcefVector({xM, yM, zM}: Ecef, frame: LocalFrame): Enu {
  const outwardM = frame.cosLon * xM + frame.sinLon * yM;
  return {
    eastM: frame.cosLon * yM - frame.sinLon * xM,
    northM: frame.cosLat * zM - frame.sinLat * outwardM,
    upM: frame.cosLat * outwardM + frame.sinLat * zM,
  };
}

/** An east, north, up vector turned into a geocentric difference. */
export function ecefVectorFromEnu({eastM, northM, upM}: Enu, frame: LocalFrame): Ecef {
  const outwardM = frame.cosLat * upM - frame.sinLat * northM;
  return {
    xM: frame.cosLon * outwardM - frame.sinLon * eastM,
    yM: frame.sinLon * outwardM + frame.cosLon * eastM,
    zM: frame.cosLat * northM + frame.sinLat * upM,
  };
}

export function enuFromEcef(point: Ecef, frame: LocalFrame): Enu {
  const {originEcef} = frame;
  return enuFromEcefVector(
    {xM: point.xM - originEcef.xM, yM: point.yM - originEcef.yM, zM: point.zM - originEcef.zM},
    frame,
  );
}

export function ecefFromEnu(enu: Enu, frame: LocalFrame): Ecef {
  const {originEcef} = frame;
  const {xM, yM, zM} = ecefVectorFromEnu(enu, frame);
  return {xM: originEcef.xM + xM, yM: originEcef.yM + yM, zM: originEcef.zM + zM};
}

export function enuFromGeodetic(position: Geodetic, frame: LocalFrame): Enu {
  const columns = enuColumns(
    {
      latitudeDeg: Float64Array.of(position.latitudeDeg),
      longitudeDeg: Float64Array.of(position.longitudeDeg),
      ellipsoidalHeightM: Float64Array.of(position.ellipsoidalHeightM),
    },
    frame,
  );
  return {eastM: columns.eastM[0]!, northM: columns.northM[0]!, upM: columns.upM[0]!};
}

export function geodeticFromEnu(enu: Enu, frame: LocalFrame): Geodetic {
  return geodeticFromEcef(ecefFromEnu(enu, frame), frame.ellipsoid);
}

export interface GeodeticColumns {
  readonly latitudeDeg: Float64Array;
  readonly longitudeDeg: Float64Array;
  readonly ellipsoidalHeightM: Float64Array;
}

export interface EnuColumns {
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
}

/**
 * East, north and up of many positions about one origin.
 *
 * Method: differences of sines, cosines and radii are taken by half-angle identities instead of
 * subtracting geocentric coordinates of 6e6 m, so that positions a millimetre apart keep the digits
 * that the columns hold. With w = √(1 − e² sin² φ), N = a / w, and a difference d to the origin:
 * d(N) = a e² d(sin) (sin φ + sin φ0) / (w w0 (w + w0)).
 * Valid for: equal-length columns. A height of NaN (plan only) gives up NaN; east and north are then
 * those at the origin's height. NaN in latitude or longitude gives NaN.
 * Accuracy: 3e-9 m out to 500 km against 80-digit values; a longitude near 180° itself resolves
 * 3e-9 m.
 */
export function enuColumns(positions: GeodeticColumns, frame: LocalFrame): EnuColumns {
  const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = positions;
  const count = latitudeDeg.length;
  const eastM = new Float64Array(count);
  const northM = new Float64Array(count);
  const upM = new Float64Array(count);
  const {semiMajorAxisM: a, eccentricitySquared: e2} = frame.ellipsoid;
  const {origin, sinLat: sin0, cosLat: cos0} = frame;
  const lat0 = origin.latitudeDeg;
  const lon0 = origin.longitudeDeg;
  const h0 = origin.ellipsoidalHeightM;
  const w0 = Math.sqrt(1 - e2 * sin0 * sin0);
  const primeVertical0M = a / w0;
  const halfRadian = RADIANS_PER_DEGREE / 2;

  for (let i = 0; i < count; i++) {
    const heightM = ellipsoidalHeightM[i]!;
    const planOnly = Number.isNaN(heightM);
    const h = planOnly ? h0 : heightM;
    const halfDLat = (latitudeDeg[i]! - lat0) * halfRadian;
    const meanLat = lat0 * RADIANS_PER_DEGREE + halfDLat;
    const chord = 2 * Math.sin(halfDLat);
    const dSin = chord * Math.cos(meanLat);
    const dCos = -chord * Math.sin(meanLat);
    const sin = sin0 + dSin;
    const cos = cos0 + dCos;
    const w = Math.sqrt(1 - e2 * sin * sin);
    const dPrimeVerticalM = (a * e2 * dSin * (sin + sin0)) / (w * w0 * (w + w0));
    const primeVerticalM = primeVertical0M + dPrimeVerticalM;
    const dh = h - h0;
    const axisDistanceM = (primeVerticalM + h) * cos;
    const dAxisDistanceM = (dPrimeVerticalM + dh) * cos + (primeVertical0M + h0) * dCos;
    const dzM = (dPrimeVerticalM * (1 - e2) + dh) * sin + (primeVertical0M * (1 - e2) + h0) * dSin;
    // The sine and cosine are periodic: a step across the date line needs no care.
    const halfDLon = (longitudeDeg[i]! - lon0) * halfRadian;
    const sinHalf = Math.sin(halfDLon);
    const outwardM = dAxisDistanceM - 2 * axisDistanceM * sinHalf * sinHalf;
    eastM[i] = axisDistanceM * 2 * sinHalf * Math.cos(halfDLon);
    northM[i] = cos0 * dzM - sin0 * outwardM;
    upM[i] = planOnly ? Number.NaN : cos0 * outwardM + sin0 * dzM;
  }
  return {eastM, northM, upM};
}
