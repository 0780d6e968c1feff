import {UsageError} from '../errors.ts';
import type {Mark} from '../fieldbook/mark.ts';
import {findMark, readMarks} from '../fieldbook/marks.ts';
import {emptySheet, readSheet, type Sheet} from '../fieldbook/sheet.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {parsePointMotion} from '../geodesy/point-motion.ts';
import type {LogContents} from '../log/contents.ts';
import {standingOf} from '../occupation/describe.ts';
import {type Reduced, reduceOccupation} from '../occupation/reduce.ts';
import type {ReduceRequest} from '../occupation/request.ts';
import type {Result} from '../occupation/result.ts';
import type {ScreenRules} from '../occupation/screen.ts';
import {timeBins} from '../occupation/series/time-bins.ts';
import type {CivilDate} from '../time/calendar.ts';
import {utcFromGpsSeconds} from '../time/gps-time.ts';
import {causeAdvice, causeTitle, pairTitle} from '../wording/diagnosis.ts';
import {noticeText} from '../wording/notices.ts';
import {readEarlierChecks} from './earlier-results.ts';
import {readWhole, requireInputs, requireOutputs, writeOutputs} from './files.ts';
import {geoidRequest} from './geoid.ts';
import type {CommandArguments} from './options.ts';
import {outputPaths, outputsOf} from './outputs.ts';
import {progressOn} from './progress.ts';
import {readLogs} from './read-logs.ts';
import {readingOptions} from './reading-options.ts';
import {type ReportThread, startReportThread} from './report-thread.ts';
import {
  askedOf,
  type InForce,
  rememberOthers,
  type Settings,
  screenRules,
  withSheet,
} from './settings.ts';
import {STATUS} from './status.ts';
import {resultSummary, styleOf, type TerminalStyle} from './terminal.ts';
import {plotColumns, timePlot} from './terminal-plot.ts';
import {
  countOption,
  ellipsoidOption,
  lengthOption,
  momentOption,
  placeOption,
  requireSingle,
  timeZoneOption,
} from './values.ts';
import {VERSION} from './version.ts';

/** `stillmark reduce` and `stillmark check`; returns the exit status. */
export async function reduce(typed: CommandArguments, command: Result['command']): Promise<number> {
  requireSingle({...typed});
  timeZoneOption('time-zone', typed.timeZone);
  const companions = [
    typed.sheet,
    typed.marks,
    typed.logo,
    typed.geoid,
    ...(typed.with ?? []),
  ].filter((path) => path !== undefined);
  requireInputs(companions);
  requireOutputs(outputPaths(typed), [...typed.log, ...companions]);
  const sheet = typed.sheet === undefined ? emptySheet() : await sheetOf(typed.sheet);
  const inForce = withSheet(typed, sheet);
  const marks = await marksOf(inForce.options, command);
  const thread = typed.report === undefined ? null : startReportThread();
  const {asked, reduced} = await reducedAndWritten(typed, thread, () =>
    requestOf(command, inForce, sheet, marks),
  );
  if (!outputPaths(typed).includes('-')) {
    const style = styleOf(process.stdout, process.env);
    const plot = style.plots ? plotOf(reduced, asked, style) : [];
    process.stdout.write(resultSummary(reduced.result, style, plot));
  }
  return exitStatus(reduced);
}

/** East, north and up over time in a few lines, for a terminal that can show them. */
function plotOf(
  {result, reason, aboutReference}: Reduced,
  {log}: ReduceRequest,
  {columns}: TerminalStyle,
): string[] {
  const {count, gpsSeconds} = log.epochs;
  const firstS = gpsSeconds[0];
  if (firstS === undefined || result.epochs.used === 0) return [];
  const spanS = gpsSeconds[count - 1]! - firstS;
  const bins = timeBins({
    gpsSeconds,
    used: reason.map((code) => (code === 0 ? 1 : 0)),
    ...aboutReference(),
    firstS,
    spanS,
    intervalS: result.epochs.intervalS ?? 1,
    bins: plotColumns(columns),
  });
  return timePlot(bins, spanS);
}

/** Reads, computes and writes; the thread that draws the report is ended whatever happens. */
async function reducedAndWritten(
  typed: CommandArguments,
  thread: ReportThread | null,
  request: () => Promise<ReduceRequest>,
): Promise<{readonly asked: ReduceRequest; readonly reduced: Reduced}> {
  try {
    const asked = await request();
    const reduced = reduceOccupation(asked);
    await writeOutputs(await outputsOf(typed, reduced, asked, thread));
    return {asked, reduced};
  } finally {
    await thread?.close();
  }
}

function exitStatus({result}: Reduced): number {
  if (result.command === 'reduce')
    return result.segments.length > 0 ? STATUS.done : STATUS.cannotTell;
  switch (result.verdict) {
    case 'holds':
      return STATUS.done;
    case 'off':
    case 'moving':
      return STATUS.doesNotHold;
    default:
      return STATUS.cannotTell;
  }
}

async function sheetOf(path: string): Promise<Sheet> {
  return readSheet(await readWhole(path), path);
}

/** The known mark and its neighbours in the marks file. */
interface Marks {
  readonly mark: Mark | null;
  readonly all: readonly Mark[];
}

/** The known mark, when its coordinates can be found; `check` cannot do without. */
async function marksOf(options: CommandArguments, command: Result['command']): Promise<Marks> {
  if (options.marks === undefined || options.mark === undefined) {
    if (command === 'reduce') return {mark: null, all: []};
    throw new UsageError(
      options.mark === undefined
        ? 'check needs the name of the mark that was occupied: --mark NAME, or `mark:` in the field sheet'
        : `check needs the coordinates of ${options.mark}: name the file that holds them with --marks FILE`,
    );
  }
  const marks = readMarks(await readWhole(options.marks), options.marks);
  const found = findMark(marks, options.mark);
  if (found.kind === 'found') return {mark: found.mark, all: marks};
  const near = found.near.length === 0 ? '' : `; near in name: ${found.near.join(', ')}`;
  throw new UsageError(
    `no mark ${options.mark} among the ${marks.length} of ${options.marks}${near}`,
  );
}

async function requestOf(
  command: Result['command'],
  inForce: InForce,
  sheet: Sheet,
  {mark, all: marks}: Marks,
): Promise<ReduceRequest> {
  const {options} = inForce;
  const geoid = await geoidRequest(inForce, sheet);
  const ellipsoid = ellipsoidOption(options.ellipsoid);
  const at = placeOption('at', options.at);
  const progress = progressOn(process.stderr, options.quiet, () => performance.now());
  const {contents: log, inputs} = await readLogs(
    options.log,
    readingOptions(options, ellipsoid),
    progress,
  );
  requireDate(log);
  const settings: Settings = {};
  const rules = screenRules(inForce, firstDateOf(log), settings);
  const asked = command === 'check' ? askedOf(inForce, sheet, mark, settings) : [];
  rememberOthers(inForce, settings);
  return {
    command,
    program: {name: 'stillmark', version: VERSION},
    inputs,
    log,
    ellipsoid,
    rules: withinStand(rules, options.stand, log, ellipsoid),
    at,
    mark,
    marks,
    earlier: await readEarlierChecks(options.with ?? []),
    markName: options.mark ?? null,
    sheet,
    asked,
    frame: frameOf(inForce),
    coordinateEpoch: options.coordinateEpoch ?? null,
    motion: options.motion === undefined ? null : parsePointMotion(options.motion),
    geoid,
    grid: options.grid ?? null,
    movementLimitM: lengthOption('movement-limit', options.movementLimit),
    wantM: lengthOption('want', options.want),
    settings,
    say: noticeText,
    sayCause: {title: causeTitle, advice: causeAdvice, pair: pairTitle},
  };
}

function frameOf({options, fromSheet}: InForce): ReduceRequest['frame'] {
  if (options.frame === undefined) return null;
  return {name: options.frame, from: fromSheet.has('frame') ? 'sheet' : 'option'};
}

/** A time series without a date can be described, but a position without one cannot be handed on. */
function requireDate(log: LogContents): void {
  if (log.findings.some(({code}) => code === 'no-date')) {
    throw new UsageError(
      'the log carries no date (no RMC or ZDA sentence): give the date of its first epoch with --date YYYY-MM-DD',
    );
  }
}

function firstDateOf({epochs}: LogContents): CivilDate | null {
  return epochs.count === 0 ? null : utcFromGpsSeconds(epochs.gpsSeconds[0] ?? 0).date;
}

/** Narrows the time window to the standing period that the user numbered. */
function withinStand(
  rules: ScreenRules,
  stand: number | undefined,
  {epochs}: LogContents,
  ellipsoid: Ellipsoid,
): ScreenRules {
  const wanted = countOption('stand', stand);
  if (wanted === null) return rules;
  const periods = standingOf(epochs, ellipsoid);
  const period = periods[wanted - 1];
  if (period === undefined) {
    throw new UsageError(
      `--stand ${wanted}: the log has ${periods.length} standing periods; \`stillmark contents\` lists them`,
    );
  }
  const from = momentOption('stand', period.fromUtc) ?? Number.NEGATIVE_INFINITY;
  const to = momentOption('stand', period.toUtc) ?? Number.POSITIVE_INFINITY;
  // Printed times are rounded to a millisecond.
  return {
    ...rules,
    fromGpsSeconds: Math.max(from - 0.001, rules.fromGpsSeconds ?? from - 0.001),
    toGpsSeconds: Math.min(to + 0.001, rules.toGpsSeconds ?? to + 0.001),
  };
}
