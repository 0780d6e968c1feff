import type {Enu, Matrix3} from '../../geodesy/types.ts';
import {chiSquareQuantile, normalQuantile} from '../../statistics/distribution.ts';
import {ballPoints} from './ball-points.ts';
import type {Check, Tested} from './candidates.ts';
import {
  type Axes,
  choleskyFactor,
  components,
  covarianceOver,
  difference,
  lengthM,
  misfitUnder,
  sum,
} from './misfit.ts';
import {combinations} from './pairs.ts';

/** How many hypotheses an offset without a listed cause would match by accident. */
export interface Accidental {
  /** Of the hypotheses without free parameters; those with some always fit. */
  readonly matches: number;
  readonly pairs: number;
  /** For offsets up to this size: 3 m, or that of the offset if it is larger. */
  readonly withinM: number;
  /** The components that are more than noise, over which such offsets are spread; null: none. */
  readonly of: 'plan' | 'height' | 'plan and height' | null;
}

/** Everyday offsets of unlisted cause are taken to be this large at most. */
const RANGE_M = 3;
/** A component is more than noise at this level. */
const SIGNIFICANT_AT = 0.99;

/**
 * The expected number of accidental matches.
 *
 * Method: an offset of unlisted cause is taken as uniform in the ball of radius W over those
 * components (plan, height) that are more than noise in the offset at hand, n axes, and as noise on
 * the other m axes. A hypothesis matches with the probability E[(q − t)^(n/2)] √det S / W^n, where
 * t is its misfit on the m axes, q the limit of T, and S the covariance C + C_b of the n axes given
 * the m; times the share of that ellipsoid that lies in the ball where just these components are
 * more than noise, over the same share of the ball. K t / W of K heights with half-width t is n = 1.
 * Accuracy: within a factor 1.5 of simulation (tested for plan, height and both).
 */
export function expectedMatches(check: Check, tested: readonly Tested[]): Accidental {
  const {axes, offset} = check;
  const withinM = Math.max(RANGE_M, lengthM(offset, axes));
  const significantAxes = significance(check);
  const kind = significantAxes(offset);
  const spread = kind.length === 0 ? axes : kind;
  // Plan has two axes, height one: the number of axes names the kind.
  const isOfKind = (point: Enu) => significantAxes(point).length === spread.length;
  const ball = ballPoints(spread.length, BALL_POINTS).map((point) =>
    onAxes(
      point.map((value) => value * withinM),
      spread,
    ),
  );
  const inKind = share(ball, isOfKind);
  const others = axes.filter((axis) => !spread.includes(axis));
  const noise = noisePoints(check, others);
  const possible = Math.max(inKind, 1 / BALL_POINTS);
  const space: Space = {check, spread, withinM, noise, isOfKind, possible};
  const matches = tested
    .filter(({prediction}) => prediction.freeParameters === 0)
    .map(({prediction}) => probability(space, prediction.offset, [prediction.covarianceM2]));
  return {
    matches: total(matches),
    pairs: expectedPairs(space, tested),
    withinM,
    of: nameOf(spread),
  };
}

type Matrices = Parameters<typeof covarianceOver>[1];

/** Offsets that are spread over some axes within a radius, and noise on the others. */
interface Space {
  readonly check: Check;
  readonly spread: Axes;
  readonly withinM: number;
  /** Noise on the other axes, as points of equal weight. */
  readonly noise: readonly Enu[];
  /** Whether just the components of the spread are more than noise. */
  readonly isOfKind: (offset: Enu) => boolean;
  /** Share of the ball where just these components are more than noise. */
  readonly possible: number;
}

const BALL_POINTS = 512;
const ELLIPSOID_POINTS = 64;

function expectedPairs(space: Space, tested: readonly Tested[]): number {
  const {spread, withinM, isOfKind} = space;
  if (spread.length < 3) return 0;
  const probabilities = combinations(tested)
    .map(({plan, height}) => ({
      offset: sum(plan.prediction.offset, height.prediction.offset),
      covariances: [plan.prediction.covarianceM2, height.prediction.covarianceM2],
    }))
    .filter(({offset}) => lengthM(offset, spread) <= withinM && isOfKind(offset))
    .map(({offset, covariances}) => ellipsoidOverBall(space, offset, covariances));
  return total(probabilities) / space.possible;
}

/** Probability that such an offset matches a prediction. */
function probability(space: Space, offset: Enu, covariances: readonly Matrix3[]): number {
  const {check, spread, withinM, isOfKind, possible} = space;
  const whole = ellipsoidOverBall(space, offset, covariances);
  if (whole === 0) return 0;
  const all = [check.covarianceM2, ...covariances];
  const points = ellipsoidPoints(space, offset, all);
  const misfitOfIt = misfitUnder(spread, all);
  const misfitOfNone = misfitUnder(spread, [check.covarianceM2]);
  const inside = share(
    points,
    (point) =>
      lengthM(point, spread) <= withinM &&
      isOfKind(point) &&
      misfitOfIt(difference(point, offset)) < misfitOfNone(point),
  );
  return (whole * inside) / possible;
}

/** E[(q − t)^(n/2)] √det S / W^n. */
function ellipsoidOverBall(
  {check, spread, withinM, noise}: Space,
  offset: Enu,
  covariances: readonly Matrix3[],
): number {
  const {axes, limit, covarianceM2} = check;
  const all = [covarianceM2, ...covariances];
  if (lengthM(offset, spread) - reachM(spread, limit, all) > withinM) return 0;
  const others = axes.filter((axis) => !spread.includes(axis));
  const misfitOnOthers = misfitUnder(others, all);
  const room =
    total(
      noise.map((point) => {
        const t = misfitOnOthers(difference(point, offset));
        return Math.max(0, limit - t) ** (spread.length / 2);
      }),
    ) / noise.length;
  const rootDeterminant = rootDeterminantOf(axes, all) / rootDeterminantOf(others, all);
  return (room * rootDeterminant) / withinM ** spread.length;
}

/** No ellipsoid of acceptance reaches farther than √(q trace). */
function reachM(axes: Axes, limit: number, all: Matrices): number {
  return Math.sqrt(limit * covarianceOver(axes, all).reduce((sum, row, i) => sum + row[i]!, 0));
}

function rootDeterminantOf(axes: Axes, all: Matrices): number {
  const lower = choleskyFactor(covarianceOver(axes, all));
  return lower === undefined ? Number.NaN : lower.reduce((product, row, i) => product * row[i]!, 1);
}

/** Points that fill the ellipsoid of acceptance on the axes of the spread. */
function ellipsoidPoints({check, spread}: Space, offset: Enu, all: Matrices): Enu[] {
  const others = check.axes.length - spread.length;
  const radius = Math.sqrt(Math.max(0, check.limit - others));
  const lower = choleskyFactor(covarianceOver(spread, all)) ?? [];
  return ballPoints(spread.length, ELLIPSOID_POINTS).map((point) =>
    sum(offsetOn(offset, spread), onAxes(transformed(lower, point, radius), spread)),
  );
}

/** Noise on some axes: normal points of equal weight. */
function noisePoints({covarianceM2}: Check, axes: Axes): Enu[] {
  const lower = choleskyFactor(covarianceOver(axes, [covarianceM2])) ?? [];
  return normalPoints(axes.length).map((point) => onAxes(transformed(lower, point, 1), axes));
}

const RINGS = 8;

/** Midpoints of equal shares of the standard normal law in 0, 1 or 2 dimensions. */
function normalPoints(dimensions: number): number[][] {
  const middles = Array.from({length: RINGS}, (_, i) => (i + 0.5) / RINGS);
  if (dimensions === 0) return [[]];
  if (dimensions === 1) return middles.map((p) => [normalQuantile(p)]);
  return middles.flatMap((p) => {
    const radius = Math.sqrt(-2 * Math.log(1 - p));
    return middles.map((turn) => [
      radius * Math.cos(2 * Math.PI * turn),
      radius * Math.sin(2 * Math.PI * turn),
    ]);
  });
}

function transformed(lower: number[][], point: readonly number[], factor: number): number[] {
  return lower.map(
    (row) => factor * row.reduce((sum, value, j) => sum + value * (point[j] ?? 0), 0),
  );
}

function onAxes(values: readonly number[], axes: Axes): Enu {
  const at = (axis: number) => values[axes.indexOf(axis)] ?? 0;
  return {eastM: at(0), northM: at(1), upM: at(2)};
}

function offsetOn(offset: Enu, axes: Axes): Enu {
  const values = components(offset);
  return onAxes(
    axes.map((axis) => values[axis]!),
    axes,
  );
}

/** Which axes belong to the components, plan and height, that are more than noise. */
function significance({axes, covarianceM2}: Check): (offset: Enu) => Axes {
  const parts = [axes.filter((axis) => axis < 2), axes.filter((axis) => axis === 2)]
    .filter((part) => part.length > 0)
    .map((part) => ({
      part,
      misfitOf: misfitUnder(part, [covarianceM2]),
      limit: chiSquareQuantile(SIGNIFICANT_AT, part.length),
    }));
  return (offset) =>
    parts.filter(({misfitOf, limit}) => misfitOf(offset) > limit).flatMap(({part}) => part);
}

function nameOf(axes: Axes): Accidental['of'] {
  if (!axes.includes(2)) return 'plan';
  return axes.length === 1 ? 'height' : 'plan and height';
}

function share<T>(points: readonly T[], holds: (point: T) => boolean): number {
  return points.filter(holds).length / points.length;
}

function total(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}
