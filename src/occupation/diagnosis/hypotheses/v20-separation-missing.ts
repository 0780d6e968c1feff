import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';
import {trueSeparation} from '../separations.ts';

/** The log leaves the separation empty, and it was taken as zero: dU = −N. */
export const separationMissing: Hypothesis = {
  code: 'V20',
  predict: (input) => {
    if (!input.separation.missingInLog) return notTested('separation-in-log');
    const found = trueSeparation(input);
    if (found === undefined) return notTested('no-separation');
    const {separationM, sigmaM, source} = found;
    return predicted([upward(-separationM, sigmaM, {separationM, source})]);
  },
};
