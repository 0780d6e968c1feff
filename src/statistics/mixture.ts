import {studentCdf} from './distribution.ts';

/** Estimates of one quantity by several models, with the weight of each. */
export interface Mixture {
  readonly weights: Float64Array;
  readonly centres: Float64Array;
  readonly scales: Float64Array;
  readonly degreesOfFreedom: number;
}

/** Weights below this change no printed digit. */
const NEGLIGIBLE = 1e-7;

export function mixtureOf(
  weights: Float64Array,
  centres: Float64Array,
  scales: Float64Array,
  degreesOfFreedom: number,
): Mixture {
  const kept = Int32Array.from(weights.keys()).filter((i) => weights[i]! > NEGLIGIBLE);
  const total = kept.reduce((sum, i) => sum + weights[i]!, 0);
  return {
    weights: Float64Array.from(kept, (i) => weights[i]! / total),
    centres: Float64Array.from(kept, (i) => centres[i]!),
    scales: Float64Array.from(kept, (i) => scales[i]!),
    degreesOfFreedom,
  };
}

/** P(X ≤ x) of the mixture of Student distributions. */
export function mixtureCdf(
  {weights, centres, scales, degreesOfFreedom}: Mixture,
  x: number,
): number {
  let probability = 0;
  for (let i = 0; i < weights.length; i++) {
    probability += weights[i]! * studentCdf((x - centres[i]!) / scales[i]!, degreesOfFreedom);
  }
  return probability;
}

/** Half-width of the interval about `centre` that holds the quantity with the probability. */
export function mixtureHalfWidth(mixture: Mixture, centre: number, probability: number): number {
  const {centres, scales} = mixture;
  let high = 0;
  for (let i = 0; i < centres.length; i++) {
    high = Math.max(high, Math.abs(centres[i]! - centre) + 2 * scales[i]!);
  }
  const inside = (h: number) => mixtureCdf(mixture, centre + h) - mixtureCdf(mixture, centre - h);
  while (inside(high) < probability) high *= 2;
  let low = 0;
  for (let step = 0; step < 40 && high - low > 1e-6 * high; step++) {
    const middle = (low + high) / 2;
    if (inside(middle) < probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
