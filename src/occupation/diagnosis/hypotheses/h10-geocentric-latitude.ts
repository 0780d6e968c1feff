import {DEGREES_PER_RADIAN, RADIANS_PER_DEGREE} from '../../../geodesy/angle.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** Geocentric latitude, tan β = (1 − e²) tan φ, used as geodetic one; measured, or of the mark. */
export const geocentricLatitude: Hypothesis = {
  code: 'H10',
  predict: (input) => {
    const {markPlan, ellipsoid} = input;
    if (markPlan === null) return notTested('no-plan');
    const {latitudeDeg, longitudeDeg} = markPlan;
    const shrink = 1 - ellipsoid.eccentricitySquared;
    const tangent = Math.tan(latitudeDeg * RADIANS_PER_DEGREE);
    return predicted(
      recomputed(
        input,
        [
          {factor: shrink, side: 'measured'},
          {factor: 1 / shrink, side: 'mark'},
        ].map(({factor, side}) => ({
          latitudeDeg: Math.atan(factor * tangent) * DEGREES_PER_RADIAN,
          longitudeDeg,
          upM: 0,
          values: {side},
        })),
      ),
    );
  },
};
