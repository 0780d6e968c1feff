import {epochCsv} from '../exports/csv.ts';
import {resultGeoJson} from '../exports/geojson.ts';
import {resultJson} from '../exports/json.ts';
import {resultKml} from '../exports/kml.ts';
import {resultSinex} from '../exports/sinex.ts';
import type {Reduced} from '../occupation/reduce.ts';
import type {ReduceRequest} from '../occupation/request.ts';
import {buildSeries} from '../occupation/series.ts';
import {type Output, readWhole} from './files.ts';
import {logoDataUrl} from './logo.ts';
import type {CommandArguments} from './options.ts';
import type {ReportThread} from './report-thread.ts';
import {timeZoneOption} from './values.ts';

const OUTPUT_NAMES = ['report', 'result', 'epochs', 'geojson', 'kml', 'sinex'] as const;

/** The paths of the outputs that were asked for. */
export function outputPaths(options: CommandArguments): string[] {
  return OUTPUT_NAMES.map((name) => options[name]).filter((path) => path !== undefined);
}

/** Every output that was asked for, as text ready to be written. */
export async function outputsOf(
  options: CommandArguments,
  reduced: Reduced,
  request: ReduceRequest,
  thread: ReportThread | null,
): Promise<Output[]> {
  const {result} = reduced;
  const outputs: Output[] = [];
  const add = (path: string | undefined, text: () => Iterable<string>) => {
    if (path !== undefined) outputs.push({path, text: text()});
  };
  if (options.report !== undefined && thread !== null) {
    const text = [await reportOf(reduced, request, options, thread)];
    outputs.push({path: options.report, text});
  }
  add(options.result, () => [resultJson(result)]);
  add(options.epochs, () =>
    epochCsv({...reduced, ...reduced.aboutReference(), epochs: request.log.epochs}),
  );
  add(options.geojson, () => [resultGeoJson(result)]);
  add(options.kml, () => [resultKml(result)]);
  add(options.sinex, () => [resultSinex(result)]);
  return outputs;
}

async function reportOf(
  reduced: Reduced,
  {log, sheet}: ReduceRequest,
  options: CommandArguments,
  thread: ReportThread,
): Promise<string> {
  const {result, reason} = reduced;
  const series = buildSeries({
    epochs: log.epochs,
    used: reason.map((code) => (code === 0 ? 1 : 0)),
    ...reduced.aboutReference(),
    satellites: log.satellites,
    intervalS: result.epochs.intervalS,
    resolutionM: result.epochs.resolutionM,
    parts: result.segments,
    settlingHalfWidthM: reduced.halfWidths95After,
  });
  const look = {
    title: options.title ?? sheet.title ?? null,
    preparedFor: options.preparedFor ?? sheet.client ?? null,
    remarks: options.remarks ?? sheet.remarks ?? null,
    logoDataUrl:
      options.logo === undefined ? null : logoDataUrl(await readWhole(options.logo), options.logo),
    units: options.units ?? sheet.units ?? 'm',
    angles: options.angles ?? 'deg',
    timeZone: timeZoneOption('time-zone', options.timeZone),
  };
  return thread.render({result, series, options: look});
}
