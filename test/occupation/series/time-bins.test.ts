import {describe, expect, test} from 'vitest';
import {fiveNumbers} from '../../../src/occupation/series/five-numbers.ts';
import {
  roundBinS,
  roundStepAbove,
  widthOfWholeSteps,
} from '../../../src/occupation/series/round-steps.ts';
import {timeBins} from '../../../src/occupation/series/time-bins.ts';

function binned(gpsSeconds: number[], eastM: number[], used: number[], bins = 10) {
  const east = Float64Array.from(eastM);
  const first = gpsSeconds[0] ?? 0;
  return timeBins({
    gpsSeconds: Float64Array.from(gpsSeconds),
    used: Uint8Array.from(used),
    eastM: east,
    northM: east,
    upM: east,
    firstS: first,
    spanS: (gpsSeconds.at(-1) ?? 0) - first,
    intervalS: 1,
    bins,
  });
}

describe('timeBins', () => {
  const times = Array.from({length: 100}, (_, i) => 1000 + i);

  test('each bin keeps its extremes, and the range those of the record', () => {
    const values = times.map((_, i) => (i === 42 ? 9 : i === 43 ? -9 : 0));
    const {bins, binS, range} = binned(
      times,
      values,
      times.map(() => 1),
    );
    expect(binS).toBe(10);
    expect(bins).toHaveLength(10);
    expect(bins[4]!.eastM).toMatchObject({least: -9, median: 0, most: 9});
    expect(range.east).toEqual({leastM: -9, mostM: 9});
  });

  test('what is left out is counted by its share and kept out of the numbers', () => {
    const values = times.map((_, i) => (i % 10 === 0 ? 100 : 1));
    const {bins, leftOut, range} = binned(
      times,
      values,
      times.map((_, i) => (i % 10 === 0 ? 0 : 1)),
    );
    expect(leftOut).toHaveLength(10);
    for (const {share} of leftOut) expect(share).toBeCloseTo(0.1, 12);
    expect(range.east).toEqual({leastM: 1, mostM: 1});
    expect(bins.every((bin) => bin.used === 9)).toBe(true);
  });

  test('a hole of a bin breaks the line, a missing epoch does not', () => {
    const holed = times.filter((t) => t < 1030 || t >= 1060);
    const broken = binned(
      holed,
      holed.map(() => 0),
      holed.map(() => 1),
    );
    expect(new Set(broken.bins.map(({run}) => run)).size).toBe(2);
    const nearly = times.filter((t) => t !== 1050);
    const whole = binned(
      nearly,
      nearly.map(() => 0),
      nearly.map(() => 1),
      200,
    );
    expect(new Set(whole.bins.map(({run}) => run)).size).toBe(1);
  });

  test('heights missing once are missing altogether', () => {
    const east = Float64Array.from(times, () => 0);
    const up = Float64Array.from(times, (_, i) => (i === 5 ? Number.NaN : 0));
    const {bins, range} = timeBins({
      gpsSeconds: Float64Array.from(times),
      used: new Uint8Array(100).fill(1),
      eastM: east,
      northM: east,
      upM: up,
      firstS: 1000,
      spanS: 99,
      intervalS: 1,
      bins: 10,
    });
    expect(range.up).toBeNull();
    expect(bins.every((bin) => bin.upM === null)).toBe(true);
  });
});

describe('the helpers of bins', () => {
  test('reference: Hyndman & Fan (1996), type 7, as R gives quantile(1:10)', () => {
    // R: quantile(1:10, c(.05, .5, .95)) is 1.45 5.50 9.55.
    const five = fiveNumbers(Float64Array.from([10, 9, 8, 7, 6, 5, 4, 3, 2, 1]));
    expect(five).toMatchObject({least: 1, median: 5.5, most: 10});
    expect(five.p5).toBeCloseTo(1.45, 12);
    expect(five.p95).toBeCloseTo(9.55, 12);
  });

  test('steps are 1, 2, 5 and not below what was asked', () => {
    const steps = [0.0011, 0.002, 0.0021, 0.3, 7].map((value) =>
      Number(roundStepAbove(value).toPrecision(6)),
    );
    expect(steps).toEqual([0.002, 0.002, 0.005, 0.5, 10]);
  });

  test('cells of a coarse log hold whole steps', () => {
    expect(widthOfWholeSteps(0.001, null)).toBe(0.001);
    expect(widthOfWholeSteps(0.001, 0.00001)).toBe(0.001);
    expect(widthOfWholeSteps(0.002, 0.0018) / 0.0018).toBeCloseTo(1, 12);
    expect(widthOfWholeSteps(0.005, 0.0018) / 0.0018).toBeCloseTo(3, 12);
    expect(widthOfWholeSteps(0.001, 0.0185)).toBe(0.0185);
  });

  test('bins are round durations, no shorter than the interval, no more than asked for', () => {
    expect(roundBinS(86_400, 1, 360)).toBe(240);
    expect(roundBinS(180, 1, 360)).toBe(1);
    expect(roundBinS(180, 30, 360)).toBe(30);
    expect(roundBinS(400 * 86_400, 1, 100)).toBe(4 * 86_400);
  });
});
