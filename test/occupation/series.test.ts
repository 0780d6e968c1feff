import {describe, expect, test} from 'vitest';
import {type SampleSpec, STILL_HOUR, sample} from '../report/fixtures.ts';

/* The whole digest, on invented records; its parts are tested beside it. */

function seriesOf(change: Partial<SampleSpec>) {
  return sample({...STILL_HOUR, ...change}).series;
}

describe('buildSeries', () => {
  test('property: sizes do not follow the number of epochs', () => {
    const hour = JSON.stringify(seriesOf({})).length;
    const day = JSON.stringify(seriesOf({seconds: 86_400, intervalS: 0.5})).length;
    expect(day).toBeLessThan(1.5 * hour);
  });

  test('property: every epoch used is counted once in each part', () => {
    const {result, series} = sample(STILL_HOUR);
    const total = (counts: readonly number[]) => counts.reduce((a, b) => a + b, 0);
    const used = result.epochs.used;
    expect(total(series.plan!.count) + series.plan!.outside).toBe(used);
    for (const axis of ['east', 'north', 'up'] as const) {
      const histogram = series.histograms[axis]!;
      expect(total(histogram.counts) + histogram.outside).toBe(used);
    }
    for (const bins of [series.overTime!.wide, series.overTime!.narrow]) {
      expect(total(bins.bins.map((bin) => bin.used))).toBe(used);
    }
  });

  test('each part has the mean of its own epochs', () => {
    const whole = seriesOf({});
    expect(whole.parts).toHaveLength(1);
    expect(whole.parts[0]!.meanM.east).toBeCloseTo(whole.histograms.east!.meanM, 9);
    expect(whole.parts[0]!.meanM.up).toBeCloseTo(whole.histograms.up!.meanM, 9);
    const [before, after] = seriesOf({stepM: 0.3, slowM: 0, whiteM: 0.001}).parts;
    expect(before!.toS).toBeLessThan(after!.fromS);
    const apart = Math.hypot(
      after!.meanM.east! - before!.meanM.east!,
      after!.meanM.north! - before!.meanM.north!,
      after!.meanM.up! - before!.meanM.up!,
    );
    expect(apart).toBeGreaterThan(0.2);
  });

  test('times count from the first epoch read, whether it is used or not', () => {
    const whole = seriesOf({});
    const rest = seriesOf({leftOut: 2});
    expect(whole.startUtc).toMatch(/^2026-.*Z$/);
    expect(rest.startUtc).toBe(whole.startUtc);
    expect(rest.spanS).toBe(whole.spanS);
  });

  test('a record without heights has no up, anywhere', () => {
    const series = seriesOf({heights: false});
    expect(series.histograms.up).toBeNull();
    expect(series.overTime!.wide.range.up).toBeNull();
    expect(series.overTime!.wide.bins.every((bin) => bin.upM === null)).toBe(true);
    expect(series.settling!.meanM.up).toBeNull();
    expect(series.settling!.secondHalfM.up).toBeNull();
    expect(series.autocorrelation!.value.up).toBeNull();
  });

  test('a record of which nothing is used has no figure about positions', () => {
    const series = seriesOf({leftOut: 2});
    expect(series).toMatchObject({
      plan: null,
      overTime: null,
      histograms: {east: null, north: null, up: null},
      settling: null,
      autocorrelation: null,
    });
    expect(series.signal).not.toBeNull();
  });

  test('a bare table has neither sky nor signal', () => {
    const series = seriesOf({satellites: false, quality: false});
    expect(series.sky).toBeNull();
    expect(series.signal).toBeNull();
  });

  test('short records keep paths of satellites, long ones cells with a horizon', () => {
    const short = seriesOf({}).sky!;
    expect(short.kind).toBe('tracks');
    const long = seriesOf({seconds: 86_400, intervalS: 30}).sky!;
    if (long.kind !== 'cells') throw new Error('a day of tracks is a hairball');
    // The samples have a shadow to 33 degrees, 28 degrees to either side of north.
    const north = long.horizon.filter(({azimuthDeg}) => azimuthDeg < 20 || azimuthDeg > 340);
    for (const {elevationDeg} of north) expect(elevationDeg ?? 90).toBeGreaterThanOrEqual(33);
    const south = long.horizon.find(({azimuthDeg}) => azimuthDeg > 175 && azimuthDeg < 190);
    expect(south!.elevationDeg!).toBeLessThan(15);
    expect(long.systems.map(({name}) => name)).toContain('Galileo');
  });
});
