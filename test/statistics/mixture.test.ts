import {describe, expect, test} from 'vitest';
import {studentQuantile} from '../../src/statistics/distribution.ts';
import {mixtureCdf, mixtureHalfWidth, mixtureOf} from '../../src/statistics/mixture.ts';

/** Bound of the bisection that finds the half-width, relative. */
const BOUND = 1e-6;

/** Student's density with few degrees of freedom, written out (Abramowitz & Stegun 26.7). */
const DENSITY: Readonly<Record<number, (t: number) => number>> = {
  1: (t) => 1 / (Math.PI * (1 + t * t)),
  2: (t) => (2 + t * t) ** -1.5,
  4: (t) => 12 * (4 + t * t) ** -2.5,
};

/** P(|X − centre| ≤ h) by Simpson's rule over the densities. */
function inside(
  parts: readonly (readonly [weight: number, centre: number, scale: number])[],
  freedom: number,
  [centre, h]: readonly [number, number],
): number {
  const steps = 200_000;
  const step = (2 * h) / steps;
  const density = (x: number) =>
    parts.reduce((sum, [w, c, s]) => sum + (w / s) * DENSITY[freedom]!((x - c) / s), 0);
  let sum = density(centre - h) + density(centre + h);
  for (let i = 1; i < steps; i++) sum += (i % 2 === 1 ? 4 : 2) * density(centre - h + i * step);
  return (sum * step) / 3;
}

function mixed(parts: readonly (readonly [number, number, number])[], freedom: number) {
  const column = (k: 0 | 1 | 2) => Float64Array.from(parts, (part) => part[k]);
  return mixtureOf(column(0), column(1), column(2), freedom);
}

describe('half-width of a mixture of Student distributions', () => {
  test.each([2, 9, 159])('one part is Student itself, %i degrees of freedom', (freedom) => {
    const halfWidth = mixtureHalfWidth(mixed([[1, 5, 0.3]], freedom), 5, 0.95);
    expect(Math.abs(halfWidth / (0.3 * studentQuantile(0.975, freedom)) - 1)).toBeLessThanOrEqual(
      BOUND,
    );
  });

  test.each([
    [1, 0],
    [2, 0.4],
    [4, -3],
  ])(
    'property: holds 95 %% by direct integration, %i degrees of freedom, centre %f',
    (freedom, centre) => {
      const parts = [
        [0.5, 0, 1],
        [0.3, 0.8, 0.2],
        [0.2, -2, 3],
      ] as const;
      const halfWidth = mixtureHalfWidth(mixed(parts, freedom), centre, 0.95);
      expect(inside(parts, freedom, [centre, halfWidth * (1 + BOUND)])).toBeGreaterThan(0.95);
      expect(inside(parts, freedom, [centre, halfWidth * (1 - BOUND)])).toBeLessThan(0.95);
    },
  );

  test('two narrow parts far apart: the interval reaches over the farther one', () => {
    const mixture = mixed(
      [
        [0.9, 0, 1e-6],
        [0.1, 1, 1e-6],
      ],
      20,
    );
    // 90 % lie at 0, so that 95 % end at the middle of the part at 1.
    expect(mixtureHalfWidth(mixture, 0, 0.95)).toBeCloseTo(1, 5);
    expect(mixtureHalfWidth(mixture, 0, 0.8)).toBeLessThan(1e-5);
  });

  test('property: metres or millimetres, and any origin', () => {
    const plain = mixtureHalfWidth(
      mixed(
        [
          [0.4, 1, 2],
          [0.6, -1, 1],
        ],
        12,
      ),
      0.1,
      0.95,
    );
    const moved = mixtureHalfWidth(
      mixed(
        [
          [0.4, 1001, 2000],
          [0.6, -999, 1000],
        ].map(([w, c, s]) => [w!, c!, s!]),
        12,
      ),
      101,
      0.95,
    );
    expect(moved / 1000 / plain).toBeCloseTo(1, 5);
  });
});

describe('the mixture', () => {
  test('parts of no weight are left out and the rest is one', () => {
    const mixture = mixed(
      [
        [0.7, 1, 1],
        [1e-9, 1e6, 1],
        [0.1, 2, 1],
      ],
      5,
    );
    expect([...mixture.centres]).toEqual([1, 2]);
    expect(mixture.weights[0]! + mixture.weights[1]!).toBeCloseTo(1, 15);
    expect(mixture.weights[0]!).toBeCloseTo(0.875, 12);
  });

  test('property: the distribution rises from 0 to 1 and is even about a common centre', () => {
    const mixture = mixed(
      [
        [0.5, 3, 1],
        [0.5, 3, 5],
      ],
      3,
    );
    expect(mixtureCdf(mixture, 3)).toBeCloseTo(0.5, 14);
    expect(mixtureCdf(mixture, 4.5) + mixtureCdf(mixture, 1.5)).toBeCloseTo(1, 14);
    expect(mixtureCdf(mixture, -1e9)).toBeCloseTo(0, 12);
    expect(mixtureCdf(mixture, 1e9)).toBeCloseTo(1, 12);
  });
});
