/**
 * Special functions behind the distributions, to nearly the precision of a double.
 * Source of all formulas: NIST Digital Library of Mathematical Functions (DLMF), equations named.
 */

const TINY = 1e-300;
const PRECISION = 1e-17;
const SQRT_PI = 1.772453850905516;
const HALF_LOG_TWO_PI = 0.9189385332046727;

/**
 * Both tails of the error function: erf x + erfc x = 1, each with small relative error.
 * Method: confluent series DLMF 7.6.2 near zero, continued fraction DLMF 7.9.1 beyond 2.
 */
export function errorFunction(x: number): {readonly erf: number; readonly erfc: number} {
  const z = Math.abs(x);
  const upper = z < 2 ? 1 - erfSeries(z) : erfcFraction(z);
  const lower = z < 2 ? erfSeries(z) : 1 - upper;
  return x < 0 ? {erf: -lower, erfc: 1 + lower} : {erf: lower, erfc: upper};
}

function erfSeries(z: number): number {
  let term = z;
  let total = z;
  for (let n = 1; term > PRECISION * total; n++) {
    term *= (2 * z * z) / (2 * n + 1);
    total += term;
  }
  return (2 / SQRT_PI) * Math.exp(-z * z) * total;
}

function erfcFraction(z: number): number {
  if (z > 27.3) return 0;
  let c = z;
  let d = 0;
  let fraction = z;
  for (let n = 1; n < 500; n++) {
    d = 1 / (z + (n / 2) * d);
    c = z + n / 2 / c;
    const change = c * d;
    fraction *= change;
    if (Math.abs(change - 1) < 1e-16) break;
  }
  return Math.exp(-z * z) / (SQRT_PI * fraction);
}

/** ln Γ(x) for x > 0: DLMF 5.11.1 after the recurrence 5.5.1 has lifted x above 10. */
export function logGamma(x: number): number {
  return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingError(x);
}

/** ln Γ(x) less Stirling's formula (x − ½) ln x − x + ½ ln 2π; tends to 1/(12 x). */
export function stirlingError(x: number): number {
  if (x >= 10) {
    const s = 1 / (x * x);
    return (
      (1 / 12 -
        s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s * (1 / 1188 - s * (691 / 360360)))))) /
      x
    );
  }
  let product = 1;
  let lifted = x;
  while (lifted < 10) product *= lifted++;
  const stirling = (y: number) => (y - 0.5) * Math.log(y) - y;
  return stirling(lifted) + stirlingError(lifted) - Math.log(product) - stirling(x);
}

/** Two tails that add to one; the smaller keeps its relative precision. */
export interface Tails {
  readonly lower: number;
  readonly upper: number;
}

function tails(value: number, isLower: boolean): Tails {
  return isLower ? {lower: value, upper: 1 - value} : {lower: 1 - value, upper: value};
}

/**
 * Regularised incomplete gamma functions P(a, x) and Q(a, x), a > 0, x ≥ 0.
 * Method: series DLMF 8.11.4 for x < a + 1, continued fraction DLMF 8.9.2 beyond.
 */
export function incompleteGamma(a: number, x: number): Tails {
  if (x <= 0) return {lower: 0, upper: 1};
  const front = Math.exp(gammaLogKernel(a, x));
  if (x < a + 1) {
    let term = 1 / a;
    let total = term;
    for (let n = 1; term > PRECISION * total; n++) {
      term *= x / (a + n);
      total += term;
    }
    return tails(front * total, true);
  }
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let fraction = d;
  for (let n = 1; n < 100_000; n++) {
    const an = -n * (n - a);
    b += 2;
    d = 1 / nonZero(an * d + b);
    c = nonZero(b + an / c);
    const change = d * c;
    fraction *= change;
    if (Math.abs(change - 1) < 1e-16) break;
  }
  return tails(front * fraction, false);
}

/** ln(x^a e^−x / Γ(a)), arranged so that nothing large cancels. */
function gammaLogKernel(a: number, x: number): number {
  const mu = (x - a) / a;
  const excess = Math.abs(mu) < 0.5 ? mu - Math.log1p(mu) : mu - Math.log(x / a);
  return -a * excess + 0.5 * Math.log(a) - HALF_LOG_TWO_PI - stirlingError(a);
}

/**
 * Regularised incomplete beta function I_x(a, b) and its complement, a, b > 0.
 * Both x and y = 1 − x are asked for, so that neither end loses digits.
 * Method: continued fraction DLMF 8.17.22 on the side where it converges fast.
 */
export function incompleteBeta(a: number, b: number, x: number, y: number): Tails {
  if (x <= 0) return {lower: 0, upper: 1};
  if (y <= 0) return {lower: 1, upper: 0};
  const front = Math.exp(betaLogKernel(a, b, x, y));
  return x < (a + 1) / (a + b + 2)
    ? tails((front * betaFraction(a, b, x)) / a, true)
    : tails((front * betaFraction(b, a, y)) / b, false);
}

/** ln(x^a y^b / B(a, b)), arranged so that nothing large cancels. */
function betaLogKernel(a: number, b: number, x: number, y: number): number {
  const n = a + b;
  return (
    a * Math.log((x * n) / a) +
    b * Math.log((y * n) / b) +
    0.5 * Math.log((a / n) * b) -
    HALF_LOG_TWO_PI -
    stirlingError(a) -
    stirlingError(b) +
    stirlingError(n)
  );
}

function betaFraction(a: number, b: number, x: number): number {
  let c = 1;
  let d = 1 / nonZero(1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let m = 1; m < 100_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / nonZero(1 + even * d);
    c = nonZero(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / nonZero(1 + odd * d);
    c = nonZero(1 + odd / c);
    const change = d * c;
    fraction *= change;
    if (Math.abs(change - 1) < 1e-16) break;
  }
  return fraction;
}

/** The modified Lentz algorithm replaces a vanishing denominator by a tiny number (DLMF 3.10). */
function nonZero(value: number): number {
  return Math.abs(value) < TINY ? TINY : value;
}
