import {expect, test} from 'vitest';
import {plummetOut} from '../../../../src/occupation/diagnosis/hypotheses/c01-plummet-out.ts';
import {
  bareInput,
  NOISE_M2,
  nearestM,
  predictionsOf,
  reasonOf,
  signature,
  withOffset,
} from '../check-input.ts';

const second = (east: number, north: number, turnedDeg: number | null) => ({
  offsetM: {east, north, up: 0},
  covarianceM2: SMALL_M2,
  sharedCovarianceM2: null,
  turnedDeg,
  hoursLater: 1,
});
/** Half a millimetre, so that 4 mm are seen. */
const SMALL_M2 = NOISE_M2.map((row) => row.map((value) => value / 100));
const [east = 0, north = 0] = signature('C01').d1 ?? [];

test('reference: worked example C01, the set-up turned by half a turn shows the opposite', () => {
  const input = bareInput({
    covarianceM2: SMALL_M2,
    offsetM: {east, north, up: 0},
    sameMarkChecks: [second(-east, -north, 180)],
  });
  const [found] = predictionsOf(plummetOut, input);
  expect(found?.offset.eastM).toBeCloseTo(east, 12);
  expect(found?.offset.northM).toBeCloseTo(north, 12);
  expect(found?.values.eccentricityM).toBeCloseTo(signature('C01').inputs.e ?? 0, 12);
  expect(found?.freeParameters).toBe(0);
});

test('property: any turn of the tribrach turns the eccentricity with it, clockwise', () => {
  const turnRad = (120 * Math.PI) / 180;
  const azimuthRad = Math.atan2(east, north) + turnRad;
  const e = Math.hypot(east, north);
  const turned = second(e * Math.sin(azimuthRad), e * Math.cos(azimuthRad), 120);
  const input = bareInput({
    covarianceM2: SMALL_M2,
    offsetM: {east, north, up: 0},
    sameMarkChecks: [turned],
  });
  expect(
    nearestM(predictionsOf(plummetOut, input), {eastM: east, northM: north, upM: 0}),
  ).toBeLessThan(1e-9);
});

test('property: what both set-ups share counts double at half a turn', () => {
  const shared = {...second(-east, -north, 180), sharedCovarianceM2: SMALL_M2};
  const input = bareInput({
    covarianceM2: SMALL_M2,
    offsetM: {east, north, up: 0},
    sameMarkChecks: [shared],
  });
  const [found] = predictionsOf(plummetOut, input);
  expect(found?.covarianceM2[0][0]).toBeCloseTo(3 * SMALL_M2[0]![0]!, 15);
});

test('a turn that changes nothing clears the plummet', () => {
  const input = bareInput({
    covarianceM2: SMALL_M2,
    offsetM: {east, north, up: 0},
    sameMarkChecks: [second(east, north, 180)],
  });
  expect(reasonOf(plummetOut, input)).toBe('set-ups-agree');
});

test('one set-up alone is fitted, up to 20 mm', () => {
  const small = withOffset(bareInput(), {eastM: 0.01, northM: 0, upM: 0});
  expect(predictionsOf(plummetOut, small)[0]?.freeParameters).toBe(2);
  const large = withOffset(bareInput(), {eastM: 0.1, northM: 0, upM: 0});
  expect(reasonOf(plummetOut, large)).toBe('beyond-its-size');
});
