import {expect, test} from 'vitest';
import {heightAppliedTwice} from '../../../../src/occupation/diagnosis/hypotheses/v04-height-applied-twice.ts';
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

test('reference: worked example V04', () => {
  const example = signature('V04');
  const found = predictionsOf(heightAppliedTwice, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(heightAppliedTwice, bareInput())).toBe('no-antenna-height');
});

test('property: sheet and receiver heights that differ are tested apart', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 1.5, receiverHeightM: 1.8};
  const found = predictionsOf(heightAppliedTwice, bareInput({antenna}));
  expect(found.map(({offset}) => offset.upM)).toEqual([-1.5, -1.8]);
});
