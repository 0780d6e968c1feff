import {expect, test} from 'vitest';
import {separationRemovedTwice} from '../../../../src/occupation/diagnosis/hypotheses/v12-separation-removed-twice.ts';
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

test('reference: worked example V12', () => {
  const example = signature('V12');
  const found = predictionsOf(separationRemovedTwice, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a separation', () => {
  expect(reasonOf(separationRemovedTwice, bareInput())).toBe('no-separation');
});

test('reference: mailing list 2009, altitude 230.7 and separation -27.0 shown as 257.7 m', () => {
  const separation = {known: [{source: 'log' as const, separationM: -27}], missingInLog: false};
  const found = predictionsOf(separationRemovedTwice, bareInput({separation}));
  expect(nearestM(found, {eastM: 0, northM: 0, upM: 257.7 - 230.7})).toBeLessThan(0.05);
});
