import type {Enu} from '../../../geodesy/types.ts';
import {placeOfMark} from '../frame-mismatch.ts';
import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  type Prediction,
  predicted,
  vector,
} from '../hypothesis.ts';
import type {DiagnosisInput, FrameFacts} from '../input.ts';
import {moved, velocityOfMark} from '../velocity-of-mark.ts';

/** Velocities of plate models, in the stable interior of a plate. */
const VELOCITY_SIGMA_M_PER_YEAR = 0.0005;
/** Vertical motion that a plate model does not know: common practice, no source. */
const UP_SIGMA_M_PER_YEAR = 0.002;
/** No coordinates in use are older than satellite geodesy. */
const MOST_YEARS = 40;

/**
 * Coordinates of two epochs compared as they stand: velocity times the years between them. Without
 * both epochs the years are taken from the offset, and only its direction is tested.
 */
export const epochMismatch: Hypothesis = {
  code: 'F02',
  predict: (input) => {
    const place = placeOfMark(input);
    if (place === null) return notTested('no-plan');
    const velocity = velocityOfMark(input, place);
    if (velocity === undefined) return notTested('no-velocity');
    const known = yearsBetween(input.frames).map((years) =>
      vector(
        moved(velocity, years),
        VELOCITY_SIGMA_M_PER_YEAR * Math.abs(years),
        UP_SIGMA_M_PER_YEAR * Math.abs(years),
        {years, known: true},
      ),
    );
    const unknown = alongVelocity(input, velocity);
    const predictions = [...known, ...unknown];
    return predictions.length === 0 ? notTested('no-epochs') : predicted(predictions);
  },
};

/** The spans that could have been forgotten, and each the wrong way round. */
function yearsBetween({measured, reference, observedEpoch}: FrameFacts): number[] {
  const epochs = [measured?.epoch, reference?.epoch, observedEpoch].filter(
    (epoch) => epoch != null,
  );
  const spans = epochs.flatMap((first, i) => epochs.slice(i + 1).map((second) => second - first));
  const distinct = [...new Set(spans.map((years) => Math.abs(years)))].filter(
    (years) => years > 0.05,
  );
  return distinct.flatMap((years) => [years, -years]);
}

function alongVelocity(input: DiagnosisInput, velocity: Enu): Prediction[] {
  const {eastM, northM} = comparedOffset(input);
  const speed2 = velocity.eastM ** 2 + velocity.northM ** 2;
  if (!(speed2 > 0)) return [];
  const years = (eastM * velocity.eastM + northM * velocity.northM) / speed2;
  if (years === 0 || Math.abs(years) > MOST_YEARS) return [];
  return [
    fitted(
      vector(
        moved(velocity, years),
        VELOCITY_SIGMA_M_PER_YEAR * Math.abs(years),
        UP_SIGMA_M_PER_YEAR * Math.abs(years),
        {
          years,
          known: false,
        },
      ),
      1,
    ),
  ];
}
