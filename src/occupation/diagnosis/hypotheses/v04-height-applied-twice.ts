import {heightsInUse} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** Receiver and reduction both took the height off: dU = −h. */
export const heightAppliedTwice: Hypothesis = {
  code: 'V04',
  predict: (input) => {
    const heights = heightsInUse(input);
    if (heights.length === 0) return notTested('no-antenna-height');
    return predicted(heights.map(({heightM, by}) => upward(-heightM, TAPE_SIGMA_M, {heightM, by})));
  },
};
