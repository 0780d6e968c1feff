import {type Ellipsoid, GRS80} from '../geodesy/ellipsoid.ts';
import {parseGrid, requireGridFits} from '../geodesy/grid-definition.ts';
import {combinedFactor, elevationFactor} from '../geodesy/ground-factor.ts';
import {projectionOf} from '../geodesy/projection.ts';
import type {GeodeticPosition, GridPosition} from './result.ts';

/**
 * A position in a map grid, with what the grid does to lengths and bearings there.
 *
 * @param frame of the position; null: not stated
 * @throws UsageError for a grid that is not known, made for another frame or ellipsoid, or that
 *         cannot hold the place
 */
export function gridPosition(
  text: string,
  {latitudeDeg, longitudeDeg, ellipsoidalHeightM}: GeodeticPosition,
  {ellipsoid, frame}: {readonly ellipsoid: Ellipsoid; readonly frame: string | null},
): GridPosition {
  const place = {latitudeDeg, longitudeDeg};
  const grid = parseGrid(text, {place, ellipsoid});
  requireGridFits(grid, {ellipsoid, frame});
  const projection = projectionOf(grid);
  const {eastingM, northingM} = projection.forward(place);
  const {convergenceDeg, pointScale} = projection.factors(place);
  const elevation =
    ellipsoidalHeightM === null
      ? null
      : elevationFactor({latitudeDeg, ellipsoidalHeightM}, projection.definition.ellipsoid);
  return {
    name: projection.definition.name,
    eastingM,
    northingM,
    convergenceDeg,
    pointScale: pointScale ?? null,
    elevationFactor: elevation,
    combinedFactor:
      elevation === null || pointScale === undefined ? null : combinedFactor(pointScale, elevation),
  };
}

/** Latitude and longitude of a point given in a map grid. */
export function planOfGrid(
  text: string,
  eastingM: number,
  northingM: number,
): {readonly latitudeDeg: number; readonly longitudeDeg: number} {
  const grid = parseGrid(text, {place: null, ellipsoid: GRS80});
  return projectionOf(grid).inverse({eastingM, northingM});
}
