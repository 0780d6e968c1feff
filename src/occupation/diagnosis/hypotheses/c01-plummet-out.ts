import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  vector,
} from '../hypothesis.ts';
import {fromTurnedSetUps} from '../turned-set-up.ts';

/** A plummet further out than this is seen by eye: common practice, no source. */
const LARGEST_M = 0.02;

/**
 * Plummet or tribrach out of adjustment: the same eccentricity, turning with the tribrach. Two
 * set-ups turned by half a turn show opposite offsets; alone it fits every few millimetres.
 */
export const plummetOut: Hypothesis = {
  code: 'C01',
  predict: (input) => {
    const shown = fromTurnedSetUps(input);
    if (shown.length > 0) return predicted(shown);
    if (input.sameMarkChecks.some(({turnedDeg}) => turnedDeg !== null)) {
      return notTested('set-ups-agree');
    }
    const {eastM, northM} = comparedOffset(input);
    const eccentricityM = Math.hypot(eastM, northM);
    if (eccentricityM > LARGEST_M || eccentricityM === 0) return notTested('beyond-its-size');
    const values = {turnedDeg: null, eccentricityM};
    return predicted([fitted(vector({eastM, northM, upM: 0}, 0, 0, values), 2)]);
  },
};
