import type {EnuColumns} from '../geodesy/local.ts';
import {medianInPlace} from '../statistics/quantile.ts';
import {type LocalColumns, selected} from './local-columns.ts';
import type {PerAxis, Result} from './result.ts';
import {scatterAbout, type UsedPositions} from './scatter.ts';
import type {Session} from './session.ts';

/** Scatter of single epochs about their mean and about the reference. */
export function scatterOf(
  used: UsedPositions,
  meanM: PerAxis<number | null>,
  offsetM: PerAxis<number | null>,
): Result['scatter'] {
  return {
    aboutMean: scatterAbout(used, meanM),
    aboutReference: scatterAbout(used, centreOf(meanM, offsetM)),
  };
}

/** The positions that a session averages. */
export function usedPositions(columns: LocalColumns, {indices}: Session) {
  return {
    eastM: selected(columns.eastM, indices),
    northM: selected(columns.northM, indices),
    upM: selected(columns.upM, indices),
  };
}

/** Median change of a coordinate from one epoch used to the next. */
export function typicalStepM(columns: LocalColumns, {indices}: Session): PerAxis<number | null> {
  const typical = (column: Float64Array) => {
    if (indices.length < 2) return null;
    const steps = new Float64Array(indices.length - 1);
    for (let i = 0; i < steps.length; i++) {
      steps[i] = Math.abs(column[indices[i + 1]!]! - column[indices[i]!]!);
    }
    return medianInPlace(steps, steps.length);
  };
  return {
    east: typical(columns.eastM),
    north: typical(columns.northM),
    up: columns.heightKind === 'none' ? null : typical(columns.upM),
  };
}

/** Where the reference lies in the frame of the columns, from the mean and its offset. */
function centreOf(
  meanM: PerAxis<number | null>,
  offsetM: PerAxis<number | null>,
): PerAxis<number | null> {
  const centre = (axis: keyof PerAxis) => {
    const [mean, offset] = [meanM[axis], offsetM[axis]];
    return mean === null || offset === null ? null : mean - offset;
  };
  return {east: centre('east'), north: centre('north'), up: centre('up')};
}

/** Shifts the columns themselves, as a second set of them would be large; for when all is computed. */
export function shiftToReference(
  {eastM, northM, upM}: LocalColumns,
  meanM: PerAxis<number | null>,
  offsetM: PerAxis<number | null>,
): EnuColumns {
  const centre = centreOf(meanM, offsetM);
  const shift = (column: Float64Array, by: number | null) => {
    for (let i = 0; i < column.length; i++) column[i]! -= by ?? 0;
  };
  shift(eastM, centre.east);
  shift(northM, centre.north);
  shift(upM, centre.up);
  return {eastM, northM, upM};
}
