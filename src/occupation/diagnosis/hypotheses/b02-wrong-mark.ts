import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  type Prediction,
  predicted,
  vector,
} from '../hypothesis.ts';
import type {DiagnosisInput, NearbyMark} from '../input.ts';

/** Distances to witness marks are taped: common practice, no source. */
const WITNESS_SIGMA_M = 0.02;
/** Marks that could be confused lie within a step or two of one level: common practice, no source. */
const LEVEL_SIGMA_M = 0.5;
/** An old nail or another mark is this near, and this far, from the right one. */
const NAIL_M = {least: 0.03, most: 50};

/**
 * Another mark was occupied, or is the one that the coordinates belong to: d is the vector to it.
 * An unlisted mark nearby fits every plan offset of some metres.
 */
export const wrongMark: Hypothesis = {
  code: 'B02',
  predict: (input) => {
    const named = input.nearbyMarks.map((nearby) => toNamed(nearby, input));
    const unnamed = toUnnamed(input);
    const predictions = [...named, ...unnamed];
    return predictions.length === 0 ? notTested('no-nearby-mark') : predicted(predictions);
  },
};

function toNamed(
  {name, position, upM, standardUncertaintyM}: NearbyMark,
  input: DiagnosisInput,
): Prediction {
  const planSigmaM = standardUncertaintyM ?? WITNESS_SIGMA_M;
  const upSigmaM = upM === null ? LEVEL_SIGMA_M : planSigmaM;
  const height = {upM: upM ?? 0};
  if (position.kind === 'offset') {
    const {eastM, northM} = position;
    return vector({eastM, northM, ...height}, planSigmaM, upSigmaM, {
      name,
      distanceM: Math.hypot(eastM, northM),
    });
  }
  // Only the distance is known: the direction is that of the offset.
  const {eastM, northM} = comparedOffset(input);
  const scale = position.distanceM / Math.max(1e-9, Math.hypot(eastM, northM));
  const towards = {eastM: scale * eastM, northM: scale * northM, ...height};
  return fitted(vector(towards, planSigmaM, upSigmaM, {name, distanceM: position.distanceM}), 1);
}

function toUnnamed(input: DiagnosisInput): Prediction[] {
  const {eastM, northM} = comparedOffset(input);
  const distanceM = Math.hypot(eastM, northM);
  if (!(distanceM >= NAIL_M.least && distanceM <= NAIL_M.most)) return [];
  return [fitted(vector({eastM, northM, upM: 0}, 0, LEVEL_SIGMA_M, {name: null, distanceM}), 2)];
}
