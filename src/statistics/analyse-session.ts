import type {Analysable} from './analysable.ts';
import {testablePart} from './analysable.ts';
import {NORMAL_95} from './distribution.ts';
import {errorCorrelation, type MeanUncertainty, meanUncertainties} from './mean-uncertainty.ts';
import {fitModels, type Pooling, withSwings} from './model-fits.ts';
import {type FoundMovement, movementOf} from './movement.ts';
import {deviationPart, requiredTime} from './required-time.ts';
import {medianSpacing} from './robust.ts';
import type {
  ComponentAnalysis,
  DriftAnalysis,
  SessionAnalysis,
  SessionInput,
  SessionLimit,
  TakenOut,
} from './session-analysis.ts';
import type {Slope} from './slope.ts';
import {quantisation95, type Spread, spreadOf} from './spread.ts';
import {meanOfCells, type TimeCells, timeCells} from './time-cells.ts';
import {withoutLines, withoutSettling, withoutSteps} from './without-movement.ts';

const LEAST_EPOCHS = 30;
const LEAST_SPAN_S = 120;
const LEAST_CELLS = 8;
const FEW_LOOKS = 4;
const SLOW = 0.5;

/** Everything the record itself can say about its mean and about movement. O(n). */
export function analyseSession(input: SessionInput): SessionAnalysis {
  const {elapsedS, components} = input;
  const spacingS = medianSpacing(elapsedS) ?? 0;
  const known = components.map((column, c) => spreadOf(column, input.resolutions[c] ?? 0));
  const n = elapsedS.length;
  const spanS = n > 1 ? elapsedS[n - 1]! - elapsedS[0]! + spacingS : 0;
  if (n < LEAST_EPOCHS || spanS < LEAST_SPAN_S) return untold(known, 'too-short');
  const varying = known.flatMap(({constant}, c) => (constant ? [] : [c]));
  const cells = timeCells(
    elapsedS,
    varying.map((c) => components[c]!),
    spacingS,
  );
  if (cells.index.length < LEAST_CELLS) return untold(known, 'few-cells');
  return analysed({input, known, varying, cells, spacingS});
}

function untold(known: readonly Spread[], code: SessionLimit): SessionAnalysis {
  return {
    components: known.map((one) => ({
      mean: one.mean,
      halfWidth95: undefined,
      quantisation95: quantisation95(one),
      independentLooks: undefined,
      correlationTimeS: undefined,
      drift: undefined,
    })),
    planCorrelation: 0,
    movement: 'cannot tell',
    steps: [],
    settling: undefined,
    limits: [{code, components: known.map((_, c) => c)}],
    slowProbability: 0,
    halfWidthsWithout: () => known.map(() => undefined),
    halfWidth95After: () => undefined,
    requiredTime: () => undefined,
  };
}

/**
 * The questions that can be asked later are answered from the cells: nothing that is returned keeps
 * the columns of a long record in memory.
 */
function analysed(record: Analysable): SessionAnalysis {
  const {known, varying, cells} = record;
  const startS = record.input.elapsedS[0]!;
  const planVaries = varying[0] === 0 && varying[1] === 1;
  const pooling: Pooling = planVaries ? 'plan' : 'none';
  const plain = fitModels(cells);
  const swinging = withSwings(plain, cells);
  const movement = movementOf(testablePart(record, swinging));
  // Movement looks like half of a slow swing; only what sat still may be believed to have swung.
  const fits = movement.kind === 'none' ? swinging : plain;
  const means = varying.map((c) => known[c]!.mean);
  const uncertainties = meanUncertainties(cells, fits, means, pooling);
  const slowProbability = Math.max(0, ...uncertainties.map((one) => one.slowProbability));
  const components = known.map((one, c) =>
    componentOf(one, c, {cells, varying, uncertainties, drifts: movement.drifts}),
  );
  return {
    components,
    planCorrelation: planVaries ? errorCorrelation(fits, 0, 1) : 0,
    movement: movement.kind,
    steps: movement.steps,
    settling: movement.settling,
    limits: limitsOf(record, components, uncertainties, movement.testable),
    slowProbability,
    halfWidthsWithout: (takenOut) => {
      const quiet = without(takenOut, movement, {cells, varying, startS});
      const means = quiet.means.map(meanOfCells);
      const left = meanUncertainties(quiet, fitModels(quiet), means, pooling);
      return known.map((_, c) => (varying.includes(c) ? left[varying.indexOf(c)]!.halfWidth95 : 0));
    },
    halfWidth95After: (component, timeS) => {
      const at = varying.indexOf(component);
      if (at < 0) return undefined;
      const {halfWidth95, weights} = uncertainties[at]!;
      return halfWidth95 * deviationPart(cells, fits, at, weights, timeS);
    },
    requiredTime: (component, target) => {
      const at = varying.indexOf(component);
      const now = components[component]?.halfWidth95;
      if (at < 0 || now === undefined || slowProbability > SLOW) return undefined;
      if (target < 0.5 * now || target > 2 * now) return undefined;
      return requiredTime(cells, fits, at, uncertainties[at]!.weights, target);
    },
  };
}

function componentOf(
  one: Spread,
  component: number,
  found: {
    readonly cells: TimeCells;
    readonly varying: readonly number[];
    readonly uncertainties: readonly MeanUncertainty[];
    readonly drifts: ReadonlyMap<number, Slope>;
  },
): ComponentAnalysis {
  const {cells, varying} = found;
  const at = varying.indexOf(component);
  const halfWidth95 = at < 0 ? 0 : found.uncertainties[at]!.halfWidth95;
  const sigma = halfWidth95 / NORMAL_95;
  const looks = sigma > 0 ? (one.deviation / sigma) ** 2 : undefined;
  const drift = found.drifts.get(component);
  return {
    mean: one.mean,
    halfWidth95,
    quantisation95: quantisation95(one),
    independentLooks: looks,
    correlationTimeS: looks === undefined ? undefined : cells.spanS / (2 * looks),
    drift: drift === undefined ? undefined : driftOf(drift, cells),
  };
}

/**
 * Standard errors that a drift of one component must have to be claimed with a probability of 80 %:
 * √λ with P(χ²₃(λ) > 9.8) = 0.8.
 */
const DRIFT_SEEN = 3.69;

function driftOf({perCell, halfWidth95, pValue}: Slope, {widthS}: TimeCells): DriftAnalysis {
  return {
    perS: perCell / widthS,
    halfWidth95PerS: halfWidth95 / widthS,
    pValue,
    detectablePerS: (DRIFT_SEEN * halfWidth95) / NORMAL_95 / widthS,
  };
}

function limitsOf(
  {known, varying}: Analysable,
  components: readonly ComponentAnalysis[],
  uncertainties: readonly MeanUncertainty[],
  testable: boolean,
): SessionAnalysis['limits'] {
  const which = (holds: (c: number) => boolean) => known.flatMap((_, c) => (holds(c) ? [c] : []));
  const slow = (c: number) => {
    const at = varying.indexOf(c);
    return at >= 0 && uncertainties[at]!.slowProbability > SLOW;
  };
  const limits: {code: SessionLimit; components: number[]}[] = [
    {code: 'no-spread', components: which((c) => known[c]!.constant)},
    {
      code: 'resolution-dominates',
      components: which((c) => !known[c]!.constant && !known[c]!.dithered),
    },
    {code: 'slow-errors', components: which(slow)},
    {
      code: 'few-looks',
      components: which((c) => (components[c]!.independentLooks ?? FEW_LOOKS) < FEW_LOOKS),
    },
  ];
  if (!testable) limits.push({code: 'mostly-gaps', components: which(() => true)});
  return limits.filter(({components: concerned}) => concerned.length > 0);
}

/** The cells as they would be had some of the movement not happened. */
function without(
  takenOut: TakenOut,
  {steps, drifts, settling}: FoundMovement,
  record: {
    readonly cells: TimeCells;
    readonly varying: readonly number[];
    readonly startS: number;
  },
): TimeCells {
  const {cells, varying, startS} = record;
  const gone = takenOut.steps.map((step) => steps[step]!);
  const stepless = withoutSteps(cells, varying, startS, gone);
  const level = takenOut.drift === true ? withoutLines(stepless, varying, drifts) : stepless;
  return takenOut.settling === true && settling !== undefined
    ? withoutSettling(level, varying, settling)
    : level;
}
