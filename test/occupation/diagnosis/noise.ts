import type {Enu} from '../../../src/geodesy/types.ts';
import {choleskyFactor} from '../../../src/occupation/diagnosis/misfit.ts';
import type {Random} from '../../simulate/random.ts';

/** An offset with noise of a covariance added. */
export function noisy(
  offset: Enu,
  covarianceM2: readonly (readonly number[])[],
  random: Random,
): Enu {
  const lower = choleskyFactor(covarianceM2) ?? [];
  const z = [random.normal(), random.normal(), random.normal()];
  const error = lower.map((row) => row.reduce((sum, value, j) => sum + value * z[j]!, 0));
  return {
    eastM: offset.eastM + error[0]!,
    northM: offset.northM + error[1]!,
    upM: offset.upM + error[2]!,
  };
}
