import {type RatioScores, ratioScores} from './likelihood-ratios.ts';
import {errorCorrelation, type MeanUncertainty, meanUncertainties} from './mean-uncertainty.ts';
import {fitModels, type ModelFit, type Pooling} from './model-fits.ts';
import {moments} from './moments.ts';
import {movementSizes, settlingRegressor, stepRegressor} from './movement-sizes.ts';
import {type MovingSumStep, movingSumStep, refineStepTime} from './moving-sums.ts';
import {medianInPlace} from './quantile.ts';
import {deviationPart, type RequiredTime, requiredTime} from './required-time.ts';
import {medianSpacing} from './robust.ts';
import {jointSlopeScore, type Slope, slopes} from './slope.ts';
import {type TimeCells, timeCells} from './time-cells.ts';

/** One static record, screened: east, north and, where the record has a height, up. */
export interface SessionInput {
  /** n ascending times. */
  readonly elapsedS: Float64Array;
  /** Two or three columns of n finite values, in one unit. */
  readonly components: readonly Float64Array[];
  /** Distance between neighbouring values the log can express, per component; 0 if unknown. */
  readonly resolutions: readonly number[];
}

/** Why a statement is missing, or what it rests on. */
export type SessionLimit =
  | 'too-short'
  | 'few-cells'
  | 'mostly-gaps'
  | 'no-spread'
  | 'resolution-dominates'
  | 'slow-errors'
  | 'few-looks';

export interface ComponentAnalysis {
  readonly mean: number;
  /** Half-width of the 95 % interval by scatter and correlation; undefined: cannot be told. */
  readonly halfWidth95: number | undefined;
  /** What rounding can hide beyond that; 0 when the digits are fine. */
  readonly quantisation95: number;
  readonly independentLooks: number | undefined;
  readonly correlationTimeS: number | undefined;
  readonly drift: DriftAnalysis | undefined;
}

export interface DriftAnalysis {
  readonly perS: number;
  readonly halfWidth95PerS: number;
  readonly pValue: number;
  /** Smallest drift that would be claimed with a probability of 80 %. */
  readonly detectablePerS: number;
}

export interface StepAnalysis {
  readonly elapsedS: number;
  readonly interval95S: readonly [number, number];
  /** Per component; undefined where the component could not be tested. */
  readonly sizes: readonly (number | undefined)[];
  readonly standardErrors: readonly (number | undefined)[];
}

/** Settling toward a final value: what was still to come at the start, per component. */
export interface SettlingAnalysis {
  readonly timeConstantS: number;
  readonly sizes: readonly (number | undefined)[];
}

export type Movement = 'none' | 'step' | 'drift' | 'settling' | 'cannot tell';

export interface SessionAnalysis {
  readonly components: readonly ComponentAnalysis[];
  /** Correlation of the errors of the first two means. */
  readonly planCorrelation: number;
  readonly movement: Movement;
  readonly steps: readonly StepAnalysis[];
  /** Present when the record settles. */
  readonly settling: SettlingAnalysis | undefined;
  /** Codes with the components that they concern. */
  readonly limits: readonly {readonly code: SessionLimit; readonly components: readonly number[]}[];
  /**
   * Half-widths of the 95 % intervals, per component, of the same record with some of its steps
   * taken out, or its drift: what they would be had that movement not happened.
   */
  readonly halfWidthsWithout: (movement: TakenOut) => readonly (number | undefined)[];
  /** Largest probability that the noise is slower than the record. */
  readonly slowProbability: number;
  /** Half-width of 95 % of the mean of one component after a part of the record, for a chart. */
  readonly halfWidth95After: (component: number, timeS: number) => number | undefined;
  /**
   * How long the record would have to be for a half-width of one component; undefined when this
   * record cannot tell.
   */
  readonly requiredTime: (component: number, target: number) => RequiredTime | undefined;
}

const LEAST_EPOCHS = 30;
const LEAST_SPAN_S = 120;
const LEAST_CELLS = 8;
const LEAST_CELLS_SHARE = 0.5;
const NORMAL_95 = 1.959963984540054;
const FEW_LOOKS = 4;
const SLOW = 0.5;
/** Spread within a quantum below which averaging cannot look between the digits. */
const DITHER = 0.3;

/** Movement to be thought away: steps by their number, the drift, or the settling. */
export interface TakenOut {
  readonly steps: readonly number[];
  readonly drift?: boolean;
  readonly settling?: boolean;
}

/** Everything the record itself can say about its mean and about movement. O(n). */
export function analyseSession(input: SessionInput): SessionAnalysis {
  const {elapsedS, components} = input;
  const spacingS = medianSpacing(elapsedS) ?? 0;
  const known = components.map((column, c) => describe(column, input.resolutions[c] ?? 0));
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

interface Known {
  readonly mean: number;
  readonly deviation: number;
  /** All values equal: nothing can be fitted. */
  readonly constant: boolean;
  readonly resolution: number;
  /** Whether the noise spreads over enough digits to look between them, and to be tested. */
  readonly dithered: boolean;
}

const FEW_VALUES = 3;

function describe(column: Float64Array, resolution: number): Known {
  const {mean, standardDeviation} = moments(column)!;
  const deviation = standardDeviation ?? 0;
  const variance = Math.max(0, deviation ** 2 - resolution ** 2 / 12);
  return {
    mean,
    deviation,
    constant: deviation === 0,
    resolution,
    dithered:
      !hasFewValues(column) && (resolution === 0 || Math.sqrt(variance) / resolution >= DITHER),
  };
}

function hasFewValues(column: Float64Array): boolean {
  const seen = new Set<number>();
  for (const value of column) {
    seen.add(value);
    if (seen.size > FEW_VALUES) return false;
  }
  return true;
}

/** 0.5 q exp(−2π² r²): the largest bias that rounding leaves in a mean of dithered values. */
function quantisation95({deviation, resolution}: Known): number {
  if (resolution === 0) return 0;
  const ratioSquared = Math.max(0, deviation ** 2 - resolution ** 2 / 12) / resolution ** 2;
  return 0.5 * resolution * Math.exp(-2 * Math.PI ** 2 * ratioSquared);
}

function untold(known: readonly Known[], code: SessionLimit): SessionAnalysis {
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

/** A record long and varied enough to be analysed. */
interface Analysable {
  readonly input: SessionInput;
  readonly known: readonly Known[];
  /** Numbers of the components that vary: the components of `cells`, in this order. */
  readonly varying: readonly number[];
  readonly cells: TimeCells;
  readonly spacingS: number;
}

function analysed(record: Analysable): SessionAnalysis {
  const {known, varying, cells} = record;
  const planVaries = varying[0] === 0 && varying[1] === 1;
  const pooling: Pooling = planVaries ? 'plan' : 'none';
  const fits = fitModels(cells);
  const means = varying.map((c) => known[c]!.mean);
  const uncertainties = meanUncertainties(cells, fits, means, pooling);
  const slowProbability = Math.max(0, ...uncertainties.map((one) => one.slowProbability));
  const movement = movementOf(tested(record, fits));
  const components = known.map((one, c) =>
    componentOf(one, c, {record, uncertainties, drifts: movement.drifts}),
  );
  return {
    components,
    planCorrelation: planVaries ? errorCorrelation(fits, 0, 1) : 0,
    movement: movement.kind,
    steps: movement.steps,
    settling: movement.settling,
    limits: limitsOf(record, components, uncertainties, movement.testable),
    slowProbability,
    halfWidthsWithout: (takenOut) => halfWidthsWithout(record, movement, takenOut, pooling),
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

function meanOfCells(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function componentOf(
  one: Known,
  component: number,
  found: {
    readonly record: Analysable;
    readonly uncertainties: readonly MeanUncertainty[];
    readonly drifts: ReadonlyMap<number, Slope>;
  },
): ComponentAnalysis {
  const {cells, varying} = found.record;
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

/** A drift is claimed when the joint score of three components exceeds this. */
const DRIFT_SCORE = 9.8;
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

/** The part of a record that can be tested for movement: components spread over enough digits. */
interface Testable {
  readonly record: Analysable;
  /** Numbers of the components of `cells` and `fits`, in their order. */
  readonly numbers: readonly number[];
  readonly columns: readonly Float64Array[];
  readonly cells: TimeCells;
  readonly fits: readonly ModelFit[];
  readonly pooling: Pooling;
}

function tested(record: Analysable, fits: readonly ModelFit[]): Testable {
  const {varying, known, cells, input} = record;
  const at = varying.flatMap((c, i) => (known[c]!.dithered ? [i] : []));
  const numbers = at.map((i) => varying[i]!);
  return {
    record,
    numbers,
    columns: numbers.map((c) => input.components[c]!),
    cells: {...cells, means: at.map((i) => cells.means[i]!)},
    fits: fits.map((fit) => ({...fit, components: at.map((i) => fit.components[i]!)})),
    pooling: numbers[0] === 0 && numbers[1] === 1 ? 'plan' : 'none',
  };
}

interface FoundMovement {
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
const MOVING_SUM_P = 0.05;

/**
 * A drift is tested with the shape of the noise taken from all components: one height alone tells
 * too little of it, and a line costs the likelihood more than a constant does.
 */
function slopePooling(means: Pooling): Pooling {
  return means === 'none' ? 'none' : 'all';
}

function movementOf(part: Testable): FoundMovement {
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

/** A part of a record must be this long to be searched for more steps. */
const SEARCH_LEAST_S = 240;
const SEARCH_LEAST_EPOCHS = 120;
const MOST_STEPS = 60;

interface TimedStep {
  readonly atS: number;
  readonly interval95S: readonly [number, number];
}

type Hit = Pick<MovingSumStep, 'atS' | 'windowS' | 'jump'>;

/**
 * Times of all steps: the strongest first, then the same search on both sides of it, by moving sums
 * alone.
 */
function stepTimes(
  {record, columns, cells}: Testable,
  {step}: RatioScores,
  sums: MovingSumStep | undefined,
): TimedStep[] {
  const {elapsedS} = record.input;
  const byCells: Hit = {
    atS: cells.index[step.cell]! * cells.widthS,
    windowS: cells.widthS,
    jump: columns.map((_, c) => jumpAtCell(cells, c, step.cell)),
  };
  const strongest = sums !== undefined && sums.pValue < MOVING_SUM_P ? sums : byCells;
  const found: TimedStep[] = [];
  const search = (from: number, to: number, hit: Hit | undefined) => {
    if (hit === undefined || found.length >= MOST_STEPS) return;
    const part = elapsedS.subarray(from, to);
    const time = refineStepTime(
      part,
      columns[largerOf(hit.jump)]!.subarray(from, to),
      hit.atS,
      hit.windowS,
    );
    const cut = from + part.findIndex((timeS) => timeS >= time.atS);
    if (cut <= from) return;
    found.push(time);
    search(from, cut, searchPart(elapsedS, columns, from, cut, record.spacingS));
    search(cut, to, searchPart(elapsedS, columns, cut, to, record.spacingS));
  };
  search(0, elapsedS.length, strongest);
  return found.sort((a, b) => a.atS - b.atS);
}

/** The component with the larger jump, which tells the time best. */
function largerOf(jump: readonly number[]): number {
  return jump.reduce((best, value, c) => (Math.abs(value) > Math.abs(jump[best]!) ? c : best), 0);
}

function searchPart(
  elapsedS: Float64Array,
  columns: readonly Float64Array[],
  from: number,
  to: number,
  spacingS: number,
): Hit | undefined {
  const long = to - from >= SEARCH_LEAST_EPOCHS;
  if (!long || elapsedS[to - 1]! - elapsedS[from]! < SEARCH_LEAST_S) return undefined;
  const step = movingSumStep(
    elapsedS.subarray(from, to),
    columns.map((column) => column.subarray(from, to)),
    spacingS,
  );
  return step !== undefined && step.pValue < MOVING_SUM_P ? step : undefined;
}

function jumpAtCell({means}: TimeCells, component: number, cell: number): number {
  const column = means[component]!;
  return (
    meanOfCells(column.subarray(cell, cell + 3)) -
    meanOfCells(column.subarray(Math.max(0, cell - 3), cell))
  );
}

function sizedSteps(part: Testable, times: readonly TimedStep[]): StepAnalysis[] {
  const {cells, fits, numbers, record, pooling} = part;
  const firstS = record.input.elapsedS[0]!;
  const atCells = times.map(({atS}) => (atS - firstS) / cells.widthS);
  const sized = movementSizes(
    cells,
    fits,
    atCells.map((atCell) => stepRegressor(cells, atCell)),
    pooling,
  );
  return times.map(({atS, interval95S}, i) => ({
    elapsedS: atS,
    interval95S,
    sizes: record.known.map((_, c) => sized[numbers.indexOf(c)]?.sizes[i]),
    standardErrors: record.known.map((_, c) => sized[numbers.indexOf(c)]?.standardErrors[i]),
  }));
}

function settlingOf({cells, fits, numbers, record, pooling}: Testable, part: number) {
  const sized = movementSizes(cells, fits, [settlingRegressor(cells, part)], pooling);
  return {
    part,
    timeConstantS: part * cells.spanS,
    sizes: record.known.map((_, c) => sized[numbers.indexOf(c)]?.sizes[0]),
  };
}

function halfWidthsWithout(
  {cells, varying, known, input}: Analysable,
  {steps, drifts, settling}: FoundMovement,
  takenOut: TakenOut,
  pooling: Pooling,
): (number | undefined)[] {
  const gone = takenOut.steps.map((step) => steps[step]!);
  let quiet = withoutSteps(cells, varying, input.elapsedS[0]!, gone);
  if (takenOut.drift === true) quiet = withoutLines(quiet, varying, drifts);
  if (takenOut.settling === true && settling !== undefined) {
    quiet = withoutSettling(quiet, varying, settling);
  }
  const found = meanUncertainties(quiet, fitModels(quiet), quiet.means.map(meanOfCells), pooling);
  return known.map((_, c) => (varying.includes(c) ? found[varying.indexOf(c)]!.halfWidth95 : 0));
}

function withoutSettling(
  cells: TimeCells,
  numbers: readonly number[],
  {part, sizes}: SettlingAnalysis & {readonly part: number},
): TimeCells {
  const left = settlingRegressor(cells, part);
  const means = cells.means.map((column, at) => {
    const size = sizes[numbers[at]!] ?? 0;
    return column.map((value, k) => value - size * left[k]!);
  });
  return {...cells, means};
}

function withoutLines(
  cells: TimeCells,
  numbers: readonly number[],
  drifts: ReadonlyMap<number, Slope>,
): TimeCells {
  const means = cells.means.map((column, at) => {
    const perCell = drifts.get(numbers[at]!)?.perCell ?? 0;
    return column.map((value, k) => value - perCell * cells.index[k]!);
  });
  return {...cells, means};
}

function withoutSteps(
  cells: TimeCells,
  numbers: readonly number[],
  firstS: number,
  steps: readonly StepAnalysis[],
): TimeCells {
  const means = cells.means.map((column, at) =>
    column.map((value, k) => {
      let left = value;
      for (const {elapsedS, sizes} of steps) {
        const part = cells.index[k]! + 1 - (elapsedS - firstS) / cells.widthS;
        left -= (sizes[numbers[at]!] ?? 0) * Math.min(1, Math.max(0, part));
      }
      return left;
    }),
  );
  return {...cells, means};
}
