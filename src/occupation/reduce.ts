import type {EnuColumns} from '../geodesy/local.ts';
import {isoUtc} from '../time/gps-time.ts';
import {scatterOf, shiftToReference, typicalStepM, usedPositions} from './about-reference.ts';
import {epochAccount} from './account.ts';
import {
  comparisonOf,
  heightsAboveGeoid,
  measuredForMark,
  setupsWithOtherCoordinates,
  tolerancesOutOfReach,
} from './against-mark.ts';
import {type AntennaReduction, reduceAntenna} from './antenna.ts';
import {besideStep} from './beside-step.ts';
import {budgetRows, comparisonRows} from './budget.ts';
import {explainNulls} from './explain-nulls.ts';
import {noticeHeights} from './height-notices.ts';
import {keptIndices, type LocalColumns, localColumns, selected} from './local-columns.ts';
import {markItems} from './mark-items.ts';
import {type MarkPlace, markPlace} from './mark-place.ts';
import {isTravelling} from './motion.ts';
import {type NoticeList, noticeList} from './notices.ts';
import {materialCuts, sessionAt, sessionsBetween} from './parts.ts';
import {withoutNegativeZero} from './plain-numbers.ts';
import {positionOf} from './position.ts';
import {
  noticeBudget,
  noticeComparison,
  noticeReceiver,
  noticeRecord,
  noticeScreening,
  noticeSession,
  noticeStability,
  noticeTime,
} from './record-notices.ts';
import {eccentricityOf, reducedToMark} from './reduce-to-mark.ts';
import {offsetFrom, referenceOf} from './reference.ts';
import type {ReduceRequest} from './request.ts';
import type {BudgetRow, EpochAccount, Reference, Result, Segment, Stability} from './result.ts';
import {type ScreenOutcome, screenByRules} from './screen.ts';
import {screenNeighbours} from './screen-neighbours.ts';
import {screeningOf} from './screening-of-record.ts';
import type {Session} from './session.ts';
import {sheetItems} from './sheet-items.ts';
import {stabilityOf} from './stability.ts';
import {statedContributions, statedOfGeoid} from './stated-contributions.ts';
import {checkVerdict} from './verdict.ts';

/** The result, and the epochs it rests on for charts and the epoch table. */
export interface Reduced {
  readonly result: Result;
  /** East, north and up of every epoch read, about the reference of the result. */
  readonly aboutReference: () => EnuColumns;
  /** Screening codes, 0 for the epochs used. */
  readonly reason: Uint8Array;
  /** 95 % half-widths of the mean after a part of the record; null when there is no one mean. */
  readonly halfWidths95After: Session['halfWidths95After'] | null;
}

/** One occupation from the joined logs to the result: the whole line, in order. */
export function reduceOccupation(request: ReduceRequest): Reduced {
  const {epochs} = request.log;
  const notices = noticeList(request.say);
  noticeRecord(request, notices);
  const outcome = screenByRules(epochs, request.rules);
  const columns = localColumns(epochs, outcome.reason, request.ellipsoid);
  const account = () => accountOf(request, outcome);
  if (columns === undefined)
    return withoutPosition({request, notices, account: account()}, outcome);

  const kept = keptIndices(outcome.reason);
  if (isTravelling(trackOf(request, columns, kept))) {
    return withoutPosition({request, notices, account: account(), travelling: true}, outcome);
  }
  screenNeighbours(epochs.gpsSeconds, columns, kept, account().resolutionM, outcome.reason);
  const antenna = reduceAntenna({
    sheet: request.sheet,
    startGpsSeconds: epochs.gpsSeconds[kept[0]!]!,
    endGpsSeconds: epochs.gpsSeconds[kept[kept.length - 1]!]!,
  });
  const atMark = reducedToMark(
    columns,
    epochs.gpsSeconds,
    antenna,
    eccentricityOf(request.sheet, undefined),
  );
  for (const {severity, code, values} of antenna.findings) {
    notices.add(severity, code, ['occupation.antennaHeightM'], values);
  }
  return averaged({request, notices, account: account(), antenna}, outcome, atMark);
}

function accountOf({log, ellipsoid}: ReduceRequest, {reason}: ScreenOutcome): EpochAccount {
  return epochAccount(log.epochs, reason, log.resolution, ellipsoid);
}

/** Every null explained, every zero a plain one. */
function finished(result: Result, notices: NoticeList): Result {
  return withoutNegativeZero(explainNulls({...result, notices: notices.notices}, notices));
}

interface Record {
  readonly request: ReduceRequest;
  readonly notices: NoticeList;
  readonly account: EpochAccount;
  readonly travelling?: boolean;
  readonly antenna?: AntennaReduction;
}

function trackOf({log}: ReduceRequest, columns: LocalColumns, indices: Uint32Array) {
  return {
    gpsSeconds: selected(log.epochs.gpsSeconds, indices),
    eastM: selected(columns.eastM, indices),
    northM: selected(columns.northM, indices),
  };
}

/** The line for a record that can be averaged. */
function averaged(record: Record, outcome: ScreenOutcome, columns: LocalColumns): Reduced {
  const {request, notices, account} = record;
  const {epochs} = request.log;
  const parted = {request, account, columns};
  const whole = sessionAt(parted, keptIndices(outcome.reason));
  const place = request.mark === null ? null : markPlace(request.mark, request.ellipsoid);
  const stability = stabilityOf(
    whole,
    {statedM: request.movementLimitM, asked: request.asked},
    ({interval95GpsSeconds: [from, to]}) => besideStep(epochs, from, to, account.intervalS ?? 1),
  );
  const cuts = materialCuts(whole, stability);
  const sessions = cuts.length === 0 ? [whole] : sessionsBetween(cuts, parted, outcome);
  const segments = sessions.map((part) => segmentOf(part, record, columns, outcome));
  const single = segments.length === 1 ? segments[0]! : null;
  const mean = (single ?? segmentOf(whole, record, columns, outcome)).position;
  const {measured, changed} = measuredForMark(mean, request);
  const reference = referenceOf(measured, place, request.at, request.ellipsoid);
  const offsetM = offsetFrom(targetOf(reference, place), measured, request.ellipsoid);
  const budget = [
    ...budgetOf(whole, record, outcome, columns),
    ...comparisonRows({
      mark: place,
      transformation: changed?.contribution ?? null,
      heightsAboveGeoid: heightsAboveGeoid(place, measured),
      geoid: statedOfGeoid(request.sheet),
    }),
  ];
  const compared =
    place === null || single === null
      ? null
      : {...record, columns, session: whole, place, measured, changed, budget};
  const comparison = compared === null ? null : comparisonOf(compared);
  const result: Result = {
    ...common({...record, account: accountOf(request, outcome)}),
    reference,
    position: single?.position ?? null,
    segments,
    budget,
    scatter: scatterOf(usedPositions(columns, whole), whole.meanM, offsetM),
    screening: screeningOf(epochs, columns, outcome, whole),
    stability,
    comparison,
    verdict:
      request.command === 'check'
        ? checkVerdict(comparison?.requirements ?? [], stability.verdict)
        : null,
  };
  noticeScreening(result, outcome, notices);
  noticeSession(sessions, notices);
  noticeHeights(result, request, columns, heightsAboveGeoid(place, measured), notices);
  noticeBudget(result, notices);
  noticeReceiver(result, typicalStepM(columns, whole), notices);
  noticeStability(result, notices);
  const unreachable = compared === null ? [] : tolerancesOutOfReach(compared);
  const otherCoordinates = compared === null ? [] : setupsWithOtherCoordinates(compared);
  noticeComparison(result, request, unreachable, otherCoordinates, notices);
  noticeTime(single === null ? null : whole, request, notices);
  let shifted: EnuColumns | undefined;
  return {
    result: finished(result, notices),
    aboutReference: () => {
      shifted ??= shiftToReference(columns, whole.meanM, offsetM);
      return shifted;
    },
    reason: outcome.reason,
    halfWidths95After: single === null ? null : whole.halfWidths95After,
  };
}

/** The line for a record that yields no position: nothing usable, or a journey. */
function withoutPosition(record: Record, outcome: ScreenOutcome): Reduced {
  const {request, notices, account} = record;
  const travelling = record.travelling === true;
  const stability: Stability = {
    verdict: travelling ? 'travelling' : 'cannot tell',
    drift: {east: null, north: null, up: null},
    steps: [],
    settling: null,
    movementLimitM: {horizontal: request.movementLimitM, up: request.movementLimitM},
  };
  const result: Result = {
    ...common(record),
    reference: null,
    position: null,
    segments: [],
    budget: [],
    scatter: null,
    screening: {fixClassKept: outcome.fixClassKept, withoutScreening: null, receiverSigmaM: null},
    stability,
    comparison: null,
    verdict: request.command === 'check' ? checkVerdict([], stability.verdict) : null,
  };
  notices.add('concern', travelling ? 'travelling' : 'no-usable-epoch', NO_POSITION, {
    read: account.read,
  });
  const nowhere = new Float64Array(request.log.epochs.count).fill(Number.NaN);
  return {
    result: finished(result, notices),
    aboutReference: () => ({eastM: nowhere, northM: nowhere, upM: nowhere}),
    reason: outcome.reason,
    halfWidths95After: null,
  };
}

const NO_POSITION = [
  'position',
  'reference',
  'scatter',
  'comparison',
  'screening',
  'stability',
  'epochs.firstUtc',
  'epochs.lastUtc',
  'occupation.startUtc',
  'occupation.endUtc',
];

function common({request, account, notices, antenna}: Record) {
  return {
    schema: 'stillmark.result/1' as const,
    program: request.program,
    command: request.command,
    inputs: request.inputs,
    occupation: {
      mark: request.mark?.name ?? request.markName,
      setUpId: request.sheet.setUpId ?? null,
      startUtc: account.firstUtc,
      endUtc: account.lastUtc,
      antennaHeightM: antenna?.antennaHeightM ?? null,
      heightUsed: antenna?.heightUsed ?? null,
    },
    fieldSheet: sheetItems(request.sheet),
    markRecord: markItems(request.mark),
    epochs: account,
    settings: request.settings,
    notices: notices.notices,
  };
}

function segmentOf(
  part: Session,
  record: Record,
  columns: LocalColumns,
  outcome: ScreenOutcome,
): Segment {
  const {request} = record;
  return {
    fromUtc: isoUtc(part.fromGpsSeconds, 3),
    toUtc: isoUtc(part.toGpsSeconds, 3),
    epochs: part.indices.length,
    position: positionOf({
      session: part,
      columns,
      epochs: request.log.epochs,
      budget: budgetOf(part, record, outcome, columns),
      frame: request.frame?.name ?? null,
      frameFrom: request.frame?.from ?? null,
      coordinateEpoch: request.coordinateEpoch,
      of: record.antenna?.pointReached ?? 'antenna, point not stated',
      geoid: request.geoid,
      grid: request.grid,
    }),
  };
}

function budgetOf(
  part: Session,
  {request, account, antenna}: Record,
  {fixClassKept}: ScreenOutcome,
  {heightKind}: LocalColumns,
): BudgetRow[] {
  const {separationM} = request.log.resolution;
  const separated = heightKind === 'ellipsoidal' && Number.isFinite(separationM) && separationM > 0;
  return budgetRows({
    session: part.standardUncertaintyM,
    quantisation: part.quantisationM,
    separationStepM: separated ? separationM : null,
    separationId: account.firstUtc === null ? null : 'separation printed in the log',
    fixClass: fixClassKept,
    hasHeight: heightKind !== 'none',
    ...statedContributions(request.sheet, antenna ?? null),
  });
}

function targetOf({geodetic}: Reference, place: MarkPlace | null) {
  return {
    plan: {latitudeDeg: geodetic.latitudeDeg, longitudeDeg: geodetic.longitudeDeg},
    ellipsoidalHeightM: geodetic.ellipsoidalHeightM,
    orthometricHeightM: place?.orthometricHeightM ?? null,
  };
}
