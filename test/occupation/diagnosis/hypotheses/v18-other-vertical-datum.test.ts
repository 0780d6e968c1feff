import {expect, test} from 'vitest';
import {otherVerticalDatum} from '../../../../src/occupation/diagnosis/hypotheses/v18-other-vertical-datum.ts';
import {bareInput, NOISE_M2, predictionsOf, reasonOf, withOffset} from '../check-input.ts';

const OTHER = {
  mark: 'PILLAR 7',
  offsetM: {east: 0.003, north: -0.002, up: 0.31},
  covarianceM2: NOISE_M2,
  fromItM: null,
};

test('another mark shows the constant of the region, with its uncertainty', () => {
  const [found] = predictionsOf(otherVerticalDatum, bareInput({otherMarkChecks: [OTHER]}));
  expect(found?.offset).toEqual({eastM: 0, northM: 0, upM: 0.31});
  expect(found?.covarianceM2[2][2]).toBeCloseTo(100e-6, 12);
  expect(found?.freeParameters).toBe(0);
});

test('alone it is fitted to the height, up to 3 m', () => {
  const low = withOffset(bareInput(), {eastM: 0, northM: 0, upM: 0.3});
  expect(predictionsOf(otherVerticalDatum, low)[0]?.freeParameters).toBe(1);
  const high = withOffset(bareInput(), {eastM: 0, northM: 0, upM: 5});
  expect(reasonOf(otherVerticalDatum, high)).toBe('beyond-its-size');
});
