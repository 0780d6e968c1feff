import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** Latitude and longitude swapped; possible where the longitude could be a latitude. */
export const latitudeLongitudeSwapped: Hypothesis = {
  code: 'H04',
  predict: (input) => {
    const {markPlan} = input;
    if (markPlan === null) return notTested('no-plan');
    const {latitudeDeg, longitudeDeg} = markPlan;
    if (Math.abs(longitudeDeg) > 90) return notTested('cannot-happen-here');
    return predicted(
      recomputed(input, [
        {latitudeDeg: longitudeDeg, longitudeDeg: latitudeDeg, upM: 0, values: {}},
      ]),
    );
  },
};
