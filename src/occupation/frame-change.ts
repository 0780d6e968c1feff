import type {Mark} from '../fieldbook/mark.ts';
import {type Ellipsoid, GRS80} from '../geodesy/ellipsoid.ts';
import {type TracedStep, type Transformation, transformPosition} from '../geodesy/frames.ts';
import {geodeticFromEcef} from '../geodesy/geocentric.ts';
import {enuFromEcef, localFrameAtEcef} from '../geodesy/local.ts';
import type {PointMotion} from '../geodesy/point-motion.ts';
import type {Ecef} from '../geodesy/types.ts';
import type {StatedContribution} from './budget.ts';
import type {FrameChange, FrameChangeStep, Position} from './result.ts';

/** A measured position taken into the frame and to the epoch of the mark. */
export interface Changed {
  readonly geodetic: Position['geodetic'];
  readonly change: FrameChange;
  /** null when nothing had to be done. */
  readonly contribution: StatedContribution | null;
}

/**
 * The measured position in the frame of the mark, at its epoch; undefined when nobody stated the
 * frame of the one or the other, or the record gives no ellipsoidal height: then nothing is
 * transformed, and the comparison says aloud what it assumes.
 *
 * @throws UsageError for frames that are not known, epochs or a motion that are missing, with what
 *         to write
 */
export function inFrameOfMark(
  position: Position,
  mark: Mark,
  motion: PointMotion | null,
  ellipsoid: Ellipsoid,
): Changed | undefined {
  const {frame, ecefM} = position;
  if (frame === null || mark.frame === undefined || ecefM === null) return undefined;
  const start = {xM: ecefM.x, yM: ecefM.y, zM: ecefM.z};
  const transformation = transformPosition({
    ecef: start,
    from: {frame, epoch: position.coordinateEpoch},
    to: {frame: mark.frame, epoch: mark.coordinateEpoch ?? null},
    motion: motion ?? motionOf(mark),
  });
  const geodetic = geodeticFromEcef(transformation.ecef, ellipsoid);
  const change = changeOf(position, mark, start, transformation);
  return {geodetic, change, contribution: contributionOf(change, transformation)};
}

/** The velocity that the marks file states, in the frame of the mark. */
function motionOf({velocity, frame}: Mark): PointMotion | null {
  if (velocity === undefined || frame === undefined) return null;
  if (velocity.axes === 'xyz') {
    const {xMPerYear: x, yMPerYear: y, zMPerYear: z} = velocity;
    return {kind: 'geocentric velocity', frame, mPerYear: {x, y, z}};
  }
  const {eastMPerYear: east, northMPerYear: north, upMPerYear: up} = velocity;
  return {kind: 'local velocity', frame, mPerYear: {east, north, up}};
}

function changeOf(
  position: Position,
  mark: Mark,
  start: Ecef,
  {plan, trace, ecef}: Transformation,
): FrameChange {
  return {
    fromFrame: position.frame ?? '',
    fromEpoch: position.coordinateEpoch,
    toFrame: plan.frame,
    toEpoch: plan.epoch ?? mark.coordinateEpoch ?? null,
    steps: trace.map(frameChangeStep),
    ecefM: {x: ecef.xM, y: ecef.yM, z: ecef.zM},
    mismatchM: mismatchOf(start, ecef),
    standardUncertaintyM: plan.standardUncertaintyM,
  };
}

function mismatchOf(before: Ecef, after: Ecef): FrameChange['mismatchM'] {
  const {eastM, northM, upM} = enuFromEcef(before, localFrameAtEcef(after, GRS80));
  return {east: eastM, north: northM, up: upM};
}

function contributionOf(
  {fromFrame, toFrame, steps}: FrameChange,
  {plan}: Transformation,
): StatedContribution | null {
  if (steps.length === 0) return null;
  return {
    standardUncertaintyM: plan.standardUncertaintyM,
    id: `${fromFrame} to ${toFrame}`,
    from: plan.uncertainties.map(({source}) => source).join('; '),
  };
}

/** One line of the hand calculation: every parameter under the name and unit of its publication. */
export function frameChangeStep({step, ecef, velocity}: TracedStep): FrameChangeStep {
  const after = {x: ecef.xM, y: ecef.yM, z: ecef.zM};
  switch (step.kind) {
    case 'helmert': {
      const {translationMm, scalePpb, rotationMas} = step.parameters;
      const inverted = step.inverted ? ', in the opposite direction' : '';
      return {
        what: `similarity, position vector${inverted}`,
        from: step.from,
        to: step.to,
        epoch: step.epoch,
        parameters: {
          translationXMm: translationMm[0],
          translationYMm: translationMm[1],
          translationZMm: translationMm[2],
          scalePpb,
          rotationXMas: rotationMas[0],
          rotationYMas: rotationMas[1],
          rotationZMas: rotationMas[2],
        },
        ecefM: after,
        source: step.source,
      };
    }
    case 'coincident':
      return {
        what: 'same within their uncertainty',
        from: step.from,
        to: step.to,
        epoch: step.epoch,
        parameters: {},
        ecefM: after,
        source: step.source,
      };
    case 'motion':
      return {
        what: `motion from ${step.fromEpoch} to ${step.toEpoch}`,
        from: step.frame,
        to: step.frame,
        epoch: step.toEpoch,
        parameters: {
          velocityXMPerYear: velocity?.xM ?? 0,
          velocityYMPerYear: velocity?.yM ?? 0,
          velocityZMPerYear: velocity?.zM ?? 0,
        },
        ecefM: after,
        source: step.source,
      };
    case 'at rest':
      return {
        what: `at rest from ${step.fromEpoch} to ${step.toEpoch}`,
        from: step.frame,
        to: step.frame,
        epoch: step.toEpoch,
        parameters: {},
        ecefM: after,
        source: 'stated by the user',
      };
  }
}
