import {angle, bearing, choice, coordinateEpoch, length, number, rate, text} from './scalars.ts';
import {list, mapping, optional, required, type ValueOf} from './shape.ts';

/*
 * The keys of a marks file. They serve the YAML reader, the columns of a CSV file, and the messages.
 */

const EARTH_M = {least: -7e6, most: 7e6};
const GRID_M = {least: -5e7, most: 5e7};
/** From the deepest trench to an aircraft. */
const HEIGHT_M = {least: -12_000, most: 20_000};
const SIGMA_M = {least: 0, most: 1000};
const OFFSET_M = {least: -100_000, most: 100_000};

export const toleranceFields = {
  horizontalM: optional('horizontal', length({least: 1e-4, most: 1000}, '20 mm'), 'radius to hold'),
  eastM: optional('east', length({least: 1e-4, most: 1000}, '20 mm'), 'east difference to hold'),
  northM: optional('north', length({least: 1e-4, most: 1000}, '20 mm'), 'north difference to hold'),
  upM: optional('up', length({least: 1e-4, most: 1000}, '30 mm'), 'height difference to hold'),
  reason: optional('reason', text('site specification, clause 4'), 'who asks for it, and where'),
};

const velocityFields = {
  eastMPerYear: optional('east', rate(), 'velocity east'),
  northMPerYear: optional('north', rate(), 'velocity north'),
  upMPerYear: optional('up', rate(), 'velocity up'),
  xMPerYear: optional('x', rate(), 'geocentric velocity X'),
  yMPerYear: optional('y', rate(), 'geocentric velocity Y'),
  zMPerYear: optional('z', rate(), 'geocentric velocity Z'),
};

const standardUncertaintyFields = {
  eastM: optional('east', length(SIGMA_M, '3 mm'), 'one standard uncertainty (68 %) east'),
  northM: optional('north', length(SIGMA_M, '3 mm'), 'one standard uncertainty (68 %) north'),
  upM: optional('up', length(SIGMA_M, '6 mm'), 'one standard uncertainty (68 %) in height'),
  xM: optional('x', length(SIGMA_M, '3 mm'), 'one standard uncertainty (68 %) of X'),
  yM: optional('y', length(SIGMA_M, '3 mm'), 'one standard uncertainty (68 %) of Y'),
  zM: optional('z', length(SIGMA_M, '3 mm'), 'one standard uncertainty (68 %) of Z'),
};

const covarianceFields = {
  axes: required('axes', choice(['xyz', 'enu']), 'geocentric (xyz) or local (enu)'),
  unit: required('unit', choice(['m2', 'mm2']), 'square metres or square millimetres'),
  rows: required(
    'rows',
    list(list(number({least: -1e9, most: 1e9}, '2.25'), {most: 3}), {most: 3}),
    'three rows: the whole matrix, or its lower triangle',
  ),
};

const witnessFields = {
  name: required('name', text('old pillar, 3 m south'), 'what it is called or looks like'),
  distanceM: optional('distance', length({least: 0, most: 100_000}, '3.21 m'), 'plan distance'),
  bearingDeg: optional('bearing', bearing(), 'from the mark to the witness, clockwise'),
  bearingFrom: optional(
    'bearing from',
    choice(['true north', 'grid north', 'magnetic north']),
    'which north the bearing counts from',
  ),
  eastM: optional('east', length(OFFSET_M, '1.234 m'), 'east of the mark'),
  northM: optional('north', length(OFFSET_M, '-2.345 m'), 'north of the mark'),
  upM: optional('up', length(OFFSET_M, '0.12 m'), 'above the mark'),
};

/** What may also stand at the top of the file, for all marks that do not say otherwise. */
export const sharedFields = {
  frame: optional('frame', text('ITRF2020'), 'reference frame, with its realisation'),
  coordinateEpoch: optional(
    'coordinate epoch',
    coordinateEpoch(),
    'decimal year that the coordinates belong to, not the day of a survey',
  ),
  verticalDatum: optional('vertical datum', text('EVRF2019'), 'system of orthometric heights'),
  geoidModel: optional('geoid model', text('EGM2008'), 'model behind the separation'),
  projection: optional('projection', text('UTM 33 N'), 'map projection of easting and northing'),
  tolerance: optional('tolerance', mapping(toleranceFields, '{horizontal: 20 mm}'), 'what to hold'),
};

export const markFields = {
  name: required('name', text('PILLAR 4'), 'the name that --mark asks for'),
  otherNames: optional('other names', list(text('50137M001'), {most: 20}), 'numbers, old names'),
  description: optional('description', text('brass bolt in a concrete pillar'), 'free text'),
  latitudeDeg: optional(
    'latitude',
    angle('latitude'),
    'decimal degrees or degrees minutes seconds',
  ),
  longitudeDeg: optional('longitude', angle('longitude'), 'decimal or degrees minutes seconds'),
  xM: optional('x', length(EARTH_M, '-4052052.9688 m'), 'geocentric X'),
  yM: optional('y', length(EARTH_M, '4212835.9507 m'), 'geocentric Y'),
  zM: optional('z', length(EARTH_M, '-2545104.2663 m'), 'geocentric Z'),
  eastingM: optional('easting', length(GRID_M, '500123.456 m'), 'grid easting'),
  northingM: optional('northing', length(GRID_M, '5345678.901 m'), 'grid northing'),
  ellipsoidalHeightM: optional('ellipsoidal height', length(HEIGHT_M, '231.456 m'), 'h'),
  orthometricHeightM: optional(
    'orthometric height',
    length(HEIGHT_M, '186.789 m'),
    'H, above the vertical datum',
  ),
  separationM: optional(
    'separation',
    length({least: -120, most: 120}, '44.667 m'),
    'ellipsoidal minus orthometric height at the mark',
  ),
  ...sharedFields,
  velocity: optional(
    'velocity',
    mapping(velocityFields, '{east: 21.3 mm/yr, north: 14.9 mm/yr, up: 0.0 mm/yr}'),
    'east, north and up, or x, y and z',
  ),
  standardUncertainty: optional(
    'standard uncertainty',
    mapping(standardUncertaintyFields, '{east: 3 mm, north: 3 mm, up: 6 mm}'),
    'one standard uncertainty (68 %), not 95 %',
  ),
  covariance: optional(
    'covariance',
    mapping(covarianceFields, '{axes: enu, unit: mm2, rows: [[9], [1, 9], [0, 0, 36]]}'),
    'instead of the standard uncertainty',
  ),
  witnessMarks: optional(
    'witness marks',
    list(mapping(witnessFields, '{name: old pillar, distance: 3.21 m}'), {most: 100}),
    'what could be taken for the mark',
  ),
};

export const markShape = mapping(markFields, '"name: PILLAR 4"');
export type MarkEntry = ValueOf<typeof markFields>;
export type WitnessEntry = ValueOf<typeof witnessFields>;
export type SharedEntry = ValueOf<typeof sharedFields>;
