import type {Enu, Geodetic} from '../../geodesy/types.ts';
import {framesAt, mismatchBetween, TODAY} from './frame-mismatch.ts';
import type {DiagnosisInput} from './input.ts';

/** Frames of one place that move apart faster than this do not move with one plate. */
const AGREE_M_PER_YEAR = 0.005;
const YEARS = 10;

/**
 * Velocity of the mark in a global frame, east, north and up per year: as stated, else that of the
 * plate-fixed frames of the place, as long as they agree.
 */
export function velocityOfMark(input: DiagnosisInput, place: Geodetic): Enu | undefined {
  const {frames} = input;
  if (frames.motion !== null) return between(input, place, TODAY);
  const rates = framesAt(place)
    .filter((frame) => frame !== TODAY)
    .flatMap((frame) => between(input, place, frame) ?? []);
  const [first] = rates;
  if (first === undefined) return undefined;
  const agree = rates.every(
    ({eastM, northM}) => Math.hypot(eastM - first.eastM, northM - first.northM) <= AGREE_M_PER_YEAR,
  );
  return agree ? first : undefined;
}

/** How ITRF2020 coordinates of the place change against a frame in a year. */
function between(input: DiagnosisInput, place: Geodetic, frame: string): Enu | undefined {
  const {observedEpoch} = input.frames;
  const at = (epoch: number): Enu | undefined =>
    mismatchBetween(
      place,
      {frame: TODAY, epoch},
      {frame, epoch: frame === TODAY ? observedEpoch : null},
      input.frames,
    );
  const start = at(observedEpoch);
  const end = at(observedEpoch + YEARS);
  if (start === undefined || end === undefined) return undefined;
  return {
    eastM: (end.eastM - start.eastM) / YEARS,
    northM: (end.northM - start.northM) / YEARS,
    upM: (end.upM - start.upM) / YEARS,
  };
}

/** The offset that the motion of so many years makes. */
export function moved({eastM, northM, upM}: Enu, years: number): Enu {
  return {eastM: eastM * years, northM: northM * years, upM: upM * years};
}
