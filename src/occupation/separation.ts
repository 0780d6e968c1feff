import type {Epochs} from '../epochs/epochs.ts';
import {type GeoidGrid, type GeoidInterpolation, geoidUndulationM} from '../geodesy/geoid-grid.ts';
import {moments} from '../statistics/moments.ts';
import {taken} from './local-columns.ts';
import type {Separation} from './result.ts';

/** A geoid separation that somebody stated as a number. */
export interface StatedSeparation {
  readonly separationM: number;
  readonly from: 'command line' | 'field sheet';
  /** Name of the geoid model, when it was given. */
  readonly model: string | null;
}

/** A geoid grid and how it is read between its nodes. */
export interface GeoidInUse {
  readonly grid: GeoidGrid;
  readonly interpolation: GeoidInterpolation;
}

/** Where orthometric heights come from: at most one of both; neither: the receiver's own model. */
export interface GeoidRequest {
  readonly grid: GeoidInUse | null;
  readonly stated: StatedSeparation | null;
}

type Place = {readonly latitudeDeg: number; readonly longitudeDeg: number};

/**
 * The separation that turns the ellipsoidal height at a place into an orthometric one: of the geoid
 * grid, else as stated, else as the receiver printed it.
 *
 * A grid that says nothing at the place yields null and not the next best: who names a model wants
 * no other.
 */
export function separationInUse(
  {grid, stated}: GeoidRequest,
  place: Place,
  receiverM: number | null,
): Separation | null {
  if (grid !== null) {
    const separationM = undulationAt(grid, place);
    return separationM === null
      ? null
      : {separationM, from: 'geoid grid', model: grid.grid.name, receiverM};
  }
  if (stated !== null) return {...stated, receiverM};
  if (receiverM === null) return null;
  return {separationM: receiverM, from: 'receiver', model: null, receiverM};
}

/** null outside the grid and where it has no value. */
export function undulationAt({grid, interpolation}: GeoidInUse, place: Place): number | null {
  return geoidUndulationM(grid, place, interpolation) ?? null;
}

/** Mean geoid separation that the receiver printed; null unless every epoch has one. */
export function meanSeparationM(epochs: Epochs, indices: Uint32Array): number | null {
  const separationM = moments(taken(epochs.separationM, indices))?.mean;
  if (separationM === undefined || Number.isNaN(separationM)) return null;
  // The column holds 32-bit floats; no log prints a separation finer than this.
  return Math.round(separationM * 1e5) / 1e5;
}
