import {UsageError} from '../errors.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {ecefFromGeodetic, geodeticFromEcef} from '../geodesy/geocentric.ts';
import {
  axisValuesFromEastNorth,
  eastNorthFromAxisValues,
  type GridDefinition,
  parseGrid,
  requireGridFits,
} from '../geodesy/grid-definition.ts';
import {
  ecefFromEnu,
  enuFromEcef,
  enuFromGeodetic,
  geodeticFromEnu,
  type LocalFrame,
  localFrame,
} from '../geodesy/local.ts';
import {type Projection, projectionOf} from '../geodesy/projection.ts';
import type {Ecef, Geodetic} from '../geodesy/types.ts';

export type FormKind = 'geocentric' | 'geodetic' | 'local' | 'grid';

/** Three numbers of a position: x, y, z; latitude, longitude, height; …; a height of NaN: not given. */
export type Triple = readonly [number, number, number];

/** One of the ways in which three numbers say where a point is. */
export interface Form {
  readonly kind: FormKind;
  /** For the reader, such as "UTM zone 33N" or "local, about 50.1, 9.2, 210.5". */
  readonly name: string;
  /** What the three numbers are called, without their unit. */
  readonly axes: readonly [string, string, string];
  /** Unit of each of the three numbers: `deg`, `m`, or what the grid prints its coordinates in. */
  readonly units: readonly [string, string, string];
  /** What these units measure, in degrees or metres. */
  readonly unitSizes: readonly [number, number, number];
  readonly toGeodetic: (values: Triple) => Geodetic;
  readonly toEcef: (values: Triple) => Ecef;
  readonly fromGeodetic: (position: Geodetic) => Triple;
  readonly fromEcef: (point: Ecef) => Triple;
  /** The grid at a place, with its convergence and scales; null in the other forms. */
  readonly projectionAt: ((place: Geodetic) => Projection) | null;
  /** Whether each position has a grid of its own: the UTM zone that it lies in. */
  readonly isZoneOfPlace: boolean;
}

export interface FormContext {
  readonly ellipsoid: Ellipsoid;
  /** Name of the frame, which a grid may be tied to; null: not stated. */
  readonly frame: string | null;
  /** Origin of local coordinates; null: not given. */
  readonly origin: Geodetic | null;
}

/**
 * The form that a text names: `geocentric`, `geodetic`, `local`, or a map grid (`UTM`, `UTM 33N`,
 * `EPSG:25833`, a PROJ string).
 *
 * @throws UsageError for a grid that is not known or does not fit the frame or ellipsoid, and for
 *         local coordinates without an origin
 */
export function parseForm(text: string, context: FormContext): Form {
  switch (text.trim().toLowerCase()) {
    case 'geocentric':
      return geocentricForm(context.ellipsoid);
    case 'geodetic':
      return geodeticForm(context.ellipsoid);
    case 'local':
      return localForm(context);
    default:
      return gridForm(text, context);
  }
}

function geocentricForm(ellipsoid: Ellipsoid): Form {
  const toEcef = ([xM, yM, zM]: Triple): Ecef => ({xM, yM, zM});
  const fromEcef = ({xM, yM, zM}: Ecef): Triple => [xM, yM, zM];
  return {
    kind: 'geocentric',
    name: 'geocentric',
    axes: ['x', 'y', 'z'],
    units: ['m', 'm', 'm'],
    unitSizes: [1, 1, 1],
    toEcef,
    toGeodetic: (values) => geodeticFromEcef(toEcef(values), ellipsoid),
    fromEcef,
    fromGeodetic: (position) => fromEcef(ecefFromGeodetic(withHeight(position), ellipsoid)),
    projectionAt: null,
    isZoneOfPlace: false,
  };
}

function geodeticForm(ellipsoid: Ellipsoid): Form {
  const toGeodetic = ([latitudeDeg, longitudeDeg, ellipsoidalHeightM]: Triple): Geodetic => ({
    latitudeDeg,
    longitudeDeg,
    ellipsoidalHeightM,
  });
  const fromGeodetic = (position: Geodetic): Triple => [
    position.latitudeDeg,
    position.longitudeDeg,
    position.ellipsoidalHeightM,
  ];
  return {
    kind: 'geodetic',
    name: `geodetic, ${ellipsoid.name}`,
    axes: ['latitude', 'longitude', 'ellipsoidal_height'],
    units: ['deg', 'deg', 'm'],
    unitSizes: [1, 1, 1],
    toGeodetic,
    toEcef: (values) => ecefFromGeodetic(withHeight(toGeodetic(values)), ellipsoid),
    fromGeodetic,
    fromEcef: (point) => fromGeodetic(geodeticFromEcef(point, ellipsoid)),
    projectionAt: null,
    isZoneOfPlace: false,
  };
}

function localForm({origin, ellipsoid}: FormContext): Form {
  if (origin === null) {
    throw new UsageError(
      'need the origin of the local coordinates; write --at latitude,longitude,ellipsoidal height',
    );
  }
  const frame: LocalFrame = localFrame(origin, ellipsoid);
  const toEnu = ([eastM, northM, upM]: Triple) => ({eastM, northM, upM: required(upM, 'up')});
  const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = origin;
  return {
    kind: 'local',
    name: `local, about ${latitudeDeg}, ${longitudeDeg}, ${ellipsoidalHeightM} m`,
    axes: ['east', 'north', 'up'],
    units: ['m', 'm', 'm'],
    unitSizes: [1, 1, 1],
    toGeodetic: (values) => geodeticFromEnu(toEnu(values), frame),
    toEcef: (values) => ecefFromEnu(toEnu(values), frame),
    fromGeodetic: (position) => {
      const {eastM, northM, upM} = enuFromGeodetic(withHeight(position), frame);
      return [eastM, northM, upM];
    },
    fromEcef: (point) => {
      const {eastM, northM, upM} = enuFromEcef(point, frame);
      return [eastM, northM, upM];
    },
    projectionAt: null,
    isZoneOfPlace: false,
  };
}

/** "UTM" alone has the zone of each point, and so cannot be read from. */
function gridForm(text: string, {ellipsoid, frame}: FormContext): Form {
  const ofPlace = /^\s*UTM\s*$/i.test(text);
  const projections = new Map<string, Projection>();
  const projectionFor = (definition: GridDefinition): Projection => {
    const known = projections.get(definition.name);
    if (known !== undefined) return known;
    requireGridFits(definition, {ellipsoid, frame});
    const made = projectionOf(definition);
    projections.set(definition.name, made);
    return made;
  };
  const fixed = ofPlace ? null : projectionFor(parseGrid(text, {place: null, ellipsoid}));
  const projectionAt = (place: Geodetic): Projection =>
    fixed ?? projectionFor(parseGrid(text, {place, ellipsoid}));
  const toGeodetic = ([first, second, heightM]: Triple): Geodetic => {
    const {definition, inverse} = fixed ?? refuseZoneOfPlace();
    const plan = inverse(eastNorthFromAxisValues(definition, [first, second]));
    return {...plan, ellipsoidalHeightM: heightM};
  };
  const fromGeodetic = (position: Geodetic): Triple => {
    const {definition, forward} = projectionAt(position);
    const [first, second] = axisValuesFromEastNorth(definition, forward(position));
    return [first, second, position.ellipsoidalHeightM];
  };
  const definition = fixed?.definition ?? null;
  const directions = definition?.axes ?? 'en';
  const unit = definition?.unit ?? {name: 'm', lengthM: 1};
  return {
    kind: 'grid',
    name: definition?.name ?? 'UTM, zone of each position',
    axes: [axisName(directions[0]), axisName(directions[1]), 'ellipsoidal_height'],
    units: [unit.name, unit.name, 'm'],
    unitSizes: [unit.lengthM, unit.lengthM, 1],
    toGeodetic,
    toEcef: (values) => ecefFromGeodetic(withHeight(toGeodetic(values)), ellipsoid),
    fromGeodetic,
    fromEcef: (point) => fromGeodetic(geodeticFromEcef(point, ellipsoid)),
    projectionAt,
    isZoneOfPlace: ofPlace,
  };
}

function refuseZoneOfPlace(): never {
  throw new UsageError('need the UTM zone of the coordinates with its hemisphere, such as UTM 32N');
}

const AXIS_NAMES: Readonly<Record<string, string>> = {
  e: 'easting',
  n: 'northing',
  w: 'westing',
  s: 'southing',
};

function axisName(direction: string | undefined): string {
  return AXIS_NAMES[direction ?? ''] ?? 'easting';
}

function withHeight(position: Geodetic): Geodetic {
  required(position.ellipsoidalHeightM, 'an ellipsoidal height');
  return position;
}

function required(value: number, what: string): number {
  if (Number.isNaN(value)) throw new UsageError(`need ${what} in metres for this conversion`);
  return value;
}
