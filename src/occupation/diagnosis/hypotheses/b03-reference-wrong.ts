import {comparedOffset, fitted, type Hypothesis, predicted, vector} from '../hypothesis.ts';
import {lengthM} from '../misfit.ts';

/**
 * The published coordinates are wrong, or the mark was disturbed since: fits every offset. One
 * check cannot tell it from a wrong base; checks of other marks can.
 */
export const referenceWrong: Hypothesis = {
  code: 'B03',
  predict: (input) => {
    const offset = comparedOffset(input);
    return predicted([fitted(vector(offset, 0, 0, {sizeM: lengthM(offset, [0, 1, 2])}), 3)]);
  },
};
