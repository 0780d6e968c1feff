import type {Mark, WitnessMark} from '../../fieldbook/mark.ts';
import {METRES_PER_UNIT} from '../../fieldbook/quantity.ts';
import type {AntennaEntry, AntennaReadings, Sheet} from '../../fieldbook/sheet.ts';
import {RADIANS_PER_DEGREE} from '../../geodesy/angle.ts';
import type {Ellipsoid} from '../../geodesy/ellipsoid.ts';
import {enuFromGeodetic, localFrame} from '../../geodesy/local.ts';
import type {Enu} from '../../geodesy/types.ts';
import {type AntennaReduction, arpAboveMarkM} from '../antenna.ts';
import {type MarkPlace, markPlace} from '../mark-place.ts';
import type {
  AntennaFacts,
  KnownSeparation,
  NearbyMark,
  OffsetPoint,
  SeparationFacts,
} from './input.ts';

/*
 * What field sheet, marks file and log say, in the words of the diagnosis.
 */

/** null when the sheet says nothing of the antenna and its height. */
export function antennaFacts(sheet: Sheet, reduction: AntennaReduction): AntennaFacts | null {
  const {antenna, receiver} = sheet;
  if (antenna === undefined && receiver?.heightEnteredM === undefined) return null;
  const first = antenna?.before?.readings?.[0];
  return {
    arpAboveMarkM: reduction.antennaHeightM,
    receiverHeightM: receiver?.heightEnteredM ?? null,
    takenOffBy: takenOffBy(sheet, reduction),
    reading: first
      ? {lengthM: first.lengthM, stepM: first.stepM, unitM: METRES_PER_UNIT[first.unit]}
      : null,
    plateRadiusM: antenna?.plateRadiusM ?? null,
    slantMarkAboveArpM: antenna?.slantMarkAboveArpM ?? null,
    phaseCentreAboveArpM: antenna?.phaseCentreAboveArpM ?? null,
    openingM: antenna ? meanHeightM(antenna.before, antenna) : null,
    closingM: antenna ? meanHeightM(antenna.after, antenna) : null,
    heightUsed: reduction.heightUsed,
  };
}

function takenOffBy(
  {logPoint, receiver}: Sheet,
  {pointReached}: AntennaReduction,
): AntennaFacts['takenOffBy'] {
  if (logPoint === 'mark' || receiver?.reducedToMark === true) return 'receiver';
  if (logPoint === undefined || logPoint === 'not stated') return 'not stated';
  return pointReached === 'mark' ? 'stillmark' : 'nobody';
}

function meanHeightM(readings: AntennaReadings | undefined, antenna: AntennaEntry): number | null {
  const lengths = readings?.readings ?? [];
  if (lengths.length === 0) return null;
  const heights = lengths.map(({lengthM}) => arpAboveMarkM(lengthM, antenna));
  return heights.reduce((sum, heightM) => sum + heightM, 0) / heights.length;
}

/** null for a set-up over its mark. */
export function offsetPointFacts({eastM, northM}: Enu): OffsetPoint | null {
  return eastM === 0 && northM === 0 ? null : {eastM, northM};
}

export interface SeparationSources {
  readonly mark: Mark | null;
  readonly sheet: Sheet;
  /** Mean of the separation field over the epochs used; null: the field is empty. */
  readonly logSeparationM: number | null;
  /** Of the geoid grid at the mark; null: none given. */
  readonly gridUndulationM: number | null;
  /** Whether the log gives altitudes, so that a separation belongs to them. */
  readonly logHasAltitudes: boolean;
}

/** Every separation that is known, each with where it comes from. */
export function separationFacts(sources: SeparationSources): SeparationFacts {
  const {mark, sheet, logSeparationM, gridUndulationM, logHasAltitudes} = sources;
  const found: readonly (readonly [KnownSeparation['source'], number | null])[] = [
    ['log', logSeparationM],
    ['mark', mark === null ? null : separationOfMark(mark)],
    ['sheet', sheet.separationM ?? null],
    ['geoid grid', gridUndulationM],
  ];
  return {
    known: found.flatMap(([source, separationM]) =>
      separationM === null ? [] : [{source, separationM}],
    ),
    missingInLog: logHasAltitudes && logSeparationM === null,
  };
}

/** As stated, else from both heights of the mark. */
function separationOfMark({separationM, coordinates}: Mark): number | null {
  if (separationM !== undefined) return separationM;
  if (coordinates.kind === 'geocentric') return null;
  const {ellipsoidalHeightM, orthometricHeightM} = coordinates;
  return ellipsoidalHeightM === undefined || orthometricHeightM === undefined
    ? null
    : ellipsoidalHeightM - orthometricHeightM;
}

export interface Surroundings {
  readonly ellipsoid: Ellipsoid;
  /** At the mark, for witness bearings from grid north; null: those are left out. */
  readonly convergenceDeg: number | null;
  /** For witness bearings from magnetic north; null: those are left out. */
  readonly declinationDeg: number | null;
}

/** Farther away nobody takes one mark for another. */
const FARTHEST_M = 100_000;

/** The witness marks of a mark, then the other marks of its file, as seen from it. */
export function nearbyMarks(
  mark: Mark,
  others: readonly Mark[],
  surroundings: Surroundings,
): NearbyMark[] {
  const own = markPlace(mark, surroundings.ellipsoid);
  return [
    ...mark.witnessMarks.flatMap((witness) => witnessFacts(witness, surroundings)),
    ...others
      .filter(({name}) => name !== mark.name)
      .flatMap((other) => otherMark(own, markPlace(other, surroundings.ellipsoid), surroundings)),
  ];
}

function witnessFacts(witness: WitnessMark, surroundings: Surroundings): NearbyMark[] {
  const {name, position, upM} = witness;
  const facts = {name, upM: upM ?? null, standardUncertaintyM: null};
  switch (position?.kind) {
    case 'offset':
    case 'distance':
      return [{...facts, position}];
    case 'distance and bearing': {
      const {distanceM, bearingDeg, bearingFrom} = position;
      const turnDeg = {
        'true north': 0,
        'grid north': surroundings.convergenceDeg,
        'magnetic north': surroundings.declinationDeg,
      }[bearingFrom];
      if (turnDeg === null) return [{...facts, position: {kind: 'distance', distanceM}}];
      const azimuthRad = (bearingDeg + turnDeg) * RADIANS_PER_DEGREE;
      const eastM = distanceM * Math.sin(azimuthRad);
      const northM = distanceM * Math.cos(azimuthRad);
      return [{...facts, position: {kind: 'offset', eastM, northM}}];
    }
    case undefined:
      return [];
  }
}

function otherMark(own: MarkPlace, other: MarkPlace, {ellipsoid}: Surroundings): NearbyMark[] {
  if (own.plan === null || other.plan === null) return [];
  const frame = localFrame(
    {...own.plan, ellipsoidalHeightM: own.ellipsoidalHeightM ?? 0},
    ellipsoid,
  );
  const {eastM, northM} = enuFromGeodetic(
    {...other.plan, ellipsoidalHeightM: frame.origin.ellipsoidalHeightM},
    frame,
  );
  if (Math.hypot(eastM, northM) > FARTHEST_M) return [];
  return [
    {
      name: other.name,
      position: {kind: 'offset', eastM, northM},
      upM: heightDifferenceM(own, other),
      standardUncertaintyM: largestSigmaM(other),
    },
  ];
}

function heightDifferenceM(own: MarkPlace, other: MarkPlace): number | null {
  if (own.ellipsoidalHeightM !== null && other.ellipsoidalHeightM !== null) {
    return other.ellipsoidalHeightM - own.ellipsoidalHeightM;
  }
  if (own.orthometricHeightM !== null && other.orthometricHeightM !== null) {
    return other.orthometricHeightM - own.orthometricHeightM;
  }
  return null;
}

/** null: not stated, the default of a nearby mark counts. */
function largestSigmaM({covarianceM2}: MarkPlace): number | null {
  if (covarianceM2 === null) return null;
  return Math.sqrt(Math.max(...covarianceM2.map((row, i) => row[i] ?? 0)));
}
