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
  readonly ecef: Ecef;
  readonly from: FrameAndEpoch;
  readonly to: FrameAndEpoch;
  /** null: not said; an error when the epochs differ. */
  readonly motion: PointMotion | null;
}

/** One line of a hand calculation; `ecef` is the position after it. */
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
      readonly source: string;
      readonly ecef: Ecef;
    }
  | {
      readonly kind: 'coincident';
      readonly from: string;
      readonly to: string;
      readonly epoch: number;
      readonly source: string;
      readonly ecef: Ecef;
    }
  | {
      readonly kind: 'motion';
      readonly frame: string;
      readonly fromEpoch: number;
      readonly toEpoch: number;
      readonly velocityMPerYear: Ecef;
      readonly source: string;
      readonly ecef: Ecef;
    }
  | {
      readonly kind: 'at rest';
      readonly frame: string;
      readonly fromEpoch: number;
      readonly toEpoch: number;
      readonly ecef: Ecef;
    };

/** A systematic contribution: the same for every mark that is transformed so. */
export interface TransformationUncertainty {
  readonly source: string;
  readonly standardUncertaintyM: {
    readonly east: number;
    readonly north: number;
    readonly up: number;
  };
}

export interface Transformation {
  readonly ecef: Ecef;
  readonly frame: string;
  readonly epoch: number | null;
  readonly steps: readonly TransformationStep[];
  readonly uncertainties: readonly TransformationUncertainty[];
  /** Root of the sum of squares of `uncertainties`. */
  readonly standardUncertaintyM: TransformationUncertainty['standardUncertaintyM'];
}

/** Vertical motion that a plate model cannot know, per year; from memory, no source. */
const UNKNOWN_UP_M_PER_YEAR = 0.002;

/** Below this two epochs are the same: 1e-6 years are half a minute. */
const SAME_EPOCH_YEARS = 1e-6;

/**
 * The same point in another frame, at another epoch.
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
export function transformPosition(request: TransformationRequest): Transformation {
  const unchanged = transformationToItself(request);
  if (unchanged !== undefined) return unchanged;
  const source = placed(request.from, request.ecef, 'the coordinates');
  const target = placed(request.to, request.ecef, 'the result');
  refuseGrid(source.frame, target.frame);
  return transformBetween(request.ecef, source, target, request.motion);
}

export interface Placed {
  readonly frame: Frame;
  readonly epoch: number;
}

/** The work itself, without the refusals; for expectations that promise no coordinates. */
export function transformBetween(
  ecef: Ecef,
  source: Placed,
  target: Placed,
  motion: PointMotion | null,
): Transformation {
  const steps =
    Math.abs(source.epoch - target.epoch) < SAME_EPOCH_YEARS
      ? frameSteps(ecef, source.frame, target.frame, source.epoch)
      : stepsThroughTime(ecef, source, target, requiredMotion(motion, source, target));
  const uncertainties = steps.flatMap((step) => uncertaintyOf(step, motion));
  return {
    ecef: steps.at(-1)?.ecef ?? ecef,
    frame: target.frame.name,
    epoch: target.epoch,
    steps,
    uncertainties,
    standardUncertaintyM: combined(uncertainties),
  };
}

function transformationToItself({
  ecef,
  from,
  to,
}: TransformationRequest): Transformation | undefined {
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
    ecef,
    frame: known?.name ?? to.frame,
    epoch,
    steps: [],
    uncertainties: [],
    standardUncertaintyM: {east: 0, north: 0, up: 0},
  };
}

/** The frame and epoch of one side, checked. */
export function placed({frame: name, epoch}: FrameAndEpoch, ecef: Ecef, what: string): Placed {
  const frame = frameNamed(name);
  requireInside(ecef, frame);
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

function requireInside(ecef: Ecef, {name, area}: Frame): void {
  if (area === null) return;
  const {latitudeDeg, longitudeDeg} = geodeticFromEcef(ecef, GRS80);
  if (isInside(latitudeDeg, longitudeDeg, area)) return;
  throw new UsageError(
    `${name} is used between latitudes ${area.southDeg} and ${area.northDeg} and longitudes ` +
      `${area.westDeg} and ${area.eastDeg}; the point lies at ${latitudeDeg.toFixed(2)}, ` +
      `${longitudeDeg.toFixed(2)}; write the frame that is used there, or a global one such as ITRF2020`,
  );
}

export function isInside(latitudeDeg: number, longitudeDeg: number, area: Area): boolean {
  if (latitudeDeg < area.southDeg || latitudeDeg > area.northDeg) return false;
  return area.westDeg <= area.eastDeg
    ? longitudeDeg >= area.westDeg && longitudeDeg <= area.eastDeg
    : longitudeDeg >= area.westDeg || longitudeDeg <= area.eastDeg;
}

function refuseGrid(...frames: readonly Frame[]): void {
  const grid = frames.find((frame) => frame.kind === 'grid-based');
  if (grid === undefined) return;
  throw new UsageError(
    `${grid.name} is tied to the global frames by a national grid of deformation that stillmark does ` +
      'not hold; transform the mark with the national service and write its ITRF2014 or ITRF2020 ' +
      'coordinates with their epoch',
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

function stepsThroughTime(
  ecef: Ecef,
  source: Placed,
  target: Placed,
  motion: PointMotion,
): TransformationStep[] {
  const via = frameNamed(motion.kind === 'plate' ? motion.model.frame : motion.frame);
  requireInside(ecef, via);
  const before = frameSteps(ecef, source.frame, via, source.epoch);
  const start = before.at(-1)?.ecef ?? ecef;
  const move = movement(start, via.name, motion, source.epoch, target.epoch);
  return [...before, move, ...frameSteps(move.ecef, via, target.frame, target.epoch)];
}

function movement(
  start: Ecef,
  frame: string,
  motion: PointMotion,
  fromEpoch: number,
  toEpoch: number,
): TransformationStep {
  if (motion.kind === 'at rest') return {kind: 'at rest', frame, fromEpoch, toEpoch, ecef: start};
  const velocity = velocityOf(start, motion);
  const years = toEpoch - fromEpoch;
  return {
    kind: 'motion',
    frame,
    fromEpoch,
    toEpoch,
    velocityMPerYear: velocity,
    source:
      motion.kind === 'plate'
        ? `${motion.model.name}, plate ${motion.plate.code}: ${motion.model.source}`
        : 'given by the user',
    ecef: {
      xM: start.xM + velocity.xM * years,
      yM: start.yM + velocity.yM * years,
      zM: start.zM + velocity.zM * years,
    },
  };
}

function velocityOf(start: Ecef, motion: Exclude<PointMotion, {kind: 'at rest'}>): Ecef {
  switch (motion.kind) {
    case 'plate':
      return plateVelocity(start, motion.plate, motion.model);
    case 'geocentric velocity': {
      const {x, y, z} = motion.mPerYear;
      return {xM: x, yM: y, zM: z};
    }
    case 'local velocity': {
      const {east, north, up} = motion.mPerYear;
      const frame = localFrameAtEcef(start, GRS80);
      return ecefVectorFromEnu({eastM: east, northM: north, upM: up}, frame);
    }
  }
}

/** The frame, its parent, and so on up to where nothing follows. */
function ancestry(frame: Frame): Frame[] {
  const line = [frame];
  for (let link = frame.parent; link !== null; link = line.at(-1)!.parent) {
    line.push(frameNamed(link.parent));
  }
  return line;
}

/** The steps from one frame to another at one epoch, up to the common ancestor and down again. */
function frameSteps(ecef: Ecef, from: Frame, to: Frame, epoch: number): TransformationStep[] {
  const up = ancestry(from);
  const down = ancestry(to);
  const meeting = up.find((frame) => down.includes(frame));
  if (meeting === undefined) {
    throw new UsageError(`no published parameters lead from ${from.name} to ${to.name}`);
  }
  const climb = up.slice(0, up.indexOf(meeting));
  const descent = down.slice(0, down.indexOf(meeting)).reverse();
  const steps: TransformationStep[] = [];
  let at = ecef;
  for (const [frames, toParent] of [
    [climb, true],
    [descent, false],
  ] as const) {
    for (const frame of frames) {
      const step = linkStep(at, frame, toParent, epoch);
      steps.push(step);
      at = step.ecef;
    }
  }
  return steps;
}

function linkStep(ecef: Ecef, frame: Frame, toParent: boolean, epoch: number): TransformationStep {
  const link = frame.parent;
  if (link === null) throw new RangeError(`linkStep: ${frame.name} has no parent`);
  const from = toParent ? frame.name : link.parent;
  const to = toParent ? link.parent : frame.name;
  if (link.set === null) {
    return {kind: 'coincident', from, to, epoch, source: link.source, ecef};
  }
  const inverted = toParent !== (link.direction === 'to parent');
  const parameters = helmertAt(link.set, epoch);
  return {
    kind: 'helmert',
    from,
    to,
    epoch,
    set: link.set,
    inverted,
    parameters,
    source: link.source,
    ecef: inverted ? invertHelmert(ecef, parameters) : applyHelmert(ecef, parameters),
  };
}

function uncertaintyOf(
  step: TransformationStep,
  motion: PointMotion | null,
): TransformationUncertainty[] {
  if (step.kind === 'helmert' || step.kind === 'coincident') {
    // The child of the link is the side whose parent is the other.
    const from = frameNamed(step.from);
    const link = from.parent?.parent === step.to ? from.parent : frameNamed(step.to).parent;
    const u = link?.standardUncertaintyM ?? 0;
    if (u === 0) return [];
    return [
      {source: `${step.from} to ${step.to}`, standardUncertaintyM: {east: u, north: u, up: u}},
    ];
  }
  if (
    motion === null ||
    motion.kind === 'geocentric velocity' ||
    motion.kind === 'local velocity'
  ) {
    return [];
  }
  const years = Math.abs(step.toEpoch - step.fromEpoch);
  const rate = motion.kind === 'plate' ? motion.model.standardUncertaintyMPerYear : REST_M_PER_YEAR;
  const horizontal = rate * years;
  return [
    {
      source: motion.kind === 'plate' ? `motion by ${motion.model.name}` : `rest in ${step.frame}`,
      standardUncertaintyM: {
        east: horizontal,
        north: horizontal,
        up: UNKNOWN_UP_M_PER_YEAR * years,
      },
    },
  ];
}

/** A mark at rest in a plate-fixed frame is as still as plate models fit: 0.25 mm per year. */
const REST_M_PER_YEAR = 0.00025;

function combined(
  uncertainties: readonly TransformationUncertainty[],
): TransformationUncertainty['standardUncertaintyM'] {
  const axis = (key: 'east' | 'north' | 'up'): number =>
    Math.hypot(0, ...uncertainties.map((row) => row.standardUncertaintyM[key]));
  return {east: axis('east'), north: axis('north'), up: axis('up')};
}
