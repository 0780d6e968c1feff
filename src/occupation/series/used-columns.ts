import type {Epochs} from '../../epochs/epochs.ts';

/** The epochs used, closed up: equal-length columns without gaps of NaN. */
export interface UsedColumns {
  readonly count: number;
  readonly gpsSeconds: Float64Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  /** false when any epoch used has no height: the record is plan only. */
  readonly hasUp: boolean;
}

interface EpochColumns {
  readonly epochs: Epochs;
  readonly used: Uint8Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
}

export function usedColumns({epochs, used, eastM, northM, upM}: EpochColumns): UsedColumns {
  let count = 0;
  for (let i = 0; i < epochs.count; i++) if (used[i] === 1) count++;
  const columns = {
    count,
    gpsSeconds: new Float64Array(count),
    eastM: new Float64Array(count),
    northM: new Float64Array(count),
    upM: new Float64Array(count),
    hasUp: count > 0,
  };
  for (let i = 0, k = 0; i < epochs.count; i++) {
    if (used[i] !== 1) continue;
    columns.gpsSeconds[k] = epochs.gpsSeconds[i]!;
    columns.eastM[k] = eastM[i]!;
    columns.northM[k] = northM[i]!;
    columns.upM[k] = upM[i]!;
    if (Number.isNaN(upM[i]!)) columns.hasUp = false;
    k++;
  }
  return columns;
}
