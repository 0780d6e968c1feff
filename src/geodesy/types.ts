/** Geodetic coordinates on an ellipsoid that the context names; north and east positive. */
export interface Geodetic {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly ellipsoidalHeightM: number;
}

/** Geocentric Cartesian coordinates, Earth-centred and Earth-fixed. */
export interface Ecef {
  readonly xM: number;
  readonly yM: number;
  readonly zM: number;
}

/** Topocentric coordinates or a vector in the local frame of a stated origin. */
export interface Enu {
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
}

/** A symmetric 3×3 matrix, row by row; the order of axes is that of the frame it belongs to. */
export type Matrix3 = readonly [
  readonly [number, number, number],
  readonly [number, number, number],
  readonly [number, number, number],
];
