import {expect, test} from 'vitest';
import {latitudeLongitudeSwapped} from '../../../../src/occupation/diagnosis/hypotheses/h04-latitude-longitude-swapped.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H04, plan part', () => {
  const expected = {...offsetOf(signature('H04')), upM: 0};
  // Printed to a millimetre.
  expect(nearestM(predictionsOf(latitudeLongitudeSwapped, bareInput()), expected)).toBeLessThan(
    1e-3,
  );
});

test('needs a plan position', () => {
  expect(reasonOf(latitudeLongitudeSwapped, bareInput({markPlan: null}))).toBe('no-plan');
});

test('a longitude above 90 degrees is no latitude', () => {
  expect(
    reasonOf(
      latitudeLongitudeSwapped,
      bareInput({markPlan: {latitudeDeg: -17, longitudeDeg: 179}}),
    ),
  ).toBe('cannot-happen-here');
});
