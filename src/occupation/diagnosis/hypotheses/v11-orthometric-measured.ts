import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';
import {receiverSeparation} from '../separations.ts';

/** The measured height is above the geoid, that of the mark ellipsoidal: dU = −N. */
export const orthometricMeasured: Hypothesis = {
  code: 'V11',
  predict: (input) => {
    const found = receiverSeparation(input);
    if (found === undefined) return notTested('no-separation');
    const {separationM, sigmaM, source} = found;
    return predicted([upward(-separationM, sigmaM, {separationM, source})]);
  },
};
