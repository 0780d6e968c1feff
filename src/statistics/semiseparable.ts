import type {NoiseModel, Term} from './noise-models.ts';
import {termsOf} from './noise-models.ts';
import type {TimeCells} from './time-cells.ts';

/**
 * The Cholesky factor of a covariance that is a diagonal plus a few exponentials, damped oscillations
 * among them, V = L D Lᵀ, for cells at any spacing.
 *
 * Method: semiseparable factorisation, O(m J²) for m cells and J exponentials, an oscillation counting
 * as two; exact, gaps and unequal counts included.
 * Source: Foreman-Mackey, Agol, Ambikasaran & Angus (2017), AJ 154, 220, section 3,
 * doi:10.3847/1538-3881/aa9332.
 */
export interface Factor {
  readonly logDeterminant: number;
  /** m values 1/√d. */
  readonly inverseRoot: Float64Array;
  /** J, the exponentials. */
  readonly rank: number;
  /** m × J gains and decays from the cell before. */
  readonly gain: Float64Array;
  readonly decay: Float64Array;
  /** J weights for each cell, or for all: cell n has those from n × `weightStride` on. */
  readonly weights: Float64Array;
  readonly weightStride: number;
}

export function factorOf(model: NoiseModel, cells: TimeCells): Factor {
  const terms = termsOf(model, cells.widthS);
  return factorOfTerms(terms, diagonal(model, terms, cells), cells.index);
}

/** White noise falls with the number of epochs in a cell, relative to the median cell. */
function diagonal(model: NoiseModel, terms: readonly Term[], {counts}: TimeCells): Float64Array {
  const sorted = counts.slice().sort();
  const median = sorted[sorted.length >> 1]!;
  const correlated = terms.reduce((sum, {atZero}) => sum + atZero, 0);
  return counts.map((count) => (model.whiteShare * median) / count + correlated);
}

function factorOfTerms(
  terms: readonly Term[],
  diagonalOf: Float64Array,
  index: Int32Array,
): Factor {
  const m = index.length;
  const columns = columnsOf(terms);
  const j = columns.length;
  // Where nothing turns all cells have the same weights: most models, and a third of their time.
  const stride = terms.some(({turn}) => turn !== 0) ? j : 0;
  const weights = new Float64Array(stride === 0 ? j : m * j);
  const phases = new Float64Array(weights.length);
  columns.forEach(({weight, phase}, a) => {
    for (let n = 0; n * j < weights.length; n++) {
      weights[n * j + a] = weight(index[n]!);
      phases[n * j + a] = phase(index[n]!);
    }
  });
  const inverseRoot = new Float64Array(m);
  const gain = new Float64Array(m * j);
  const decay = new Float64Array(m * j);
  const s = new Float64Array(j * j);
  const us = new Float64Array(j);
  let logDeterminant = 0;
  for (let n = 0; n < m; n++) {
    if (n > 0) {
      const steps = index[n]! - index[n - 1]!;
      const pivot = 1 / (inverseRoot[n - 1]! * inverseRoot[n - 1]!);
      for (let a = 0; a < j; a++) decay[n * j + a] = columns[a]!.decay ** steps;
      for (let a = 0; a < j; a++) {
        const ga = gain[(n - 1) * j + a]! * pivot;
        const da = decay[n * j + a]!;
        for (let b = 0; b <= a; b++) {
          const value = da * decay[n * j + b]! * (s[a * j + b]! + ga * gain[(n - 1) * j + b]!);
          s[a * j + b] = value;
          s[b * j + a] = value;
        }
      }
    }
    let d = diagonalOf[n]!;
    for (let a = 0; a < j; a++) {
      let dot = 0;
      for (let b = 0; b < j; b++) dot += s[a * j + b]! * weights[n * stride + b]!;
      us[a] = dot;
      d -= dot * weights[n * stride + a]!;
    }
    logDeterminant += Math.log(d);
    inverseRoot[n] = 1 / Math.sqrt(d);
    for (let a = 0; a < j; a++) gain[n * j + a] = (phases[n * stride + a]! - us[a]!) / d;
  }
  return {logDeterminant, inverseRoot, rank: j, gain, decay, weights, weightStride: stride};
}

/** A product of functions of the two cells that, with a decay, makes a part of the covariance. */
interface Column {
  readonly decay: number;
  /** Of the later and of the earlier cell. */
  readonly weight: (cell: number) => number;
  readonly phase: (cell: number) => number;
}

/** cos b(n − m) and sin b(n − m) as products of functions of n and m. */
function columnsOf(terms: readonly Term[]): Column[] {
  return terms.flatMap(({beyond, sine, turn, decay}): Column[] => {
    if (turn === 0) return [{decay, weight: () => beyond, phase: () => 1}];
    const [cos, sin] = [(n: number) => Math.cos(turn * n), (n: number) => Math.sin(turn * n)];
    return [
      {decay, weight: (n) => beyond * cos(n) + sine * sin(n), phase: cos},
      {decay, weight: (n) => beyond * sin(n) - sine * cos(n), phase: sin},
    ];
  });
}

/**
 * L⁻¹ applied to a column and scaled to unit variance: what is left white if the model is right.
 */
export function whiten(factor: Factor, values: Float64Array): Float64Array {
  const {inverseRoot, rank: j, gain, decay, weights, weightStride} = factor;
  const m = values.length;
  const out = new Float64Array(m);
  const f = new Float64Array(j);
  let previous = 0;
  for (let n = 0; n < m; n++) {
    let z = values[n]!;
    if (n > 0) {
      for (let a = 0; a < j; a++) {
        const fa = decay[n * j + a]! * (f[a]! + gain[(n - 1) * j + a]! * previous);
        f[a] = fa;
        z -= weights[n * weightStride + a]! * fa;
      }
    }
    previous = z;
    out[n] = z * inverseRoot[n]!;
  }
  return out;
}
