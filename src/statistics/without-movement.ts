import {settlingRegressor} from './movement-sizes.ts';
import type {SettlingAnalysis, StepAnalysis} from './session-analysis.ts';
import type {Slope} from './slope.ts';
import type {TimeCells} from './time-cells.ts';

/*
 * Cells with a movement taken out: what the record would be had it not happened. `numbers` says
 * which component of the record each column of the cells is.
 */

export function withoutSettling(
  cells: TimeCells,
  numbers: readonly number[],
  {part, sizes}: SettlingAnalysis & {readonly part: number},
): TimeCells {
  const left = settlingRegressor(cells, part);
  const means = cells.means.map((column, at) => {
    const size = sizes[numbers[at]!] ?? 0;
    return column.map((value, k) => value - size * left[k]!);
  });
  return {...cells, means};
}

export function withoutLines(
  cells: TimeCells,
  numbers: readonly number[],
  drifts: ReadonlyMap<number, Slope>,
): TimeCells {
  const means = cells.means.map((column, at) => {
    const perCell = drifts.get(numbers[at]!)?.perCell ?? 0;
    return column.map((value, k) => value - perCell * cells.index[k]!);
  });
  return {...cells, means};
}

export function withoutSteps(
  cells: TimeCells,
  numbers: readonly number[],
  firstS: number,
  steps: readonly StepAnalysis[],
): TimeCells {
  const means = cells.means.map((column, at) =>
    column.map((value, k) => {
      let left = value;
      for (const {elapsedS, sizes} of steps) {
        const part = cells.index[k]! + 1 - (elapsedS - firstS) / cells.widthS;
        left -= (sizes[numbers[at]!] ?? 0) * Math.min(1, Math.max(0, part));
      }
      return left;
    }),
  );
  return {...cells, means};
}
