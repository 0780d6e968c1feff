import {cep, drms, r95} from '../statistics/accuracy-measures.ts';
import {errorEllipse, type PlaneCovariance} from '../statistics/ellipse.ts';
import {covariance, moments} from '../statistics/moments.ts';
import {quantilesInPlace} from '../statistics/quantile.ts';
import type {Ellipse, PerAxis, Scatter, ScatterMeasures} from './result.ts';

/** East, north and up of the epochs used, n ≥ 1 each; up all NaN when the record has no height. */
export interface UsedPositions {
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
}

/**
 * How single epochs scatter about a centre: as counted, and as a normal distribution with the same
 * second moments would have it. Scatter of single epochs is not the uncertainty of their mean.
 *
 * @param centre  the point that the epochs scatter about; about any other point than the mean the
 *                standard deviations are root mean squares
 */
export function scatterAbout(used: UsedPositions, centre: PerAxis<number | null>): Scatter {
  const plane = planeMoments(used, centre);
  const up = centre.up === null ? null : secondMoment(used.upM, centre.up);
  const standardDeviationM = {
    east: rootOrNull(plane?.eastEast),
    north: rootOrNull(plane?.northNorth),
    up: rootOrNull(up),
  };
  const ellipse = plane === null ? null : ellipseOf(plane);
  const [cepM, r95M] = quantilesInPlace(radiiAbout(used, centre), [0.5, 0.95]);
  return {
    observed: {
      standardDeviationM,
      drmsM: plane === null ? null : drms(plane),
      cepM: cepM!,
      r95M: r95M!,
      ellipse,
    },
    normalTheory: normalMeasures(standardDeviationM, plane, ellipse),
  };
}

function normalMeasures(
  standardDeviationM: PerAxis<number | null>,
  plane: PlaneCovariance | null,
  ellipse: Ellipse | null,
): ScatterMeasures {
  return {
    standardDeviationM,
    drmsM: plane === null ? null : drms(plane),
    cepM: plane === null ? null : cep(plane),
    r95M: plane === null ? null : r95(plane),
    ellipse,
  };
}

/** The standard ellipse as result data; a circle has azimuth 0. */
export function ellipseOf(plane: PlaneCovariance, factor = 1): Ellipse {
  const {semiMajor, semiMinor, azimuthDeg} = errorEllipse(plane);
  return {
    semiMajorM: factor * semiMajor,
    semiMinorM: factor * semiMinor,
    azimuthDeg: azimuthDeg ?? 0,
  };
}

/**
 * Second moments about the centre with the divisor n − 1, which makes them the covariance when the
 * centre is the mean; null for a single epoch.
 */
function planeMoments(
  {eastM, northM}: UsedPositions,
  centre: PerAxis<number | null>,
): PlaneCovariance | null {
  const aboutMean = {east: moments(eastM), north: moments(northM)};
  const product = covariance(eastM, northM);
  if (aboutMean.east === undefined || aboutMean.north === undefined || product === undefined) {
    return null;
  }
  const shiftEast = aboutMean.east.mean - (centre.east ?? aboutMean.east.mean);
  const shiftNorth = aboutMean.north.mean - (centre.north ?? aboutMean.north.mean);
  const weight = eastM.length / (eastM.length - 1);
  return {
    eastEast: (aboutMean.east.standardDeviation ?? 0) ** 2 + weight * shiftEast ** 2,
    northNorth: (aboutMean.north.standardDeviation ?? 0) ** 2 + weight * shiftNorth ** 2,
    eastNorth: product + weight * shiftEast * shiftNorth,
  };
}

function secondMoment(values: Float64Array, centre: number): number | null {
  const aboutMean = moments(values);
  if (aboutMean?.standardDeviation === undefined) return null;
  const weight = values.length / (values.length - 1);
  return aboutMean.standardDeviation ** 2 + weight * (aboutMean.mean - centre) ** 2;
}

function rootOrNull(square: number | null | undefined): number | null {
  return square === null || square === undefined || Number.isNaN(square) ? null : Math.sqrt(square);
}

function radiiAbout({eastM, northM}: UsedPositions, centre: PerAxis<number | null>): Float64Array {
  const radii = new Float64Array(eastM.length);
  const east0 = centre.east ?? 0;
  const north0 = centre.north ?? 0;
  for (let i = 0; i < radii.length; i++) {
    const east = eastM[i]! - east0;
    const north = northM[i]! - north0;
    radii[i] = Math.sqrt(east * east + north * north);
  }
  return radii;
}
