import type {Epochs} from '../epochs/epochs.ts';
import {ecefFromEnu, geodeticFromEnu} from '../geodesy/local.ts';
import {r95} from '../statistics/accuracy-measures.ts';
import {NORMAL_95} from '../statistics/distribution.ts';
import {isoUtc} from '../time/gps-time.ts';
import {budgetVariancesM2} from './budget.ts';
import {type CovarianceM2, planeOf, withVariances} from './covariance.ts';
import {gridPosition} from './grid-position.ts';
import type {LocalColumns} from './local-columns.ts';
import type {BudgetRow, PerAxis, Position, Separation} from './result.ts';
import {ellipseOf} from './scatter.ts';
import {type GeoidRequest, meanSeparationM, separationInUse} from './separation.ts';
import type {Session} from './session.ts';

/** √χ²₂(95 %): scale from the standard ellipse to the one that holds 95 %. */
const ELLIPSE_95 = 2.447746830680816;

export interface PositionInput {
  readonly session: Session;
  readonly columns: LocalColumns;
  readonly epochs: Epochs;
  readonly budget: readonly BudgetRow[];
  readonly frame: Position['frame'];
  readonly frameFrom: Position['frameFrom'];
  readonly coordinateEpoch: number | null;
  readonly of: Position['of'];
  readonly geoid: GeoidRequest;
  /** Map grid as written; null: none asked for. */
  readonly grid: string | null;
}

/** The mean of one session as a position, with its uncertainty, budget included. */
export function positionOf(input: PositionInput): Position {
  const {session, columns, epochs} = input;
  const mean = {
    eastM: session.meanM.east ?? 0,
    northM: session.meanM.north ?? 0,
    upM: session.meanM.up ?? 0,
  };
  const geodetic = geodeticFromEnu(mean, columns.frame);
  const ecef = ecefFromEnu(mean, columns.frame);
  const ellipsoidal = columns.heightKind === 'ellipsoidal';
  const separation = ellipsoidal
    ? separationInUse(input.geoid, geodetic, meanSeparationM(epochs, session.indices))
    : null;
  const covarianceEnuM2 = covarianceOf(session, input.budget);
  const {originEcef} = columns.frame;
  return {
    of: input.of,
    frame: input.frame,
    frameFrom: input.frameFrom,
    coordinateEpoch: input.coordinateEpoch,
    observedUtc: isoUtc((session.fromGpsSeconds + session.toGpsSeconds) / 2, 3),
    ecefM: ellipsoidal ? {x: ecef.xM, y: ecef.yM, z: ecef.zM} : null,
    geodetic: {
      latitudeDeg: geodetic.latitudeDeg,
      longitudeDeg: geodetic.longitudeDeg,
      ellipsoidalHeightM: ellipsoidal ? geodetic.ellipsoidalHeightM : null,
    },
    orthometricHeightM: orthometricHeightM(columns, geodetic.ellipsoidalHeightM, separation),
    separation,
    grid:
      input.grid === null
        ? null
        : gridPosition(
            input.grid,
            {...geodetic, ellipsoidalHeightM: ellipsoidal ? geodetic.ellipsoidalHeightM : null},
            {ellipsoid: columns.frame.ellipsoid, frame: input.frame},
          ),
    originEcefM: {x: originEcef.xM, y: originEcef.yM, z: originEcef.zM},
    ...uncertaintyOf(covarianceEnuM2),
    independentLooks: session.independentLooks,
    correlationTimeS: session.correlationTimeS,
  };
}

/**
 * The ellipsoidal height less the separation in use, or the averaged altitude itself where the log
 * gives no separation: that is above the receiver's own geoid, whatever model was asked for.
 */
function orthometricHeightM(
  {heightKind}: LocalColumns,
  heightM: number,
  separation: Separation | null,
): number | null {
  if (heightKind === 'above the receiver geoid') return heightM;
  return separation === null ? null : heightM - separation.separationM;
}

function covarianceOf({covarianceM2}: Session, budget: readonly BudgetRow[]): CovarianceM2 | null {
  if (covarianceM2 === null) return null;
  const {east, north, up} = budgetVariancesM2(budget);
  return withVariances(covarianceM2, [east, north, up]);
}

function uncertaintyOf(
  covarianceM2: CovarianceM2 | null,
): Pick<Position, 'standardUncertaintyM' | 'uncertainty95M' | 'ellipse95' | 'covarianceEnuM2'> {
  if (covarianceM2 === null) {
    return {
      standardUncertaintyM: null,
      uncertainty95M: null,
      ellipse95: null,
      covarianceEnuM2: null,
    };
  }
  const standard: PerAxis<number | null> = {
    east: Math.sqrt(covarianceM2[0]![0]!),
    north: Math.sqrt(covarianceM2[1]![1]!),
    up: finiteOrNull(Math.sqrt(covarianceM2[2]![2]!)),
  };
  const plane = planeOf(covarianceM2);
  return {
    standardUncertaintyM: standard,
    uncertainty95M: {
      east: NORMAL_95 * standard.east!,
      north: NORMAL_95 * standard.north!,
      up: standard.up === null ? null : NORMAL_95 * standard.up,
      horizontalRadius: r95(plane),
    },
    ellipse95: ellipseOf(plane, ELLIPSE_95),
    covarianceEnuM2: covarianceM2.map((row) => row.map(finiteOrNull)),
  };
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
