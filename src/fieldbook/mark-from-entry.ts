import type {Matrix3} from '../geodesy/types.ts';
import type {
  Mark,
  MarkCoordinates,
  MarkUncertainty,
  MarkVelocity,
  WitnessMark,
  WitnessPosition,
} from './mark.ts';
import type {MarkEntry, SharedEntry, WitnessEntry} from './mark-shape.ts';
import {type Node, type Place, refuse} from './node.ts';
import {lineOfKey, within} from './shape.ts';

interface Context {
  readonly node: Node;
  readonly place: Place;
  /** What the top of the file says for all marks. */
  readonly shared: SharedEntry;
}

/**
 * A mark out of the keys of its entry, when they fit together: one kind of coordinates, complete;
 * an epoch where it is needed; one statement of uncertainty.
 *
 * A mark that names a frame of its own does not take the coordinate epoch from the top of the file,
 * since that epoch belongs to another frame.
 */
export function markFrom(entry: MarkEntry, context: Context): Mark {
  const {shared} = context;
  const ownFrame = entry.frame !== undefined && entry.frame !== shared.frame;
  const mark: Mark = {
    name: entry.name,
    otherNames: entry.otherNames ?? [],
    lineNumber: context.node.lineNumber,
    description: entry.description,
    coordinates: coordinatesFrom(entry, context),
    frame: entry.frame ?? shared.frame,
    coordinateEpoch: entry.coordinateEpoch ?? (ownFrame ? undefined : shared.coordinateEpoch),
    verticalDatum: entry.verticalDatum ?? shared.verticalDatum,
    geoidModel: entry.geoidModel ?? shared.geoidModel,
    separationM: entry.separationM,
    velocity: velocityFrom(entry.velocity, context),
    uncertainty: uncertaintyFrom(entry, context),
    tolerance: entry.tolerance ?? shared.tolerance,
    witnessMarks: (entry.witnessMarks ?? []).map((witness, index) =>
      witnessFrom(witness, index, context),
    ),
  };
  refuseMissingEpoch(mark, context);
  refuseHeightsApart(mark, context);
  return mark;
}

const GEOCENTRIC = [
  ['x', 'xM'],
  ['y', 'yM'],
  ['z', 'zM'],
] as const;
const GEODETIC = [
  ['latitude', 'latitudeDeg'],
  ['longitude', 'longitudeDeg'],
] as const;
const GRID = [
  ['easting', 'eastingM'],
  ['northing', 'northingM'],
] as const;

function coordinatesFrom(entry: MarkEntry, context: Context): MarkCoordinates {
  const {orthometricHeightM, ellipsoidalHeightM} = entry;
  const kinds = [GEOCENTRIC, GEODETIC, GRID].filter((keys) =>
    keys.some(([, name]) => entry[name] !== undefined),
  );
  const [first, second] = kinds;
  if (first !== undefined && second !== undefined) {
    no(
      context,
      second[0][0],
      `both ${namesOf(first)} and ${namesOf(second)} are given; keep one kind of coordinates`,
    );
  }
  for (const [key, name] of first ?? []) {
    if (entry[name] === undefined) {
      no(context, null, `"${key}" is missing; give all of ${namesOf(first ?? [])}`);
    }
  }
  if (entry.latitudeDeg !== undefined && entry.longitudeDeg !== undefined) {
    const {latitudeDeg, longitudeDeg} = entry;
    return {kind: 'geodetic', latitudeDeg, longitudeDeg, ellipsoidalHeightM, orthometricHeightM};
  }
  if (entry.eastingM !== undefined && entry.northingM !== undefined) {
    const {eastingM, northingM} = entry;
    const projection = entry.projection ?? context.shared.projection;
    if (projection === undefined) {
      no(
        context,
        'easting',
        'easting and northing need their projection; write for example "projection: UTM 33 N"',
      );
    }
    return {kind: 'grid', projection, eastingM, northingM, ellipsoidalHeightM, orthometricHeightM};
  }
  if (entry.xM !== undefined && entry.yM !== undefined && entry.zM !== undefined) {
    const {xM, yM, zM} = entry;
    refuseOffEarth(Math.hypot(xM, yM, zM), context);
    if (ellipsoidalHeightM !== undefined) {
      no(
        context,
        'ellipsoidal height',
        'x, y and z already hold the ellipsoidal height; remove one of the two',
      );
    }
    return {kind: 'geocentric', xM, yM, zM, orthometricHeightM};
  }
  if (ellipsoidalHeightM === undefined && orthometricHeightM === undefined) {
    no(
      context,
      null,
      'no coordinates; give latitude and longitude, x, y and z, easting and northing, or a height',
    );
  }
  return {kind: 'height only', ellipsoidalHeightM, orthometricHeightM};
}

/** Within about 20 km of the ellipsoid, whose radii are 6357 and 6378 km. */
function refuseOffEarth(radiusM: number, context: Context): void {
  if (radiusM > 6.33e6 && radiusM < 6.4e6) return;
  no(
    context,
    'x',
    `x, y and z lie ${Math.round(radiusM / 1000)} km from the centre of the Earth, not about 6370 km; check digits and units`,
  );
}

/** Frames that the plates move through: their coordinates mean nothing without an epoch. */
const GLOBAL_FRAME = /^(ITRF|IGS|IGB|IGR|WGS)/i;

function refuseMissingEpoch(mark: Mark, context: Context): void {
  if (mark.coordinateEpoch !== undefined) return;
  const write =
    'write the decimal year the coordinates belong to, such as "coordinate epoch: 2020.0"';
  if (mark.velocity !== undefined) {
    no(context, 'velocity', `a velocity needs the epoch of the coordinates; ${write}`);
  }
  if (
    mark.frame !== undefined &&
    GLOBAL_FRAME.test(mark.frame) &&
    mark.coordinates.kind !== 'height only'
  ) {
    no(
      context,
      'frame',
      `coordinates in ${mark.frame} change by centimetres a year, and no coordinate epoch is given; ${write}`,
    );
  }
}

/** Two heights and a separation that contradict each other by more than their rounding. */
function refuseHeightsApart(mark: Mark, context: Context): void {
  const {coordinates, separationM} = mark;
  if (coordinates.kind === 'geocentric' || separationM === undefined) return;
  const {ellipsoidalHeightM, orthometricHeightM} = coordinates;
  if (ellipsoidalHeightM === undefined || orthometricHeightM === undefined) return;
  const apartM = ellipsoidalHeightM - orthometricHeightM - separationM;
  if (Math.abs(apartM) <= 0.02) return;
  no(
    context,
    'separation',
    `ellipsoidal minus orthometric height is ${(ellipsoidalHeightM - orthometricHeightM).toFixed(3)} m, but the separation is ${separationM.toFixed(3)} m; correct or remove one of the three`,
  );
}

function velocityFrom(velocity: MarkEntry['velocity'], context: Context): MarkVelocity | undefined {
  if (velocity === undefined) return undefined;
  const {eastMPerYear, northMPerYear, upMPerYear, xMPerYear, yMPerYear, zMPerYear} = velocity;
  const local = [eastMPerYear, northMPerYear, upMPerYear].filter((value) => value !== undefined);
  const earth = [xMPerYear, yMPerYear, zMPerYear].filter((value) => value !== undefined);
  if (local.length > 0 && earth.length > 0) {
    no(
      context,
      'velocity',
      'velocity is given along two sets of axes; keep east, north and up, or x, y and z',
    );
  }
  if (eastMPerYear !== undefined && northMPerYear !== undefined) {
    // Most published velocities are horizontal: a vertical one that is not given is taken as none.
    return {axes: 'enu', eastMPerYear, northMPerYear, upMPerYear: upMPerYear ?? 0};
  }
  if (xMPerYear !== undefined && yMPerYear !== undefined && zMPerYear !== undefined) {
    return {axes: 'xyz', xMPerYear, yMPerYear, zMPerYear};
  }
  return no(
    context,
    'velocity',
    'a velocity needs east and north (and up), or x, y and z; give all of them',
  );
}

function uncertaintyFrom(entry: MarkEntry, context: Context): MarkUncertainty | undefined {
  const {standardUncertainty: standard, covariance} = entry;
  if (covariance !== undefined) {
    if (standard !== undefined) {
      no(context, 'covariance', 'both a covariance and a standard uncertainty are given; keep one');
    }
    const {axes} = covariance;
    const covarianceM2 = matrixFrom(covariance, context);
    return {kind: 'covariance', axes, covarianceM2, correlationsKnown: true};
  }
  if (standard === undefined) return undefined;
  const {eastM, northM, upM, xM, yM, zM} = standard;
  const local = [eastM, northM, upM].some((value) => value !== undefined);
  const earth = [xM, yM, zM].some((value) => value !== undefined);
  if (local && earth) {
    no(
      context,
      'standard uncertainty',
      'standard uncertainty is given along two sets of axes; keep east, north and up, or x, y and z',
    );
  }
  if (local) {
    if ((eastM === undefined) !== (northM === undefined)) {
      no(context, 'standard uncertainty', 'give both east and north, or neither');
    }
    return {kind: 'standard', eastM, northM, upM};
  }
  if (xM === undefined || yM === undefined || zM === undefined) {
    no(context, 'standard uncertainty', 'give all of x, y and z, or east, north and up');
  }
  const covarianceM2: Matrix3 = [
    [xM * xM, 0, 0],
    [0, yM * yM, 0],
    [0, 0, zM * zM],
  ];
  return {kind: 'covariance', axes: 'xyz', covarianceM2, correlationsKnown: false};
}

function matrixFrom({unit, rows}: NonNullable<MarkEntry['covariance']>, context: Context): Matrix3 {
  const scale = unit === 'mm2' ? 1e-6 : 1;
  const lower = rows.length === 3 && rows.every((row, i) => row.length === i + 1);
  const whole = rows.length === 3 && rows.every((row) => row.length === 3);
  if (!lower && !whole) {
    no(context, 'covariance', 'rows needs three rows: of 1, 2 and 3 numbers, or of 3 numbers each');
  }
  const at = (i: number, j: number) => (rows[i]?.[j] ?? rows[j]?.[i] ?? 0) * scale;
  if (
    whole &&
    [at(0, 1) - at(1, 0), at(0, 2) - at(2, 0), at(1, 2) - at(2, 1)].some((d) => d !== 0)
  ) {
    no(
      context,
      'covariance',
      'the matrix is not symmetric; give its lower triangle, rows of 1, 2 and 3 numbers',
    );
  }
  const matrix: Matrix3 = [
    [at(0, 0), at(1, 0), at(2, 0)],
    [at(1, 0), at(1, 1), at(2, 1)],
    [at(2, 0), at(2, 1), at(2, 2)],
  ];
  if (!isPositiveDefinite(matrix)) {
    no(
      context,
      'covariance',
      'the matrix is no covariance (a variance or a determinant is not positive); check its numbers and signs',
    );
  }
  return matrix;
}

/** Sylvester's criterion: all leading minors are positive. */
function isPositiveDefinite([[a, b, c], [, d, e], [, , f]]: Matrix3): boolean {
  const determinant = a * (d * f - e * e) - b * (b * f - c * e) + c * (b * e - c * d);
  return a > 0 && a * d - b * b > 0 && determinant > 0;
}

function witnessFrom(witness: WitnessEntry, index: number, context: Context): WitnessMark {
  const lineNumber = lineOfWitness(index, context.node);
  const refuseHere = (message: string): never =>
    refuse(within(context.place, `witness ${witness.name}`), lineNumber, message);
  return {
    name: witness.name,
    lineNumber,
    position: witnessPosition(witness, refuseHere),
    upM: witness.upM,
  };
}

function witnessPosition(
  {eastM, northM, distanceM, bearingDeg, bearingFrom}: WitnessEntry,
  refuseHere: (message: string) => never,
): WitnessPosition | undefined {
  const offset = eastM !== undefined || northM !== undefined;
  if (offset && (distanceM !== undefined || bearingDeg !== undefined)) {
    refuseHere('give east and north, or distance and bearing, not both');
  }
  if (offset) {
    if (eastM === undefined || northM === undefined) refuseHere('give both east and north');
    return {kind: 'offset', eastM, northM};
  }
  if (bearingDeg === undefined) {
    return distanceM === undefined ? undefined : {kind: 'distance', distanceM};
  }
  if (distanceM === undefined)
    refuseHere('a bearing needs its distance; write for example "distance: 3.21 m"');
  if (bearingFrom === undefined) {
    refuseHere(
      'a bearing needs its north; write "bearing from: true north" (or grid north, magnetic north)',
    );
  }
  return {kind: 'distance and bearing', distanceM, bearingDeg, bearingFrom};
}

function lineOfWitness(index: number, node: Node): number {
  if (node.kind !== 'mapping') return node.lineNumber;
  const list = node.entries.find(({key}) => key === 'witness marks')?.value;
  return (list?.kind === 'list' ? list.items[index]?.lineNumber : undefined) ?? node.lineNumber;
}

function namesOf(keys: readonly (readonly [string, string])[]): string {
  const names = keys.map(([key]) => key);
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

function no(context: Context, key: string | null, message: string): never {
  const line = key === null ? context.node.lineNumber : lineOfKey(context.node, key);
  return refuse(context.place, line, message);
}
