import type {Factor} from './semiseparable.ts';

/** Products of whitened steps, by the cell before which the step stands; m values each. */
export interface StepProducts {
  /** The whitened step with itself. */
  readonly squares: Float64Array;
  /** The whitened step with each of the columns. */
  readonly projections: readonly Float64Array[];
}

/**
 * The products of a unit step before every cell, whitened, with itself and with whitened columns,
 * in O(m J²) for all m steps together.
 *
 * Method: whitening carries J states f through the cells, f' = D (f + g z) with z = 1 - u f after
 * the step (decays D, gains g, weights u). What is still to come of a product is therefore a quadratic (for the columns an affine)
 * function of the states, and follows from the one a cell later by substitution. A step begins with
 * the states at nought, so its product is the constant of that function.
 */
export function stepProducts(factor: Factor, columns: readonly Float64Array[]): StepProducts {
  return {
    squares: squaresOfSteps(factor),
    projections: columns.map((column) => projectionsOfSteps(factor, column)),
  };
}

/** What is to come is p + q f. */
function projectionsOfSteps(
  {inverseRoot, rank: j, gain, decay, weights, weightStride}: Factor,
  column: Float64Array,
): Float64Array {
  const m = column.length;
  const products = new Float64Array(m);
  const q = new Float64Array(j);
  let p = 0;
  for (let n = m - 1; n >= 0; n--) {
    let ofZ = inverseRoot[n]! * column[n]!;
    if (n < m - 1) {
      for (let a = 0; a < j; a++) {
        q[a]! *= decay[(n + 1) * j + a]!;
        ofZ += q[a]! * gain[n * j + a]!;
      }
    }
    for (let a = 0; a < j; a++) q[a]! -= ofZ * weights[n * weightStride + a]!;
    p += ofZ;
    products[n] = p;
  }
  return products;
}

/** What is to come is p + 2 q f + f C f. */
function squaresOfSteps({
  inverseRoot,
  rank: j,
  gain,
  decay,
  weights,
  weightStride,
}: Factor): Float64Array {
  const m = inverseRoot.length;
  const products = new Float64Array(m);
  const c = new Float64Array(j * j);
  const q = new Float64Array(j);
  const h = new Float64Array(j);
  let p = 0;
  for (let n = m - 1; n >= 0; n--) {
    let ofZ = 0;
    let ofZSquared = inverseRoot[n]! * inverseRoot[n]!;
    h.fill(0);
    if (n < m - 1) {
      const now = n * j;
      const next = now + j;
      for (let a = 0; a < j; a++) {
        const decayA = decay[next + a]!;
        q[a]! *= decayA;
        ofZ += q[a]! * gain[now + a]!;
        let sum = 0;
        for (let b = 0; b < j; b++) {
          c[a * j + b]! *= decayA * decay[next + b]!;
          sum += c[a * j + b]! * gain[now + b]!;
        }
        h[a] = sum;
        ofZSquared += sum * gain[now + a]!;
      }
    }
    for (let a = 0; a < j; a++) {
      const weightA = weights[n * weightStride + a]!;
      for (let b = 0; b < j; b++) {
        const weightB = weights[n * weightStride + b]!;
        c[a * j + b]! += ofZSquared * weightA * weightB - weightA * h[b]! - weightB * h[a]!;
      }
      q[a]! += h[a]! - (ofZ + ofZSquared) * weightA;
    }
    p += 2 * ofZ + ofZSquared;
    products[n] = p;
  }
  return products;
}
