import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** The sign of the longitude lost, in the log or of the mark. */
export const longitudeSign: Hypothesis = {
  code: 'H03',
  predict: (input) => {
    const {markPlan} = input;
    if (markPlan === null) return notTested('no-plan');
    const {latitudeDeg, longitudeDeg} = markPlan;
    return predicted(
      recomputed(input, [{latitudeDeg, longitudeDeg: -longitudeDeg, upM: 0, values: {}}]),
    );
  },
};
