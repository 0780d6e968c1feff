import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';
import {receiverSeparation} from '../separations.ts';

/** The separation applied with the wrong sign: dU = 2N where H was wanted, −2N where h was. */
export const separationWrongSign: Hypothesis = {
  code: 'V13',
  predict: (input) => {
    const found = receiverSeparation(input);
    if (found === undefined) return notTested('no-separation');
    const {separationM, sigmaM, source} = found;
    return predicted(
      [1, -1].map((sign) =>
        upward(sign * 2 * separationM, 2 * sigmaM, {
          separationM,
          source,
          wanted: sign > 0 ? 'orthometric' : 'ellipsoidal',
        }),
      ),
    );
  },
};
