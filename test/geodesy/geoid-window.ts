import type {GeoidGrid} from '../../src/geodesy/geoid-grid.ts';
import {parseGtx} from '../../src/geodesy/geoid-gtx.ts';
import {readReference} from '../reference/read.ts';

interface Window {
  readonly gtx_base64: string;
  readonly points: readonly (readonly [lat: number, lon: number, undulationM: number])[];
}

/** A window of EGM96 as a file, and what PROJ 9.1.1 interpolates in it at 200 places. */
export const geoidWindow = readReference<Window>('geoid-egm96-window');

export function windowBytes(): Uint8Array {
  return Uint8Array.from(Buffer.from(geoidWindow.gtx_base64, 'base64'));
}

export function windowGrid(): GeoidGrid {
  const parsed = parseGtx(windowBytes(), 'window');
  if (parsed.kind === 'refused') throw new Error(parsed.message);
  return parsed.grid;
}
