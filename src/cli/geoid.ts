import {InputError, UsageError} from '../errors.ts';
import {readLength} from '../fieldbook/quantity.ts';
import type {Sheet} from '../fieldbook/sheet.ts';
import type {GeoidInterpolation} from '../geodesy/geoid-grid.ts';
import {parseGtx} from '../geodesy/geoid-gtx.ts';
import {parseIsg} from '../geodesy/geoid-isg.ts';
import type {GeoidInUse, GeoidRequest} from '../occupation/separation.ts';
import {readWhole} from './files.ts';
import type {InForce} from './settings.ts';

/** No geoid is farther from the ellipsoid than this. */
const LARGEST_M = 120;

/** Where heights above the geoid come from: a grid, a number, or neither. */
export async function geoidRequest(
  {options, fromSheet}: InForce,
  sheet: Sheet,
): Promise<GeoidRequest> {
  const {geoid, separation, geoidInterpolation = 'bilinear'} = options;
  if (geoid !== undefined && separation !== undefined) {
    throw new UsageError('give --geoid or --separation, not both: which is right cannot be told');
  }
  if (geoid !== undefined) return {grid: await gridOf(geoid, geoidInterpolation), stated: null};
  if (separation === undefined) return {grid: null, stated: null};
  const separationM = separationOption(separation);
  return fromSheet.has('separation')
    ? {grid: null, stated: {separationM, from: 'field sheet', model: sheet.geoidModel ?? null}}
    : {grid: null, stated: {separationM, from: 'command line', model: null}};
}

async function gridOf(path: string, interpolation: GeoidInterpolation): Promise<GeoidInUse> {
  const bytes = await readWhole(path);
  const name = path.replace(/^.*[/\\]/, '');
  const parsed = isIsg(bytes)
    ? parseIsg(Buffer.from(bytes).toString('utf8'), name)
    : parseGtx(bytes, name);
  if (parsed.kind === 'refused') {
    throw new InputError(`${parsed.message}; geoid grids are read in the GTX and ISG formats`, {
      path,
    });
  }
  return {grid: parsed.grid, interpolation};
}

/** The text format ends its header with a line of its own; the binary one is numbers throughout. */
function isIsg(bytes: Uint8Array): boolean {
  const head = Buffer.from(bytes.subarray(0, 16_384)).toString('latin1');
  return /^\s*begin_of_head|end_of_head/m.test(head);
}

function separationOption(text: string): number {
  const read = readLength(text);
  if (read.kind === 'refused') throw new UsageError(`--separation: ${read.message}`);
  if (Math.abs(read.lengthM) > LARGEST_M) {
    throw new UsageError(
      `--separation: need ellipsoidal minus orthometric height, at most ${LARGEST_M} m either way, found "${text}"`,
    );
  }
  return read.lengthM;
}
