import {EpochFlag, type Epochs} from '../epochs/epochs.ts';
import type {Sameness, TimeBack} from '../epochs/time-order.ts';
import type {LogFinding, ReadOptions} from './contents.ts';
import {finding} from './findings.ts';
import {resolutionFindings} from './nmea-findings.ts';
import type {NamedColumns} from './table-columns.ts';
import type {PositionColumns, SigmaColumns} from './table-layout.ts';
import type {OpenTable} from './table-open.ts';
import {mixedRates} from './time-steps.ts';

const WEEKS_PER_ROLLOVER = 1024;
const SECONDS_PER_WEEK = 604_800;

/** What the choice of the position columns took for granted or had to leave out. */
export function positionFindings(position: PositionColumns, columns: NamedColumns): LogFinding[] {
  if (position.kind === 'geocentric') return [];
  const {ellipsoidalHeight, altitude, separation} = position;
  if (ellipsoidalHeight !== null) {
    const column = ellipsoidalHeight.name;
    return columns.has('height') ? [finding('height-taken-as-ellipsoidal', 'note', {column})] : [];
  }
  return altitude !== null && separation === null
    ? [finding('altitude-without-separation', 'caution', {column: altitude.name})]
    : [];
}

export function sigmaFindings(sigmas: SigmaColumns | null): LogFinding[] {
  if (sigmas?.kind !== 'geocentric' || sigmas.xy !== null) return [];
  const columns = [sigmas.x.name, sigmas.y.name, sigmas.z.name].join(', ');
  return [finding('sigma-correlation-assumed-zero', 'caution', {columns})];
}

/** What the rows as a whole showed, behind what was found when the columns were chosen. */
export function tableFindings(
  table: OpenTable,
  epochs: Epochs,
  {timeBack, sameness}: {readonly timeBack: TimeBack; readonly sameness: Sameness},
  {date}: ReadOptions,
): LogFinding[] {
  const found = [...table.findings];
  const {time} = table.layout;
  if (time.kind === 'clock' && date !== null) {
    const isoDate = [date.year, date.month, date.day].map(twoDigits).join('-');
    found.push(finding('date-assumed', 'note', {date: isoDate}));
  }
  const week = Math.floor((epochs.gpsSeconds[0] ?? Number.NaN) / SECONDS_PER_WEEK);
  if (time.kind === 'gps week' && week < WEEKS_PER_ROLLOVER) {
    found.push(finding('gps-week-below-1024', 'caution', {week}));
  }
  const {zeroSigmas} = table.rows;
  if (zeroSigmas > 0) found.push(finding('sigmas-zero', 'note', {rows: zeroSigmas}));
  found.push(...orderFindings(timeBack, sameness), ...heightFindings(epochs));
  const rates = mixedRates(epochs.gpsSeconds);
  if (rates !== undefined) found.push(finding('mixed-rates', 'note', {...rates}));
  return [...found, ...resolutionFindings(epochs, table.rows.resolution())];
}

function orderFindings(timeBack: TimeBack, sameness: Sameness): LogFinding[] {
  const found: LogFinding[] = [];
  if (timeBack.times > 0) found.push(finding('time-back', 'caution', {...timeBack}));
  if (sameness.repeated > 0) {
    found.push(finding('repeated-epochs', 'caution', {epochs: sameness.repeated}));
  }
  if (sameness.frozen > 0) {
    const longestEpochs = sameness.longestFrozenEpochs;
    const longestS = sameness.longestFrozenS;
    found.push(finding('frozen-run', 'note', {epochs: sameness.frozen, longestEpochs, longestS}));
  }
  return found;
}

function heightFindings({count, flags}: Epochs): LogFinding[] {
  let planOnly = 0;
  for (let i = 0; i < count; i += 1) {
    if (((flags[i] ?? 0) & EpochFlag.planOnly) !== 0) planOnly += 1;
  }
  if (planOnly === 0) return [];
  return [finding('height-absent', 'concern', {epochs: planOnly, ofEpochs: count})];
}

function twoDigits(value: number): string {
  return String(value).padStart(2, '0');
}
