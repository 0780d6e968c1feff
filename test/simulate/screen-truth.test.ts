import {describe, expect, test} from 'vitest';
import {blockMedianScreen} from '../../src/statistics/robust.ts';
import type {SimulatedOccupation} from './occupation.ts';
import {randomFrom} from './random.ts';
import {type Scenario, scenarioNamed} from './scenarios.ts';
import {addDrift, addStep} from './signals.ts';
import {simulate} from './simulate.ts';

const REPLICATES = 40;

/** An hour with and without its wild epochs; `bad` says which were made so. */
interface Case {
  readonly clean: SimulatedOccupation;
  readonly dirty: SimulatedOccupation;
  readonly bad: Uint8Array;
}

interface Tally {
  readonly falselyRejectedPercent: number;
  readonly missedPercent: number;
  /** Scatter of what is kept over that of the clean epochs, mean over replicates and components. */
  readonly scatterRatio: number;
}

function tally(make: (seed: number) => Case, resolutions = [0, 0, 0]): Tally {
  let [good, rejectedGood, bad, missed] = [0, 0, 0, 0];
  let ratio = 0;
  for (let seed = 1; seed <= REPLICATES; seed++) {
    const {clean, dirty, bad: isBad} = make(4000 + seed);
    const components = [dirty.eastM, dirty.northM, dirty.upM];
    const rejected = blockMedianScreen({elapsedS: dirty.elapsedS, components, resolutions});
    rejected.forEach((out, i) => {
      if (isBad[i] === 1) {
        bad += 1;
        if (out === 0) missed += 1;
      } else {
        good += 1;
        if (out === 1) rejectedGood += 1;
      }
    });
    const kept = (column: Float64Array) => deviation(column.filter((_, i) => rejected[i] === 0));
    ratio += kept(dirty.eastM) / deviation(clean.eastM) / (2 * REPLICATES);
    ratio += kept(dirty.upM) / deviation(clean.upM) / (2 * REPLICATES);
  }
  return {
    falselyRejectedPercent: (100 * rejectedGood) / good,
    missedPercent: bad === 0 ? 0 : (100 * missed) / bad,
    scatterRatio: ratio,
  };
}

function deviation(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length);
}

function cleanCase(scenario: Scenario): (seed: number) => Case {
  return (seed) => {
    const clean = simulate(scenario, seed);
    return {clean, dirty: clean, bad: new Uint8Array(clean.elapsedS.length)};
  };
}

/** Adds an error to each epoch that `bad` names; `errorM` is asked once for each. */
function spoiled(
  clean: SimulatedOccupation,
  bad: Uint8Array,
  errorM: (index: number) => number,
): Case {
  const spoil = (column: Float64Array, factor: number) =>
    column.map((value, i) => (bad[i] === 1 ? value + factor * errorM(i) : value));
  const dirty = {
    ...clean,
    eastM: spoil(clean.eastM, 1),
    northM: spoil(clean.northM, 1),
    upM: spoil(clean.upM, 1.9),
  };
  return {clean, dirty, bad};
}

const C = scenarioNamed('C');
const flickerHour: Scenario = {...scenarioNamed('J'), durationS: 3600};
const whiteHour: Scenario = {...scenarioNamed('A'), durationS: 3600};

describe('the screen on simulated hours', () => {
  test.each([
    ['correlated', C],
    ['white', whiteHour],
    ['flicker', flickerHour],
  ] as const)('property: %s noise loses at most one epoch in ten thousand', (_, scenario) => {
    const {falselyRejectedPercent, scatterRatio} = tally(cleanCase(scenario));
    expect(falselyRejectedPercent).toBeLessThanOrEqual(0.01);
    expect(scatterRatio).toBeGreaterThan(0.995);
    expect(scatterRatio).toBeLessThan(1.005);
  });

  test('property: five decimals of a minute lose at most one epoch in ten thousand', () => {
    const q5 = scenarioNamed('Q5');
    const {eastM, northM, upM} = q5.resolution!;
    const {falselyRejectedPercent} = tally(cleanCase(q5), [eastM, northM, upM]);
    expect(falselyRejectedPercent).toBeLessThanOrEqual(0.01);
  });

  test('property: a drift of 30 mm in the hour is left alone', () => {
    const {falselyRejectedPercent} = tally((seed) => {
      const still = simulate(C, seed);
      const clean = addDrift(still, {eastM: 0.03, northM: 0.03, upM: 0.057});
      return {clean, dirty: clean, bad: new Uint8Array(clean.elapsedS.length)};
    });
    expect(falselyRejectedPercent).toBeLessThanOrEqual(0.01);
  });

  test('property: a knock of 30 mm half-way is left alone but for its moment', () => {
    const {falselyRejectedPercent} = tally((seed) => {
      const clean = addStep(simulate(C, seed), {eastM: 0.03, northM: 0.03, upM: 0.057}, 1800);
      return {clean, dirty: clean, bad: new Uint8Array(clean.elapsedS.length)};
    });
    expect(falselyRejectedPercent).toBeLessThanOrEqual(0.05);
  });

  test('property: of one per cent gross epochs of 30 to 300 mm nearly all go', () => {
    const {falselyRejectedPercent, scatterRatio} = tally((seed) => {
      const random = randomFrom(seed, 'gross');
      const clean = simulate(C, seed);
      const bad = Uint8Array.from(clean.elapsedS, () => (random.uniform() < 0.01 ? 1 : 0));
      return spoiled(
        clean,
        bad,
        () => (random.uniform() < 0.5 ? -1 : 1) * random.between(0.03, 0.3),
      );
    });
    expect(falselyRejectedPercent).toBeLessThanOrEqual(0.05);
    expect(scatterRatio).toBeLessThan(1.02);
  });

  test('property: of ten per cent one-sided bursts of 20 to 80 mm at most two per cent stay', () => {
    const {missedPercent} = tally((seed) => {
      const random = randomFrom(seed, 'bursts');
      const clean = simulate(C, seed);
      const bad = new Uint8Array(clean.elapsedS.length);
      const sizeM = new Float64Array(bad.length);
      while (bad.reduce((sum, hit) => sum + hit, 0) < 0.1 * bad.length) {
        const from = Math.floor(random.between(0, bad.length - 20));
        const to = from + Math.floor(random.between(3, 20));
        bad.fill(1, from, to);
        sizeM.fill(random.between(0.02, 0.08), from, to);
      }
      return spoiled(clean, bad, (i) => sizeM[i]!);
    });
    expect(missedPercent).toBeLessThanOrEqual(2);
  });

  test('property: of a quarter of float with 150 mm at most one epoch in a thousand stays', () => {
    const {missedPercent} = tally((seed) => {
      const random = randomFrom(seed, 'float');
      const clean = simulate(C, seed);
      const bad = new Uint8Array(clean.elapsedS.length);
      const from = Math.floor(random.between(0, 2700));
      bad.fill(1, from, from + 900);
      return spoiled(clean, bad, () => 0.15 * random.normal());
    });
    expect(missedPercent).toBeLessThanOrEqual(0.1);
  });
});
