import {expect, test} from 'vitest';
import {digitWrong} from '../../../../src/occupation/diagnosis/hypotheses/v16-digit-wrong.ts';
import {bareInput, fullInput, NO_ANTENNA, predictionsOf, reasonOf} from '../check-input.ts';

test('a metre or a decimetre, either way', () => {
  const ups = predictionsOf(digitWrong, fullInput()).map(({offset}) => offset.upM);
  expect(ups).toEqual([1, -1, 0.1, -0.1]);
});

test('feet on a tape in feet', () => {
  const reading = {lengthM: 6.08 * 0.3048, stepM: 0.003048, unitM: 0.3048};
  const antenna = {...NO_ANTENNA, arpAboveMarkM: 1.853, reading};
  const [first] = predictionsOf(digitWrong, bareInput({antenna}));
  expect(first?.offset.upM).toBe(0.3048);
});

test('needs an antenna height', () => {
  expect(reasonOf(digitWrong, bareInput())).toBe('no-antenna-height');
});
