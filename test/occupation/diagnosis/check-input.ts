import {WGS84} from '../../../src/geodesy/ellipsoid.ts';
import type {Enu} from '../../../src/geodesy/types.ts';
import type {Hypothesis, Prediction} from '../../../src/occupation/diagnosis/hypothesis.ts';
import type {AntennaFacts, DiagnosisInput} from '../../../src/occupation/diagnosis/input.ts';
import {readReference} from '../../reference/read.ts';

/** The site of the worked examples, and others of other kinds. */
export const SITES = {
  'mid-latitude north': {latitudeDeg: 50, longitudeDeg: 10},
  'mid-latitude south': {latitudeDeg: -35.344, longitudeDeg: 149.158},
  'high latitude': {latitudeDeg: 78.92, longitudeDeg: 11.93},
  'near the antimeridian': {latitudeDeg: -17.713, longitudeDeg: 179.984},
} as const;

export const NO_ANTENNA: AntennaFacts = {
  arpAboveMarkM: null,
  receiverHeightM: null,
  takenOffBy: 'not stated',
  reading: null,
  plateRadiusM: null,
  slantMarkAboveArpM: null,
  phaseCentreAboveArpM: null,
  openingM: null,
  closingM: null,
  heightUsed: null,
};

/** East and north 5 mm, up 10 mm, correlated as means of one record are. */
export const NOISE_M2 = [
  [25e-6, 7.5e-6, 10e-6],
  [7.5e-6, 25e-6, -5e-6],
  [10e-6, -5e-6, 100e-6],
] as const;

/** A check about which nothing is known but its offset. */
export function bareInput(changes: Partial<DiagnosisInput> = {}): DiagnosisInput {
  return {
    offsetM: {east: 0, north: 0, up: 0},
    covarianceM2: NOISE_M2,
    asked: [],
    ellipsoid: WGS84,
    markPlan: SITES['mid-latitude north'],
    ellipsoidalHeightM: 300,
    antenna: null,
    separation: {known: [], missingInLog: false},
    offsetPoint: null,
    declinationDeg: null,
    projection: null,
    frames: {
      measured: null,
      reference: null,
      transformed: false,
      observedEpoch: 2025,
      motion: null,
    },
    resolutionM: {east: null, north: null, up: null},
    nearbyMarks: [],
    otherMarkChecks: [],
    sameMarkChecks: [],
    ...changes,
  };
}

/** A check of a tripod set-up with everything on its sheet. */
export function fullInput(changes: Partial<DiagnosisInput> = {}): DiagnosisInput {
  return bareInput({
    antenna: {
      ...NO_ANTENNA,
      arpAboveMarkM: 2,
      takenOffBy: 'receiver',
      reading: {lengthM: 2, stepM: 0.001, unitM: 1},
      plateRadiusM: 0.1905,
      slantMarkAboveArpM: 0.035,
      phaseCentreAboveArpM: 0.085,
      openingM: 2,
      closingM: 2,
      heightUsed: 'mean',
    },
    separation: {
      known: [
        {source: 'log', separationM: 48},
        {source: 'mark', separationM: 47.6},
      ],
      missingInLog: false,
    },
    offsetPoint: {eastM: 6, northM: 8},
    declinationDeg: 4,
    frames: {
      measured: null,
      reference: {frame: 'ITRF2014', epoch: 2010},
      transformed: false,
      observedEpoch: 2025,
      motion: null,
    },
    resolutionM: {east: 0.001, north: 0.002, up: 0.001},
    nearbyMarks: [
      {
        name: 'RM 1',
        position: {kind: 'offset', eastM: 3.21, northM: -1.47},
        upM: -0.12,
        standardUncertaintyM: 0.005,
      },
      {
        name: 'OLD NAIL',
        position: {kind: 'offset', eastM: -0.62, northM: 0.35},
        upM: null,
        standardUncertaintyM: null,
      },
    ],
    ...changes,
  });
}

export function withOffset(input: DiagnosisInput, {eastM, northM, upM}: Enu): DiagnosisInput {
  return {...input, offsetM: {east: eastM, north: northM, up: upM}};
}

/** The predictions of a hypothesis; a hypothesis that is not tested has none. */
export function predictionsOf({predict}: Hypothesis, input: DiagnosisInput): readonly Prediction[] {
  const outcome = predict(input);
  return outcome.kind === 'predicted' ? outcome.predictions : [];
}

/** The reason why a hypothesis was not tested; null when it was. */
export function reasonOf({predict}: Hypothesis, input: DiagnosisInput): string | null {
  const outcome = predict(input);
  return outcome.kind === 'not tested' ? outcome.because : null;
}

/** Distance from an expected offset to the nearest prediction; infinite without any. */
export function nearestM(predictions: readonly Prediction[], expected: Enu): number {
  return Math.min(
    ...predictions.map(({offset}) =>
      Math.hypot(
        offset.eastM - expected.eastM,
        offset.northM - expected.northM,
        offset.upM - expected.upM,
      ),
    ),
    Number.POSITIVE_INFINITY,
  );
}

export interface Signature {
  readonly id: string;
  readonly inputs: Readonly<Record<string, number>>;
  readonly dE?: number;
  readonly dN?: number;
  readonly dU?: number;
  readonly geodesic_m?: number;
  readonly dlat_deg?: number;
  readonly lon_read?: number;
  readonly d1?: readonly [number, number];
  readonly horizontal_m?: number;
  readonly vertical_m?: number;
  readonly d?: number;
  readonly delta_m?: number;
  readonly convergence_deg?: number;
}

const SIGNATURES = readReference<{readonly signatures: readonly Signature[]}>(
  'blunder-signatures',
).signatures;

export function signature(id: string): Signature {
  const found = SIGNATURES.find((one) => one.id === id);
  if (found === undefined) throw new Error(`no signature ${id}`);
  return found;
}

/** The offset that a worked example prints. */
export function offsetOf({dE, dN, dU}: Signature): Enu {
  return {eastM: dE ?? 0, northM: dN ?? 0, upM: dU ?? 0};
}
