import type {Epochs} from '../epochs/epochs.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {type EnuColumns, enuColumns, type LocalFrame, localFrame} from '../geodesy/local.ts';
import {orderStatisticInPlace} from '../statistics/quantile.ts';
import {mark} from './screen.ts';

/** Which height the record gives, and so what `up` is a difference of. */
export type HeightKind = 'ellipsoidal' | 'above the receiver geoid' | 'none';

/** East, north and up of every epoch about an origin amid the record. */
export interface LocalColumns extends EnuColumns {
  /**
   * The frame of the columns. When the record gives no ellipsoidal height its origin stands at the
   * altitude, or at height zero: near enough for east and north, never reported as a height.
   */
  readonly frame: LocalFrame;
  readonly heightKind: HeightKind;
}

/**
 * East, north and up about the median of the epochs kept so far. Epochs without the height that
 * most of the record has are left out, as `no height`.
 *
 * @param reason  codes of screening, 0 for the epochs kept; changed in place
 * @returns       undefined when no epoch is kept
 */
export function localColumns(
  epochs: Epochs,
  reason: Uint8Array,
  ellipsoid: Ellipsoid,
): LocalColumns | undefined {
  const heightKind = commonHeightKind(epochs, reason);
  const heightM = heightColumn(epochs, heightKind);
  if (heightKind !== 'none') mark(reason, 'no height', (i) => Number.isNaN(heightM[i]!));
  const kept = keptIndices(reason);
  if (kept.length === 0) return undefined;
  const origin = {
    latitudeDeg: medianOf(epochs.latitudeDeg, kept),
    longitudeDeg: medianLongitudeDeg(epochs.longitudeDeg, kept),
    ellipsoidalHeightM: heightKind === 'none' ? 0 : medianOf(heightM, kept),
  };
  const frame = localFrame(origin, ellipsoid);
  const positions = {
    latitudeDeg: epochs.latitudeDeg,
    longitudeDeg: epochs.longitudeDeg,
    ellipsoidalHeightM: heightM,
  };
  return {...enuColumns(positions, frame), frame, heightKind};
}

/** Indices of the epochs whose reason code is 0, in time order. */
export function keptIndices(reason: Uint8Array): Uint32Array {
  const kept = new Uint32Array(reason.length);
  let count = 0;
  for (let i = 0; i < reason.length; i++) if (reason[i] === 0) kept[count++] = i;
  return kept.subarray(0, count);
}

/** The elements of a column at the given indices. */
export function taken(column: Float64Array | Float32Array, indices: Uint32Array): Float64Array {
  const values = new Float64Array(indices.length);
  for (let i = 0; i < indices.length; i++) values[i] = column[indices[i]!]!;
  return values;
}

/**
 * The elements of a column at ascending indices, to be read only: the column itself where they are
 * all of it, since a copy of a long record is worth saving.
 */
export function selected(column: Float64Array, indices: Uint32Array): Float64Array {
  return indices.length === column.length ? column : taken(column, indices);
}

function commonHeightKind(epochs: Epochs, reason: Uint8Array): HeightKind {
  let kept = 0;
  let ellipsoidal = 0;
  let altitude = 0;
  for (let i = 0; i < reason.length; i++) {
    if (reason[i] !== 0) continue;
    kept++;
    if (!Number.isNaN(epochs.ellipsoidalHeightM[i]!)) ellipsoidal++;
    if (!Number.isNaN(epochs.altitudeM[i]!)) altitude++;
  }
  if (2 * ellipsoidal >= kept && ellipsoidal > 0) return 'ellipsoidal';
  return 2 * altitude >= kept && altitude > 0 ? 'above the receiver geoid' : 'none';
}

function heightColumn(epochs: Epochs, heightKind: HeightKind): Float64Array {
  switch (heightKind) {
    case 'ellipsoidal':
      return epochs.ellipsoidalHeightM;
    case 'above the receiver geoid':
      return epochs.altitudeM;
    case 'none':
      return new Float64Array(epochs.count).fill(Number.NaN);
  }
}

function medianOf(column: Float64Array, kept: Uint32Array): number {
  return orderStatisticInPlace(taken(column, kept), kept.length >> 1);
}

/** Longitudes on both sides of the antimeridian are brought to one side first. */
function medianLongitudeDeg(column: Float64Array, kept: Uint32Array): number {
  const first = column[kept[0]!]!;
  const values = taken(column, kept);
  for (let i = 0; i < values.length; i++) {
    if (values[i]! - first > 180) values[i]! -= 360;
    if (values[i]! - first < -180) values[i]! += 360;
  }
  const middle = orderStatisticInPlace(values, values.length >> 1);
  return middle > 180 ? middle - 360 : middle < -180 ? middle + 360 : middle;
}
