import {RADIANS_PER_DEGREE} from '../../geodesy/angle.ts';
import {type Prediction, TAPE_SIGMA_M} from './hypothesis.ts';
import type {OffsetPoint} from './input.ts';

/**
 * The offsets of a laid-off point whose bearing was wrong by an angle, either way: the true vector
 * is the one applied, turned; d = true − applied.
 *
 * The uncertainty of the angle acts across the line to the point.
 */
export function turnedOffsetPoint(
  point: OffsetPoint,
  angleDeg: number,
  sigmaDeg: number,
): Prediction[] {
  const distanceM = Math.hypot(point.eastM, point.northM);
  return [angleDeg, -angleDeg].map((turnDeg) => {
    const sin = Math.sin(turnDeg * RADIANS_PER_DEGREE);
    const cos = Math.cos(turnDeg * RADIANS_PER_DEGREE);
    // Clockwise, as azimuths turn.
    const eastM = point.eastM * cos + point.northM * sin;
    const northM = point.northM * cos - point.eastM * sin;
    const acrossRad = sigmaDeg * RADIANS_PER_DEGREE;
    const tape2 = TAPE_SIGMA_M * TAPE_SIGMA_M;
    const across2 = acrossRad * acrossRad;
    return {
      offset: {eastM: eastM - point.eastM, northM: northM - point.northM, upM: 0},
      covarianceM2: [
        [tape2 + across2 * northM * northM, -across2 * northM * eastM, 0],
        [-across2 * northM * eastM, tape2 + across2 * eastM * eastM, 0],
        [0, 0, 0],
      ],
      freeParameters: 0,
      values: {angleDeg: turnDeg, distanceM},
    };
  });
}
