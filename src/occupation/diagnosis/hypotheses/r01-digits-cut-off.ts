import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';

/**
 * The digits of the log cut off instead of rounded: half a step towards zero, on the average. How
 * much it is at rest depends on where the mark lies between two steps.
 */
export const digitsCutOff: Hypothesis = {
  code: 'R01',
  predict: ({resolutionM, markPlan, ellipsoidalHeightM}) => {
    const {east, north, up} = resolutionM;
    if (east === null || north === null) return notTested('no-resolution');
    if (markPlan === null) return notTested('no-plan');
    const upStepM = up ?? 0;
    const variance = (stepM: number) => (stepM * stepM) / 12;
    const stepsM = {eastM: east, northM: north, upM: upStepM};
    return predicted([
      {
        offset: {
          eastM: (-Math.sign(markPlan.longitudeDeg) * east) / 2,
          northM: (-Math.sign(markPlan.latitudeDeg) * north) / 2,
          upM: (-Math.sign(ellipsoidalHeightM ?? 1) * upStepM) / 2,
        },
        covarianceM2: [
          [variance(east), 0, 0],
          [0, variance(north), 0],
          [0, 0, variance(upStepM)],
        ],
        freeParameters: 0,
        values: stepsM,
      },
    ]);
  },
};
