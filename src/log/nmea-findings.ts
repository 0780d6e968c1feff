import {EpochFlag, type Epochs} from '../epochs/epochs.ts';
import type {Sameness, TimeBack} from '../epochs/time-order.ts';
import {daysFromCivil} from '../time/calendar.ts';
import {hasLeapSecond} from '../time/leap-seconds.ts';
import type {AssembledLog} from './assemble.ts';
import type {InputLog, LogFinding, LogResolution, ReadOptions} from './contents.ts';
import type {DatedRuns} from './day-track.ts';
import {finding} from './findings.ts';
import {isoDate} from './iso-date.ts';
import {mixedRates} from './time-steps.ts';
import {WGS84} from './uncommon.ts';

/** GPS week numbers of ten bits start again after so many weeks (IS-GPS-200, 20.3.3.3.1.1). */
const ROLLOVER_DAYS = 1024 * 7;
const FIRST_ROLLOVER_DAY = daysFromCivil({year: 1999, month: 8, day: 22});
/** The first test satellite of Galileo was launched on that day; BeiDou-2 and QZSS came later. */
const NEWER_SYSTEMS_DAY = daysFromCivil({year: 2005, month: 12, day: 28});
const NEWER_TALKERS = /^(?:GA|GB|BD|GQ)/;

/** A millimetre is fine, a centimetre is not, for one who wants a mark to a centimetre. */
const COARSE_STEP_M = 0.01;
/** One minute of latitude, a nautical mile. */
const METRES_PER_DEGREE = 60 * 1852;

interface Known {
  readonly log: AssembledLog;
  readonly options: ReadOptions;
  readonly dated: DatedRuns;
  readonly epochs: Epochs;
  readonly timeBack: TimeBack;
  readonly sameness: Sameness;
  readonly resolution: LogResolution;
  readonly input: InputLog;
}

/** What the user should know about a log, in a fixed order. */
export function nmeaFindings(known: Known): LogFinding[] {
  return [
    ...dateFindings(known),
    ...orderFindings(known),
    ...positionFindings(known),
    ...heightFindings(known),
    ...lineFindings(known),
  ];
}

function dateFindings({log, options, dated, input, epochs}: Known): LogFinding[] {
  const found: LogFinding[] = [];
  if (epochs.count === 0) return found;
  const firstDay = dated.runs[0]?.day ?? 0;
  const date = isoDate(firstDay);
  const given = options.date === null ? undefined : isoDate(daysFromCivil(options.date));
  if (dated.source === 'assumed') {
    if (given !== undefined) found.push(finding('date-assumed', 'caution', {date: given}));
    else found.push(finding('no-date', 'concern', {placeholderDate: date}));
  } else {
    if (given !== undefined && given !== date) {
      found.push(finding('date-overridden', 'caution', {logDate: date, givenDate: given}));
    }
    if (dated.source === 'doubtful') found.push(finding('date-doubtful', 'caution', {date}));
    found.push(...rolloverFindings(firstDay, input));
  }
  if (dated.conflicts > 0) {
    found.push(finding('date-conflict', 'caution', {dates: dated.conflicts}));
  }
  if (log.leapSeconds > 0) {
    const known = dated.runs.some(({day}) => hasLeapSecond(day));
    found.push(finding('leap-second-seen', 'note', {times: log.leapSeconds, known}));
  }
  return found;
}

/** Says only what the log itself makes plain: old logs exist, and dates alone prove nothing. */
function rolloverFindings(day: number, input: InputLog): LogFinding[] {
  const newer = Object.keys(input.sentences).find((address) => NEWER_TALKERS.test(address));
  const because =
    day < FIRST_ROLLOVER_DAY
      ? 'before the first rollover'
      : newer !== undefined && day < NEWER_SYSTEMS_DAY
        ? newer
        : undefined;
  if (because === undefined) return [];
  const dateAfterRollover = isoDate(day + ROLLOVER_DAYS);
  return [
    finding('rollover-suspected', 'concern', {date: isoDate(day), dateAfterRollover, because}),
  ];
}

function orderFindings({log, timeBack, sameness, epochs}: Known): LogFinding[] {
  const found: LogFinding[] = [];
  if (timeBack.times > 0) found.push(finding('time-back', 'caution', {...timeBack}));
  if (sameness.repeated > 0) {
    found.push(finding('repeated-epochs', 'caution', {epochs: sameness.repeated}));
  }
  if (sameness.frozen > 0) {
    found.push(
      finding('frozen-run', 'note', {
        epochs: sameness.frozen,
        longestEpochs: sameness.longestFrozenEpochs,
        longestS: sameness.longestFrozenS,
      }),
    );
  }
  if (log.repeatedByTalkers > 0) {
    const talkers = log.talkers.join(', ');
    found.push(finding('two-talkers', 'caution', {epochs: log.repeatedByTalkers, talkers}));
  }
  const rates = mixedRates(epochs.gpsSeconds);
  if (rates !== undefined) found.push(finding('mixed-rates', 'note', {...rates}));
  return found;
}

function positionFindings({log, epochs, resolution}: Known): LogFinding[] {
  const found: LogFinding[] = [];
  if (log.withoutPosition > 0) {
    found.push(finding('no-position', 'note', {sentences: log.withoutPosition}));
  }
  const zeros = log.account.zeroPositions;
  if (zeros > 0) found.push(finding('zero-position', 'note', {sentences: zeros}));
  if (log.source !== 'fixes') {
    const source = log.source === 'rmc' ? 'RMC' : 'GLL';
    found.push(finding('plan-only', 'concern', {source, epochs: epochs.count}));
  }
  const atLeast = countFlag(epochs, EpochFlag.satellitesAtLeast);
  if (atLeast > 0) found.push(finding('satellites-at-least', 'note', {epochs: atLeast}));
  const other = log.datums.find((name) => name !== WGS84);
  if (other !== undefined) found.push(finding('datum-not-wgs84', 'concern', {datum: other}));
  if (log.datums.length > 1) {
    found.push(finding('datum-changes', 'concern', {datums: log.datums.join(', ')}));
  }
  found.push(...resolutionFindings(epochs, resolution));
  return found;
}

/** Says so when the digits cannot show what an average would. */
export function resolutionFindings(epochs: Epochs, resolution: LogResolution): LogFinding[] {
  const latitudeDeg = epochs.latitudeDeg[0];
  if (latitudeDeg === undefined) return [];
  const cosine = Math.cos((latitudeDeg * Math.PI) / 180);
  const northM = resolution.latitudeDeg * METRES_PER_DEGREE;
  const eastM = resolution.longitudeDeg * METRES_PER_DEGREE * cosine;
  const upM = Number.isNaN(resolution.heightM) ? null : resolution.heightM;
  const coarsestM = Math.max(northM, eastM, upM ?? 0);
  if (!(coarsestM > COARSE_STEP_M)) return [];
  return [finding('resolution-coarse', 'caution', {northM, eastM, upM})];
}

function heightFindings({epochs}: Known): LogFinding[] {
  const {count, altitudeM, separationM} = epochs;
  let absent = 0;
  let smallestM = Number.POSITIVE_INFINITY;
  let largestM = Number.NEGATIVE_INFINITY;
  let changes = 0;
  let lastM = Number.NaN;
  for (let i = 0; i < count; i += 1) {
    const oneM = separationM[i] ?? Number.NaN;
    if (Number.isNaN(oneM)) {
      if (!Number.isNaN(altitudeM[i] ?? Number.NaN)) absent += 1;
      continue;
    }
    if (oneM !== lastM && !Number.isNaN(lastM)) changes += 1;
    lastM = oneM;
    if (oneM < smallestM) smallestM = oneM;
    if (oneM > largestM) largestM = oneM;
  }
  const found: LogFinding[] = [];
  const planOnly = countFlag(epochs, EpochFlag.planOnly);
  if (planOnly > 0) {
    found.push(finding('height-absent', 'concern', {epochs: planOnly, ofEpochs: count}));
  }
  if (absent > 0) {
    found.push(finding('separation-absent', 'concern', {epochs: absent, ofEpochs: count}));
  }
  if (changes > 0) {
    found.push(
      finding('separation-changes', 'note', {
        smallestM: decimal(smallestM),
        largestM: decimal(largestM),
        changes,
      }),
    );
  }
  return found;
}

function lineFindings({log, options, input}: Known): LogFinding[] {
  const found: LogFinding[] = [];
  const {good, bad, absent} = input.checksums;
  if (absent > 0) {
    const trusted = options.trustAbsentChecksum;
    found.push(finding('checksum-absent', 'caution', {lines: absent, trusted}));
  }
  if (bad > 0) {
    found.push(finding('bad-checksums', 'caution', {lines: bad, ofLines: good + bad + absent}));
  }
  if (log.account.endsCut) found.push(finding('last-line-cut', 'note', {}));
  if (input.betweenBytes > 0) {
    found.push(finding('binary-between', 'note', {bytes: input.betweenBytes}));
  }
  return found;
}

function countFlag({count, flags}: Epochs, flag: number): number {
  let flagged = 0;
  for (let i = 0; i < count; i += 1) if (((flags[i] ?? 0) & flag) !== 0) flagged += 1;
  return flagged;
}

/** A value of a 32-bit column as the decimal that was printed. */
function decimal(value: number): number {
  return Number(value.toPrecision(7));
}
