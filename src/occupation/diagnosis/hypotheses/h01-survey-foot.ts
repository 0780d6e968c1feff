import {RADIANS_PER_DEGREE} from '../../../geodesy/angle.ts';
import {gridOfMark} from '../grid-of-mark.ts';
import {type Hypothesis, notTested, predicted, vector} from '../hypothesis.ts';

/** US survey foot by international foot, less one: (1200/3937)/0.3048 − 1. */
const FOOT_RATIO = 1200 / 3937 / 0.3048 - 1;

/**
 * Grid coordinates in US survey feet taken as international ones, or the reverse: 2 ppm of easting
 * and northing, along the grid.
 */
export const surveyFoot: Hypothesis = {
  code: 'H01',
  predict: (input) => {
    const grid = gridOfMark(input);
    if (grid === undefined) return notTested('no-grid');
    const {eastingM, northingM} = grid.coordinates;
    const gammaRad = grid.convergenceDeg * RADIANS_PER_DEGREE;
    const scale = FOOT_RATIO / grid.pointScale;
    // From grid axes to true ones: grid north has the bearing of the convergence.
    const eastM = scale * (eastingM * Math.cos(gammaRad) + northingM * Math.sin(gammaRad));
    const northM = scale * (northingM * Math.cos(gammaRad) - eastingM * Math.sin(gammaRad));
    const values = {grid: grid.projection.definition.name};
    return predicted([
      vector({eastM, northM, upM: 0}, 0, 0, {...values, taken: 'international'}),
      vector({eastM: -eastM, northM: -northM, upM: 0}, 0, 0, {...values, taken: 'survey'}),
    ]);
  },
};
