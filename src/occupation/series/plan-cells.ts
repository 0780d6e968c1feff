import {moments} from '../../statistics/moments.ts';
import type {PerAxis} from '../result.ts';
import {roundStepAbove, widthOfWholeSteps} from './round-steps.ts';
import type {UsedColumns} from './used-columns.ts';

/** Epochs counted in cells of the plan; the cells that hold at least one, row by row. */
export interface PlanCells {
  readonly cellEastM: number;
  readonly cellNorthM: number;
  /** Lower left corner of cell (0, 0), about the reference. */
  readonly originEastM: number;
  readonly originNorthM: number;
  readonly columns: number;
  readonly rows: number;
  readonly column: readonly number[];
  readonly row: readonly number[];
  readonly count: readonly number[];
  /** Epochs used that lie outside the cells drawn. */
  readonly outside: number;
  readonly total: number;
}

/** Cells across the frame that a density can be read from. */
const CELLS_ACROSS = 64;
/** Half of the frame in standard deviations: beyond it a normal record has no epoch. */
const FRAME_SIGMAS = 5;
/** A frame for records without any scatter. */
const LEAST_HALF_FRAME_M = 0.002;

export function planCells(columns: UsedColumns, resolution: PerAxis<number | null>) {
  if (columns.count === 0) return null;
  const halfFrameM = halfFrame(columns);
  const wishedM = roundStepAbove((2 * halfFrameM) / CELLS_ACROSS);
  const east = axisOfCells(columns.eastM, wishedM, resolution.east, halfFrameM);
  const north = axisOfCells(columns.northM, wishedM, resolution.north, halfFrameM);
  const counts = new Uint32Array(east.cells * north.cells);
  let outside = 0;
  for (let i = 0; i < columns.count; i++) {
    const column = Math.floor((columns.eastM[i]! - east.originM) / east.cellM);
    const row = Math.floor((columns.northM[i]! - north.originM) / north.cellM);
    if (column >= 0 && column < east.cells && row >= 0 && row < north.cells) {
      counts[row * east.cells + column]!++;
    } else {
      outside++;
    }
  }
  return {
    cellEastM: east.cellM,
    cellNorthM: north.cellM,
    originEastM: east.originM,
    originNorthM: north.originM,
    columns: east.cells,
    rows: north.cells,
    ...filledCells(counts, east.cells),
    outside,
    total: columns.count,
  } satisfies PlanCells;
}

function halfFrame({eastM, northM}: UsedColumns): number {
  let widestM = LEAST_HALF_FRAME_M;
  for (const valuesM of [eastM, northM]) {
    const {mean, standardDeviation} = moments(valuesM)!;
    const deviation = standardDeviation ?? 0;
    let furthestM = 0;
    for (let i = 0; i < valuesM.length; i++) {
      furthestM = Math.max(furthestM, Math.abs(valuesM[i]! - mean));
    }
    widestM = Math.max(widestM, Math.min(furthestM, FRAME_SIGMAS * deviation));
  }
  return widestM;
}

interface CellAxis {
  readonly cellM: number;
  readonly originM: number;
  readonly cells: number;
}

function axisOfCells(
  valuesM: Float64Array,
  wishedM: number,
  resolutionM: number | null,
  halfFrameM: number,
): CellAxis {
  const cellM = widthOfWholeSteps(wishedM, resolutionM);
  const {mean} = moments(valuesM)!;
  // Values of a coarse log lie on a lattice: edges half a step beside it keep rounding out.
  const latticeM = cellM === wishedM ? 0 : valuesM[0]! - cellM / 2;
  const originM = latticeM + Math.floor((mean - halfFrameM - latticeM) / cellM) * cellM;
  const cells = Math.floor((mean + halfFrameM - originM) / cellM) + 1;
  return {cellM, originM, cells};
}

function filledCells(counts: Uint32Array, across: number) {
  const column: number[] = [];
  const row: number[] = [];
  const count: number[] = [];
  for (let i = 0; i < counts.length; i++) {
    if (counts[i] === 0) continue;
    column.push(i % across);
    row.push(Math.floor(i / across));
    count.push(counts[i]!);
  }
  return {column, row, count};
}
