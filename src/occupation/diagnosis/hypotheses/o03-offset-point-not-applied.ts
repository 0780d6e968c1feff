import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, vector} from '../hypothesis.ts';

/**
 * The point laid off, but its vector applied in vain or the wrong way: the antenna stood over the
 * mark after all, or on its other side. Not in handbooks; it follows from the sign of a vector.
 */
export const offsetPointNotApplied: Hypothesis = {
  code: 'O03',
  predict: ({offsetPoint}) => {
    if (offsetPoint === null) return notTested('no-offset-point');
    const {eastM, northM} = offsetPoint;
    return predicted(
      [
        {times: 1, how: 'for nothing'},
        {times: 2, how: 'backwards'},
      ].map(({times, how}) =>
        vector({eastM: -times * eastM, northM: -times * northM, upM: 0}, times * TAPE_SIGMA_M, 0, {
          how,
        }),
      ),
    );
  },
};
