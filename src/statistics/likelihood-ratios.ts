import {dot, type ModelFit} from './model-fits.ts';
import {settlingRegressor} from './movement-sizes.ts';
import {whiten} from './semiseparable.ts';
import {stepProducts} from './step-products.ts';
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

  /** @param explained  the squares of a model and component that the regressor takes away */
  score(explained: (model: number, component: number) => number): number {
    let sum = 0;
    for (let c = 0; c < this.base.length; c++) {
      const better = this.logAverage((m) => {
        const {squares} = this.fits[m]!.components[c]!;
        return Math.max(squares - explained(m, c), squares * 1e-12);
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
    drift: scoreOf(sum, fits, index),
    settling: bestSettling(sum, fits, cells),
  };
}

function bestSettling(sum: RatioSum, fits: readonly ModelFit[], cells: TimeCells): SettlingScore {
  const scores = SETTLING_PARTS.map((part) => {
    const regressor = settlingRegressor(cells, part);
    return {part, score: scoreOf(sum, fits, regressor)};
  });
  return scores.reduce((best, one) => (one.score > best.score ? one : best));
}

function scoreOf(sum: RatioSum, fits: readonly ModelFit[], regressor: Float64Array): number {
  const explained = fits.map((fit) => explainedBy(fit, regressor));
  return sum.score((model, component) => explained[model]![component]!);
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
  const explained = fits.map(stepsExplained);
  for (let cell = TRIMMED_CELLS; cell <= m - TRIMMED_CELLS; cell++) {
    const score = sum.score((model, c) => explained[model]![c]![cell]!);
    if (score > best.score) best = {score, cell};
  }
  return best;
}

/** Per component, the squares that a step before each cell explains beyond a constant. */
function stepsExplained({factor, ones, onesSquared, components}: ModelFit): Float64Array[] {
  const {squares, projections} = stepProducts(factor, [
    ones,
    ...components.map(({residuals}) => residuals),
  ]);
  const onOnes = projections[0]!;
  return components.map((_, c) =>
    squares.map((square, cell) => {
      const left = square - (onOnes[cell]! * onOnes[cell]!) / onesSquared;
      const projection = projections[c + 1]![cell]!;
      return left > 0 ? (projection * projection) / left : 0;
    }),
  );
}
