import {expect, test} from 'vitest';
import {baseWrong} from '../../../../src/occupation/diagnosis/hypotheses/b01-base-wrong.ts';
import {bareInput, NOISE_M2, predictionsOf, reasonOf, withOffset} from '../check-input.ts';

const other = (east: number, up: number | null) => ({
  mark: 'PILLAR 7',
  offsetM: {east, north: 0.1, up},
  covarianceM2: NOISE_M2,
  fromItM: null,
});

test('another mark with the same offset predicts it, with its uncertainty', () => {
  const [found] = predictionsOf(baseWrong, bareInput({otherMarkChecks: [other(0.4, 0.2)]}));
  expect(found?.offset).toEqual({eastM: 0.4, northM: 0.1, upM: 0.2});
  expect(found?.covarianceM2).toEqual(NOISE_M2);
  expect(found?.freeParameters).toBe(0);
});

test('another mark without a height leaves the height open', () => {
  const [found] = predictionsOf(baseWrong, bareInput({otherMarkChecks: [other(0.4, null)]}));
  expect(found?.covarianceM2[2][2]).toBeGreaterThan(1e5);
});

test('another mark that fits speaks against it', () => {
  const fits = {...other(0.004, 0.01), offsetM: {east: 0.004, north: 0.002, up: 0.01}};
  expect(reasonOf(baseWrong, bareInput({otherMarkChecks: [fits]}))).toBe('other-mark-fits');
});

test('alone it is fitted to the whole offset', () => {
  const [found] = predictionsOf(baseWrong, withOffset(bareInput(), {eastM: 1, northM: 2, upM: 3}));
  expect(found?.offset).toEqual({eastM: 1, northM: 2, upM: 3});
  expect(found?.freeParameters).toBe(3);
});
