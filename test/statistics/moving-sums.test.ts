import {describe, expect, test} from 'vitest';
import {movingSumStep, refineStepTime} from '../../src/statistics/moving-sums.ts';
import {randomFrom} from '../simulate/random.ts';

const LEVEL = 0.05;

function times(count: number, stepS = 1): Float64Array {
  return Float64Array.from({length: count}, (_, i) => i * stepS);
}

/** White noise of one unit in three components, shaped and moved as told. */
function noise(
  count: number,
  seed: number,
  {scale = () => 1, east = () => 0}: {scale?: (i: number) => number; east?: (i: number) => number},
): Float64Array[] {
  return [0, 1, 2].map((c) => {
    const random = randomFrom(seed, `moving sums ${c}`);
    return Float64Array.from(
      {length: count},
      (_, i) => scale(i) * random.normal() + (c === 0 ? east(i) : 0),
    );
  });
}

describe('a step by moving sums', () => {
  test('property: a knock planted in white noise is found, with its time and its size', () => {
    for (let seed = 0; seed < 20; seed++) {
      const at = 400 + 53 * seed;
      const components = noise(1800, seed, {east: (i) => (i < at ? 0 : 5)});
      const step = movingSumStep(times(1800), components, 1)!;
      expect(step.pValue).toBeLessThan(LEVEL);
      expect(Math.abs(step.atS - at)).toBeLessThanOrEqual(step.windowS);
      expect(Math.abs(step.jump[0]! - 5)).toBeLessThanOrEqual(2);
      const {atS, interval95S} = refineStepTime(
        times(1800),
        components[0]!,
        step.atS,
        step.windowS,
      );
      expect(Math.abs(atS - (at - 0.5))).toBeLessThanOrEqual(2);
      expect(interval95S[0]).toBeLessThanOrEqual(at);
      expect(interval95S[1]).toBeGreaterThanOrEqual(at - 1);
    }
  });

  test('property: the interval of the time holds it in about 95 of 100 records', () => {
    let held = 0;
    const records = 200;
    for (let seed = 0; seed < records; seed++) {
      const [east] = noise(600, 1000 + seed, {east: (i) => (i < 300 ? 0 : 1.5)});
      const [low, high] = refineStepTime(times(600), east!, 300, 40).interval95S;
      if (low <= 299.5 && high >= 299.5) held++;
    }
    expect(held).toBeGreaterThanOrEqual(0.9 * records);
  });

  test('property: at most 5 % of 200 records of white noise show one', () => {
    let shown = 0;
    for (let seed = 0; seed < 200; seed++) {
      const step = movingSumStep(times(900), noise(900, 5000 + seed, {}), 1);
      if (step !== undefined && step.pValue < LEVEL) shown++;
    }
    expect(shown).toBeLessThanOrEqual(10);
  });

  test('property: an excursion that returns is no step', () => {
    for (let seed = 0; seed < 20; seed++) {
      const away = (i: number) => (i >= 900 && i < 912 ? 6 : 0);
      const step = movingSumStep(times(1800), noise(1800, 200 + seed, {east: away}), 1);
      expect(step?.pValue ?? 1).toBeGreaterThanOrEqual(LEVEL);
    }
  });

  test('property: noise that doubles half-way is no step', () => {
    let shown = 0;
    for (let seed = 0; seed < 100; seed++) {
      const scale = (i: number) => (i < 900 ? 1 : 2);
      const step = movingSumStep(times(1800), noise(1800, 400 + seed, {scale}), 1);
      if (step !== undefined && step.pValue < LEVEL) shown++;
    }
    expect(shown).toBeLessThanOrEqual(5);
  });

  test('property: offset and unit do not matter', () => {
    const components = noise(1800, 77, {east: (i) => (i < 800 ? 0 : 4)});
    const moved = components.map((column) => column.map((value) => 6_378_137 + value / 1000));
    const [one, other] = [components, moved].map((c) => movingSumStep(times(1800), c, 1)!);
    expect(other!.atS).toBe(one!.atS);
    expect(other!.jump[0]! * 1000).toBeCloseTo(one!.jump[0]!, 4);
    expect(other!.pValue / one!.pValue).toBeCloseTo(1, 3);
  });

  test('a step across a gap is dated to the gap', () => {
    const elapsedS = Float64Array.from({length: 1800}, (_, i) => (i < 1000 ? i : i + 30));
    const [east] = noise(1800, 5, {east: (i) => (i < 1000 ? 0 : 6)});
    const {atS, interval95S} = refineStepTime(elapsedS, east!, 1010, 60);
    expect(atS).toBeGreaterThan(999);
    expect(atS).toBeLessThan(1030);
    expect(interval95S[0]).toBeLessThanOrEqual(999);
    expect(interval95S[1]).toBeGreaterThanOrEqual(1030);
  });

  test('edges: a record too short for any window, and constant components, show nothing', () => {
    expect(movingSumStep(times(60), noise(60, 1, {}), 1)).toBeUndefined();
    const still = [1, 2, 3].map((value) => new Float64Array(900).fill(value));
    expect(movingSumStep(times(900), still, 1)).toBeUndefined();
  });

  test('edge: too few epochs around the hit leave the time as it was found', () => {
    const {atS, interval95S} = refineStepTime(times(3, 100), Float64Array.of(0, 0, 1), 200, 50);
    expect(atS).toBe(200);
    expect(interval95S).toEqual([150, 250]);
  });
});
