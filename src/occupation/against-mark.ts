import type {AntennaReduction} from './antenna.ts';
import {compareWithMark} from './compare.ts';
import {type CovarianceM2, covarianceSum, withVariances} from './covariance.ts';
import {withDiagnosis} from './diagnosis-of-check.ts';
import {type Changed, inFrameOfMark} from './frame-change.ts';
import type {LocalColumns} from './local-columns.ts';
import type {MarkPlace} from './mark-place.ts';
import {otherSetups, withOtherCoordinates} from './other-setups.ts';
import {type OutOfReach, outOfReach} from './reach.ts';
import {heightSystemOf, offsetFrom} from './reference.ts';
import type {ReduceRequest} from './request.ts';
import type {BudgetRow, Comparison, EpochAccount, Position} from './result.ts';
import type {Session} from './session.ts';
import {statedOfGeoid} from './stated-contributions.ts';

/** The measured position in the frame and at the epoch of the mark, where both are known. */
export function measuredForMark(
  mean: Position,
  {mark, motion, ellipsoid}: ReduceRequest,
): {readonly measured: Position; readonly changed: Changed | undefined} {
  const changed = mark === null ? undefined : inFrameOfMark(mean, mark, motion, ellipsoid);
  if (changed === undefined) return {measured: mean, changed};
  const {geodetic} = changed;
  const orthometricHeightM = transformedOrthometric(mean, geodetic.ellipsoidalHeightM);
  return {measured: {...mean, geodetic, orthometricHeightM}, changed};
}

/**
 * A geoid model belongs to the frame of the mark; the receiver's own belongs to its positions, and
 * its heights stay as they were.
 */
function transformedOrthometric(
  {orthometricHeightM, separation}: Position,
  ellipsoidalHeightM: number | null,
): number | null {
  if (separation === null || separation.from === 'receiver' || ellipsoidalHeightM === null) {
    return orthometricHeightM;
  }
  return ellipsoidalHeightM - separation.separationM;
}

/** Whether the heights that are compared stand above a geoid, so that its model counts. */
export function heightsAboveGeoid(place: MarkPlace | null, measured: Position): boolean {
  return place !== null && heightSystemOf(place, measured) === 'above the geoid';
}

/** A position about to be compared with a mark, and the record that it comes from. */
export interface Compared {
  readonly request: ReduceRequest;
  readonly account: EpochAccount;
  readonly antenna?: AntennaReduction;
  readonly columns: LocalColumns;
  readonly session: Session;
  readonly place: MarkPlace;
  /** In the frame of the mark where both frames are known. */
  readonly measured: Position;
  readonly changed: Changed | undefined;
  /** Every row that enters the comparison. */
  readonly budget: readonly BudgetRow[];
}

/** The offset from the mark, what it means, and what it is consistent with. */
export function comparisonOf(compared: Compared): Comparison {
  const {request, account, antenna, columns, session, place, measured, changed} = compared;
  const covarianceM2 = covarianceOf(compared);
  const comparison = compareWithMark({
    mark: place.name,
    offsetM: offsetFrom(place, measured, request.ellipsoid),
    covarianceM2,
    markCovarianceM2: place.covarianceM2,
    asked: request.asked,
    // What is taken for granted because nobody stated it is said aloud in every output.
    assumptions: changed === undefined ? ['same frame and epoch as the mark'] : [],
    frameChange: changed?.change ?? null,
  });
  const inHand = {request, place, position: measured, comparison, budget: compared.budget};
  const besideOthers = {...comparison, otherSetups: otherSetups(inHand)};
  if (covarianceM2 === null || antenna === undefined) return besideOthers;
  return withDiagnosis({
    request,
    account,
    antenna,
    columns,
    session,
    place,
    measured,
    comparison: besideOthers,
    covarianceM2,
    budget: compared.budget,
  });
}

/** Tolerances that no offset could pass with this record, and how long a record would have to be. */
export function tolerancesOutOfReach(compared: Compared): OutOfReach[] {
  const {request, session, place} = compared;
  const covarianceM2 = covarianceOf(compared);
  if (covarianceM2 === null || session.covarianceM2 === null) return [];
  return outOfReach({
    asked: request.asked,
    session,
    sessionM2: session.covarianceM2,
    totalM2: covarianceSum(covarianceM2, place.covarianceM2),
  });
}

/** Names of earlier results of this mark that compare with other coordinates of it. */
export function setupsWithOtherCoordinates({request, place}: Compared): string[] {
  return withOtherCoordinates(request.earlier, place);
}

/** Covariance of the measured position with what the comparison adds to it. */
function covarianceOf(compared: Compared): CovarianceM2 | null {
  const own = compared.measured.covarianceEnuM2;
  if (own === null) return null;
  const known = own.map((row) => row.map((value) => value ?? Number.NaN));
  return withVariances(known, addedVariancesM2(compared));
}

/** What the comparison adds to the uncertainty of the position, per axis. */
function addedVariancesM2({request, place, measured, changed}: Compared): number[] {
  const frame = changed?.contribution?.standardUncertaintyM;
  const geoid = heightsAboveGeoid(place, measured)
    ? statedOfGeoid(request.sheet)?.standardUncertaintyM
    : undefined;
  return (['east', 'north', 'up'] as const).map(
    (axis) => (frame?.[axis] ?? 0) ** 2 + (geoid?.[axis] ?? 0) ** 2,
  );
}
