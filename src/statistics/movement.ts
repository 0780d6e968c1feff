import type {Testable} from './analysable.ts';
import {type RatioScores, ratioScores} from './likelihood-ratios.ts';
import {fitModels, type Pooling} from './model-fits.ts';
import {MOVING_SUM_P, type MovingSumStep, movingSumStep} from './moving-sums.ts';
import {medianInPlace} from './quantile.ts';
import type {Movement, SettlingAnalysis, StepAnalysis} from './session-analysis.ts';
import {settlingOf} from './settling.ts';
import {jointSlopeScore, type Slope, slopes} from './slope.ts';
import {sizedSteps, stepTimes} from './steps.ts';
import type {TimeCells} from './time-cells.ts';
import {withoutSteps} from './without-movement.ts';

const LEAST_CELLS_SHARE = 0.5;
/** A drift is claimed when the joint score of three components exceeds this. */
const DRIFT_SCORE = 9.8;

/** What has moved, and what is left when steps are taken out. */
export interface FoundMovement {
  readonly kind: Movement;
  readonly steps: readonly StepAnalysis[];
  readonly settling: (SettlingAnalysis & {readonly part: number}) | undefined;
  /** By number of the component; of the record without its steps where it has some. */
  readonly drifts: ReadonlyMap<number, Slope>;
  /** Whether enough of the record is there to be tested. */
  readonly testable: boolean;
}

/*
 * Thresholds of the joint scores, set so that correlated noise alone of many kinds passes them in
 * few records out of a hundred.
 */
const STEP_SCORE = 22;
const STEP_SCORE_UNEVEN = 34;
const SETTLING_SCORE = 18;

/**
 * A drift is tested with the shape of the noise taken from all components: one height alone tells
 * too little of it, and a line costs the likelihood more than a constant does.
 */
function slopePooling(means: Pooling): Pooling {
  return means === 'none' ? 'none' : 'all';
}

/** Looks for steps, drift and settling, and says which of them the record shows. */
export function movementOf(part: Testable): FoundMovement {
  const {cells, fits, columns, numbers, pooling, record} = part;
  const enough = cells.index.length >= LEAST_CELLS_SHARE * cells.expected;
  if (numbers.length === 0 || !enough) {
    return {
      kind: 'cannot tell',
      steps: [],
      settling: undefined,
      drifts: new Map(),
      testable: enough,
    };
  }
  const scores = ratioScores(cells, fits);
  const sums = movingSumStep(record.input.elapsedS, columns, record.spacingS);
  const drifts = slopes(cells, fits, slopePooling(pooling));
  const threshold = unevenness(cells) > UNEVEN ? STEP_SCORE_UNEVEN : STEP_SCORE;
  const kind = kindOf(scores, sums, drifts, threshold);
  if (kind !== 'step') {
    const settling = kind === 'settling' ? settlingOf(part, scores.settling.part) : undefined;
    return {kind, steps: [], settling, drifts: numbered(numbers, drifts), testable: true};
  }
  const steps = sizedSteps(part, stepTimes(part, scores, sums));
  const quiet = withoutSteps(cells, numbers, record.input.elapsedS[0]!, steps);
  const left = slopes(quiet, fitModels(quiet), slopePooling(pooling));
  return {kind, steps, settling: undefined, drifts: numbered(numbers, left), testable: true};
}

function numbered(numbers: readonly number[], drifts: readonly Slope[]): Map<number, Slope> {
  return new Map(numbers.map((component, i) => [component, drifts[i]!]));
}

/** One word for the record; later rules override earlier ones. */
function kindOf(
  scores: RatioScores,
  sums: MovingSumStep | undefined,
  drifts: readonly Slope[],
  threshold: number,
): Movement {
  let kind: Movement = 'none';
  const settling = scores.settling.score;
  const {step, drift} = scores;
  if (settling > SETTLING_SCORE) kind = 'settling';
  if (step.score > threshold && step.score - threshold > settling - SETTLING_SCORE) kind = 'step';
  if (jointSlopeScore(drifts) > DRIFT_SCORE && drift >= settling - 4 && drift >= step.score - 10) {
    kind = 'drift';
  }
  if ((sums?.pValue ?? 1) < MOVING_SUM_P && settling - step.score <= 10) kind = 'step';
  return kind;
}

/** Unevenness of the noise between quarters of a record beyond which steps need more evidence. */
const UNEVEN = 1.5;

/** Largest over smallest noise of a quarter: medians of the differences of neighbouring cells. */
function unevenness({means}: TimeCells): number {
  const quarters = [0, 1, 2, 3].map((quarter) => quarterNoise(means, quarter));
  const told = quarters.filter((value) => value !== undefined);
  return told.length < 2 ? 1 : Math.max(...told) / Math.min(...told);
}

function quarterNoise(means: readonly Float64Array[], quarter: number): number | undefined {
  let logs = 0;
  for (const column of means) {
    const from = Math.floor((quarter * column.length) / 4);
    const to = Math.floor(((quarter + 1) * column.length) / 4);
    const sizes = column
      .subarray(from + 1, to)
      .map((value, i) => Math.abs(value - column[from + i]!));
    const middle = sizes.length === 0 ? 0 : medianInPlace(sizes, sizes.length);
    // Repeated positions make a median zero: such a quarter says nothing about noise.
    if (!(middle > 0)) return undefined;
    logs += Math.log(middle);
  }
  return Math.exp(logs / means.length);
}
