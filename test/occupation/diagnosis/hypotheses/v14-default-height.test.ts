import {expect, test} from 'vitest';
import {defaultHeight} from '../../../../src/occupation/diagnosis/hypotheses/v14-default-height.ts';
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

test('reference: worked example V14', () => {
  const example = signature('V14');
  const found = predictionsOf(defaultHeight, withHeight(1.8));
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs an antenna height', () => {
  expect(reasonOf(defaultHeight, bareInput())).toBe('no-antenna-height');
});

test('a tripod height is no pole length; only a receiver could have taken its default', () => {
  const input = withHeight(1.532);
  const offsets = predictionsOf(defaultHeight, input).map(({offset}) => offset.upM.toFixed(3));
  expect(offsets).toContain('-0.468');
  const antenna = {...input.antenna, takenOffBy: 'stillmark' as const};
  expect(reasonOf(defaultHeight, {...input, antenna})).toBe('cannot-happen-here');
});
