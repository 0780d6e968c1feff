import {parseGrid} from '../geodesy/grid-definition.ts';
import {type Projection, projectionOf} from '../geodesy/projection.ts';
import {decimalYear} from '../time/gps-time.ts';
import type {AntennaReduction} from './antenna.ts';
import {type CovarianceM2, covarianceSum} from './covariance.ts';
import {type Diagnosis, diagnose} from './diagnosis/diagnose.ts';
import {antennaFacts, nearbyMarks, offsetPointFacts, separationFacts} from './diagnosis/facts.ts';
import type {DiagnosisInput} from './diagnosis/input.ts';
import type {LocalColumns} from './local-columns.ts';
import type {MarkPlace} from './mark-place.ts';
import {otherMarkChecks, sameMarkChecks} from './other-setups.ts';
import {eccentricityOf} from './reduce-to-mark.ts';
import type {ReduceRequest} from './request.ts';
import type {
  BudgetRow,
  Candidate,
  Comparison,
  DiagnosisFound,
  EpochAccount,
  Position,
} from './result.ts';
import {meanSeparationM, undulationAt} from './separation.ts';
import type {Session} from './session.ts';

/** What one finished comparison was made from. */
export interface ComparedRecord {
  readonly request: ReduceRequest;
  readonly account: EpochAccount;
  readonly antenna: AntennaReduction;
  readonly columns: LocalColumns;
  readonly session: Session;
  readonly place: MarkPlace;
  readonly measured: Position;
  readonly comparison: Comparison;
  /** Of the measured position with the transformation, if there was one. */
  readonly covarianceM2: CovarianceM2;
  readonly budget: readonly BudgetRow[];
}

/** Adds to a comparison which everyday mistakes would leave just this offset. */
export function withDiagnosis(compared: ComparedRecord): Comparison {
  const diagnosis = diagnose(inputOf(compared));
  const {sayCause} = compared.request;
  const candidates: Candidate[] = diagnosis.candidates.map((candidate) => ({
    code: candidate.code,
    title: sayCause.title(candidate.code, candidate.values),
    predictedM: candidate.predictedM,
    misfit: candidate.misfit,
    group: candidate.group,
    advice: sayCause.advice(candidate.code, candidate.values),
  }));
  return {...compared.comparison, candidates, diagnosis: found(diagnosis, sayCause)};
}

function found(diagnosis: Diagnosis, sayCause: ReduceRequest['sayCause']): DiagnosisFound | null {
  const {asked, accidental, pairs, testedHypotheses, notTested} = diagnosis;
  if (asked === null) return null;
  return {
    asked,
    pairs: pairs.map(({plan, height, predictedM, misfit}) => ({
      codes: [plan.code, height.code],
      title: sayCause.pair(plan, height),
      predictedM,
      misfit,
    })),
    accidentalMatches: accidental.matches,
    accidentalWithinM: accidental.withinM,
    accidentalOf: accidental.of,
    tested: testedHypotheses,
    notTested: notTested.map(({code, because}) => ({code, because})),
  };
}

function inputOf(compared: ComparedRecord): DiagnosisInput {
  const {request, account, antenna, columns, session, place, measured, comparison} = compared;
  const {sheet, mark, ellipsoid} = request;
  const projection = projectionOfCheck(compared);
  const convergenceDeg =
    projection === null || place.plan === null
      ? null
      : projection.factors(place.plan).convergenceDeg;
  const declinationDeg = sheet.eccentricity?.declinationDeg ?? null;
  const inHand = {request, place, position: measured, comparison, budget: compared.budget};
  const observed = (session.fromGpsSeconds + session.toGpsSeconds) / 2;
  return {
    offsetM: comparison.offsetM,
    covarianceM2: covarianceSum(compared.covarianceM2, place.covarianceM2),
    asked: request.asked,
    ellipsoid,
    markPlan: place.plan,
    ellipsoidalHeightM: place.ellipsoidalHeightM ?? measured.geodetic.ellipsoidalHeightM,
    antenna: antennaFacts(sheet, antenna),
    separation: separationFacts({
      mark,
      sheet,
      logSeparationM: meanSeparationM(request.log.epochs, session.indices),
      gridUndulationM: undulationOfGrid(request, place.plan ?? measured.geodetic),
      logHasAltitudes: columns.heightKind !== 'none',
    }),
    offsetPoint: offsetPointFacts(eccentricityOf(sheet, convergenceDeg ?? undefined)),
    declinationDeg,
    projection,
    frames: {
      measured: frameAndEpoch(measured.frame, measured.coordinateEpoch),
      reference: frameAndEpoch(mark?.frame ?? null, mark?.coordinateEpoch ?? null),
      transformed: comparison.frameChange !== null && comparison.frameChange.steps.length > 0,
      observedEpoch: decimalYear(observed),
      motion: request.motion,
    },
    resolutionM: account.resolutionM,
    nearbyMarks:
      mark === null
        ? []
        : nearbyMarks(mark, request.marks, {ellipsoid, convergenceDeg, declinationDeg}),
    otherMarkChecks: otherMarkChecks(inHand),
    sameMarkChecks: sameMarkChecks(inHand),
  };
}

function frameAndEpoch(frame: string | null, epoch: number | null) {
  return frame === null ? null : {frame, epoch};
}

/** The grid of the mark or of the request; null when none is named. */
function projectionOfCheck({request, place}: ComparedRecord): Projection | null {
  const {mark, grid, ellipsoid} = request;
  const named = mark?.coordinates.kind === 'grid' ? mark.coordinates.projection : grid;
  return named === null ? null : projectionOf(parseGrid(named, {place: place.plan, ellipsoid}));
}

function undulationOfGrid(
  {geoid}: ReduceRequest,
  place: {readonly latitudeDeg: number; readonly longitudeDeg: number},
): number | null {
  return geoid.grid === null ? null : undulationAt(geoid.grid, place);
}
