import {type AngleKind, parseAngle, sexagesimal} from '../geodesy/angle.ts';

/** A number as it was read, or why it cannot be. */
export type ReadNumber = number | string;

const PLAIN = /^[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?$/;

/** A number in a plain field; the text says what was expected instead. */
export function readPlainNumber(text: string, what: string, unit: string): ReadNumber {
  if (PLAIN.test(text)) return Number(text);
  if (text === '') return `need ${what} in ${unit}, found nothing`;
  return `need ${what} in ${unit}, found "${text}"${commaHint(text)}`;
}

/** An angle in decimal degrees or in degrees, minutes and seconds. */
export function readAngle(text: string, kind: AngleKind): ReadNumber {
  // The limits of `parseAngle` for a longitude are wider; a plain number within these needs no parser.
  const limit = kind === 'latitude' ? 90 : 180;
  if (PLAIN.test(text)) {
    const degrees = Number(text);
    if (degrees >= -limit && degrees <= limit) return degrees;
  }
  const read = parseAngle(text, kind);
  return read.kind === 'refused' ? `${read.message}${commaHint(text)}` : read.degrees;
}

function commaHint(text: string): string {
  return /^[-+]?\d+,\d+$/.test(text) ? '; write a decimal point' : '';
}

/** How the numbers of a converted position are written. */
export interface NumberStyle {
  /** Decimals of a metre; degrees get as many as say the same. */
  readonly decimals: number;
  readonly angles: 'deg' | 'dms';
}

/** A degree is about 100 km, an arc second 30 m. */
const MORE_DECIMALS_OF_DEGREE = 5;
const MORE_DECIMALS_OF_SECOND = 1;

/** The text of a length, without a minus before zero. */
export function lengthText(value: number, {decimals}: NumberStyle): string {
  return withoutNegativeZero(value.toFixed(decimals));
}

/** The text of an angle, readable again by `readAngle`. */
export function angleText(
  degrees: number,
  kind: AngleKind,
  {decimals, angles}: NumberStyle,
): string {
  if (angles === 'deg') {
    return withoutNegativeZero(degrees.toFixed(decimals + MORE_DECIMALS_OF_DEGREE));
  }
  const secondDecimals = Math.min(6, decimals + MORE_DECIMALS_OF_SECOND);
  const parts = sexagesimal(degrees, secondDecimals);
  const [positive, negative] = kind === 'latitude' ? 'NS' : 'EW';
  const minutes = String(parts.minutes).padStart(2, '0');
  const seconds = parts.seconds.toFixed(secondDecimals).padStart(secondDecimals + 3, '0');
  return `${parts.degrees} ${minutes} ${seconds} ${parts.negative ? negative : positive}`;
}

function withoutNegativeZero(text: string): string {
  return text.charCodeAt(0) === 45 && !/[1-9]/.test(text) ? text.slice(1) : text;
}
