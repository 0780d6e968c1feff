import {expect, test} from 'vitest';
import {geocentricLatitude} from '../../../../src/occupation/diagnosis/hypotheses/h10-geocentric-latitude.ts';
import {bareInput, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H10, distance along the meridian', () => {
  const [measured, mark] = predictionsOf(geocentricLatitude, bareInput());
  // The plane of the offset falls short of the geodesic by 0.04 m in 21 km, at 300 m height by 1 m.
  expect(Math.abs(measured?.offset.northM ?? 0)).toBeCloseTo(signature('H10').geodesic_m ?? 0, -1);
  expect(measured?.offset.northM).toBeLessThan(0);
  expect(mark?.offset.northM).toBeGreaterThan(0);
});

test('needs a plan position', () => {
  expect(reasonOf(geocentricLatitude, bareInput({markPlan: null}))).toBe('no-plan');
});
