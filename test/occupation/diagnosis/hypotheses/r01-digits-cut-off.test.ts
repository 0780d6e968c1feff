import {expect, test} from 'vitest';
import {digitsCutOff} from '../../../../src/occupation/diagnosis/hypotheses/r01-digits-cut-off.ts';
import {bareInput, fullInput, predictionsOf, reasonOf, SITES} from '../check-input.ts';

test('half a step towards zero on each axis, spread over a step', () => {
  const input = bareInput({
    markPlan: SITES['mid-latitude south'],
    resolutionM: {east: 0.12, north: 0.18, up: 0.1},
  });
  const [found] = predictionsOf(digitsCutOff, input);
  expect(found?.offset).toEqual({eastM: -0.06, northM: 0.09, upM: -0.05});
  expect(found?.covarianceM2[1][1]).toBeCloseTo(0.18 ** 2 / 12, 12);
});

test('needs the resolution of the log', () => {
  expect(reasonOf(digitsCutOff, bareInput())).toBe('no-resolution');
});

test('needs a plan position', () => {
  expect(reasonOf(digitsCutOff, fullInput({markPlan: null}))).toBe('no-plan');
});
