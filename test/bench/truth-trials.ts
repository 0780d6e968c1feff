import type {Scenario} from '../simulate/scenarios.ts';
import {judge} from './truth-judge.ts';
import {AXES, type Axes, type Judgement} from './truth-judgement.ts';
import {replicate, type Signal} from './truth-signals.ts';

/** One replicate of an experiment: what was done, and what the estimator said. */
export interface Trial {
  readonly judgement: Judgement;
  readonly stepS: number;
}

/** Replicates of one scenario and signal, seed by seed. */
export function trials(
  scenario: Scenario,
  signal: Signal,
  count: number,
  firstSeed: number,
): Trial[] {
  return Array.from({length: count}, (_, k) => {
    const {occupation, stepS} = replicate(scenario, signal, firstSeed + k);
    return {judgement: judge(occupation, scenario), stepS};
  });
}

/** What the intervals of a still occupation are worth, the mark being at zero. */
export interface MeanSummary {
  /** Whether the interval held the mark, replicate by replicate; no number counts as a miss. */
  readonly holds: Record<keyof Axes, boolean[]>;
  readonly ellipseHolds: boolean[];
  /** 1.96 times the true standard deviation of the mean. */
  readonly oracleM: Axes;
  readonly widthMedian: Axes;
  readonly widthP90: Axes;
  readonly slow: boolean[];
  readonly fewLooks: boolean[];
}

export function summariseMeans(all: readonly Trial[]): MeanSummary {
  const judgements = all.map((trial) => trial.judgement);
  const perAxis = <T>(of: (axis: keyof Axes) => T) =>
    Object.fromEntries(AXES.map((axis) => [axis, of(axis)])) as Record<keyof Axes, T>;
  const oracleM = perAxis((axis) => {
    const squares = judgements.reduce((sum, {meanM}) => sum + meanM[axis] ** 2, 0);
    return 1.96 * Math.sqrt(squares / judgements.length);
  });
  const widths = perAxis((axis) =>
    judgements.map(({halfWidthM}) => halfWidthM[axis] / oracleM[axis]).filter(Number.isFinite),
  );
  return {
    holds: perAxis((axis) =>
      judgements.map(({meanM, halfWidthM}) => Math.abs(meanM[axis]) <= halfWidthM[axis]),
    ),
    ellipseHolds: judgements.map(({ellipseHolds}) => ellipseHolds),
    oracleM,
    widthMedian: perAxis((axis) => quantileOf(widths[axis], 0.5)),
    widthP90: perAxis((axis) => quantileOf(widths[axis], 0.9)),
    slow: judgements.map(({slow}) => slow),
    fewLooks: judgements.map(({fewLooks}) => fewLooks),
  };
}

/** Absolute error in the time of the step nearest to the true one; infinite when none is found. */
export function stepTimeErrorS({judgement, stepS}: Trial): number {
  return judgement.steps.reduce(
    (least, {atS}) => Math.min(least, Math.abs(atS - stepS)),
    Number.POSITIVE_INFINITY,
  );
}

/** The value below which a share of the sorted values lies, by the nearest rank. */
export function quantileOf(values: readonly number[], share: number): number {
  if (values.length === 0) return Number.NaN;
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
}
