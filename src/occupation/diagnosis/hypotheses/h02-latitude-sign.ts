import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** The sign of the latitude lost, in the log or of the mark. */
export const latitudeSign: Hypothesis = {
  code: 'H02',
  predict: (input) => {
    const {markPlan} = input;
    if (markPlan === null) return notTested('no-plan');
    const {latitudeDeg, longitudeDeg} = markPlan;
    return predicted(
      recomputed(input, [{latitudeDeg: -latitudeDeg, longitudeDeg, upM: 0, values: {}}]),
    );
  },
};
