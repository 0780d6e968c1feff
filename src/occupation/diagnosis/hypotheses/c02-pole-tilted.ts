import {DEGREES_PER_RADIAN} from '../../../geodesy/angle.ts';
import {heightsInUse} from '../antenna-heights.ts';
import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  type Prediction,
  predicted,
  vector,
} from '../hypothesis.ts';
import {fromTurnedSetUps} from '../turned-set-up.ts';

/** A bubble further out than this is seen by eye: common practice, no source. */
const LARGEST_TILT_DEG = 1;

/**
 * The bubble of the pole out of adjustment: h sin t in plan, −h (1 − cos t) in height, turning with
 * the pole.
 */
export const poleTilted: Hypothesis = {
  code: 'C02',
  predict: (input) => {
    const heightM = heightsInUse(input)[0]?.heightM;
    if (heightM === undefined || !(heightM > 0)) return notTested('no-antenna-height');
    const shown = fromTurnedSetUps(input);
    const turned = input.sameMarkChecks.some(({turnedDeg}) => turnedDeg !== null);
    if (shown.length === 0 && turned) return notTested('set-ups-agree');
    const {eastM, northM} = comparedOffset(input);
    const plans =
      shown.length > 0
        ? shown
        : [fitted(vector({eastM, northM, upM: 0}, 0, 0, {turnedDeg: null}), 2)];
    const tilted = plans.flatMap((plan) => withTilt(plan, heightM));
    return tilted.length === 0 ? notTested('beyond-its-size') : predicted(tilted);
  },
};

/** The tilt that such a plan offset needs, and the height it costs; none when it is too large. */
function withTilt(plan: Prediction, heightM: number): Prediction[] {
  const {eastM, northM} = plan.offset;
  const sin = Math.hypot(eastM, northM) / heightM;
  const tiltDeg = Math.asin(Math.min(1, sin)) * DEGREES_PER_RADIAN;
  if (sin === 0 || !(tiltDeg <= LARGEST_TILT_DEG)) return [];
  const upM = -heightM * (1 - Math.sqrt(1 - sin * sin));
  return [
    {
      ...plan,
      offset: {eastM, northM, upM},
      values: {turnedDeg: plan.values.turnedDeg ?? null, tiltMinutes: tiltDeg * 60, heightM},
    },
  ];
}
