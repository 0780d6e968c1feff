import {BEARING_SIGMA_DEG, type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {turnedOffsetPoint} from '../turned-offset-point.ts';

/** The point laid off by a magnetic bearing taken as true, or the reverse: |d| = 2 r sin(D/2). */
export const magneticBearing: Hypothesis = {
  code: 'O01',
  predict: ({offsetPoint, declinationDeg}) => {
    if (offsetPoint === null) return notTested('no-offset-point');
    if (declinationDeg === null) return notTested('no-declination');
    return predicted(turnedOffsetPoint(offsetPoint, declinationDeg, BEARING_SIGMA_DEG));
  },
};
