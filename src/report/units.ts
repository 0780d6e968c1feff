/** How lengths are displayed; both feet are defined exactly. */
export type UnitChoice = 'm' | 'ft' | 'us-ft';

export interface LengthUnit {
  readonly name: string;
  readonly perM: number;
}

const MILLIMETRE: LengthUnit = {name: 'mm', perM: 1000};
const METRE: LengthUnit = {name: 'm', perM: 1};
/** International foot, 0.3048 m (1959); US survey foot, 1200/3937 m (1893). */
const FOOT: LengthUnit = {name: 'ft', perM: 1 / 0.3048};
const US_SURVEY_FOOT: LengthUnit = {name: 'ftUS', perM: 3937 / 1200};

/** The unit for coordinates and heights. */
export function largeUnit(choice: UnitChoice): LengthUnit {
  if (choice === 'ft') return FOOT;
  return choice === 'us-ft' ? US_SURVEY_FOOT : METRE;
}

/** The unit for offsets and scatter up to this size. */
export function unitFor(largestM: number, choice: UnitChoice): LengthUnit {
  return choice === 'm' && Math.abs(largestM) < 0.9995 ? MILLIMETRE : largeUnit(choice);
}

/** Decimals of an offset: tenths of a millimetre while small, then about three figures. */
export function offsetDecimals(largestM: number, unit: LengthUnit): number {
  const size = Math.abs(largestM);
  if (unit.name === 'mm') return size < 0.09995 ? 1 : 0;
  const finest = size < 0.1 ? 4 : size < 10 ? 3 : size < 100 ? 2 : size < 10_000 ? 1 : 0;
  return unit.name === 'm' ? Math.min(finest, 3) : finest;
}
