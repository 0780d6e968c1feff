import {FLOAT, type SimulatedOccupation, selectEpochs} from './occupation.ts';
import type {Random} from './random.ts';

/** How much noisier heights are than east and north, in all scenarios. */
const UP_SCALE = 1.9;

/** A stretch of time within a record. */
interface Stretch {
  readonly fromS: number;
  readonly toS: number;
}

/** Cuts gaps that together take a share of the record. */
export function cutGaps(
  occupation: SimulatedOccupation,
  options: {readonly count: number; readonly share: number},
  random: Random,
): SimulatedOccupation {
  const durationS = occupation.elapsedS[occupation.elapsedS.length - 1]!;
  const weights = Array.from({length: options.count}, () => 0.3 + random.uniform());
  const sum = weights.reduce((total, weight) => total + weight, 0);
  // Each gap lies in its own part of the record, so that they never overlap.
  const gaps = weights.map((weight, k) => {
    const lengthS = (options.share * durationS * weight) / sum;
    const partS = durationS / options.count;
    return stretchWithin({fromS: k * partS, toS: (k + 1) * partS}, lengthS, random);
  });
  return selectEpochs(occupation, (i) => !gaps.some((gap) => inside(gap, occupation.elapsedS[i]!)));
}

/** Bursts: some seconds all displaced to one side, as when somebody leans over the antenna. */
export function addBursts(
  occupation: SimulatedOccupation,
  options: {
    readonly count: number;
    readonly shortestS: number;
    readonly longestS: number;
    readonly smallestM: number;
    readonly largestM: number;
  },
  random: Random,
): SimulatedOccupation {
  const whole = wholeOf(occupation);
  let disturbed = occupation;
  for (let k = 0; k < options.count; k++) {
    const lengthS = random.between(options.shortestS, options.longestS);
    const burst = stretchWithin(whole, lengthS, random);
    const sides = [side(options, random), side(options, random), side(options, random)];
    disturbed = changed(disturbed, (t) => inside(burst, t), {
      east: () => sides[0]!,
      north: () => sides[1]!,
      up: () => UP_SCALE * sides[2]!,
    });
  }
  return disturbed;
}

/** Single wild epochs. */
export function addGross(
  occupation: SimulatedOccupation,
  options: {readonly share: number; readonly smallestM: number; readonly largestM: number},
  random: Random,
): SimulatedOccupation {
  const wild = occupation.elapsedS.map(() => (random.uniform() < options.share ? 1 : 0));
  return changed(occupation, (_, i) => wild[i] === 1, {
    east: () => side(options, random),
    north: () => side(options, random),
    up: () => UP_SCALE * side(options, random),
  });
}

/**
 * Stretches in which the ambiguities are lost. The epochs are scattered by `sdM` with memory
 * `tauS` (0: white); the fix class says so only when `flagged`.
 */
export function addFloatStretches(
  occupation: SimulatedOccupation,
  options: {
    readonly count: number;
    readonly shortestS: number;
    readonly longestS: number;
    readonly sdM: number;
    readonly tauS: number;
    readonly flagged: boolean;
  },
  random: Random,
): SimulatedOccupation {
  const whole = wholeOf(occupation);
  const stretches = Array.from({length: options.count}, () =>
    stretchWithin(whole, random.between(options.shortestS, options.longestS), random),
  );
  const floating = (t: number) => stretches.some((stretch) => inside(stretch, t));
  const intervalS = occupation.elapsedS[1]! - occupation.elapsedS[0]!;
  const scattered = changed(occupation, floating, {
    east: wander(options.sdM, options.tauS, intervalS, random),
    north: wander(options.sdM, options.tauS, intervalS, random),
    up: wander(UP_SCALE * options.sdM, options.tauS, intervalS, random),
  });
  if (!options.flagged) return scattered;
  const fixClass = scattered.fixClass.map((quality, i) =>
    floating(occupation.elapsedS[i]!) ? FLOAT : quality,
  );
  return {...scattered, fixClass};
}

function wander(sdM: number, tauS: number, intervalS: number, random: Random): () => number {
  const memory = tauS === 0 ? 0 : Math.exp(-intervalS / tauS);
  let valueM = sdM * random.normal();
  return () => {
    valueM = memory * valueM + sdM * Math.sqrt(1 - memory * memory) * random.normal();
    return valueM;
  };
}

function changed(
  occupation: SimulatedOccupation,
  where: (elapsedS: number, index: number) => boolean,
  by: {readonly east: () => number; readonly north: () => number; readonly up: () => number},
): SimulatedOccupation {
  const hit = occupation.elapsedS.map((t, i) => (where(t, i) ? 1 : 0));
  const shifted = (column: Float64Array, next: () => number) =>
    column.map((value, i) => (hit[i] === 1 ? value + next() : value));
  return {
    ...occupation,
    eastM: shifted(occupation.eastM, by.east),
    northM: shifted(occupation.northM, by.north),
    upM: shifted(occupation.upM, by.up),
  };
}

/** A size within limits, to either side. */
function side(
  limits: {readonly smallestM: number; readonly largestM: number},
  random: Random,
): number {
  const sizeM = random.between(limits.smallestM, limits.largestM);
  return random.uniform() < 0.5 ? sizeM : -sizeM;
}

function wholeOf(occupation: SimulatedOccupation): Stretch {
  return {fromS: 0, toS: occupation.elapsedS[occupation.elapsedS.length - 1]!};
}

function stretchWithin(outer: Stretch, lengthS: number, random: Random): Stretch {
  const fromS = random.between(outer.fromS, outer.toS - lengthS);
  return {fromS, toS: fromS + lengthS};
}

function inside(stretch: Stretch, t: number): boolean {
  return t >= stretch.fromS && t < stretch.toS;
}
