import {GEOID_MODEL_SIGMA_M, type Hypothesis, notTested, predicted, upward} from '../hypothesis.ts';

/** Two geoid models in one comparison: dU = ±(N₁ − N₂) for each two that are known. */
export const otherGeoidModel: Hypothesis = {
  code: 'V17',
  predict: ({separation}) => {
    const {known} = separation;
    const pairs = known.flatMap((first, i) =>
      known.slice(i + 1).map((second) => ({
        first: first.source,
        second: second.source,
        differenceM: first.separationM - second.separationM,
      })),
    );
    if (pairs.length === 0) return notTested('one-separation');
    return predicted(
      pairs.flatMap(({first, second, differenceM}) =>
        [1, -1].map((sign) =>
          upward(sign * differenceM, GEOID_MODEL_SIGMA_M, {first, second, differenceM}),
        ),
      ),
    );
  },
};
