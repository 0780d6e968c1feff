import {expect, test} from 'vitest';
import {feetAsMetres} from '../../../../src/occupation/diagnosis/hypotheses/v07-feet-as-metres.ts';
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

test('reference: worked example V07', () => {
  const example = signature('V07');
  const found = predictionsOf(feetAsMetres, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(feetAsMetres, bareInput())).toBe('no-antenna-height');
});

test('a sheet that holds 6.5617 m for 2 m is 4.56 m too high in the same way', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 2 / 0.3048};
  const found = predictionsOf(feetAsMetres, bareInput({antenna}));
  expect(nearestM(found, offsetOf(signature('V07')))).toBeLessThan(PRINTED_M);
});
