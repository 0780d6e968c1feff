import {expect, test} from 'vitest';
import {digitsSwapped} from '../../../../src/occupation/diagnosis/hypotheses/v15-digits-swapped.ts';
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

test('reference: worked example V15', () => {
  const example = signature('V15');
  const found = predictionsOf(digitsSwapped, withHeight(1.352));
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a reading', () => {
  expect(reasonOf(digitsSwapped, bareInput())).toBe('no-height-reading');
});

test('property: swapped digits differ by 9 units of a digit, in the unit of the tape', () => {
  const feet = {lengthM: 6.08 * 0.3048, stepM: 0.01 * 0.3048, unitM: 0.3048};
  const antenna = {...NO_ANTENNA, reading: feet, takenOffBy: 'stillmark' as const};
  const found = predictionsOf(digitsSwapped, bareInput({antenna}));
  expect(found.map(({offset}) => Math.round(offset.upM / feet.stepM))).toEqual([-540, 72]);
});

test('equal digits cannot be swapped', () => {
  const antenna = {...NO_ANTENNA, reading: {lengthM: 2.222, stepM: 0.001, unitM: 1}};
  expect(reasonOf(digitsSwapped, bareInput({antenna}))).toBe('cannot-happen-here');
});
