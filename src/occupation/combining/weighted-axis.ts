import {enuFromEcef, type LocalFrame} from '../../geodesy/local.ts';
import {NORMAL_95} from '../../statistics/distribution.ts';
import type {PerAxis} from '../result.ts';
import type {Occupation} from './occupations.ts';
import {cancelsBetweenMarks, keyOf, uncertaintyM} from './shared-errors.ts';

/** A micrometre: keeps a record without any uncertainty of its own from taking all the weight. */
const LEAST_VARIANCE_M2 = 1e-12;

/** The weighted mean of one axis and what it is made of. */
export interface SolvedAxis {
  readonly meanM: number;
  readonly weights: readonly number[];
  /** Of what is not shared by all, enlarged where the occupations disagree. */
  readonly ownVarianceM2: number;
  /** The mean's part of each shared contribution, in metres; all of one key are one error. */
  readonly sharedM: ReadonlyMap<string, number>;
  readonly squares: number;
  readonly errors: readonly (number | null)[];
}

export function solvedAxis(
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

export function enlargedAxis(axis: SolvedAxis, factor: number): SolvedAxis {
  return {...axis, ownVarianceM2: axis.ownVarianceM2 * factor ** 2};
}

export function varianceOf({ownVarianceM2, sharedM}: SolvedAxis): number {
  return [...sharedM.values()].reduce((sum, part) => sum + part ** 2, ownVarianceM2);
}

/** A shared error counts by the difference of its parts: what both have alike cancels. */
export function varianceOfDifference(a: SolvedAxis, b: SolvedAxis): number {
  const keys = new Set([...a.sharedM.keys(), ...b.sharedM.keys()]);
  let sum = a.ownVarianceM2 + b.ownVarianceM2;
  for (const key of keys) {
    const [here, there] = [a.sharedM.get(key) ?? 0, b.sharedM.get(key) ?? 0];
    sum += cancelsBetweenMarks(key) ? (here - there) ** 2 : here ** 2 + there ** 2;
  }
  return sum;
}
