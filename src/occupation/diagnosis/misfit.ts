import type {Enu, Matrix3} from '../../geodesy/types.ts';
import type {CovarianceM2} from '../covariance.ts';
import type {DiagnosisInput} from './input.ts';

/** Axes of east, north, up as 0, 1, 2. */
export type Axes = readonly number[];

/** The axes that were compared and whose uncertainty is known. */
export function testedAxes({offsetM, covarianceM2}: DiagnosisInput): Axes {
  const values = [offsetM.east, offsetM.north, offsetM.up];
  return [0, 1, 2].filter((axis) => {
    const variance = covarianceM2[axis]?.[axis];
    return values[axis] !== null && variance !== undefined && variance > 0;
  });
}

export function components({eastM, northM, upM}: Enu): readonly [number, number, number] {
  return [eastM, northM, upM];
}

export function difference(a: Enu, b: Enu): Enu {
  return {eastM: a.eastM - b.eastM, northM: a.northM - b.northM, upM: a.upM - b.upM};
}

export function sum(a: Enu, b: Enu): Enu {
  return {eastM: a.eastM + b.eastM, northM: a.northM + b.northM, upM: a.upM + b.upM};
}

export function lengthM(vector: Enu, axes: Axes): number {
  const values = components(vector);
  return Math.hypot(...axes.map((axis) => values[axis]!));
}

/** Sum of covariances over the axes wanted, as a small square matrix. */
export function covarianceOver(
  axes: Axes,
  matrices: readonly (CovarianceM2 | Matrix3)[],
): number[][] {
  return axes.map((i) =>
    axes.map((j) => matrices.reduce((total, matrix) => total + (matrix[i]?.[j] ?? 0), 0)),
  );
}

/**
 * The misfit T = rᵀ C⁻¹ r of a residual, chi-square with as many degrees of freedom as there are
 * axes when nothing but noise is left.
 *
 * @returns infinity for a covariance that is not positive definite
 */
export function misfit(
  residual: Enu,
  axes: Axes,
  matrices: readonly (CovarianceM2 | Matrix3)[],
): number {
  return misfitUnder(axes, matrices)(residual);
}

/** `misfit` for many residuals under one covariance. */
export function misfitUnder(
  axes: Axes,
  matrices: readonly (CovarianceM2 | Matrix3)[],
): (residual: Enu) => number {
  const lower = choleskyFactor(covarianceOver(axes, matrices));
  if (lower === undefined) return () => Number.POSITIVE_INFINITY;
  return (residual) => {
    const values = components(residual);
    const solved: number[] = [];
    let total = 0;
    for (let i = 0; i < axes.length; i++) {
      let rest = values[axes[i]!]!;
      for (let j = 0; j < i; j++) rest -= lower[i]![j]! * solved[j]!;
      const scaled = rest / lower[i]![i]!;
      solved.push(scaled);
      total += scaled * scaled;
    }
    return total;
  };
}

/** L with C = L Lᵀ; undefined when C is not positive definite. */
export function choleskyFactor(c: readonly (readonly number[])[]): number[][] | undefined {
  const lower = c.map((row) => row.map(() => 0));
  for (let i = 0; i < c.length; i++) {
    for (let j = 0; j <= i; j++) {
      let rest = c[i]![j]!;
      for (let k = 0; k < j; k++) rest -= lower[i]![k]! * lower[j]![k]!;
      if (i !== j) lower[i]![j] = rest / lower[j]![j]!;
      else if (rest > 0) lower[i]![i] = Math.sqrt(rest);
      else return undefined;
    }
  }
  return lower;
}
