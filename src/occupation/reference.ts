import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {ecefFromGeodetic} from '../geodesy/geocentric.ts';
import {enuFromGeodetic, localFrame} from '../geodesy/local.ts';
import type {Geodetic} from '../geodesy/types.ts';
import type {MarkPlace} from './mark-place.ts';
import type {PerAxis, Position, Reference} from './result.ts';

/** The measured point, as far as the record gives it. */
export type Measured = Pick<Position, 'geodetic' | 'orthometricHeightM'>;

/**
 * The point that east, north and up are counted from: the mark, else the place that the user
 * names, else the mean itself. A mark without a plan position leaves the plan to the mean.
 */
export function referenceOf(
  measured: Measured,
  place: MarkPlace | null,
  at: Geodetic | null,
  ellipsoid: Ellipsoid,
): Reference {
  if (place?.plan) {
    return reference(
      'mark',
      place.name,
      {...place.plan, ellipsoidalHeightM: place.ellipsoidalHeightM},
      ellipsoid,
    );
  }
  if (at !== null) return reference('option', null, at, ellipsoid);
  return reference('mean', null, measured.geodetic, ellipsoid);
}

function reference(
  from: Reference['from'],
  name: string | null,
  geodetic: Reference['geodetic'],
  ellipsoid: Ellipsoid,
): Reference {
  const {xM, yM, zM} = ecefFromGeodetic(atHeight(geodetic, 0), ellipsoid);
  return {
    from,
    name,
    geodetic,
    ecefM: geodetic.ellipsoidalHeightM === null ? null : {x: xM, y: yM, z: zM},
  };
}

/**
 * Measured minus reference: east and north in the local frame at the reference, up as the
 * difference of heights in the height system that both have.
 */
export function offsetFrom(
  target: {
    readonly plan: {readonly latitudeDeg: number; readonly longitudeDeg: number} | null;
    readonly ellipsoidalHeightM: number | null;
    readonly orthometricHeightM: number | null;
  },
  measured: Measured,
  ellipsoid: Ellipsoid,
): PerAxis<number | null> {
  const up = heightDifferenceM(target, measured);
  if (target.plan === null) return {east: null, north: null, up};
  // Both points at one height: the plan offset is that of the verticals through them.
  const heightM = target.ellipsoidalHeightM ?? measured.geodetic.ellipsoidalHeightM ?? 0;
  const frame = localFrame({...target.plan, ellipsoidalHeightM: heightM}, ellipsoid);
  const {eastM, northM} = enuFromGeodetic(
    {...measured.geodetic, ellipsoidalHeightM: heightM},
    frame,
  );
  return {east: eastM, north: northM, up};
}

function heightDifferenceM(
  target: {readonly ellipsoidalHeightM: number | null; readonly orthometricHeightM: number | null},
  measured: Measured,
): number | null {
  switch (heightSystemOf(target, measured)) {
    case 'ellipsoidal':
      return measured.geodetic.ellipsoidalHeightM! - target.ellipsoidalHeightM!;
    case 'above the geoid':
      return measured.orthometricHeightM! - target.orthometricHeightM!;
    case null:
      return null;
  }
}

/** The height system that target and measured point both have; heights are never mixed. */
export function heightSystemOf(
  target: {readonly ellipsoidalHeightM: number | null; readonly orthometricHeightM: number | null},
  measured: Measured,
): 'ellipsoidal' | 'above the geoid' | null {
  if (target.ellipsoidalHeightM !== null && measured.geodetic.ellipsoidalHeightM !== null) {
    return 'ellipsoidal';
  }
  return target.orthometricHeightM !== null && measured.orthometricHeightM !== null
    ? 'above the geoid'
    : null;
}

function atHeight(geodetic: Reference['geodetic'], otherwiseM: number): Geodetic {
  return {...geodetic, ellipsoidalHeightM: geodetic.ellipsoidalHeightM ?? otherwiseM};
}
