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
  withOffset,
} from '../check-input.ts';

/** Half of the last digit printed. */
const PRINTED_M = 0.5e-5;

test('reference: worked example V03', () => {
  const example = signature('V03');
  const found = predictionsOf(heightNotApplied, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('a height that nobody gave is fitted to an offset that could be one', () => {
  const raised = withOffset(bareInput(), {eastM: 0, northM: 0, upM: 1.74});
  const [found] = predictionsOf(heightNotApplied, raised);
  expect(found).toMatchObject({freeParameters: 1, values: {heightM: 1.74, by: 'nobody'}});
});

test.each([-1.74, 0.05, 4.2])('no antenna stands %d m above its mark', (upM) => {
  const input = withOffset(bareInput(), {eastM: 0, northM: 0, upM});
  expect(reasonOf(heightNotApplied, input)).toBe('no-antenna-height');
});

test('nothing is fitted where the receiver took the height off', () => {
  const antenna = {...NO_ANTENNA, takenOffBy: 'receiver' as const};
  const input = withOffset(bareInput({antenna}), {eastM: 0, northM: 0, upM: 1.74});
  expect(reasonOf(heightNotApplied, input)).toBe('no-antenna-height');
});

test('property: sheet and receiver heights that differ are tested apart', () => {
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 1.5, receiverHeightM: 1.8};
  const found = predictionsOf(heightNotApplied, bareInput({antenna}));
  expect(found.map(({offset}) => offset.upM)).toEqual([1.5, 1.8]);
});
