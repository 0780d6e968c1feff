import type {Epochs, Satellites} from '../../epochs/epochs.ts';
import {type FiveNumbers, fiveNumbers} from './five-numbers.ts';
import {roundBinS} from './round-steps.ts';
import {levelAt} from './sky.ts';

/** One bin of the record's own account of its signals; null where it says nothing. */
export interface SignalBin {
  readonly startS: number;
  readonly run: number;
  readonly carrierToNoiseDbHz: {
    readonly p5: number;
    readonly median: number;
    readonly p95: number;
  } | null;
  readonly satellites: FiveNumbers | null;
  readonly hdop: FiveNumbers | null;
  readonly correctionAgeS: FiveNumbers | null;
}

export interface SignalBins {
  readonly binS: number;
  readonly bins: readonly SignalBin[];
  readonly has: {
    readonly carrierToNoise: boolean;
    readonly satellites: boolean;
    readonly hdop: boolean;
    readonly correctionAge: boolean;
  };
}

export interface SignalBinsInput {
  readonly epochs: Epochs;
  readonly satellites: Satellites;
  readonly firstS: number;
  readonly spanS: number;
  readonly intervalS: number;
  readonly bins: number;
}

const SATELLITES_NOT_GIVEN = 255;
const HIGHEST_DB_HZ = 63;
/** Satellites are sampled about every 30 s: shorter bins would be empty by turns. */
const SATELLITE_SAMPLE_S = 30;

/** null when the record says nothing about satellites, signals, geometry or corrections. */
export function signalBins(input: SignalBinsInput): SignalBins | null {
  const {epochs, satellites, firstS} = input;
  const leastS = satellites.count > 0 ? SATELLITE_SAMPLE_S : 0;
  const binS = roundBinS(input.spanS, Math.max(input.intervalS, leastS), input.bins);
  const strengths = strengthsPerBin(input, binS);
  const scratch = new Float64Array(epochs.count);
  const bins: SignalBin[] = [];
  let run = 0;
  let previous = Number.NEGATIVE_INFINITY;
  for (let from = 0; from < epochs.count; ) {
    const index = binIndex(epochs.gpsSeconds[from]! - firstS, binS);
    let to = from;
    while (to < epochs.count && binIndex(epochs.gpsSeconds[to]! - firstS, binS) === index) to++;
    if (index - previous > 1) run++;
    previous = index;
    const numbers = (values: Float32Array | Uint8Array) => given(values, from, to, scratch);
    bins.push({
      startS: index * binS,
      run,
      carrierToNoiseDbHz: strengths.get(index) ?? null,
      satellites: numbers(epochs.satellites),
      hdop: numbers(epochs.hdop),
      correctionAgeS: numbers(epochs.correctionAgeS),
    });
    from = to;
  }
  const has = {
    carrierToNoise: bins.some((bin) => bin.carrierToNoiseDbHz !== null),
    satellites: bins.some((bin) => bin.satellites !== null),
    hdop: bins.some((bin) => bin.hdop !== null),
    correctionAge: bins.some((bin) => bin.correctionAgeS !== null),
  };
  return Object.values(has).includes(true) ? {binS, bins, has} : null;
}

function binIndex(elapsedS: number, binS: number): number {
  return Math.floor(elapsedS / binS + 1e-6);
}

function given(
  values: Float32Array | Uint8Array,
  from: number,
  to: number,
  scratch: Float64Array,
): FiveNumbers | null {
  const absent = values instanceof Uint8Array ? SATELLITES_NOT_GIVEN : Number.NaN;
  let count = 0;
  for (let i = from; i < to; i++) {
    const value = values[i]!;
    if (value !== absent && !Number.isNaN(value)) scratch[count++] = value;
  }
  return count === 0 ? null : fiveNumbers(scratch.subarray(0, count));
}

function strengthsPerBin({satellites, firstS}: SignalBinsInput, binS: number) {
  const histograms = new Map<number, Uint32Array>();
  for (let i = 0; i < satellites.count; i++) {
    const strength = satellites.carrierToNoiseDbHz[i]!;
    if (!(strength > 0)) continue;
    const index = binIndex(satellites.gpsSeconds[i]! - firstS, binS);
    const counts = histograms.get(index) ?? new Uint32Array(HIGHEST_DB_HZ + 1);
    counts[Math.min(HIGHEST_DB_HZ, Math.round(strength))]!++;
    histograms.set(index, counts);
  }
  return new Map(
    [...histograms].map(([index, counts]) => [
      index,
      {p5: levelAt(counts, 0.05)!, median: levelAt(counts, 0.5)!, p95: levelAt(counts, 0.95)!},
    ]),
  );
}
