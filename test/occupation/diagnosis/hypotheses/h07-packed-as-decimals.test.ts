import {expect, test} from 'vitest';
import {WGS84} from '../../../../src/geodesy/ellipsoid.ts';
import {enuFromGeodetic, localFrame} from '../../../../src/geodesy/local.ts';
import {packedAsDecimals} from '../../../../src/occupation/diagnosis/hypotheses/h07-packed-as-decimals.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H07, 50 30 30 packed as 50.3030', () => {
  const markPlan = {latitudeDeg: 50 + 30.5 / 60, longitudeDeg: 10};
  const frame = localFrame({...markPlan, ellipsoidalHeightM: 300}, WGS84);
  const latitudeDeg = markPlan.latitudeDeg + (signature('H07').dlat_deg ?? 0);
  const read = enuFromGeodetic({latitudeDeg, longitudeDeg: 10, ellipsoidalHeightM: 300}, frame);
  const found = predictionsOf(packedAsDecimals, bareInput({markPlan}));
  expect(nearestM(found, {...read, upM: 0})).toBeLessThan(1e-5);
});

test('property: a mark whose decimals cannot be minutes was not misread', () => {
  const markPlan = {latitudeDeg: 50.7, longitudeDeg: 10.7};
  const sides = predictionsOf(packedAsDecimals, bareInput({markPlan})).map(
    ({values}) => values.side,
  );
  expect(new Set(sides)).toEqual(new Set(['measured']));
});

test('needs a plan position', () => {
  expect(reasonOf(packedAsDecimals, bareInput({markPlan: null}))).toBe('no-plan');
});
