import {correlationTimes, type NoiseModel, type Swing, WHITE_SHARES} from './noise-models.ts';

/*
 * Models of noise that swings: reflections come and go with the paths of the satellites, and their
 * average is far better known than that of noise which merely forgets.
 *
 * V = f diag(n̄/n_k) + (1 − f) [ψ ω + (1 − ψ) s] with ω a damped oscillation and s a Gauss–Markov
 * process or flicker noise. The second part matters more than it seems: a swing hides slow errors
 * that are smaller than it, and they alone decide how well the mean is known.
 * Source: damped oscillation as a covariance, Foreman-Mackey et al. (2017), AJ 154, 220, section 2.
 * The shares and priors were set on simulated reflections with and without slow errors beneath.
 */

/** Fewer cells a period are not told from white noise, fewer periods a record not from a slow error. */
const LEAST_CELLS = 5;
const LEAST_PERIODS = 3;
const STEPS_PER_OCTAVE = 2;
/** Damping times in periods. */
const DAMPINGS = [0.7, 1.5, 4];
const WHITE_BESIDE_SEARCHED = [0.4, 0.15, 0.04, 0.01];
/** More white noise than this leaves no swing to be seen. */
const MOST_WHITE = 0.9;
const SWING_SHARES = [1, 0.97, 0.9, 0.75, 0.5];
/** Prior weight of all models with one swing, and of flicker noise among them. */
const PRIOR = 0.3;
const FLICKER_PRIOR = 0.15;

/** Swings and white noise alone, from which the swing of a record is chosen; about a hundred. */
export function searchedSwings(widthS: number, spanS: number): NoiseModel[] {
  return periods(widthS, spanS).flatMap((periodS) =>
    DAMPINGS.flatMap((damping) =>
      WHITE_BESIDE_SEARCHED.map((whiteShare) => ({
        whiteShare,
        flickerShare: 0,
        correlationTimeS: undefined,
        swing: {share: 1, periodS, dampingS: damping * periodS},
        logPrior: 0,
      })),
    ),
  );
}

/** The models with one swing, alone and above slower or faster errors; about 300. */
export function swingModels(widthS: number, spanS: number, chosen: Swing): NoiseModel[] {
  const times = correlationTimes(widthS, spanS);
  return WHITE_SHARES.filter(([whiteShare]) => whiteShare < MOST_WHITE).flatMap(
    ([whiteShare, whitePrior]) =>
      SWING_SHARES.flatMap((share): NoiseModel[] => {
        const prior = (PRIOR * whitePrior) / SWING_SHARES.length;
        const swing = {...chosen, share};
        const one = (
          correlationTimeS: number | undefined,
          flickerShare: number,
          weight: number,
        ) => ({
          whiteShare,
          flickerShare,
          correlationTimeS,
          swing,
          logPrior: Math.log(weight),
        });
        if (share === 1) return [one(undefined, 0, prior)];
        return [
          ...times.map((timeS) => one(timeS, 0, prior / times.length)),
          one(undefined, 1, FLICKER_PRIOR * prior),
        ];
      }),
  );
}

function periods(widthS: number, spanS: number): number[] {
  const shortestS = LEAST_CELLS * widthS;
  const ratio = spanS / LEAST_PERIODS / shortestS;
  if (ratio < 1) return [];
  const steps = Math.max(1, Math.ceil(STEPS_PER_OCTAVE * Math.log2(ratio)));
  return Array.from({length: steps + 1}, (_, i) => shortestS * ratio ** (i / steps));
}
