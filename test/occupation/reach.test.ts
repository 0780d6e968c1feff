import {describe, expect, test} from 'vitest';
import type {Asked} from '../../src/occupation/compare.ts';
import {outOfReach} from '../../src/occupation/reach.ts';

/*
 * With white noise the uncertainty of the mean falls with the root of the time, so the time needed
 * follows in closed form from the quantiles: 1.95996 (normal, two-sided 95 %) and 2.44775 (radius of
 * 95 % of a circular normal distribution).
 */
const SPAN_S = 600;
const SESSION_M = {plan: 0.006, up: 0.012};
const OTHERS_M = {plan: 0.004, up: 0.007};

const diagonal = (plan: number, up: number) => [
  [plan ** 2, 0, 0],
  [0, plan ** 2, 0],
  [0, 0, up ** 2],
];

const total = diagonal(
  Math.hypot(SESSION_M.plan, OTHERS_M.plan),
  Math.hypot(SESSION_M.up, OTHERS_M.up),
);

function reach(...asked: Asked[]) {
  return outOfReach({
    asked,
    session: {
      timeForPart: (part) => ({aboutS: SPAN_S / part ** 2, allowS: (1.3 * SPAN_S) / part ** 2}),
    },
    sessionM2: diagonal(SESSION_M.plan, SESSION_M.up),
    totalM2: total,
  });
}

function asked(of: Asked['of'], toleranceM: number): Asked {
  return {of, toleranceM, reason: null};
}

describe('how long a record would have to be for a tolerance', () => {
  test('horizontal', () => {
    const [found] = reach(asked('horizontal', 0.012));
    const part2 = ((0.012 / 2.447746830680816) ** 2 - 0.004 ** 2) / 0.006 ** 2;
    expect(found!.needed).toMatchObject({aboutS: expect.closeTo(SPAN_S / part2, 2)});
  });

  test('height', () => {
    const [found] = reach(asked('up', 0.02));
    const part2 = ((0.02 / 1.959963984540054) ** 2 - 0.007 ** 2) / 0.012 ** 2;
    expect(found!.needed).toMatchObject({aboutS: expect.closeTo(SPAN_S / part2, 2)});
  });

  test('what could pass as it is, is not listed', () => {
    expect(reach(asked('horizontal', 0.02), asked('up', 0.03))).toEqual([]);
  });

  test('no length of record helps where the other contributions are too much', () => {
    expect(reach(asked('horizontal', 0.009))[0]!.needed).toBe('never');
    expect(reach(asked('up', 0.013))[0]!.needed).toBe('never');
  });

  test('a time that cannot be told is said so', () => {
    const [found] = outOfReach({
      asked: [asked('up', 0.02)],
      session: {timeForPart: () => null},
      sessionM2: diagonal(SESSION_M.plan, SESSION_M.up),
      totalM2: total,
    });
    expect(found!.needed).toBe('not known');
  });

  test('a height that is not known is not asked for', () => {
    const unknown = diagonal(0.007, Number.NaN);
    const found = outOfReach({
      asked: [asked('up', 0.001)],
      session: {timeForPart: () => null},
      sessionM2: unknown,
      totalM2: unknown,
    });
    expect(found).toEqual([]);
  });
});
