import {heightsInUse} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** The height was added instead of taken off: dU = 2h. */
export const heightWrongSign: Hypothesis = {
  code: 'V05',
  predict: (input) => {
    const heights = heightsInUse(input);
    if (heights.length === 0) return notTested('no-antenna-height');
    return predicted(
      heights.map(({heightM, by}) => upward(2 * heightM, 2 * TAPE_SIGMA_M, {heightM, by})),
    );
  },
};
