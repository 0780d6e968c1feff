import {expect, test} from 'vitest';
import {heightWrongSign} from '../../../../src/occupation/diagnosis/hypotheses/v05-height-wrong-sign.ts';
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

test('reference: worked example V05', () => {
  const example = signature('V05');
  const found = predictionsOf(heightWrongSign, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(heightWrongSign, bareInput())).toBe('no-antenna-height');
});

test('property: sheet and receiver heights that differ are tested apart', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 1.5, receiverHeightM: 1.8};
  const found = predictionsOf(heightWrongSign, bareInput({antenna}));
  expect(found.map(({offset}) => offset.upM)).toEqual([3, 3.6]);
});
