import {WGS84} from '../../geodesy/ellipsoid.ts';
import {geodeticFromEcef} from '../../geodesy/geocentric.ts';
import {ecefFromEnu, enuFromEcef, type LocalFrame, localFrameAtEcef} from '../../geodesy/local.ts';
import type {Ecef} from '../../geodesy/types.ts';
import {r95} from '../../statistics/accuracy-measures.ts';
import {chiSquareTail, NORMAL_95} from '../../statistics/distribution.ts';
import type {CombinedMark, CombinedOccupation} from '../combination.ts';
import {type CovarianceM2, planeOf} from '../covariance.ts';
import type {PerAxis} from '../result.ts';
import {type Occupation, requireSame} from './occupations.ts';
import {keysOfAll, sourceOf} from './shared-errors.ts';
import {enlargedAxis, type SolvedAxis, solvedAxis, varianceOf} from './weighted-axis.ts';

/** Agreement by accident less likely than this is none. */
const UNLIKELY = 0.05;

export interface SolvedMark {
  readonly mark: CombinedMark;
  readonly ecef: Ecef;
  readonly axes: Readonly<Record<keyof PerAxis, SolvedAxis>>;
}

/** One mark by the weighted mean of its occupations. */
export function solvedMark(name: string, occupations: readonly Occupation[]): SolvedMark {
  const [first] = occupations as [Occupation];
  for (const other of occupations) requireSame(first, other);
  const frame = localFrameAtEcef(first.ecef, WGS84);
  const common = keysOfAll(occupations);
  const solve = (axis: keyof PerAxis) => solvedAxis(axis, occupations, frame, common);
  const axes = {east: solve('east'), north: solve('north'), up: solve('up')};
  const freedom = occupations.length - 1;
  const accident = {
    plan: freedom === 0 ? null : chiSquareTail(axes.east.squares + axes.north.squares, 2 * freedom),
    up: freedom === 0 ? null : chiSquareTail(axes.up.squares, freedom),
  };
  const enlargedBy = {
    plan: enlargement(accident.plan, axes.east.squares + axes.north.squares, 2 * freedom),
    up: enlargement(accident.up, axes.up.squares, freedom),
  };
  const enlarged = {
    east: enlargedAxis(axes.east, enlargedBy.plan),
    north: enlargedAxis(axes.north, enlargedBy.plan),
    up: enlargedAxis(axes.up, enlargedBy.up),
  };
  const mean = {eastM: axes.east.meanM, northM: axes.north.meanM, upM: axes.up.meanM};
  const ecef = ecefFromEnu(mean, frame);
  const sigma = (axis: keyof PerAxis) => Math.sqrt(varianceOf(enlarged[axis]));
  const standardUncertaintyM = {east: sigma('east'), north: sigma('north'), up: sigma('up')};
  const covarianceEnuM2 = covariance(
    standardUncertaintyM,
    eastNorth(occupations, axes) * enlargedBy.plan ** 2,
  );
  const disagrees = [accident.plan, accident.up].some((p) => p !== null && p < UNLIKELY);
  return {
    ecef,
    axes: enlarged,
    mark: {
      name,
      of: first.position.of,
      frame: first.position.frame,
      coordinateEpoch: first.position.coordinateEpoch,
      geodetic: geodeticFromEcef(ecef, WGS84),
      ecefM: {x: ecef.xM, y: ecef.yM, z: ecef.zM},
      standardUncertaintyM,
      uncertainty95M: {
        east: NORMAL_95 * standardUncertaintyM.east,
        north: NORMAL_95 * standardUncertaintyM.north,
        up: NORMAL_95 * standardUncertaintyM.up,
        horizontalRadius: r95(planeOf(covarianceEnuM2)),
      },
      covarianceEnuM2,
      agreement: freedom === 0 ? 'not tested' : disagrees ? 'disagrees' : 'agrees',
      accident,
      enlargedBy,
      shared: [...common].map(sourceOf).sort(),
      occupations: occupations.map((one, i) => combinedOccupation(one, i, axes, frame)),
    },
  };
}

/** Each occupation's own, by its weights; what is shared has none. */
function eastNorth(
  occupations: readonly Occupation[],
  {east, north}: Pick<SolvedMark['axes'], 'east' | 'north'>,
): number {
  return occupations.reduce((sum, {position}, i) => {
    const own = position.covarianceEnuM2?.[0]?.[1] ?? 0;
    return sum + east.weights[i]! * north.weights[i]! * own;
  }, 0);
}

function covariance({east, north, up}: PerAxis, eastNorthM2: number): CovarianceM2 {
  return [
    [east ** 2, eastNorthM2, 0],
    [eastNorthM2, north ** 2, 0],
    [0, 0, up ** 2],
  ];
}

function enlargement(probability: number | null, squares: number, freedom: number): number {
  if (probability === null || probability >= UNLIKELY) return 1;
  return Math.max(1, Math.sqrt(squares / freedom));
}

function combinedOccupation(
  {name, result, ecef}: Occupation,
  index: number,
  axes: SolvedMark['axes'],
  frame: LocalFrame,
): CombinedOccupation {
  const {eastM, northM, upM} = enuFromEcef(ecef, frame);
  const difference = {
    east: eastM - axes.east.meanM,
    north: northM - axes.north.meanM,
    up: upM - axes.up.meanM,
  };
  const perAxis = <T>(of: (axis: keyof PerAxis) => T) => ({
    east: of('east'),
    north: of('north'),
    up: of('up'),
  });
  return {
    name,
    setUpId: result.occupation.setUpId,
    startUtc: result.occupation.startUtc ?? '',
    endUtc: result.occupation.endUtc ?? '',
    epochs: result.epochs.used,
    differenceM: {...difference, horizontal: Math.hypot(difference.east, difference.north)},
    weight: perAxis((axis) => axes[axis].weights[index]!),
    normalisedError: perAxis((axis) => axes[axis].errors[index] ?? null),
  };
}
