import {heightsInUse} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** The positions are of the antenna, not of the mark: dU = h. */
export const heightNotApplied: Hypothesis = {
  code: 'V03',
  predict: (input) => {
    const heights = heightsInUse(input);
    if (heights.length === 0) return notTested('no-antenna-height');
    return predicted(heights.map(({heightM, by}) => upward(heightM, TAPE_SIGMA_M, {heightM, by})));
  },
};
