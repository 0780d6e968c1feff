import {UsageError} from '../../errors.ts';
import type {Ecef} from '../../geodesy/types.ts';
import type {BudgetRow, Position, Result} from '../result.ts';

/** A result by the name of its file. */
export interface NamedResult {
  readonly name: string;
  readonly result: Result;
}

/** Rows that belong to a comparison with a mark, not to the position. */
const OF_COMPARISON = new Set([
  'the mark',
  'transformation to the frame of the mark',
  'geoid model',
]);

/** One occupation as the combination sees it. */
export interface Occupation {
  readonly name: string;
  readonly mark: string;
  readonly result: Result;
  readonly position: Position;
  readonly ecef: Ecef;
  readonly rows: readonly BudgetRow[];
}

export function byTimeAndContent(a: NamedResult, b: NamedResult): number {
  const key = ({name, result}: NamedResult) =>
    [result.occupation.startUtc, result.inputs.map(({sha256}) => sha256).join(), name].join(' ');
  return key(a) < key(b) ? -1 : 1;
}

/** The same epochs counted twice would look like agreement. */
export function refuseTwice(results: readonly NamedResult[]): void {
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

export function reasonToLeaveOut({position, segments, occupation}: Result): string | null {
  if (position === null) return segments.length > 1 ? 'it moved' : 'no position';
  if (position.ecefM === null) return 'no ellipsoidal height';
  if (position.uncertainty95M === null) return 'its uncertainty cannot be told';
  return occupation.mark === null ? 'it names no mark' : null;
}

export function occupationOf({name, result}: NamedResult): Occupation {
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

export function requireSame(first: Occupation, other: Occupation): void {
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
