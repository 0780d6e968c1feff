import {UsageError} from '../errors.ts';
import {type Ellipsoid, ellipsoid, GRS80, WGS84} from './ellipsoid.ts';
import {type PlanPosition, utmZoneOf} from './transverse-mercator.ts';

/** A map projection with its parameters, understood and checked; `projection.ts` computes it. */
export interface GridDefinition {
  /** As it is printed, such as "UTM zone 32N" or "EPSG:25832". */
  readonly name: string;
  /** The PROJ name of the method. */
  readonly method: string;
  readonly ellipsoid: Ellipsoid;
  /** Parameters by their PROJ names, degrees and metres; `true` for those without a value. */
  readonly parameters: Readonly<Record<string, number | true>>;
  /** What the grid prints its coordinates in; ours are always metres. */
  readonly unit: {readonly name: string; readonly lengthM: number};
  /** Directions of its first two axes, such as "en" or, south-orientated, "ws". */
  readonly axes: string;
  /** Frames whose coordinates the grid is made for, as beginnings of names; null: not said. */
  readonly frames: readonly string[] | null;
  /** Parts of the definition that were left aside: datum shifts belong to the frames. */
  readonly leftAside: readonly string[];
}

/** What is known about the position when the grid leaves something open. */
export interface GridContext {
  /** For the zone of "UTM" alone; null: nowhere in particular. */
  readonly place: PlanPosition | null;
  /** For grids named without an ellipsoid. */
  readonly ellipsoid: Ellipsoid;
}

const METRE = {name: 'm', lengthM: 1};
const UNITS: Readonly<Record<string, number>> = {
  m: 1,
  km: 1000,
  ft: 0.3048,
  'us-ft': 1200 / 3937,
};

/** Methods whose results were compared with PROJ, and the parameters they cannot do without. */
const METHODS: Readonly<Record<string, readonly string[]>> = {
  utm: ['zone'],
  tmerc: ['lon_0'],
  etmerc: ['lon_0'],
  lcc: ['lon_0', 'lat_1'],
  aea: ['lon_0', 'lat_1', 'lat_2'],
  laea: ['lon_0', 'lat_0'],
  stere: ['lon_0', 'lat_0'],
  sterea: ['lon_0', 'lat_0'],
  omerc: ['lonc', 'lat_0', 'alpha'],
  somerc: ['lon_0', 'lat_0'],
  krovak: ['lon_0', 'lat_0'],
  cass: ['lon_0', 'lat_0'],
  poly: ['lon_0', 'lat_0'],
  nzmg: ['lon_0', 'lat_0'],
  merc: ['lon_0'],
};

const NUMERIC =
  /^(zone|lat_0|lat_1|lat_2|lat_ts|lon_0|lonc|alpha|gamma|k|k_0|x_0|y_0|a|b|rf|f|R|to_meter)$/;
const SWITCH = /^(south|no_uoff|no_off)$/;
const WITHOUT_EFFECT = /^(no_defs|wktext|type|over|approx)$/;
const DATUM_SHIFT = /^(towgs84|nadgrids|geoidgrids|vunits|vto_meter)$/;

/** Ellipsoids by their PROJ names: semi-major axis and 1/f, or semi-minor axis where that defines. */
const ELLIPSOIDS: Readonly<
  Record<string, readonly [aM: number, shape: 'rf' | 'b', value: number]>
> = {
  airy: [6_377_563.396, 'b', 6_356_256.909_237_285],
  mod_airy: [6_377_340.189, 'b', 6_356_034.446],
  aust_SA: [6_378_160, 'rf', 298.25],
  bessel: [6_377_397.155, 'rf', 299.152_812_8],
  bess_nam: [6_377_483.865, 'rf', 299.152_812_8],
  clrk66: [6_378_206.4, 'b', 6_356_583.8],
  clrk80ign: [6_378_249.2, 'rf', 293.466_021_293_626_5],
  GRS67: [6_378_160, 'rf', 298.247_167_427],
  intl: [6_378_388, 'rf', 297],
  krass: [6_378_245, 'rf', 298.3],
  WGS66: [6_378_145, 'rf', 298.25],
  WGS72: [6_378_135, 'rf', 298.26],
  GSK2011: [6_378_136.5, 'rf', 298.256_415_1],
  PZ90: [6_378_136, 'rf', 298.257_84],
};

/**
 * The grid that a text means: "UTM" (the zone of the place), "UTM 32N", "EPSG:25832" or a PROJ
 * string such as "+proj=lcc +lat_0=46.5 … +ellps=GRS80".
 *
 * EPSG codes are derived by rule for the UTM families, and known for a few national grids whose
 * definitions their agencies publish.
 *
 * @throws UsageError that says what is wrong and what to write
 */
export function parseGrid(text: string, context: GridContext): GridDefinition {
  const trimmed = text.trim();
  if (/^\+|\+proj=/.test(trimmed)) return fromProjString(trimmed, trimmed, null);
  const code = /^(?:urn:ogc:def:crs:)?EPSG:{1,2}(\d+)$/i.exec(trimmed)?.[1];
  if (code !== undefined) return fromEpsgCode(Number(code));
  const utm = /^UTM(?:[\s-]*(?:zone)?\s*(\d{1,2})\s*([NS]))?$/i.exec(trimmed);
  if (utm === null) {
    if (/^UTM/i.test(trimmed)) {
      throw new UsageError(`need a UTM zone with its hemisphere, such as UTM 32N, found "${text}"`);
    }
    throw new UsageError(
      `need a grid as UTM, UTM 32N, an EPSG code of a UTM family or a PROJ string, found "${text}"`,
    );
  }
  if (utm[1] === undefined) return automaticUtm(context);
  return utmDefinition(Number(utm[1]), utm[2]?.toUpperCase() === 'S', context.ellipsoid, null);
}

function automaticUtm({place, ellipsoid: onEllipsoid}: GridContext): GridDefinition {
  if (place === null)
    throw new UsageError('need a UTM zone, such as UTM 32N: no position is known');
  const zone = utmZoneOf(place);
  if (zone === undefined) {
    throw new UsageError(
      `UTM is used between 80° south and 84° north, the position is at latitude ` +
        `${place.latitudeDeg.toFixed(2)}; write a PROJ string of a polar stereographic grid`,
    );
  }
  return utmDefinition(zone.zone, zone.hemisphere === 'S', onEllipsoid, null);
}

function utmDefinition(
  zone: number,
  south: boolean,
  onEllipsoid: Ellipsoid,
  named: {name: string; frames: readonly string[]} | null,
): GridDefinition {
  if (zone < 1 || zone > 60) throw new UsageError(`need a UTM zone from 1 to 60, found ${zone}`);
  return {
    name: named?.name ?? `UTM zone ${zone}${south ? 'S' : 'N'}`,
    method: 'utm',
    ellipsoid: onEllipsoid,
    parameters: south ? {zone, south: true} : {zone},
    unit: METRE,
    axes: 'en',
    frames: named?.frames ?? null,
    leftAside: [],
  };
}

/** Codes of a UTM family: first code, its zone, number of codes, hemisphere. */
interface UtmFamily {
  readonly first: number;
  readonly zone: number;
  readonly count: number;
  readonly south: boolean;
  readonly ellipsoid: Ellipsoid;
  readonly frames: readonly string[];
}

const OF_WGS84 = ['WGS84', 'ITRF', 'IGS', 'IGB'];
const OF_ETRS89 = ['ETRF', 'ETRS89'];

function family(
  first: number,
  zone: number,
  count: number,
  hemisphere: 'N' | 'S',
  frames: readonly string[],
  onEllipsoid = GRS80,
): UtmFamily {
  return {first, zone, count, south: hemisphere === 'S', ellipsoid: onEllipsoid, frames};
}

/** The numbering of the UTM families of the EPSG dataset, checked against PROJ 9.1.1. */
const UTM_FAMILIES: readonly UtmFamily[] = [
  family(32601, 1, 60, 'N', OF_WGS84, WGS84),
  family(32701, 1, 60, 'S', OF_WGS84, WGS84),
  family(25828, 28, 11, 'N', OF_ETRS89),
  family(7846, 46, 14, 'S', ['GDA2020']),
  family(28348, 48, 11, 'S', ['GDA94']),
  family(26901, 1, 23, 'N', ['NAD83']),
  family(6328, 59, 2, 'N', ['NAD83(2011)']),
  family(6330, 1, 19, 'N', ['NAD83(2011)']),
  family(31965, 11, 12, 'N', ['SIRGAS2000']),
  family(31977, 17, 9, 'S', ['SIRGAS2000']),
];

/** National grids, each as its agency publishes it. */
const NATIONAL_GRIDS: Readonly<Record<number, readonly [proj: string, frames: readonly string[]]>> =
  {
    // Land Information New Zealand, LINZS25002.
    2193: [
      '+proj=tmerc +lat_0=0 +lon_0=173 +k=0.9996 +x_0=1600000 +y_0=10000000 +ellps=GRS80',
      ['NZGD2000'],
    ],
    // Institut national de l'information géographique et forestière, Lambert-93.
    2154: [
      '+proj=lcc +lat_0=46.5 +lon_0=3 +lat_1=49 +lat_2=44 +x_0=700000 +y_0=6600000 +ellps=GRS80',
      ['ETRS89-FRA', 'ETRF'],
    ],
    // Lantmäteriet, SWEREF 99 TM.
    3006: ['+proj=tmerc +lat_0=0 +lon_0=15 +k=0.9996 +x_0=500000 +y_0=0 +ellps=GRS80', OF_ETRS89],
    // JHS 197, ETRS-TM35FIN.
    3067: ['+proj=tmerc +lat_0=0 +lon_0=27 +k=0.9996 +x_0=500000 +y_0=0 +ellps=GRS80', OF_ETRS89],
  };

function fromEpsgCode(code: number): GridDefinition {
  for (const {first, zone, count, south, ellipsoid: onEllipsoid, frames} of UTM_FAMILIES) {
    if (code < first || code >= first + count) continue;
    const number = zone + code - first;
    const name = `EPSG:${code}, UTM zone ${number}${south ? 'S' : 'N'}`;
    return utmDefinition(number, south, onEllipsoid, {name, frames});
  }
  const national = NATIONAL_GRIDS[code];
  if (national !== undefined) return fromProjString(national[0], `EPSG:${code}`, national[1]);
  throw new UsageError(
    `EPSG:${code} is not a UTM grid that stillmark derives by rule; write its definition as a PROJ ` +
      'string, such as "+proj=lcc +lat_0=46.5 +lon_0=3 +lat_1=49 +lat_2=44 +x_0=700000 ' +
      '+y_0=6600000 +ellps=GRS80"',
  );
}

function fromProjString(
  text: string,
  name: string,
  frames: readonly string[] | null,
): GridDefinition {
  const parts = partsOf(text);
  const method = parts.get('proj') ?? '';
  const needed = METHODS[method];
  if (needed === undefined) {
    const known = Object.keys(METHODS).join(', ');
    throw new UsageError(
      `need +proj= one of ${known}, found "${method}" in "${text}"; pipelines and datum shifts ` +
        'belong to the frames',
    );
  }
  const parameters: Record<string, number | true> = {};
  const leftAside: string[] = [];
  for (const [key, value] of parts) {
    if (NUMERIC.test(key)) parameters[key] = numericValue(key, value, text);
    else if (SWITCH.test(key)) parameters[key] = true;
    else if (DATUM_SHIFT.test(key)) leftAside.push(`+${key}`);
    else if (!WITHOUT_EFFECT.test(key) && !/^(proj|ellps|datum|units|axis)$/.test(key)) {
      throw new UsageError(`unknown part "+${key}" in "${text}"; leave it out or correct it`);
    }
  }
  for (const key of needed) {
    if (parameters[key] === undefined) throw new UsageError(`need +${key}= in "${text}"`);
  }
  const zone = parameters.zone;
  if (typeof zone === 'number' && !(Number.isInteger(zone) && zone >= 1 && zone <= 60)) {
    throw new UsageError(`need +zone= from 1 to 60 in "${text}", found ${zone}`);
  }
  return {
    name,
    method,
    ellipsoid: ellipsoidOf(parts, parameters, text),
    parameters: withoutEllipsoid(parameters),
    unit: unitOf(parts.get('units'), parameters, text),
    axes: axesOf(parts.get('axis'), text),
    frames,
    leftAside,
  };
}

function partsOf(text: string): Map<string, string> {
  const parts = new Map<string, string>();
  for (const part of text.split(/\s+/)) {
    const [, key, value = ''] = /^\+?(\w+)(?:=(\S+))?$/.exec(part) ?? [];
    if (key === undefined) throw new UsageError(`cannot read "${part}" in "${text}"`);
    if (key === 'step' || key === 'pipeline' || key === 'init' || parts.has(key)) {
      throw new UsageError(`need one projection without steps, found "+${key}" in "${text}"`);
    }
    parts.set(key, value);
  }
  return parts;
}

function numericValue(key: string, value: string, text: string): number {
  if (/^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(value)) return Number(value);
  throw new UsageError(`need a decimal number for +${key}=, found "${value}" in "${text}"`);
}

function ellipsoidOf(
  parts: ReadonlyMap<string, string>,
  {a, b, rf, f, R}: Readonly<Record<string, number | true>>,
  text: string,
): Ellipsoid {
  if (typeof R === 'number') return ellipsoid(R, Number.POSITIVE_INFINITY);
  if (typeof a === 'number') {
    if (typeof rf === 'number') return ellipsoid(a, rf === 0 ? Number.POSITIVE_INFINITY : rf);
    if (typeof b === 'number')
      return ellipsoid(a, a === b ? Number.POSITIVE_INFINITY : a / (a - b));
    if (typeof f === 'number') return ellipsoid(a, 1 / f);
    throw new UsageError(`need +rf= or +b= beside +a= in "${text}"`);
  }
  const name = parts.get('ellps') ?? parts.get('datum');
  if (name === undefined) {
    throw new UsageError(`need an ellipsoid, such as +ellps=GRS80 or +a= and +rf=, in "${text}"`);
  }
  if (name === 'WGS84') return WGS84;
  if (name === 'GRS80' || name === 'NAD83') return GRS80;
  const known = ELLIPSOIDS[name];
  if (known === undefined) {
    const names = ['WGS84', 'GRS80', ...Object.keys(ELLIPSOIDS)].join(', ');
    throw new UsageError(`unknown ellipsoid "${name}"; write +a= and +rf=, or one of ${names}`);
  }
  const [aM, shape, value] = known;
  return ellipsoid(aM, shape === 'rf' ? value : aM / (aM - value), name);
}

function withoutEllipsoid(
  parameters: Readonly<Record<string, number | true>>,
): Record<string, number | true> {
  const {a, b, rf, f, R, to_meter, ...rest} = parameters;
  return rest;
}

function unitOf(
  name: string | undefined,
  {to_meter: toMetre}: Readonly<Record<string, number | true>>,
  text: string,
): GridDefinition['unit'] {
  if (typeof toMetre === 'number') return {name: name ?? `${toMetre} m`, lengthM: toMetre};
  if (name === undefined) return METRE;
  const lengthM = UNITS[name];
  if (lengthM === undefined) {
    const known = Object.keys(UNITS).join(', ');
    throw new UsageError(
      `need +units= one of ${known}, or +to_meter=, found "${name}" in "${text}"`,
    );
  }
  return {name, lengthM};
}

function axesOf(axis: string | undefined, text: string): string {
  if (axis === undefined) return 'en';
  if (/^([ew][ns]|[ns][ew])u$/.test(axis)) return axis.slice(0, 2);
  throw new UsageError(`need +axis= such as enu or wsu, found "${axis}" in "${text}"`);
}

/** The two numbers as the grid writes them: its unit, its order and directions of axes. */
export function axisValuesFromEastNorth(
  {axes, unit}: GridDefinition,
  {eastingM, northingM}: {readonly eastingM: number; readonly northingM: number},
): readonly [number, number] {
  const value = (axis: string | undefined): number => {
    const alongM = axis === 'e' || axis === 'w' ? eastingM : northingM;
    return (axis === 'e' || axis === 'n' ? alongM : -alongM) / unit.lengthM;
  };
  return [value(axes[0]), value(axes[1])];
}

/** Easting and northing of the two numbers of the grid. */
export function eastNorthFromAxisValues(
  {axes, unit}: GridDefinition,
  values: readonly [number, number],
): {readonly eastingM: number; readonly northingM: number} {
  const east = axes[0] === 'e' || axes[0] === 'w' ? 0 : 1;
  const signed = (index: 0 | 1): number => {
    const towards = axes[index] === 'e' || axes[index] === 'n' ? 1 : -1;
    return values[index] * towards * unit.lengthM;
  };
  return {eastingM: signed(east), northingM: signed(east === 0 ? 1 : 0)};
}

/**
 * Refuses a position that the grid is not made for: another ellipsoid, or another frame.
 *
 * WGS 84 and GRS 80 differ by 0.1 mm at most and count as one.
 *
 * @param frame name of the position's frame; null: not known
 * @throws UsageError that says what to do
 */
export function requireGridFits(
  definition: GridDefinition,
  position: {readonly ellipsoid: Ellipsoid; readonly frame: string | null},
): void {
  const {ellipsoid: ours, frames, name} = definition;
  const theirs = position.ellipsoid;
  if (
    Math.abs(ours.semiMajorAxisM - theirs.semiMajorAxisM) > 1e-3 ||
    Math.abs(ours.semiMinorAxisM - theirs.semiMinorAxisM) > 1e-3
  ) {
    throw new UsageError(
      `the grid ${name} lies on the ellipsoid ${ours.name}, the position on ${theirs.name}; ` +
        'transform the position to the datum of the grid with the national service first',
    );
  }
  const frame = position.frame?.toUpperCase().replace(/\s/g, '') ?? null;
  if (frames === null || frame === null) return;
  if (frames.some((beginning) => frame.startsWith(beginning))) return;
  throw new UsageError(
    `${name} is a grid of ${frames.join(', ')}, the position is in ${position.frame}; transform it ` +
      'first, or write the projection as a PROJ string if it is used with that frame',
  );
}
