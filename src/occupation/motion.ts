import {orderStatisticInPlace} from '../statistics/quantile.ts';

/**
 * Was the receiver being carried about, and when did it stand?
 *
 * This looks for travel, not for the millimetres that `stability` is about: a setup that sinks or
 * is knocked stands still here.
 */

/** About one knot; slower than a stroll, faster than the wander of a receiver at rest. */
const TRAVEL_SPEED_M_PER_S = 0.5;
/** Positions are averaged over this long before their difference is called a speed. */
const AVERAGING_S = 5;
/** A standing period shorter than this is only reported when it is the whole record. */
const SHORTEST_PERIOD_S = 20;
/** Two periods this close in time and place are one: the position jumped, nobody travelled. */
const LONGEST_INTERRUPTION_S = 20;
const SAME_PLACE_M = 10;
/** A record whose ends lie further apart than this has travelled, however slowly. */
const TRAVEL_DISTANCE_M = 50;
/** A record of which more than this share is travel is not an occupation, … */
const TRAVEL_SHARE = 0.25;
/** … provided that it led somewhere: a poor fix that settles by a few metres is no journey. */
const TRAVEL_REACH_M = 5;

export interface Track {
  /** All of equal length, in time order, finite. */
  readonly gpsSeconds: Float64Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
}

/** A run of epochs during which the receiver stood; both indices are inside it. */
export interface StandingPeriod {
  readonly first: number;
  readonly last: number;
}

/**
 * 1 for every epoch at which the mean position of the next seconds differs from that of the last
 * ones by more than walking at one knot would make it: moving windows over running sums, O(n).
 */
export function travelFlags(track: Track): Uint8Array {
  const {gpsSeconds} = track;
  const count = gpsSeconds.length;
  const moving = new Uint8Array(count);
  const windowS = Math.max(AVERAGING_S, 2.5 * typicalStepS(gpsSeconds));
  const timeS = runningSum(gpsSeconds);
  const eastM = runningSum(track.eastM);
  const northM = runningSum(track.northM);
  // The windows of an epoch are from..i and i..to, itself included; both edges only move on.
  let from = 0;
  let to = 0;
  for (let i = 0; i < count; i++) {
    while (gpsSeconds[from]! < gpsSeconds[i]! - windowS) from++;
    if (to < i) to = i;
    while (to + 1 < count && gpsSeconds[to + 1]! <= gpsSeconds[i]! + windowS) to++;
    const before = i + 1 - from;
    const after = to + 1 - i;
    const elapsedS = (timeS[to + 1]! - timeS[i]!) / after - (timeS[i + 1]! - timeS[from]!) / before;
    const east = (eastM[to + 1]! - eastM[i]!) / after - (eastM[i + 1]! - eastM[from]!) / before;
    const north =
      (northM[to + 1]! - northM[i]!) / after - (northM[i + 1]! - northM[from]!) / before;
    const distanceM = Math.sqrt(east * east + north * north);
    if (elapsedS > 0 && distanceM > TRAVEL_SPEED_M_PER_S * elapsedS) moving[i] = 1;
  }
  return moving;
}

/** Whether the record as a whole is a journey rather than an occupation. */
export function isTravelling(track: Track): boolean {
  const count = track.gpsSeconds.length;
  if (count < 10) return false;
  const moving = travelFlags(track);
  let flagged = 0;
  for (let i = 0; i < count; i++) flagged += moving[i]!;
  if (endsApartM(track) > TRAVEL_DISTANCE_M) return true;
  return flagged > TRAVEL_SHARE * count && reachM(track) > TRAVEL_REACH_M;
}

/** Distance from the middle of the record that one epoch in twenty exceeds. */
function reachM(track: Track): number {
  const count = track.gpsSeconds.length;
  const at = centre(track, 0, count - 1);
  const distances = new Float64Array(count);
  for (let i = 0; i < count; i++) distances[i] = distanceM(track, i, at);
  return orderStatisticInPlace(distances, Math.floor(0.95 * (count - 1)));
}

/** The periods during which the receiver stood, in time order. */
export function standingPeriods(track: Track): StandingPeriod[] {
  const count = track.gpsSeconds.length;
  if (count === 0) return [];
  const moving = travelFlags(track);
  const runs = joinedRuns(track, runsOf(moving, 0)).map((run) => extended(track, run));
  const whole = runs.length === 1 && runs[0]!.last - runs[0]!.first + 1 >= 0.9 * count;
  const lasting = runs.filter(
    (run) => track.gpsSeconds[run.last]! - track.gpsSeconds[run.first]! >= SHORTEST_PERIOD_S,
  );
  return whole ? runs : lasting;
}

/** Sums of what comes before each element, about the first, so that large times cost no digits. */
function runningSum(values: Float64Array): Float64Array {
  const origin = values.length > 0 ? values[0]! : 0;
  const sums = new Float64Array(values.length + 1);
  for (let i = 0; i < values.length; i++) sums[i + 1] = sums[i]! + (values[i]! - origin);
  return sums;
}

function typicalStepS(gpsSeconds: Float64Array): number {
  if (gpsSeconds.length < 2) return 0;
  const steps = new Float64Array(gpsSeconds.length - 1);
  for (let i = 0; i < steps.length; i++) steps[i] = gpsSeconds[i + 1]! - gpsSeconds[i]!;
  return orderStatisticInPlace(steps, steps.length >> 1);
}

function endsApartM(track: Track): number {
  const count = track.gpsSeconds.length;
  const tenth = Math.max(1, Math.floor(count / 10));
  const start = centre(track, 0, tenth - 1);
  const end = centre(track, count - tenth, count - 1);
  return Math.hypot(end.eastM - start.eastM, end.northM - start.northM);
}

/** The medians of east and north over a run, both ends included. */
function centre(track: Track, first: number, last: number): {eastM: number; northM: number} {
  return {
    eastM: middle(track.eastM.slice(first, last + 1)),
    northM: middle(track.northM.slice(first, last + 1)),
  };
}

function middle(values: Float64Array): number {
  return orderStatisticInPlace(values, values.length >> 1);
}

function runsOf(flags: Uint8Array, wanted: number): StandingPeriod[] {
  const runs: StandingPeriod[] = [];
  let first = -1;
  for (let i = 0; i <= flags.length; i++) {
    const inside = i < flags.length && flags[i] === wanted;
    if (inside && first < 0) first = i;
    if (!inside && first >= 0) {
      runs.push({first, last: i - 1});
      first = -1;
    }
  }
  return runs;
}

function joinedRuns(track: Track, runs: readonly StandingPeriod[]): StandingPeriod[] {
  const joined: StandingPeriod[] = [];
  for (const run of runs) {
    const previous = joined.at(-1);
    if (previous !== undefined && isInterruption(track, previous, run)) {
      joined[joined.length - 1] = {first: previous.first, last: run.last};
    } else {
      joined.push(run);
    }
  }
  return joined;
}

function isInterruption(track: Track, before: StandingPeriod, after: StandingPeriod): boolean {
  const awayS = track.gpsSeconds[after.first]! - track.gpsSeconds[before.last]!;
  if (awayS > LONGEST_INTERRUPTION_S) return false;
  const from = centre(track, before.first, before.last);
  const to = centre(track, after.first, after.last);
  return Math.hypot(to.eastM - from.eastM, to.northM - from.northM) <= SAME_PLACE_M;
}

/** Speeds are averages, so a run ends early; take back the epochs that still lie at its place. */
function extended(track: Track, run: StandingPeriod): StandingPeriod {
  const at = centre(track, run.first, run.last);
  const distances = new Float64Array(run.last - run.first + 1);
  for (let i = run.first; i <= run.last; i++) distances[i - run.first] = distanceM(track, i, at);
  const reachM = 3 * middle(distances) + 0.02;
  let {first, last} = run;
  while (first > 0 && distanceM(track, first - 1, at) <= reachM) first--;
  while (last + 1 < track.gpsSeconds.length && distanceM(track, last + 1, at) <= reachM) last++;
  return {first, last};
}

function distanceM(track: Track, index: number, at: {eastM: number; northM: number}): number {
  return Math.hypot(track.eastM[index]! - at.eastM, track.northM[index]! - at.northM);
}
