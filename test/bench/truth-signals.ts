import type {SimulatedOccupation} from '../simulate/occupation.ts';
import type {Random} from '../simulate/random.ts';
import type {Scenario} from '../simulate/scenarios.ts';
import {addCourse, addDrift, addSettling, addStep, knock} from '../simulate/signals.ts';
import {simulate} from '../simulate/simulate.ts';

/** What is done to the antenna in an experiment, and when. */
export interface Signal {
  readonly name: string;
  /** Adds the signal; the time of a step is the one that `stepTimeS` gives for the same seed. */
  readonly move: (
    occupation: SimulatedOccupation,
    random: Random,
    times: SignalTimes,
  ) => SimulatedOccupation;
}

export interface SignalTimes {
  readonly durationS: number;
  readonly stepS: number;
}

export const STILL: Signal = {name: 'none', move: (occupation) => occupation};

/** A knock at a random time in 10 to 90 % of the record. */
export function step(sizeMm: number): Signal {
  return {
    name: `step ${sizeMm} mm`,
    move: (occupation, random, {stepS}) => addStep(occupation, knock(sizeMm / 1000, random), stepS),
  };
}

/** A drift of a random direction over the whole record. */
export function drift(sizeMm: number): Signal {
  return {
    name: `drift ${sizeMm} mm`,
    move: (occupation, random) => addDrift(occupation, knock(sizeMm / 1000, random)),
  };
}

/** A drift of each component, up in proportion to its noise: for the power by component. */
export function driftOfEach(sizeMm: number): Signal {
  const sizeM = sizeMm / 1000;
  return {
    name: `drift of each ${sizeMm} mm`,
    move: (occupation) => addDrift(occupation, {eastM: sizeM, northM: sizeM, upM: 1.9 * sizeM}),
  };
}

/** Settling with a time constant between 5 and 20 % of the record. */
export function settling(sizeMm: number): Signal {
  return {
    name: `settling ${sizeMm} mm`,
    move: (occupation, random, {durationS}) =>
      addSettling(
        occupation,
        knock(sizeMm / 1000, random),
        durationS * 0.05 * 4 ** random.uniform(),
      ),
  };
}

/** Three knocks at a fifth, a half and four fifths of the record, each its own direction. */
export function threeSteps(sizeMm: number): Signal {
  return {
    name: `three steps ${sizeMm} mm`,
    move: (occupation, random, {durationS}) =>
      [0.2, 0.5, 0.8].reduce(
        (moved, share) => addStep(moved, knock(sizeMm / 1000, random), share * durationS),
        occupation,
      ),
  };
}

/** A knock half-way in a setup that drifts as well. */
export function stepAndDrift(stepMm: number, driftMm: number): Signal {
  return {
    name: `step ${stepMm} mm and drift ${driftMm} mm`,
    move: (occupation, random, {durationS, stepS}) => {
      const by = knock(driftMm / 1000, random);
      const drifting = addCourse(occupation, by, (t) => t / durationS);
      return addStep(drifting, knock(stepMm / 1000, random), stepS);
    },
  };
}

/** A replicate of an experiment, with the time of its step. */
export function replicate(scenario: Scenario, signal: Signal, seed: number) {
  let stepS = Number.NaN;
  const occupation = simulate(scenario, seed, (still, random) => {
    stepS = random.between(0.1, 0.9) * scenario.durationS;
    return signal.move(still, random, {durationS: scenario.durationS, stepS});
  });
  return {occupation, stepS};
}
