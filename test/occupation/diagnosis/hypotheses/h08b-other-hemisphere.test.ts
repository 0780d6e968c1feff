import {expect, test} from 'vitest';
import {otherHemisphere} from '../../../../src/occupation/diagnosis/hypotheses/h08b-other-hemisphere.ts';
import {bareInput, predictionsOf, reasonOf, SITES} from '../check-input.ts';

test('property: a southern mark read as northern lies in the north, and the reverse', () => {
  const south = bareInput({markPlan: SITES['mid-latitude south']});
  const [read] = predictionsOf(otherHemisphere, south);
  // From 35 S to where the northing of 6.1e6 m leads in the north, about 54 N.
  expect(read?.offset.northM).toBeGreaterThan(6e6);
  const [other] = predictionsOf(otherHemisphere, bareInput());
  expect(other?.offset.northM).toBeLessThan(-6e6);
});

test('needs a plan position', () => {
  expect(reasonOf(otherHemisphere, bareInput({markPlan: null}))).toBe('no-plan');
});

test('UTM ends at 84 degrees', () => {
  expect(reasonOf(otherHemisphere, bareInput({markPlan: {latitudeDeg: 87, longitudeDeg: 0}}))).toBe(
    'no-grid',
  );
});
