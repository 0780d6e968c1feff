import proj4 from 'proj4';
import {UsageError} from '../errors.ts';
import {DEGREES_PER_RADIAN, RADIANS_PER_DEGREE} from './angle.ts';
import {cassiniForward} from './cassini.ts';
import {type Ellipsoid, meridianRadiusM, primeVerticalRadiusM} from './ellipsoid.ts';
import type {GridDefinition} from './grid-definition.ts';
import {
  type PlanCoordinates,
  type PlanPosition,
  type TransverseMercator,
  type TransverseMercatorGrid,
  transverseMercator,
  utmGrid,
} from './transverse-mercator.ts';

/** What the grid does to short lines at a place. */
export interface PlanFactors {
  /** Bearing of grid north, clockwise from true north. */
  readonly convergenceDeg: number;
  /** undefined: the projection is not conformal, its scale depends on the direction. */
  readonly pointScale: number | undefined;
  readonly meridianScale: number;
  readonly parallelScale: number;
}

export interface Projection {
  readonly definition: GridDefinition;
  /** @throws UsageError for a place that the grid cannot hold */
  readonly forward: (place: PlanPosition) => PlanCoordinates;
  /** @throws UsageError for coordinates that the grid cannot hold */
  readonly inverse: (coordinates: PlanCoordinates) => PlanPosition;
  readonly factors: (place: PlanPosition) => PlanFactors;
}

/**
 * The projection of a definition.
 *
 * Transverse Mercator and UTM are our own series; all others are computed by proj4js from a string
 * made here: the ellipsoid as numbers (an unknown name would silently become WGS 84), no datum, no
 * unit and no axes (ignored without a flag), results checked to be finite (a missing grid gives NaN).
 * Its Cassini-Soldner has a wrong sign: ours.
 * Accuracy: 0.1 mm against PROJ 9.1.1, forward and inverse.
 */
export function projectionOf(definition: GridDefinition): Projection {
  const grid = transverseMercatorGridOf(definition);
  return grid === undefined
    ? projectionByLibrary(definition)
    : projectionBySeries(definition, transverseMercator(grid));
}

function transverseMercatorGridOf(definition: GridDefinition): TransverseMercatorGrid | undefined {
  const {method, parameters, ellipsoid} = definition;
  if (method === 'utm') {
    const hemisphere = parameters.south === true ? 'S' : 'N';
    return utmGrid({zone: parameter(definition, ['zone'], Number.NaN), hemisphere}, ellipsoid);
  }
  if (method !== 'tmerc' && method !== 'etmerc') return undefined;
  return {
    ...originOf(definition),
    scaleAtOrigin: parameter(definition, ['k_0', 'k'], 1),
  };
}

/** What transverse Mercator and Cassini-Soldner share. */
function originOf(definition: GridDefinition): Omit<TransverseMercatorGrid, 'scaleAtOrigin'> {
  return {
    ellipsoid: definition.ellipsoid,
    originLatitudeDeg: parameter(definition, ['lat_0'], 0),
    centralMeridianDeg: parameter(definition, ['lon_0'], Number.NaN),
    falseEastingM: parameter(definition, ['x_0'], 0),
    falseNorthingM: parameter(definition, ['y_0'], 0),
  };
}

/** The first of the parameters that is given, else the value that PROJ takes for it. */
function parameter(
  {parameters}: GridDefinition,
  keys: readonly string[],
  otherwise: number,
): number {
  const value = keys.map((key) => parameters[key]).find((found) => typeof found === 'number');
  return typeof value === 'number' ? value : otherwise;
}

function projectionBySeries(definition: GridDefinition, series: TransverseMercator): Projection {
  return {
    definition,
    forward: (place) => within(definition, () => series.forward(place)),
    inverse: (coordinates) => within(definition, () => series.inverse(coordinates)),
    factors: (place) => {
      const {convergenceDeg, pointScale} = within(definition, () => series.forward(place));
      return {convergenceDeg, pointScale, meridianScale: pointScale, parallelScale: pointScale};
    },
  };
}

/** Turns a refusal of the computation into one that names the grid. */
function within<T>(definition: GridDefinition, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    // proj4js throws strings; our own name the function first, which is no help here.
    const reason = error instanceof Error ? error.message.replace(/^\w+: /, '') : String(error);
    throw new UsageError(`${definition.name} cannot hold this position: ${reason}`, {cause: error});
  }
}

function projectionByLibrary(definition: GridDefinition): Projection {
  const {ellipsoid} = definition;
  const converter = within(definition, () => proj4(...libraryStrings(definition)));
  const forward = definition.method === 'cass' ? forwardByCassini(definition) : forwardByLibrary;

  function forwardByLibrary({latitudeDeg, longitudeDeg}: PlanPosition): PlanCoordinates {
    const [eastingM, northingM] = finite(definition, () =>
      converter.forward([longitudeDeg, latitudeDeg]),
    );
    return {eastingM, northingM};
  }

  function inverse(coordinates: PlanCoordinates): PlanPosition {
    const [longitudeDeg, latitudeDeg] = finite(definition, () =>
      converter.inverse([coordinates.eastingM, coordinates.northingM]),
    );
    return refined(coordinates, {latitudeDeg, longitudeDeg}, forward);
  }

  return {
    definition,
    forward,
    inverse,
    factors: (place) => numericFactors(place, ellipsoid, forward),
  };
}

/** Definitions of the two sides: the same ellipsoid, by numbers, and nothing of datums. */
function libraryStrings({ellipsoid, method, parameters}: GridDefinition): [string, string] {
  const {semiMajorAxisM, inverseFlattening} = ellipsoid;
  // +rf where there is one: a method of proj4js (somerc) reads no +b.
  const shape = Number.isFinite(inverseFlattening)
    ? `+a=${semiMajorAxisM} +rf=${inverseFlattening}`
    : `+a=${semiMajorAxisM} +b=${semiMajorAxisM}`;
  const own = Object.entries(parameters)
    .map(([key, value]) => (value === true ? `+${key}` : `+${key}=${value}`))
    .join(' ');
  return [`+proj=longlat ${shape} +no_defs`, `+proj=${method} ${own} ${shape} +no_defs`];
}

function forwardByCassini(definition: GridDefinition): Projection['forward'] {
  const cassini = cassiniForward(originOf(definition));
  return (place) => within(definition, () => cassini(place));
}

/** Farther than any grid reaches: where a projection runs away, as a cone does at the far pole. */
const FARTHEST = 1e8;

function finite(definition: GridDefinition, compute: () => number[]): [number, number] {
  const [first = Number.NaN, second = Number.NaN] = within(definition, compute);
  if (Math.abs(first) < FARTHEST && Math.abs(second) < FARTHEST) return [first, second];
  throw new UsageError(`${definition.name} cannot hold this position: no finite result`);
}

/** Half the distance over which derivatives are taken: 3e-4° keeps eleven digits. */
const STEP_DEG = 3e-4;

interface Derivatives {
  readonly eastByLat: number;
  readonly northByLat: number;
  readonly eastByLon: number;
  readonly northByLon: number;
}

/** Metres per degree, by central differences. */
function derivatives(
  {latitudeDeg, longitudeDeg}: PlanPosition,
  forward: Projection['forward'],
): Derivatives {
  const north = forward({latitudeDeg: latitudeDeg + STEP_DEG, longitudeDeg});
  const south = forward({latitudeDeg: latitudeDeg - STEP_DEG, longitudeDeg});
  const east = forward({latitudeDeg, longitudeDeg: longitudeDeg + STEP_DEG});
  const west = forward({latitudeDeg, longitudeDeg: longitudeDeg - STEP_DEG});
  return {
    eastByLat: (north.eastingM - south.eastingM) / (2 * STEP_DEG),
    northByLat: (north.northingM - south.northingM) / (2 * STEP_DEG),
    eastByLon: (east.eastingM - west.eastingM) / (2 * STEP_DEG),
    northByLon: (east.northingM - west.northingM) / (2 * STEP_DEG),
  };
}

/** Residuals below this are a tenth of what is promised: no need to go on. */
const GOOD_ENOUGH_M = 1e-5;

/**
 * Sharpens an inverse by the forward projection: some inverses of proj4js stop 0.1 to 0.7 mm early.
 *
 * Method: Newton's method in two variables; nothing is done where the first residual is small, or
 * within 0.01° of a pole, where longitude has no derivative.
 */
function refined(
  wanted: PlanCoordinates,
  start: PlanPosition,
  forward: Projection['forward'],
): PlanPosition {
  let place = start;
  for (let pass = 0; pass < 3; pass++) {
    if (Math.abs(place.latitudeDeg) > 89.99) return place;
    const reached = forward(place);
    const eastM = wanted.eastingM - reached.eastingM;
    const northM = wanted.northingM - reached.northingM;
    if (Math.hypot(eastM, northM) < GOOD_ENOUGH_M) return place;
    const d = derivatives(place, forward);
    const determinant = d.eastByLon * d.northByLat - d.eastByLat * d.northByLon;
    place = {
      latitudeDeg: place.latitudeDeg + (d.eastByLon * northM - d.northByLon * eastM) / determinant,
      longitudeDeg:
        place.longitudeDeg + (d.northByLat * eastM - d.eastByLat * northM) / determinant,
    };
  }
  return place;
}

/** Scales along meridian and parallel that differ by less belong to a conformal projection. */
const CONFORMAL_TOLERANCE = 1e-7;

/**
 * Convergence and scales from small steps.
 *
 * Accuracy: 1e-8° and 1e-9 for places away from the poles.
 */
function numericFactors(
  place: PlanPosition,
  ellipsoid: Ellipsoid,
  forward: Projection['forward'],
): PlanFactors {
  const d = derivatives(place, forward);
  const meridianM = meridianRadiusM(place, ellipsoid) * RADIANS_PER_DEGREE;
  const parallelM =
    primeVerticalRadiusM(place, ellipsoid) *
    Math.cos(place.latitudeDeg * RADIANS_PER_DEGREE) *
    RADIANS_PER_DEGREE;
  const meridianScale = Math.hypot(d.eastByLat, d.northByLat) / meridianM;
  const parallelScale = Math.hypot(d.eastByLon, d.northByLon) / parallelM;
  // Directions of the images of meridian and parallel: at right angles when conformal.
  const skew = (d.eastByLat * d.eastByLon + d.northByLat * d.northByLon) / (meridianM * parallelM);
  const conformal =
    Math.abs(meridianScale - parallelScale) < CONFORMAL_TOLERANCE &&
    Math.abs(skew) < CONFORMAL_TOLERANCE;
  return {
    convergenceDeg: -Math.atan2(d.eastByLat, d.northByLat) * DEGREES_PER_RADIAN,
    pointScale: conformal ? (meridianScale + parallelScale) / 2 : undefined,
    meridianScale,
    parallelScale,
  };
}
