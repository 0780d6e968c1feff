import {heightInOtherUnit} from '../height-in-other-unit.ts';
import type {Hypothesis} from '../hypothesis.ts';

/** A height in feet taken as metres: dU = h (1 − 1/0.3048), h the true height. */
export const feetAsMetres: Hypothesis = {
  code: 'V07',
  predict: (input) => heightInOtherUnit(input, 1 / 0.3048),
};
