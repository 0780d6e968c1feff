import {
  comparedOffset,
  fitted,
  type Hypothesis,
  notTested,
  predicted,
  vector,
} from '../hypothesis.ts';
import type {DiagnosisInput, SameMarkCheck} from '../input.ts';

/**
 * Largest loading between high and low water. Source: The Survey Association, Guidance Notes for
 * GNSS Network RTK Surveying in Great Britain, Issue 2 (2012), as quoted: up to 60 mm in height and
 * 20 mm in plan, in the west of the British Isles.
 */
const LARGEST_M = {plan: 0.02, up: 0.06};
/** Half a tide is a little over six hours. */
const HALF_TIDE_HOURS = {least: 4, most: 9};

/** The ground rises and falls with the tide: two sessions half a tide apart differ. */
export const oceanLoading: Hypothesis = {
  code: 'L01',
  predict: (input) => {
    const other = input.sameMarkChecks.find(({hoursLater}) => isHalfTide(hoursLater));
    if (other === undefined) return notTested('no-second-session');
    const change = changeBetween(input, other);
    const planM = Math.hypot(change.eastM, change.northM);
    if (planM > LARGEST_M.plan || Math.abs(change.upM) > LARGEST_M.up) {
      return notTested('beyond-its-size');
    }
    // The tide moves both sessions: half of their difference each, about their mean.
    const offset = {eastM: change.eastM / 2, northM: change.northM / 2, upM: change.upM / 2};
    return predicted([
      fitted(vector(offset, 0, 0, {hours: other.hoursLater, planM, upM: change.upM}), 3),
    ]);
  },
};

function isHalfTide(hours: number | null): boolean {
  if (hours === null) return false;
  return Math.abs(hours) >= HALF_TIDE_HOURS.least && Math.abs(hours) <= HALF_TIDE_HOURS.most;
}

/** This offset less that of the other session. */
function changeBetween(input: DiagnosisInput, {offsetM}: SameMarkCheck) {
  const own = comparedOffset(input);
  return {
    eastM: own.eastM - (offsetM.east ?? own.eastM),
    northM: own.northM - (offsetM.north ?? own.northM),
    upM: own.upM - (offsetM.up ?? own.upM),
  };
}
