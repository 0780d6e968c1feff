import {enuFromGeodetic, localFrame} from '../../geodesy/local.ts';
import {type CauseValues, type Prediction, vector} from './hypothesis.ts';
import type {DiagnosisInput, PlanPlace} from './input.ts';

/** Where the measured position would lie, in plan and above the mark, if the mark is right. */
export interface Misplaced extends PlanPlace {
  readonly upM: number;
  readonly values: CauseValues;
}

/**
 * The offsets that misread positions show, in the convention of every offset: east and north in the
 * local frame at the mark, both points at one height; up the difference of heights.
 *
 * A misreading may turn and stretch the noise of the plan, so the larger of its variances is
 * allowed once more in every direction; beside offsets of kilometres that costs nothing.
 */
export function recomputed(input: DiagnosisInput, places: readonly Misplaced[]): Prediction[] {
  const {markPlan, covarianceM2, ellipsoid} = input;
  if (markPlan === null) return [];
  const ellipsoidalHeightM = input.ellipsoidalHeightM ?? 0;
  const frame = localFrame({...markPlan, ellipsoidalHeightM}, ellipsoid);
  const planSigmaM = Math.sqrt(Math.max(covarianceM2[0]?.[0] ?? 0, covarianceM2[1]?.[1] ?? 0));
  return places.map(({latitudeDeg, longitudeDeg, upM, values}) => {
    const {eastM, northM} = enuFromGeodetic({latitudeDeg, longitudeDeg, ellipsoidalHeightM}, frame);
    return vector({eastM, northM, upM}, planSigmaM, 0, values);
  });
}
