import {moments} from '../statistics/moments.ts';
import type {LocalColumns} from './local-columns.ts';
import {taken} from './local-columns.ts';
import type {PerAxis} from './result.ts';

/** A step that the statistics find, before anybody asks whether it matters. */
export interface FoundStep {
  readonly gpsSeconds: number;
  readonly interval95GpsSeconds: readonly [number, number];
  readonly sizeM: PerAxis<number | null>;
}

/** A drift that was estimated, significant or not. */
export interface FoundDrift {
  readonly rateMPerS: number;
  readonly interval95MPerS: readonly [number, number];
  readonly detectableMPerS: number;
}

/** One uninterrupted stretch of an occupation, averaged. Null where the record cannot tell. */
export interface Session {
  readonly indices: Uint32Array;
  readonly fromGpsSeconds: number;
  readonly toGpsSeconds: number;
  /** Mean of the epochs about the origin of the columns. */
  readonly meanM: PerAxis<number | null>;
  readonly standardUncertaintyM: PerAxis<number | null> | null;
  /** Correlation of the errors of the east and north means. */
  readonly eastNorthCorrelation: number;
  readonly quantisationM: PerAxis<number | null> | null;
  readonly independentLooks: PerAxis<number | null> | null;
  readonly correlationTimeS: PerAxis<number | null> | null;
  readonly movement: 'none' | 'step' | 'drift' | 'settling' | 'cannot tell';
  readonly drift: PerAxis<FoundDrift | null>;
  readonly steps: readonly FoundStep[];
  /** Codes of what limits the statements above, for notices. */
  readonly limits: readonly {readonly code: string; readonly axes: readonly string[]}[];
}

export function analyseSession(
  gpsSeconds: Float64Array,
  columns: LocalColumns,
  indices: Uint32Array,
  _resolutionM: PerAxis<number | null>,
): Session {
  const mean = (column: Float64Array) => {
    const value = moments(taken(column, indices))?.mean;
    return value === undefined || Number.isNaN(value) ? null : value;
  };
  return {
    indices,
    fromGpsSeconds: gpsSeconds[indices[0]!]!,
    toGpsSeconds: gpsSeconds[indices[indices.length - 1]!]!,
    meanM: {east: mean(columns.eastM), north: mean(columns.northM), up: mean(columns.upM)},
    standardUncertaintyM: null,
    eastNorthCorrelation: 0,
    quantisationM: null,
    independentLooks: null,
    correlationTimeS: null,
    movement: 'cannot tell',
    drift: {east: null, north: null, up: null},
    steps: [],
    limits: [],
  };
}
