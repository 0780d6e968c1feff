import {type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';

/** Calibrations give the phase centre to a few millimetres: common practice, no source. */
const ANTENNA_DRAWING_SIGMA_M = 0.003;

/** Reference point, slant mark and phase centre of the antenna confused: dU = ±p or ±o. */
export const otherPointOfAntenna: Hypothesis = {
  code: 'V06',
  predict: ({antenna}) => {
    const points = [
      {point: 'phase centre', aboveM: antenna?.phaseCentreAboveArpM ?? 0},
      {point: 'slant mark', aboveM: antenna?.slantMarkAboveArpM ?? 0},
    ].filter(({aboveM}) => aboveM !== 0);
    if (points.length === 0) return notTested('no-phase-centre');
    return predicted(
      points.flatMap(({point, aboveM}) =>
        [1, -1].map((sign) =>
          upward(sign * aboveM, ANTENNA_DRAWING_SIGMA_M, {point, aboveM, leftOut: sign > 0}),
        ),
      ),
    );
  },
};
