import {gridOfMark} from '../grid-of-mark.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {turnedOffsetPoint} from '../turned-offset-point.ts';

/** The point laid off by a bearing from grid north taken as true, or the reverse. */
export const gridBearing: Hypothesis = {
  code: 'O02',
  predict: (input) => {
    if (input.offsetPoint === null) return notTested('no-offset-point');
    const grid = gridOfMark(input);
    if (grid === undefined) return notTested('no-grid');
    return predicted(turnedOffsetPoint(input.offsetPoint, grid.convergenceDeg, 0));
  },
};
