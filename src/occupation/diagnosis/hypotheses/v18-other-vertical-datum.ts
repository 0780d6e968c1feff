import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  upward,
} from '../hypothesis.ts';

/** Realisations of one height system differ by no more than this: common practice, no source. */
const LARGEST_M = 3;

/**
 * Another realisation of the vertical datum: one constant for a region. The other marks checked
 * show it, if there are any; alone it fits every height.
 */
export const otherVerticalDatum: Hypothesis = {
  code: 'V18',
  predict: (input) => {
    const others = input.otherMarkChecks.filter(({offsetM}) => offsetM.up !== null);
    if (others.length > 0) {
      return predicted(
        others.map(({mark, offsetM, covarianceM2}) =>
          upward(offsetM.up ?? 0, Math.sqrt(covarianceM2[2]?.[2] ?? 0), {mark}),
        ),
      );
    }
    const {upM} = comparedOffset(input);
    if (Math.abs(upM) > LARGEST_M) return notTested('beyond-its-size');
    return predicted([fitted(upward(upM, 0, {mark: null}), 1)]);
  },
};
