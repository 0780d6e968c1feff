import type {PerAxis} from '../result.ts';
import {type FiveNumbers, fiveNumbers} from './five-numbers.ts';
import {roundBinS} from './round-steps.ts';

/** One bin that holds epochs used. */
interface TimeBin {
  /** Seconds since the first epoch read. */
  readonly startS: number;
  /** Bins without a hole between them share a run; lines are not drawn from run to run. */
  readonly run: number;
  readonly used: number;
  readonly eastM: FiveNumbers;
  readonly northM: FiveNumbers;
  /** null when an epoch of the bin has no height. */
  readonly upM: FiveNumbers | null;
}

export interface TimeBins {
  readonly binS: number;
  readonly bins: readonly TimeBin[];
  /** Bins in which epochs were left out, with their share of the epochs read there. */
  readonly leftOut: readonly {readonly startS: number; readonly share: number}[];
  /** Five numbers of the whole record, per axis: the frame of the panels. */
  readonly range: PerAxis<{readonly leastM: number; readonly mostM: number} | null>;
}

export interface TimeBinsInput {
  readonly gpsSeconds: Float64Array;
  readonly used: Uint8Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  readonly firstS: number;
  readonly spanS: number;
  readonly intervalS: number;
  readonly bins: number;
}

/** A hole shorter than this many epochs does not break a line of single epochs. */
const INTERVALS_OF_A_HOLE = 10;

export function timeBins(input: TimeBinsInput): TimeBins {
  const {gpsSeconds, used, firstS} = input;
  const binS = roundBinS(input.spanS, input.intervalS, input.bins);
  const holeS = Math.max(binS, INTERVALS_OF_A_HOLE * input.intervalS);
  const scratch = new Float64Array(gpsSeconds.length);
  const bins: TimeBin[] = [];
  const leftOut: {startS: number; share: number}[] = [];
  let run = 0;
  let previousEndS = Number.NEGATIVE_INFINITY;
  for (let from = 0; from < gpsSeconds.length; ) {
    const index = binIndex(gpsSeconds[from]! - firstS, binS);
    let to = from;
    let count = 0;
    while (to < gpsSeconds.length && binIndex(gpsSeconds[to]! - firstS, binS) === index) {
      if (used[to] === 1) count++;
      to++;
    }
    const startS = index * binS;
    if (count < to - from) leftOut.push({startS, share: 1 - count / (to - from)});
    if (count > 0) {
      if (startS - previousEndS >= holeS) run++;
      previousEndS = startS + binS;
      const axis = (valuesM: Float64Array) => axisOfBin(valuesM, used, from, to, scratch);
      bins.push({
        startS,
        run,
        used: count,
        eastM: axis(input.eastM),
        northM: axis(input.northM),
        upM: hasEveryHeight(input.upM, used, from, to) ? axis(input.upM) : null,
      });
    }
    from = to;
  }
  const everyHeight = bins.every((bin) => bin.upM !== null);
  return {
    binS,
    bins: everyHeight ? bins : bins.map((bin) => ({...bin, upM: null})),
    leftOut,
    range: {
      east: rangeOf(bins.map((bin) => bin.eastM)),
      north: rangeOf(bins.map((bin) => bin.northM)),
      up: everyHeight ? rangeOf(bins.flatMap((bin) => bin.upM ?? [])) : null,
    },
  };
}

/** Times that differ from a bin's edge by rounding only belong to the bin that begins there. */
function binIndex(elapsedS: number, binS: number): number {
  return Math.floor(elapsedS / binS + 1e-6);
}

function axisOfBin(
  valuesM: Float64Array,
  used: Uint8Array,
  from: number,
  to: number,
  scratch: Float64Array,
): FiveNumbers {
  let count = 0;
  for (let i = from; i < to; i++) if (used[i] === 1) scratch[count++] = valuesM[i]!;
  return fiveNumbers(scratch.subarray(0, count));
}

function hasEveryHeight(upM: Float64Array, used: Uint8Array, from: number, to: number): boolean {
  for (let i = from; i < to; i++) if (used[i] === 1 && Number.isNaN(upM[i]!)) return false;
  return true;
}

function rangeOf(bins: readonly FiveNumbers[]) {
  if (bins.length === 0) return null;
  let leastM = Number.POSITIVE_INFINITY;
  let mostM = Number.NEGATIVE_INFINITY;
  for (const {least, most} of bins) {
    leastM = Math.min(leastM, least);
    mostM = Math.max(mostM, most);
  }
  return {leastM, mostM};
}
