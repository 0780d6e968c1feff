/** A text that could not be read as a quantity: what stands there, and what to write instead. */
export interface RefusedQuantity {
  readonly kind: 'refused';
  /** A finished part of a message: "found …; write …". */
  readonly message: string;
}

export interface ReadLength {
  readonly kind: 'length';
  readonly lengthM: number;
  /** Value of one unit in the last digit written: 0.001 for "1.543 m", 0.01 ft for "5.06 ft". */
  readonly stepM: number;
  readonly unit: LengthUnit;
}

export interface ReadNumber {
  readonly kind: 'number';
  readonly value: number;
}

export type LengthUnit = 'm' | 'cm' | 'mm' | 'ft' | 'us-ft' | 'in';

/**
 * Metres per unit.
 *
 * Source: international yard and pound agreement of 1959 (ft = 0.3048 m exactly, in = 0.0254 m);
 * U.S. survey foot = 1200/3937 m, Mendenhall Order of 1893, Federal Register 85 FR 62698 (2020).
 */
export const METRES_PER_UNIT: Readonly<Record<LengthUnit, number>> = {
  m: 1,
  cm: 0.01,
  mm: 0.001,
  ft: 0.3048,
  'us-ft': 1200 / 3937,
  in: 0.0254,
};

/** How people write units, and the unit that they should write. */
const OTHER_SPELLINGS: Readonly<Record<string, LengthUnit>> = {
  metre: 'm',
  metres: 'm',
  meter: 'm',
  meters: 'm',
  feet: 'ft',
  foot: 'ft',
  "'": 'ft',
  ift: 'ft',
  sft: 'us-ft',
  usft: 'us-ft',
  ftus: 'us-ft',
  us_ft: 'us-ft',
  '"': 'in',
  inch: 'in',
  inches: 'in',
  millimetre: 'mm',
  millimetres: 'mm',
  millimeter: 'mm',
  millimeters: 'mm',
};

const UNIT_LIST = 'm, cm, mm, ft, us-ft or in';
const NUMBER = /^[+-]?\d+(?:\.\d+)?$/;

/** A length with its unit, such as "1.543 m", "12mm" or "5.062 us-ft". */
export function readLength(text: string): ReadLength | RefusedQuantity {
  const {number, unit} = splitUnit(text);
  const value = readNumber(number);
  if (value.kind === 'refused') {
    if (!/\d/.test(number)) {
      return refused(
        `expected a length with its unit, found "${text}"; write for example "1.543 m"`,
      );
    }
    return refused(`${value.message} ${knownUnit(unit) ?? 'm'}`);
  }
  if (unit === '') {
    return refused(
      `found "${text}" without a unit; write "${number} m" if metres are meant (units: ${UNIT_LIST})`,
    );
  }
  if (!isUnit(unit)) {
    const known = knownUnit(unit);
    const write = known === undefined ? `one of ${UNIT_LIST}` : `"${number} ${known}"`;
    return refused(`found the unit "${unit}"; write ${write}`);
  }
  // The inverse of a power of ten is exact where the product with 0.001 is not: 3 mm is 0.003 m.
  const scale = METRES_PER_UNIT[unit];
  const lengthM =
    unit === 'mm' ? value.value / 1000 : unit === 'cm' ? value.value / 100 : value.value * scale;
  return {kind: 'length', lengthM, stepM: stepOf(number) * scale, unit};
}

/** A reading as it was written, "5.715 ft", with metres behind any other unit. */
export function lengthAsWritten({lengthM, stepM, unit}: ReadLength): string {
  const scale = METRES_PER_UNIT[unit];
  const decimals = Math.max(0, Math.round(-Math.log10(stepM / scale)));
  const text = `${(lengthM / scale).toFixed(decimals)} ${unit}`;
  return unit === 'm' ? text : `${text} (${lengthM.toFixed(4)} m)`;
}

/** A plain decimal number with a decimal point. */
export function readNumber(text: string): ReadNumber | RefusedQuantity {
  const trimmed = text.trim();
  // Adding zero turns −0 into 0, which the result may not hold.
  if (NUMBER.test(trimmed)) return {kind: 'number', value: Number(trimmed) + 0};
  const mended = trimmed.replace(/[\u2212\u2013]/g, '-');
  if (NUMBER.test(mended)) {
    return refused(`found a long dash in "${trimmed}"; write the sign as a hyphen: ${mended}`);
  }
  if (/^[+-]?\d+,\d+$/.test(mended)) {
    return refused(`found a decimal comma in "${trimmed}"; write ${mended.replace(',', '.')}`);
  }
  const joined = mended.replace(/[\s'\u2019_,](?=\d{3}(?!\d))/g, '');
  if (NUMBER.test(joined)) {
    return refused(`found "${trimmed}" with digits in groups; write ${joined}`);
  }
  const whole = mended.replace(/^([+-]?)\./, '$10.').replace(/\.$/, '');
  if (NUMBER.test(whole)) {
    return refused(`found "${trimmed}" without a digit beside the point; write ${whole}`);
  }
  return refused(`expected a number, found "${trimmed}"; write it with a decimal point, as 12.345`);
}

/** A velocity component, such as "21.3 mm/yr" or "0.0213 m/yr", in metres per year. */
export function readRate(text: string): ReadLength | RefusedQuantity {
  const rate = /^(.*\S)\s*\/\s*yr$/.exec(text.trim());
  if (rate === null) {
    const number = splitUnit(text).number;
    return refused(
      `expected a velocity, found "${text}"; write it per year, as "${number} mm/yr" or "${number} m/yr"`,
    );
  }
  return readLength(rate[1] ?? '');
}

export function isUnit(text: string): text is LengthUnit {
  return Object.hasOwn(METRES_PER_UNIT, text);
}

function splitUnit(text: string): {readonly number: string; readonly unit: string} {
  const parts = /^(.*?)\s*([a-z'"_/-]*[a-z'"])?$/i.exec(text.trim());
  return {number: parts?.[1] ?? '', unit: parts?.[2] ?? ''};
}

function knownUnit(unit: string): LengthUnit | undefined {
  const lower = unit.toLowerCase();
  return isUnit(lower) ? lower : OTHER_SPELLINGS[lower.replace('-', '')];
}

/** One unit in the last digit: 0.001 for "1.543", 1 for "12". */
function stepOf(number: string): number {
  const point = number.indexOf('.');
  // Read as a decimal, since 10 ** -4 is not the number nearest to 0.0001.
  return point < 0 ? 1 : Number(`1e-${number.length - point - 1}`);
}

function refused(message: string): RefusedQuantity {
  return {kind: 'refused', message};
}
