import type {Epochs} from '../epochs/epochs.ts';
import {moments} from '../statistics/moments.ts';
import {medianInPlace} from '../statistics/quantile.ts';
import {type LocalColumns, taken} from './local-columns.ts';
import type {PerAxis, Screening} from './result.ts';
import {reasonCode, type ScreenOutcome} from './screen.ts';
import type {Session} from './session.ts';

/** Reasons that say "this is no measurement of this occupation" rather than "this one is poor". */
const NEVER_USED = ['invalid fix', 'repeated time', 'outside time window', 'no height'] as const;

/** What screening did to the answer: the mean of all valid epochs beside that of the ones used. */
export function screeningOf(
  epochs: Epochs,
  columns: LocalColumns,
  outcome: ScreenOutcome,
  session: Session,
): Screening {
  return {
    fixClassKept: outcome.fixClassKept,
    withoutScreening: withoutScreening(columns, outcome, session),
    receiverSigmaM: receiverSigma(epochs, session.indices),
  };
}

function withoutScreening(
  columns: LocalColumns,
  {reason}: ScreenOutcome,
  session: Session,
): Screening['withoutScreening'] {
  const never = new Set<number>(NEVER_USED.map(reasonCode));
  const valid = new Uint8Array(reason.length);
  let epochs = 0;
  for (let i = 0; i < reason.length; i++) {
    if (never.has(reason[i]!)) continue;
    valid[i] = 1;
    epochs++;
  }
  const difference = (column: Float64Array, mean: number | null) => {
    const value = moments(column, valid)?.mean;
    return value === undefined || Number.isNaN(value) || mean === null ? null : value - mean;
  };
  return {
    epochs,
    offsetFromResultM: {
      east: difference(columns.eastM, session.meanM.east),
      north: difference(columns.northM, session.meanM.north),
      up: difference(columns.upM, session.meanM.up),
    },
  };
}

/** Medians of the receiver's own standard deviations; null when the log gives none. */
export function receiverSigma(epochs: Epochs, indices: Uint32Array): PerAxis<number | null> | null {
  const median = (column: Float32Array) => {
    const given = taken(column, indices);
    let count = 0;
    for (let i = 0; i < given.length; i++) {
      if (Number.isFinite(given[i]!)) given[count++] = given[i]!;
    }
    return count === 0 ? null : medianInPlace(given, count);
  };
  const sigma = {
    east: median(epochs.sigmaEastM),
    north: median(epochs.sigmaNorthM),
    up: median(epochs.sigmaUpM),
  };
  return sigma.east === null && sigma.north === null && sigma.up === null ? null : sigma;
}
