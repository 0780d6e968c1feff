import {enuFromGeodetic, localFrame} from '../geodesy/local.ts';
import {r95} from '../statistics/accuracy-measures.ts';
import {NORMAL_95} from '../statistics/distribution.ts';
import {normalisedErrors} from './compare.ts';
import {type CovarianceM2, covarianceSum, planeOf, withVariances} from './covariance.ts';
import type {OtherMarkCheck, SameMarkCheck} from './diagnosis/input.ts';
import type {MarkPlace} from './mark-place.ts';
import type {ReduceRequest} from './request.ts';
import type {BudgetRow, Comparison, OtherSetup, PerAxis, Position, Result} from './result.ts';

/** A check made before, with the position that it compared. */
export interface EarlierCheck {
  readonly name: string;
  readonly result: Result;
  readonly position: Position;
  readonly comparison: Comparison;
}

/** The check in hand, as far as another one is set beside it. */
export interface CheckInHand {
  readonly request: ReduceRequest;
  readonly place: MarkPlace;
  readonly position: Position;
  readonly comparison: Comparison;
  readonly budget: readonly BudgetRow[];
}

const AXES = ['east', 'north', 'up'] as const;
const MS_PER_HOUR = 3_600_000;

/** Rows that belong to a comparison and fall out of the difference of two at the same mark. */
const OF_COMPARISON = new Set([
  'the mark',
  'transformation to the frame of the mark',
  'geoid model',
]);

/**
 * Rows that do not cancel although they share a name: what a positioning service leaves uncertain
 * is another error some time later.
 */
const CHANGING = new Set(['positioning service']);

/** Other occupations of the same mark, each set beside this one. */
export function otherSetups(here: CheckInHand): OtherSetup[] {
  return here.request.earlier
    .filter((there) => isSameMark(here.place, there) && sameCoordinates(here.place, there))
    .map((there) => setupBeside(here, there));
}

/** Results that name the same mark and compare with other coordinates of it. */
export function withOtherCoordinates(earlier: readonly EarlierCheck[], place: MarkPlace): string[] {
  return earlier
    .filter((there) => isSameMark(place, there) && !sameCoordinates(place, there))
    .map(({name}) => name);
}

function isSameMark(place: MarkPlace, {comparison}: EarlierCheck): boolean {
  return comparison.mark === place.name;
}

const SAME_DEG = 1e-11;
const SAME_M = 1e-5;

function sameCoordinates({plan, ellipsoidalHeightM}: MarkPlace, {result}: EarlierCheck): boolean {
  const there = result.reference?.geodetic;
  if (there === undefined || plan === null) return false;
  return (
    Math.abs(there.latitudeDeg - plan.latitudeDeg) < SAME_DEG &&
    Math.abs(there.longitudeDeg - plan.longitudeDeg) < SAME_DEG &&
    Math.abs((there.ellipsoidalHeightM ?? 0) - (ellipsoidalHeightM ?? 0)) < SAME_M
  );
}

function setupBeside(here: CheckInHand, there: EarlierCheck): OtherSetup {
  const difference = differenceM(here.comparison.offsetM, there.comparison.offsetM);
  const shared = sharedRows(here.budget, there.result.budget, (row) => !CHANGING.has(row.source));
  const covarianceM2 = covarianceOfDifference(here.position, there.position, shared);
  const normalisedError = normalisedErrors(difference, covarianceM2);
  const tested = [normalisedError.horizontal, normalisedError.up].filter((error) => error !== null);
  return {
    name: there.name,
    setUpId: there.result.occupation.setUpId,
    startUtc: there.result.occupation.startUtc,
    endUtc: there.result.occupation.endUtc,
    hoursEarlier: hoursBetween(there.position, here.position),
    differenceM: {...difference, horizontal: horizontalOf(difference)},
    uncertainty95M: covarianceM2 === null ? null : uncertainty95(covarianceM2),
    normalisedError,
    agreement:
      tested.length === 0
        ? 'not tested'
        : tested.every((error) => error <= 1)
          ? 'agrees'
          : 'disagrees',
    cancels: shared.map(({source}) => source),
  };
}

function differenceM(
  here: PerAxis<number | null>,
  there: PerAxis<number | null>,
): PerAxis<number | null> {
  const of = (axis: keyof PerAxis) => {
    const [a, b] = [here[axis], there[axis]];
    return a === null || b === null ? null : a - b;
  };
  return {east: of('east'), north: of('north'), up: of('up')};
}

function horizontalOf({east, north}: PerAxis<number | null>): number | null {
  return east === null || north === null ? null : Math.hypot(east, north);
}

/** A contribution that both have in common, by its name, and what it adds to their covariance. */
interface SharedRow {
  readonly source: string;
  readonly covarianceM2: PerAxis;
}

function sharedRows(
  here: readonly BudgetRow[],
  there: readonly BudgetRow[],
  counts: (row: BudgetRow) => boolean,
): SharedRow[] {
  return here.flatMap((row) => {
    const other = there.find(({source, id}) => source === row.source && id === row.id);
    const [own, others] = [row.standardUncertaintyM, other?.standardUncertaintyM ?? null];
    if (row.id === null || own === null || others === null || !counts(row)) return [];
    const product = (axis: keyof PerAxis) => (own[axis] ?? 0) * (others[axis] ?? 0);
    const covarianceM2 = {east: product('east'), north: product('north'), up: product('up')};
    return [{source: row.source, covarianceM2}];
  });
}

function covarianceOfDifference(
  here: Position,
  there: Position,
  shared: readonly SharedRow[],
): CovarianceM2 | null {
  const [own, others] = [knownCovariance(here), knownCovariance(there)];
  if (own === null || others === null) return null;
  const cancelled = AXES.map((axis) =>
    shared
      .filter(({source}) => !OF_COMPARISON.has(source))
      .reduce((sum, {covarianceM2}) => sum - 2 * covarianceM2[axis], 0),
  );
  return withVariances(covarianceSum(own, others), cancelled);
}

function knownCovariance({covarianceEnuM2}: Position): CovarianceM2 | null {
  return covarianceEnuM2?.map((row) => row.map((value) => value ?? Number.NaN)) ?? null;
}

function uncertainty95(covarianceM2: CovarianceM2): NonNullable<OtherSetup['uncertainty95M']> {
  const axis = (i: number) => NORMAL_95 * Math.sqrt(covarianceM2[i]![i]!);
  const up = axis(2);
  return {
    east: axis(0),
    north: axis(1),
    up: Number.isFinite(up) ? up : null,
    horizontalRadius: r95(planeOf(covarianceM2)),
  };
}

function hoursBetween(from: Position, to: Position): number {
  return (Date.parse(to.observedUtc) - Date.parse(from.observedUtc)) / MS_PER_HOUR;
}

/** The other checks of this mark as the search for causes needs them. */
export function sameMarkChecks(here: CheckInHand): SameMarkCheck[] {
  return here.request.earlier
    .filter((there) => isSameMark(here.place, there) && sameCoordinates(here.place, there))
    .flatMap((there) => {
      const covarianceM2 = covarianceOfOffset(there);
      if (covarianceM2 === null) return [];
      const shared = sharedRows(here.budget, there.result.budget, () => true);
      return [
        {
          offsetM: there.comparison.offsetM,
          covarianceM2,
          sharedCovarianceM2: sharedCovariance(shared),
          turnedDeg: turnedDeg(here, there),
          hoursLater: -hoursBetween(there.position, here.position),
        },
      ];
    });
}

function sharedCovariance(shared: readonly SharedRow[]): CovarianceM2 | null {
  if (shared.length === 0) return null;
  const nothing = AXES.map(() => AXES.map(() => 0));
  return withVariances(
    nothing,
    AXES.map((axis) => shared.reduce((sum, {covarianceM2}) => sum + covarianceM2[axis], 0)),
  );
}

/** Farther apart in time, another base or another day explains what differs. */
const SAME_DAY_HOURS = 24;

/** Checks of other marks on the same day. */
export function otherMarkChecks(here: CheckInHand): OtherMarkCheck[] {
  const {plan, ellipsoidalHeightM} = here.place;
  return here.request.earlier
    .filter(
      (there) =>
        !isSameMark(here.place, there) &&
        Math.abs(hoursBetween(there.position, here.position)) <= SAME_DAY_HOURS,
    )
    .flatMap((there) => {
      const covarianceM2 = covarianceOfOffset(there);
      if (covarianceM2 === null) return [];
      const from = there.result.reference?.geodetic;
      const fromItM =
        from === undefined || plan === null
          ? null
          : enuFromGeodetic(
              {...plan, ellipsoidalHeightM: ellipsoidalHeightM ?? from.ellipsoidalHeightM ?? 0},
              localFrame(
                {...from, ellipsoidalHeightM: from.ellipsoidalHeightM ?? 0},
                here.request.ellipsoid,
              ),
            );
      return [
        {
          mark: there.comparison.mark,
          offsetM: there.comparison.offsetM,
          covarianceM2,
          fromItM,
        },
      ];
    });
}

/** Of an offset: the position with its budget, and what the comparison added. */
function covarianceOfOffset({position, result}: EarlierCheck): CovarianceM2 | null {
  const own = knownCovariance(position);
  if (own === null) return null;
  const rows = result.budget.filter(({source}) => OF_COMPARISON.has(source));
  return withVariances(
    own,
    AXES.map((axis) =>
      rows.reduce((sum, row) => sum + (row.standardUncertaintyM?.[axis] ?? 0) ** 2, 0),
    ),
  );
}

/** Turn of tribrach or pole from this set-up to that one, where both sheets give one in degrees. */
function turnedDeg({request}: CheckInHand, {result}: EarlierCheck): number | null {
  const item = result.fieldSheet.find((one) => one.item.endsWith('tribrach, orientation'));
  const there = orientationDeg(item?.value ?? undefined);
  const here = orientationDeg(request.sheet.tribrach?.orientation);
  if (there === null || here === null) return null;
  const turn = (((there - here) % 360) + 360) % 360;
  return turn > 180 ? turn - 360 : turn;
}

/** Degrees as in "turned by 180 degrees" or "90°"; null: not said in degrees. */
function orientationDeg(text: string | undefined): number | null {
  const found = /(-?\d+(?:\.\d+)?)\s*(?:°|deg)/i.exec(text ?? '');
  return found === null ? null : Number(found[1]);
}
