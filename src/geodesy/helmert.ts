import type {Ecef} from './types.ts';

export type Vector3 = readonly [number, number, number];

/**
 * A time-dependent similarity transformation as it is published: translations in mm, scale in parts
 * per 1e9, rotations in milliarcseconds, and their rates per year; value at t is
 * P(t0) + rate · (t − t0).
 *
 * Rotations follow the position vector convention, always: X' = X + T + D X + R × X.
 * Source: EUREF Technical Note 1 (Altamimi & Collilieux, 2024), equation 1; IERS Conventions 2010,
 * chapter 4, equation 4.3.
 */
export interface HelmertSet {
  readonly t0: number;
  readonly translationMm: Vector3;
  readonly scalePpb: number;
  readonly rotationMas: Vector3;
  readonly translationRate: Vector3;
  readonly scaleRate: number;
  readonly rotationRate: Vector3;
}

/** The seven parameters at one epoch, in the units of publication. */
export interface HelmertAtEpoch {
  readonly translationMm: Vector3;
  readonly scalePpb: number;
  readonly rotationMas: Vector3;
}

/** Radians in a milliarcsecond. */
export const RADIANS_PER_MAS = Math.PI / (180 * 3600 * 1000);

export function helmertAt(set: HelmertSet, epoch: number): HelmertAtEpoch {
  const years = epoch - set.t0;
  return {
    translationMm: advanced(set.translationMm, set.translationRate, years),
    scalePpb: set.scalePpb + set.scaleRate * years,
    rotationMas: advanced(set.rotationMas, set.rotationRate, years),
  };
}

function advanced(value: Vector3, rate: Vector3, years: number): Vector3 {
  return [value[0] + rate[0] * years, value[1] + rate[1] * years, value[2] + rate[2] * years];
}

/** The displacement T + D X + R × X that the parameters give a point. */
function displacement({xM, yM, zM}: Ecef, parameters: HelmertAtEpoch): Ecef {
  const [tx, ty, tz] = parameters.translationMm;
  const [rx, ry, rz] = parameters.rotationMas;
  const scale = parameters.scalePpb * 1e-9;
  return {
    xM: tx * 1e-3 + scale * xM + (ry * zM - rz * yM) * RADIANS_PER_MAS,
    yM: ty * 1e-3 + scale * yM + (rz * xM - rx * zM) * RADIANS_PER_MAS,
    zM: tz * 1e-3 + scale * zM + (rx * yM - ry * xM) * RADIANS_PER_MAS,
  };
}

/** The point in the frame that the parameters lead to. */
export function applyHelmert(point: Ecef, parameters: HelmertAtEpoch): Ecef {
  const d = displacement(point, parameters);
  return {xM: point.xM + d.xM, yM: point.yM + d.yM, zM: point.zM + d.zM};
}

/**
 * The point in the frame that the parameters come from.
 *
 * Method: fixed point of X = X' − d(X); each pass gains a factor of the displacement by the Earth's
 * radius (1e-6 at most), so three passes are exact to the last bit.
 */
export function invertHelmert(point: Ecef, parameters: HelmertAtEpoch): Ecef {
  let found = point;
  for (let pass = 0; pass < 3; pass++) {
    const d = displacement(found, parameters);
    found = {xM: point.xM - d.xM, yM: point.yM - d.yM, zM: point.zM - d.zM};
  }
  return found;
}
