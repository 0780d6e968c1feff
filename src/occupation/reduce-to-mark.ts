import {InputError} from '../errors.ts';
import type {Sheet} from '../fieldbook/sheet.ts';
import type {Enu} from '../geodesy/types.ts';
import {type AntennaReduction, eccentricityEnu, heightAboveMarkM} from './antenna.ts';
import type {LocalColumns} from './local-columns.ts';

/**
 * The columns moved from the log's point down to the point that the sheet leads to: the antenna
 * height taken off epoch by epoch, since it may have changed during the session, and the
 * eccentricity of the set-up taken back.
 */
export function reducedToMark(
  columns: LocalColumns,
  gpsSeconds: Float64Array,
  reduction: AntennaReduction,
  eccentricity: Enu,
): LocalColumns {
  const {eastM, northM, upM} = eccentricity;
  // Nothing to take off: no copy of a long record.
  const {opening, closing} = reduction;
  const moves = [opening.verticalM, closing.verticalM, eastM, northM, upM].some((m) => m !== 0);
  if (!moves) return columns;
  return {
    ...columns,
    eastM: eastM === 0 ? columns.eastM : columns.eastM.map((value) => value - eastM),
    northM: northM === 0 ? columns.northM : columns.northM.map((value) => value - northM),
    upM: columns.upM.map((value, i) => value - heightAboveMarkM(reduction, gpsSeconds[i]!) - upM),
  };
}

const OVER_THE_MARK: Enu = {eastM: 0, northM: 0, upM: 0};

/** From the mark to the point under the antenna, as the sheet states it. */
export function eccentricityOf(sheet: Sheet, convergenceDeg: number | undefined): Enu {
  if (sheet.eccentricity === undefined) return OVER_THE_MARK;
  const known = eccentricityEnu(sheet.eccentricity, convergenceDeg);
  if (known.kind === 'known') return known.enu;
  throw new InputError(
    'the bearing of the eccentricity counts from grid north, but the grid is not known; name it under `projection`, or give a bearing from true north',
    {path: sheet.path, lineNumber: sheet.lines['eccentricity, bearing'] ?? 1},
  );
}
