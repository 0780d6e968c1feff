import {r95} from '../statistics/accuracy-measures.ts';
import {analyseSession} from '../statistics/analyse-session.ts';
import {NORMAL_95} from '../statistics/distribution.ts';
import type {
  ComponentAnalysis,
  Movement,
  SessionAnalysis,
  TakenOut,
} from '../statistics/session-analysis.ts';
import {type CovarianceM2, planeOf} from './covariance.ts';
import {type LocalColumns, selected, taken} from './local-columns.ts';
import type {PerAxis} from './result.ts';

/** A step that the statistics find, before anybody asks whether it matters. */
export interface FoundStep {
  readonly gpsSeconds: number;
  readonly interval95GpsSeconds: readonly [number, number];
  readonly sizeM: PerAxis<number | null>;
}

/** A drift that was estimated, significant or not. */
export interface FoundDrift {
  readonly rateMPerS: number;
  readonly interval95MPerS: readonly [number, number];
  readonly detectableMPerS: number;
}

/** One uninterrupted stretch of an occupation, averaged. Null where the record cannot tell. */
export interface Session {
  readonly indices: Uint32Array;
  readonly fromGpsSeconds: number;
  readonly toGpsSeconds: number;
  /** Mean of the epochs about the origin of the columns. */
  readonly meanM: PerAxis<number | null>;
  /** By scatter and correlation alone. */
  readonly standardUncertaintyM: PerAxis<number | null> | null;
  /** 95 % half-widths of the means had some of the steps, or the drift, not happened. */
  readonly halfWidths95Without: (movement: TakenOut) => PerAxis<number | null>;
  /** What the digits of the log can hide after averaging; null where they are fine. */
  readonly quantisationM: PerAxis<number | null> | null;
  readonly independentLooks: PerAxis<number | null> | null;
  readonly correlationTimeS: PerAxis<number | null> | null;
  readonly movement: Movement;
  readonly drift: PerAxis<FoundDrift | null>;
  readonly steps: readonly FoundStep[];
  /** What was still to come at the start of a record that settles. */
  readonly settling: {
    readonly timeConstantS: number;
    readonly sizeM: PerAxis<number | null>;
  } | null;
  /** Codes of what limits the statements above, for notices. */
  readonly limits: readonly {readonly code: string; readonly axes: readonly string[]}[];
  /** 95 % half-widths of the mean after a part of the record; null: cannot be told. */
  readonly halfWidths95After: (elapsedS: number) => PerAxis<number | null>;
  /** Time for a 95 % horizontal radius of the session's own; null when it cannot be told. */
  readonly timeForRadius: (radiusM: number) => TimeNeeded | null;
  /** Time for a part of the standard uncertainty of some axes; null when it cannot be told. */
  readonly timeForPart: (part: number, axes: readonly Axis[]) => TimeNeeded | null;
  /** Covariance of the mean by scatter and correlation alone; null: cannot be told. */
  readonly covarianceM2: CovarianceM2 | null;
}

/** How long a record would have to be: as likely as not, and in four cases of five. */
export interface TimeNeeded {
  readonly aboutS: number;
  readonly allowS: number;
}

export type Axis = keyof PerAxis;

const AXES = ['east', 'north', 'up'] as const;
/** Rounding that could hide less than this part of the session's own figure is not worth a row. */
const NOTICEABLE_SHARE = 0.01;

/** Averages one stretch and asks the statistics everything about it. */
export function sessionOf(
  gpsSeconds: Float64Array,
  columns: LocalColumns,
  indices: Uint32Array,
  resolutionM: PerAxis<number | null>,
): Session {
  const firstS = gpsSeconds[indices[0]!]!;
  const lastS = gpsSeconds[indices[indices.length - 1]!]!;
  const elapsedS = taken(gpsSeconds, indices);
  for (let i = 0; i < elapsedS.length; i++) elapsedS[i]! -= firstS;
  const axes = columns.heightKind === 'none' ? AXES.slice(0, 2) : AXES;
  const analysis = analyseSession({
    elapsedS,
    components: axes.map((axis) => selected(columns[`${axis}M`], indices)),
    resolutions: axes.map((axis) => resolutionM[axis] ?? 0),
  });
  const {components} = analysis;
  const told = components.some(({halfWidth95}) => halfWidth95 !== undefined);
  return {
    indices,
    fromGpsSeconds: firstS,
    toGpsSeconds: lastS,
    meanM: perAxis(components, ({mean}) => mean),
    standardUncertaintyM: told ? perAxis(components, sigma) : null,
    halfWidths95Without: (movement) => {
      const [east, north, up] = analysis.halfWidthsWithout(movement);
      return {east: east ?? null, north: north ?? null, up: up ?? null};
    },
    quantisationM: quantisation(components),
    independentLooks: told ? perAxis(components, (one) => one.independentLooks) : null,
    correlationTimeS: told ? perAxis(components, (one) => one.correlationTimeS) : null,
    movement: analysis.movement,
    drift: perAxis(components, foundDrift),
    steps: analysis.steps.map(({elapsedS, interval95S: [from, to], sizes}) => ({
      gpsSeconds: firstS + elapsedS,
      interval95GpsSeconds: [firstS + from, firstS + to],
      sizeM: {east: sizes[0] ?? null, north: sizes[1] ?? null, up: sizes[2] ?? null},
    })),
    settling: settlingOf(analysis),
    limits: analysis.limits.map(({code, components: concerned}) => ({
      code,
      axes: concerned.map((component) => AXES[component]!),
    })),
    halfWidths95After: (elapsedS) => {
      const after = (component: number) => analysis.halfWidth95After(component, elapsedS) ?? null;
      return {east: after(0), north: after(1), up: after(2)};
    },
    timeForRadius: (radiusM) => timeForRadius(analysis, radiusM),
    timeForPart: (part, wanted) => timeForPart(analysis, part, wanted),
    covarianceM2: told ? covarianceOf(analysis) : null,
  };
}

function perAxis<T>(
  components: readonly ComponentAnalysis[],
  value: (component: ComponentAnalysis) => T | undefined,
): PerAxis<T | null> {
  const at = (component: ComponentAnalysis | undefined) =>
    component === undefined ? null : (value(component) ?? null);
  return {east: at(components[0]), north: at(components[1]), up: at(components[2])};
}

function sigma({halfWidth95}: ComponentAnalysis): number | undefined {
  return halfWidth95 === undefined ? undefined : halfWidth95 / NORMAL_95;
}

function quantisation(components: readonly ComponentAnalysis[]): PerAxis<number | null> | null {
  const noticeable = components.some(
    ({quantisation95, halfWidth95}) => quantisation95 > NOTICEABLE_SHARE * (halfWidth95 ?? 0),
  );
  return noticeable ? perAxis(components, (one) => one.quantisation95 / NORMAL_95) : null;
}

function settlingOf({settling}: SessionAnalysis): Session['settling'] {
  if (settling === undefined) return null;
  const [east, north, up] = settling.sizes;
  return {
    timeConstantS: settling.timeConstantS,
    sizeM: {east: east ?? null, north: north ?? null, up: up ?? null},
  };
}

function foundDrift({drift}: ComponentAnalysis): FoundDrift | undefined {
  if (drift === undefined) return undefined;
  const {perS, halfWidth95PerS, detectablePerS} = drift;
  return {
    rateMPerS: perS,
    interval95MPerS: [perS - halfWidth95PerS, perS + halfWidth95PerS],
    detectableMPerS: detectablePerS,
  };
}

/** East, north and up; NaN for a height that is not known. */
function covarianceOf({components, planCorrelation}: SessionAnalysis): CovarianceM2 | null {
  const [east, north, up] = components.map(sigma);
  if (east === undefined || north === undefined) return null;
  const eastNorth = planCorrelation * east * north;
  return [
    [east ** 2, eastNorth, 0],
    [eastNorth, north ** 2, 0],
    [0, 0, up === undefined ? Number.NaN : up ** 2],
  ];
}

/** Both plan axes shrink alike, so the radius asks the same part of each. */
function timeForRadius(analysis: SessionAnalysis, radiusM: number): TimeNeeded | null {
  const covarianceM2 = covarianceOf(analysis);
  if (covarianceM2 === null) return null;
  return timeForPart(analysis, radiusM / r95(planeOf(covarianceM2)), ['east', 'north']);
}

/** The slowest of the axes decides. */
function timeForPart(
  analysis: SessionAnalysis,
  part: number,
  axes: readonly Axis[],
): TimeNeeded | null {
  const times = axes.map((axis) => {
    const component = AXES.indexOf(axis);
    const halfWidth95 = analysis.components[component]?.halfWidth95;
    return halfWidth95 === undefined
      ? undefined
      : analysis.requiredTime(component, part * halfWidth95);
  });
  const known = times.filter((time) => time !== undefined);
  if (known.length < times.length) return null;
  return {
    aboutS: Math.max(...known.map(({aboutS}) => aboutS)),
    allowS: Math.max(...known.map(({allowS}) => allowS)),
  };
}
