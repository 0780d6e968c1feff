import {fixed} from '../../wording/numbers.ts';
import {type LengthUnit, offsetDecimals, type UnitChoice, unitFor} from '../units.ts';

/** A column of lengths in one unit with the same decimals, written as plain numbers. */
export interface LengthColumn {
  readonly unit: LengthUnit;
  /** null becomes the empty string: an empty cell, never a zero. */
  cell(valueM: number | null | undefined): string;
}

export function lengthColumn(
  valuesM: readonly (number | null | undefined)[],
  units: UnitChoice,
): LengthColumn {
  let largestM = 0;
  for (const valueM of valuesM) largestM = Math.max(largestM, Math.abs(valueM ?? 0));
  const unit = unitFor(largestM, units);
  const decimals = offsetDecimals(largestM, unit);
  return {
    unit,
    cell: (valueM) =>
      valueM === null || valueM === undefined ? '' : fixed(valueM * unit.perM, decimals),
  };
}

/** A cell of a table: numbers stand right and can be pasted as such. */
export interface Cell {
  readonly text: string;
  readonly numeric: boolean;
}

export function numberCell(text: string): Cell {
  return {text, numeric: text !== ''};
}

export function textCell(text: string): Cell {
  return {text, numeric: false};
}
