import {addBursts, addFloatStretches, addGross, cutGaps} from './disturbances.ts';
import type {NoiseTerm} from './noise.ts';
import type {SimulatedOccupation} from './occupation.ts';
import type {Random} from './random.ts';
import {addSatellitePasses} from './signals.ts';

/** What the digits of the log can express, and the rounding that follows. */
export interface Resolution {
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
}

/** The errors of one kind of occupation over a mark that stands still. */
export interface Scenario {
  readonly name: string;
  readonly about: string;
  readonly durationS: number;
  readonly intervalS: number;
  readonly noise: {
    readonly east: readonly NoiseTerm[];
    readonly north: readonly NoiseTerm[];
    readonly up: readonly NoiseTerm[];
  };
  /** The factor on all noise at a share (0 to 1) of the record. */
  readonly loudness?: (share: number) => number;
  readonly disturb?: (occupation: SimulatedOccupation, random: Random) => SimulatedOccupation;
  readonly resolution?: Resolution;
}

const MINUTE = 60;
const HOUR = 3600;

function white(sdMm: number): NoiseTerm {
  return {kind: 'white', sdM: sdMm / 1000};
}

function gaussMarkov(sdMm: number, tauS: number): NoiseTerm {
  return {kind: 'gauss-markov', sdM: sdMm / 1000, tauS};
}

function powerLaw(sdInHourMm: number, exponent: number): NoiseTerm {
  return {kind: 'power-law', exponent, sdInHourM: sdInHourMm / 1000};
}

/** East, north and up with noise in the proportion 1 : 1 : 1.9; `upTerms` where up is slower. */
function axes(terms: readonly NoiseTerm[], upTerms: readonly NoiseTerm[] = terms) {
  return {east: terms, north: terms, up: upTerms.map((term) => scaled(term, 1.9))};
}

function scaled(term: NoiseTerm, factor: number): NoiseTerm {
  switch (term.kind) {
    case 'power-law':
    case 'random-walk':
      return {...term, sdInHourM: term.sdInHourM * factor};
    case 'chirps':
      return {...term, amplitudeM: term.amplitudeM * factor};
    case 'mixture':
      return {...term, sdM: term.sdM * factor, wideSdM: term.wideSdM * factor};
    default:
      return {...term, sdM: term.sdM * factor};
  }
}

/** The hour that goes wrong: gaps, bursts, wild epochs, and two losses of the fix. */
function troubles(flagged: boolean, floatTauS: number) {
  return (clean: SimulatedOccupation, random: Random): SimulatedOccupation => {
    const float = {count: 2, shortestS: 60, longestS: 120, sdM: 0.15, tauS: floatTauS, flagged};
    const bursts = {count: 6, shortestS: 3, longestS: 20, smallestM: 0.03, largestM: 0.3};
    const gross = {share: 0.003, smallestM: 0.03, largestM: 0.3};
    const floating = addFloatStretches(clean, float, random);
    const wild = addGross(addBursts(floating, bursts, random), gross, random);
    return cutGaps(wild, {count: 6, share: 0.2}, random);
  };
}

const SINUSOIDS: NoiseTerm = {
  kind: 'chirps',
  count: 4,
  amplitudeM: 0.003,
  shortestS: 4 * MINUTE,
  longestS: 25 * MINUTE,
};
const C_NOISE = axes([white(3), gaussMarkov(4, 2 * MINUTE)]);
const F_NOISE = axes([white(2), gaussMarkov(3, 2 * MINUTE), gaussMarkov(4, 36 * MINUTE)]);
const I_NOISE = axes([white(3), gaussMarkov(3, 90)], [white(3), gaussMarkov(3, 270)]);

/** Satellites rising and setting thirty times in a day, each with a small jump. */
export const THIRTY_JUMPS = {
  jumps: 30,
  smallestM: 0.001,
  largestM: 0.003,
  shortestS: HOUR,
  longestS: 6 * HOUR,
};

/**
 * The scenarios of the specification (METHODS, section 1). Where it leaves a size open (the
 * amplitude of the sinusoids in G, both parts of N) it is chosen so that the true standard deviation
 * of the mean is the one that the specification prints.
 */
export const SCENARIOS: readonly Scenario[] = [
  {
    name: 'A',
    about: 'white noise only',
    durationS: 30 * MINUTE,
    intervalS: 1,
    noise: axes([white(5)]),
  },
  {
    name: 'B',
    about: 'correlated over 30 s',
    durationS: 30 * MINUTE,
    intervalS: 1,
    noise: axes([white(3), gaussMarkov(4, 30)]),
  },
  {
    name: 'C',
    about: 'correlated over 2 min',
    durationS: HOUR,
    intervalS: 1,
    noise: C_NOISE,
  },
  {
    name: 'D',
    about: 'correlated over 5 min',
    durationS: 2 * HOUR,
    intervalS: 1,
    noise: axes([white(2), gaussMarkov(4, 5 * MINUTE)]),
  },
  {
    name: 'E',
    about: 'correlated over 17 min, up over 36 min',
    durationS: 8 * HOUR,
    intervalS: 1,
    noise: axes([white(2), gaussMarkov(5, 17 * MINUTE)], [white(2), gaussMarkov(5, 36 * MINUTE)]),
  },
  {
    name: 'F',
    about: 'a day with two correlation times',
    durationS: 24 * HOUR,
    intervalS: 1,
    noise: F_NOISE,
  },
  {
    name: 'G',
    about: 'reflections: four chirped sinusoids',
    durationS: 2 * HOUR,
    intervalS: 1,
    noise: axes([SINUSOIDS, gaussMarkov(2, MINUTE), white(2)]),
  },
  {
    name: 'H',
    about: '3 min at 5 Hz',
    durationS: 3 * MINUTE,
    intervalS: 0.2,
    noise: axes([gaussMarkov(3, 8), white(1.5)]),
  },
  {
    name: 'I',
    about: 'an hour with gaps, bursts, wild epochs and float not flagged',
    durationS: HOUR,
    intervalS: 1,
    noise: I_NOISE,
    disturb: troubles(false, 0),
  },
  {
    name: 'I2',
    about: 'as I, float flagged',
    durationS: HOUR,
    intervalS: 1,
    noise: I_NOISE,
    disturb: troubles(true, 0),
  },
  {
    name: 'J',
    about: 'flicker noise, 4 h',
    durationS: 4 * HOUR,
    intervalS: 1,
    noise: axes([powerLaw(4, 1), white(3)]),
  },
  {
    name: 'K',
    about: 'flicker noise and 20 min correlation, 30 min',
    durationS: 30 * MINUTE,
    intervalS: 1,
    noise: axes([powerLaw(3, 1), gaussMarkov(4, 20 * MINUTE), white(2)]),
  },
  {
    name: 'L',
    about: 'correlated over 5 min, only 15 min long',
    durationS: 15 * MINUTE,
    intervalS: 1,
    noise: axes([gaussMarkov(4, 5 * MINUTE), white(2)]),
  },
  {
    name: 'M',
    about: 'correlated over 5 min, 3 min at 5 Hz',
    durationS: 3 * MINUTE,
    intervalS: 0.2,
    noise: axes([gaussMarkov(4, 5 * MINUTE), white(2)]),
  },
  {
    name: 'N',
    about: 'steeper than flicker, with a random walk, 6 h',
    durationS: 6 * HOUR,
    intervalS: 5,
    noise: axes([powerLaw(3.5, 1.3), {kind: 'random-walk', sdInHourM: 0.0005}]),
  },
  {
    name: 'P',
    about: 'as C, twice as noisy from half-way on',
    durationS: HOUR,
    intervalS: 1,
    noise: C_NOISE,
    loudness: (share) => 1 + Math.min(1, Math.max(0, (share - 0.5) * 30 + 0.5)),
  },
  {
    name: 'Q4',
    about: 'as C, minutes with four decimals',
    durationS: HOUR,
    intervalS: 1,
    noise: C_NOISE,
    resolution: {eastM: 0.124, northM: 0.185, upM: 0.1},
  },
  {
    name: 'Q5',
    about: 'as C, minutes with five decimals',
    durationS: HOUR,
    intervalS: 1,
    noise: C_NOISE,
    resolution: {eastM: 0.0124, northM: 0.0185, upM: 0.1},
  },
  {
    name: 'Q7',
    about: 'as C, minutes with seven decimals',
    durationS: HOUR,
    intervalS: 1,
    noise: C_NOISE,
    resolution: {eastM: 0.000124, northM: 0.000185, upM: 0.001},
  },
];

/**
 * Harder than the specification, or of kinds that it does not have. Never used to tune, but for GS, W
 * and WS, on which the shares of the models with a swing were chosen; WD confirms them.
 */
export const HARDER_SCENARIOS: readonly Scenario[] = [
  {
    name: 'F30',
    about: 'as F, with thirty jumps of 1 to 3 mm as satellites rise and set',
    durationS: 24 * HOUR,
    intervalS: 1,
    noise: F_NOISE,
    disturb: (clean, random) => addSatellitePasses(clean, THIRTY_JUMPS, random),
  },
  {
    name: 'I3',
    about: 'as I2, the flagged float wandering over 30 s',
    durationS: HOUR,
    intervalS: 1,
    noise: I_NOISE,
    disturb: troubles(true, 30),
  },
  {
    name: 'R',
    about: 'two correlation times, 1 and 30 min, in 30 min',
    durationS: 30 * MINUTE,
    intervalS: 1,
    noise: axes([gaussMarkov(3, MINUTE), gaussMarkov(4, 30 * MINUTE), white(2)]),
  },
  {
    name: 'S',
    about: 'two days of reflections that repeat with the satellites',
    durationS: 48 * HOUR,
    intervalS: 5,
    noise: axes([
      {kind: 'sidereal', sdM: 0.004, tauS: 4 * MINUTE},
      gaussMarkov(3, 17 * MINUTE),
      white(2),
    ]),
  },
  {
    name: 'T',
    about: 'heavy tails: Student t of 4 degrees over 2 min correlation',
    durationS: HOUR,
    intervalS: 1,
    noise: axes([{kind: 'student', sdM: 0.003, degrees: 4}, gaussMarkov(4, 2 * MINUTE)]),
  },
  {
    name: 'V',
    about: 'a mixture: one epoch in ten four times as noisy',
    durationS: HOUR,
    intervalS: 1,
    noise: axes([
      {kind: 'mixture', sdM: 0.002, wideSdM: 0.008, wideShare: 0.1},
      gaussMarkov(4, 2 * MINUTE),
    ]),
  },
  {
    name: 'W',
    about: 'swinging: period 6 min, damped over 10 min',
    durationS: 2 * HOUR,
    intervalS: 1,
    noise: axes([
      {kind: 'oscillation', sdM: 0.004, periodS: 6 * MINUTE, dampingS: 10 * MINUTE},
      white(2),
    ]),
  },
  {
    name: 'GS',
    about: 'as G, over slow errors: 30 min of correlation beneath the sinusoids',
    durationS: 2 * HOUR,
    intervalS: 1,
    noise: axes([SINUSOIDS, gaussMarkov(2, 30 * MINUTE), white(2)]),
  },
  {
    name: 'WS',
    about: 'swinging over slow errors of an hour, 6 h',
    durationS: 6 * HOUR,
    intervalS: 1,
    noise: axes([
      {kind: 'oscillation', sdM: 0.003, periodS: 10 * MINUTE, dampingS: 20 * MINUTE},
      gaussMarkov(3, HOUR),
      white(2),
    ]),
  },
  {
    name: 'WD',
    about: 'two swings at once, of 4 and 11 min, over errors of 5 min, 3 h',
    durationS: 3 * HOUR,
    intervalS: 1,
    noise: axes([
      {kind: 'oscillation', sdM: 0.003, periodS: 4 * MINUTE, dampingS: 20 * MINUTE},
      {kind: 'chirps', count: 1, amplitudeM: 0.005, shortestS: 9 * MINUTE, longestS: 13 * MINUTE},
      gaussMarkov(2, 5 * MINUTE),
      white(3),
    ]),
  },
  {
    name: 'X',
    about: 'flatter than flicker: spectrum to the power of −0.7, 2 h',
    durationS: 2 * HOUR,
    intervalS: 1,
    noise: axes([powerLaw(4, 0.7), white(2)]),
  },
  {
    name: 'Y',
    about: 'three correlation times from 20 s to 40 min, 3 h',
    durationS: 3 * HOUR,
    intervalS: 1,
    noise: axes([
      gaussMarkov(2, 20),
      gaussMarkov(3, 3 * MINUTE),
      gaussMarkov(3, 40 * MINUTE),
      white(2),
    ]),
  },
];

export function scenarioNamed(name: string): Scenario {
  const found = [...SCENARIOS, ...HARDER_SCENARIOS].find((scenario) => scenario.name === name);
  if (found === undefined) throw new RangeError(`scenarioNamed: no scenario ${name}`);
  return found;
}
