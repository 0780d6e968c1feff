import {UsageError} from '../errors.ts';
import {type Ellipsoid, GRS80, WGS84} from '../geodesy/ellipsoid.ts';
import {findFrame} from '../geodesy/frame-names.ts';
import {
  type FrameAndEpoch,
  planTransformation,
  requireUsedAt,
  type TracedStep,
  type TransformationPlan,
  traceByPlan,
  transformByPlan,
} from '../geodesy/frames.ts';
import type {PointMotion} from '../geodesy/point-motion.ts';
import type {Ecef, Geodetic} from '../geodesy/types.ts';
import {type Form, parseForm, type Triple} from './form.ts';

/** What is asked for, as text where a text names it. */
export interface ConversionRequest {
  readonly from: string;
  readonly to: string;
  /** Frame of the given coordinates; null: not stated. */
  readonly fromFrame: string | null;
  readonly fromEpoch: number | null;
  /** null: the frame of the given coordinates. */
  readonly toFrame: string | null;
  /** null: the epoch of the given coordinates, unless the frame has its own. */
  readonly toEpoch: number | null;
  readonly motion: PointMotion | null;
  /** null: GRS 80 with a stated frame other than a realisation of WGS 84, else WGS 84. */
  readonly ellipsoid: Ellipsoid | null;
  readonly origin: Geodetic | null;
}

/** A way from one form, frame and epoch to another, ready for any number of positions. */
export interface Conversion {
  readonly from: Form;
  readonly to: Form;
  /** Where the given coordinates belong; null when no frame is stated. */
  readonly given: FrameAndEpoch | null;
  /** null when no frame is stated: then the frame stays what it is. */
  readonly plan: TransformationPlan | null;
  /**
   * One position.
   *
   * @throws UsageError for a position that has no answer, with the reason
   */
  readonly convert: (values: Triple) => Triple;
  /** The same position on the far side, for the factors of a grid. */
  readonly geodeticAfter: (values: Triple) => Geodetic;
  /** Every step between frames, for a hand calculation; empty where the frame stays. */
  readonly trace: (values: Triple) => readonly TracedStep[];
}

/**
 * Plans a conversion.
 *
 * A position that is known beforehand is held against the areas of the frames first: asking for an
 * epoch or a motion where a frame is not used would lead astray.
 *
 * Method: where only the form changes, geodetic positions stay geodetic and geocentric ones
 * geocentric as long as they can, so that nothing is lost to rounding; where the frame or epoch
 * changes, the way leads through geocentric coordinates (`geodesy/frames.ts`).
 *
 * @throws UsageError for whatever is missing or contradicts itself, with what to write
 */
export function planConversion(
  request: ConversionRequest,
  known: (form: Form) => readonly Triple[] = () => [],
): Conversion {
  const ellipsoid = request.ellipsoid ?? ellipsoidOf(request);
  const {origin} = request;
  const toFrame = request.toFrame ?? request.fromFrame;
  const from = parseForm(request.from, {ellipsoid, origin, frame: request.fromFrame});
  const to = parseForm(request.to, {ellipsoid, origin, frame: toFrame});
  const frames = [request.fromFrame, toFrame].filter((frame) => frame !== null);
  for (const values of frames.length === 0 ? [] : known(from)) {
    requireUsedAt(requirePlausible(from.toEcef(values)), frames);
  }
  const plan = framePlan(request);
  const changesFrame = plan !== null && plan.steps.length > 0;
  if (changesFrame && from.kind === 'local' && to.kind === 'local') {
    throw new UsageError(
      'local coordinates in two frames have two origins; convert to geodetic first, and from there ' +
        'to local with the origin of the other frame',
    );
  }
  const fromEcef = from.kind === 'geocentric' || from.kind === 'local' || changesFrame;
  const ecefAfter = (values: Triple): Ecef => {
    const point = requirePlausible(from.toEcef(values));
    return plan === null ? point : transformByPlan(plan, point);
  };
  return {
    from,
    to,
    given: request.fromFrame === null ? null : placeOf(request.fromFrame, request.fromEpoch),
    plan,
    convert: fromEcef
      ? (values) => to.fromEcef(ecefAfter(values))
      : (values) => to.fromGeodetic(from.toGeodetic(values)),
    geodeticAfter: fromEcef
      ? (values) => geodetic(ellipsoid).toGeodetic(geodetic(ellipsoid).fromEcef(ecefAfter(values)))
      : from.toGeodetic,
    trace: (values) => (changesFrame ? traceByPlan(plan, from.toEcef(values)) : []),
  };
}

function geodetic(ellipsoid: Ellipsoid): Form {
  return parseForm('geodetic', {ellipsoid, frame: null, origin: null});
}

function framePlan(request: ConversionRequest): TransformationPlan | null {
  const {fromFrame, toFrame, fromEpoch, toEpoch, motion} = request;
  if (fromFrame === null) {
    if (toFrame === null && fromEpoch === null && toEpoch === null && motion === null) return null;
    throw new UsageError(
      'need the frame of the given coordinates; write --from-frame, such as --from-frame ITRF2020 ' +
        '(and --from-epoch)',
    );
  }
  const target = toFrame ?? fromFrame;
  const ofTarget = findFrame(target)?.fixedEpoch ?? null;
  const from: FrameAndEpoch = {frame: fromFrame, epoch: fromEpoch};
  const to: FrameAndEpoch = {frame: target, epoch: toEpoch ?? ofTarget ?? fromEpoch};
  return planTransformation({from, to, motion});
}

function placeOf(frame: string, epoch: number | null): FrameAndEpoch {
  const known = findFrame(frame);
  return {frame: known?.name ?? frame, epoch: epoch ?? known?.fixedEpoch ?? null};
}

function ellipsoidOf({fromFrame, toFrame}: ConversionRequest): Ellipsoid {
  const frames = [fromFrame, toFrame].filter((frame) => frame !== null);
  return frames.some((frame) => !/^WGS\s*-?84/i.test(frame.trim())) ? GRS80 : WGS84;
}

/** From below the deepest trench to above any mark, about the mean radius; common practice. */
const NEAREST_M = 6_340_000;
const FARTHEST_M = 6_480_000;

function requirePlausible(point: Ecef): Ecef {
  const radiusM = Math.hypot(point.xM, point.yM, point.zM);
  if (radiusM > NEAREST_M && radiusM < FARTHEST_M) return point;
  throw new UsageError(
    `need a position near the ground, found one ${(radiusM / 1000).toFixed(1)} km from the centre ` +
      'of the Earth; check the unit (metres) and the order of the columns',
  );
}
