import {UsageError} from '../errors.ts';
import {WGS84} from '../geodesy/ellipsoid.ts';
import {geodeticFromEcef} from '../geodesy/geocentric.ts';
import {ecefFromEnu, enuFromEcef, type LocalFrame, localFrameAtEcef} from '../geodesy/local.ts';
import type {Ecef} from '../geodesy/types.ts';
import {r95} from '../statistics/accuracy-measures.ts';
import {chiSquareTail} from '../statistics/distribution.ts';
import type {Combination, CombinedMark, CombinedOccupation, MarkDistance} from './combination.ts';
import type {NoticeList} from './notices.ts';
import {withoutNegativeZero} from './plain-numbers.ts';
import type {BudgetRow, PerAxis, Position, Result} from './result.ts';

/** A result by the name of its file. */
export interface NamedResult {
  readonly name: string;
  readonly result: Result;
}

const AXES = ['east', 'north', 'up'] as const;
const NORMAL_95 = 1.959963984540054;
const MS_PER_HOUR = 3_600_000;
/** Agreement by accident less likely than this is none. */
const UNLIKELY = 0.05;
/** Two occupations closer in time share satellites, atmosphere and reflections: common practice. */
const SOON_HOURS = 1;

/** A micrometre: keeps a record without any uncertainty of its own from taking all the weight. */
const LEAST_VARIANCE_M2 = 1e-12;

/** Rows that belong to a comparison with a mark, not to the position. */
const OF_COMPARISON = new Set([
  'the mark',
  'transformation to the frame of the mark',
  'geoid model',
]);

/**
 * One position per mark from the results of several occupations.
 *
 * Method: per axis, weights by the inverse variance of what an occupation does not share with all
 * others of its mark. The variance of the weighted mean takes each shared contribution (same source
 * and id: base, tape, frame, service) as one error, which no repetition makes smaller. Agreement: the
 * weighted squares of the differences against chi-square, plan and height apart; where that is less
 * likely than 5 %, the part that is not shared is enlarged by the root of squares over degrees of
 * freedom (R. T. Birge 1932, Phys. Rev. 40, 207).
 * The order of the results does not matter.
 *
 * @throws UsageError when results of one mark differ in frame, epoch or point, or one stands twice
 */
export function combineResults(
  results: readonly NamedResult[],
  program: Combination['program'],
  notices: NoticeList,
): Combination {
  const ordered = [...results].sort(byTimeAndContent);
  refuseTwice(ordered);
  const leftOut: {name: string; because: string}[] = [];
  const usable = ordered.flatMap((one) => {
    const because = reasonToLeaveOut(one.result);
    if (because === null) return [occupationOf(one)];
    leftOut.push({name: one.name, because});
    return [];
  });
  const names = [...new Set(usable.map(({mark}) => mark))].sort();
  const solved = names.map((name) =>
    solvedMark(
      name,
      usable.filter(({mark}) => mark === name),
    ),
  );
  for (const one of solved) noticeMark(one.mark, notices);
  if (leftOut.length > 0) {
    const list = leftOut.map(({name, because}) => `${name} (${because})`).join('; ');
    notices.add('caution', 'results-left-out', ['leftOut'], {list});
  }
  return withoutNegativeZero({
    schema: 'stillmark.combination/1',
    program,
    marks: solved.map(({mark}) => mark),
    distances: solved.flatMap((from, i) => solved.slice(i + 1).map((to) => distance(from, to))),
    leftOut,
    notices: notices.notices,
  });
}

/** One occupation as the combination sees it. */
interface Occupation {
  readonly name: string;
  readonly mark: string;
  readonly result: Result;
  readonly position: Position;
  readonly ecef: Ecef;
  readonly rows: readonly BudgetRow[];
}

function byTimeAndContent(a: NamedResult, b: NamedResult): number {
  const key = ({name, result}: NamedResult) =>
    [result.occupation.startUtc, result.inputs.map(({sha256}) => sha256).join(), name].join(' ');
  return key(a) < key(b) ? -1 : 1;
}

/** The same epochs counted twice would look like agreement. */
function refuseTwice(results: readonly NamedResult[]): void {
  const seen = new Map<string, string>();
  for (const {name, result} of results) {
    const {startUtc, endUtc} = result.occupation;
    const key = [...result.inputs.map(({sha256}) => sha256), startUtc, endUtc].join(' ');
    const before = seen.get(key);
    if (before !== undefined) {
      throw new UsageError(
        `${before} and ${name} are results of the same epochs; name one of them`,
      );
    }
    seen.set(key, name);
  }
}

function reasonToLeaveOut({position, segments, occupation}: Result): string | null {
  if (position === null) return segments.length > 1 ? 'it moved' : 'no position';
  if (position.ecefM === null) return 'no ellipsoidal height';
  if (position.uncertainty95M === null) return 'its uncertainty cannot be told';
  return occupation.mark === null ? 'it names no mark' : null;
}

function occupationOf({name, result}: NamedResult): Occupation {
  const position = result.position as Position;
  const {x, y, z} = position.ecefM as {x: number; y: number; z: number};
  const rows = result.budget.filter(
    ({source, standardUncertaintyM}) => standardUncertaintyM !== null && !OF_COMPARISON.has(source),
  );
  return {
    name,
    mark: result.occupation.mark as string,
    result,
    position,
    ecef: {xM: x, yM: y, zM: z},
    rows,
  };
}

/** What a row is shared by; null for a contribution of the occupation's own. */
function keyOf({source, sharedBy, id}: BudgetRow): string | null {
  return sharedBy === null ? null : [source, sharedBy, id ?? ''].join('\n');
}

function sourceOf(key: string): string {
  return key.split('\n')[0] ?? '';
}

/**
 * Whether the error is the same at two marks. A rounded separation is another one at another site,
 * and what a positioning service leaves uncertain is another one at another time. A base or tape
 * that nobody named may be another one too.
 */
function cancelsBetweenMarks(key: string): boolean {
  const [, sharedBy, id] = key.split('\n');
  return sharedBy !== 'site' && sharedBy !== 'service' && id !== '';
}

function uncertaintyM(row: BudgetRow, axis: keyof PerAxis): number {
  return row.standardUncertaintyM?.[axis] ?? 0;
}

/** The weighted mean of one axis and what it is made of. */
interface SolvedAxis {
  readonly meanM: number;
  readonly weights: readonly number[];
  /** Of what is not shared by all, enlarged where the occupations disagree. */
  readonly ownVarianceM2: number;
  /** The mean's part of each shared contribution, in metres; all of one key are one error. */
  readonly sharedM: ReadonlyMap<string, number>;
  readonly squares: number;
  readonly errors: readonly (number | null)[];
}

interface SolvedMark {
  readonly mark: CombinedMark;
  readonly ecef: Ecef;
  readonly axes: Readonly<Record<keyof PerAxis, SolvedAxis>>;
}

function solvedMark(name: string, occupations: readonly Occupation[]): SolvedMark {
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
      uncertainty95M: uncertainty95(standardUncertaintyM),
      agreement: freedom === 0 ? 'not tested' : disagrees ? 'disagrees' : 'agrees',
      accident,
      enlargedBy,
      shared: [...common].map(sourceOf).sort(),
      occupations: occupations.map((one, i) => combinedOccupation(one, i, axes, frame)),
    },
  };
}

function requireSame(first: Occupation, other: Occupation): void {
  const {of, frame, coordinateEpoch} = first.position;
  const there = other.position;
  const fault =
    there.frame !== frame
      ? `frame ${frame ?? 'not stated'} and ${there.frame ?? 'not stated'}`
      : there.coordinateEpoch !== coordinateEpoch
        ? `coordinate epoch ${coordinateEpoch ?? 'not stated'} and ${there.coordinateEpoch ?? 'not stated'}`
        : there.of !== of
          ? `point ${of} and ${there.of}`
          : null;
  if (fault === null) return;
  throw new UsageError(
    `${first.name} and ${other.name}, both of ${first.mark}, differ in ${fault}; reduce both alike, ` +
      'with --frame, --coordinate-epoch or a field sheet',
  );
}

/** Shared contributions that every occupation has. */
function keysOfAll(occupations: readonly Occupation[]): Set<string> {
  const keys = occupations.map(({rows}) => new Set(rows.map(keyOf).filter((key) => key !== null)));
  const [first = new Set<string>(), ...others] = keys;
  return new Set([...first].filter((key) => others.every((other) => other.has(key))));
}

function solvedAxis(
  axis: keyof PerAxis,
  occupations: readonly Occupation[],
  frame: LocalFrame,
  common: ReadonlySet<string>,
): SolvedAxis {
  const values = occupations.map(({ecef}) => enuFromEcef(ecef, frame)[`${axis}M`]);
  const own = occupations.map(({rows}) =>
    rows.reduce((sum, row) => {
      const key = keyOf(row);
      return key !== null && common.has(key) ? sum : sum + uncertaintyM(row, axis) ** 2;
    }, LEAST_VARIANCE_M2),
  );
  const total = own.reduce((sum, variance) => sum + 1 / variance, 0);
  const weights = own.map((variance) => 1 / variance / total);
  const meanM = values.reduce((sum, value, i) => sum + weights[i]! * value, 0);
  return {
    meanM,
    weights,
    ownVarianceM2: ownVariance(axis, occupations, weights),
    sharedM: sharedParts(axis, occupations, weights),
    squares: values.reduce((sum, value, i) => sum + (value - meanM) ** 2 / own[i]!, 0),
    errors: values.map((value, i) => {
      if (occupations.length === 1) return null;
      // Against the mean of the others, of which this one is no part.
      const rest = total - 1 / own[i]!;
      const others = (meanM - weights[i]! * value) / (1 - weights[i]!);
      return Math.abs(value - others) / (NORMAL_95 * Math.sqrt(own[i]! + 1 / rest));
    }),
  };
}

/** Of the rows that nothing shares. */
function ownVariance(
  axis: keyof PerAxis,
  occupations: readonly Occupation[],
  weights: readonly number[],
): number {
  return occupations.reduce((sum, {rows}, i) => {
    const own = rows.filter((row) => keyOf(row) === null);
    return sum + own.reduce((part, row) => part + (weights[i]! * uncertaintyM(row, axis)) ** 2, 0);
  }, 0);
}

/** What each shared error adds to the mean: one error, however many occupations have it. */
function sharedParts(
  axis: keyof PerAxis,
  occupations: readonly Occupation[],
  weights: readonly number[],
): Map<string, number> {
  const parts = new Map<string, number>();
  for (const [i, {rows}] of occupations.entries()) {
    for (const row of rows) {
      const key = keyOf(row);
      if (key === null) continue;
      parts.set(key, (parts.get(key) ?? 0) + weights[i]! * uncertaintyM(row, axis));
    }
  }
  return parts;
}

function enlargement(probability: number | null, squares: number, freedom: number): number {
  if (probability === null || probability >= UNLIKELY) return 1;
  return Math.max(1, Math.sqrt(squares / freedom));
}

function enlargedAxis(axis: SolvedAxis, factor: number): SolvedAxis {
  return {...axis, ownVarianceM2: axis.ownVarianceM2 * factor ** 2};
}

function varianceOf({ownVarianceM2, sharedM}: SolvedAxis): number {
  return [...sharedM.values()].reduce((sum, part) => sum + part ** 2, ownVarianceM2);
}

function uncertainty95({east, north, up}: PerAxis): CombinedMark['uncertainty95M'] {
  return {
    east: NORMAL_95 * east,
    north: NORMAL_95 * north,
    up: NORMAL_95 * up,
    horizontalRadius: r95({eastEast: east ** 2, eastNorth: 0, northNorth: north ** 2}),
  };
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

function noticeMark(mark: CombinedMark, notices: NoticeList): void {
  const {name, occupations, agreement, shared, frame, of} = mark;
  if (of !== 'mark') notices.add('caution', 'combined-not-at-mark', ['marks[].of'], {name, of});
  if (frame === null) notices.add('caution', 'combined-without-frame', ['marks[].frame'], {name});
  if (agreement === 'not tested') {
    notices.add('caution', 'single-occupation', ['marks[].agreement'], {name});
    return;
  }
  if (agreement === 'disagrees') {
    const worst = [...occupations].sort((a, b) => worstError(b) - worstError(a))[0]!;
    notices.add('concern', 'occupations-disagree', ['marks[].agreement'], {
      name,
      count: occupations.length,
      worst: worst.name,
      differenceM: Math.hypot(worst.differenceM.horizontal, worst.differenceM.up),
    });
  }
  const apartHours = hoursApart(occupations);
  if (apartHours < SOON_HOURS) {
    notices.add('caution', 'soon-repeated', ['marks[].occupations'], {
      name,
      apartS: apartHours * 3600,
    });
  }
  if (shared.length > 0) {
    notices.add('note', 'shared-by-all', ['marks[].shared'], {name, list: shared.join(', ')});
  }
}

function worstError({normalisedError}: CombinedOccupation): number {
  return Math.max(...AXES.map((axis) => normalisedError[axis] ?? 0));
}

/** From the end of the first to the start of the last. */
function hoursApart(occupations: readonly CombinedOccupation[]): number {
  const [first] = occupations as [CombinedOccupation];
  const last = occupations[occupations.length - 1]!;
  return (Date.parse(last.startUtc) - Date.parse(first.endUtc)) / MS_PER_HOUR;
}

function distance(from: SolvedMark, to: SolvedMark): MarkDistance {
  if (from.mark.frame !== to.mark.frame || from.mark.coordinateEpoch !== to.mark.coordinateEpoch) {
    throw new UsageError(
      `${from.mark.name} and ${to.mark.name} stand in different frames or epochs; reduce all alike, ` +
        'with --frame and --coordinate-epoch',
    );
  }
  const {eastM, northM, upM} = enuFromEcef(to.ecef, localFrameAtEcef(from.ecef, WGS84));
  const spatialM = Math.hypot(eastM, northM, upM);
  const variance = (axis: keyof PerAxis) => varianceOfDifference(from.axes[axis], to.axes[axis]);
  const [east, north, up] = [variance('east'), variance('north'), variance('up')];
  const along = (eastM ** 2 * east + northM ** 2 * north + upM ** 2 * up) / spatialM ** 2;
  const azimuth = (Math.atan2(eastM, northM) * 180) / Math.PI;
  const cancels = [...from.axes.up.sharedM.keys()].filter(
    (key) => cancelsBetweenMarks(key) && to.axes.up.sharedM.has(key),
  );
  return {
    from: from.mark.name,
    to: to.mark.name,
    eastM,
    northM,
    upM,
    heightDifferenceM: to.mark.geodetic.ellipsoidalHeightM - from.mark.geodetic.ellipsoidalHeightM,
    spatialM,
    azimuthDeg: azimuth < 0 ? azimuth + 360 : azimuth,
    uncertainty95M: {
      spatial: NORMAL_95 * Math.sqrt(along),
      height: NORMAL_95 * Math.sqrt(up),
    },
    cancels: cancels.map(sourceOf).sort(),
  };
}

/** A shared error counts by the difference of its parts: what both have alike cancels. */
function varianceOfDifference(a: SolvedAxis, b: SolvedAxis): number {
  const keys = new Set([...a.sharedM.keys(), ...b.sharedM.keys()]);
  let sum = a.ownVarianceM2 + b.ownVarianceM2;
  for (const key of keys) {
    const [here, there] = [a.sharedM.get(key) ?? 0, b.sharedM.get(key) ?? 0];
    sum += cancelsBetweenMarks(key) ? (here - there) ** 2 : here ** 2 + there ** 2;
  }
  return sum;
}
