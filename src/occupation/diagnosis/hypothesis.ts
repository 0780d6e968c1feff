import type {Enu, Matrix3} from '../../geodesy/types.ts';
import type {DiagnosisInput, OtherMarkCheck} from './input.ts';

/** Numbers and words that title and advice speak of. */
export type CauseValues = Readonly<Record<string, string | number | boolean | null>>;

/** One everyday blunder: the offsets that it would leave under what is known of this check. */
export interface Hypothesis {
  readonly code: string;
  readonly predict: (input: DiagnosisInput) => Outcome;
}

export type Outcome =
  | {readonly kind: 'predicted'; readonly predictions: readonly Prediction[]}
  | {readonly kind: 'not tested'; readonly because: Missing};

export interface Prediction {
  readonly offset: Enu;
  /** From the uncertainty of what the prediction was made of. */
  readonly covarianceM2: Matrix3;
  /** How many numbers were taken from the offset itself; such a hypothesis always fits. */
  readonly freeParameters: number;
  readonly values: CauseValues;
}

/** Why a hypothesis could not be tested. */
export type Missing =
  | 'no-antenna-height'
  | 'no-plate-radius'
  | 'no-phase-centre'
  | 'no-height-reading'
  | 'no-separation'
  | 'separation-in-log'
  | 'one-separation'
  | 'no-closing-height'
  | 'height-change-used'
  | 'axes-not-compared'
  | 'no-plan'
  | 'no-ellipsoidal-height'
  | 'no-grid'
  | 'cannot-happen-here'
  | 'no-frame'
  | 'no-velocity'
  | 'no-epochs'
  | 'no-other-mark'
  | 'other-mark-fits'
  | 'set-ups-agree'
  | 'no-second-session'
  | 'no-nearby-mark'
  | 'no-offset-point'
  | 'no-declination'
  | 'no-resolution'
  | 'beyond-its-size'
  | 'leaves-no-offset';

/** Standard uncertainties of the inputs of predictions: common practice, no source. */
export const TAPE_SIGMA_M = 0.002;
export const GEOID_MODEL_SIGMA_M = 0.05;
export const BEARING_SIGMA_DEG = 0.5;

const EXACT: Matrix3 = [
  [0, 0, 0],
  [0, 0, 0],
  [0, 0, 0],
];

export function predicted(predictions: readonly Prediction[]): Outcome {
  return {kind: 'predicted', predictions};
}

export function notTested(because: Missing): Outcome {
  return {kind: 'not tested', because};
}

/** An offset of the height alone. */
export function upward(upM: number, sigmaM: number, values: CauseValues = {}): Prediction {
  return {
    offset: {eastM: 0, northM: 0, upM},
    covarianceM2: diagonal(0, 0, sigmaM),
    freeParameters: 0,
    values,
  };
}

/** An offset in east, north and up whose axes are equally well known in plan. */
export function vector(
  offset: Enu,
  planSigmaM: number,
  upSigmaM: number,
  values: CauseValues = {},
): Prediction {
  return {
    offset,
    covarianceM2: diagonal(planSigmaM, planSigmaM, upSigmaM),
    freeParameters: 0,
    values,
  };
}

/** Variances of three standard deviations, uncorrelated. */
export function diagonal(eastM: number, northM: number, upM: number): Matrix3 {
  if (eastM === 0 && northM === 0 && upM === 0) return EXACT;
  return [
    [eastM * eastM, 0, 0],
    [0, northM * northM, 0],
    [0, 0, upM * upM],
  ];
}

/** The offset of this check with zero where nothing was compared. */
export function comparedOffset({offsetM}: DiagnosisInput): Enu {
  return {eastM: offsetM.east ?? 0, northM: offsetM.north ?? 0, upM: offsetM.up ?? 0};
}

/** A prediction that took so many numbers from the offset. */
export function fitted(prediction: Prediction, freeParameters: number): Prediction {
  return {...prediction, freeParameters};
}

/** Variance of a component about which another check says nothing. */
const UNKNOWN_M2 = 1e6;

/** Covariance of another check; a component that it did not compare is as good as unknown. */
export function covarianceOfCheck({
  offsetM,
  covarianceM2,
}: Pick<OtherMarkCheck, 'offsetM' | 'covarianceM2'>): Matrix3 {
  const values = [offsetM.east, offsetM.north, offsetM.up];
  const entry = (i: number, j: number): number => {
    if (values[i] === null || values[j] === null) return i === j ? UNKNOWN_M2 : 0;
    return covarianceM2[i]?.[j] ?? 0;
  };
  const row = (i: number) => [entry(i, 0), entry(i, 1), entry(i, 2)] as const;
  return [row(0), row(1), row(2)];
}
