import {expect, test} from 'vitest';
import {gridBearing} from '../../../../src/occupation/diagnosis/hypotheses/o02-grid-bearing.ts';
import {bareInput, fullInput, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example G01, convergence at 50 N 10 E over 10 m', () => {
  const gamma = ((signature('G01').convergence_deg ?? 0) * Math.PI) / 180;
  const [found] = predictionsOf(gridBearing, fullInput());
  const size = Math.hypot(found?.offset.eastM ?? 0, found?.offset.northM ?? 0);
  expect(size).toBeCloseTo(20 * Math.sin(gamma / 2), 6);
});

test('needs an offset point', () => {
  expect(reasonOf(gridBearing, bareInput())).toBe('no-offset-point');
});

test('needs a grid', () => {
  expect(reasonOf(gridBearing, fullInput({markPlan: null}))).toBe('no-grid');
});
