import {heightsInUse} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** The tape read wrong by one whole mark, a metre or a decimetre; a foot or its tenth. */
export const digitWrong: Hypothesis = {
  code: 'V16',
  predict: (input) => {
    if (heightsInUse(input).length === 0) return notTested('no-antenna-height');
    const unitM = input.antenna?.reading?.unitM ?? 1;
    const wholeM = unitM > 0.3 && unitM < 0.31 ? unitM : 1;
    return predicted(
      [wholeM, wholeM / 10].flatMap((byM) =>
        [1, -1].map((sign) => upward(sign * byM, TAPE_SIGMA_M, {byM: sign * byM})),
      ),
    );
  },
};
