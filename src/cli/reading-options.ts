import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import type {ReadOptions} from '../log/contents.ts';
import type {CommandArguments} from './options.ts';
import {dateOption, momentOption} from './values.ts';

/** How the logs are to be read, from the options that all commands share. */
export function readingOptions(
  options: CommandArguments,
  ellipsoid: Ellipsoid,
): Omit<ReadOptions, 'name'> {
  return {
    date: dateOption('date', options.date),
    trustAbsentChecksum: options.acceptNoChecksum,
    table: {
      columns: options.columns?.split(',').map((name) => name.trim()) ?? null,
      timeScale: options.timeScale ?? null,
      startGpsSeconds: momentOption('start', options.start),
      semiMajorAxisM: ellipsoid.semiMajorAxisM,
      inverseFlattening: ellipsoid.inverseFlattening,
    },
  };
}
