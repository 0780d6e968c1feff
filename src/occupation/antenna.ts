import type {
  AntennaEntry,
  AntennaReadings,
  EccentricityEntry,
  SheetEntries,
  StatedUncertainty,
} from '../fieldbook/sheet.ts';
import type {Enu} from '../geodesy/types.ts';
import type {OccupationFacts, PointMeant, Severity} from './result.ts';

/** Readings of one height that lie further apart than this are a finding; guides read to 1 mm. */
const READING_LIMIT_M = 0.003;
/** Room for the last bit of lengths that came from other units. */
const ROUND_OFF_M = 1e-9;

/** How far the log's point stands above the mark, and how well that is known. */
export interface AntennaReduction {
  /** What the positions are of once `heightAboveMarkM` is taken off them. */
  readonly pointReached: PointMeant;
  readonly opening: MeasuredHeight;
  /** Same as the opening when nothing was measured after the session. */
  readonly closing: MeasuredHeight;
  /** null when nothing is taken off, or nothing was measured. */
  readonly heightUsed: OccupationFacts['heightUsed'];
  /** Antenna reference point above the mark, as used over the whole record; null: not measured. */
  readonly antennaHeightM: number | null;
  readonly uncertainty: HeightUncertainty | null;
  readonly findings: readonly AntennaFinding[];
}

export interface MeasuredHeight {
  readonly gpsSeconds: number;
  /** Vertical distance from the point that is reached up to the log's point. */
  readonly verticalM: number;
}

export interface HeightUncertainty {
  readonly standardUncertaintyM: number;
  readonly from: 'stated' | 'scatter of the readings' | 'readings within their limit';
  readonly id: string | null;
  /** Where a stated number comes from, in the words of the sheet. */
  readonly source: string | null;
}

export interface AntennaFinding {
  readonly code: AntennaFindingCode;
  readonly severity: Severity;
  readonly values: Readonly<Record<string, string | number | boolean | null>>;
}

export type AntennaFindingCode =
  | 'antenna-readings-disagree'
  | 'antenna-units-disagree'
  | 'antenna-check-too-coarse'
  | 'antenna-check-same-unit'
  | 'antenna-read-once'
  | 'antenna-height-changed'
  | 'antenna-height-not-given'
  | 'antenna-height-not-applied'
  | 'antenna-log-point-not-stated'
  | 'antenna-phase-centre-not-given'
  | 'antenna-receiver-height-differs';

export interface AntennaOptions {
  readonly sheet: Pick<SheetEntries, 'antenna' | 'receiver' | 'logPoint' | 'standardUncertainties'>;
  /** First and last epoch used: when a height was measured, if the sheet gives no time. */
  readonly startGpsSeconds: number;
  readonly endGpsSeconds: number;
}

/**
 * Height of the point under a slant mark's level: the plumb leg of the triangle of slant reading
 * and plate radius.
 *
 * Source: the reduction √(s² − R²) − o that antenna height instructions print; its example (s =
 * 1.8527 m, R = 0.1905 m, o = 0.0350 m, 1.80788 m) is in the reference.
 */
export function verticalFromSlantM(slantM: number, plateRadiusM: number): number {
  if (!(slantM > plateRadiusM) || !(plateRadiusM >= 0)) {
    throw new RangeError(
      `verticalFromSlantM: need slant > radius ≥ 0, got ${slantM} and ${plateRadiusM}`,
    );
  }
  return Math.sqrt(slantM * slantM - plateRadiusM * plateRadiusM);
}

/** Antenna reference point above the mark, from one reading as the sheet describes it. */
export function arpAboveMarkM(readingM: number, antenna: AntennaEntry): number {
  const {measured, plateRadiusM, slantMarkAboveArpM, phaseCentreAboveArpM} = antenna;
  const verticalM =
    measured === 'slant' ? verticalFromSlantM(readingM, plateRadiusM ?? 0) : readingM;
  switch (antenna.measuredTo) {
    case 'slant mark':
      return verticalM - (slantMarkAboveArpM ?? 0);
    case 'phase centre':
      return verticalM - (phaseCentreAboveArpM ?? 0);
    default:
      return verticalM;
  }
}

/**
 * Reduces what the sheet says about the antenna: which point the positions become of, how far the
 * log's point stands above it before and after, and what is odd about the readings.
 *
 * Nothing is guessed: a log whose point is not stated stays "antenna, point not stated", and its
 * height is not taken off.
 */
export function reduceAntenna(options: AntennaOptions): AntennaReduction {
  const {sheet, startGpsSeconds, endGpsSeconds} = options;
  const {antenna} = sheet;
  const findings: AntennaFinding[] = [];
  const before = antenna?.before && groupOf(antenna.before, antenna);
  const after = antenna?.after && groupOf(antenna.after, antenna);
  if (before) findings.push(...findingsOf(before, 'opening'));
  if (after) findings.push(...findingsOf(after, 'closing'));
  const heightUsed = antenna?.heightUsed ?? (after === undefined ? 'opening' : 'mean');
  const changeM = before && after ? after.meanM - before.meanM : 0;
  if (Math.abs(changeM) > READING_LIMIT_M + ROUND_OFF_M) {
    findings.push({
      code: 'antenna-height-changed',
      severity: 'caution',
      values: {changeM, limitM: READING_LIMIT_M, heightUsed},
    });
  }
  const reached = reach(sheet, before !== undefined);
  if (reached.finding) findings.push(reached.finding);
  const opening = {
    gpsSeconds: antenna?.before?.at?.gpsSeconds ?? startGpsSeconds,
    verticalM: reached.aboveArpM + (reached.usesHeight ? (before?.meanM ?? 0) : 0),
  };
  const closing = {
    gpsSeconds: antenna?.after?.at?.gpsSeconds ?? endGpsSeconds,
    verticalM: opening.verticalM + (reached.usesHeight ? changeM : 0),
  };
  const antennaHeightM =
    before === undefined ? null : before.meanM + (heightUsed === 'opening' ? 0 : changeM / 2);
  const differs = receiverHeightFinding(sheet, antennaHeightM);
  if (differs) findings.push(differs);
  return {
    pointReached: reached.point,
    opening,
    closing,
    heightUsed: before === undefined ? null : heightUsed,
    antennaHeightM,
    uncertainty: uncertaintyOf({
      stated: sheet.standardUncertainties?.find(({of}) => of === 'antenna height'),
      groups: [before, after].filter((group) => group !== undefined),
      changeM,
      heightUsed,
    }),
    findings,
  };
}

/**
 * How far the log's point stands above the point reached, at a moment.
 *
 * Interpolated heights change evenly between the two measurements and stay as measured outside
 * them.
 */
export function heightAboveMarkM(reduction: AntennaReduction, gpsSeconds: number): number {
  const {opening, closing, heightUsed} = reduction;
  const riseM = closing.verticalM - opening.verticalM;
  if (heightUsed === 'mean') return opening.verticalM + riseM / 2;
  if (heightUsed !== 'interpolated') return opening.verticalM;
  const spanS = closing.gpsSeconds - opening.gpsSeconds;
  if (!(spanS > 0)) return opening.verticalM + riseM / 2;
  const part = Math.min(1, Math.max(0, (gpsSeconds - opening.gpsSeconds) / spanS));
  return opening.verticalM + riseM * part;
}

/** The readings of one measurement, each reduced to the antenna reference point. */
interface ReadingGroup {
  readonly heightsM: readonly number[];
  readonly checkHeightsM: readonly number[];
  readonly meanM: number;
  readonly checkMeanM: number | null;
  /** Coarsest last digit among the readings and among the check readings. */
  readonly stepM: number;
  readonly checkStepM: number;
  readonly sameUnit: boolean;
}

function groupOf({readings, checkReadings}: AntennaReadings, antenna: AntennaEntry): ReadingGroup {
  const main = readings ?? [];
  const check = checkReadings ?? [];
  const heightsM = main.map(({lengthM}) => arpAboveMarkM(lengthM, antenna));
  const checkHeightsM = check.map(({lengthM}) => arpAboveMarkM(lengthM, antenna));
  return {
    heightsM,
    checkHeightsM,
    meanM: mean(heightsM),
    checkMeanM: check.length === 0 ? null : mean(checkHeightsM),
    stepM: Math.max(...main.map(({stepM}) => stepM)),
    checkStepM: Math.max(0, ...check.map(({stepM}) => stepM)),
    sameUnit: check.some(({unit}) => main.some((reading) => family(reading.unit) === family(unit))),
  };
}

/** Metres and millimetres stand on one tape; a second unit is a second scale. */
function family(unit: string): 'metric' | 'foot' {
  return unit === 'm' || unit === 'cm' || unit === 'mm' ? 'metric' : 'foot';
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function spread(values: readonly number[]): number {
  return values.length === 0 ? 0 : Math.max(...values) - Math.min(...values);
}

function findingsOf(group: ReadingGroup, when: 'opening' | 'closing'): AntennaFinding[] {
  const findings: AntennaFinding[] = [];
  const spreadM = Math.max(spread(group.heightsM), spread(group.checkHeightsM));
  if (spreadM > READING_LIMIT_M + ROUND_OFF_M) {
    findings.push({
      code: 'antenna-readings-disagree',
      severity: 'concern',
      values: {when, spreadM, limitM: READING_LIMIT_M},
    });
  }
  if (group.checkMeanM === null) {
    if (group.heightsM.length === 1) {
      findings.push({code: 'antenna-read-once', severity: 'note', values: {when}});
    }
    return findings;
  }
  if (group.sameUnit) {
    findings.push({code: 'antenna-check-same-unit', severity: 'note', values: {when}});
  }
  // Rounding alone may set two readings half a step of each apart.
  const roundingM = (group.stepM + group.checkStepM) / 2;
  const differenceM = group.checkMeanM - group.meanM;
  const limitM = Math.max(READING_LIMIT_M, roundingM);
  if (Math.abs(differenceM) > limitM + ROUND_OFF_M) {
    findings.push({
      code: 'antenna-units-disagree',
      severity: 'concern',
      values: {when, differenceM, limitM},
    });
  } else if (roundingM > READING_LIMIT_M) {
    findings.push({
      code: 'antenna-check-too-coarse',
      severity: 'note',
      values: {when, roundingM, limitM: READING_LIMIT_M},
    });
  }
  return findings;
}

interface Reached {
  readonly point: PointMeant;
  /** Log's point above the antenna reference point, as far as it is taken off. */
  readonly aboveArpM: number;
  readonly usesHeight: boolean;
  readonly finding: AntennaFinding | null;
}

/** How far down from the log's point the sheet leads. */
function reach(sheet: AntennaOptions['sheet'], measured: boolean): Reached {
  const none = {aboveArpM: 0, usesHeight: false};
  const {antenna} = sheet;
  const logPoint = sheet.logPoint ?? (sheet.receiver?.reducedToMark === true ? 'mark' : undefined);
  switch (logPoint) {
    case 'mark':
      return {...none, point: 'mark', finding: null};
    case 'antenna reference point':
      return measured
        ? {point: 'mark', aboveArpM: 0, usesHeight: true, finding: null}
        : {
            ...none,
            point: 'antenna reference point',
            finding: notGiven('antenna-height-not-given'),
          };
    case 'phase centre': {
      const aboveArpM = antenna?.phaseCentreAboveArpM;
      if (aboveArpM === undefined) {
        const finding = notGiven('antenna-phase-centre-not-given');
        return {...none, point: 'phase centre', finding};
      }
      return measured
        ? {point: 'mark', aboveArpM, usesHeight: true, finding: null}
        : {
            point: 'antenna reference point',
            aboveArpM,
            usesHeight: false,
            finding: notGiven('antenna-height-not-given'),
          };
    }
    default:
      return {
        ...none,
        point: 'antenna, point not stated',
        finding: measured
          ? {code: 'antenna-height-not-applied', severity: 'concern', values: {}}
          : notGiven('antenna-log-point-not-stated'),
      };
  }
}

function notGiven(code: AntennaFindingCode): AntennaFinding {
  return {code, severity: 'caution', values: {}};
}

/** The receiver took off the height that was typed in, not the one that was measured. */
function receiverHeightFinding(
  {receiver, logPoint}: AntennaOptions['sheet'],
  antennaHeightM: number | null,
): AntennaFinding | null {
  const reduced = receiver?.reducedToMark === true || logPoint === 'mark';
  const enteredM = receiver?.heightEnteredM;
  if (!reduced || enteredM === undefined || antennaHeightM === null) return null;
  const differenceM = enteredM - antennaHeightM;
  if (Math.abs(differenceM) <= READING_LIMIT_M + ROUND_OFF_M) return null;
  return {
    code: 'antenna-receiver-height-differs',
    severity: 'concern',
    values: {enteredM, measuredM: antennaHeightM, differenceM, limitM: READING_LIMIT_M},
  };
}

interface UncertaintyInput {
  readonly stated: StatedUncertainty | undefined;
  readonly groups: readonly ReadingGroup[];
  readonly changeM: number;
  readonly heightUsed: 'opening' | 'mean' | 'interpolated';
}

/** Degrees of freedom from which the scatter of the readings is worth more than their limit. */
const LEAST_DEGREES_OF_FREEDOM = 3;

/**
 * Standard uncertainty of the height: stated by the user, else from the readings, else nothing.
 *
 * Method: scatter pooled over all groups of readings, widened by √(ν/(ν − 2)) for few degrees of
 * freedom ν (JCGM 101:2008, 6.4.9.4), over the number of readings in the height used. With fewer
 * than 3 degrees of freedom: rectangular between ± the 3 mm within which readings pass, or ± their
 * spread if wider (JCGM 100:2008, 4.3.7). Added: the rounding of a reading, step/√12 (JCGM 100,
 * F.2.2.1), and the change during the session, whose course is unknown unless it is interpolated:
 * uniform over the change, so change/√3 for the opening height and change/√12 for the mean.
 * A single reading shows nothing about itself: null.
 */
function uncertaintyOf(input: UncertaintyInput): HeightUncertainty | null {
  const {stated, groups, changeM, heightUsed} = input;
  if (stated?.upM !== undefined) {
    return {
      standardUncertaintyM: stated.upM,
      from: 'stated',
      id: stated.id ?? null,
      source: stated.from ?? null,
    };
  }
  const sets = groups.flatMap(({heightsM, checkHeightsM}) => [heightsM, checkHeightsM]);
  const freedom = sets.reduce((sum, set) => sum + Math.max(0, set.length - 1), 0);
  const readings = sets.reduce((sum, set) => sum + set.length, 0);
  if (readings < 2) return null;
  const scattered = freedom >= LEAST_DEGREES_OF_FREEDOM;
  const readingVariance = scattered
    ? (pooledVariance(sets, freedom) * freedom * shareOfReadings(groups, heightUsed)) /
      (freedom - 2)
    : Math.max(READING_LIMIT_M, ...sets.map(spread)) ** 2 / 3;
  const stepM = Math.max(...groups.map((group) => group.stepM));
  const changeShare = {opening: 1 / 3, mean: 1 / 12, interpolated: 0}[heightUsed];
  const variance = readingVariance + stepM ** 2 / 12 + changeM ** 2 * changeShare;
  return {
    standardUncertaintyM: Math.sqrt(variance),
    from: scattered ? 'scatter of the readings' : 'readings within their limit',
    id: null,
    source: null,
  };
}

function pooledVariance(sets: readonly (readonly number[])[], freedom: number): number {
  const squares = sets.flatMap((set) => set.map((value) => (value - mean(set)) ** 2));
  return squares.reduce((sum, square) => sum + square, 0) / freedom;
}

/** Variance of the height used, as a share of the variance of one reading. */
function shareOfReadings(groups: readonly ReadingGroup[], heightUsed: string): number {
  const [first, second] = groups;
  const opening = 1 / (first?.heightsM.length ?? 1);
  if (second === undefined || heightUsed === 'opening') return opening;
  return (opening + 1 / second.heightsM.length) / 4;
}

/** From the mark to the point under the antenna, in the local frame at the mark. */
export type Eccentricity =
  | {readonly kind: 'known'; readonly enu: Enu}
  | {readonly kind: 'convergence needed'};

/**
 * The eccentricity of a set-up that does not stand over its mark.
 *
 * Azimuth = grid bearing + convergence (the bearing of grid north, clockwise), or magnetic bearing
 * + declination (east positive).
 *
 * @param convergenceDeg  at the mark, for a bearing from grid north; undefined when not known
 */
export function eccentricityEnu(
  entry: EccentricityEntry,
  convergenceDeg: number | undefined,
): Eccentricity {
  const upM = entry.upM ?? 0;
  const {distanceM, bearingDeg} = entry;
  if (distanceM === undefined || bearingDeg === undefined) {
    return {kind: 'known', enu: {eastM: entry.eastM ?? 0, northM: entry.northM ?? 0, upM}};
  }
  const turnDeg = {
    'true north': 0,
    'grid north': convergenceDeg,
    'magnetic north': entry.declinationDeg,
  }[entry.bearingFrom ?? 'true north'];
  if (turnDeg === undefined) return {kind: 'convergence needed'};
  const azimuthRad = ((bearingDeg + turnDeg) * Math.PI) / 180;
  return {
    kind: 'known',
    enu: {
      eastM: distanceM * Math.sin(azimuthRad),
      northM: distanceM * Math.cos(azimuthRad),
      upM,
    },
  };
}
