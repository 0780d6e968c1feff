/**
 * A grid of geoid undulations: heights of a geoid or quasigeoid above the ellipsoid at the nodes of
 * a regular net of latitudes and longitudes.
 */
export interface GeoidGrid {
  readonly name: string;
  /** The most southern and western nodes. */
  readonly southDeg: number;
  readonly westDeg: number;
  readonly latitudeStepDeg: number;
  readonly longitudeStepDeg: number;
  readonly rowCount: number;
  readonly columnCount: number;
  /** Row by row from the south, each from the west; NaN where the model says nothing. */
  readonly undulationM: Float32Array;
}

export type GeoidInterpolation = 'bilinear' | 'biquadratic';

/** A grid file that was not understood, with the reason in words. */
export interface RefusedGeoidGrid {
  readonly kind: 'refused';
  readonly message: string;
}

export interface ParsedGeoidGrid {
  readonly kind: 'geoid grid';
  readonly grid: GeoidGrid;
}

/**
 * The undulation at a place; orthometric height = ellipsoidal height − undulation.
 *
 * Method: bilinear in the cell, or biquadratic (Lagrange polynomials through the nearest 3 × 3
 * nodes). A grid that goes round the Earth continues across its seam.
 * Valid for: places within the outermost nodes.
 *
 * @returns undefined outside the grid, and where a node that is needed has no value
 */
export function geoidUndulationM(
  grid: GeoidGrid,
  place: {readonly latitudeDeg: number; readonly longitudeDeg: number},
  interpolation: GeoidInterpolation,
): number | undefined {
  const row = (place.latitudeDeg - grid.southDeg) / grid.latitudeStepDeg;
  const column = columnOf(grid, place.longitudeDeg);
  if (!(row >= -EDGE && row <= grid.rowCount - 1 + EDGE) || column === undefined) return undefined;
  const order = interpolation === 'bilinear' ? 2 : 3;
  if (grid.rowCount < order || grid.columnCount < order) return undefined;
  const rows = stencil(row, order, grid.rowCount);
  const columns = stencil(column, order, isRoundTheEarth(grid) ? 'endless' : grid.columnCount);
  let sum = 0;
  for (let i = 0; i < order; i++) {
    for (let j = 0; j < order; j++) {
      const weight = rows.weights[i]! * columns.weights[j]!;
      // A weight of zero must not let a node without a value spoil one that has.
      if (weight !== 0) sum += weight * nodeM(grid, rows.first + i, columns.first + j);
    }
  }
  return Number.isNaN(sum) ? undefined : sum;
}

/** A place on the edge itself may fall outside by the rounding of its degrees. */
const EDGE = 1e-9;

function isRoundTheEarth({columnCount, longitudeStepDeg}: GeoidGrid): boolean {
  return Math.abs(columnCount * longitudeStepDeg - 360) < longitudeStepDeg / 2;
}

/** The column, fractional, counted from the west; undefined outside. */
function columnOf(grid: GeoidGrid, longitudeDeg: number): number | undefined {
  const eastward = (((longitudeDeg - grid.westDeg) % 360) + 360) % 360;
  const column = eastward / grid.longitudeStepDeg;
  if (column <= grid.columnCount - 1 + EDGE || isRoundTheEarth(grid)) return column;
  // Just west of the first node, by rounding.
  return 360 / grid.longitudeStepDeg - column < EDGE ? 0 : undefined;
}

interface Stencil {
  readonly first: number;
  readonly weights: readonly number[];
}

/** The first of the nodes used and their weights: Lagrange polynomials on equal steps. */
function stencil(position: number, order: 2 | 3, count: number | 'endless'): Stencil {
  const nearest = order === 2 ? Math.floor(position) : Math.round(position) - 1;
  const first = count === 'endless' ? nearest : Math.max(0, Math.min(nearest, count - order));
  const t = position - first;
  if (order === 2) return {first, weights: [1 - t, t]};
  return {
    first,
    weights: [((t - 1) * (t - 2)) / 2, t * (2 - t), (t * (t - 1)) / 2],
  };
}

function nodeM({undulationM, columnCount}: GeoidGrid, row: number, column: number): number {
  const wrapped = (column + columnCount) % columnCount;
  return undulationM[row * columnCount + wrapped] ?? Number.NaN;
}
