import {fixed, shownUncertaintyM} from '../../wording/numbers.ts';
import {type LengthUnit, offsetDecimals, type UnitChoice, unitFor} from '../units.ts';

/** Beside values this fine, a column stays in millimetres up to lengths that need metres alone. */
const FINE_M = 0.02;
const LARGEST_BESIDE_FINE_M = 10;

/** A column of lengths in one unit with the same decimals, written as plain numbers. */
export interface LengthColumn {
  readonly unit: LengthUnit;
  /** null becomes the empty string: an empty cell, never a zero. */
  cell(valueM: number | null | undefined): string;
  /** The same for an uncertainty, which is never written as none. */
  uncertainty(valueM: number | null | undefined): string;
}

export function lengthColumn(
  valuesM: readonly (number | null | undefined)[],
  units: UnitChoice,
): LengthColumn {
  let largestM = 0;
  let finestM = Number.POSITIVE_INFINITY;
  for (const valueM of valuesM) {
    const sizeM = Math.abs(valueM ?? 0);
    largestM = Math.max(largestM, sizeM);
    if (sizeM > 0) finestM = Math.min(finestM, sizeM);
  }
  const mixed = finestM < FINE_M && largestM < LARGEST_BESIDE_FINE_M;
  const unit = unitFor(mixed ? finestM : largestM, units);
  const decimals = offsetDecimals(mixed ? finestM : largestM, unit);
  const cell = (valueM: number | null | undefined) =>
    valueM === null || valueM === undefined ? '' : fixed(valueM * unit.perM, decimals);
  return {
    unit,
    cell,
    uncertainty: (valueM) => cell(typeof valueM === 'number' ? shownUncertaintyM(valueM) : valueM),
  };
}

/** A cell of a table: numbers stand right and can be pasted as such. */
export interface Cell {
  readonly text: string;
  readonly numeric: boolean;
  /** The head of its column, where a phone shows the table as a list. */
  readonly label: string;
}

export function numberCell(text: string): Cell {
  return {text, numeric: text !== '', label: ''};
}

export function textCell(text: string): Cell {
  return {text, numeric: false, label: ''};
}
