import {expect, test} from 'vitest';
import {oceanLoading} from '../../../../src/occupation/diagnosis/hypotheses/l01-ocean-loading.ts';
import {bareInput, NOISE_M2, predictionsOf, reasonOf, withOffset} from '../check-input.ts';

const session = (hoursLater: number | null, up: number) => ({
  offsetM: {east: 0, north: 0, up},
  covarianceM2: NOISE_M2,
  sharedCovarianceM2: null,
  turnedDeg: null,
  hoursLater,
});
const input = (hoursLater: number | null, up: number) =>
  withOffset(bareInput({sameMarkChecks: [session(hoursLater, up)]}), {
    eastM: 0,
    northM: 0,
    upM: 0.025,
  });

test('two sessions half a tide apart: each is half of their difference from the mean', () => {
  const [found] = predictionsOf(oceanLoading, input(6.2, -0.025));
  expect(found?.offset.upM).toBeCloseTo(0.025, 12);
  expect(found?.freeParameters).toBe(3);
});

test('no tide lifts the ground by 100 mm', () => {
  expect(reasonOf(oceanLoading, input(6.2, -0.075))).toBe('beyond-its-size');
});

test.each([null, 1, 12])('needs a second session half a tide away, not %s h', (hours) => {
  expect(reasonOf(oceanLoading, input(hours, -0.025))).toBe('no-second-session');
});
