import {expect, test} from 'vitest';
import {groundDistance} from '../../../../src/occupation/diagnosis/hypotheses/g01-ground-distance.ts';
import {bareInput, NOISE_M2, nearestM, predictionsOf, reasonOf, signature} from '../check-input.ts';

const other = {
  mark: 'PILLAR 7',
  offsetM: {east: 0, north: 0, up: 0},
  covarianceM2: NOISE_M2,
  fromItM: {eastM: 600, northM: 800},
};

test('reference: worked example G01, minus 0.384 m along 1 km', () => {
  const deltaM = signature('G01').delta_m ?? 0;
  const found = predictionsOf(groundDistance, bareInput({otherMarkChecks: [other]}));
  const expected = {eastM: 0.6 * deltaM, northM: 0.8 * deltaM, upM: 0};
  expect(nearestM(found, expected)).toBeLessThan(1e-4);
});

test('property: it starts from the offset of the other mark', () => {
  const off = {...other, offsetM: {east: 0.5, north: 0, up: null}};
  const [found] = predictionsOf(groundDistance, bareInput({otherMarkChecks: [off]}));
  expect(found?.offset.eastM).toBeCloseTo(0.5 - 0.6 * 0.38391, 3);
  expect(found?.covarianceM2[2][2]).toBeGreaterThan(1e5);
});

test('needs another mark', () => {
  expect(reasonOf(groundDistance, bareInput())).toBe('no-other-mark');
});

test('needs a height', () => {
  expect(
    reasonOf(groundDistance, bareInput({otherMarkChecks: [other], ellipsoidalHeightM: null})),
  ).toBe('no-ellipsoidal-height');
});

test('needs a grid', () => {
  expect(reasonOf(groundDistance, bareInput({otherMarkChecks: [other], markPlan: null}))).toBe(
    'no-grid',
  );
});
