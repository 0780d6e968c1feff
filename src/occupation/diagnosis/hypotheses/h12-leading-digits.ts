import type {PlanCoordinates} from '../../../geodesy/transverse-mercator.ts';
import {gridOfMark, placeOnGrid} from '../grid-of-mark.ts';
import {type Hypothesis, notTested, predicted} from '../hypothesis.ts';
import {type Misplaced, recomputed} from '../recomputed.ts';

/**
 * Leading digits of grid coordinates dropped, or the false origin left out: east, north or both are
 * off by a whole multiple of 100 000 m. The measured ones are short of it, or those of the mark.
 */
export const leadingDigits: Hypothesis = {
  code: 'H12',
  predict: (input) => {
    const grid = gridOfMark(input);
    if (grid === undefined) return notTested('no-grid');
    const {eastingM, northingM} = grid.coordinates;
    const places: Misplaced[] = [];
    for (const [droppedEastM, droppedNorthM] of droppedPairs(eastingM, northingM)) {
      for (const [side, sign] of [
        ['measured', -1],
        ['mark', 1],
      ] as const) {
        const coordinates: PlanCoordinates = {
          eastingM: eastingM + sign * droppedEastM,
          northingM: northingM + sign * droppedNorthM,
        };
        const place = placeOnGrid(grid, coordinates);
        const values = {side, droppedEastM, droppedNorthM, grid: grid.projection.definition.name};
        if (place !== undefined) places.push({...place, upM: 0, values});
      }
    }
    return predicted(recomputed(input, places));
  },
};

function droppedPairs(eastingM: number, northingM: number): (readonly [number, number])[] {
  const east = dropped(eastingM);
  const north = dropped(northingM);
  return [
    ...east.map((eastM) => [eastM, 0] as const),
    ...north.map((northM) => [0, northM] as const),
    ...east.flatMap((eastM) => north.map((northM) => [eastM, northM] as const)),
  ];
}

const SMALLEST_M = 100_000;

/** What a coordinate loses with its first, or its first two digits, down to whole 100 000 m. */
function dropped(coordinateM: number): number[] {
  const values: number[] = [];
  const digits = Math.floor(Math.log10(Math.max(1, Math.abs(coordinateM))));
  for (const power of [digits, digits - 1]) {
    const unitM = 10 ** power;
    const lostM = Math.trunc(coordinateM / unitM) * unitM;
    if (unitM >= SMALLEST_M && lostM !== 0 && !values.includes(lostM)) values.push(lostM);
  }
  return values;
}
