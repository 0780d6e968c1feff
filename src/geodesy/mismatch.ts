import {GRS80} from './ellipsoid.ts';
import {FRAMES} from './frame-table.ts';
import {type FrameAndEpoch, isInside, placed, planBetween, transformByPlan} from './frames.ts';
import {ecefFromGeodetic} from './geocentric.ts';
import {enuFromEcefVector, localFrame} from './local.ts';
import {type Plate, type PlateMotionModel, plateVelocity} from './plates.ts';
import type {PointMotion} from './point-motion.ts';
import type {Enu, Geodetic} from './types.ts';

/**
 * The offset that a check shows when coordinates of one frame and epoch are compared with those of
 * another without transforming: measured minus reference, east, north, up.
 *
 * An expectation to hold an observed offset against, never a correction: grid-based frames count as
 * the global frame they started from, without the deformation since.
 *
 * @throws UsageError as `transformPosition` does for unknown frames and missing epochs or motion
 */
export function expectedMismatch({
  place,
  measured,
  reference,
  motion,
}: {
  readonly place: Geodetic;
  readonly measured: FrameAndEpoch;
  readonly reference: FrameAndEpoch;
  readonly motion: PointMotion | null;
}): Enu {
  const ecef = ecefFromGeodetic(place, GRS80);
  const plan = planBetween(
    placed(measured, 'the measured position'),
    placed(reference, 'the reference'),
    motion,
  );
  const inReference = transformByPlan(plan, ecef);
  return enuFromEcefVector(
    {
      xM: ecef.xM - inReference.xM,
      yM: ecef.yM - inReference.yM,
      zM: ecef.zM - inReference.zM,
    },
    localFrame(place, GRS80),
  );
}

/** A frame in which the mark might be, and the offset that this would show. */
export interface PlausibleMismatch {
  readonly frame: string;
  readonly mismatch: Enu;
}

/**
 * What the offset would be if the mark were in one of the plate-fixed frames in use at the place.
 *
 * At equal epochs, so that no motion is needed: coordinates at rest in a plate-fixed frame are the
 * same at every epoch.
 */
export function plausibleMismatches(place: Geodetic, measured: FrameAndEpoch): PlausibleMismatch[] {
  return FRAMES.filter(
    ({kind, area}) =>
      kind === 'plate-fixed' &&
      area !== null &&
      isInside(place.latitudeDeg, place.longitudeDeg, area),
  ).map(({name}) => ({
    frame: name,
    mismatch: expectedMismatch({
      place,
      measured,
      reference: {frame: name, epoch: measured.epoch},
      motion: null,
    }),
  }));
}

/** Velocity of a place with a plate, east, north and up in metres per year. */
export function plateVelocityEnu(place: Geodetic, plate: Plate, model: PlateMotionModel): Enu {
  return enuFromEcefVector(
    plateVelocity(ecefFromGeodetic(place, GRS80), plate, model),
    localFrame(place, GRS80),
  );
}
