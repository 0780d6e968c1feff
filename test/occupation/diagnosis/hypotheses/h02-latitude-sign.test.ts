import {expect, test} from 'vitest';
import {latitudeSign} from '../../../../src/occupation/diagnosis/hypotheses/h02-latitude-sign.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H02, plan part', () => {
  const expected = {...offsetOf(signature('H02')), upM: 0};
  // Printed to a millimetre.
  expect(nearestM(predictionsOf(latitudeSign, bareInput()), expected)).toBeLessThan(1e-3);
});

test('needs a plan position', () => {
  expect(reasonOf(latitudeSign, bareInput({markPlan: null}))).toBe('no-plan');
});
