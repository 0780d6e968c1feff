import type {Testable} from './analysable.ts';
import {movementSizes, settlingRegressor} from './movement-sizes.ts';
import type {SettlingAnalysis} from './session-analysis.ts';

/** Sizes of the exponential whose time constant is this part of the record. */
export function settlingOf(
  {cells, fits, numbers, record, pooling}: Testable,
  part: number,
): SettlingAnalysis & {readonly part: number} {
  const sized = movementSizes(cells, fits, [settlingRegressor(cells, part)], pooling);
  return {
    part,
    timeConstantS: part * cells.spanS,
    sizes: record.known.map((_, c) => sized[numbers.indexOf(c)]?.sizes[0]),
  };
}
