import {expect, test} from 'vitest';
import {otherGeoidModel} from '../../../../src/occupation/diagnosis/hypotheses/v17-other-geoid-model.ts';
import {bareInput, fullInput, predictionsOf, reasonOf} from '../check-input.ts';

test('the difference of each two separations, either way', () => {
  const ups = predictionsOf(otherGeoidModel, fullInput()).map(({offset}) => offset.upM);
  expect(ups[0]).toBeCloseTo(0.4, 9);
  expect(ups[1]).toBeCloseTo(-0.4, 9);
});

test('needs two separations', () => {
  expect(reasonOf(otherGeoidModel, bareInput())).toBe('one-separation');
});
