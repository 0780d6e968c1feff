import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** Evenly or at once: where between half and all of it the mean lies, as a rectangular law. */
const COURSE_SIGMA = 0.25 / Math.sqrt(3);

/**
 * The set-up sank (or rose) by the change of the measured height, and the opening height counts:
 * dU is half the change if it went evenly, all of it if it went at once.
 */
export const settled: Hypothesis = {
  code: 'V19',
  predict: ({antenna}) => {
    if (antenna?.openingM == null || antenna.closingM == null) {
      return notTested('no-closing-height');
    }
    if (antenna.heightUsed !== 'opening') return notTested('height-change-used');
    const changeM = antenna.closingM - antenna.openingM;
    return predicted([
      upward(changeM / 2, TAPE_SIGMA_M, {changeM, course: 'evenly'}),
      upward(0.75 * changeM, Math.hypot(TAPE_SIGMA_M, COURSE_SIGMA * changeM), {
        changeM,
        course: 'early',
      }),
    ]);
  },
};
