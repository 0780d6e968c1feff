import type {Hypothesis} from '../hypothesis.ts';
import {misreadAngle} from '../misread-angle.ts';

/** Decimal degrees dd.ffff read as minutes ddff.ff: the fraction over 60 instead of over 100. */
export const decimalsAsMinutes: Hypothesis = {
  code: 'H06',
  predict: (input) =>
    misreadAngle(input, {
      misread: (degrees) => Math.floor(degrees) + (degrees % 1) / 0.6,
      // Minutes of 60 to 99 carry into the next degree: two true angles can read the same.
      truths: (degrees) =>
        [Math.floor(degrees), Math.floor(degrees) - 1]
          .map((whole) => ({whole, fraction: (degrees - whole) * 0.6}))
          .filter(({whole, fraction}) => whole >= 0 && fraction < 1)
          .map(({whole, fraction}) => whole + fraction),
    }),
};
