import {expect, test} from 'vitest';
import {WGS84} from '../../../../src/geodesy/ellipsoid.ts';
import {enuFromGeodetic, localFrame} from '../../../../src/geodesy/local.ts';
import {decimalsAsMinutes} from '../../../../src/occupation/diagnosis/hypotheses/h06-decimals-as-minutes.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, signature} from '../check-input.ts';

const offsetTo = (markPlan: {latitudeDeg: number; longitudeDeg: number}, latitudeDeg: number) => {
  const frame = localFrame({...markPlan, ellipsoidalHeightM: 300}, WGS84);
  const {eastM, northM} = enuFromGeodetic(
    {latitudeDeg, longitudeDeg: markPlan.longitudeDeg, ellipsoidalHeightM: 300},
    frame,
  );
  return {eastM, northM, upM: 0};
};

test('reference: worked example H06, half a degree read as 50 minutes', () => {
  const markPlan = {latitudeDeg: 50.5, longitudeDeg: 10};
  const expected = offsetTo(markPlan, 50.5 + (signature('H06').dlat_deg ?? 0));
  const found = predictionsOf(decimalsAsMinutes, bareInput({markPlan}));
  expect(nearestM(found, expected)).toBeLessThan(1e-6);
});

test('property: a mark at 51.2 may be 50.72 read as 50 degrees 72 minutes', () => {
  const markPlan = {latitudeDeg: 51.2, longitudeDeg: 10};
  const found = predictionsOf(decimalsAsMinutes, bareInput({markPlan}));
  expect(nearestM(found, offsetTo(markPlan, 50.72))).toBeLessThan(1e-5);
});

test('needs a plan position', () => {
  expect(reasonOf(decimalsAsMinutes, bareInput({markPlan: null}))).toBe('no-plan');
});
