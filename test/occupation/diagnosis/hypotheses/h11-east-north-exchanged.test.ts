import {expect, test} from 'vitest';
import {eastNorthExchanged} from '../../../../src/occupation/diagnosis/hypotheses/h11-east-north-exchanged.ts';
import {bareInput, fullInput, nearestM, predictionsOf, reasonOf} from '../check-input.ts';

test('property: an offset point is mirrored at the diagonal', () => {
  const found = predictionsOf(eastNorthExchanged, fullInput());
  expect(nearestM(found, {eastM: 2, northM: -2, upM: 0})).toBeLessThan(1e-9);
});

test('property: exchanged grid coordinates lie far away', () => {
  const [found] = predictionsOf(eastNorthExchanged, bareInput());
  expect(found?.values.of).toBe('grid');
  expect(Math.hypot(found?.offset.eastM ?? 0, found?.offset.northM ?? 0)).toBeGreaterThan(1e6);
});

test('needs a grid or an offset point', () => {
  expect(reasonOf(eastNorthExchanged, bareInput({markPlan: null}))).toBe('no-grid');
});
