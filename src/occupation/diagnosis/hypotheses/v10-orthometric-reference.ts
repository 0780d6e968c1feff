import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';
import {trueSeparation} from '../separations.ts';

/** The height of the mark is orthometric, the measured one ellipsoidal: dU = N. */
export const orthometricReference: Hypothesis = {
  code: 'V10',
  predict: (input) => {
    const found = trueSeparation(input);
    if (found === undefined) return notTested('no-separation');
    const {separationM, sigmaM, source} = found;
    return predicted([upward(separationM, sigmaM, {separationM, source})]);
  },
};
