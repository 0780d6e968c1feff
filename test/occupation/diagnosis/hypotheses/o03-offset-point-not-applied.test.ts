import {expect, test} from 'vitest';
import {offsetPointNotApplied} from '../../../../src/occupation/diagnosis/hypotheses/o03-offset-point-not-applied.ts';
import {bareInput, fullInput, predictionsOf, reasonOf} from '../check-input.ts';

test('property: minus the vector when it was applied for nothing, twice it when backwards', () => {
  const found = predictionsOf(offsetPointNotApplied, fullInput());
  expect(found.map(({offset}) => offset)).toEqual([
    {eastM: -6, northM: -8, upM: 0},
    {eastM: -12, northM: -16, upM: 0},
  ]);
});

test('needs an offset point', () => {
  expect(reasonOf(offsetPointNotApplied, bareInput())).toBe('no-offset-point');
});
