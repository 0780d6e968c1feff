import {expect, test} from 'vitest';
import {settled} from '../../../../src/occupation/diagnosis/hypotheses/v19-settled.ts';
import {bareInput, NO_ANTENNA, predictionsOf, reasonOf} from '../check-input.ts';

const sunk = (heightUsed: 'opening' | 'mean') =>
  bareInput({antenna: {...NO_ANTENNA, openingM: 1.5, closingM: 1.46, heightUsed}});

test('an even sinking of 40 mm lowers the mean by 20 mm, an early one by up to all of it', () => {
  const found = predictionsOf(settled, sunk('opening'));
  expect(found[0]?.offset.upM).toBeCloseTo(-0.02, 12);
  expect(found[1]?.offset.upM).toBeCloseTo(-0.03, 12);
});

test('the mean height already allows for it', () => {
  expect(reasonOf(settled, sunk('mean'))).toBe('height-change-used');
});

test('needs the height before and after', () => {
  expect(reasonOf(settled, bareInput())).toBe('no-closing-height');
});
