/**
 * Models of the noise of a static record, as covariances between the means of its time cells.
 *
 * V = f diag(n̄/n_k) + (1 − f) [ψ ω + (1 − ψ) ((1 − φ) ρ_τ + φ F)]: white noise, one Gauss–Markov
 * process of correlation time τ averaged over cells, flicker noise F as the average of Gauss–Markov
 * processes with correlation times from half a cell to two days in octaves and, in some models, a
 * swing ω: see `swing-models.ts`.
 * Source: cell average of exp(−|t|/τ) by direct integration; flicker as a sum of relaxation
 * processes, van der Ziel (1950), Physica 16, 359-372.
 */
export interface NoiseModel {
  readonly whiteShare: number;
  readonly flickerShare: number;
  /** Absent where neither a Gauss–Markov process nor a time of its own is in the model. */
  readonly correlationTimeS: number | undefined;
  readonly swing?: Swing;
  readonly logPrior: number;
}

/** A damped oscillation. */
export interface Swing {
  /** Of what is not white. */
  readonly share: number;
  readonly periodS: number;
  readonly dampingS: number;
}

/** Prior weight by white share: what receivers do, set on simulated records of many kinds. */
export const WHITE_SHARES: readonly (readonly [share: number, prior: number])[] = [
  [0.99, 0.09],
  [0.96, 0.3],
  [0.88, 0.55],
  [0.7, 1],
  [0.4, 1],
  [0.15, 1],
  [0.04, 1],
  [0.01, 1],
  [0.001, 1],
];
const WHITE_ONLY = 3;
const FLICKER: readonly (readonly [number, number])[] = [
  [0, 0.85],
  [0.1, 0.05],
  [0.4, 0.05],
  [1, 0.05],
];
const SHORTEST_CELLS = 0.7;
const LONGEST_S = 3600;
/** Flicker noise has a memory of no more than this. */
const FLICKER_MEMORY_S = 2 * 86_400;

/** The grid of models for cells of one width in a record of one span: about 300. */
export function noiseModels(widthS: number, spanS: number): NoiseModel[] {
  const times = correlationTimes(widthS, spanS);
  const models: NoiseModel[] = [
    {whiteShare: 1, flickerShare: 0, correlationTimeS: undefined, logPrior: Math.log(WHITE_ONLY)},
  ];
  for (const [whiteShare, whitePrior] of WHITE_SHARES) {
    for (const [flickerShare, flickerPrior] of FLICKER) {
      const own = flickerShare === 1 ? [undefined] : times;
      for (const correlationTimeS of own) {
        const logPrior = Math.log((whitePrior * flickerPrior) / own.length);
        models.push({whiteShare, flickerShare, correlationTimeS, logPrior});
      }
    }
  }
  return models;
}

/** Correlation times in octaves, from what a cell hides to the length of the record. */
export function correlationTimes(widthS: number, spanS: number): number[] {
  const shortest = SHORTEST_CELLS * widthS;
  const ratio = Math.max(LONGEST_S, spanS) / shortest;
  const steps = Math.max(1, Math.ceil(Math.log2(ratio)));
  return Array.from({length: steps + 1}, (_, i) => shortest * ratio ** (i / steps));
}

/**
 * One part of a covariance: `atZero` within a cell, and between cells k apart
 * decayᵏ (beyond cos(turn k) + sine sin(turn k)).
 */
export interface Term {
  readonly atZero: number;
  readonly beyond: number;
  readonly decay: number;
  readonly sine: number;
  /** Radians from one cell to the next; 0 for a plain exponential. */
  readonly turn: number;
}

/** The correlated part of a model as exponential terms; none for white noise alone. */
export function termsOf(model: NoiseModel, widthS: number): Term[] {
  const {whiteShare, flickerShare, correlationTimeS, swing} = model;
  const swinging = (1 - whiteShare) * (swing?.share ?? 0);
  const correlated = 1 - whiteShare - swinging;
  const terms: Term[] = [];
  if (swing !== undefined) {
    const turn = (2 * Math.PI * widthS) / swing.periodS;
    terms.push(oscillation(widthS / swing.dampingS, turn, swinging));
  }
  if (correlationTimeS !== undefined && flickerShare < 1) {
    terms.push(gaussMarkov(widthS / correlationTimeS, correlated * (1 - flickerShare)));
  }
  if (correlated > 0 && flickerShare > 0) {
    const times = flickerTimes(widthS);
    const share = (correlated * flickerShare) / times.length;
    for (const time of times) terms.push(gaussMarkov(widthS / time, share));
  }
  return terms;
}

export function flickerTimes(widthS: number): number[] {
  const octaves = Math.max(1, Math.ceil(Math.log2(FLICKER_MEMORY_S / widthS)));
  return Array.from({length: octaves + 1}, (_, j) => (widthS / 2) * 2 ** j);
}

/** Covariance of the cell averages of a unit Gauss–Markov process, a = width / time. */
function gaussMarkov(a: number, weight: number): Term {
  const half = Math.sinh(a / 2) / a;
  return {
    atZero: (weight * 2 * (a + Math.expm1(-a))) / (a * a),
    beyond: weight * 4 * half * half,
    decay: Math.exp(-a),
    sine: 0,
    turn: 0,
  };
}

/**
 * Covariance of the cell averages of a unit oscillation e^(−a k) cos(b k): the real part of what a
 * Gauss–Markov process has, for the complex rate z = a + ib.
 */
function oscillation(a: number, b: number, weight: number): Term {
  const [re, im] = [a * a - b * b, 2 * a * b];
  const scale = weight / (re * re + im * im);
  // 2 (z + e^(−z) − 1) / z²
  const decay = Math.exp(-a);
  const zero = [2 * (a + decay * Math.cos(b) - 1), 2 * (b - decay * Math.sin(b))] as const;
  // 4 sinh²(z/2) / z² = 2 (cosh z − 1) / z²
  const far = [2 * (Math.cosh(a) * Math.cos(b) - 1), 2 * Math.sinh(a) * Math.sin(b)] as const;
  return {
    atZero: scale * (zero[0] * re + zero[1] * im),
    beyond: scale * (far[0] * re + far[1] * im),
    decay,
    sine: scale * (far[1] * re - far[0] * im),
    turn: b,
  };
}
