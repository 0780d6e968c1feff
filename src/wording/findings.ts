import {
  compassWord,
  counted,
  formatCount,
  formatDuration,
  formatLength,
  formatMoment,
  formatPercent,
  formatRate,
  formatUncertainty,
  joined,
  proseNumber,
} from './numbers.ts';

/*
 * What the figures show, each in one sentence made from the numbers behind the figure.
 */

/** Under the plan view; lengths in metres. */
export function planFinding(facts: {
  readonly mark: boolean;
  readonly distanceM: number | null;
  readonly azimuthDeg: number | null;
  readonly r95M: number | null;
}): string {
  const spread =
    facts.r95M === null
      ? ''
      : `95${'\u00a0'}% of the single epochs lie within ${formatLength(facts.r95M)} of their mean`;
  if (!facts.mark || facts.distanceM === null) {
    return spread === '' ? 'The positions in plan.' : `${spread}.`;
  }
  const toward = facts.azimuthDeg === null ? '' : `, toward the ${compassWord(facts.azimuthDeg)}`;
  const mean = `The mean lies ${formatLength(facts.distanceM)} from the mark${toward}`;
  return spread === '' ? `${mean}.` : `${mean}; ${spread}.`;
}

export interface MovementFacts {
  readonly verdict: string;
  readonly steps: readonly {
    readonly utc: string;
    readonly sizeM: number;
    readonly material: boolean;
  }[];
  readonly recordS: number;
  /** The largest total over the record that counts as movement, if any. */
  readonly driftM: number | null;
}

/** What "no drift" is worth: the slowest steady drift that would have been seen. */
export function driftPower(detectableMPerHour: number | null): string {
  return detectableMPerHour === null
    ? ''
    : `A steady drift of ${formatRate(detectableMPerHour)} would have been seen. `;
}

/** Under the figure over time. */
export function movementFinding(facts: MovementFacts): string {
  const material = facts.steps.filter((step) => step.material);
  const small = facts.steps.filter((step) => !step.material);
  switch (facts.verdict) {
    case 'stepped': {
      const [first] = material;
      if (first === undefined) return 'The positions jumped.';
      const others = material.length > 1 ? ` and ${material.length - 1} more times` : '';
      return `The positions jump by ${formatLength(first.sizeM)} at ${formatMoment(first.utc, facts.recordS)}${others}.`;
    }
    case 'drifting':
      return facts.driftM === null
        ? 'The positions drift in one direction.'
        : `The positions drift by ${formatLength(facts.driftM)} over the record.`;
    case 'settling':
      return 'The positions settle toward a final value.';
    case 'travelling':
      return 'The receiver travels: these are not positions of one point.';
    case 'still':
      return small.length === 0
        ? 'No jump and no drift is found.'
        : `No movement that matters; ${counted(small.length, 'jump')} below the limit, at most ${formatLength(Math.max(...small.map(({sizeM}) => sizeM)))}.`;
    default:
      return 'Whether the point moved cannot be told from this record.';
  }
}

/** No log prints steps as fine as this. */
const SAME_PLACE_M = 1e-6;

/** Under the histograms: the radius that holds 95 % against what a normal distribution says. */
export function scatterFinding(observedM: number | null, normalM: number | null): string {
  if (observedM === null || normalM === null || !(normalM > 0)) {
    return 'How often each offset occurs.';
  }
  if (observedM < SAME_PLACE_M) return 'All epochs have one and the same position.';
  const ratio = observedM / normalM;
  const shape =
    ratio > 1.12
      ? 'More epochs lie far out than in a normal distribution'
      : ratio < 0.88
        ? 'Fewer epochs lie far out than in a normal distribution'
        : 'Scatter in plan is close to normal';
  return `${shape}: 95${'\u00a0'}% lie within ${formatLength(observedM)}, ${formatLength(normalM)} would be normal.`;
}

/** Under the settling of the mean. */
export function settlingFinding(horizontalM: number | null, upM: number | null): string {
  if (horizontalM === null) return 'How the mean came to its final value.';
  const up = upM === null ? '' : ` and ${formatLength(upM)} in height`;
  return `In the second half of the record the mean stayed within ${formatLength(horizontalM)} in plan${up} of its final value.`;
}

/** Under the autocorrelation: what the epochs are worth. */
export function correlationFinding(facts: {
  readonly epochs: number;
  readonly looks: number | null;
  readonly correlationTimeS: number | null;
}): string {
  if (facts.looks === null || facts.correlationTimeS === null) {
    return 'Neighbouring epochs repeat one another.';
  }
  const looks = facts.looks < 9.5 ? facts.looks.toFixed(1) : String(Math.round(facts.looks));
  return `Epochs repeat one another for about ${formatDuration(facts.correlationTimeS)}: ${counted(facts.epochs, 'epoch')} are worth ${looks} independent looks.`;
}

/** Under the sky view. */
export function skyFinding(
  systems: readonly {readonly name: string; readonly satellites: number}[],
  blockedDeg: {readonly azimuthDeg: number; readonly elevationDeg: number} | null,
): string {
  const total = systems.reduce((sum, {satellites}) => sum + satellites, 0);
  const seen = `${counted(total, 'satellite')} of ${counted(systems.length, 'system')} seen`;
  if (blockedDeg === null) return `${seen}.`;
  return `${seen}; nothing heard below ${Math.round(blockedDeg.elevationDeg)}° toward the ${compassWord(blockedDeg.azimuthDeg)}.`;
}

/** Under the signal panels. */
export function signalFinding(facts: {
  readonly fewestSatellites: number | null;
  readonly worstHdop: number | null;
  readonly oldestCorrectionS: number | null;
}): string {
  const parts: string[] = [];
  if (facts.fewestSatellites !== null) {
    parts.push(`never fewer than ${counted(facts.fewestSatellites, 'satellite')} used`);
  }
  if (facts.worstHdop !== null) parts.push(`HDOP at most ${proseNumber(facts.worstHdop, 1)}`);
  if (facts.oldestCorrectionS !== null) {
    parts.push(`corrections at most ${formatDuration(facts.oldestCorrectionS)} old`);
  }
  if (parts.length === 0) return 'Signal strength over the record.';
  const text = joined(parts);
  return `${text[0]?.toUpperCase()}${text.slice(1)}.`;
}

/** Under the candidates. */
export function candidatesFinding(count: number): string {
  return count === 1
    ? 'One everyday mistake would explain this offset. It is a suspicion, not a finding: measure again.'
    : `${count} everyday mistakes would each explain this offset. They are suspicions, not findings: measure again.`;
}

/** Whether an offset is more than noise, from its size in terms of its own 95 % uncertainty. */
export function offsetAgainstUncertainty(distanceM: number, radius95M: number): string {
  const ratio = distanceM / radius95M;
  if (ratio <= 1) {
    return `The offset lies inside its own 95${'\u00a0'}% uncertainty of ${formatUncertainty(radius95M)}: this record does not show it to differ from zero.`;
  }
  const times = ratio < 9.5 ? proseNumber(ratio, 1) : String(Math.round(ratio));
  return `The offset is ${times} times its own 95${'\u00a0'}% uncertainty of ${formatUncertainty(radius95M)}: a real difference, not noise.`;
}

/** How a single epoch count reads beside what was read. */
export function epochsUsedOf(used: number, read: number): string {
  if (read === 0) return 'no epoch';
  if (used === read) return `all ${counted(read, 'epoch')}`;
  return `${formatCount(used)} of ${counted(read, 'epoch')} (${formatPercent(used / read)})`;
}
