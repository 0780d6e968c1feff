import {moments} from './moments.ts';

/** Spread within a quantum below which averaging cannot look between the digits. */
const DITHER = 0.3;

/** Mean and spread of one component, and whether its digits are fine enough for them. */
export interface Spread {
  readonly mean: number;
  readonly deviation: number;
  /** All values equal: nothing can be fitted. */
  readonly constant: boolean;
  readonly resolution: number;
  /** Whether the noise spreads over enough digits to look between them, and to be tested. */
  readonly dithered: boolean;
}

const FEW_VALUES = 3;

export function spreadOf(column: Float64Array, resolution: number): Spread {
  const {mean, standardDeviation} = moments(column)!;
  const deviation = standardDeviation ?? 0;
  const variance = Math.max(0, deviation ** 2 - resolution ** 2 / 12);
  return {
    mean,
    deviation,
    constant: deviation === 0,
    resolution,
    dithered:
      !hasFewValues(column) && (resolution === 0 || Math.sqrt(variance) / resolution >= DITHER),
  };
}

function hasFewValues(column: Float64Array): boolean {
  const seen = new Set<number>();
  for (const value of column) {
    seen.add(value);
    if (seen.size > FEW_VALUES) return false;
  }
  return true;
}

/** 0.5 q exp(−2π² r²): the largest bias that rounding leaves in a mean of dithered values. */
export function quantisation95({deviation, resolution}: Spread): number {
  if (resolution === 0) return 0;
  const ratioSquared = Math.max(0, deviation ** 2 - resolution ** 2 / 12) / resolution ** 2;
  return 0.5 * resolution * Math.exp(-2 * Math.PI ** 2 * ratioSquared);
}
