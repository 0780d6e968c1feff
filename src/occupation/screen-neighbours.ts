import {blockMedianScreen} from '../statistics/robust.ts';
import {type LocalColumns, selected, taken} from './local-columns.ts';
import type {PerAxis} from './result.ts';
import {reasonCode} from './screen.ts';

/**
 * Leaves out the epochs among `indices` that lie far from their neighbours and far on the scale of
 * the record; jointly, so that an epoch gross in one axis is left out in all.
 *
 * @param reason  screening codes, one per epoch read; changed in place
 */
export function screenNeighbours(
  gpsSeconds: Float64Array,
  columns: LocalColumns,
  indices: Uint32Array,
  resolutionM: PerAxis<number | null>,
  reason: Uint8Array,
): void {
  if (indices.length === 0) return;
  const elapsedS = taken(gpsSeconds, indices);
  const startS = elapsedS[0]!;
  for (let i = 0; i < elapsedS.length; i++) elapsedS[i]! -= startS;
  const components = [selected(columns.eastM, indices), selected(columns.northM, indices)];
  const resolutions = [resolutionM.east ?? 0, resolutionM.north ?? 0];
  if (columns.heightKind !== 'none') {
    components.push(selected(columns.upM, indices));
    resolutions.push(resolutionM.up ?? 0);
  }
  const rejected = blockMedianScreen({elapsedS, components, resolutions});
  const code = reasonCode('far from its neighbours');
  for (let i = 0; i < indices.length; i++) if (rejected[i] === 1) reason[indices[i]!] = code;
}
