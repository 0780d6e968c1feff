import {dirname, isAbsolute, join} from 'node:path';
import {UsageError} from '../errors.ts';
import type {Mark} from '../fieldbook/mark.ts';
import type {Sheet} from '../fieldbook/sheet.ts';
import type {Asked} from '../occupation/compare.ts';
import type {Setting} from '../occupation/result.ts';
import type {FixWanted, ScreenRules} from '../occupation/screen.ts';
import type {CivilDate} from '../time/calendar.ts';
import type {CommandArguments} from './options.ts';
import {
  countOption,
  durationOption,
  lengthOption,
  momentOrTimeOption,
  numberOption,
} from './values.ts';

/** The options in force: the command line's, and the field sheet's where it says nothing. */
export interface InForce {
  readonly options: CommandArguments;
  /** Names of the options that the field sheet filled in. */
  readonly fromSheet: ReadonlySet<string>;
}

/** Joins the command line with the settings of the field sheet; the command line comes first. */
export function withSheet(options: CommandArguments, sheet: Sheet): InForce {
  const stated: Partial<CommandArguments> = {
    ...sheetSettings(sheet),
    ...(sheet.mark === undefined ? {} : {mark: sheet.mark}),
    ...(sheet.frame === undefined ? {} : {frame: sheet.frame}),
    ...geoidOfSheet(options, sheet),
    ...(sheet.projection === undefined ? {} : {grid: sheet.projection}),
    ...(sheet.coordinateEpoch === undefined ? {} : {coordinateEpoch: sheet.coordinateEpoch}),
  };
  const given = Object.fromEntries(
    Object.entries(options).filter(([, value]) => value !== undefined),
  );
  const fromSheet = Object.keys(stated).filter((name) => !Object.hasOwn(given, name));
  return {options: {...options, ...stated, ...given}, fromSheet: new Set(fromSheet)};
}

/** Whatever the command line says of the geoid replaces all that the sheet says of it. */
function geoidOfSheet(options: CommandArguments, sheet: Sheet): Partial<CommandArguments> {
  if (options.geoid !== undefined || options.separation !== undefined) return {};
  if (sheet.geoidGrid !== undefined) return {geoid: besideSheet(sheet, sheet.geoidGrid)};
  return sheet.separationM === undefined ? {} : {separation: `${sheet.separationM} m`};
}

/** A file that the sheet names stands where the sheet stands. */
function besideSheet({path}: Sheet, file: string): string {
  return isAbsolute(file) || path === '-' ? file : join(dirname(path), file);
}

function sheetSettings({settings}: Sheet): Partial<CommandArguments> {
  return Object.fromEntries(
    Object.entries(settings ?? {}).filter(([, value]) => value !== undefined),
  );
}

/** Settings by the name of their option, as they are printed in the result. */
export type Settings = Record<string, Setting>;

/** Remembers the value in force of one option and where it came from. */
function remember(
  settings: Settings,
  {options, fromSheet}: InForce,
  name: keyof CommandArguments,
  fallback: Setting['value'] = null,
): void {
  const value = options[name] as Setting['value'] | undefined;
  const option = name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`);
  // A switch that nobody turned has its default.
  settings[option] =
    value === undefined || value === false
      ? {value: fallback, from: 'default'}
      : {value, from: fromSheet.has(name) ? 'field sheet' : 'command line'};
}

/** The screening rules in force, each remembered with where it came from. */
export function screenRules(
  inForce: InForce,
  firstDate: CivilDate | null,
  settings: Settings,
): ScreenRules {
  const {options} = inForce;
  remember(settings, inForce, 'fix', 'best');
  remember(settings, inForce, 'settle', '0s');
  for (const name of [
    'minSatellites',
    'maxHdop',
    'maxPdop',
    'maxAge',
    'maxSigma',
    'fromUtc',
    'toUtc',
    'stand',
  ] as const) {
    remember(settings, inForce, name);
  }
  const fromGpsSeconds = momentOrTimeOption('from-utc', options.fromUtc, firstDate);
  const toGpsSeconds = momentOrTimeOption('to-utc', options.toUtc, firstDate);
  if (fromGpsSeconds !== null && toGpsSeconds !== null && fromGpsSeconds > toGpsSeconds) {
    throw new UsageError('--from-utc is later than --to-utc; exchange them');
  }
  return {
    fix: (options.fix ?? 'best') as FixWanted,
    minSatellites: countOption('min-satellites', options.minSatellites),
    maxHdop: numberOption('max-hdop', options.maxHdop),
    maxPdop: numberOption('max-pdop', options.maxPdop),
    maxAgeS: durationOption('max-age', options.maxAge),
    maxSigmaM: lengthOption('max-sigma', options.maxSigma),
    fromGpsSeconds,
    toGpsSeconds,
    settleS: durationOption('settle', options.settle) ?? 0,
  };
}

/**
 * What is asked of the offset: the command line first, then the field sheet, then the entry of the
 * mark. A reason belongs to the tolerances of its own source.
 */
export function askedOf(
  inForce: InForce,
  sheet: Sheet,
  mark: Mark | null,
  settings: Settings,
): Asked[] {
  const {options} = inForce;
  const stated = sheet.tolerance ?? mark?.tolerance;
  const reasonOfStated = options.toleranceReason ?? stated?.reason ?? null;
  for (const name of ['tolerance', 'toleranceUp', 'toleranceReason'] as const) {
    remember(settings, inForce, name);
  }
  const typed = {
    horizontal: lengthOption('tolerance', options.tolerance),
    up: lengthOption('tolerance-up', options.toleranceUp),
  };
  const asked: Asked[] = [];
  const ask = (of: Asked['of'], typedM: number | null, statedM: number | undefined) => {
    if (typedM !== null)
      asked.push({of, toleranceM: typedM, reason: options.toleranceReason ?? null});
    else if (statedM !== undefined) asked.push({of, toleranceM: statedM, reason: reasonOfStated});
  };
  ask('horizontal', typed.horizontal, stated?.horizontalM);
  ask('east', null, stated?.eastM);
  ask('north', null, stated?.northM);
  ask('up', typed.up, stated?.upM);
  return asked;
}

/** The other settings that enter the result, remembered as typed. */
export function rememberOthers(inForce: InForce, settings: Settings): void {
  for (const name of [
    'at',
    'frame',
    'coordinateEpoch',
    'motion',
    'grid',
    'geoid',
    'geoidInterpolation',
    'separation',
    'date',
    'start',
    'columns',
    'timeScale',
    'want',
    'movementLimit',
  ] as const) {
    remember(settings, inForce, name);
  }
  const beside = inForce.options.with;
  settings.with = beside
    ? {value: beside.join(', '), from: 'command line'}
    : {value: null, from: 'default'};
  remember(settings, inForce, 'ellipsoid', 'WGS84');
  remember(settings, inForce, 'acceptNoChecksum', false);
}
