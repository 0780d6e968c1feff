import {moments} from '../../statistics/moments.ts';
import {roundStepAbove, widthOfWholeSteps} from './round-steps.ts';

export interface Histogram {
  /** Left edge of the first bin, about the reference. */
  readonly fromM: number;
  readonly binM: number;
  readonly counts: readonly number[];
  readonly total: number;
  readonly outside: number;
  readonly meanM: number;
  /** About the mean, with n − 1; 0 for one epoch. */
  readonly standardDeviationM: number;
}

const BINS_PER_SIGMA = 4;
const FRAME_SIGMAS = 4.5;
const LEAST_BIN_M = 0.0001;

export function histogramOf(valuesM: Float64Array, resolutionM: number | null): Histogram | null {
  if (valuesM.length === 0) return null;
  const {mean, standardDeviation} = moments(valuesM)!;
  const deviation = standardDeviation ?? 0;
  const wishedM = roundStepAbove(Math.max(deviation / BINS_PER_SIGMA, LEAST_BIN_M));
  const binM = widthOfWholeSteps(wishedM, resolutionM);
  const halfFrameM = Math.max(FRAME_SIGMAS * deviation, 4 * binM);
  const latticeM = binM === wishedM ? 0 : valuesM[0]! - binM / 2;
  const fromM = latticeM + Math.floor((mean - halfFrameM - latticeM) / binM) * binM;
  const counts = new Array<number>(Math.ceil((mean + halfFrameM - fromM) / binM)).fill(0);
  let outside = 0;
  for (let i = 0; i < valuesM.length; i++) {
    const bin = Math.floor((valuesM[i]! - fromM) / binM);
    if (bin >= 0 && bin < counts.length) counts[bin]!++;
    else outside++;
  }
  return {
    fromM,
    binM,
    counts,
    total: valuesM.length,
    outside,
    meanM: mean,
    standardDeviationM: deviation,
  };
}
