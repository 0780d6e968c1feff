import {studentQuantile} from './distribution.ts';
import type {ModelFit} from './model-fits.ts';
import {flickerTimes, type NoiseModel, type Swing} from './noise-models.ts';
import type {TimeCells} from './time-cells.ts';

/** How long a record would have to be for a wished half-width of 95 %. */
export interface RequiredTime {
  readonly aboutS: number;
  /** Long enough in four of five cases. */
  readonly allowS: number;
}

/** Searched from this part of the record to this multiple of it. */
const SEARCH = {least: 1e-4, most: 1e4} as const;

/**
 * The time after which one component would be known to `target`, as each noise model has it,
 * averaged over the models: the weighted median and the 80 % quantile.
 *
 * @param weights  posterior weights of the models for this component
 */
export function requiredTime(
  cells: TimeCells,
  fits: readonly ModelFit[],
  component: number,
  weights: Float64Array,
  target: number,
): RequiredTime {
  const factor = studentQuantile(0.975, cells.index.length - 1);
  const times = fits.map(({model, components}, m) => ({
    weight: weights[m]!,
    timeS: timeFor(model, cells, target / (factor * components[component]!.standardError)),
  }));
  const ordered = times.filter(({weight}) => weight > 1e-9).sort((a, b) => a.timeS - b.timeS);
  return {aboutS: weightedQuantile(ordered, 0.5), allowS: weightedQuantile(ordered, 0.8)};
}

/**
 * The deviation of the mean after a time as a part of what it is after the record's own span,
 * averaged over the models: how the mean of a growing record settles.
 *
 * @param weights  posterior weights of the models for this component
 */
export function deviationPart(
  cells: TimeCells,
  fits: readonly ModelFit[],
  component: number,
  weights: Float64Array,
  timeS: number,
): number {
  let then = 0;
  let now = 0;
  fits.forEach(({model, components}, m) => {
    if (weights[m]! < 1e-6) return;
    const variance = weights[m]! * components[component]!.standardError ** 2;
    now += variance;
    then +=
      (variance * varianceOfMean(model, cells.widthS, timeS)) /
      varianceOfMean(model, cells.widthS, cells.spanS);
  });
  return Math.sqrt(then / now);
}

/** Time at which the deviation of the mean is `part` of what it is after the record's own span. */
function timeFor(model: NoiseModel, cells: TimeCells, part: number): number {
  const now = varianceOfMean(model, cells.widthS, cells.spanS);
  const wanted = part * part * now;
  let low = Math.log(SEARCH.least * cells.spanS);
  let high = Math.log(SEARCH.most * cells.spanS);
  for (let step = 0; step < 50; step++) {
    const middle = (low + high) / 2;
    if (varianceOfMean(model, cells.widthS, Math.exp(middle)) > wanted) low = middle;
    else high = middle;
  }
  return Math.exp((low + high) / 2);
}

/** Variance of the mean over a time, up to the scale of the model. */
function varianceOfMean(
  {whiteShare, flickerShare, correlationTimeS, swing}: NoiseModel,
  widthS: number,
  timeS: number,
): number {
  const swinging = (1 - whiteShare) * (swing?.share ?? 0);
  let variance = (whiteShare * widthS) / timeS;
  if (swing !== undefined) variance += swinging * swingMean(swing, timeS);
  const correlated = 1 - whiteShare - swinging;
  if (correlationTimeS !== undefined) {
    variance += correlated * (1 - flickerShare) * gaussMarkovMean(correlationTimeS, timeS);
  }
  if (correlated > 0 && flickerShare > 0) {
    const times = flickerTimes(widthS);
    const mean = times.reduce((sum, time) => sum + gaussMarkovMean(time, timeS), 0) / times.length;
    variance += correlated * flickerShare * mean;
  }
  return variance;
}

/**
 * Variance of the mean over T of a unit Gauss–Markov process of correlation time τ:
 * (2τ/T) [1 − (τ/T)(1 − e^(−T/τ))].
 */
export function gaussMarkovMean(correlationTimeS: number, timeS: number): number {
  const ratio = timeS / correlationTimeS;
  // The closed form loses its digits for short times; the series is 1 − r/3 + r²/12.
  if (ratio < 1e-4) return 1 - ratio / 3;
  return (2 / ratio) * (1 + Math.expm1(-ratio) / ratio);
}

/** The same of a damped oscillation: the real part for the complex rate r = T (1/damping + iω). */
export function swingMean({periodS, dampingS}: Swing, timeS: number): number {
  const [a, b] = [timeS / dampingS, (2 * Math.PI * timeS) / periodS];
  const size = a * a + b * b;
  if (size < 1e-8) return 1 - a / 3;
  // 2 (r + e^(−r) − 1) / r²
  const decay = Math.exp(-a);
  const [re, im] = [a + decay * Math.cos(b) - 1, b - decay * Math.sin(b)];
  return (2 * (re * (a * a - b * b) + im * 2 * a * b)) / (size * size);
}

function weightedQuantile(
  ordered: readonly {weight: number; timeS: number}[],
  part: number,
): number {
  const total = ordered.reduce((sum, {weight}) => sum + weight, 0);
  let reached = 0;
  for (const {weight, timeS} of ordered) {
    reached += weight;
    if (reached >= part * total) return timeS;
  }
  return Number.POSITIVE_INFINITY;
}
