import {describe, expect, test} from 'vitest';
import {
  cep,
  drms,
  mrse,
  probabilityInCircle,
  probabilityWithinRadius,
  probabilityWithinSphere,
  r95,
  radiusHolding,
  sep,
  sphereRadiusHolding,
} from '../../src/statistics/accuracy-measures.ts';
import {errorEllipse} from '../../src/statistics/ellipse.ts';
import {readReference} from '../reference/read.ts';

interface Measures {
  readonly exact: {
    readonly measures: readonly {
      readonly name: string;
      readonly dimension: number;
      readonly radius_in_sigma: string;
      readonly probability: string;
    }[];
  };
  readonly noncircular_2D: {
    readonly rows: readonly {
      readonly sigma_min_over_sigma_max: string;
      readonly radius_over_sigma_max: Readonly<Record<string, string>>;
    }[];
  };
  readonly noncircular_3D: {
    readonly rows: readonly {
      readonly sigma: readonly number[];
      readonly radius: Readonly<Record<string, string>>;
    }[];
  };
}

const reference = readReference<Measures>('b3_accuracy_measures');
const CIRCLE = {eastEast: 1, northNorth: 1, eastNorth: 0};
const SPHERE = diagonal([1, 1, 1]);

function diagonal(sigmas: readonly number[]): number[][] {
  return sigmas.map((sigma, i) => sigmas.map((_, j) => (i === j ? sigma ** 2 : 0)));
}

/** Bound of the exact rows, relative. */
const BOUND = 1e-6;

function near(found: number, exact: string): void {
  expect(Math.abs(found / Number(exact) - 1)).toBeLessThanOrEqual(BOUND);
}

describe('reference: exact measures by mpmath quadrature, ≤ 1e-6 relative', () => {
  const plane = reference.exact.measures.filter(({dimension}) => dimension === 2);
  const space = reference.exact.measures.filter(({dimension}) => dimension === 3);

  test('there are rows in the plane and in space', () => {
    expect(plane.length).toBeGreaterThan(3);
    expect(space.length).toBeGreaterThan(2);
  });

  test.each(plane)('in the plane: $name', ({radius_in_sigma, probability}) => {
    near(radiusHolding(Number(probability), CIRCLE), radius_in_sigma);
    near(probabilityWithinRadius(Number(radius_in_sigma), CIRCLE), probability);
  });

  test.each(space)('in space: $name', ({radius_in_sigma, probability}) => {
    near(sphereRadiusHolding(Number(probability), SPHERE), radius_in_sigma);
    near(probabilityWithinSphere(Number(radius_in_sigma), SPHERE), probability);
  });

  test.each(reference.noncircular_2D.rows)(
    'unequal axes, ratio $sigma_min_over_sigma_max',
    (row) => {
      const ratio = Number(row.sigma_min_over_sigma_max);
      const covariance = {eastEast: 1, northNorth: ratio ** 2, eastNorth: 0};
      for (const [p, radius] of Object.entries(row.radius_over_sigma_max)) {
        near(radiusHolding(Number(p), covariance), radius);
      }
    },
  );

  test.each(reference.noncircular_3D.rows)('unequal axes in space, $sigma', ({sigma, radius}) => {
    for (const [p, exact] of Object.entries(radius)) {
      near(sphereRadiusHolding(Number(p), diagonal(sigma)), exact);
    }
  });
});

describe('the measures by name', () => {
  test('reference: National Research Council (1995), Appendix D: CEP = 0.589 (σN + σE) for circles', () => {
    expect(cep(CIRCLE) / 2).toBeCloseTo(0.589, 3);
    expect(sep(SPHERE) / 3).toBeCloseTo(0.513, 3);
  });

  test('reference: FGDC-STD-007.3-1998: 2.4477 σ, or 1.7308 times the root mean square distance', () => {
    expect(r95(CIRCLE)).toBeCloseTo(2.4477, 4);
    expect(r95(CIRCLE) / drms(CIRCLE)).toBeCloseTo(1.7308, 4);
  });

  test('DRMS and MRSE are roots of sums of squares', () => {
    expect(drms({eastEast: 9, northNorth: 16, eastNorth: 3})).toBe(5);
    expect(mrse(diagonal([2, 3, 6]))).toBe(7);
  });

  test('property: turning the axes changes no radius', () => {
    const turned = (angle: number) => {
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      return {
        eastEast: 4 * c * c + s * s,
        northNorth: 4 * s * s + c * c,
        eastNorth: (4 - 1) * c * s,
      };
    };
    for (const angle of [0.3, 1.1, 2.7]) {
      expect(r95(turned(angle))).toBeCloseTo(r95(turned(0)), 9);
      expect(errorEllipse(turned(angle)).semiMajor).toBeCloseTo(2, 12);
    }
  });

  test('property: a shifted circle, by the Rice distribution summed on a fine grid', () => {
    const question = {
      radius: 2,
      east: 0.7,
      north: -0.4,
      covariance: {eastEast: 1, northNorth: 0.5, eastNorth: 0.3},
    };
    const {eastEast: a, northNorth: b, eastNorth: c} = question.covariance;
    const determinant = a * b - c * c;
    let sum = 0;
    const step = 0.002;
    for (let x = -2 + step / 2; x < 2; x += step) {
      const half = Math.sqrt(4 - x * x);
      const rows = Math.max(1, Math.round((2 * half) / step));
      for (let k = 0; k < rows; k++) {
        const y = -half + ((k + 0.5) * 2 * half) / rows;
        const [dx, dy] = [x - 0.7, y + 0.4];
        const square = (b * dx * dx - 2 * c * dx * dy + a * dy * dy) / determinant;
        sum += (Math.exp(-square / 2) * step * 2 * half) / rows;
      }
    }
    expect(probabilityInCircle(question)).toBeCloseTo(
      sum / (2 * Math.PI * Math.sqrt(determinant)),
      5,
    );
  });

  test('degenerate: no spread, and a line', () => {
    const point = {eastEast: 0, northNorth: 0, eastNorth: 0};
    expect(r95(point)).toBe(0);
    expect(sphereRadiusHolding(0.5, diagonal([0, 0, 0]))).toBe(0);
    expect(probabilityWithinSphere(1, diagonal([0, 0, 0]))).toBe(1);
    expect(r95({eastEast: 1, northNorth: 0, eastNorth: 0})).toBeCloseTo(1.959964, 5);
  });
});

describe('error ellipse', () => {
  test('reference: GeodePy tests (Geoscience Australia), commit 00bd983: a, b and bearing', () => {
    const ellipse = errorEllipse({eastEast: 1.44, northNorth: 1.22, eastNorth: -1.32});
    expect(ellipse.semiMajor).toBeCloseTo(1.6292867776, 10);
    expect(ellipse.semiMinor).toBeCloseTo(0.073651859, 9);
    expect(ellipse.azimuthDeg).toBeCloseTo(132.618179, 6);
  });

  test('a circle has no direction, and north is 0°', () => {
    expect(errorEllipse(CIRCLE).azimuthDeg).toBeUndefined();
    expect(errorEllipse({eastEast: 1, northNorth: 4, eastNorth: 0}).azimuthDeg).toBeCloseTo(0, 12);
  });
});
