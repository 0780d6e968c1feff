import {expect, test} from 'vitest';
import {otherPointOfAntenna} from '../../../../src/occupation/diagnosis/hypotheses/v06-other-point-of-antenna.ts';
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

test('reference: worked example V06', () => {
  const example = signature('V06');
  const found = predictionsOf(otherPointOfAntenna, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a point above the reference point', () => {
  expect(reasonOf(otherPointOfAntenna, bareInput())).toBe('no-phase-centre');
});

test('property: both directions, and the slant mark too', () => {
  const ups = predictionsOf(otherPointOfAntenna, fullInput()).map(({offset}) => offset.upM);
  expect(ups).toEqual([0.085, -0.085, 0.035, -0.035]);
});
