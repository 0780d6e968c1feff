import {type NoiseModel, noiseModels} from './noise-models.ts';
import {type Factor, factorOf, whiten} from './semiseparable.ts';
import type {TimeCells} from './time-cells.ts';

/** One component fitted by one model with a constant: generalised least squares. */
export interface ConstantFit {
  readonly mean: number;
  readonly standardError: number;
  /** Whitened squares about the constant. */
  readonly squares: number;
  readonly logLikelihood: number;
  /** Whitened residuals, m values. */
  readonly residuals: Float64Array;
}

/** One model with its factor and the fits of all components. */
export interface ModelFit {
  readonly model: NoiseModel;
  readonly factor: Factor;
  /** Whitened ones and their squares. */
  readonly ones: Float64Array;
  readonly onesSquared: number;
  readonly components: readonly ConstantFit[];
}

/** Every model of the grid fitted to the cells. A component that does not vary must not be given. */
export function fitModels(cells: TimeCells): ModelFit[] {
  const unit = new Float64Array(cells.index.length).fill(1);
  return noiseModels(cells.widthS, cells.spanS).map((model) => {
    const factor = factorOf(model, cells);
    const ones = whiten(factor, unit);
    const onesSquared = dot(ones, ones);
    const components = cells.means.map((means) => constantFit(factor, ones, onesSquared, means));
    return {model, factor, ones, onesSquared, components};
  });
}

function constantFit(
  factor: Factor,
  ones: Float64Array,
  onesSquared: number,
  means: Float64Array,
): ConstantFit {
  const m = means.length;
  // About the first cell, so that the squares of a large offset cost no digits.
  const origin = means[0]!;
  const whitened = whiten(
    factor,
    means.map((value) => value - origin),
  );
  const offset = dot(ones, whitened) / onesSquared;
  const residuals = whitened.map((value, k) => value - offset * ones[k]!);
  const squares = dot(residuals, residuals);
  return {
    mean: origin + offset,
    standardError: Math.sqrt(squares / ((m - 1) * onesSquared)),
    squares,
    logLikelihood:
      -0.5 * factor.logDeterminant -
      0.5 * Math.log(onesSquared) -
      0.5 * (m - 1) * Math.log(squares),
    residuals,
  };
}

export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

/**
 * Posterior weights of the models, one list per component, each summing to one.
 *
 * East and north see the same sky: each lends the other half of its
 * evidence, unless their shapes disagree. Height stands alone: it is often slower.
 *
 * @param logLikelihoods  per model, per component
 * @param pooled          whether the first two components are east and north
 */
export function modelWeights(
  logPriors: readonly number[],
  logLikelihoods: readonly (readonly number[])[],
  pooled: boolean,
): Float64Array[] {
  const components = logLikelihoods[0]?.length ?? 0;
  const lending = pooled && sharesShape(logLikelihoods);
  return Array.from({length: components}, (_, c) => {
    const other = lending && c < 2 ? 1 - c : undefined;
    const logs = logLikelihoods.map((row, m) => {
      const lent = other === undefined ? 0 : 0.5 * row[other]!;
      return logPriors[m]! + row[c]! + lent;
    });
    const largest = logs.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY);
    const weights = Float64Array.from(logs, (log) => Math.exp(log - largest));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    return weights.map((weight) => weight / total);
  });
}

/** Twice the log-likelihood that the best common model may cost one component. */
const SHAPE_LIMIT = 6;

function sharesShape(logLikelihoods: readonly (readonly number[])[]): boolean {
  const best = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  let jointBest = Number.NEGATIVE_INFINITY;
  let atJoint: readonly number[] = [0, 0];
  for (const row of logLikelihoods) {
    best[0] = Math.max(best[0]!, row[0]!);
    best[1] = Math.max(best[1]!, row[1]!);
    if (row[0]! + row[1]! > jointBest) {
      jointBest = row[0]! + row[1]!;
      atJoint = row;
    }
  }
  return 2 * Math.max(best[0]! - atJoint[0]!, best[1]! - atJoint[1]!) <= SHAPE_LIMIT;
}
