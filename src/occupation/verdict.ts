import type {Requirement, StabilityVerdict, Verdict} from './result.ts';

/** A stability verdict that is material: the receiver or its positions did not stay in place. */
export function isMovement(stability: StabilityVerdict): boolean {
  return (
    stability === 'drifting' ||
    stability === 'stepped' ||
    stability === 'settling' ||
    stability === 'travelling'
  );
}

/**
 * The answer of `check`: the first of moving, off, cannot tell, holds that applies.
 *
 * "Holds" needs at least one requirement, all of them accepted, and a setup found still; a record
 * that cannot tell whether it sat still cannot say that the mark holds.
 */
export function checkVerdict(
  requirements: readonly Requirement[],
  stability: StabilityVerdict,
): Verdict {
  if (isMovement(stability)) return 'moving';
  if (requirements.some(({decision}) => decision === 'reject')) return 'off';
  const accepted = requirements.every(({decision}) => decision === 'accept');
  return requirements.length > 0 && accepted && stability === 'still' ? 'holds' : 'cannot tell';
}
