import {expect, test} from 'vitest';
import {heightNotApplied} from '../../../../src/occupation/diagnosis/hypotheses/v03-height-not-applied.ts';
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

test('reference: worked example V03', () => {
  const example = signature('V03');
  const found = predictionsOf(heightNotApplied, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(heightNotApplied, bareInput())).toBe('no-antenna-height');
});

test('property: sheet and receiver heights that differ are tested apart', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 1.5, receiverHeightM: 1.8};
  const found = predictionsOf(heightNotApplied, bareInput({antenna}));
  expect(found.map(({offset}) => offset.upM)).toEqual([1.5, 1.8]);
});
