import {expect, test} from 'vitest';
import {separationWrongSign} from '../../../../src/occupation/diagnosis/hypotheses/v13-separation-wrong-sign.ts';
import {
  bareInput,
  fullInput,
  nearestM,
  offsetOf,
  predictionsOf,
  reasonOf,
  signature,
} from '../check-input.ts';

/** Half of the last digit printed. */
const PRINTED_M = 0.5e-5;

test('reference: worked example V13', () => {
  const example = signature('V13');
  const found = predictionsOf(separationWrongSign, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a separation', () => {
  expect(reasonOf(separationWrongSign, bareInput())).toBe('no-separation');
});

test('property: the other way where an ellipsoidal height was wanted', () => {
  expect(predictionsOf(separationWrongSign, fullInput()).map(({offset}) => offset.upM)).toEqual([
    96, -96,
  ]);
});
