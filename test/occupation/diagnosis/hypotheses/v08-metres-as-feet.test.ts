import {expect, test} from 'vitest';
import {metresAsFeet} from '../../../../src/occupation/diagnosis/hypotheses/v08-metres-as-feet.ts';
import {
  bareInput,
  fullInput,
  NO_ANTENNA,
  nearestM,
  offsetOf,
  predictionsOf,
  reasonOf,
  signature,
} from '../check-input.ts';

/** Half of the last digit printed. */
const PRINTED_M = 0.5e-5;

test('reference: worked example V08', () => {
  const example = signature('V08');
  const found = predictionsOf(metresAsFeet, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(metresAsFeet, bareInput())).toBe('no-antenna-height');
});

test('a sheet that holds 2 ft for 2 m shows the same offset', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 2 * 0.3048};
  const found = predictionsOf(metresAsFeet, bareInput({antenna}));
  expect(nearestM(found, offsetOf(signature('V08')))).toBeLessThan(PRINTED_M);
});
