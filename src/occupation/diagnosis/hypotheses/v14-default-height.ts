import {heightsInUse, receiverMayHaveTakenOff} from '../antenna-heights.ts';
import {type Hypothesis, notTested, predicted, TAPE_SIGMA_M, upward} from '../hypothesis.ts';

/** Stops of survey poles, and what controllers offer by default. Common practice, no source. */
const POLE_LENGTHS_M = [1.3, 1.5, 1.8, 2, 2.2, 2.5];
/** A height this near to a pole length is that pole length. */
const STOP_M = 0.0015;

/** A default pole length in place of the true height: dU = h true − h entered. */
export const defaultHeight: Hypothesis = {
  code: 'V14',
  predict: (input) => {
    const {antenna} = input;
    const heights = heightsInUse(input);
    if (antenna === null || heights.length === 0) return notTested('no-antenna-height');
    const predictions = heights.flatMap(({heightM, by}) => {
      const others = POLE_LENGTHS_M.filter((poleM) => Math.abs(poleM - heightM) > STOP_M);
      const isPole = others.length < POLE_LENGTHS_M.length;
      return [
        ...(isPole ? others.map((trueM) => ({trueM, takenM: heightM, by})) : []),
        ...(by === 'field sheet' && receiverMayHaveTakenOff(antenna)
          ? others.map((takenM) => ({trueM: heightM, takenM, by: 'receiver'}))
          : []),
      ];
    });
    if (predictions.length === 0) return notTested('cannot-happen-here');
    return predicted(
      predictions.map(({trueM, takenM, by}) =>
        upward(trueM - takenM, TAPE_SIGMA_M, {trueM, takenM, by}),
      ),
    );
  },
};
