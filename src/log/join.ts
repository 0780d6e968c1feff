import {concatEpochs} from '../epochs/builder.ts';
import {EpochFlag, type Epochs} from '../epochs/epochs.ts';
import {mergeSatellites} from '../epochs/satellites-builder.ts';
import {flagRepeatedAndFrozen, inTimeOrder} from '../epochs/time-order.ts';
import {InputError} from '../errors.ts';
import type {LogContents, LogFinding, LogResolution} from './contents.ts';
import {finding} from './findings.ts';

/** `inputIndex` is one byte. */
const MOST_LOGS = 256;

/**
 * Joins logs of one occupation in time order; times that several logs have are flagged as repeated.
 *
 * The order of the arguments leaves no trace: logs are put in order by their first and last epoch,
 * then by name and size, and of epochs of the same time that of the earlier log comes first.
 * Findings of one log carry its name as `input`; the resolution is the coarsest of all.
 *
 * @throws InputError for more than 256 logs
 */
export function joinLogs(logs: readonly LogContents[]): LogContents {
  const [first] = logs;
  if (first === undefined) throw new RangeError('joinLogs: need at least one log, got none');
  if (logs.length === 1) return first;
  const inputs = logs.flatMap((log) => log.inputs);
  if (inputs.length > MOST_LOGS) {
    throw new InputError(`need at most ${MOST_LOGS} logs at a time, got ${inputs.length}`, {
      path: inputs[MOST_LOGS]?.name ?? '',
    });
  }
  const ordered = [...logs].sort(compareLogs);
  const epochs = inTimeOrder(concatEpochs(withInputIndexes(ordered)));
  const before = ordered.reduce((sum, log) => sum + countRepeated(log.epochs), 0);
  const {repeated} = flagAgain(epochs);
  const datums = distinct(ordered.map((log) => log.datumStated ?? 'WGS 84'));
  return {
    inputs: ordered.flatMap((log) => log.inputs),
    epochs,
    satellites: mergeSatellites(ordered.map((log) => log.satellites)),
    resolution: coarsest(ordered.map((log) => log.resolution)),
    findings: [
      ...ordered.flatMap(namedFindings),
      ...joinFindings(ordered, repeated - before, datums),
    ],
    timeScale: ordered.some((log) => log.timeScale === 'gps') ? 'gps' : 'utc',
    datumStated: ordered.find((log) => log.datumStated !== null)?.datumStated ?? null,
  };
}

function compareLogs(a: LogContents, b: LogContents): number {
  const [one, other] = [a.inputs[0], b.inputs[0]];
  if (one === undefined || other === undefined) return a.inputs.length - b.inputs.length;
  return (
    compareTimes(one.firstGpsSeconds, other.firstGpsSeconds) ||
    compareTimes(one.lastGpsSeconds, other.lastGpsSeconds) ||
    compare(one.name, other.name) ||
    one.bytes - other.bytes ||
    compare(JSON.stringify(one), JSON.stringify(other)) ||
    compareColumns(a.epochs, b.epochs)
  );
}

/** Logs without epochs go last. */
function compareTimes(a: number, b: number): number {
  if (Number.isNaN(a) || Number.isNaN(b)) return Number(Number.isNaN(a)) - Number(Number.isNaN(b));
  return a - b;
}

function compare(a: string, b: string): number {
  if (a === b) return 0;
  return a < b ? -1 : 1;
}

/** Logs that are alike in all else, such as two receivers under one file name. */
function compareColumns(a: Epochs, b: Epochs): number {
  for (const name of ['latitudeDeg', 'longitudeDeg', 'altitudeM', 'ellipsoidalHeightM'] as const) {
    for (let i = 0; i < a.count; i += 1) {
      const difference = compareTimes(a[name][i] ?? Number.NaN, b[name][i] ?? Number.NaN);
      if (difference !== 0) return difference;
    }
  }
  return 0;
}

function withInputIndexes(logs: readonly LogContents[]): Epochs[] {
  let inputsBefore = 0;
  return logs.map(({epochs, inputs}) => {
    const base = inputsBefore;
    inputsBefore += inputs.length;
    return {...epochs, inputIndex: epochs.inputIndex.map((index) => index + base)};
  });
}

function countRepeated({count, flags}: Epochs): number {
  let repeated = 0;
  for (let i = 0; i < count; i += 1) {
    if (((flags[i] ?? 0) & EpochFlag.repeated) !== 0) repeated += 1;
  }
  return repeated;
}

/** Neighbours have changed, so what is said of them is said anew. */
function flagAgain(epochs: Epochs): {readonly repeated: number} {
  const {count, flags} = epochs;
  for (let i = 0; i < count; i += 1) {
    flags[i] = (flags[i] ?? 0) & ~(EpochFlag.repeated | EpochFlag.frozen);
  }
  return flagRepeatedAndFrozen(epochs);
}

function coarsest(resolutions: readonly LogResolution[]): LogResolution {
  const largest = (name: keyof LogResolution) =>
    resolutions
      .map((one) => one[name])
      .reduce((step, one) => (step > one || Number.isNaN(one) ? step : one), Number.NaN);
  return {
    latitudeDeg: largest('latitudeDeg'),
    longitudeDeg: largest('longitudeDeg'),
    heightM: largest('heightM'),
    separationM: largest('separationM'),
  };
}

function namedFindings({findings, inputs}: LogContents): LogFinding[] {
  const input = inputs[0]?.name ?? '';
  return findings.map((one) => ({...one, values: {input, ...one.values}}));
}

function joinFindings(
  logs: readonly LogContents[],
  overlapping: number,
  datums: readonly string[],
): LogFinding[] {
  const found: LogFinding[] = [];
  if (overlapping > 0) found.push(finding('logs-overlap', 'caution', {epochs: overlapping}));
  if (datums.length > 1) {
    found.push(finding('datums-differ', 'concern', {datums: datums.join(', ')}));
  }
  const steps = logs
    .filter((log) => log.epochs.count > 0)
    .map((log) => log.resolution.latitudeDeg)
    .filter((step) => !Number.isNaN(step));
  const [coarsestDeg, finestDeg] = [Math.max(...steps), Math.min(...steps)];
  if (steps.length > 1 && coarsestDeg > finestDeg) {
    found.push(finding('resolutions-differ', 'caution', {coarsestDeg, finestDeg}));
  }
  return found;
}

function distinct(texts: readonly string[]): string[] {
  return [...new Set(texts)].sort();
}
