import {receiverMayHaveTakenOff} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';
import type {WrittenLength} from '../input.ts';

/** Two neighbouring digits of the height swapped: dU = h true − h entered, 9 units of a digit. */
export const digitsSwapped: Hypothesis = {
  code: 'V15',
  predict: ({antenna}) => {
    const reading = antenna?.reading;
    if (antenna === null || reading == null) return notTested('no-height-reading');
    const others = swapped(reading);
    if (others.length === 0) return notTested('cannot-happen-here');
    const booked = reading.lengthM;
    return predicted([
      ...others.map((trueM) =>
        upward(trueM - booked, TAPE_SIGMA_M, {trueM, takenM: booked, by: 'field sheet'}),
      ),
      ...(receiverMayHaveTakenOff(antenna)
        ? others.map((takenM) =>
            upward(booked - takenM, TAPE_SIGMA_M, {trueM: booked, takenM, by: 'receiver'}),
          )
        : []),
    ]);
  },
};

/** The lengths that differ from what was written by one swap of neighbouring, unequal digits. */
function swapped({lengthM, stepM, unitM}: WrittenLength): number[] {
  const decimals = Math.max(0, Math.round(-Math.log10(stepM / unitM)));
  const digits = Math.round((lengthM / unitM) * 10 ** decimals).toString();
  const lengths: number[] = [];
  for (let i = 0; i + 1 < digits.length; i++) {
    const [left, right] = [digits.charAt(i), digits.charAt(i + 1)];
    if (left === right) continue;
    const text = digits.slice(0, i) + right + left + digits.slice(i + 2);
    lengths.push((Number(text) / 10 ** decimals) * unitM);
  }
  return lengths;
}
