import {headlineFacts} from '../../occupation/headline-facts.ts';
import type {Requirement, Result} from '../../occupation/result.ts';
import {offsetAgainstUncertainty} from '../../wording/findings.ts';
import {
  counted,
  formatAzimuth,
  formatCount,
  formatGivenLength,
  formatLength,
  formatMoment,
  formatUncertainty,
  proseNumber,
  shownUncertaintyM,
} from '../../wording/numbers.ts';
import {besideUtc} from '../../wording/time-zone.ts';
import {headline} from '../../wording/verdict.ts';
import type {ReportContext} from '../context.ts';
import {offsetDecimals, type UnitChoice, unitFor} from '../units.ts';
import type {Check} from './checks.ts';
import {TONE_SHAPES, type Tone} from './tone.ts';

export interface VerdictView {
  readonly toneClass: string;
  readonly shape: string;
  readonly status: string;
  readonly sentence: string;
  readonly lines: readonly string[];
  readonly keys: readonly KeyNumber[];
}

interface KeyNumber {
  readonly label: string;
  readonly value: string;
  readonly unit: string;
  readonly qualifier: string;
}

/** The answer. A concern takes the calm tone away, so that a good mean never hides a finding. */
export function verdictView(context: ReportContext, checks: readonly Check[]): VerdictView {
  const {result} = context;
  const {tone, status, sentence} = headline(headlineFacts(result));
  const open = checks.filter((check) => check.tone === 'look' || check.tone === 'outside');
  const grave =
    open.some((check) => check.tone === 'outside') ||
    result.notices.some(({severity}) => severity === 'concern');
  const shown: Tone = tone === 'within' && grave ? 'look' : tone;
  return {
    toneClass: shown.replace(' ', '-'),
    shape: TONE_SHAPES[shown],
    status: open.length === 0 ? status : `${status}; ${counted(open.length, 'check')} to look at`,
    sentence,
    lines: verdictLines(result),
    keys: keyNumbers(context),
  };
}

function verdictLines(result: Result): string[] {
  const lines: string[] = [];
  const {comparison, position} = result;
  const distanceM = comparison?.offsetM.horizontal ?? null;
  const radiusM = position?.uncertainty95M?.horizontalRadius ?? null;
  if (distanceM !== null && radiusM !== null && radiusM > 0) {
    lines.push(offsetAgainstUncertainty(distanceM, radiusM));
  }
  for (const assumption of comparison?.assumptions ?? []) lines.push(`Assumed: ${assumption}.`);
  const [cause] = comparison?.candidates ?? [];
  if (cause !== undefined && comparison !== null) {
    const others = comparison.candidates.length - 1;
    const more = others === 0 ? '' : ` and ${counted(others, 'other cause')}`;
    lines.push(`Consistent with: ${cause.title}${more}. ${cause.advice}`);
  }
  const concerns = result.notices.filter(({severity}) => severity === 'concern');
  for (const {text} of concerns.slice(0, 2)) lines.push(text);
  return lines;
}

function keyNumbers(context: ReportContext): KeyNumber[] {
  const {result, options} = context;
  const position = result.position;
  const u = position?.uncertainty95M ?? null;
  const keys: KeyNumber[] = position === null ? movementKeys(context) : [];
  if (keys.length > 0) return keys;
  if (result.comparison !== null) keys.push(...offsetKeys(context));
  keys.push(
    lengthKey(
      '95 % in plan',
      shownUncertaintyM(u?.horizontalRadius ?? null),
      options.units,
      'radius, of the mean',
    ),
  );
  if (result.comparison === null) {
    keys.push(
      lengthKey(
        '95 % in height',
        shownUncertaintyM(u?.up ?? null),
        options.units,
        'half-width, of the mean',
      ),
    );
    const r95 = result.scatter?.aboutMean.observed.r95M ?? null;
    keys.push(lengthKey('One epoch', r95, options.units, 'radius that holds 95 %'));
  }
  keys.push(looksKey(result));
  return keys;
}

/** Where movement split the record: how far, into how many parts, and how far apart. */
function movementKeys({result, series, options}: ReportContext): KeyNumber[] {
  const {segments, stability, scatter} = result;
  const [jump] = stability.steps
    .filter((step) => step.material)
    .map((step) => ({utc: step.utc, sizeM: Math.hypot(step.eastM, step.northM, step.upM ?? 0)}))
    .sort((a, b) => b.sizeM - a.sizeM);
  if (jump === undefined || segments.length < 2) return [];
  const r95M = scatter?.aboutMean.observed.r95M ?? null;
  return [
    lengthKey(
      'Largest jump',
      jump.sizeM,
      options.units,
      `at ${formatMoment(jump.utc, series.spanS)} UTC${besideUtc(jump.utc, options.timeZone)}`,
    ),
    {
      label: 'Parts',
      value: String(segments.length),
      unit: '',
      qualifier: 'each with its own mean',
    },
    lengthKey('One epoch', r95M, options.units, 'radius that holds 95 %'),
    looksKey(result),
  ];
}

function offsetKeys({result, options}: ReportContext): KeyNumber[] {
  const comparison = result.comparison;
  if (comparison === null) return [];
  const {offsetM, azimuthDeg} = comparison;
  const toward = azimuthDeg === null ? '' : `toward ${formatAzimuth(azimuthDeg)}`;
  return [
    lengthKey(
      'Offset in plan',
      offsetM.horizontal,
      options.units,
      [toward, limitText(comparison.requirements, 'horizontal')].filter((t) => t !== '').join(', '),
    ),
    lengthKey(
      'Offset in height',
      offsetM.up,
      options.units,
      limitText(comparison.requirements, 'up') || 'above the mark is positive',
      true,
    ),
  ];
}

function limitText(requirements: readonly Requirement[], of: Requirement['of']): string {
  const found = requirements.find((requirement) => requirement.of === of);
  return found === undefined ? '' : `limit ${formatGivenLength(found.toleranceM)}`;
}

function lengthKey(
  label: string,
  valueM: number | null,
  units: UnitChoice,
  qualifier: string,
  signed = false,
): KeyNumber {
  if (valueM === null) return {label, value: '–', unit: '', qualifier: 'cannot be told'};
  const unit = unitFor(valueM, units);
  const value = proseNumber(valueM * unit.perM, offsetDecimals(valueM, unit), signed);
  return {label, value, unit: unit.name, qualifier};
}

function looksKey({position, epochs}: Result): KeyNumber {
  const looks = position?.independentLooks ?? null;
  const known = [looks?.east, looks?.north, looks?.up].filter(
    (value) => value !== null && value !== undefined,
  );
  const label = 'Independent looks';
  if (known.length === 0)
    return {
      label: 'Epochs used',
      value: formatCount(epochs.used),
      unit: '',
      qualifier: `of ${formatCount(epochs.read)} read`,
    };
  const fewest = Math.min(...known);
  return {
    label,
    value: proseNumber(fewest, fewest < 9.95 ? 1 : 0),
    unit: '',
    qualifier: `in ${counted(epochs.used, 'epoch')}`,
  };
}

/** The number that a tab or a bookmark shows. */
export function headlineNumber({result}: ReportContext): string {
  const distanceM = result.comparison?.offsetM.horizontal ?? null;
  if (distanceM !== null) return `${formatLength(distanceM)} from the mark`;
  const radiusM = result.position?.uncertainty95M?.horizontalRadius ?? null;
  return radiusM === null ? 'position' : `known within ${formatUncertainty(radiusM)}`;
}
