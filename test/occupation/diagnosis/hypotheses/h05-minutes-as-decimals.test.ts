import {expect, test} from 'vitest';
import {WGS84} from '../../../../src/geodesy/ellipsoid.ts';
import {enuFromGeodetic, localFrame} from '../../../../src/geodesy/local.ts';
import {minutesAsDecimals} from '../../../../src/occupation/diagnosis/hypotheses/h05-minutes-as-decimals.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H05, 30 minutes read as 0.30 degrees', () => {
  const {inputs, dlat_deg = 0} = signature('H05');
  const markPlan = {latitudeDeg: inputs.lat_true ?? 0, longitudeDeg: 10};
  const read = {latitudeDeg: markPlan.latitudeDeg + dlat_deg, longitudeDeg: 10};
  const frame = localFrame({...markPlan, ellipsoidalHeightM: 300}, WGS84);
  const {eastM, northM} = enuFromGeodetic({...read, ellipsoidalHeightM: 300}, frame);
  const found = predictionsOf(minutesAsDecimals, bareInput({markPlan}));
  expect(nearestM(found, {eastM, northM, upM: 0})).toBeLessThan(1e-6);
  expect(Math.hypot(eastM, northM)).toBeCloseTo(signature('H05').geodesic_m ?? 0, -2);
});

test('property: what was misread comes back when the mark was misread', () => {
  // 50.7 cannot be the reading of minutes over 100.
  const markPlan = {latitudeDeg: 50.7, longitudeDeg: 10.7};
  const sides = predictionsOf(minutesAsDecimals, bareInput({markPlan})).map(
    ({values}) => values.side,
  );
  expect(new Set(sides)).toEqual(new Set(['measured']));
});

test('needs a plan position', () => {
  expect(reasonOf(minutesAsDecimals, bareInput({markPlan: null}))).toBe('no-plan');
});
