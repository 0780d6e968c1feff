import {describe, expect, test} from 'vitest';
import {FLOAT} from './occupation.ts';
import {HARDER_SCENARIOS, SCENARIOS, scenarioNamed} from './scenarios.ts';
import {addDrift, addSettling, addStep, knock} from './signals.ts';
import {simulate} from './simulate.ts';

const all = [...SCENARIOS, ...HARDER_SCENARIOS];

describe('simulated occupations', () => {
  test.each(all.map((scenario) => [scenario.name, scenario] as const))(
    'property: %s repeats by seed and has equal columns in time order',
    (_, scenario) => {
      const once = simulate(scenario, 11);
      expect(simulate(scenario, 11)).toEqual(once);
      const {elapsedS, eastM, northM, upM, fixClass} = once;
      expect(new Set([elapsedS, eastM, northM, upM, fixClass].map((c) => c.length)).size).toBe(1);
      expect(elapsedS.findIndex((t, i) => i > 0 && t <= elapsedS[i - 1]!)).toBe(-1);
      expect(eastM.every(Number.isFinite)).toBe(true);
      expect(eastM).not.toEqual(simulate(scenario, 12).eastM);
      expect(eastM).not.toEqual(northM);
    },
  );

  test('property: heights are 1.9 times as noisy', () => {
    const {northM, upM} = simulate(scenarioNamed('A'), 1);
    const square = (column: Float64Array) => column.reduce((sum, value) => sum + value * value, 0);
    expect(Math.sqrt(square(upM) / square(northM))).toBeCloseTo(1.9, 0);
  });

  test('property: the hour of troubles has its gaps, its float and its wild epochs', () => {
    const flagged = simulate(scenarioNamed('I2'), 3);
    const open = simulate(scenarioNamed('I'), 3);
    expect(open.elapsedS.length / 3600).toBeGreaterThan(0.79);
    expect(open.elapsedS.length / 3600).toBeLessThan(0.81);
    expect(open.fixClass.includes(FLOAT)).toBe(false);
    const float = flagged.fixClass.filter((quality) => quality === FLOAT).length;
    expect(float).toBeGreaterThan(20);
    expect(float).toBeLessThan(241);
    const wild = flagged.eastM.filter(
      (east, i) => flagged.fixClass[i] !== FLOAT && Math.abs(east) > 0.025,
    );
    expect(wild.length).toBeGreaterThan(10);
  });

  test('property: noise doubles half-way in P', () => {
    const {eastM} = simulate(scenarioNamed('P'), 5);
    const still = simulate(scenarioNamed('C'), 5);
    expect(still.eastM.length).toBe(eastM.length);
    const rms = (part: Float64Array) =>
      Math.sqrt(part.reduce((sum, value) => sum + value * value, 0) / part.length);
    expect(rms(eastM.subarray(2000)) / rms(eastM.subarray(0, 1600))).toBeGreaterThan(1.6);
  });

  test('property: digits are those of the resolution', () => {
    const {eastM} = simulate(scenarioNamed('Q5'), 5);
    for (let i = 1; i < eastM.length; i++) {
      const steps = (eastM[i]! - eastM[0]!) / 0.0124;
      expect(Math.abs(steps - Math.round(steps))).toBeLessThan(1e-9);
    }
  });

  test('property: movement is added to the same noise', () => {
    const scenario = scenarioNamed('C');
    const still = simulate(scenario, 21);
    const stepped = simulate(scenario, 21, (o, random) => addStep(o, knock(0.02, random), 1800));
    const before = stepped.eastM.map((value, i) => value - still.eastM[i]!);
    const north = stepped.northM.map((value, i) => value - still.northM[i]!);
    expect(before[1799]).toBe(0);
    expect(Math.hypot(before[1800]!, north[1800]!)).toBeCloseTo(0.02, 12);
    expect(stepped.upM[3599]! - still.upM[3599]!).toBeCloseTo(-0.006, 12);
    const by = {eastM: 0.01, northM: 0, upM: -0.003};
    const drifting = addDrift(still, by);
    expect(drifting.eastM[0]).toBe(still.eastM[0]);
    expect(drifting.eastM[3599]! - still.eastM[3599]!).toBeCloseTo(0.01, 12);
    const settling = addSettling(still, by, 360);
    expect(settling.eastM[0]! - still.eastM[0]!).toBeCloseTo(0.01, 12);
    expect(settling.eastM[360]! - still.eastM[360]!).toBeCloseTo(0.01 / Math.E, 12);
  });

  test('property: thirty jumps a day come and go', () => {
    const jumping = simulate(scenarioNamed('F30'), 2);
    const calm = simulate({...scenarioNamed('F30'), disturb: (o) => o}, 2);
    const added = jumping.eastM.map((value, i) => value - calm.eastM[i]!);
    const jumps = added.filter((value, i) => i > 0 && Math.abs(value - added[i - 1]!) > 1e-9);
    expect(jumps.length).toBe(30);
    expect(Math.abs(added[0]!) + Math.abs(added[added.length - 1]!)).toBeLessThan(1e-12);
  });
});
