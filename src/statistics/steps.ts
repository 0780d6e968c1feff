import type {Testable} from './analysable.ts';
import type {RatioScores} from './likelihood-ratios.ts';
import {movementSizes, stepRegressor} from './movement-sizes.ts';
import {MOVING_SUM_P, type MovingSumStep, movingSumStep, refineStepTime} from './moving-sums.ts';
import type {StepAnalysis} from './session-analysis.ts';
import {meanOfCells, type TimeCells} from './time-cells.ts';

/** A part of a record must be this long to be searched for more steps. */
const SEARCH_LEAST_S = 240;
const SEARCH_LEAST_EPOCHS = 120;
const MOST_STEPS = 60;

interface TimedStep {
  readonly atS: number;
  readonly interval95S: readonly [number, number];
}

type Hit = Pick<MovingSumStep, 'atS' | 'windowS' | 'jump'>;

/**
 * Times of all steps: the strongest first, then the same search on both sides of it, by moving sums
 * alone.
 */
export function stepTimes(
  {record, columns, cells}: Testable,
  {step}: RatioScores,
  sums: MovingSumStep | undefined,
): TimedStep[] {
  const {elapsedS} = record.input;
  const byCells: Hit = {
    atS: cells.index[step.cell]! * cells.widthS,
    windowS: cells.widthS,
    jump: columns.map((_, c) => jumpAtCell(cells, c, step.cell)),
  };
  const strongest = sums !== undefined && sums.pValue < MOVING_SUM_P ? sums : byCells;
  const found: TimedStep[] = [];
  const search = (from: number, to: number, hit: Hit | undefined) => {
    if (hit === undefined || found.length >= MOST_STEPS) return;
    const part = elapsedS.subarray(from, to);
    const time = refineStepTime(
      part,
      columns[largerOf(hit.jump)]!.subarray(from, to),
      hit.atS,
      hit.windowS,
    );
    const cut = from + part.findIndex((timeS) => timeS >= time.atS);
    if (cut <= from) return;
    found.push(time);
    search(from, cut, searchPart(elapsedS, columns, from, cut, record.spacingS));
    search(cut, to, searchPart(elapsedS, columns, cut, to, record.spacingS));
  };
  search(0, elapsedS.length, strongest);
  return found.sort((a, b) => a.atS - b.atS);
}

/** The component with the larger jump, which tells the time best. */
function largerOf(jump: readonly number[]): number {
  return jump.reduce((best, value, c) => (Math.abs(value) > Math.abs(jump[best]!) ? c : best), 0);
}

function searchPart(
  elapsedS: Float64Array,
  columns: readonly Float64Array[],
  from: number,
  to: number,
  spacingS: number,
): Hit | undefined {
  const long = to - from >= SEARCH_LEAST_EPOCHS;
  if (!long || elapsedS[to - 1]! - elapsedS[from]! < SEARCH_LEAST_S) return undefined;
  const step = movingSumStep(
    elapsedS.subarray(from, to),
    columns.map((column) => column.subarray(from, to)),
    spacingS,
  );
  return step !== undefined && step.pValue < MOVING_SUM_P ? step : undefined;
}

function jumpAtCell({means}: TimeCells, component: number, cell: number): number {
  const column = means[component]!;
  return (
    meanOfCells(column.subarray(cell, cell + 3)) -
    meanOfCells(column.subarray(Math.max(0, cell - 3), cell))
  );
}

/** The sizes of all steps together, by generalised least squares. */
export function sizedSteps(part: Testable, times: readonly TimedStep[]): StepAnalysis[] {
  const {cells, fits, numbers, record, pooling} = part;
  const firstS = record.input.elapsedS[0]!;
  const atCells = times.map(({atS}) => (atS - firstS) / cells.widthS);
  const sized = movementSizes(
    cells,
    fits,
    atCells.map((atCell) => stepRegressor(cells, atCell)),
    pooling,
  );
  return times.map(({atS, interval95S}, i) => ({
    elapsedS: atS,
    interval95S,
    sizes: record.known.map((_, c) => sized[numbers.indexOf(c)]?.sizes[i]),
    standardErrors: record.known.map((_, c) => sized[numbers.indexOf(c)]?.standardErrors[i]),
  }));
}
