import type {PerAxis} from '../result.ts';
import {type Check, misfitOf, perAxis, type Tested} from './candidates.ts';
import type {CauseValues} from './hypothesis.ts';
import {difference, misfit, sum} from './misfit.ts';

/** One blunder of the plan and one of the height that together leave this offset. */
export interface DiagnosedPair {
  readonly plan: {readonly code: string; readonly values: CauseValues};
  readonly height: {readonly code: string; readonly values: CauseValues};
  readonly predictedM: PerAxis<number | null>;
  readonly misfit: number;
}

/** Every two that could be combined: neither with free parameters, one of the height alone. */
export function combinations(
  tested: readonly Tested[],
): {readonly plan: Tested; readonly height: Tested}[] {
  const predictedOnly = tested.filter(({prediction}) => prediction.freeParameters === 0);
  const heights = predictedOnly.filter((one) => !hasPlan(one));
  return predictedOnly.filter(hasPlan).flatMap((plan) => heights.map((height) => ({plan, height})));
}

export function hasPlan({prediction}: Tested): boolean {
  const {eastM, northM} = prediction.offset;
  return eastM !== 0 || northM !== 0;
}

/** The pairs that fit although neither of them fits alone, best first. */
export function pairsOf(check: Check, tested: readonly Tested[]): DiagnosedPair[] {
  const {axes, limit} = check;
  if (axes.length < 3) return [];
  const alone = tested.filter((one) => misfitOf(check, one) > limit);
  // A cause of the height alone helps no plan: the plan must fit by itself on its two axes.
  const possible = alone.filter((one) => !hasPlan(one) || planMisfit(check, one) <= limit);
  return combinations(possible)
    .map((pair) => ({...pair, misfit: pairMisfit(check, pair)}))
    .filter((pair) => pair.misfit <= limit)
    .sort((a, b) => a.misfit - b.misfit)
    .map(({plan, height, misfit}) => ({
      plan: {code: plan.code, values: plan.prediction.values},
      height: {code: height.code, values: height.prediction.values},
      predictedM: perAxis(sum(plan.prediction.offset, height.prediction.offset), axes),
      misfit,
    }));
}

const PLAN_AXES = [0, 1];

function planMisfit({offset, covarianceM2}: Check, {prediction}: Tested): number {
  return misfit(difference(offset, prediction.offset), PLAN_AXES, [
    covarianceM2,
    prediction.covarianceM2,
  ]);
}

function pairMisfit(
  {offset, axes, covarianceM2}: Check,
  {plan, height}: {readonly plan: Tested; readonly height: Tested},
): number {
  const together = sum(plan.prediction.offset, height.prediction.offset);
  return misfit(difference(offset, together), axes, [
    covarianceM2,
    plan.prediction.covarianceM2,
    height.prediction.covarianceM2,
  ]);
}
