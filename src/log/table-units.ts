export type Measure = 'length' | 'variance' | 'angle' | 'duration';

/** A unit that stands in a column name, with its factor to metres, m², degrees or seconds. */
export interface Unit {
  readonly name: string;
  readonly measure: Measure;
  readonly factor: number;
  /** Degrees, minutes and seconds in one field. */
  readonly sexagesimal: boolean;
}

const DEGREES_PER_RADIAN = 180 / Math.PI;

/** By name without blanks, hyphens and underscores, in lower case. */
const UNITS: ReadonlyMap<string, Unit> = new Map([
  ...unit('length', 1, 'm metre metres meter meters'),
  ...unit('length', 0.1, 'dm'),
  ...unit('length', 0.01, 'cm'),
  ...unit('length', 0.001, 'mm'),
  ...unit('length', 1000, 'km'),
  // The international foot of 1959 is exact; source: IOGP EPSG dataset, units 9002 and 9003.
  ...unit('length', 0.3048, 'ft foot feet'),
  ...unit('length', 1200 / 3937, 'usft ftus usfoot usfeet ussurveyfoot ussurveyfeet'),
  ...unit('variance', 1, 'm2 m^2 m²'),
  ...unit('variance', 1e-4, 'cm2 cm^2 cm²'),
  ...unit('variance', 1e-6, 'mm2 mm^2 mm²'),
  ...unit('angle', 1, 'deg degree degrees decimaldegrees °'),
  ...unit('angle', DEGREES_PER_RADIAN, 'rad radian radians'),
  ...unit('angle', 1, 'dms', true),
  ...unit('duration', 1, 's sec secs second seconds'),
  ...unit('duration', 0.001, 'ms'),
  ...unit('duration', 60, 'min minutes'),
  ...unit('duration', 3600, 'h hours'),
  ...unit('duration', 86_400, 'd days'),
]);

function unit(measure: Measure, factor: number, names: string, sexagesimal = false) {
  return names
    .split(' ')
    .map((name): [string, Unit] => [name, {name, measure, factor, sexagesimal}]);
}

/** The unit of that name; undefined when there is none. */
export function unitNamed(text: string): Unit | undefined {
  return UNITS.get(text.toLowerCase().replace(/[\s_-]/g, ''));
}
