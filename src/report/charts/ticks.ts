import {civilFromDays, daysFromCivil, SECONDS_PER_DAY} from '../../time/calendar.ts';
import {fixed} from '../../wording/numbers.ts';

export interface Ticks {
  readonly values: readonly number[];
  readonly decimals: number;
}

/** Round values inside a domain, their step from 1, 2, 5 times a power of ten. */
export function roundTicks(low: number, high: number, atMost: number): Ticks {
  const rough = (high - low) / Math.max(1, atMost);
  const power = 10 ** Math.floor(Math.log10(rough));
  const factor = [1, 2, 5, 10].find((step) => step * power >= rough * (1 - 1e-9)) ?? 10;
  const step = factor * power;
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const values: number[] = [];
  for (let k = Math.ceil(low / step - 1e-9); k <= Math.floor(high / step + 1e-9); k++) {
    values.push(Number(fixed(k * step, decimals)));
  }
  return {values, decimals};
}

/** Axis settings that print exactly these ticks; the default minus of Vega is the true one. */
export function tickAxis({values, decimals}: Ticks) {
  return {values, format: `.${decimals}f`};
}

const TIME_STEPS_S = [
  0.1, 0.2, 0.5, 1, 2, 5, 10, 15, 20, 30, 60, 120, 300, 600, 900, 1200, 1800, 3600, 7200, 10_800,
  14_400, 21_600, 43_200, 86_400, 172_800, 345_600, 604_800, 1_209_600,
];

const MONTHS = 'Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec'.split(' ');

export interface LabelledTicks {
  readonly values: readonly number[];
  readonly labels: readonly string[];
}

/**
 * Round clock times within the record, in seconds since its start; where several days are shown,
 * midnight carries the date.
 */
export function clockTicks(startUtc: string, spanS: number, atMost: number): LabelledTicks {
  const step =
    TIME_STEPS_S.find((candidate) => spanS / candidate <= atMost) ??
    TIME_STEPS_S[TIME_STEPS_S.length - 1]!;
  const startS = secondOfDay(startUtc);
  const day0 = daysFromCivil(dateOf(startUtc));
  const values: number[] = [];
  const labels: string[] = [];
  for (let k = Math.ceil(startS / step - 1e-9); k * step <= startS + spanS + 1e-6; k++) {
    values.push(Number((k * step - startS).toFixed(3)));
    labels.push(clockLabel(k * step, step, day0, spanS));
  }
  return {values, labels};
}

function clockLabel(seconds: number, step: number, day0: number, spanS: number): string {
  const dayOffset = Math.floor(seconds / SECONDS_PER_DAY + 1e-9);
  const ofDay = seconds - dayOffset * SECONDS_PER_DAY;
  if (step >= SECONDS_PER_DAY || (ofDay < 1e-6 && spanS > 1.5 * SECONDS_PER_DAY)) {
    const {month, day} = civilFromDays(day0 + dayOffset);
    return `${day} ${MONTHS[month - 1]}`;
  }
  // The end of a day shown alone is its 24:00, not the 00:00 of a day that is not in the record.
  const hours = dayOffset === 1 && ofDay < 1e-6 ? 24 : Math.floor(ofDay / 3600 + 1e-9);
  const minutes = Math.floor((ofDay % 3600) / 60 + 1e-9);
  const text = `${two(hours)}:${two(minutes)}`;
  if (step >= 60) return text;
  const rest = ofDay - Math.floor(ofDay / 60 + 1e-9) * 60;
  return `${text}:${step >= 1 ? two(Math.round(rest)) : rest.toFixed(1).padStart(4, '0')}`;
}

function two(value: number): string {
  return String(value).padStart(2, '0');
}

/** "HH:MM:SS" of a moment that lies so many seconds after the start; minutes only when asked. */
export function clockAfter(startUtc: string, elapsedS: number, withSeconds: boolean): string {
  const whole = Math.floor(secondOfDay(startUtc) + elapsedS + 1e-6);
  const ofDay = ((whole % SECONDS_PER_DAY) + SECONDS_PER_DAY) % SECONDS_PER_DAY;
  const text = `${two(Math.floor(ofDay / 3600))}:${two(Math.floor((ofDay % 3600) / 60))}`;
  return withSeconds ? `${text}:${two(ofDay % 60)}` : text;
}

/** Seconds from one ISO UTC moment to another, leap seconds not counted. */
export function secondsBetween(fromUtc: string, toUtc: string): number {
  const days = daysFromCivil(dateOf(toUtc)) - daysFromCivil(dateOf(fromUtc));
  return days * SECONDS_PER_DAY + secondOfDay(toUtc) - secondOfDay(fromUtc);
}

function dateOf(iso: string) {
  return {
    year: Number(iso.slice(0, 4)),
    month: Number(iso.slice(5, 7)),
    day: Number(iso.slice(8, 10)),
  };
}

function secondOfDay(iso: string): number {
  const seconds = Number(iso.slice(17).replace('Z', ''));
  return Number(iso.slice(11, 13)) * 3600 + Number(iso.slice(14, 16)) * 60 + seconds;
}

const ELAPSED_TICKS: readonly (readonly [number, string])[] = [
  [0.1, '0.1 s'],
  [1, '1 s'],
  [10, '10 s'],
  [60, '1 min'],
  [600, '10 min'],
  [3600, '1 h'],
  [36_000, '10 h'],
  [345_600, '4 d'],
];

/** Spans of time on a logarithmic axis, far enough apart to be read. */
export function elapsedTicks(fromS: number, toS: number, plotPx: number): LabelledTicks {
  const placed: {value: number; label: string; x: number}[] = [];
  for (const [value, label] of ELAPSED_TICKS) {
    if (value < fromS * (1 - 1e-9) || value > toS * (1 + 1e-9)) continue;
    const x = (Math.log(value / fromS) / Math.log(toS / fromS)) * plotPx;
    const previous = placed[placed.length - 1];
    if (previous === undefined || x - previous.x > 40) placed.push({value, label, x});
  }
  return {values: placed.map(({value}) => value), labels: placed.map(({label}) => label)};
}

/** Axis settings that print these labels at these values. */
export function labelledAxis({values, labels}: LabelledTicks) {
  const lookUp = Object.fromEntries(values.map((value, i) => [String(value), labels[i]]));
  return {values, labelExpr: `(${JSON.stringify(lookUp)})[''+datum.value]`};
}
