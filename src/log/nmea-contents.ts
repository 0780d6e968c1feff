import {EpochFlag, type Epochs, type Satellites} from '../epochs/epochs.ts';
import {mergeSatellites} from '../epochs/satellites-builder.ts';
import {flagOutOfOrder, flagRepeatedAndFrozen, inTimeOrder} from '../epochs/time-order.ts';
import {type CivilDate, daysFromCivil, SECONDS_PER_DAY} from '../time/calendar.ts';
import {gpsSecondsOfUtcMidnight} from '../time/gps-time.ts';
import type {AssembledLog} from './assemble.ts';
import type {InputLog, LogContents, LogResolution, ReadOptions} from './contents.ts';
import type {DatedRuns, DayRun} from './day-track.ts';
import {nmeaFindings} from './nmea-findings.ts';
import type {PrintedDecimals} from './sentence-columns.ts';
import {WGS84} from './uncommon.ts';

/** The day on which the times of a log without any date stand: the first of GPS time. */
const PLACEHOLDER_DATE: CivilDate = {year: 1980, month: 1, day: 6};

const MINUTES_PER_DEGREE = 60;

/** Dates, orders and describes what has been assembled. */
export function nmeaContents(
  log: AssembledLog,
  options: ReadOptions & {readonly bytes: number},
): LogContents {
  const {account, source, sampler} = log;
  const dated = log.track.days.runs(daysFromCivil(options.date ?? PLACEHOLDER_DATE));
  const inLogOrder = log.track.builder.finish();
  setTimes(inLogOrder, dated.runs);
  const timeBack = flagOutOfOrder(inLogOrder);
  const epochs = inTimeOrder(inLogOrder);
  const sameness = flagRepeatedAndFrozen(epochs);
  if (log.countsBeyondTwelve) clearFlag(epochs, EpochFlag.satellitesAtLeast);
  if (dated.source === 'assumed') setFlag(epochs, EpochFlag.dateAssumed);
  const sampled = sampler.satellites.finish();
  setSampleTimes(sampled, sampler.samples, dated);
  const satellites = timeBack.times > 0 ? mergeSatellites([sampled]) : sampled;
  const resolution = resolutionOf(log.decimals);
  const input: InputLog = {
    name: options.name,
    kind: 'nmea',
    bytes: options.bytes,
    lines: account.lines(source === 'gll'),
    rejectedLines: account.rejectedLines(),
    betweenBytes: account.betweenBytes,
    sentences: account.sentences(),
    checksums: account.checksums,
    lineEnds: account.lineEnds(),
    firstGpsSeconds: epochs.gpsSeconds[0] ?? Number.NaN,
    lastGpsSeconds: epochs.gpsSeconds[epochs.count - 1] ?? Number.NaN,
  };
  const findings = nmeaFindings({
    log,
    options,
    dated,
    epochs,
    timeBack,
    sameness,
    resolution,
    input,
  });
  const datum = log.datums.find((name) => name !== WGS84);
  return {
    inputs: [input],
    epochs,
    satellites,
    resolution,
    findings,
    timeScale: 'utc',
    datumStated: datum ?? null,
  };
}

function setTimes({count, gpsSeconds}: Epochs, runs: readonly DayRun[]): void {
  runs.forEach(({fromEpoch, day}, k) => {
    const midnightS = gpsSecondsOfUtcMidnight(day);
    const end = runs[k + 1]?.fromEpoch ?? count;
    for (let i = fromEpoch; i < Math.min(end, count); i += 1) {
      gpsSeconds[i] = midnightS + (gpsSeconds[i] ?? 0);
    }
  });
}

/** Samples carry days from the first; the difference to dates is that of the epoch they fall on. */
function setSampleTimes(
  {count, gpsSeconds}: Satellites,
  samples: AssembledLog['sampler']['samples'],
  {shifts}: DatedRuns,
): void {
  let run = 0;
  samples.forEach(({epoch, firstRow}, k) => {
    while ((shifts[run + 1]?.fromEpoch ?? Number.POSITIVE_INFINITY) <= epoch) run += 1;
    const end = samples[k + 1]?.firstRow ?? count;
    for (let row = firstRow; row < end; row += 1) {
      const seconds = gpsSeconds[row] ?? 0;
      const day = Math.floor(seconds / SECONDS_PER_DAY);
      const midnightS = gpsSecondsOfUtcMidnight(day + (shifts[run]?.day ?? 0));
      gpsSeconds[row] = midnightS + seconds - day * SECONDS_PER_DAY;
    }
  });
}

function setFlag({count, flags}: Epochs, flag: number): void {
  for (let i = 0; i < count; i += 1) flags[i] = (flags[i] ?? 0) | flag;
}

function clearFlag({count, flags}: Epochs, flag: number): void {
  for (let i = 0; i < count; i += 1) flags[i] = (flags[i] ?? 0) & ~flag;
}

function resolutionOf(decimals: PrintedDecimals): LogResolution {
  return {
    latitudeDeg: stepOf(decimals.latitude) / MINUTES_PER_DEGREE,
    longitudeDeg: stepOf(decimals.longitude) / MINUTES_PER_DEGREE,
    heightM: stepOf(decimals.altitude),
    separationM: stepOf(decimals.separation),
  };
}

function stepOf(decimals: number): number {
  return decimals < 0 ? Number.NaN : Number(`1e-${decimals}`);
}
