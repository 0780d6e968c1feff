import {type Asked, couldPass} from './compare.ts';
import type {CovarianceM2} from './covariance.ts';
import type {Axis, Session, TimeNeeded} from './session.ts';

/** A tolerance that no offset, not even zero, could pass with this record. */
export interface OutOfReach {
  readonly asked: Asked;
  /**
   * How long a record would have to be; `never`: what no record can see is too much by itself;
   * `not known`: too far from what the record reaches.
   */
  readonly needed: TimeNeeded | 'never' | 'not known';
}

export interface ReachInput {
  readonly asked: readonly Asked[];
  readonly session: Pick<Session, 'timeForPart'>;
  /** By scatter and correlation of this record alone: the part that a longer record makes smaller. */
  readonly sessionM2: CovarianceM2;
  /** All that enters the decision, `sessionM2` included. */
  readonly totalM2: CovarianceM2;
}

export function outOfReach(input: ReachInput): OutOfReach[] {
  return input.asked
    .filter((asked) => isKnown(asked, input.totalM2) && !couldPass(asked, input.totalM2))
    .map((asked) => ({asked, needed: neededFor(asked, input)}));
}

function isKnown({of}: Asked, covarianceM2: CovarianceM2): boolean {
  return of !== 'up' || Number.isFinite(covarianceM2[2]![2]!);
}

/** Halvings of the interval in which the part is sought. */
const HALVINGS = 40;

function neededFor(asked: Asked, {session, sessionM2, totalM2}: ReachInput): OutOfReach['needed'] {
  const passesAt = (part: number) =>
    couldPass(
      asked,
      totalM2.map((row, i) => row.map((value, j) => value - (1 - part ** 2) * sessionM2[i]![j]!)),
    );
  if (!passesAt(0)) return 'never';
  let passes = 0;
  let fails = 1;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (passes + fails) / 2;
    if (passesAt(middle)) passes = middle;
    else fails = middle;
  }
  return session.timeForPart(passes, axesOf(asked)) ?? 'not known';
}

function axesOf({of}: Asked): readonly Axis[] {
  return of === 'horizontal' ? ['east', 'north'] : [of];
}
