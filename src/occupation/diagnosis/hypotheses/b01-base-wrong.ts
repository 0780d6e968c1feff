import {
  comparedOffset,
  covarianceOfCheck,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  vector,
} from '../hypothesis.ts';
import type {OtherMarkCheck} from '../input.ts';
import {lengthM, misfit} from '../misfit.ts';

/** χ² with 3 degrees of freedom at 99 %. */
const OTHER_IS_OFF = 11.345;

/**
 * The base stood on wrong coordinates: every mark of the day shows the same offset. Without a check
 * of another mark it fits every offset; another mark that fits well speaks against it.
 */
export const baseWrong: Hypothesis = {
  code: 'B01',
  predict: (input) => {
    const others = input.otherMarkChecks.filter(
      ({offsetM}) => offsetM.east !== null && offsetM.north !== null,
    );
    if (others.length === 0) {
      const offset = comparedOffset(input);
      return predicted([
        fitted(vector(offset, 0, 0, {mark: null, sizeM: lengthM(offset, [0, 1, 2])}), 3),
      ]);
    }
    const off = others.filter(isOff);
    if (off.length === 0) return notTested('other-mark-fits');
    return predicted(
      off.map(({mark, offsetM, covarianceM2}) => ({
        offset: {eastM: offsetM.east ?? 0, northM: offsetM.north ?? 0, upM: offsetM.up ?? 0},
        covarianceM2: covarianceOfCheck({offsetM, covarianceM2}),
        freeParameters: 0,
        values: {mark, sizeM: null},
      })),
    );
  },
};

function isOff({offsetM, covarianceM2}: OtherMarkCheck): boolean {
  const {east, north, up} = offsetM;
  const offset = {eastM: east ?? 0, northM: north ?? 0, upM: up ?? 0};
  const axes = up === null ? [0, 1] : [0, 1, 2];
  return misfit(offset, axes, [covarianceM2]) > OTHER_IS_OFF;
}
