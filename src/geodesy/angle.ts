export const RADIANS_PER_DEGREE = Math.PI / 180;
export const DEGREES_PER_RADIAN = 180 / Math.PI;

export interface ParsedAngle {
  readonly kind: 'angle';
  readonly degrees: number;
}

/** An angle that was not understood, with the reason in words for the person who wrote it. */
export interface RefusedAngle {
  readonly kind: 'refused';
  readonly message: string;
}

export type AngleKind = 'latitude' | 'longitude';

/** Largest magnitudes; longitudes are accepted from −180 to 360 as written and not reduced. */
const LIMITS: Record<AngleKind, readonly [number, number]> = {
  latitude: [-90, 90],
  longitude: [-180, 360],
};
const LETTERS: Record<AngleKind, string> = {latitude: 'NS', longitude: 'EW'};

const NUMBER = String.raw`\d+(?:\.\d*)?|\.\d+`;
const DECIMAL = new RegExp(String.raw`^(${NUMBER})\s*(?:°|º|d|deg)?$`, 'i');
const PARTS = new RegExp(
  String.raw`^(\d+)(?:\s*[°ºd:]\s*|\s+)(${NUMBER})(?:\s*['′’m:]\s*|\s+|$)(?:(${NUMBER})\s*(?:["″”s]|''|′′)?)?$`,
  'i',
);

/**
 * A latitude or longitude as people write it, in degrees.
 *
 * Understands decimal degrees and degrees-minutes-seconds (or degrees and minutes) set apart by
 * °′″, d m s, colons or blanks; one sign in front or one hemisphere letter at either end. The sign
 * belongs to the whole angle: −0 30 00 is −0.5. Minutes and seconds must be below 60, and only the
 * last part may have decimals. A decimal comma is refused, since a comma also separates latitude
 * from longitude.
 */
export function parseAngle(text: string, kind: AngleKind): ParsedAngle | RefusedAngle {
  const trimmed = text.trim();
  if (trimmed === '') return refused(`need a ${kind} in degrees, found nothing`);
  const body = takeSign(trimmed, kind);
  if (body.kind === 'refused') return body;
  const magnitude = magnitudeOf(body.text, trimmed, kind);
  if (magnitude.kind === 'refused') return magnitude;
  const degrees = body.negative && magnitude.degrees !== 0 ? -magnitude.degrees : magnitude.degrees;
  const [lowest, highest] = LIMITS[kind];
  if (degrees < lowest || degrees > highest) {
    return refused(`need a ${kind} between ${lowest} and ${highest} degrees, found "${trimmed}"`);
  }
  return {kind: 'angle', degrees};
}

interface Unsigned {
  readonly kind: 'unsigned';
  readonly text: string;
  readonly negative: boolean;
}

function takeSign(text: string, kind: AngleKind): Unsigned | RefusedAngle {
  const parts = /^([NSEW])?\s*([+\-−])?\s*(.*?)\s*([NSEW])?$/i.exec(text);
  const before = parts?.[1]?.toUpperCase();
  const after = parts?.[4]?.toUpperCase();
  const sign = parts?.[2];
  const letter = before ?? after;
  // A lower-case s can be the unit of seconds: 10d20m30s is no southern angle.
  if (before === undefined && after === 'S' && /m\s*[\d.]+\s*s$/.test(text)) {
    const whole = /^([+\-−])?\s*(.*)$/.exec(text);
    return {kind: 'unsigned', text: whole?.[2] ?? '', negative: isMinus(whole?.[1])};
  }
  if (before !== undefined && after !== undefined) {
    return refused(`need one hemisphere letter, found two in "${text}"`);
  }
  if (letter !== undefined && sign !== undefined) {
    return refused(`need a sign or a hemisphere letter, found both in "${text}"`);
  }
  if (letter !== undefined && !LETTERS[kind].includes(letter)) {
    const [positive, negative] = LETTERS[kind];
    return refused(`need ${positive} or ${negative} for a ${kind}, found ${letter} in "${text}"`);
  }
  const negative = isMinus(sign) || letter === 'S' || letter === 'W';
  return {kind: 'unsigned', text: parts?.[3] ?? '', negative};
}

function isMinus(sign: string | undefined): boolean {
  return sign === '-' || sign === '−';
}

function magnitudeOf(body: string, whole: string, kind: AngleKind): ParsedAngle | RefusedAngle {
  const decimal = DECIMAL.exec(body);
  if (decimal !== null) return {kind: 'angle', degrees: Number(decimal[1])};
  const parts = PARTS.exec(body);
  if (parts === null) {
    const example = kind === 'latitude' ? '-33.8688 or 33 52 07.7 S' : '151.2093 or 151 12 33.5 E';
    return refused(`need a ${kind} such as ${example}, found "${whole}"`);
  }
  const minutes = Number(parts[2]);
  const seconds = Number(parts[3] ?? 0);
  if (parts[3] !== undefined && !Number.isInteger(minutes)) {
    return refused(`need whole minutes before seconds, found "${whole}"`);
  }
  if (minutes >= 60) return refused(`need minutes below 60, found ${parts[2]} in "${whole}"`);
  if (seconds >= 60) return refused(`need seconds below 60, found ${parts[3]} in "${whole}"`);
  // One division, of a sum that is exact for whole seconds, keeps the last bit.
  return {kind: 'angle', degrees: (Number(parts[1]) * 3600 + minutes * 60 + seconds) / 3600};
}

function refused(message: string): RefusedAngle {
  return {kind: 'refused', message};
}

/** An angle in the parts that are printed; `negative` stands apart because −0° 30′ has no −0. */
export interface Sexagesimal {
  readonly negative: boolean;
  readonly degrees: number;
  readonly minutes: number;
  /** Rounded to the decimals asked for, below 60. */
  readonly seconds: number;
}

/**
 * Splits degrees for printing with so many decimals of the second.
 *
 * Rounded once, in units of the last decimal, before splitting: 59.9999″ carries into the minutes
 * and the degrees. An angle that rounds to zero is not negative.
 *
 * @param secondDecimals 0 to 6, so that the count of units stays an exact integer
 */
export function sexagesimal(degrees: number, secondDecimals: number): Sexagesimal {
  const unitsPerSecond = 10 ** secondDecimals;
  const units = Math.round(Math.abs(degrees) * 3600 * unitsPerSecond);
  const unitsPerDegree = 3600 * unitsPerSecond;
  const unitsPerMinute = 60 * unitsPerSecond;
  const restOfDegree = units % unitsPerDegree;
  return {
    negative: degrees < 0 && units !== 0,
    degrees: Math.floor(units / unitsPerDegree),
    minutes: Math.floor(restOfDegree / unitsPerMinute),
    seconds: (restOfDegree % unitsPerMinute) / unitsPerSecond,
  };
}

/** The same angle between −180 (excluded) and 180. */
export function wrappedLongitudeDeg(longitudeDeg: number): number {
  const reduced = longitudeDeg % 360;
  if (reduced > 180) return reduced - 360;
  return reduced <= -180 ? reduced + 360 : reduced;
}
