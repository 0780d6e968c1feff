import type {Hypothesis} from '../hypothesis.ts';
import {misreadAngle} from '../misread-angle.ts';

/** Packed degrees, minutes and seconds dd.mmss read as decimal degrees. */
export const packedAsDecimals: Hypothesis = {
  code: 'H07',
  predict: (input) =>
    misreadAngle(input, {
      misread: (degrees) => {
        const minutes = Math.floor((degrees % 1) * 60 + ROUND_OFF);
        const seconds = (degrees % 1) * 3600 - minutes * 60;
        return Math.floor(degrees) + minutes / 100 + seconds / 10_000;
      },
      truths: (degrees) => {
        const minutes = Math.floor((degrees % 1) * 100 + ROUND_OFF);
        const seconds = (degrees % 1) * 10_000 - minutes * 100;
        return minutes < 60 && seconds < 60
          ? [Math.floor(degrees) + minutes / 60 + seconds / 3600]
          : [];
      },
    }),
};

/** Room for the last bits of whole minutes. */
const ROUND_OFF = 1e-9;
