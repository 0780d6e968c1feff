import {normalDensity, normalWithin} from './distribution.ts';
import {errorEllipse, type PlaneCovariance} from './ellipse.ts';
import {integrate} from './integrate.ts';
import {errorFunction} from './special-functions.ts';

/** Covariance of east, north and up, row by row. */
export type SpaceCovariance = readonly (readonly number[])[];

/** Beyond this many deviations a normal density adds nothing to a double. */
const REACH = 8.5;
const PROBABILITY_TOLERANCE = 1e-12;

/** Radius of the mean square: √(σE² + σN²). */
export function drms(covariance: PlaneCovariance): number {
  return Math.sqrt(covariance.eastEast + covariance.northNorth);
}

/** Mean radial spherical error: √(σE² + σN² + σU²). */
export function mrse(covariance: SpaceCovariance): number {
  return Math.sqrt(covariance[0]![0]! + covariance[1]![1]! + covariance[2]![2]!);
}

/**
 * Circular error probable: the radius about the centre that holds half of the errors.
 * Exact for correlated and unequal axes; see `radiusHolding`.
 */
export function cep(covariance: PlaneCovariance): number {
  return radiusHolding(0.5, covariance);
}

/** The radius that holds 95 % of the errors; see `radiusHolding`. */
export function r95(covariance: PlaneCovariance): number {
  return radiusHolding(0.95, covariance);
}

/** Spherical error probable: the radius that holds half of the errors in space. */
export function sep(covariance: SpaceCovariance): number {
  return sphereRadiusHolding(0.5, covariance);
}

/**
 * Radius of the circle about the centre that holds a horizontal error with probability p.
 *
 * Method: the covariance is turned to its axes, the probability integrated exactly and the radius
 * found by a secant inside a bracket.
 * Accuracy: ≤ 1e-9 relative against 25-digit quadrature for axis ratios 0 to 1.
 */
export function radiusHolding(p: number, covariance: PlaneCovariance): number {
  const {semiMajor, semiMinor} = errorEllipse(covariance);
  if (semiMajor === 0) return 0;
  const ratio = semiMinor / semiMajor;
  return semiMajor * bracketedRoot((r) => centredCircle(r, ratio) - p, REACH);
}

/** Radius of the sphere about the centre that holds an error in space with probability p. */
export function sphereRadiusHolding(p: number, covariance: SpaceCovariance): number {
  const axes = principalDeviations(covariance);
  const longest = axes[0]!;
  if (longest === 0) return 0;
  const scaled = axes.map((axis) => axis / longest);
  return longest * bracketedRoot((r) => centredSphere(r, scaled) - p, REACH);
}

/** P(|error| ≤ radius) for a horizontal error about zero. */
export function probabilityWithinRadius(radius: number, covariance: PlaneCovariance): number {
  return probabilityInCircle({radius, east: 0, north: 0, covariance});
}

/** P(|error| ≤ radius) for an error in space about zero. */
export function probabilityWithinSphere(radius: number, covariance: SpaceCovariance): number {
  const axes = principalDeviations(covariance);
  const longest = axes[0]!;
  if (longest === 0) return 1;
  return centredSphere(
    radius / longest,
    axes.map((axis) => axis / longest),
  );
}

/** A horizontal offset known with a covariance, and a circle about the origin. */
export interface CircleQuestion {
  readonly radius: number;
  readonly east: number;
  readonly north: number;
  readonly covariance: PlaneCovariance;
}

/**
 * Probability that the true offset lies within the circle: the probability of conformity of
 * JCGM 106 for a horizontal tolerance.
 *
 * Method: along the major axis of the ellipse one integral, across it the normal distribution;
 * the substitution x = R sin θ keeps the integrand smooth at the rim.
 * Accuracy: ≤ 1e-10 absolute.
 */
export function probabilityInCircle(question: CircleQuestion): number {
  const {radius, east, north, covariance} = question;
  const {semiMajor, semiMinor, azimuthDeg} = errorEllipse(covariance);
  if (radius < 0) return 0;
  if (semiMajor === 0) return Math.hypot(east, north) <= radius ? 1 : 0;
  const azimuthRad = ((azimuthDeg ?? 0) * Math.PI) / 180;
  const along = east * Math.sin(azimuthRad) + north * Math.cos(azimuthRad);
  const across = east * Math.cos(azimuthRad) - north * Math.sin(azimuthRad);
  return circle(radius / semiMajor, semiMinor / semiMajor, along / semiMajor, across / semiMajor);
}

function centredCircle(radius: number, ratio: number): number {
  return circle(radius, ratio, 0, 0);
}

/** The circle in units of the larger deviation; `ratio` is the smaller one. */
function circle(radius: number, ratio: number, along: number, across: number): number {
  if (ratio < 1e-9) {
    const reach = Math.sqrt(Math.max(0, radius * radius - across * across));
    return Math.abs(across) > radius ? 0 : normalWithin(reach, along, 1);
  }
  const density = (thetaRad: number) => {
    const halfChord = radius * Math.cos(thetaRad);
    const x = radius * Math.sin(thetaRad);
    return normalDensity(x - along) * normalWithin(halfChord, across, ratio) * halfChord;
  };
  const from = angleOf((along - REACH) / radius);
  const to = angleOf((along + REACH) / radius);
  // Where the chord's end passes the centre line the integrand turns fastest: cut there.
  const turn = Math.acos(Math.min(1, Math.abs(across) / radius));
  const middle = angleOf(along / radius);
  const cuts = [from, -turn, middle, turn, to]
    .filter((cut) => cut >= from && cut <= to)
    .sort((a, b) => a - b);
  let total = 0;
  for (let i = 1; i < cuts.length; i++) {
    if (cuts[i]! > cuts[i - 1]!) {
      total += integrate(density, cuts[i - 1]!, cuts[i]!, PROBABILITY_TOLERANCE);
    }
  }
  return Math.min(1, total);
}

function angleOf(sine: number): number {
  return Math.asin(Math.max(-1, Math.min(1, sine)));
}

/** Axes sorted, longest 1. */
function centredSphere(radius: number, axes: readonly number[]): number {
  const [, middle, shortest] = axes as [number, number, number];
  if (middle < 1e-9) return errorFunction(radius / Math.SQRT2).erf;
  const ratio = shortest / middle;
  const limit = Math.asin(Math.min(1, REACH / radius));
  const density = (thetaRad: number) => {
    const halfChord = radius * Math.cos(thetaRad);
    return (
      normalDensity(radius * Math.sin(thetaRad)) *
      centredCircle(halfChord / middle, ratio) *
      halfChord
    );
  };
  return Math.min(1, 2 * integrate(density, 0, limit, PROBABILITY_TOLERANCE));
}

/** Root of an increasing function between 0 and `high`, by the Illinois form of false position. */
function bracketedRoot(f: (x: number) => number, high: number): number {
  let [a, b] = [0, high];
  let [fa, fb] = [f(a), f(b)];
  for (let step = 0; step < 200 && Math.abs(b - a) > 1e-13 * Math.abs(b); step++) {
    const x = (a * fb - b * fa) / (fb - fa);
    const fx = f(x);
    if (fx === 0 || Math.abs(fx) < 1e-14) return x;
    if (fx * fb < 0) {
      a = b;
      fa = fb;
    } else {
      fa /= 2;
    }
    b = x;
    fb = fx;
  }
  return b;
}

/**
 * Standard deviations along the principal axes, longest first.
 * Method: cyclic Jacobi rotations (Jacobi 1846), exact to rounding for a 3×3 matrix in few sweeps.
 */
export function principalDeviations(covariance: SpaceCovariance): number[] {
  const a = covariance.map((row) => [...row]);
  for (let sweep = 0; sweep < 12; sweep++) {
    for (const [p, q] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      rotate(a, p, q);
    }
  }
  return [a[0]![0]!, a[1]![1]!, a[2]![2]!]
    .map((variance) => Math.sqrt(Math.max(0, variance)))
    .sort((x, y) => y - x);
}

/** One Jacobi rotation that makes a[p][q] vanish. */
function rotate(a: number[][], p: number, q: number): void {
  const apq = a[p]![q]!;
  if (apq === 0) return;
  const phi = 0.5 * Math.atan2(2 * apq, a[q]![q]! - a[p]![p]!);
  const [c, s] = [Math.cos(phi), Math.sin(phi)];
  for (let k = 0; k < 3; k++) {
    const [akp, akq] = [a[k]![p]!, a[k]![q]!];
    a[k]![p] = c * akp - s * akq;
    a[k]![q] = s * akp + c * akq;
  }
  for (let k = 0; k < 3; k++) {
    const [apk, aqk] = [a[p]![k]!, a[q]![k]!];
    a[p]![k] = c * apk - s * aqk;
    a[q]![k] = s * apk + c * aqk;
  }
}
