/** Two steps of time that are both common in one log. */
export interface MixedRates {
  readonly commonS: number;
  readonly commonShare: number;
  readonly otherS: number;
  readonly otherShare: number;
}

/** A step is common when so large a part of all steps are equal to it. */
const COMMON_SHARE = 0.1;
/** Steps that differ less are one rate whose clock ticks unevenly. */
const DIFFERENT_RATIO = 1.5;
/** Steps are compared in milliseconds, finer than receivers print. */
const STEPS_PER_S = 1000;
/** Different steps that are told apart; a log with more has no rate. */
const MOST_STEPS = 1000;

/**
 * The two most common steps between epochs, when both are common.
 *
 * @param gpsSeconds ascending
 */
export function mixedRates(gpsSeconds: Float64Array): MixedRates | undefined {
  const counts = new Map<number, number>();
  let steps = 0;
  let step = -1;
  let run = 0;
  for (let i = 1; i < gpsSeconds.length; i += 1) {
    const stepS = (gpsSeconds[i] ?? 0) - (gpsSeconds[i - 1] ?? 0);
    const next = Math.round(stepS * STEPS_PER_S);
    if (next === 0) continue;
    steps += 1;
    if (next !== step) {
      addRun(counts, step, run);
      step = next;
      run = 0;
    }
    run += 1;
  }
  addRun(counts, step, run);
  const [common, ...others] = [...counts].sort((a, b) => b[1] - a[1] || a[0] - b[0]);
  if (common === undefined) return undefined;
  const other = others.find(([one]) => ratioOf(one, common[0]) >= DIFFERENT_RATIO);
  if (other === undefined || other[1] < COMMON_SHARE * steps) return undefined;
  return {
    commonS: common[0] / STEPS_PER_S,
    commonShare: common[1] / steps,
    otherS: other[0] / STEPS_PER_S,
    otherShare: other[1] / steps,
  };
}

function ratioOf(a: number, b: number): number {
  return Math.max(a, b) / Math.min(a, b);
}

function addRun(counts: Map<number, number>, step: number, run: number): void {
  if (run === 0 || (counts.size >= MOST_STEPS && !counts.has(step))) return;
  counts.set(step, (counts.get(step) ?? 0) + run);
}
