import {expect, test} from 'vitest';
import {slantAsVertical} from '../../../../src/occupation/diagnosis/hypotheses/v01-slant-as-vertical.ts';
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

/** A sheet with one height. */
const withHeight = (heightM: number, readingM = heightM) => {
  const input = fullInput();
  return {
    ...input,
    antenna: {
      ...(input.antenna ?? NO_ANTENNA),
      arpAboveMarkM: heightM,
      reading: {lengthM: readingM, stepM: 0.001, unitM: 1},
    },
  };
};

test('reference: worked example V01', () => {
  const example = signature('V01');
  const found = predictionsOf(slantAsVertical, withHeight(1.80788, 1.8527));
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs the radius of the plate', () => {
  expect(reasonOf(slantAsVertical, bareInput())).toBe('no-plate-radius');
});

test('needs a reading', () => {
  expect(reasonOf(slantAsVertical, bareInput({antenna: {...NO_ANTENNA, plateRadiusM: 0.2}}))).toBe(
    'no-height-reading',
  );
});
