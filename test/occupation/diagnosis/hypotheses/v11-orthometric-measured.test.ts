import {expect, test} from 'vitest';
import {orthometricMeasured} from '../../../../src/occupation/diagnosis/hypotheses/v11-orthometric-measured.ts';
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

test('reference: worked example V11', () => {
  const example = signature('V11');
  const found = predictionsOf(orthometricMeasured, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a separation', () => {
  expect(reasonOf(orthometricMeasured, bareInput())).toBe('no-separation');
});
