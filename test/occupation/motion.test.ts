import {describe, expect, test} from 'vitest';
import {isTravelling, standingPeriods, type Track} from '../../src/occupation/motion.ts';

/** A track at 1 Hz from a function of time, with a small repeatable wander. */
function track(count: number, at: (elapsedS: number) => [number, number]): Track {
  const gpsSeconds = new Float64Array(count);
  const eastM = new Float64Array(count);
  const northM = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const [east, north] = at(i);
    gpsSeconds[i] = 1.4e9 + i;
    eastM[i] = east + 0.003 * Math.sin(i * 1.7);
    northM[i] = north + 0.003 * Math.cos(i * 2.3);
  }
  return {gpsSeconds, eastM, northM};
}

describe('travel and standing', () => {
  test('a receiver at rest stands for the whole record', () => {
    const still = track(600, () => [0, 0]);
    expect(isTravelling(still)).toBe(false);
    expect(standingPeriods(still)).toEqual([{first: 0, last: 599}]);
  });

  test('a walk with two stops yields the two stops to within a few seconds', () => {
    const walk = track(700, (t) => {
      if (t < 200) return [0, 0];
      if (t < 300) return [1.2 * (t - 200), 0];
      if (t < 500) return [120, 0];
      return [120, 1.2 * (t - 500)];
    });
    const periods = standingPeriods(walk);
    expect(periods).toHaveLength(2);
    expect(Math.abs(periods[0]!.last - 199)).toBeLessThanOrEqual(3);
    expect(Math.abs(periods[1]!.first - 300)).toBeLessThanOrEqual(3);
    expect(Math.abs(periods[1]!.last - 499)).toBeLessThanOrEqual(3);
    expect(isTravelling(walk)).toBe(true);
  });

  test('a jump of the positions is no journey', () => {
    const jump = track(600, (t) => (t < 300 ? [0, 0] : [4, -3]));
    expect(isTravelling(jump)).toBe(false);
    expect(standingPeriods(jump)).toHaveLength(1);
  });

  test('a drift too slow to be walking is travel once it has gone far', () => {
    expect(isTravelling(track(1200, (t) => [0.1 * t, 0]))).toBe(true);
    expect(isTravelling(track(1200, (t) => [0.01 * t, 0]))).toBe(false);
  });

  test('nothing, and a single epoch', () => {
    expect(standingPeriods(track(0, () => [0, 0]))).toEqual([]);
    expect(standingPeriods(track(1, () => [0, 0]))).toEqual([{first: 0, last: 0}]);
  });
});
