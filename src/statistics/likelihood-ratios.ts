import {dot, type ModelFit} from './model-fits.ts';
import {settlingRegressor} from './movement-sizes.ts';
import {type Factor, whiten} from './semiseparable.ts';
import type {TimeCells} from './time-cells.ts';

/** Cells at both ends in which no step is sought. */
const TRIMMED_CELLS = 3;
/** Time constants of settling, as parts of the record. */
const SETTLING_PARTS = [0.03, 0.06, 0.12, 0.25] as const;

export interface StepScore {
  /** Twice the log ratio of averaged likelihoods, summed over components. */
  readonly score: number;
  /** Position among the kept cells: the first cell after the step. */
  readonly cell: number;
}

/**
 * Twice the log ratio of the model-averaged likelihoods with and without one more regressor,
 * summed over components.
 */
class RatioSum {
  private readonly base: Float64Array;
  private readonly logPriors: Float64Array;
  private readonly fits: readonly ModelFit[];
  private readonly halfFreedom: number;

  constructor(fits: readonly ModelFit[], cells: number) {
    this.fits = fits;
    this.halfFreedom = (cells - 1) / 2;
    this.logPriors = Float64Array.from(
      fits,
      ({model, factor, onesSquared}) =>
        model.logPrior - 0.5 * factor.logDeterminant - 0.5 * Math.log(onesSquared),
    );
    const components = fits[0]?.components.length ?? 0;
    this.base = Float64Array.from({length: components}, (_, c) =>
      this.logAverage((m) => this.fits[m]!.components[c]!.squares),
    );
  }

  /** @param explained  per model and component, the squares that the regressor takes away */
  score(explained: readonly Float64Array[]): number {
    let sum = 0;
    for (let c = 0; c < this.base.length; c++) {
      const better = this.logAverage((m) => {
        const {squares} = this.fits[m]!.components[c]!;
        return Math.max(squares - explained[m]![c]!, squares * 1e-12);
      });
      sum += 2 * (better - this.base[c]!);
    }
    return sum;
  }

  private logAverage(squares: (model: number) => number): number {
    const count = this.fits.length;
    const logs = new Float64Array(count);
    let largest = Number.NEGATIVE_INFINITY;
    for (let m = 0; m < count; m++) {
      logs[m] = this.logPriors[m]! - this.halfFreedom * Math.log(squares(m));
      if (logs[m]! > largest) largest = logs[m]!;
    }
    let sum = 0;
    for (let m = 0; m < count; m++) sum += Math.exp(logs[m]! - largest);
    return largest + Math.log(sum);
  }
}

export interface SettlingScore {
  readonly score: number;
  /** Time constant as a part of the record. */
  readonly part: number;
}

/** The scores of a step at the best place, of a line, and of settling. */
export interface RatioScores {
  readonly step: StepScore;
  readonly drift: number;
  readonly settling: SettlingScore;
}

export function ratioScores(cells: TimeCells, fits: readonly ModelFit[]): RatioScores {
  const m = cells.index.length;
  const sum = new RatioSum(fits, m);
  const index = Float64Array.from(cells.index);
  return {
    step: bestStep(sum, fits, m),
    drift: sum.score(fits.map((fit) => explainedBy(fit, index))),
    settling: bestSettling(sum, fits, cells),
  };
}

function bestSettling(sum: RatioSum, fits: readonly ModelFit[], cells: TimeCells): SettlingScore {
  const scores = SETTLING_PARTS.map((part) => {
    const regressor = settlingRegressor(cells, part);
    return {part, score: sum.score(fits.map((fit) => explainedBy(fit, regressor)))};
  });
  return scores.reduce((best, one) => (one.score > best.score ? one : best));
}

/** Squares of each component that a regressor explains beyond a constant. */
function explainedBy(fit: ModelFit, regressor: Float64Array): Float64Array {
  const whitened = whiten(fit.factor, regressor);
  const shift = dot(fit.ones, whitened) / fit.onesSquared;
  const squared = dot(whitened, whitened) - shift * shift * fit.onesSquared;
  return Float64Array.from(fit.components, ({residuals}) => {
    const projection = dot(whitened, residuals);
    return (projection * projection) / squared;
  });
}

/** Every cell edge is tried: in slow noise the score of a step falls off within one cell. */
function bestStep(sum: RatioSum, fits: readonly ModelFit[], m: number): StepScore {
  let best: StepScore = {score: 0, cell: 0};
  const edges = Array.from(
    {length: Math.max(0, m - 2 * TRIMMED_CELLS + 1)},
    (_, i) => TRIMMED_CELLS + i,
  );
  const explained = fits.map((fit) => stepsExplained(fit, edges));
  edges.forEach((cell, i) => {
    const score = sum.score(explained.map((rows) => rows[i]!));
    if (score > best.score) best = {score, cell};
  });
  return best;
}

/** For a step before each of the cells, the squares of each component that it explains. */
function stepsExplained(fit: ModelFit, at: readonly number[]): Float64Array[] {
  const {ones, onesSquared, components, factor} = fit;
  const m = ones.length;
  const whitened = new Float64Array(m);
  const state = new Float64Array(factor.weights.length);
  return at.map((cell) => {
    whitenStep(factor, cell, whitened, state);
    let onOnes = 0;
    let square = 0;
    for (let k = cell; k < m; k++) {
      const value = whitened[k]!;
      onOnes += ones[k]! * value;
      square += value * value;
    }
    const left = square - (onOnes * onOnes) / onesSquared;
    return Float64Array.from(components, ({residuals}) => {
      let projection = 0;
      for (let k = cell; k < m; k++) projection += whitened[k]! * residuals[k]!;
      return left > 0 ? (projection * projection) / left : 0;
    });
  });
}

/** `whiten` for a step of one at `cell`, into a column that is used again and again. */
function whitenStep(factor: Factor, cell: number, out: Float64Array, state: Float64Array): void {
  const {inverseRoot, gain, decay, weights} = factor;
  const m = out.length;
  const j = weights.length;
  state.fill(0);
  let previous = 1;
  out[cell] = inverseRoot[cell]!;
  for (let n = cell + 1; n < m; n++) {
    let z = 1;
    const now = n * j;
    const before = now - j;
    for (let a = 0; a < j; a++) {
      const value = decay[now + a]! * (state[a]! + gain[before + a]! * previous);
      state[a] = value;
      z -= weights[a]! * value;
    }
    previous = z;
    out[n] = z * inverseRoot[n]!;
  }
}
