/**
 * How numbers are written: the only place where metres become millimetres, where a sign, a unit
 * and a number of digits are chosen.
 *
 * Prose uses the true minus and a no-break space before the unit; tables use the plain hyphen, so
 * that a pasted cell is still a number.
 */

const NO_BREAK_SPACE = '\u00a0';
const MINUS = '\u2212';

/** `toFixed` that never prints a negative zero. */
export function fixed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
}

/** A fixed-decimals number with a true minus, and a plus when `signed`. */
export function proseNumber(value: number, decimals: number, signed = false): string {
  const text = fixed(value, decimals);
  if (text.startsWith('-')) return MINUS + text.slice(1);
  return signed && Number(text) !== 0 ? `+${text}` : text;
}

export interface LengthScale {
  readonly unit: 'mm' | 'm' | 'km';
  readonly perM: number;
  readonly decimals: number;
}

/**
 * The unit and decimals in which a length, or a column of lengths up to this one, reads best: three
 * or four figures, never more than a tenth of a millimetre.
 */
export function lengthScale(largestM: number): LengthScale {
  const size = Math.abs(largestM);
  if (size < 0.09995) return {unit: 'mm', perM: 1000, decimals: 1};
  if (size < 0.9995) return {unit: 'mm', perM: 1000, decimals: 0};
  if (size < 99.995) return {unit: 'm', perM: 1, decimals: 2};
  if (size < 9999.5) return {unit: 'm', perM: 1, decimals: 0};
  return {unit: 'km', perM: 0.001, decimals: size < 99995 ? 2 : 0};
}

/** A length in prose, such as "15.2 mm" or "1.52 m". */
export function formatLength(valueM: number, signed = false): string {
  const scale = lengthScale(valueM);
  return `${proseNumber(valueM * scale.perM, scale.decimals, signed)}${NO_BREAK_SPACE}${scale.unit}`;
}

/** The finest length that is printed; rounded to less, an uncertainty would read as none. */
const LEAST_UNCERTAINTY_M = 0.0001;

/** An uncertainty as it is shown: rounded up to the finest length that is printed. */
export function shownUncertaintyM<T extends number | null>(valueM: T): T | number {
  return valueM !== null && valueM > 0 ? Math.max(valueM, LEAST_UNCERTAINTY_M) : valueM;
}

/** An uncertainty in prose; see `shownUncertaintyM`. */
export function formatUncertainty(valueM: number): string {
  return formatLength(shownUncertaintyM(valueM));
}

const HOURS_PER: readonly (readonly [unit: string, hours: number])[] = [
  ['hour', 1],
  ['day', 24],
];
const HOURS_PER_YEAR = 8766;
/** Half a millimetre still shows a digit that means something. */
const LEAST_RATE_SHOWN_M = 0.0005;

/** A rate by the shortest time in which it comes to something: "0.6 mm per day". */
export function formatRate(mPerHour: number, signed = false): string {
  const shown = HOURS_PER.find(([, hours]) => Math.abs(mPerHour) * hours >= LEAST_RATE_SHOWN_M);
  const [unit, hours] = shown ?? ['year', HOURS_PER_YEAR];
  return `${formatLength(mPerHour * hours, signed)} per ${unit}`;
}

/** A limit or setting that a person chose: no digits that were not given. */
export function formatGivenLength(valueM: number): string {
  const inMm = Number((valueM * 1000).toPrecision(9));
  return Math.abs(valueM) < 1
    ? `${inMm}${NO_BREAK_SPACE}mm`
    : `${Number(valueM.toPrecision(9))}${NO_BREAK_SPACE}m`;
}

/**
 * Decimals of a metre that a coordinate deserves: down to the last digit that its 95 % uncertainty
 * touches, and one more; never finer than 0.1 mm.
 */
export function coordinateDecimals(uncertainty95M: number | null): number {
  if (uncertainty95M === null || !(uncertainty95M > 0)) return 4;
  return Math.min(4, Math.max(0, Math.ceil(-Math.log10(uncertainty95M)) + 1));
}

/** A metre is about 1e-5 of a degree. */
export function degreeDecimals(metreDecimals: number): number {
  return metreDecimals + 5;
}

/** A metre is about 0.03 of an arc second. */
export function arcSecondDecimals(metreDecimals: number): number {
  return metreDecimals + 1;
}

/** Already split and rounded parts, as `splitDms` of geodesy yields them. */
export interface DmsParts {
  readonly negative: boolean;
  readonly degrees: number;
  readonly minutes: number;
  readonly seconds: number;
}

/** An angle as 55° 04′ 12.3456″ N. */
export function formatDms(parts: DmsParts, decimals: number, hemispheres: 'NS' | 'EW'): string {
  const width = decimals > 0 ? decimals + 3 : 2;
  const seconds = parts.seconds.toFixed(decimals).padStart(width, '0');
  const minutes = String(parts.minutes).padStart(2, '0');
  const letter = parts.negative ? hemispheres[1] : hemispheres[0];
  return `${parts.degrees}°${NO_BREAK_SPACE}${minutes}′${NO_BREAK_SPACE}${seconds}″${NO_BREAK_SPACE}${letter}`;
}

/** A span of time in the two units that matter: "2 h 14 min", "3 min 20 s", "1.5 s", "0.05 s". */
export function formatDuration(durationS: number): string {
  const space = NO_BREAK_SPACE;
  if (durationS < 0.95) return `${Number(durationS.toPrecision(2))}${space}s`;
  if (durationS < 9.95) return `${Number(durationS.toFixed(1))}${space}s`;
  const wholeS = Math.round(durationS);
  if (wholeS < 100) return `${wholeS}${space}s`;
  const days = Math.floor(wholeS / 86400);
  const hours = Math.floor((wholeS % 86400) / 3600);
  const minutes = Math.floor((wholeS % 3600) / 60);
  const seconds = wholeS % 60;
  if (days > 0) return `${days}${space}d${hours > 0 ? ` ${hours}${space}h` : ''}`;
  if (hours > 0) return `${hours}${space}h${minutes > 0 ? ` ${minutes}${space}min` : ''}`;
  return `${minutes}${space}min${seconds > 0 ? ` ${seconds}${space}s` : ''}`;
}

/** A share in percent: one decimal below ten, none above, and never a false 0 or 100. */
export function formatPercent(share: number): string {
  const percent = share * 100;
  if (percent > 0 && percent < 0.05) return `under${NO_BREAK_SPACE}0.1${NO_BREAK_SPACE}%`;
  if (percent < 100 && percent > 99.5) {
    return `${Math.min(percent, 99.9).toFixed(1)}${NO_BREAK_SPACE}%`;
  }
  return `${percent.toFixed(percent < 9.95 && percent > 0 ? 1 : 0)}${NO_BREAK_SPACE}%`;
}

/** A count with a no-break space between groups of three from five digits on. */
export function formatCount(count: number): string {
  const text = String(count);
  return count < 10_000 ? text : text.replace(/\B(?=(\d{3})+$)/g, NO_BREAK_SPACE);
}

/** "1 epoch", "2 epochs". */
export function counted(count: number, singular: string, plural = `${singular}s`): string {
  return `${formatCount(count)}${NO_BREAK_SPACE}${count === 1 ? singular : plural}`;
}

/** An azimuth in whole degrees, clockwise from true north: "087°". */
export function formatAzimuth(azimuthDeg: number): string {
  return `${String(Math.round(azimuthDeg) % 360).padStart(3, '0')}°`;
}

const COMPASS = [
  'north',
  'north-east',
  'east',
  'south-east',
  'south',
  'south-west',
  'west',
  'north-west',
];

/** The direction in words, one of eight. */
export function compassWord(azimuthDeg: number): string {
  return COMPASS[Math.round((((azimuthDeg % 360) + 360) % 360) / 45) % 8] ?? 'north';
}

/** "2026-05-04 10:20:30" from an ISO 8601 UTC string, fractions dropped. */
export function formatUtc(iso: string): string {
  return iso.replace('T', ' ').replace(/(\.\d+)?Z$/, '');
}

/** "10:20:30" from an ISO 8601 UTC string. */
export function formatClock(iso: string): string {
  return iso.slice(11, 19);
}

const DAY_S = 86_400;

/** The clock of a moment in UTC, with its date where the record lasts longer than a day. */
export function formatMoment(iso: string, recordS: number): string {
  return recordS > DAY_S ? formatUtc(iso) : formatClock(iso);
}

/** Words joined as in a sentence: "a", "a and b", "a, b and c". */
export function joined(words: readonly string[], last = 'and'): string {
  if (words.length <= 1) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words[words.length - 1]}`;
}
