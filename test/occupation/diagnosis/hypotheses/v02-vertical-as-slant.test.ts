import {expect, test} from 'vitest';
import {verticalAsSlant} from '../../../../src/occupation/diagnosis/hypotheses/v02-vertical-as-slant.ts';
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

test('reference: worked example V02', () => {
  const example = signature('V02');
  const found = predictionsOf(verticalAsSlant, fullInput());
  expect(nearestM(found, offsetOf(example))).toBeLessThan(0.5e-6);
});

test('needs the radius of the plate', () => {
  expect(reasonOf(verticalAsSlant, bareInput())).toBe('no-plate-radius');
});

test('a reading shorter than the plate is no slope', () => {
  const antenna = {...NO_ANTENNA, plateRadiusM: 0.2, arpAboveMarkM: 0.1};
  expect(reasonOf(verticalAsSlant, bareInput({antenna}))).toBe('no-height-reading');
});
