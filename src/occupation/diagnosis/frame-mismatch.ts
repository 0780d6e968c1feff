import {UsageError} from '../../errors.ts';
import {FRAMES} from '../../geodesy/frame-table.ts';
import {type FrameAndEpoch, isInside} from '../../geodesy/frames.ts';
import {expectedMismatch} from '../../geodesy/mismatch.ts';
import type {Enu, Geodetic} from '../../geodesy/types.ts';
import type {DiagnosisInput} from './input.ts';

/** The frame that positions of today are in when nobody said anything else. */
export const TODAY = 'ITRF2020';

/** Realisations that no service and no authority hands out any more. */
const HISTORICAL = /^(ETRF(89|9\d)|ETRF2005|NAD83\(CSRS\)v[2-5]|NAD83\(CORS96\))$/;

export function placeOfMark({markPlan, ellipsoidalHeightM}: DiagnosisInput): Geodetic | null {
  return markPlan && {...markPlan, ellipsoidalHeightM: ellipsoidalHeightM ?? 0};
}

/** Frames that coordinates at a place may be in: the national and continental ones, and ITRF2020. */
export function framesAt(place: Geodetic): readonly string[] {
  const local = FRAMES.filter(
    ({kind, area, name}) =>
      (kind === 'plate-fixed' || kind === 'fixed epoch') &&
      area !== null &&
      isInside(place.latitudeDeg, place.longitudeDeg, area) &&
      !HISTORICAL.test(name),
  );
  return [TODAY, ...local.map(({name}) => name)];
}

/**
 * Measured minus reference when coordinates of two frames are compared as they stand.
 *
 * The side in a plate-fixed frame counts at the epoch of the other, since its coordinates are the
 * same at every epoch.
 *
 * @returns undefined where a frame is unknown, or the motion of the mark would be needed
 */
export function mismatchBetween(
  place: Geodetic,
  measured: FrameAndEpoch,
  reference: FrameAndEpoch,
  {motion, observedEpoch}: DiagnosisInput['frames'],
): Enu | undefined {
  try {
    return expectedMismatch({
      place,
      measured: atEpoch(measured, reference.epoch, observedEpoch),
      reference: atEpoch(reference, measured.epoch, observedEpoch),
      motion,
    });
  } catch (error) {
    if (error instanceof UsageError) return undefined;
    throw error;
  }
}

function atEpoch(
  {frame, epoch}: FrameAndEpoch,
  otherEpoch: number | null,
  observedEpoch: number,
): FrameAndEpoch {
  const known = FRAMES.find(({name}) => name === frame);
  if (known?.fixedEpoch != null) return {frame, epoch: known.fixedEpoch};
  if (known?.kind === 'plate-fixed') return {frame, epoch: otherEpoch ?? epoch ?? observedEpoch};
  return {frame, epoch: epoch ?? observedEpoch};
}
