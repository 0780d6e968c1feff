import {combinedFactor, elevationFactor} from '../../../geodesy/ground-factor.ts';
import {gridOfMark} from '../grid-of-mark.ts';
import {
  covarianceOfCheck,
  type Hypothesis,
  notTested,
  type Prediction,
  predicted,
} from '../hypothesis.ts';
import type {OtherMarkCheck} from '../input.ts';

/**
 * Ground distances taken as grid distances, or the reverse: seen between marks only. From another
 * mark to this one the offset changes by the distance times (k R/(R + h) − 1), along the line.
 */
export const groundDistance: Hypothesis = {
  code: 'G01',
  predict: (input) => {
    const others = input.otherMarkChecks.filter(({fromItM}) => fromItM !== null);
    if (others.length === 0) return notTested('no-other-mark');
    const {markPlan, ellipsoidalHeightM, ellipsoid} = input;
    const grid = gridOfMark(input);
    if (markPlan === null || grid === undefined) return notTested('no-grid');
    if (ellipsoidalHeightM === null) return notTested('no-ellipsoidal-height');
    const factor =
      combinedFactor(
        grid.pointScale,
        elevationFactor({latitudeDeg: markPlan.latitudeDeg, ellipsoidalHeightM}, ellipsoid),
      ) - 1;
    return predicted(
      others.flatMap((other) =>
        [factor, -factor].map((change) =>
          scaledFrom(other, change, grid.projection.definition.name),
        ),
      ),
    );
  },
};

function scaledFrom(
  {mark, offsetM, covarianceM2, fromItM}: OtherMarkCheck,
  change: number,
  grid: string,
): Prediction {
  const eastM = fromItM?.eastM ?? 0;
  const northM = fromItM?.northM ?? 0;
  return {
    offset: {
      eastM: (offsetM.east ?? 0) + change * eastM,
      northM: (offsetM.north ?? 0) + change * northM,
      upM: offsetM.up ?? 0,
    },
    covarianceM2: covarianceOfCheck({offsetM, covarianceM2}),
    freeParameters: 0,
    values: {mark, distanceM: Math.hypot(eastM, northM), perKilometreM: change * 1000, grid},
  };
}
