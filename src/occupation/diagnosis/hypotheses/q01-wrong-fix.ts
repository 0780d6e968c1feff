import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  vector,
} from '../hypothesis.ts';
import {lengthM} from '../misfit.ts';

/** A fixed position on wrong whole wavelengths is off by some of them: common practice, no source. */
const SIZE_M = {least: 0.05, most: 2};

/** The receiver fixed the wrong whole numbers of wavelengths: a tight cluster, displaced. */
export const wrongFix: Hypothesis = {
  code: 'Q01',
  predict: (input) => {
    const offset = comparedOffset(input);
    const sizeM = lengthM(offset, [0, 1, 2]);
    if (!(sizeM >= SIZE_M.least && sizeM <= SIZE_M.most)) return notTested('beyond-its-size');
    return predicted([fitted(vector(offset, 0, 0, {sizeM}), 3)]);
  },
};
