import {powerLawSeries} from './power-law.ts';
import type {Random} from './random.ts';

/** One kind of noise along one axis; lengths in metres, times in seconds. */
export type NoiseTerm =
  | {readonly kind: 'white'; readonly sdM: number}
  | {readonly kind: 'gauss-markov'; readonly sdM: number; readonly tauS: number}
  | {readonly kind: 'power-law'; readonly exponent: number; readonly sdInHourM: number}
  | {readonly kind: 'random-walk'; readonly sdInHourM: number}
  | {
      /** Sinusoids whose periods change through the record, as of reflections. */
      readonly kind: 'chirps';
      readonly count: number;
      readonly amplitudeM: number;
      readonly shortestS: number;
      readonly longestS: number;
    }
  /** White with the tails of Student's t, scaled to the standard deviation; degrees above 2. */
  | {readonly kind: 'student'; readonly sdM: number; readonly degrees: number}
  /** White, of which a share comes from a wider normal distribution. */
  | {
      readonly kind: 'mixture';
      readonly sdM: number;
      readonly wideSdM: number;
      readonly wideShare: number;
    }
  /** Randomly driven swinging: autocovariance sd² e^(−t/damping) cos(2 pi t/period), nearly. */
  | {
      readonly kind: 'oscillation';
      readonly sdM: number;
      readonly periodS: number;
      readonly dampingS: number;
    }
  /** A Gauss–Markov pattern that comes back when the satellites stand again where they stood. */
  | {readonly kind: 'sidereal'; readonly sdM: number; readonly tauS: number};

/** Mean time after which the geometry of GPS satellites repeats: 247 s less than a day. */
export const ASPECT_REPEAT_S = 86153;

/** How long before the record a power law starts at zero. */
const POWER_LAW_START_S = 86400;

/** The sum of some kinds of noise at `count` epochs of constant interval. */
export function noiseSeries(
  terms: readonly NoiseTerm[],
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const sum = new Float64Array(count);
  for (const term of terms) {
    const series = termSeries(term, count, intervalS, random);
    for (let i = 0; i < count; i++) sum[i] = sum[i]! + series[i]!;
  }
  return sum;
}

function termSeries(
  term: NoiseTerm,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  switch (term.kind) {
    case 'white':
      return filled(count, () => term.sdM * random.normal());
    case 'gauss-markov':
      return gaussMarkov(term.sdM, intervalS / term.tauS, count, random);
    case 'power-law':
      return powerLawSeries({...term, startedBeforeS: POWER_LAW_START_S}, count, intervalS, random);
    case 'random-walk':
      return randomWalk(term.sdInHourM, count, intervalS, random);
    case 'chirps':
      return chirps(term, count, intervalS, random);
    case 'student':
      return filled(count, () => term.sdM * studentDeviate(term.degrees, random));
    case 'mixture':
      return filled(
        count,
        () => (random.uniform() < term.wideShare ? term.wideSdM : term.sdM) * random.normal(),
      );
    case 'oscillation':
      return oscillation(term, count, intervalS, random);
    case 'sidereal':
      return sidereal(term, count, intervalS, random);
  }
}

function filled(count: number, next: () => number): Float64Array {
  const series = new Float64Array(count);
  for (let i = 0; i < count; i++) series[i] = next();
  return series;
}

/** First-order Gauss–Markov noise from its stationary distribution; `step` is interval over tau. */
function gaussMarkov(sdM: number, step: number, count: number, random: Random): Float64Array {
  const memory = Math.exp(-step);
  const innovationM = sdM * Math.sqrt(-Math.expm1(-2 * step));
  let valueM = sdM * random.normal();
  return filled(count, () => {
    const nowM = valueM;
    valueM = memory * valueM + innovationM * random.normal();
    return nowM;
  });
}

/** Starts at zero; a walk of an hour has standard deviation sdInHourM·√(1/6) about its mean. */
function randomWalk(
  sdInHourM: number,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const stepM = sdInHourM * Math.sqrt((6 * intervalS) / 3600);
  let valueM = 0;
  return filled(count, () => {
    valueM += stepM * random.normal();
    return valueM;
  });
}

function chirps(
  term: Extract<NoiseTerm, {kind: 'chirps'}>,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const series = new Float64Array(count);
  for (let s = 0; s < term.count; s++) {
    const firstPeriodS = term.shortestS * (term.longestS / term.shortestS) ** random.uniform();
    const lastPeriodS = term.shortestS * (term.longestS / term.shortestS) ** random.uniform();
    const startPhase = random.between(0, 2 * Math.PI);
    const rise = (1 / lastPeriodS - 1 / firstPeriodS) / (2 * count * intervalS);
    for (let i = 0; i < count; i++) {
      const t = i * intervalS;
      const phase = startPhase + 2 * Math.PI * (t / firstPeriodS + rise * t * t);
      series[i] = series[i]! + term.amplitudeM * Math.sin(phase);
    }
  }
  return series;
}

/** Student's t with unit variance: a normal deviate over the root of a chi-square per degree. */
function studentDeviate(degrees: number, random: Random): number {
  let squares = 0;
  for (let k = 0; k < degrees; k++) squares += random.normal() ** 2;
  return random.normal() * Math.sqrt((degrees - 2) / squares);
}

/** The real part of a rotating complex Gauss–Markov process: exactly stationary. */
function oscillation(
  term: Extract<NoiseTerm, {kind: 'oscillation'}>,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const real = gaussMarkov(term.sdM, intervalS / term.dampingS, count, random);
  const imaginary = gaussMarkov(term.sdM, intervalS / term.dampingS, count, random);
  const perEpoch = (2 * Math.PI * intervalS) / term.periodS;
  return real.map(
    (value, i) => value * Math.cos(perEpoch * i) - imaginary[i]! * Math.sin(perEpoch * i),
  );
}

function sidereal(
  term: Extract<NoiseTerm, {kind: 'sidereal'}>,
  count: number,
  intervalS: number,
  random: Random,
): Float64Array {
  const length = Math.round(ASPECT_REPEAT_S / intervalS);
  const pattern = gaussMarkov(term.sdM, intervalS / term.tauS, length + 1, random);
  // The last ten correlation times lead over to the beginning, so that the return is no jump.
  const misclosureM = pattern[length]! - pattern[0]!;
  const leadS = 10 * term.tauS;
  const closed = pattern.map((value, i) => {
    const share = 1 - ((length - i) * intervalS) / leadS;
    return value - misclosureM * Math.max(0, share);
  });
  return Float64Array.from({length: count}, (_, i) => closed[i % length]!);
}
