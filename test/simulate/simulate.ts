import {noiseSeries} from './noise.ts';
import {FIXED, type SimulatedOccupation} from './occupation.ts';
import {type Random, randomFrom} from './random.ts';
import type {Resolution, Scenario} from './scenarios.ts';

/** Displaces the antenna, or what the receiver prints, before the digits are rounded. */
export type Movement = (occupation: SimulatedOccupation, random: Random) => SimulatedOccupation;

/**
 * One occupation of a scenario; the same seed gives the same noise with and without movement.
 *
 * @returns offsets from the true mark, metres; epochs at constant interval but for cut gaps
 */
export function simulate(
  scenario: Scenario,
  seed: number,
  movement: Movement = (still) => still,
): SimulatedOccupation {
  const {durationS, intervalS, noise} = scenario;
  const count = Math.round(durationS / intervalS);
  const stream = (purpose: string) => randomFrom(seed, `${scenario.name} ${purpose}`);
  const clean: SimulatedOccupation = {
    elapsedS: Float64Array.from({length: count}, (_, i) => (i * 1000 * intervalS) / 1000),
    eastM: louder(scenario, noiseSeries(noise.east, count, intervalS, stream('east'))),
    northM: louder(scenario, noiseSeries(noise.north, count, intervalS, stream('north'))),
    upM: louder(scenario, noiseSeries(noise.up, count, intervalS, stream('up'))),
    fixClass: new Uint8Array(count).fill(FIXED),
  };
  const moved = movement(clean, stream('movement'));
  const disturbed = scenario.disturb?.(moved, stream('disturbance')) ?? moved;
  if (scenario.resolution === undefined) return disturbed;
  return rounded(disturbed, scenario.resolution, stream('digits'));
}

function louder(scenario: Scenario, series: Float64Array): Float64Array {
  const {loudness} = scenario;
  if (loudness === undefined) return series;
  return series.map((value, i) => value * loudness(i / series.length));
}

/** Rounds to the steps of the digits; the mark lies anywhere between two steps. */
function rounded(
  occupation: SimulatedOccupation,
  resolution: Resolution,
  random: Random,
): SimulatedOccupation {
  const toSteps = (column: Float64Array, stepM: number) => {
    const markM = random.between(0, stepM);
    return column.map((value) => Math.round((value + markM) / stepM) * stepM - markM);
  };
  return {
    ...occupation,
    eastM: toSteps(occupation.eastM, resolution.eastM),
    northM: toSteps(occupation.northM, resolution.northM),
    upM: toSteps(occupation.upM, resolution.upM),
  };
}
