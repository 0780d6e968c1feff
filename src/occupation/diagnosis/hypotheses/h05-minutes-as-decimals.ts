import type {Hypothesis} from '../hypothesis.ts';
import {misreadAngle} from '../misread-angle.ts';

/** ddmm.mmmm read as dd.mmmmmm: minutes over 100 instead of over 60. */
export const minutesAsDecimals: Hypothesis = {
  code: 'H05',
  predict: (input) =>
    misreadAngle(input, {
      misread: (degrees) => Math.floor(degrees) + (degrees % 1) * 0.6,
      truths: (degrees) => (degrees % 1 < 0.6 ? [Math.floor(degrees) + (degrees % 1) / 0.6] : []),
    }),
};
