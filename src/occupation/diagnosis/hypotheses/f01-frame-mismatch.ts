import type {FrameAndEpoch} from '../../../geodesy/frames.ts';
import type {Geodetic} from '../../../geodesy/types.ts';
import {framesAt, mismatchBetween, placeOfMark, TODAY} from '../frame-mismatch.ts';
import {
  type CauseValues,
  type Hypothesis,
  notTested,
  type Prediction,
  predicted,
  vector,
} from '../hypothesis.ts';
import type {DiagnosisInput, FrameFacts} from '../input.ts';

/** National coordinates follow their published parameters to about this: common practice, no source. */
const REALISATION_SIGMA_M = 0.01;
/** Frames nearer than this to each other need no transformation. */
const SAME_M = 0.001;

/**
 * The frame of one side is not the one it was compared in. Log really in X instead of A: the offset
 * of X against A. Mark really in Y instead of B: the offset of B against Y.
 */
export const frameMismatch: Hypothesis = {
  code: 'F01',
  predict: (input) => {
    const place = placeOfMark(input);
    if (place === null) return notTested('no-plan');
    const predictions = sidesOf(input.frames, place).flatMap((sides) =>
      toPrediction(input, place, sides),
    );
    return predictions.length === 0 ? notTested('no-frame') : predicted(predictions);
  },
};

interface Sides {
  readonly measured: FrameAndEpoch;
  readonly reference: FrameAndEpoch;
  readonly values: CauseValues;
}

/** The pairs of frames that would leave an offset, each once. */
function sidesOf(frames: FrameFacts, place: Geodetic): Sides[] {
  const {measured, reference, transformed, observedEpoch} = frames;
  const compared = measured ?? reference ?? {frame: TODAY, epoch: observedEpoch};
  const target = reference ?? compared;
  const possible: FrameAndEpoch[] = framesAt(place).map((frame) => ({
    frame,
    epoch: frame === TODAY ? observedEpoch : null,
  }));
  const differ = measured !== null && reference !== null && measured.frame !== reference.frame;
  const untouched =
    differ && !transformed
      ? [
          {
            measured,
            reference,
            values: {side: 'both', frame: measured.frame, other: reference.frame},
          },
        ]
      : [];
  return [
    ...untouched,
    ...possible
      .filter(({frame}) => frame !== compared.frame)
      .map((other) => ({
        measured: other,
        reference: compared,
        values: {side: 'measured', frame: other.frame, other: compared.frame},
      })),
    ...possible
      .filter(({frame}) => frame !== target.frame)
      .map((other) => ({
        measured: target,
        reference: other,
        values: {side: 'mark', frame: other.frame, other: target.frame},
      })),
  ];
}

function toPrediction(input: DiagnosisInput, place: Geodetic, sides: Sides): Prediction[] {
  const offset = mismatchBetween(place, sides.measured, sides.reference, input.frames);
  if (offset === undefined || Math.hypot(offset.eastM, offset.northM, offset.upM) < SAME_M)
    return [];
  return [vector(offset, REALISATION_SIGMA_M, REALISATION_SIGMA_M, sides.values)];
}
