import {dot, type ModelFit, modelWeights, type Pooling} from './model-fits.ts';
import {whiten} from './semiseparable.ts';
import type {TimeCells} from './time-cells.ts';

/** Sizes of movements of one component, in the order of their regressors. */
export interface MovementSizes {
  readonly sizes: Float64Array;
  readonly standardErrors: Float64Array;
}

/**
 * The sizes of movements of known shape, all at once, averaged over the noise models.
 *
 * Method: generalised least squares with a constant and the regressors.
 *
 * @param regressors  m values each, one per cell
 */
export function movementSizes(
  cells: TimeCells,
  fits: readonly ModelFit[],
  regressors: readonly Float64Array[],
  pooling: Pooling,
): MovementSizes[] {
  const m = cells.index.length;
  const k = regressors.length;
  const rows = fits.map((fit) => regression(fit, regressors, m));
  const weights = modelWeights(
    fits.map(({model}) => model.logPrior),
    rows.map((row) => row.map(({logLikelihood}) => logLikelihood)),
    pooling,
  );
  return weights.map((componentWeights, c) => {
    const sizes = new Float64Array(k);
    const variances = new Float64Array(k);
    for (let i = 0; i < k; i++) {
      for (let r = 0; r < rows.length; r++) {
        sizes[i]! += componentWeights[r]! * rows[r]![c]!.sizes[i]!;
      }
      for (let r = 0; r < rows.length; r++) {
        const {sizes: own, variances: ownVariances} = rows[r]![c]!;
        variances[i]! += componentWeights[r]! * (ownVariances[i]! + (own[i]! - sizes[i]!) ** 2);
      }
    }
    return {sizes, standardErrors: variances.map(Math.sqrt)};
  });
}

/**
 * A step as a regressor: zero before it, one after it; the cell that it falls into takes the part
 * of it that comes after.
 *
 * @param atCell  the step on the scale of the cell numbers, fractions kept
 */
export function stepRegressor({index}: TimeCells, atCell: number): Float64Array {
  return Float64Array.from(index, (cell) => Math.min(1, Math.max(0, cell + 1 - atCell)));
}

/**
 * Settling as a regressor: how much of it is still to come, e^(−t/κ), from one at the start.
 *
 * @param part  time constant as a part of the record
 */
export function settlingRegressor({index, expected}: TimeCells, part: number): Float64Array {
  return Float64Array.from(index, (cell) => Math.exp(-cell / (expected * part)));
}

interface Regression {
  readonly sizes: Float64Array;
  readonly variances: Float64Array;
  readonly logLikelihood: number;
}

function regression(fit: ModelFit, regressors: readonly Float64Array[], m: number): Regression[] {
  const k = regressors.length;
  const columns = regressors.map((regressor) => {
    const whitened = whiten(fit.factor, regressor);
    const shift = dot(fit.ones, whitened) / fit.onesSquared;
    return whitened.map((value, i) => value - shift * fit.ones[i]!);
  });
  const normal = choleskyOf(columns);
  return fit.components.map(({residuals, squares}) => {
    const right = Float64Array.from(columns, (column) => dot(column, residuals));
    const sizes = solved(normal.lower, right, k);
    const left = Math.max(squares - dot(sizes, right), squares * 1e-14);
    const scale = left / Math.max(1, m - 1 - k);
    return {
      sizes,
      variances: inverseDiagonal(normal.lower, k).map((value) => value * scale),
      logLikelihood:
        -0.5 * fit.factor.logDeterminant -
        0.5 * Math.log(fit.onesSquared) -
        0.5 * normal.logDeterminant -
        0.5 * (m - 1 - k) * Math.log(left),
    };
  });
}

/** Cholesky factor, row by row, of the matrix of inner products. */
function choleskyOf(columns: readonly Float64Array[]): {
  lower: Float64Array;
  logDeterminant: number;
} {
  const k = columns.length;
  const lower = new Float64Array(k * k);
  let logDeterminant = 0;
  for (let i = 0; i < k; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = dot(columns[i]!, columns[j]!);
      // Two steps in one cell are one regressor twice: a trace of ridge keeps them apart.
      if (i === j) sum *= 1 + 1e-9;
      for (let l = 0; l < j; l++) sum -= lower[i * k + l]! * lower[j * k + l]!;
      if (i === j) {
        const pivot = Math.max(sum, 1e-12);
        lower[i * k + i] = Math.sqrt(pivot);
        logDeterminant += Math.log(pivot);
      } else {
        lower[i * k + j] = sum / lower[j * k + j]!;
      }
    }
  }
  return {lower, logDeterminant};
}

function solved(lower: Float64Array, right: Float64Array, k: number): Float64Array {
  const x = right.slice();
  for (let i = 0; i < k; i++) {
    for (let j = 0; j < i; j++) x[i]! -= lower[i * k + j]! * x[j]!;
    x[i]! /= lower[i * k + i]!;
  }
  for (let i = k - 1; i >= 0; i--) {
    for (let j = i + 1; j < k; j++) x[i]! -= lower[j * k + i]! * x[j]!;
    x[i]! /= lower[i * k + i]!;
  }
  return x;
}

function inverseDiagonal(lower: Float64Array, k: number): Float64Array {
  const diagonal = new Float64Array(k);
  for (let i = 0; i < k; i++) {
    const unit = new Float64Array(k);
    unit[i] = 1;
    diagonal[i] = solved(lower, unit, k)[i]!;
  }
  return diagonal;
}
