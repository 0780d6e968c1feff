import {gridOfMark, placeOnGrid} from '../grid-of-mark.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, vector} from '../hypothesis.ts';
import {recomputed} from '../recomputed.ts';

/** East and north exchanged: of the grid coordinates, or of the point laid off. */
export const eastNorthExchanged: Hypothesis = {
  code: 'H11',
  predict: (input) => {
    const {offsetPoint} = input;
    const grid = gridOfMark(input);
    const exchanged =
      grid &&
      placeOnGrid(grid, {
        eastingM: grid.coordinates.northingM,
        northingM: grid.coordinates.eastingM,
      });
    const predictions = [
      ...(exchanged === undefined
        ? []
        : recomputed(input, [
            {
              ...exchanged,
              upM: 0,
              values: {of: 'grid', grid: grid?.projection.definition.name ?? ''},
            },
          ])),
      ...(offsetPoint === null
        ? []
        : [
            vector(
              {
                eastM: offsetPoint.northM - offsetPoint.eastM,
                northM: offsetPoint.eastM - offsetPoint.northM,
                upM: 0,
              },
              TAPE_SIGMA_M,
              0,
              {of: 'offset point', grid: null},
            ),
          ]),
    ];
    return predictions.length === 0 ? notTested('no-grid') : predicted(predictions);
  },
};
