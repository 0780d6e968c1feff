import {RADIANS_PER_DEGREE} from '../../geodesy/angle.ts';
import type {Matrix3} from '../../geodesy/types.ts';
import type {Prediction} from './hypothesis.ts';
import type {DiagnosisInput, SameMarkCheck} from './input.ts';
import {misfit} from './misfit.ts';

/** A turn smaller than this says nothing. */
const LEAST_TURN_DEG = 30;
/** χ² with 2 degrees of freedom at 99 %: the two set-ups differ. */
const DIFFER = 9.21;

/**
 * The plan offset that a constant eccentricity of tribrach or pole leaves, as the other set-up of
 * this mark shows it: that offset turned back by the turn between both (−d₂ after half a turn).
 *
 * The other offset's uncertainty counts, and what both share counts against a half turn twice.
 */
export function fromTurnedSetUps(input: DiagnosisInput): Prediction[] {
  return input.sameMarkChecks.filter((check) => isTurned(check, input)).map(turnedBack);
}

function isTurned(check: SameMarkCheck, input: DiagnosisInput): boolean {
  const {turnedDeg, offsetM} = check;
  const {east, north} = input.offsetM;
  if (turnedDeg === null || Math.abs(turnedDeg) < LEAST_TURN_DEG) return false;
  if (offsetM.east === null || offsetM.north === null || east === null || north === null) {
    return false;
  }
  const change = {eastM: offsetM.east - east, northM: offsetM.north - north, upM: 0};
  return misfit(change, [0, 1], [check.covarianceM2, input.covarianceM2]) > DIFFER;
}

function turnedBack({
  offsetM,
  turnedDeg,
  covarianceM2,
  sharedCovarianceM2,
}: SameMarkCheck): Prediction {
  const turn = turnedDeg ?? 0;
  const sin = Math.sin(turn * RADIANS_PER_DEGREE);
  const cos = Math.cos(turn * RADIANS_PER_DEGREE);
  const back = (east: number, north: number) => [
    east * cos - north * sin,
    north * cos + east * sin,
  ];
  const [eastM = 0, northM = 0] = back(offsetM.east ?? 0, offsetM.north ?? 0);
  const variance = (i: number, j: number) => covarianceM2[i]?.[j] ?? 0;
  const rows = [
    [cos, -sin],
    [sin, cos],
  ] as const;
  const turned = (i: 0 | 1, j: 0 | 1): number => {
    const [a, b] = rows[i];
    const [c, d] = rows[j];
    const own = a * c * variance(0, 0) + (a * d + b * c) * variance(0, 1) + b * d * variance(1, 1);
    // −2 cos of what both share: a half turn doubles it, where the difference would lose it.
    return own - 2 * cos * (sharedCovarianceM2?.[i]?.[j] ?? 0);
  };
  const covariance: Matrix3 = [
    [turned(0, 0), turned(0, 1), 0],
    [turned(1, 0), turned(1, 1), 0],
    [0, 0, 0],
  ];
  return {
    offset: {eastM, northM, upM: 0},
    covarianceM2: covariance,
    freeParameters: 0,
    values: {turnedDeg: turn, eccentricityM: Math.hypot(eastM, northM)},
  };
}
