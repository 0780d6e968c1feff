import type {PerAxis, Requirement, Result} from '../../occupation/result.ts';
import {
  counted,
  fixed,
  formatDuration,
  formatPercent,
  formatRate,
  joined,
} from '../../wording/numbers.ts';
import {secondsBetween} from '../charts/ticks.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn} from './columns.ts';
import {TONE_SHAPES, type Tone} from './tone.ts';

/** One test that was made, or was not and why. */
export interface Check {
  readonly name: string;
  readonly measured: string;
  readonly limit: string;
  readonly unit: string;
  readonly tone: Tone;
  readonly toneClass: string;
  readonly shape: string;
  readonly outcome: string;
  readonly note: string;
}

interface CheckDraft {
  readonly name: string;
  readonly measured?: string;
  readonly limit?: string;
  readonly unit?: string;
  readonly tone: Tone;
  readonly outcome?: string;
  readonly note?: string;
}

const CONCERN: Readonly<Record<Tone, number>> = {outside: 0, look: 1, within: 2, 'not tested': 3};

/** Every check, the most worrying first. */
export function checks(context: ReportContext): Check[] {
  const drafts = [
    ...requirementChecks(context),
    agreementCheck(context),
    ...movementChecks(context),
    settlingCheck(context),
    screeningCheck(context),
    leftOutCheck(context.result),
    gapCheck(context.result),
    looksCheck(context.result),
    digitsCheck(context),
    heightCheck(context.result),
    budgetCheck(context.result),
    repeatCheck(context.result),
  ];
  return drafts.map(finished).sort((a, b) => CONCERN[a.tone] - CONCERN[b.tone]);
}

/** Other set-ups on the same mark, named by the user; two in agreement are still no proof. */
function repeatCheck({comparison}: Result): CheckDraft {
  const name = 'Repeat occupation';
  const tested = (comparison?.otherSetups ?? []).filter(
    ({agreement}) => agreement !== 'not tested',
  );
  if (tested.length === 0) {
    return {
      name,
      tone: 'not tested',
      note: 'one occupation has no redundancy: a blunder in setup or height repeats perfectly',
    };
  }
  const apart = tested.filter(({agreement}) => agreement === 'disagrees');
  return {
    name,
    measured: String(apart.length),
    limit: String(tested.length),
    unit: 'set-ups',
    tone: apart.length === 0 ? 'within' : 'outside',
    outcome: apart.length === 0 ? 'all agree' : 'disagree',
    note: 'other set-ups that differ from this one by more than both uncertainties explain',
  };
}

function finished(draft: CheckDraft): Check {
  const {measured = '', limit = '', unit = '', note = ''} = draft;
  return {
    name: draft.name,
    measured,
    limit,
    unit,
    tone: draft.tone,
    toneClass: draft.tone.replace(' ', '-'),
    shape: TONE_SHAPES[draft.tone],
    outcome: draft.outcome ?? draft.tone,
    note,
  };
}

const REQUIREMENT_NAMES: Readonly<Record<Requirement['of'], string>> = {
  horizontal: 'Distance from the mark in plan',
  east: 'East offset from the mark',
  north: 'North offset from the mark',
  up: 'Height difference from the mark',
};

/** A slow approach to the final place, as a tripod or an antenna that warms makes it. */
function settlingCheck({result, options}: ReportContext): CheckDraft {
  const name = 'Settling at the start';
  const {settling, movementLimitM} = result.stability;
  if (result.position === null && result.segments.length === 0) {
    return {name, tone: 'not tested', note: 'no epoch was used'};
  }
  if (settling === null) return {name, tone: 'within', outcome: 'none found'};
  const sizeM = Math.hypot(settling.eastM, settling.northM);
  const limitM = movementLimitM.horizontal;
  const column = lengthColumn([sizeM, limitM], options.units);
  return {
    name,
    measured: column.cell(sizeM),
    limit: column.cell(limitM),
    unit: column.unit.name,
    tone: settling.material ? 'outside' : 'within',
    note: `in plan, with a time constant of ${formatDuration(settling.timeConstantS)}`,
  };
}

function requirementChecks({result, options}: ReportContext): CheckDraft[] {
  const {comparison} = result;
  const untested = (note: string): CheckDraft[] => [
    {name: 'Distance from a known mark', tone: 'not tested', note},
  ];
  if (comparison === null) {
    return untested(
      result.command === 'check'
        ? 'the record has no one position to compare'
        : 'no known mark was given',
    );
  }
  if (comparison.requirements.length === 0) return untested('no tolerance was given');
  return comparison.requirements.map((requirement) => {
    const measured = comparison.offsetM[requirement.of];
    const column = lengthColumn([measured, requirement.toleranceM], options.units);
    const decided = {accept: 'within', reject: 'outside', 'cannot tell': 'look'} as const;
    const probability =
      requirement.probabilityWithin === null
        ? ''
        : `${formatPercent(requirement.probabilityWithin)} probable that it is inside`;
    return {
      name: REQUIREMENT_NAMES[requirement.of],
      measured: column.cell(measured === null ? null : Math.abs(measured)),
      limit: column.cell(requirement.toleranceM),
      unit: column.unit.name,
      tone: measured === null ? 'not tested' : decided[requirement.decision],
      ...(requirement.decision === 'cannot tell' && measured !== null
        ? {outcome: 'cannot tell'}
        : {}),
      note: [probability, requirement.reason ?? ''].filter((part) => part !== '').join('; '),
    };
  });
}

function agreementCheck({result}: ReportContext): CheckDraft {
  const name = 'Agreement with the mark within both uncertainties';
  const {comparison} = result;
  if (comparison === null) return {name, tone: 'not tested', note: 'nothing was compared'};
  const {horizontal, up} = comparison.normalisedError;
  const error = horizontal === null && up === null ? null : Math.max(horizontal ?? 0, up ?? 0);
  if (comparison.agreement === 'not tested' || error === null) {
    return {name, tone: 'not tested', note: 'the mark or the position has no stated uncertainty'};
  }
  return {
    name,
    measured: fixed(error, 2),
    limit: '1.00',
    unit: 'ratio',
    tone: comparison.agreement === 'agrees' ? 'within' : 'look',
    outcome: comparison.agreement,
    note: 'offset over the 95 % uncertainty of both',
  };
}

function movementChecks({result, series, options}: ReportContext): CheckDraft[] {
  const {stability} = result;
  const hours = series.spanS / 3600;
  const limits = stability.movementLimitM;
  const size = (eastM: number, northM: number) => Math.hypot(eastM, northM);
  const jump = Math.max(0, ...stability.steps.map(({eastM, northM}) => size(eastM, northM)));
  const {east, north, up} = stability.drift;
  const plan =
    east === null || north === null ? null : size(east.rateMPerHour, north.rateMPerHour) * hours;
  const height = up === null ? null : Math.abs(up.rateMPerHour) * hours;
  const tested = stability.verdict !== 'cannot tell';
  const draft = (
    name: string,
    measuredM: number | null,
    limitM: number | null,
    material: boolean,
    note: string,
  ): CheckDraft => {
    if (measuredM === null || !tested) {
      return {name, tone: 'not tested', note: 'the record is too short or too uneven to tell'};
    }
    const column = lengthColumn([measuredM, limitM], options.units);
    return {
      name,
      measured: column.cell(measuredM),
      limit: column.cell(limitM),
      unit: column.unit.name,
      tone: material ? 'outside' : 'within',
      note,
    };
  };
  const power = (drift: {detectableMPerHour: number} | null) =>
    drift === null ? '' : `${formatRate(drift.detectableMPerHour)} would have been seen`;
  return [
    tested && stability.steps.length === 0
      ? {name: 'Jumps of the positions', tone: 'within' as const, outcome: 'none found'}
      : draft(
          'Largest jump in plan',
          jump,
          limits.horizontal,
          stability.steps.some((step) => step.material),
          `${counted(stability.steps.length, 'jump')} found`,
        ),
    draft(
      'Drift over the record in plan',
      plan,
      limits.horizontal,
      (east?.material ?? false) || (north?.material ?? false),
      power(east),
    ),
    draft('Drift over the record in height', height, limits.up, up?.material ?? false, power(up)),
  ];
}

function screeningCheck({result, options}: ReportContext): CheckDraft {
  const name = 'Effect of the screening on the mean in plan';
  const offset = result.screening.withoutScreening?.offsetFromResultM ?? null;
  const radiusM = result.position?.uncertainty95M?.horizontalRadius ?? null;
  if (offset === null || offset.east === null || offset.north === null) {
    return {name, tone: 'not tested', note: 'there is no mean with and without screening'};
  }
  const effectM = Math.hypot(offset.east, offset.north);
  const column = lengthColumn([effectM, radiusM], options.units);
  return {
    name,
    measured: column.cell(effectM),
    limit: column.cell(radiusM),
    unit: column.unit.name,
    tone: radiusM === null ? 'not tested' : effectM > radiusM ? 'look' : 'within',
    note:
      radiusM === null ? 'no uncertainty to hold it against' : 'limit: the 95 % radius of the mean',
  };
}

/** More than a tenth left out means that a record is not clean. */
const MOST_LEFT_OUT = 0.1;

function leftOutCheck({epochs}: Result): CheckDraft {
  const name = 'Epochs left out';
  if (epochs.read === 0) return {name, tone: 'not tested', note: 'no epoch was read'};
  const share = 1 - epochs.used / epochs.read;
  return {
    name,
    measured: fixed(share * 100, 1),
    limit: fixed(MOST_LEFT_OUT * 100, 1),
    unit: '%',
    tone: share > MOST_LEFT_OUT ? 'look' : 'within',
    note: `${epochs.read - epochs.used} of ${epochs.read}`,
  };
}

const MOST_MISSING = 0.1;

function gapCheck({epochs}: Result): CheckDraft {
  const name = 'Time without epochs';
  if (epochs.firstUtc === null || epochs.lastUtc === null || epochs.read < 2) {
    return {name, tone: 'not tested', note: 'the record has no length'};
  }
  const spanS = secondsBetween(epochs.firstUtc, epochs.lastUtc);
  const missingS = epochs.gaps.reduce((sum, {durationS}) => sum + durationS, 0);
  const longestS = Math.max(0, ...epochs.gaps.map(({durationS}) => durationS));
  const share = spanS > 0 ? missingS / spanS : 0;
  return {
    name,
    measured: fixed(share * 100, 1),
    limit: fixed(MOST_MISSING * 100, 1),
    unit: '%',
    tone: share > MOST_MISSING ? 'look' : 'within',
    note:
      epochs.gaps.length === 0
        ? 'no gap'
        : `${counted(epochs.gaps.length, 'gap')}, the longest ${formatDuration(longestS)}`,
  };
}

/** Fewer looks than this cannot show how they scatter. */
const LEAST_LOOKS = 4;

function looksCheck({position}: Result): CheckDraft {
  const name = 'Independent looks, fewest of the three directions';
  const looks = position?.independentLooks ?? null;
  const known = [looks?.east, looks?.north, looks?.up].filter(
    (value) => value !== null && value !== undefined,
  );
  if (known.length === 0) {
    return {name, tone: 'not tested', note: 'the correlation of this record cannot be told'};
  }
  const fewest = Math.min(...known);
  return {
    name,
    measured: fixed(fewest, fewest < 9.95 ? 1 : 0),
    limit: String(LEAST_LOOKS),
    unit: 'at least',
    tone: fewest < LEAST_LOOKS ? 'look' : 'within',
    note: fewest < LEAST_LOOKS ? 'too few to rest on: the interval follows an assumed model' : '',
  };
}

/** A step of the digits above three standard deviations hides what the epochs do. */
const DEVIATIONS_PER_STEP = 1 / 0.3;

function digitsCheck({result, options}: ReportContext): CheckDraft {
  const name = 'Digits of the log against the scatter';
  const deviations = result.scatter?.aboutMean.observed.standardDeviationM ?? null;
  const {resolutionM} = result.epochs;
  const worst = coarsest(resolutionM, deviations);
  if (worst === null) {
    return {name, tone: 'not tested', note: 'the step of the digits or the scatter is not known'};
  }
  const limitM = worst.deviationM * DEVIATIONS_PER_STEP;
  const column = lengthColumn([worst.stepM, limitM], options.units);
  return {
    name,
    measured: column.cell(worst.stepM),
    limit: column.cell(limitM),
    unit: column.unit.name,
    tone: worst.stepM > limitM ? 'look' : 'within',
    note: `one step of the printed ${worst.axis} value`,
  };
}

function coarsest(resolutionM: PerAxis<number | null>, deviations: PerAxis<number | null> | null) {
  let worst: {axis: string; stepM: number; deviationM: number} | null = null;
  for (const axis of ['east', 'north', 'up'] as const) {
    const stepM = resolutionM[axis];
    const deviationM = deviations?.[axis] ?? null;
    if (stepM === null || deviationM === null) continue;
    if (worst === null || stepM * worst.deviationM > worst.stepM * deviationM) {
      worst = {axis, stepM, deviationM};
    }
  }
  return worst;
}

function heightCheck({occupation}: Result): CheckDraft {
  const name = 'Antenna height measured before and after';
  const {antennaHeightM, heightUsed} = occupation;
  if (antennaHeightM === null) {
    return {name, tone: 'not tested', note: 'no antenna height was given'};
  }
  return heightUsed === 'mean' || heightUsed === 'interpolated'
    ? {name, tone: 'within', outcome: 'both given', note: `the ${heightUsed} value is used`}
    : {name, tone: 'not tested', note: 'only one height was given'};
}

function budgetCheck({budget}: Result): CheckDraft {
  const name = 'Completeness of the uncertainty budget';
  if (budget.length === 0) return {name, tone: 'not tested', note: 'there is no budget'};
  const missing = budget.filter((row) => row.standardUncertaintyM === null);
  if (missing.length === 0) return {name, tone: 'within', outcome: 'complete'};
  return {
    name,
    tone: 'not tested',
    outcome: 'incomplete',
    note: `not included: ${joined(missing.map(({source}) => source))}`,
  };
}
