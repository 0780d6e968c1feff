import {expect, test} from 'vitest';
import {weekRollover} from '../../../../src/occupation/diagnosis/hypotheses/t02-week-rollover.ts';
import {bareInput, nearestM, predictionsOf, reasonOf} from '../check-input.ts';

test('reference: 1024 weeks are 7168 days, 19.62 years, of plate motion', () => {
  const found = predictionsOf(weekRollover, bareInput());
  // 19.48 and 15.68 mm a year at 50 N 10 E (plate motion model of ITRF2014, PROJ 9.1.1).
  const expected = {eastM: 0.01948 * 19.62, northM: 0.01568 * 19.62, upM: 0};
  expect(found).toHaveLength(2);
  expect(nearestM(found, expected)).toBeLessThan(0.02);
});

test('needs a plan position', () => {
  expect(reasonOf(weekRollover, bareInput({markPlan: null}))).toBe('no-plan');
});

test('needs a velocity', () => {
  expect(
    reasonOf(weekRollover, bareInput({markPlan: {latitudeDeg: -80, longitudeDeg: -120}})),
  ).toBe('no-velocity');
});
