import {expect, test} from 'vitest';
import {longitudeSign} from '../../../../src/occupation/diagnosis/hypotheses/h03-longitude-sign.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H03, plan part', () => {
  const expected = {...offsetOf(signature('H03')), upM: 0};
  // Printed to a millimetre.
  expect(nearestM(predictionsOf(longitudeSign, bareInput()), expected)).toBeLessThan(1e-3);
});

test('needs a plan position', () => {
  expect(reasonOf(longitudeSign, bareInput({markPlan: null}))).toBe('no-plan');
});
