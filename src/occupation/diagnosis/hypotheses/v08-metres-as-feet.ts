import {heightInOtherUnit} from '../height-in-other-unit.ts';
import type {Hypothesis} from '../hypothesis.ts';

/** A height in metres taken as feet: dU = h (1 − 0.3048), h the true height. */
export const metresAsFeet: Hypothesis = {
  code: 'V08',
  predict: (input) => heightInOtherUnit(input, 0.3048),
};
