/**
 * An occupation as simulated: columns of equal length in time order, positions as offsets from the
 * true mark. Only those who made the noise know that the mark is at zero.
 */
export interface SimulatedOccupation {
  readonly elapsedS: Float64Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  /** GGA quality of each epoch: 4 fixed, 5 float. */
  readonly fixClass: Uint8Array;
}

export const FIXED = 4;
export const FLOAT = 5;

/** The epochs for which `keep` says so. */
export function selectEpochs(
  occupation: SimulatedOccupation,
  keep: (index: number) => boolean,
): SimulatedOccupation {
  const kept: number[] = [];
  for (let i = 0; i < occupation.elapsedS.length; i++) if (keep(i)) kept.push(i);
  const pick = (column: Float64Array) => Float64Array.from(kept, (i) => column[i]!);
  return {
    elapsedS: pick(occupation.elapsedS),
    eastM: pick(occupation.eastM),
    northM: pick(occupation.northM),
    upM: pick(occupation.upM),
    fixClass: Uint8Array.from(kept, (i) => occupation.fixClass[i]!),
  };
}
