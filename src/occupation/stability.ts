import {isoUtc} from '../time/gps-time.ts';
import type {Asked} from './compare.ts';
import type {Drift, PerAxis, SettlingFound, Stability, StabilityVerdict, Step} from './result.ts';
import type {FoundDrift, FoundStep, Session} from './session.ts';

const SECONDS_PER_HOUR = 3600;

export interface MovementLimit {
  readonly horizontal: number | null;
  readonly up: number | null;
}

/** What decides how much movement matters. */
export interface MovementRule {
  /** What the user says; it then stands alone. */
  readonly statedM: number | null;
  readonly asked: readonly Asked[];
}

/** No mark is held to less, however long the record: common practice, no source. */
const LEAST_MOVEMENT_M = 0.001;

/**
 * How much movement matters: what the user says, else twice the 95 % uncertainty of the mean by the
 * session alone, a millimetre or more, or a third of the tolerance where that is smaller.
 *
 * @param halfWidths95M  of the record with the movement in question taken out: a jump would
 *                       otherwise enlarge the very limit that it is held against
 */
function limitOf(
  halfWidths95M: PerAxis<number | null>,
  {statedM, asked}: MovementRule,
): MovementLimit {
  if (statedM !== null) return {horizontal: statedM, up: statedM};
  const twice = (...values: readonly (number | null)[]) => {
    const known = values.filter((value) => value !== null);
    return known.length === 0 ? null : Math.max(LEAST_MOVEMENT_M, 2 * Math.max(...known));
  };
  const thirdOf = (axes: readonly Asked['of'][]) => {
    const limits = asked.filter(({of}) => axes.includes(of)).map(({toleranceM}) => toleranceM / 3);
    return limits.length === 0 ? null : Math.min(...limits);
  };
  return {
    horizontal: smaller(
      twice(halfWidths95M.east, halfWidths95M.north),
      thirdOf(['horizontal', 'east', 'north']),
    ),
    up: smaller(twice(halfWidths95M.up), thirdOf(['up'])),
  };
}

interface Materiality {
  readonly limit: MovementLimit;
  /** Numbers of the material steps. */
  readonly steps: ReadonlySet<number>;
}

/** No more than this many steps are tried together: beyond them jumping is what the record does. */
const TRIED_TOGETHER = 4;

/**
 * Which steps matter: the largest ones, as many as stand out together against the record without
 * them. In a record that jumps again and again by as much, none stands out, and none is material.
 */
function materialSteps(session: Session, rule: MovementRule): Materiality {
  const {halfWidths95Without} = session;
  const other = {drift: drifts(session), settling: session.movement === 'settling'};
  const limitWithout = (steps: readonly number[]) =>
    limitOf(halfWidths95Without({steps, ...other}), rule);
  const order = lastingSteps(session);
  for (let tried = Math.min(TRIED_TOGETHER, order.length); tried > 0; tried--) {
    const together = order.slice(0, tried);
    const limit = limitWithout(together.map(({number}) => number));
    const standOut = together.every(
      (step) =>
        exceeds(horizontalM(step), limit.horizontal) || exceeds(step.sizeM.up ?? 0, limit.up),
    );
    if (standOut) return {limit, steps: new Set(together.map(({number}) => number))};
  }
  const largest = order.slice(0, 1).map(({number}) => number);
  return {limit: limitWithout(largest), steps: new Set()};
}

/** Whether some axis drifts beyond its own interval, beside the steps or without them. */
function drifts({movement, drift}: Session): boolean {
  if (movement !== 'drift' && movement !== 'step') return false;
  return [drift.east, drift.north, drift.up].some(
    (axis) => axis !== null && axis.interval95MPerS[0] * axis.interval95MPerS[1] > 0,
  );
}

/** A jump that is taken back this soon, and by more than half, moves the mean by little. */
const EXCURSION_SHARE = 0.1;
const TAKEN_BACK = 0.5;

/** Steps by size, the largest first; the two ends of an excursion are not among them. */
function lastingSteps(session: Session): {number: number; sizeM: PerAxis<number | null>}[] {
  const {steps} = session;
  const spanS = session.toGpsSeconds - session.fromGpsSeconds;
  const gone = new Set<number>();
  for (let i = 1; i < steps.length; i++) {
    const [out, back] = [steps[i - 1]!, steps[i]!];
    const left = {
      sizeM: {
        east: (out.sizeM.east ?? 0) + (back.sizeM.east ?? 0),
        north: (out.sizeM.north ?? 0) + (back.sizeM.north ?? 0),
        up: null,
      },
    };
    const soon = back.gpsSeconds - out.gpsSeconds < EXCURSION_SHARE * spanS;
    const larger = Math.max(horizontalM(out), horizontalM(back));
    if (soon && !gone.has(i - 1) && horizontalM(left) < TAKEN_BACK * larger) gone.add(i - 1).add(i);
  }
  return steps
    .map(({sizeM}, number) => ({number, sizeM}))
    .filter(({number}) => !gone.has(number))
    .sort((a, b) => horizontalM(b) - horizontalM(a) || a.number - b.number);
}

function horizontalM({sizeM: {east, north}}: Pick<FoundStep, 'sizeM'>): number {
  return Math.hypot(east ?? 0, north ?? 0);
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
  rule: MovementRule,
  besideStep: (step: FoundStep) => readonly string[],
): Stability {
  const spanS = session.toGpsSeconds - session.fromGpsSeconds;
  const {limit, steps: material} = materialSteps(session, rule);
  const steps = session.steps.map((step, number) => ({
    ...stepOf(step, besideStep(step)),
    material: material.has(number),
  }));
  const settling = settlingOf(session, limit);
  const drift: PerAxis<Drift | null> = {
    east: driftOf(session.drift.east, spanS, limit.horizontal),
    north: driftOf(session.drift.north, spanS, limit.horizontal),
    up: driftOf(session.drift.up, spanS, limit.up),
  };
  return {
    verdict: verdictOf(session, {steps, drift, settling, limit}),
    drift,
    steps,
    settling,
    movementLimitM: limit,
  };
}

function stepOf(found: FoundStep, beside: readonly string[]): Omit<Step, 'material'> {
  const {east, north, up} = found.sizeM;
  const [from, to] = found.interval95GpsSeconds;
  return {
    utc: isoUtc(found.gpsSeconds, 3),
    interval95Utc: [isoUtc(from, 3), isoUtc(to, 3)],
    eastM: east ?? 0,
    northM: north ?? 0,
    upM: up,
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
  found: {
    readonly steps: readonly Step[];
    readonly drift: PerAxis<Drift | null>;
    readonly settling: SettlingFound | null;
    readonly limit: MovementLimit;
  },
): StabilityVerdict {
  const {steps, drift, settling, limit} = found;
  if (session.movement === 'cannot tell' || limit.horizontal === null) return 'cannot tell';
  if (steps.some(({material}) => material)) return 'stepped';
  const drifts = [drift.east, drift.north, drift.up].some((axis) => axis?.material === true);
  if (session.movement === 'drift' && drifts) return 'drifting';
  return settling?.material === true ? 'settling' : 'still';
}

function settlingOf({settling}: Session, limit: MovementLimit): SettlingFound | null {
  if (settling === null) return null;
  const {east, north, up} = settling.sizeM;
  return {
    timeConstantS: settling.timeConstantS,
    eastM: east ?? 0,
    northM: north ?? 0,
    upM: up,
    material: exceeds(horizontalM(settling), limit.horizontal) || exceeds(up ?? 0, limit.up),
  };
}
