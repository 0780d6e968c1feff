import {UsageError} from '../errors.ts';
import {checkedCoordinateEpoch} from './coordinate-epoch.ts';
import {GRS80} from './ellipsoid.ts';
import {findFrame, frameNamed, normalisedFrameName, refuseEnsemble} from './frame-names.ts';
import type {Area, Frame} from './frame-table.ts';
import {geodeticFromEcef} from './geocentric.ts';
import {
  applyHelmert,
  type HelmertAtEpoch,
  type HelmertSet,
  helmertAt,
  invertHelmert,
} from './helmert.ts';
import {ecefVectorFromEnu, localFrameAtEcef} from './local.ts';
import {plateVelocity} from './plates.ts';
import type {PointMotion} from './point-motion.ts';
import type {Ecef} from './types.ts';

/** Where coordinates belong; an epoch of null was not given. */
export interface FrameAndEpoch {
  readonly frame: string;
  readonly epoch: number | null;
}

export interface TransformationRequest {
  readonly from: FrameAndEpoch;
  readonly to: FrameAndEpoch;
  /** null: not said; an error when the epochs differ. */
  readonly motion: PointMotion | null;
}

/** One line of a hand calculation. */
export type TransformationStep =
  | {
      readonly kind: 'helmert';
      readonly from: string;
      readonly to: string;
      readonly epoch: number;
      /** As published; `inverted` when this step goes against its direction. */
      readonly set: HelmertSet;
      readonly inverted: boolean;
      readonly parameters: HelmertAtEpoch;
      readonly standardUncertaintyM: number;
      readonly source: string;
    }
  | {
      readonly kind: 'coincident';
      readonly from: string;
      readonly to: string;
      readonly epoch: number;
      readonly standardUncertaintyM: number;
      readonly source: string;
    }
  | {
      readonly kind: 'motion';
      readonly frame: string;
      readonly fromEpoch: number;
      readonly toEpoch: number;
      readonly motion: Exclude<PointMotion, {kind: 'at rest'}>;
      readonly source: string;
    }
  | {
      readonly kind: 'at rest';
      readonly frame: string;
      readonly fromEpoch: number;
      readonly toEpoch: number;
    };

/** A systematic contribution: the same for every mark that is transformed so. */
export interface TransformationUncertainty {
  readonly source: string;
  readonly standardUncertaintyM: PerAxis;
}

interface PerAxis {
  readonly east: number;
  readonly north: number;
  readonly up: number;
}

/** A transformation that is ready for any number of points. */
export interface TransformationPlan {
  readonly frame: string;
  readonly epoch: number | null;
  readonly steps: readonly TransformationStep[];
  /** The frames whose areas of use a point must lie in. */
  readonly frames: readonly Frame[];
  readonly uncertainties: readonly TransformationUncertainty[];
  /** Root of the sum of squares of `uncertainties`. */
  readonly standardUncertaintyM: PerAxis;
}

/** A point on its way: the step and where it led. */
export interface TracedStep {
  readonly step: TransformationStep;
  readonly ecef: Ecef;
  /** In metres per year; null unless the step is a motion. */
  readonly velocity: Ecef | null;
}

export interface Transformation {
  readonly ecef: Ecef;
  readonly plan: TransformationPlan;
  readonly trace: readonly TracedStep[];
}

/** Vertical motion that a plate model cannot know, per year; from memory, no source. */
const UNKNOWN_UP_M_PER_YEAR = 0.002;

/** A mark at rest in a plate-fixed frame is as still as plate models fit: 0.25 mm per year. */
const REST_M_PER_YEAR = 0.00025;

/** Below this two epochs are the same: 1e-6 years are half a minute. */
const SAME_EPOCH_YEARS = 1e-6;

/**
 * The way from one frame and epoch to another.
 *
 * Method: the frame is changed at the epoch of the data, along the links of the frame table through
 * the nearest common ancestor; where the epochs differ, the way leads through the frame in which the
 * motion is stated, the point is moved there, and goes on at the epoch asked for.
 * Valid for: one name compares with itself at equal epochs whatever it is, unless it names several
 * frames at once; everything else must be a frame of the table.
 * Accuracy: 0.001 mm against PROJ 9.1.1 for the same parameters; what the parameters are worth is
 * `uncertainties`.
 *
 * @throws UsageError for whatever is missing or cannot be answered, with what to write
 */
export function planTransformation(request: TransformationRequest): TransformationPlan {
  const unchanged = planToItself(request);
  if (unchanged !== undefined) return unchanged;
  const source = placed(request.from, 'the coordinates');
  const target = placed(request.to, 'the result');
  refuseGrid(source.frame, target.frame);
  return planBetween(source, target, request.motion);
}

/**
 * A point taken along a plan.
 *
 * @throws UsageError when the point lies where one of the frames is not used
 */
export function transformByPlan(plan: TransformationPlan, ecef: Ecef): Ecef {
  requireInside(ecef, plan.frames);
  let at = ecef;
  for (const step of plan.steps) at = afterStep(at, step);
  return at;
}

/**
 * The same point in another frame, at another epoch, with every step on the way.
 *
 * @throws UsageError as `planTransformation` and `transformByPlan`; a frame that is not used at the
 *         point is named first, since asking for its epoch or a motion would lead astray
 */
export function transformPosition({
  ecef: start,
  ...request
}: TransformationRequest & {readonly ecef: Ecef}): Transformation {
  const plan = planToItself(request) ?? planAt(start, request);
  const trace = traceByPlan(plan, start);
  return {ecef: trace.at(-1)?.ecef ?? start, plan, trace};
}

/** Every step of a point along a plan whose frames are used where the point lies. */
export function traceByPlan({steps}: TransformationPlan, start: Ecef): TracedStep[] {
  const trace: TracedStep[] = [];
  let at = start;
  for (const step of steps) {
    const velocity = step.kind === 'motion' ? velocityOf(at, step.motion) : null;
    at = afterStep(at, step);
    trace.push({step, ecef: at, velocity});
  }
  return trace;
}

/**
 * Refuses a point where one of the frames named is not used, before anything else is asked.
 *
 * @throws UsageError that names the frame and its area
 */
export function requireUsedAt(point: Ecef, frameNames: readonly string[]): void {
  const frames = frameNames.map(findFrame).filter((frame) => frame !== undefined);
  requireInside(point, frames);
}

function planAt(start: Ecef, request: TransformationRequest): TransformationPlan {
  requireUsedAt(start, [request.from.frame, request.to.frame]);
  const plan = planTransformation(request);
  requireInside(start, plan.frames);
  return plan;
}

export interface Placed {
  readonly frame: Frame;
  readonly epoch: number;
}

/** A plan without the refusal of grid-based frames; for expectations that promise no coordinates. */
export function planBetween(
  source: Placed,
  target: Placed,
  motion: PointMotion | null,
): TransformationPlan {
  const sameEpoch = Math.abs(source.epoch - target.epoch) < SAME_EPOCH_YEARS;
  const via = sameEpoch ? null : viaOf(requiredMotion(motion, source, target));
  const steps =
    via === null
      ? frameSteps(source.frame, target.frame, source.epoch)
      : [
          ...frameSteps(source.frame, via.frame, source.epoch),
          movement(via, source.epoch, target.epoch),
          ...frameSteps(via.frame, target.frame, target.epoch),
        ];
  const uncertainties = steps.flatMap(uncertaintyOf);
  return {
    frame: target.frame.name,
    epoch: target.epoch,
    steps,
    frames: [source.frame, target.frame, ...(via === null ? [] : [via.frame])],
    uncertainties,
    standardUncertaintyM: combined(uncertainties),
  };
}

function planToItself({from, to}: TransformationRequest): TransformationPlan | undefined {
  refuseEnsemble(from.frame);
  refuseEnsemble(to.frame);
  const name = normalisedFrameName(from.frame);
  if (name === '' || name !== normalisedFrameName(to.frame)) return undefined;
  const known = findFrame(from.frame);
  const epoch = to.epoch ?? known?.fixedEpoch ?? null;
  if ((from.epoch ?? known?.fixedEpoch ?? null) !== epoch) return undefined;
  // Without an epoch a global frame does not say where the point is.
  if (epoch === null && known?.kind === 'global') return undefined;
  return {
    frame: known?.name ?? to.frame,
    epoch,
    steps: [],
    frames: [],
    uncertainties: [],
    standardUncertaintyM: {east: 0, north: 0, up: 0},
  };
}

/** The frame and epoch of one side, checked. */
export function placed({frame: name, epoch}: FrameAndEpoch, what: string): Placed {
  const frame = frameNamed(name);
  if (frame.fixedEpoch !== null) {
    if (epoch !== null && Math.abs(epoch - frame.fixedEpoch) > SAME_EPOCH_YEARS) {
      throw new UsageError(
        `coordinates in ${frame.name} belong to epoch ${frame.fixedEpoch}, found ${epoch}; write ` +
          `${frame.fixedEpoch}, or the global frame of those coordinates, such as ` +
          `${frame.parent?.parent ?? 'ITRF2020'}`,
      );
    }
    return {frame, epoch: frame.fixedEpoch};
  }
  if (epoch === null) {
    throw new UsageError(
      `need the coordinate epoch of ${what} in ${frame.name} as a decimal year, such as 2020.0: ` +
        'that of the base or network under corrections, the mean observing time only for precise ' +
        'point positioning, satellite augmentation and autonomous fixes',
    );
  }
  return {frame, epoch: checkedCoordinateEpoch(epoch)};
}

function requireInside(ecef: Ecef, frames: readonly Frame[]): void {
  if (frames.every(({area}) => area === null)) return;
  const {latitudeDeg, longitudeDeg} = geodeticFromEcef(ecef, GRS80);
  for (const {name, area} of frames) {
    if (area === null || isInside(latitudeDeg, longitudeDeg, area)) continue;
    throw new UsageError(
      `${name} is used between latitudes ${area.southDeg} and ${area.northDeg} and longitudes ` +
        `${area.westDeg} and ${area.eastDeg}; the point lies at ${latitudeDeg.toFixed(2)}, ` +
        `${longitudeDeg.toFixed(2)}; write the frame that is used there, or a global one such as ` +
        'ITRF2020',
    );
  }
}

export function isInside(latitudeDeg: number, longitudeDeg: number, area: Area): boolean {
  if (!(latitudeDeg >= area.southDeg && latitudeDeg <= area.northDeg)) return false;
  return area.westDeg <= area.eastDeg
    ? longitudeDeg >= area.westDeg && longitudeDeg <= area.eastDeg
    : longitudeDeg >= area.westDeg || longitudeDeg <= area.eastDeg;
}

function refuseGrid(...frames: readonly Frame[]): void {
  const grid = frames.find((frame) => frame.kind === 'grid-based');
  if (grid === undefined) return;
  throw new UsageError(
    `${grid.name} is tied to the global frames by a national grid of deformation that stillmark ` +
      'does not hold; transform the mark with the national service and write its ITRF2014 or ' +
      'ITRF2020 coordinates with their epoch',
  );
}

function requiredMotion(motion: PointMotion | null, source: Placed, target: Placed): PointMotion {
  if (motion !== null) return motion;
  const plateFixed = [source, target].find(({frame}) => frame.kind === 'plate-fixed');
  const rest = plateFixed?.frame.name ?? 'ETRF2014';
  throw new UsageError(
    `need the motion of the point from ${source.frame.name} at ${source.epoch} to ` +
      `${target.frame.name} at ${target.epoch}; write "at rest in ${rest}", a plate such as ` +
      '"plate EURA", or its velocity such as "enu 17.1 15.2 0.3 mm/yr in ITRF2020"',
  );
}

interface Via {
  readonly frame: Frame;
  readonly motion: PointMotion;
}

/** The frame in which the motion holds. */
function viaOf(motion: PointMotion): Via {
  return {frame: frameNamed(motion.kind === 'plate' ? motion.model.frame : motion.frame), motion};
}

function movement({frame, motion}: Via, fromEpoch: number, toEpoch: number): TransformationStep {
  const times = {frame: frame.name, fromEpoch, toEpoch};
  if (motion.kind === 'at rest') return {kind: 'at rest', ...times};
  const source =
    motion.kind === 'plate'
      ? `${motion.model.name}, plate ${motion.plate.code}: ${motion.model.source}`
      : 'given by the user';
  return {kind: 'motion', ...times, motion, source};
}

function afterStep(at: Ecef, step: TransformationStep): Ecef {
  switch (step.kind) {
    case 'coincident':
    case 'at rest':
      return at;
    case 'helmert':
      return step.inverted ? invertHelmert(at, step.parameters) : applyHelmert(at, step.parameters);
    case 'motion': {
      const velocity = velocityOf(at, step.motion);
      const years = step.toEpoch - step.fromEpoch;
      return {
        xM: at.xM + velocity.xM * years,
        yM: at.yM + velocity.yM * years,
        zM: at.zM + velocity.zM * years,
      };
    }
  }
}

function velocityOf(at: Ecef, motion: Exclude<PointMotion, {kind: 'at rest'}>): Ecef {
  switch (motion.kind) {
    case 'plate':
      return plateVelocity(at, motion.plate, motion.model);
    case 'geocentric velocity': {
      const {x, y, z} = motion.mPerYear;
      return {xM: x, yM: y, zM: z};
    }
    case 'local velocity': {
      const {east, north, up} = motion.mPerYear;
      return ecefVectorFromEnu({eastM: east, northM: north, upM: up}, localFrameAtEcef(at, GRS80));
    }
  }
}

/** The frame, its parent, and so on up to where nothing follows. */
function ancestry(frame: Frame): Frame[] {
  return frame.parent === null ? [frame] : [frame, ...ancestry(frameNamed(frame.parent.parent))];
}

/** The steps from one frame to another at one epoch, up to the common ancestor and down again. */
function frameSteps(from: Frame, to: Frame, epoch: number): TransformationStep[] {
  const up = ancestry(from);
  const down = ancestry(to);
  const meeting = up.find((frame) => down.includes(frame));
  if (meeting === undefined) {
    throw new UsageError(`no published parameters lead from ${from.name} to ${to.name}`);
  }
  const climb = up.slice(0, up.indexOf(meeting));
  const descent = down.slice(0, down.indexOf(meeting)).reverse();
  return [
    ...climb.flatMap((frame) => linkStep(frame, 'to parent', epoch)),
    ...descent.flatMap((frame) => linkStep(frame, 'from parent', epoch)),
  ];
}

function linkStep(
  {name, parent: link}: Frame,
  way: 'to parent' | 'from parent',
  epoch: number,
): TransformationStep[] {
  if (link === null) return [];
  const [from, to] = way === 'to parent' ? [name, link.parent] : [link.parent, name];
  const {set, source, standardUncertaintyM} = link;
  if (set === null) return [{kind: 'coincident', from, to, epoch, standardUncertaintyM, source}];
  return [
    {
      kind: 'helmert',
      from,
      to,
      epoch,
      set,
      inverted: way !== link.direction,
      parameters: helmertAt(set, epoch),
      standardUncertaintyM,
      source,
    },
  ];
}

function uncertaintyOf(step: TransformationStep): TransformationUncertainty[] {
  switch (step.kind) {
    case 'helmert':
    case 'coincident': {
      const u = step.standardUncertaintyM;
      if (u === 0) return [];
      return [
        {source: `${step.from} to ${step.to}`, standardUncertaintyM: {east: u, north: u, up: u}},
      ];
    }
    case 'at rest':
      return [motionUncertainty(step, `rest in ${step.frame}`, REST_M_PER_YEAR)];
    case 'motion': {
      if (step.motion.kind !== 'plate') return [];
      const {name, standardUncertaintyMPerYear} = step.motion.model;
      return [motionUncertainty(step, `motion by ${name}`, standardUncertaintyMPerYear)];
    }
  }
}

function motionUncertainty(
  {fromEpoch, toEpoch}: {readonly fromEpoch: number; readonly toEpoch: number},
  source: string,
  horizontalMPerYear: number,
): TransformationUncertainty {
  const years = Math.abs(toEpoch - fromEpoch);
  const horizontalM = horizontalMPerYear * years;
  return {
    source,
    standardUncertaintyM: {
      east: horizontalM,
      north: horizontalM,
      up: UNKNOWN_UP_M_PER_YEAR * years,
    },
  };
}

function combined(uncertainties: readonly TransformationUncertainty[]): PerAxis {
  const axis = (key: keyof PerAxis): number =>
    Math.hypot(0, ...uncertainties.map((row) => row.standardUncertaintyM[key]));
  return {east: axis('east'), north: axis('north'), up: axis('up')};
}
