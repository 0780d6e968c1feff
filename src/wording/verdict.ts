import {
  compassWord,
  formatDuration,
  formatGivenLength,
  formatLength,
  formatMoment,
  formatUncertainty,
} from './numbers.ts';

/** The numbers that the headline speaks of; lengths in metres, null where not computed. */
export interface HeadlineFacts {
  readonly command: 'reduce' | 'check';
  readonly mark: string | null;
  readonly verdict: 'holds' | 'off' | 'moving' | 'cannot tell' | null;
  readonly stability: string;
  readonly epochsUsed: number;
  readonly durationS: number;
  readonly offsetHorizontalM: number | null;
  readonly offsetUpM: number | null;
  readonly azimuthDeg: number | null;
  readonly requirements: readonly HeadlineRequirement[];
  readonly radius95M: number | null;
  readonly up95M: number | null;
  readonly materialStep: {readonly utc: string; readonly sizeM: number} | null;
  readonly segments: number;
  /** What the 95 % figures leave out or include beyond the record. */
  readonly rests: 'base not included' | 'service included' | null;
}

export interface HeadlineRequirement {
  readonly of: 'horizontal' | 'east' | 'north' | 'up';
  readonly toleranceM: number;
  readonly decision: 'accept' | 'reject' | 'cannot tell';
}

export type Tone = 'within' | 'look' | 'outside' | 'not tested';

export interface Headline {
  readonly tone: Tone;
  /** The word that stands beside the shape: readable without colour. */
  readonly status: string;
  /** One sentence that can be read aloud to a client. */
  readonly sentence: string;
}

export function headline(facts: HeadlineFacts): Headline {
  return facts.command === 'check' ? checkHeadline(facts) : reduceHeadline(facts);
}

function checkHeadline(facts: HeadlineFacts): Headline {
  switch (facts.verdict) {
    case 'holds':
      return {
        tone: 'within',
        status: 'Holds',
        sentence: `${offsetClause(facts)}, ${insideClause(facts)}, and the setup sat still.`,
      };
    case 'off':
      return {tone: 'outside', status: 'Off', sentence: offSentence(facts)};
    case 'moving':
      return {tone: 'outside', status: 'Moving', sentence: movingSentence(facts)};
    default:
      return {tone: 'look', status: 'Cannot tell', sentence: openSentence(facts)};
  }
}

function reduceHeadline(facts: HeadlineFacts): Headline {
  if (facts.epochsUsed === 0) {
    return {
      tone: 'not tested',
      status: 'No position',
      sentence: 'No epoch of this record passes the screening rules, so there is no position.',
    };
  }
  if (isMovement(facts.stability)) {
    return {tone: 'look', status: 'Look first', sentence: movingSentence(facts)};
  }
  const name = facts.mark ?? 'The point';
  if (facts.radius95M === null) {
    return {
      tone: 'not tested',
      status: 'No uncertainty',
      sentence: `${name} has a mean position from ${formatDuration(facts.durationS)} of record, but the record cannot tell how sure it is.`,
    };
  }
  const height = facts.up95M === null ? '' : ` and ${formatUncertainty(facts.up95M)} in height`;
  const still =
    facts.stability === 'still'
      ? 'and the setup sat still'
      : 'but whether the setup sat still cannot be told';
  return {
    tone: facts.stability === 'still' ? 'within' : 'look',
    status: facts.stability === 'still' ? 'Position found' : 'Position found, stillness open',
    sentence: `${name} is known within ${formatUncertainty(facts.radius95M)} in plan${height} (${levelWords(facts)}), ${still}.`,
  };
}

function levelWords({rests}: HeadlineFacts): string {
  if (rests === 'base not included') return '95 %, relative to its base';
  return rests === 'service included' ? '95 %, with the errors of the positioning service' : '95 %';
}

function isMovement(stability: string): boolean {
  return ['drifting', 'stepped', 'settling', 'travelling'].includes(stability);
}

function offsetClause(facts: HeadlineFacts): string {
  const mark = facts.mark ?? 'the mark';
  const horizontal = facts.offsetHorizontalM;
  const up = facts.offsetUpM;
  if (horizontal === null && up === null) return `There is no mean to compare with ${mark}`;
  if (horizontal === null) return `The mean is ${upWords(up ?? 0)} ${mark}`;
  const plan = `The mean is ${formatLength(horizontal)} from ${mark}`;
  return up === null ? plan : `${plan} in plan and ${upWords(up)} it`;
}

function upWords(upM: number): string {
  return `${formatLength(Math.abs(upM))} ${upM < 0 ? 'below' : 'above'}`;
}

function insideClause(facts: HeadlineFacts): string {
  const limits = facts.requirements.map(({of, toleranceM}) => limitWords(of, toleranceM));
  const unique = [...new Set(limits)];
  return `inside the ${unique.join(' and ')} asked for`;
}

function limitWords(of: HeadlineRequirement['of'], toleranceM: number): string {
  const limit = formatGivenLength(toleranceM);
  if (of === 'horizontal') return limit;
  return of === 'up' ? `${limit} in height` : `${limit} in ${of}`;
}

function offSentence(facts: HeadlineFacts): string {
  const failed = facts.requirements.filter(({decision}) => decision === 'reject');
  const limits = failed.map(({of, toleranceM}) => limitWords(of, toleranceM)).join(' and ');
  const toward =
    facts.azimuthDeg === null || facts.offsetHorizontalM === null
      ? ''
      : `, toward the ${compassWord(facts.azimuthDeg)}`;
  return `${offsetClause(facts)}${toward}: outside the ${limits} asked for.`;
}

function movingSentence(facts: HeadlineFacts): string {
  if (facts.stability === 'travelling') {
    return 'The receiver was travelling during this record, so it is no occupation of one point.';
  }
  if (facts.materialStep !== null) {
    const {sizeM, utc} = facts.materialStep;
    const parts =
      facts.segments > 1 ? `; each of the ${facts.segments} parts has its own mean` : '';
    return `The positions jumped by ${formatLength(sizeM)} at ${formatMoment(utc, facts.durationS)} UTC, so no single mean stands for the whole record${parts}.`;
  }
  const how =
    facts.stability === 'settling'
      ? 'kept settling toward a final value'
      : 'drifted steadily in one direction';
  return `The positions ${how} by more than this record may, so its mean is not the position of a point at rest.`;
}

function openSentence(facts: HeadlineFacts): string {
  const offset = offsetClause(facts);
  if (facts.offsetHorizontalM === null && facts.offsetUpM === null) {
    return `${offset}: no epoch of this record passes the screening rules.`;
  }
  if (facts.requirements.length === 0) {
    return `${offset}; no tolerance was given, so there is nothing to decide.`;
  }
  if (facts.radius95M === null) {
    return `${offset}, but this record cannot tell how sure that is.`;
  }
  const open = facts.requirements.filter(({decision}) => decision === 'cannot tell');
  if (open.length === 0) {
    return `${offset}, ${insideClause(facts)}, but whether the setup sat still cannot be told.`;
  }
  const uncertainty = open[0]?.of === 'up' && facts.up95M !== null ? facts.up95M : facts.radius95M;
  const limits = open.map(({of, toleranceM}) => limitWords(of, toleranceM)).join(' and ');
  const service = facts.rests === 'service included' ? ', the positioning service included,' : '';
  return `${offset}; with a 95 % uncertainty of ${formatUncertainty(uncertainty)}${service} that is neither surely inside nor surely outside the ${limits} asked for.`;
}
