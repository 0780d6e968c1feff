import {expect, test} from 'vitest';
import {binomialAtMost, meets} from './truth-bars.ts';

test('reference: binomial probabilities of ten tosses of a fair coin, by counting', () => {
  expect(binomialAtMost(0, 10, 0.5)).toBeCloseTo(1 / 1024, 15);
  expect(binomialAtMost(3, 10, 0.5)).toBeCloseTo((1 + 10 + 45 + 120) / 1024, 14);
  expect(binomialAtMost(10, 10, 0.5)).toBe(1);
});

test('property: of 500, 463 hits are the least that do not contradict 95 %', () => {
  const bar = {kind: 'at least', percent: 95} as const;
  expect(meets({hits: 463, trials: 500}, bar)).toBe(true);
  expect(meets({hits: 462, trials: 500}, bar)).toBe(false);
  expect(meets({hits: 40, trials: 500}, {kind: 'at most', percent: 5})).toBe(false);
  expect(meets({hits: 30, trials: 500}, {kind: 'at most', percent: 5})).toBe(true);
});
