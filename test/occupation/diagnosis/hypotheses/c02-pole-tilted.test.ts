import {expect, test} from 'vitest';
import {poleTilted} from '../../../../src/occupation/diagnosis/hypotheses/c02-pole-tilted.ts';
import {
  bareInput,
  fullInput,
  NOISE_M2,
  predictionsOf,
  reasonOf,
  signature,
  withOffset,
} from '../check-input.ts';

test('reference: worked example C02, 20 minutes at 2 m', () => {
  const {horizontal_m = 0, vertical_m = 0, inputs} = signature('C02');
  const offset = {eastM: horizontal_m, northM: 0, upM: 0};
  const [found] = predictionsOf(poleTilted, withOffset(fullInput(), offset));
  expect(found?.offset.upM).toBeCloseTo(vertical_m, 9);
  expect(found?.values.tiltMinutes).toBeCloseTo(inputs.t_arcmin ?? 0, 6);
  expect(found?.freeParameters).toBe(2);
});

test('a second set-up with the pole turned predicts it', () => {
  const turned = {
    offsetM: {east: -0.02, north: 0.001, up: 0},
    covarianceM2: NOISE_M2,
    sharedCovarianceM2: null,
    turnedDeg: 180,
    hoursLater: 0.1,
  };
  const input = withOffset(fullInput({sameMarkChecks: [turned]}), {
    eastM: 0.021,
    northM: 0,
    upM: 0,
  });
  expect(predictionsOf(poleTilted, input)[0]?.freeParameters).toBe(0);
});

test('a degree of tilt would be seen', () => {
  const offset = {eastM: 0.1, northM: 0, upM: 0};
  expect(reasonOf(poleTilted, withOffset(fullInput(), offset))).toBe('beyond-its-size');
});

test('needs the height of the pole', () => {
  expect(reasonOf(poleTilted, bareInput())).toBe('no-antenna-height');
});
