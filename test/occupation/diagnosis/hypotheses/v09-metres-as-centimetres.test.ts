import {expect, test} from 'vitest';
import {metresAsCentimetres} from '../../../../src/occupation/diagnosis/hypotheses/v09-metres-as-centimetres.ts';
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

test('reference: worked example V09', () => {
  const example = signature('V09');
  const found = predictionsOf(metresAsCentimetres, withHeight(2.0625));
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(metresAsCentimetres, bareInput())).toBe('no-antenna-height');
});

test('reference: an archived height of 0.0206 m, keyed in centimetres (campaign of 1999)', () => {
  const found = predictionsOf(metresAsCentimetres, withHeight(0.020625));
  expect(nearestM(found, offsetOf(signature('V09')))).toBeLessThan(PRINTED_M);
});

test('no antenna stands 200 m high', () => {
  const found = predictionsOf(metresAsCentimetres, withHeight(2));
  expect(found.map(({offset}) => offset.upM)).toEqual([1.98]);
});
