import {heightsInUse} from '../antenna-heights.ts';
import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  TAPE_SIGMA_M,
  upward,
} from '../hypothesis.ts';

/** How high antennas stand over marks, on pillars, tripods and poles: common practice, no source. */
const LOWEST_M = 0.1;
const HIGHEST_M = 3.5;

/**
 * The positions are of the antenna, not of the mark: dU = h. A height that nobody gave is taken
 * from the offset, where it could be one.
 */
export const heightNotApplied: Hypothesis = {
  code: 'V03',
  predict: (input) => {
    const heights = heightsInUse(input);
    if (heights.length > 0) {
      return predicted(
        heights.map(({heightM, by}) => upward(heightM, TAPE_SIGMA_M, {heightM, by})),
      );
    }
    const {upM} = comparedOffset(input);
    const possible = upM >= LOWEST_M && upM <= HIGHEST_M;
    if (input.antenna?.takenOffBy === 'receiver' || !possible)
      return notTested('no-antenna-height');
    return predicted([fitted(upward(upM, 0, {heightM: upM, by: 'nobody'}), 1)]);
  },
};
