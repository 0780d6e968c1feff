import {placeOfMark} from '../frame-mismatch.ts';
import {type Hypothesis, notTested, predicted, vector} from '../hypothesis.ts';
import {moved, velocityOfMark} from '../velocity-of-mark.ts';

/** 1024 weeks, after which GPS weeks of ten bits repeat. Source: IS-GPS-200, 20.3.3.3.1.1. */
const ROLLOVER_YEARS = (1024 * 7) / 365.25;

/** A date off by 1024 weeks: the plate motion of 19.6 years, where positions were propagated by it. */
export const weekRollover: Hypothesis = {
  code: 'T02',
  predict: (input) => {
    const place = placeOfMark(input);
    if (place === null) return notTested('no-plan');
    const velocity = velocityOfMark(input, place);
    if (velocity === undefined) return notTested('no-velocity');
    return predicted(
      [ROLLOVER_YEARS, -ROLLOVER_YEARS].map((years) =>
        vector(moved(velocity, years), 0.01, 0.04, {years}),
      ),
    );
  },
};
