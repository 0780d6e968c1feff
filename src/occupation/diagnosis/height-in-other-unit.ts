import {heightsInUse} from './antenna-heights.ts';
import {notTested, type Outcome, predicted, TAPE_SIGMA_M, upward} from './hypothesis.ts';
import type {DiagnosisInput} from './input.ts';

/**
 * Offsets of a height whose number was taken in the wrong unit: read as `factor` times what it is.
 *
 * Either the height in use is right and the receiver took factor·h off: dU = h − factor·h; or the
 * height in use is itself the misread one, h = factor·truth: dU = h/factor − h.
 *
 * @param factor  height taken by height true, for example 1/0.3048 for feet taken as metres
 */
export function heightInOtherUnit(
  input: DiagnosisInput,
  factor: number,
  unlikely: (trueM: number, takenM: number) => boolean = () => false,
): Outcome {
  const heights = heightsInUse(input);
  if (heights.length === 0) return notTested('no-antenna-height');
  return predicted(
    heights
      .flatMap(({heightM, by}) => [
        {trueM: heightM, takenM: heightM * factor, misread: 'in the receiver', by},
        {trueM: heightM / factor, takenM: heightM, misread: 'as booked', by},
      ])
      .filter(({trueM, takenM}) => !unlikely(trueM, takenM))
      .map(({trueM, takenM, misread, by}) =>
        upward(trueM - takenM, TAPE_SIGMA_M * Math.max(1, Math.abs(1 - factor)), {
          trueM,
          takenM,
          misread,
          by,
        }),
      ),
  );
}
