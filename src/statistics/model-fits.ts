import {type NoiseModel, noiseModels, type Swing} from './noise-models.ts';
import {type Factor, factorOf, whiten} from './semiseparable.ts';
import {searchedSwings, swingModels} from './swing-models.ts';
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
  return fitEach(noiseModels(cells.widthS, cells.spanS), cells);
}

/** How much more likely than all others a swing must be, as a logarithm, to be looked into. */
const SWING_EVIDENCE = 3;

/**
 * The fits of the grid and, where a component swings, those of models with that swing.
 * A record that does not swing gets back what was given.
 */
export function withSwings(fits: readonly ModelFit[], cells: TimeCells): readonly ModelFit[] {
  const searched = fitEach(searchedSwings(cells.widthS, cells.spanS), cells);
  const found = new Map<string, Swing>();
  for (let c = 0; c < cells.means.length; c++) {
    const swinging = likeliest(searched, c);
    const otherwise = likeliest(fits, c);
    if (swinging?.model.swing === undefined || otherwise === undefined) continue;
    const evidence = swinging.components[c]!.logLikelihood - otherwise.components[c]!.logLikelihood;
    const {swing} = swinging.model;
    if (evidence > SWING_EVIDENCE) found.set(`${swing.periodS} ${swing.dampingS}`, swing);
  }
  const models = [...found.values()].flatMap((swing) =>
    swingModels(cells.widthS, cells.spanS, swing),
  );
  return models.length === 0 ? fits : [...fits, ...fitEach(models, cells)];
}

function likeliest(fits: readonly ModelFit[], component: number): ModelFit | undefined {
  let best = fits[0];
  for (const fit of fits) {
    const [one, other] = [fit.components[component]!, best!.components[component]!];
    if (one.logLikelihood > other.logLikelihood) best = fit;
  }
  return best;
}

function fitEach(models: readonly NoiseModel[], cells: TimeCells): ModelFit[] {
  const unit = new Float64Array(cells.index.length).fill(1);
  return models.map((model) => {
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
 * Which components lend each other evidence about the shape of the noise: none, east and north, or
 * all. East and north see the same sky; height is often slower, so it borrows nothing for a mean.
 */
export type Pooling = 'none' | 'plan' | 'all';

/**
 * Posterior weights of the models, one list per component, each summing to one.
 *
 * Components that are pooled lend each other half of their evidence, unless their shapes disagree.
 *
 * @param logLikelihoods  per model, per component; east and north first
 */
export function modelWeights(
  logPriors: readonly number[],
  logLikelihoods: readonly (readonly number[])[],
  pooling: Pooling,
): Float64Array[] {
  const components = logLikelihoods[0]?.length ?? 0;
  const group = pooledGroup(components, pooling);
  const lending = group.length > 1 && sharesShape(logLikelihoods, group);
  return Array.from({length: components}, (_, c) => {
    const lenders = lending && group.includes(c) ? group.filter((other) => other !== c) : [];
    const logs = logLikelihoods.map((row, m) => {
      const lent = lenders.reduce((sum, other) => sum + 0.5 * row[other]!, 0);
      return logPriors[m]! + row[c]! + lent;
    });
    const largest = logs.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY);
    const weights = Float64Array.from(logs, (log) => Math.exp(log - largest));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    return weights.map((weight) => weight / total);
  });
}

function pooledGroup(components: number, pooling: Pooling): number[] {
  if (pooling === 'none') return [];
  const all = Array.from({length: components}, (_, c) => c);
  return pooling === 'plan' ? all.slice(0, 2) : all;
}

/** Twice the log-likelihood that the best common model may cost one component. */
const SHAPE_LIMIT = 6;

function sharesShape(
  logLikelihoods: readonly (readonly number[])[],
  group: readonly number[],
): boolean {
  const best = group.map((c) =>
    logLikelihoods.reduce((most, row) => Math.max(most, row[c]!), Number.NEGATIVE_INFINITY),
  );
  const joint = (row: readonly number[]) => group.reduce((sum, c) => sum + row[c]!, 0);
  const common = logLikelihoods.reduce((one, other) => (joint(other) > joint(one) ? other : one));
  return group.every((c, i) => 2 * (best[i]! - common[c]!) <= SHAPE_LIMIT);
}
