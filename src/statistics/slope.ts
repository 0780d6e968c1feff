import {normalQuantile} from './distribution.ts';
import {mixtureCdf, mixtureHalfWidth, mixtureOf} from './mixture.ts';
import {dot, type ModelFit, modelWeights, type Pooling} from './model-fits.ts';
import {whiten} from './semiseparable.ts';
import type {TimeCells} from './time-cells.ts';

/** Drift of one component, in its unit per cell. */
export interface Slope {
  readonly perCell: number;
  readonly halfWidth95: number;
  /** Two-sided probability of so large a slope without a drift, after the mixture. */
  readonly pValue: number;
}

/**
 * The drift of each component with its 95 % interval, averaged over the noise models.
 *
 * Method: generalised least squares with a constant and a line per model, likelihood restricted to
 * the residuals, Student mixture over the models.
 */
export function slopes(cells: TimeCells, fits: readonly ModelFit[], pooling: Pooling): Slope[] {
  const m = cells.index.length;
  const centre = cells.index.reduce((sum, index) => sum + index, 0) / m;
  const line = Float64Array.from(cells.index, (index) => index - centre);
  const rows = fits.map((fit) => lineFit(fit, line));
  const weights = modelWeights(
    fits.map(({model}) => model.logPrior),
    rows.map((row) => row.map(({logLikelihood}) => logLikelihood)),
    pooling,
  );
  return weights.map((componentWeights, c) => {
    const mixture = mixtureOf(
      componentWeights,
      Float64Array.from(rows, (row) => row[c]!.slope),
      Float64Array.from(rows, (row) => row[c]!.standardError),
      m - 2,
    );
    const perCell = mixture.weights.reduce((sum, w, i) => sum + w * mixture.centres[i]!, 0);
    const below = mixtureCdf(mixture, 0);
    return {
      perCell,
      halfWidth95: mixtureHalfWidth(mixture, perCell, 0.95),
      pValue: Math.max(1e-300, 2 * Math.min(below, 1 - below)),
    };
  });
}

interface LineFit {
  readonly slope: number;
  readonly standardError: number;
  readonly logLikelihood: number;
}

function lineFit(fit: ModelFit, line: Float64Array): LineFit[] {
  const whitened = whiten(fit.factor, line);
  const shift = dot(fit.ones, whitened) / fit.onesSquared;
  const regressor = whitened.map((value, k) => value - shift * fit.ones[k]!);
  const squared = dot(regressor, regressor);
  const m = line.length;
  return fit.components.map(({residuals, squares}) => {
    const projection = dot(regressor, residuals);
    const slope = projection / squared;
    const left = Math.max(squares - projection * slope, squares * 1e-14);
    return {
      slope,
      standardError: Math.sqrt(left / ((m - 2) * squared)),
      logLikelihood:
        -0.5 * fit.factor.logDeterminant -
        0.5 * Math.log(fit.onesSquared * squared) -
        0.5 * (m - 2) * Math.log(left),
    };
  });
}

/** Joint evidence for a drift: Σ z², with z the normal deviate of each two-sided p-value. */
export function jointSlopeScore(found: readonly Slope[]): number {
  return found.reduce((sum, {pValue}) => {
    const z = pValue >= 1 ? 0 : -normalQuantile(Math.max(pValue / 2, 1e-290));
    return sum + z * z;
  }, 0);
}
