import {slopes} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** A slope entered as a vertical height: dU = −(s − (√(s² − R²) − o)). */
export const slantAsVertical: Hypothesis = {
  code: 'V01',
  predict: (input) => {
    if (input.antenna?.plateRadiusM == null) return notTested('no-plate-radius');
    const found = slopes(input);
    if (found.length === 0) return notTested('no-height-reading');
    return predicted(
      found.map(({readingM, verticalM}) =>
        upward(-(readingM - verticalM), TAPE_SIGMA_M, {readingM}),
      ),
    );
  },
};
