import type {Enu, Matrix3} from '../../geodesy/types.ts';
import type {CovarianceM2} from '../covariance.ts';
import type {PerAxis} from '../result.ts';
import type {CauseValues, Prediction} from './hypothesis.ts';
import {type Axes, difference, misfit} from './misfit.ts';

/** A prediction under its code. */
export interface Tested {
  readonly code: string;
  readonly prediction: Prediction;
}

/** The offset that wants an explanation. */
export interface Check {
  readonly offset: Enu;
  readonly axes: Axes;
  readonly covarianceM2: CovarianceM2;
  readonly noBlunderMisfit: number;
  /** Whether the offset is more than noise. */
  readonly rejected: boolean;
  /** Largest misfit of a survivor. */
  readonly limit: number;
}

/** A blunder that the offset is consistent with. */
export interface DiagnosedCandidate {
  readonly code: string;
  /** What title and advice speak of. */
  readonly values: CauseValues;
  /** null on an axis that was not compared. */
  readonly predictedM: PerAxis<number | null>;
  /** From the inputs of the prediction. */
  readonly covarianceM2: Matrix3;
  readonly misfit: number;
  /** Candidates that this offset cannot tell apart share a number; 1 fits best. */
  readonly group: number;
  /** Numbers taken from the offset itself: above 0 it would fit almost any offset. */
  readonly freeParameters: number;
}

/** χ² with one degree of freedom at 99 %. */
const CLEARLY_BETTER = 6.6349;

/**
 * Squared distance, in standard uncertainties, within which two predictions are not told apart:
 * beyond it noise puts the wrong one first with less than 2.5 % (half the distance above 1.96).
 */
const TOLD_APART = (2 * 1.959964) ** 2;

/**
 * The survivors in order: predicted from inputs alone before fitted ones, those fitted by fewer
 * numbers first, each by misfit.
 */
export function ranked(check: Check, tested: readonly Tested[]): DiagnosedCandidate[] {
  const survivors = tested
    .map((one) => ({...one, misfit: misfitOf(check, one)}))
    .filter((one) => survives(check, one))
    .sort(
      (a, b) => a.prediction.freeParameters - b.prediction.freeParameters || a.misfit - b.misfit,
    );
  const groups = groupsOf(check, survivors);
  return survivors
    .map((one, i) => ({
      code: one.code,
      values: one.prediction.values,
      predictedM: perAxis(one.prediction.offset, check.axes),
      covarianceM2: one.prediction.covarianceM2,
      misfit: one.misfit,
      group: groups[i]!,
      freeParameters: one.prediction.freeParameters,
    }))
    .sort((a, b) => a.group - b.group);
}

export function misfitOf({offset, axes, covarianceM2}: Check, {prediction}: Tested): number {
  return misfit(difference(offset, prediction.offset), axes, [
    covarianceM2,
    prediction.covarianceM2,
  ]);
}

function survives(check: Check, one: Tested & {readonly misfit: number}): boolean {
  const {noBlunderMisfit, rejected, limit} = check;
  if (!(one.misfit <= limit)) return false;
  if (rejected) return one.misfit < noBlunderMisfit;
  // Noise explains this offset; only something much better than noise is worth a word.
  return one.prediction.freeParameters === 0 && noBlunderMisfit - one.misfit > CLEARLY_BETTER;
}

/**
 * Numbers the groups: the best candidate left, and all that are not told apart from it. Fitted ones
 * never join those that were predicted.
 */
function groupsOf({axes, covarianceM2}: Check, survivors: readonly Tested[]): number[] {
  const groups: number[] = survivors.map(() => 0);
  let group = 0;
  survivors.forEach((leader, first) => {
    if (groups[first] !== 0) return;
    group += 1;
    survivors.forEach((other, i) => {
      if (groups[i] !== 0 || isFitted(other) !== isFitted(leader)) return;
      const apart = misfit(difference(leader.prediction.offset, other.prediction.offset), axes, [
        covarianceM2,
        leader.prediction.covarianceM2,
        other.prediction.covarianceM2,
      ]);
      if (i === first || apart <= TOLD_APART) groups[i] = group;
    });
  });
  return groups;
}

function isFitted({prediction}: Tested): boolean {
  return prediction.freeParameters > 0;
}

export function perAxis({eastM, northM, upM}: Enu, axes: Axes): PerAxis<number | null> {
  const shown = (axis: number, value: number) => (axes.includes(axis) ? value : null);
  return {east: shown(0, eastM), north: shown(1, northM), up: shown(2, upM)};
}
