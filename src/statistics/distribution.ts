import {errorFunction, incompleteBeta, incompleteGamma, logGamma} from './special-functions.ts';

const SQRT_2 = Math.SQRT2;
const SQRT_TWO_PI = 2.5066282746310002;

/** Half-width of 95 % of a normal distribution in standard deviations: Φ⁻¹(0.975). */
export const NORMAL_95 = 1.959963984540054;

/** P(X ≤ z) of the standard normal distribution; small relative error in both tails. */
export function normalCdf(z: number): number {
  return 0.5 * errorFunction(-z / SQRT_2).erfc;
}

/** Density of the standard normal distribution. */
export function normalDensity(z: number): number {
  return Math.exp(-0.5 * z * z) / SQRT_TWO_PI;
}

/**
 * The z with P(X ≤ z) = p of the standard normal distribution, 0 < p < 1.
 * Accuracy: ≤ 1e-12 relative for 0.0005 ≤ p ≤ 0.9995.
 */
export function normalQuantile(p: number): number {
  mustBeProbability('normalQuantile', p);
  if (p === 0.5) return 0;
  const tail = Math.min(p, 1 - p);
  const z = positiveRoot({
    start: Math.sqrt(-2 * Math.log(2 * tail)),
    error: (x) => Math.log(normalCdf(-x) / tail),
    slope: (x) => -normalDensity(x) / normalCdf(-x),
  });
  return p < 0.5 ? -z : z;
}

/** P(X ≤ x) of chi-square with df > 0 degrees of freedom. */
export function chiSquareCdf(x: number, df: number): number {
  return incompleteGamma(df / 2, x / 2).lower;
}

/** P(X > x) of chi-square with df > 0 degrees of freedom. */
export function chiSquareTail(x: number, df: number): number {
  return incompleteGamma(df / 2, x / 2).upper;
}

/** Quantile of chi-square with df > 0 degrees of freedom, 0 < p < 1. */
export function chiSquareQuantile(p: number, df: number): number {
  mustBeProbability('chiSquareQuantile', p);
  const a = df / 2;
  const logFront = -a * Math.LN2 - logGamma(a);
  return tailRoot(p, {
    // Wilson & Hilferty (1931), or the leading term of the series where that turns negative.
    start: Math.max(
      df * (1 - 2 / (9 * df) + normalQuantile(p) * Math.sqrt(2 / (9 * df))) ** 3,
      2 * Math.exp((Math.log(p) + logGamma(a + 1)) / a) * 0.5,
    ),
    tails: (x) => incompleteGamma(a, x / 2),
    density: (x) => Math.exp(logFront + (a - 1) * Math.log(x) - x / 2),
  });
}

/** P(X ≤ t) of Student's distribution with df > 0 degrees of freedom. */
export function studentCdf(t: number, df: number): number {
  const half = studentTail(Math.abs(t), df);
  return t < 0 ? half : 1 - half;
}

/** P(X > t) for t ≥ 0. */
function studentTail(t: number, df: number): number {
  const square = t * t;
  return 0.5 * incompleteBeta(df / 2, 0.5, df / (df + square), square / (df + square)).lower;
}

/** Density of Student's distribution. */
export function studentDensity(t: number, df: number): number {
  const front = Math.exp(logGamma((df + 1) / 2) - logGamma(df / 2)) / Math.sqrt(df * Math.PI);
  return front * Math.exp(-((df + 1) / 2) * Math.log1p((t * t) / df));
}

/** Quantile of Student's distribution with df > 0 degrees of freedom, 0 < p < 1. */
export function studentQuantile(p: number, df: number): number {
  mustBeProbability('studentQuantile', p);
  if (p === 0.5) return 0;
  const tail = Math.min(p, 1 - p);
  const t = positiveRoot({
    start: Math.max(Math.abs(normalQuantile(p)), (2 * tail) ** (-1 / df) - 1),
    error: (x) => Math.log(studentTail(x, df) / tail),
    slope: (x) => -studentDensity(x, df) / studentTail(x, df),
  });
  return p < 0.5 ? -t : t;
}

/** P(X ≤ x) of Fisher's F with df1, df2 > 0 degrees of freedom. */
export function fisherCdf(x: number, df1: number, df2: number): number {
  return fisherTails(x, df1, df2).lower;
}

/** P(X > x) of Fisher's F. */
export function fisherTail(x: number, df1: number, df2: number): number {
  return fisherTails(x, df1, df2).upper;
}

function fisherTails(x: number, df1: number, df2: number) {
  const whole = df1 * x + df2;
  return incompleteBeta(df1 / 2, df2 / 2, (df1 * x) / whole, df2 / whole);
}

/** Quantile of Fisher's F with df1, df2 > 0 degrees of freedom, 0 < p < 1. */
export function fisherQuantile(p: number, df1: number, df2: number): number {
  mustBeProbability('fisherQuantile', p);
  const [a, b] = [df1 / 2, df2 / 2];
  const logFront =
    a * Math.log(df1) + b * Math.log(df2) + logGamma(a + b) - logGamma(a) - logGamma(b);
  return tailRoot(p, {
    start: 1,
    tails: (x) => fisherTails(x, df1, df2),
    density: (x) => Math.exp(logFront + (a - 1) * Math.log(x) - (a + b) * Math.log(df2 + df1 * x)),
  });
}

/** P(|X| ≤ limit) for X normal about `centre`: the probability of conformity of JCGM 106, 7.2. */
export function normalWithin(limit: number, centre: number, standardDeviation: number): number {
  const [high, low] = [limit - centre, -limit - centre];
  if (standardDeviation === 0) return high >= 0 && low <= 0 ? 1 : 0;
  return between(normalCdf, low / standardDeviation, high / standardDeviation);
}

/** P(|X| ≤ limit) for X = centre + scale · Student(df). */
export function studentWithin(limit: number, centre: number, scale: number, df: number): number {
  const [high, low] = [limit - centre, -limit - centre];
  if (scale === 0) return high >= 0 && low <= 0 ? 1 : 0;
  return between((t) => studentCdf(t, df), low / scale, high / scale);
}

/** P(low < X ≤ high) of a symmetric distribution, taken in the tail where nothing cancels. */
function between(cdf: (z: number) => number, low: number, high: number): number {
  const difference = low > 0 ? cdf(-low) - cdf(-high) : cdf(high) - cdf(low);
  return Math.max(0, difference);
}

interface TailProblem {
  readonly start: number;
  readonly tails: (x: number) => {readonly lower: number; readonly upper: number};
  readonly density: (x: number) => number;
}

/** Solves cdf(x) = p for x > 0 by the tail that is the smaller, so that neither loses digits. */
function tailRoot(p: number, problem: TailProblem): number {
  const {start, tails, density} = problem;
  return p <= 0.5
    ? positiveRoot({
        start,
        error: (x) => Math.log(p / tails(x).lower),
        slope: (x) => -density(x) / tails(x).lower,
      })
    : positiveRoot({
        start,
        error: (x) => Math.log(tails(x).upper / (1 - p)),
        slope: (x) => -density(x) / tails(x).upper,
      });
}

interface DecreasingProblem {
  readonly start: number;
  /** Decreasing in x; infinite values are allowed. */
  readonly error: (x: number) => number;
  readonly slope: (x: number) => number;
}

/** Root of a decreasing function of x > 0: Newton steps in ln x inside a closing bracket. */
function positiveRoot({start, error, slope}: DecreasingProblem): number {
  let low = 0;
  let high = Number.POSITIVE_INFINITY;
  let x = start;
  for (let step = 0; step < 200; step++) {
    const value = error(x);
    if (value === 0) return x;
    if (value > 0) low = x;
    else high = x;
    const newton = x * Math.exp(Math.max(-4, Math.min(4, -value / (slope(x) * x))));
    const next = newton > low && newton < high ? newton : middle(low, high);
    if (Math.abs(next - x) <= 2e-16 * x) return next;
    x = next;
  }
  return x;
}

function middle(low: number, high: number): number {
  if (high === Number.POSITIVE_INFINITY) return low * 16;
  return low === 0 ? high / 16 : Math.sqrt(low * high);
}

function mustBeProbability(name: string, p: number): void {
  if (!(p > 0 && p < 1)) throw new RangeError(`${name}: p must be in 0..1, got ${p}`);
}
