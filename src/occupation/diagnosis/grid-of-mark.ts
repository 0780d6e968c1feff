import {UsageError} from '../../errors.ts';
import {parseGrid} from '../../geodesy/grid-definition.ts';
import {type Projection, projectionOf} from '../../geodesy/projection.ts';
import type {PlanCoordinates} from '../../geodesy/transverse-mercator.ts';
import type {DiagnosisInput, PlanPlace} from './input.ts';

/** The mark on its grid. */
export interface GridOfMark {
  readonly projection: Projection;
  readonly coordinates: PlanCoordinates;
  readonly convergenceDeg: number;
  readonly pointScale: number;
}

/** The grid of mark or sheet, else UTM; undefined where the mark does not lie on it. */
export function gridOfMark(input: DiagnosisInput): GridOfMark | undefined {
  const {markPlan, ellipsoid} = input;
  if (markPlan === null) return undefined;
  return orUndefined(() => {
    const projection =
      input.projection ?? projectionOf(parseGrid('UTM', {place: markPlan, ellipsoid}));
    const factors = projection.factors(markPlan);
    return {
      projection,
      coordinates: projection.forward(markPlan),
      convergenceDeg: factors.convergenceDeg,
      pointScale: factors.pointScale ?? Math.sqrt(factors.meridianScale * factors.parallelScale),
    };
  });
}

/** The place of grid coordinates; undefined where the grid has none. */
export function placeOnGrid(
  {projection}: GridOfMark,
  coordinates: PlanCoordinates,
): PlanPlace | undefined {
  return orUndefined(() => projection.inverse(coordinates));
}

/** Grids refuse what they cannot hold; here that only means "does not apply". */
function orUndefined<T>(compute: () => T): T | undefined {
  try {
    return compute();
  } catch (error) {
    if (error instanceof UsageError || error instanceof RangeError) return undefined;
    throw error;
  }
}
