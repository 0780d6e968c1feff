import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';
import {receiverSeparation} from '../separations.ts';

/** The separation was taken off a height that is already above the geoid: dU = −N. */
export const separationRemovedTwice: Hypothesis = {
  code: 'V12',
  predict: (input) => {
    const found = receiverSeparation(input);
    if (found === undefined) return notTested('no-separation');
    const {separationM, sigmaM, source} = found;
    return predicted([upward(-separationM, sigmaM, {separationM, source})]);
  },
};
