import {expect, test} from 'vitest';
import {separationMissing} from '../../../../src/occupation/diagnosis/hypotheses/v20-separation-missing.ts';
import {
  bareInput,
  fullInput,
  nearestM,
  offsetOf,
  predictionsOf,
  reasonOf,
  signature,
} from '../check-input.ts';

test('reference: worked example V11, the same vector when the field is empty', () => {
  const separation = {known: [{source: 'sheet' as const, separationM: 48}], missingInLog: true};
  const found = predictionsOf(separationMissing, bareInput({separation}));
  expect(nearestM(found, offsetOf(signature('V11')))).toBeLessThan(1e-9);
});

test('does not apply when the log has a separation', () => {
  expect(reasonOf(separationMissing, fullInput())).toBe('separation-in-log');
});

test('is never guessed', () => {
  expect(
    reasonOf(separationMissing, bareInput({separation: {known: [], missingInLog: true}})),
  ).toBe('no-separation');
});
