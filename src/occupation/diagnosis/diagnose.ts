import {chiSquareQuantile} from '../../statistics/distribution.ts';
import {type Accidental, expectedMatches} from './accidental.ts';
import {type DiagnosedCandidate, ranked, type Tested} from './candidates.ts';
import {HYPOTHESES} from './catalogue.ts';
import {comparedOffset, type Missing} from './hypothesis.ts';
import type {DiagnosisInput} from './input.ts';
import {lengthM, misfit, testedAxes} from './misfit.ts';
import {type DiagnosedPair, pairsOf} from './pairs.ts';

/** What could explain an offset; `consistent with`, never `caused by`. */
export interface Diagnosis {
  /** Whether there is anything to explain. */
  readonly asked: 'the offset is more than noise' | 'a tolerance is exceeded' | null;
  /** Misfit of "no blunder"; null when nothing was compared. */
  readonly noBlunderMisfit: number | null;
  /** Axes compared: the degrees of freedom of every misfit here. */
  readonly degreesOfFreedom: number;
  /** All that fit: those predicted from inputs alone by misfit, then those with free parameters. */
  readonly candidates: readonly DiagnosedCandidate[];
  /** One cause of the plan with one of the height, where neither fits alone. */
  readonly pairs: readonly DiagnosedPair[];
  readonly accidental: Accidental;
  readonly testedHypotheses: readonly string[];
  readonly notTested: readonly {readonly code: string; readonly because: Missing}[];
}

/** "No blunder" is rejected at this level. */
const REJECTED_AT = 0.99;
/** A true cause stays listed with this probability. */
const SURVIVES_AT = 0.999;

/**
 * Which everyday blunders would leave just this offset.
 *
 * Method: each hypothesis predicts an offset b with a covariance C_b from its inputs. Its misfit is
 * T = (d − b)ᵀ (C + C_b)⁻¹ (d − b), chi-square with as many degrees of freedom as axes compared. Asked
 * only when T of b = 0 exceeds its 99 % quantile, or a tolerance is exceeded; a hypothesis survives
 * when T is within the 99.9 % quantile and it explains more than "no blunder" does. All survivors are
 * listed, best first. Nothing is corrected: the remedy is always an independent measurement.
 */
export function diagnose(input: DiagnosisInput): Diagnosis {
  const axes = testedAxes(input);
  const offset = comparedOffset(input);
  const predictions: Tested[] = [];
  const notTested: {code: string; because: Missing}[] = [];
  for (const {code, predict} of HYPOTHESES) {
    const outcome = predict(input);
    if (outcome.kind === 'not tested') {
      notTested.push({code, because: outcome.because});
      continue;
    }
    // A prediction of nothing on the axes compared cannot be told from "no blunder".
    const visible = outcome.predictions.filter((one) => lengthM(one.offset, axes) > 0);
    if (visible.length === 0) notTested.push({code, because: 'axes-not-compared'});
    predictions.push(...visible.map((prediction) => ({code, prediction})));
  }
  const tested = {
    degreesOfFreedom: axes.length,
    testedHypotheses: [...new Set(predictions.map(({code}) => code))],
    notTested,
  };
  if (axes.length === 0) return {...NOTHING, ...tested};
  const noBlunderMisfit = misfit(offset, axes, [input.covarianceM2]);
  const rejected = noBlunderMisfit > chiSquareQuantile(REJECTED_AT, axes.length);
  if (!rejected && !exceedsTolerance(input)) return {...NOTHING, ...tested, noBlunderMisfit};
  const check = {
    offset,
    axes,
    covarianceM2: input.covarianceM2,
    noBlunderMisfit,
    rejected,
    limit: chiSquareQuantile(SURVIVES_AT, axes.length),
  };
  return {
    ...tested,
    asked: rejected ? 'the offset is more than noise' : 'a tolerance is exceeded',
    noBlunderMisfit,
    candidates: ranked(check, predictions),
    pairs: rejected ? pairsOf(check, predictions) : [],
    accidental: expectedMatches(check, predictions),
  };
}

const NOTHING = {
  asked: null,
  noBlunderMisfit: null,
  candidates: [],
  pairs: [],
  accidental: {matches: 0, pairs: 0, withinM: 0, of: null},
};

function exceedsTolerance({offsetM, asked}: DiagnosisInput): boolean {
  const {east, north} = offsetM;
  const horizontal = east === null || north === null ? null : Math.hypot(east, north);
  const sizes = {...offsetM, horizontal};
  return asked.some(({of, toleranceM}) => Math.abs(sizes[of] ?? 0) > toleranceM);
}
