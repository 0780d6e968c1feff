import {heightInOtherUnit} from '../height-in-other-unit.ts';
import type {Hypothesis} from '../hypothesis.ts';

/** No antenna stands higher than a mast of this height: a booked 2 m are not 200 m in truth. */
const HIGHEST_M = 20;

/** A height in metres taken as centimetres: dU = 0.99 h, h the true height. */
export const metresAsCentimetres: Hypothesis = {
  code: 'V09',
  predict: (input) => heightInOtherUnit(input, 0.01, (trueM) => trueM > HIGHEST_M),
};
