import {isoUtc} from '../time/gps-time.ts';
import type {Asked} from './compare.ts';
import type {Drift, PerAxis, Stability, StabilityVerdict, Step} from './result.ts';
import type {FoundDrift, FoundStep, Session} from './session.ts';

const SECONDS_PER_HOUR = 3600;
/** Half-width of 95 % of a normal distribution. */
const NORMAL_95 = 1.959963984540054;

export interface MovementLimit {
  readonly horizontal: number | null;
  readonly up: number | null;
}

/**
 * How much movement matters: what the user says, else twice the session's own 95 % uncertainty of
 * the mean, or a third of the tolerance where that is smaller. The uncertainty is that of the noise
 * alone: a jump would otherwise enlarge the very limit that it is held against.
 */
export function movementLimit(
  session: Session,
  stated: number | null,
  asked: readonly Asked[],
): MovementLimit {
  if (stated !== null) return {horizontal: stated, up: stated};
  const sigma = session.quietUncertaintyM;
  const widest = (values: readonly (number | null | undefined)[]) => {
    const known = values.filter((value) => value !== null && value !== undefined);
    return known.length === 0 ? null : 2 * NORMAL_95 * Math.max(...known);
  };
  const thirdOf = (axes: readonly Asked['of'][]) => {
    const limits = asked.filter(({of}) => axes.includes(of)).map(({toleranceM}) => toleranceM / 3);
    return limits.length === 0 ? null : Math.min(...limits);
  };
  return {
    horizontal: smaller(
      widest([sigma?.east, sigma?.north]),
      thirdOf(['horizontal', 'east', 'north']),
    ),
    up: smaller(widest([sigma?.up]), thirdOf(['up'])),
  };
}

function smaller(a: number | null, b: number | null): number | null {
  if (a === null || b === null) return a ?? b;
  return Math.min(a, b);
}

/**
 * What the record says about movement: everything found, each with whether it matters, and one
 * word for the whole. A step or drift below the movement limit is a finding, never a verdict.
 */
export function stabilityOf(
  session: Session,
  limit: MovementLimit,
  travelling: boolean,
  besideStep: (step: FoundStep) => readonly string[],
): Stability {
  const spanS = session.toGpsSeconds - session.fromGpsSeconds;
  const steps = session.steps.map((step) => stepOf(step, limit, besideStep(step)));
  const drift: PerAxis<Drift | null> = {
    east: driftOf(session.drift.east, spanS, limit.horizontal),
    north: driftOf(session.drift.north, spanS, limit.horizontal),
    up: driftOf(session.drift.up, spanS, limit.up),
  };
  return {
    verdict: verdictOf(session, steps, drift, limit, travelling),
    drift,
    steps,
    movementLimitM: limit,
  };
}

function stepOf(found: FoundStep, limit: MovementLimit, beside: readonly string[]): Step {
  const {east, north, up} = found.sizeM;
  const horizontalM = Math.hypot(east ?? 0, north ?? 0);
  return {
    utc: isoUtc(found.gpsSeconds, 3),
    interval95Utc: [
      isoUtc(found.interval95GpsSeconds[0], 3),
      isoUtc(found.interval95GpsSeconds[1], 3),
    ],
    eastM: east ?? 0,
    northM: north ?? 0,
    upM: up,
    material: exceeds(horizontalM, limit.horizontal) || exceeds(up ?? 0, limit.up),
    beside,
  };
}

function exceeds(sizeM: number, limitM: number | null): boolean {
  return limitM !== null && Math.abs(sizeM) > limitM;
}

function driftOf(found: FoundDrift | null, spanS: number, limitM: number | null): Drift | null {
  if (found === null) return null;
  const [low, high] = found.interval95MPerS;
  return {
    rateMPerHour: found.rateMPerS * SECONDS_PER_HOUR,
    interval95MPerHour: [low * SECONDS_PER_HOUR, high * SECONDS_PER_HOUR],
    detectableMPerHour: found.detectableMPerS * SECONDS_PER_HOUR,
    material: exceeds(found.rateMPerS * spanS, limitM) && (low > 0 || high < 0),
  };
}

function verdictOf(
  session: Session,
  steps: readonly Step[],
  drift: PerAxis<Drift | null>,
  limit: MovementLimit,
  travelling: boolean,
): StabilityVerdict {
  if (travelling) return 'travelling';
  if (session.movement === 'cannot tell' || limit.horizontal === null) return 'cannot tell';
  if (steps.some(({material}) => material)) return 'stepped';
  const drifts = [drift.east, drift.north, drift.up].some((axis) => axis?.material === true);
  if (session.movement === 'drift' && drifts) return 'drifting';
  return session.movement === 'settling' ? 'settling' : 'still';
}
