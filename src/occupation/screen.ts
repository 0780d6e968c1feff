import {EpochFlag, type Epochs, FixClass} from '../epochs/epochs.ts';

/** Why an epoch is not used; `used` stands first so that 0 means kept. */
export const SCREEN_REASONS = [
  'used',
  'invalid fix',
  'repeated time',
  'outside time window',
  'settling time',
  'fix class',
  'few satellites',
  'hdop',
  'pdop',
  'correction age',
  'receiver sigma',
  'no height',
  'far from its neighbours',
] as const;
export type ScreenReason = (typeof SCREEN_REASONS)[number];

/** The code of a reason in the column that screening fills. */
export function reasonCode(reason: ScreenReason): number {
  return SCREEN_REASONS.indexOf(reason);
}

export type FixWanted = 'best' | 'any' | FixClassName;
export type FixClassName =
  | 'fixed'
  | 'float'
  | 'differential'
  | 'autonomous'
  | 'precise'
  | 'unknown';

/** The declared rules; null switches a rule off. */
export interface ScreenRules {
  readonly fix: FixWanted;
  readonly minSatellites: number | null;
  readonly maxHdop: number | null;
  readonly maxPdop: number | null;
  readonly maxAgeS: number | null;
  readonly maxSigmaM: number | null;
  readonly fromGpsSeconds: number | null;
  readonly toGpsSeconds: number | null;
  /** Time left out at the start of the occupation, counted from its first valid epoch. */
  readonly settleS: number;
}

export interface ScreenOutcome {
  /** A reason code per epoch, as many as epochs read. */
  readonly reason: Uint8Array;
  /** null when every class is kept, or no epoch is valid. */
  readonly fixClassKept: FixClassName | null;
  /** Share of the valid epochs in the time window that the kept class holds; 1 when all are kept. */
  readonly fixClassShare: number;
}

const NAME_OF_CLASS: ReadonlyMap<number, FixClassName> = new Map([
  [FixClass.fixed, 'fixed'],
  [FixClass.float, 'float'],
  [FixClass.differential, 'differential'],
  [FixClass.autonomous, 'autonomous'],
  [FixClass.precise, 'precise'],
  [FixClass.unknown, 'unknown'],
]);

/** The name of a fix class in words; the classes that are never measurements have names too. */
export function fixClassName(fixClass: number): string {
  if (fixClass === FixClass.none) return 'no fix';
  if (fixClass === FixClass.notMeasured) return 'not measured';
  return NAME_OF_CLASS.get(fixClass) ?? 'unknown';
}

/**
 * Applies every rule that looks at one epoch alone; the first rule that an epoch breaks is its
 * reason. The rule about neighbours comes after it, on what is left.
 */
export function screenByRules(epochs: Epochs, rules: ScreenRules): ScreenOutcome {
  const reason = new Uint8Array(epochs.count);
  markUnusable(epochs, rules, reason);
  markSettling(epochs, rules.settleS, reason);
  const {keptClass, share} = chooseFixClass(epochs, rules.fix, reason);
  if (keptClass !== null) {
    mark(reason, 'fix class', (i) => epochs.fixClass[i] !== keptClass);
  }
  markLimits(epochs, rules, reason);
  return {
    reason,
    fixClassKept: keptClass === null ? null : (NAME_OF_CLASS.get(keptClass) ?? null),
    fixClassShare: share,
  };
}

/** Counts per reason, without the epochs used and without reasons that did not occur. */
export function countReasons(reason: Uint8Array): Record<string, number> {
  const counts = new Uint32Array(SCREEN_REASONS.length);
  for (let i = 0; i < reason.length; i++) counts[reason[i]!]! += 1;
  const screened: Record<string, number> = {};
  SCREEN_REASONS.forEach((name, code) => {
    if (code > 0 && counts[code]! > 0) screened[name] = counts[code]!;
  });
  return screened;
}

export function countUsed(reason: Uint8Array): number {
  let used = 0;
  for (let i = 0; i < reason.length; i++) if (reason[i] === 0) used++;
  return used;
}

/** Sets the reason of every epoch that is still kept and breaks the rule. */
export function mark(
  reason: Uint8Array,
  name: ScreenReason,
  breaks: (index: number) => boolean,
): void {
  const code = reasonCode(name);
  for (let i = 0; i < reason.length; i++) {
    if (reason[i] === 0 && breaks(i)) reason[i] = code;
  }
}

function markUnusable(epochs: Epochs, rules: ScreenRules, reason: Uint8Array): void {
  const from = rules.fromGpsSeconds ?? Number.NEGATIVE_INFINITY;
  const to = rules.toGpsSeconds ?? Number.POSITIVE_INFINITY;
  mark(
    reason,
    'invalid fix',
    (i) =>
      (epochs.flags[i]! & EpochFlag.invalid) !== 0 ||
      epochs.fixClass[i] === FixClass.none ||
      epochs.fixClass[i] === FixClass.notMeasured,
  );
  mark(reason, 'repeated time', (i) => (epochs.flags[i]! & EpochFlag.repeated) !== 0);
  mark(
    reason,
    'outside time window',
    (i) => epochs.gpsSeconds[i]! < from || epochs.gpsSeconds[i]! > to,
  );
}

function markSettling(epochs: Epochs, settleS: number, reason: Uint8Array): void {
  if (settleS <= 0) return;
  const first = reason.indexOf(0);
  if (first < 0) return;
  const untilS = epochs.gpsSeconds[first]! + settleS;
  mark(reason, 'settling time', (i) => epochs.gpsSeconds[i]! < untilS);
}

/** A class must hold at least this long, and this share of the epochs, to be chosen as the best. */
const CLASS_MIN_DURATION_S = 120;
const CLASS_MIN_SHARE = 0.1;
const BEST_FIRST = [FixClass.fixed, FixClass.float, FixClass.differential, FixClass.autonomous];

function chooseFixClass(
  epochs: Epochs,
  wanted: FixWanted,
  reason: Uint8Array,
): {keptClass: number | null; share: number} {
  const {counts, durationS, total} = classTotals(epochs, reason);
  if (wanted === 'any' || total === 0) return {keptClass: null, share: 1};
  const keptClass = wanted === 'best' ? bestClass(counts, durationS, total) : classOfName(wanted);
  return {keptClass, share: counts[keptClass]! / total};
}

/**
 * The best class in the order fixed, float, differential, autonomous that holds long enough; the
 * commonest when none does. Precise and unknown are classes apart: they are kept when they are the
 * commonest, never preferred or passed over for being better or worse.
 */
function bestClass(counts: Uint32Array, durationS: Float64Array, total: number): number {
  const commonest = counts.indexOf(counts.reduce((most, count) => Math.max(most, count), 0));
  if (commonest === FixClass.precise || commonest === FixClass.unknown) return commonest;
  const best = BEST_FIRST.find(
    (fixClass) =>
      durationS[fixClass]! >= CLASS_MIN_DURATION_S && counts[fixClass]! >= CLASS_MIN_SHARE * total,
  );
  return best ?? commonest;
}

function classTotals(
  epochs: Epochs,
  reason: Uint8Array,
): {counts: Uint32Array; durationS: Float64Array; total: number} {
  const counts = new Uint32Array(8);
  let total = 0;
  for (let i = 0; i < epochs.count; i++) {
    if (reason[i] !== 0) continue;
    counts[epochs.fixClass[i]!]! += 1;
    total++;
  }
  return {counts, durationS: classDurations(epochs, reason), total};
}

/** Time that each class held: the steps from one valid epoch to the next of the same class. */
function classDurations(epochs: Epochs, reason: Uint8Array): Float64Array {
  const durationS = new Float64Array(8);
  const longestStepS = 10 * typicalStepS(epochs, reason);
  let previous = -1;
  for (let i = 0; i < epochs.count; i++) {
    if (reason[i] !== 0) continue;
    if (previous >= 0 && epochs.fixClass[previous] === epochs.fixClass[i]) {
      const stepS = epochs.gpsSeconds[i]! - epochs.gpsSeconds[previous]!;
      if (stepS <= longestStepS) durationS[epochs.fixClass[i]!]! += stepS;
    }
    previous = i;
  }
  return durationS;
}

function typicalStepS(epochs: Epochs, reason: Uint8Array): number {
  const first = reason.indexOf(0);
  const last = reason.lastIndexOf(0);
  const used = countUsed(reason);
  return used < 2 ? 0 : (epochs.gpsSeconds[last]! - epochs.gpsSeconds[first]!) / (used - 1);
}

function classOfName(name: FixClassName): number {
  for (const [fixClass, className] of NAME_OF_CLASS) if (className === name) return fixClass;
  throw new RangeError(`classOfName: unknown fix class ${name}`);
}

function markLimits(epochs: Epochs, rules: ScreenRules, reason: Uint8Array): void {
  const {minSatellites, maxHdop, maxPdop, maxAgeS, maxSigmaM} = rules;
  // A rule about a quantity that the log does not give cannot be met: the epoch is not used.
  if (minSatellites !== null) {
    mark(
      reason,
      'few satellites',
      (i) => epochs.satellites[i] === 255 || epochs.satellites[i]! < minSatellites,
    );
  }
  if (maxHdop !== null) mark(reason, 'hdop', (i) => !(epochs.hdop[i]! <= maxHdop));
  if (maxPdop !== null) mark(reason, 'pdop', (i) => !(epochs.pdop[i]! <= maxPdop));
  if (maxAgeS !== null) {
    mark(reason, 'correction age', (i) => !(epochs.correctionAgeS[i]! <= maxAgeS));
  }
  if (maxSigmaM !== null) {
    mark(
      reason,
      'receiver sigma',
      (i) => !(epochs.sigmaEastM[i]! <= maxSigmaM && epochs.sigmaNorthM[i]! <= maxSigmaM),
    );
  }
}
