import {expect, test} from 'vitest';
import {wrongFix} from '../../../../src/occupation/diagnosis/hypotheses/q01-wrong-fix.ts';
import {bareInput, predictionsOf, reasonOf, withOffset} from '../check-input.ts';

test('offsets from 5 cm to 2 m are fitted', () => {
  const offset = {eastM: 0.2, northM: 0.1, upM: -0.2};
  const [found] = predictionsOf(wrongFix, withOffset(bareInput(), offset));
  expect(found?.offset).toEqual(offset);
  expect(found?.freeParameters).toBe(3);
});

test('smaller and larger ones are not', () => {
  expect(reasonOf(wrongFix, bareInput())).toBe('beyond-its-size');
});
