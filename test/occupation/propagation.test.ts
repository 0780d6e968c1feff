import {describe, expect, test} from 'vitest';
import {covarianceEcefFromEnu} from '../../src/geodesy/covariance.ts';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {transformPosition} from '../../src/geodesy/frames.ts';
import {ecefFromGeodetic} from '../../src/geodesy/geocentric.ts';
import {ecefFromEnu, enuFromEcef, localFrame, localFrameAtEcef} from '../../src/geodesy/local.ts';
import {parsePointMotion} from '../../src/geodesy/point-motion.ts';
import type {Ecef, Matrix3} from '../../src/geodesy/types.ts';
import {compareWithMark} from '../../src/occupation/compare.ts';
import type {BudgetRow, Result} from '../../src/occupation/result.ts';
import {sample, stillmark} from '../cli/run.ts';
import {randomFrom} from '../simulate/random.ts';

/*
 * Covariance propagation against Monte Carlo: every contribution is drawn on its own, the draws go
 * the whole way, and the scatter of what arrives is held against what was computed. The standard
 * error of a standard deviation from so many draws is 0.2 %; the bound is 2 %.
 */
const DRAWS = 100_000;
const BOUND = 0.02;

/** Root of a covariance: L with L Lᵀ = C. */
function rootOf(c: readonly (readonly number[])[]): number[][] {
  const l = c.map((row) => row.map(() => 0));
  for (let i = 0; i < c.length; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = c[i]![j]!;
      for (let k = 0; k < j; k++) sum -= l[i]![k]! * l[j]![k]!;
      l[i]![j] = i === j ? Math.sqrt(sum) : sum / l[j]![j]!;
    }
  }
  return l;
}

function covarianceOf(samples: readonly (readonly number[])[]): number[][] {
  const axes = [0, 1, 2] as const;
  const mean = axes.map((i) => samples.reduce((sum, one) => sum + one[i]!, 0) / samples.length);
  return axes.map((i) =>
    axes.map(
      (j) =>
        samples.reduce((sum, one) => sum + (one[i]! - mean[i]!) * (one[j]! - mean[j]!), 0) /
        (samples.length - 1),
    ),
  );
}

/** Entries against the product of the standard deviations that they belong to. */
function expectEqual(
  found: readonly (readonly number[])[],
  expected: readonly (readonly number[])[],
) {
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) {
      const scale = Math.sqrt(expected[i]![i]! * expected[j]![j]!);
      expect(Math.abs(found[i]![j]! - expected[i]![j]!) / scale).toBeLessThan(2 * BOUND);
      if (i === j) {
        expect(Math.abs(Math.sqrt(found[i]![i]! / expected[i]![i]!) - 1)).toBeLessThan(BOUND);
      }
    }
  }
}

const ENU_M2: Matrix3 = [
  [9e-6, 3e-6, -2e-6],
  [3e-6, 4e-6, 1e-6],
  [-2e-6, 1e-6, 25e-6],
];

describe('a covariance on its way', () => {
  const place = {latitudeDeg: -33.4, longitudeDeg: 151.3, ellipsoidalHeightM: 40};
  const frame = localFrame(place, GRS80);
  const random = randomFrom(20_261, 'propagation');
  const root = rootOf(ENU_M2);
  const draws = Array.from({length: DRAWS}, (): Ecef => {
    const z = [random.normal(), random.normal(), random.normal()];
    const [eastM, northM, upM] = root.map((row) => row.reduce((sum, l, k) => sum + l * z[k]!, 0));
    return ecefFromEnu({eastM: eastM!, northM: northM!, upM: upM!}, frame);
  });

  test('local to geocentric', () => {
    const found = covarianceOf(draws.map(({xM, yM, zM}) => [xM, yM, zM]));
    expectEqual(found, covarianceEcefFromEnu(ENU_M2, frame));
  });

  test('into another frame and epoch, where it is left as it is', () => {
    const moved = (ecef: Ecef) =>
      transformPosition({
        ecef,
        from: {frame: 'ITRF2014', epoch: 2026.9},
        to: {frame: 'GDA2020', epoch: 2020},
        motion: parsePointMotion('at rest in GDA2020'),
      }).ecef;
    const there = localFrameAtEcef(moved(ecefFromGeodetic(place, GRS80)), GRS80);
    const found = covarianceOf(
      draws.slice(0, DRAWS / 4).map((ecef) => {
        const {eastM, northM, upM} = enuFromEcef(moved(ecef), there);
        return [eastM, northM, upM];
      }),
    );
    expectEqual(found, ENU_M2);
  });
});

describe('the offset from a mark with a whole budget', () => {
  const {stdout} = stillmark([
    'check',
    sample('mole-still.nmea'),
    '--sheet',
    sample('sheet.yaml'),
    '--marks',
    sample('marks.yaml'),
    '--tolerance',
    '12mm',
    '--tolerance-up',
    '20mm',
    '--result',
    '-',
  ]);
  const {budget, comparison, position} = JSON.parse(stdout) as Result;
  const {offsetM, normalisedError, requirements} = comparison!;
  const isSession = ({source}: BudgetRow) => source === 'session repeatability';
  // The off-diagonal is the session's: the other contributions are stated per axis.
  const eastNorthM2 = position!.covarianceEnuM2![0]![1]!;
  const session = budget.find(isSession)!.standardUncertaintyM!;
  const sessionRoot = rootOf([
    [session.east! ** 2, eastNorthM2, 0],
    [eastNorthM2, session.north! ** 2, 0],
    [0, 0, session.up! ** 2],
  ]);
  const others = budget
    .filter((row) => !isSession(row))
    .flatMap((row) => row.standardUncertaintyM ?? []);
  const random = randomFrom(20_262, 'budget');
  const errors = Array.from({length: DRAWS}, () => {
    const z = [random.normal(), random.normal(), random.normal()];
    const sum = sessionRoot.map((row) => row.reduce((total, l, k) => total + l * z[k]!, 0));
    for (const {east, north, up} of others) {
      sum[0]! += (east ?? 0) * random.normal();
      sum[1]! += (north ?? 0) * random.normal();
      sum[2]! += (up ?? 0) * random.normal();
    }
    return sum;
  });

  test('every row that was given takes part', () => {
    expect(others.length).toBeGreaterThanOrEqual(5);
  });

  test('the standard uncertainty behind each normalised error', () => {
    const found = covarianceOf(errors);
    for (const [i, axis] of (['east', 'north', 'up'] as const).entries()) {
      const used = Math.abs(offsetM[axis]!) / (1.959964 * normalisedError[axis]!);
      expect(Math.abs(Math.sqrt(found[i]![i]!) / used - 1), axis).toBeLessThan(BOUND);
    }
  });

  test('the normalised error in plan', () => {
    const [[ee, en], [, nn]] = covarianceOf(errors) as [[number, number], [number, number]];
    const {east, north} = offsetM as {east: number; north: number};
    const square = (nn * east ** 2 - 2 * en * east * north + ee * north ** 2) / (ee * nn - en ** 2);
    const expected = Math.sqrt(square / 5.991465);
    expect(Math.abs(normalisedError.horizontal! / expected - 1)).toBeLessThan(BOUND);
  });

  describe('decisions over many set-ups, every row of the budget drawn anew', () => {
    const covarianceM2 = covarianceOf(errors);
    // What the comparison itself uses: the budget as stated, not as drawn.
    const usedM2 = (['east', 'north', 'up'] as const).map((axis, i) =>
      [0, 1, 2].map((j) => {
        const root = Math.abs(offsetM[axis]!) / (1.959964 * normalisedError[axis]!);
        return i === j ? root ** 2 : i + j === 1 ? eastNorthM2 : 0;
      }),
    );
    const compared = (truth: readonly number[], error: readonly number[]) => {
      const [east, north, up] = truth.map((value, i) => value + error[i]!) as [
        number,
        number,
        number,
      ];
      return compareWithMark({
        mark: 'M',
        offsetM: {east, north, up},
        covarianceM2: usedM2,
        markCovarianceM2: usedM2.map((row) => row.map(() => 0)),
        asked: [
          {of: 'horizontal', toleranceM: 0.012, reason: null},
          {of: 'up', toleranceM: 0.02, reason: null},
        ],
        assumptions: [],
        frameChange: null,
      });
    };
    const some = errors.slice(0, 20_000);
    const share = (outcomes: readonly boolean[]) =>
      outcomes.filter(Boolean).length / outcomes.length;

    test('what is used is what was drawn', () => {
      expectEqual(covarianceM2, usedM2);
    });

    test('with the true offset at the tolerance, at most 5 % are accepted', () => {
      for (const bearing of [0, 0.8, 2.1]) {
        const truth = [0.012 * Math.sin(bearing), 0.012 * Math.cos(bearing), 0.02];
        const outcomes = some.map((error) => compared(truth, error).requirements);
        expect(share(outcomes.map(([plan]) => plan!.decision === 'accept'))).toBeLessThanOrEqual(
          0.05,
        );
        expect(share(outcomes.map(([, up]) => up!.decision === 'accept'))).toBeLessThanOrEqual(
          0.05,
        );
      }
    });

    test('in agreement, at most 5 % are outside in plan and in height', () => {
      const outcomes = some.map((error) => compared([0, 0, 0], error).normalisedError);
      // Three standard errors of a share of 5 % from so many.
      const allowed = 0.05 + 3 * Math.sqrt((0.05 * 0.95) / some.length);
      expect(share(outcomes.map(({horizontal}) => horizontal! > 1))).toBeLessThanOrEqual(allowed);
      expect(share(outcomes.map(({up}) => up! > 1))).toBeLessThanOrEqual(allowed);
    });
  });

  test('the probability of being within each tolerance', () => {
    const within = (of: string, toleranceM: number, [e, n, u]: readonly number[]) =>
      of === 'up'
        ? Math.abs(offsetM.up! + u!) <= toleranceM
        : Math.hypot(offsetM.east! + e!, offsetM.north! + n!) <= toleranceM;
    expect(requirements.map(({of}) => of)).toEqual(['horizontal', 'up']);
    for (const {of, toleranceM, probabilityWithin} of requirements) {
      const share = errors.filter((error) => within(of, toleranceM, error)).length / DRAWS;
      expect(Math.abs(probabilityWithin! - share), of).toBeLessThan(BOUND);
    }
  });
});
