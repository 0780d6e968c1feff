import {describe, expect, test} from 'vitest';
import {resultGeoJson} from '../../src/exports/geojson.ts';
import type {Result} from '../../src/occupation/result.ts';
import {DAY_WITH_JUMP, FLOAT_MINUTES, HEIGHT_BLUNDER, STILL_HOUR} from '../report/fixtures.ts';
import {invented, reducedSample} from './samples.ts';

interface Feature {
  readonly type: string;
  readonly geometry: {readonly type: string; readonly coordinates: unknown};
  readonly properties: Readonly<Record<string, unknown>>;
}

function featuresOf(result: Result): Feature[] {
  const text = resultGeoJson(result);
  const collection = JSON.parse(text) as {type: string; features: Feature[]};
  expect(collection.type).toBe('FeatureCollection');
  collection.features.forEach(requireFeature);
  expect(text).not.toContain('-0,');
  return collection.features;
}

/** RFC 7946, sections 3.1 and 3.2: what a feature and its geometry must look like. */
function requireFeature({type, geometry, properties}: Feature): void {
  expect(type).toBe('Feature');
  expect(typeof properties).toBe('object');
  switch (geometry.type) {
    case 'Point':
      requirePosition(geometry.coordinates);
      return;
    case 'LineString': {
      const line = geometry.coordinates as unknown[];
      expect(line.length).toBeGreaterThanOrEqual(2);
      line.forEach(requirePosition);
      return;
    }
    case 'Polygon': {
      const [ring, ...holes] = geometry.coordinates as number[][][];
      expect(holes).toEqual([]);
      expect(ring?.length).toBeGreaterThanOrEqual(4);
      ring?.forEach(requirePosition);
      expect(ring?.[ring.length - 1]).toEqual(ring?.[0]);
      expect(twiceArea(ring ?? [])).toBeGreaterThan(0);
      return;
    }
    default:
      throw new Error(`unknown geometry ${geometry.type}`);
  }
}

function requirePosition(position: unknown): void {
  const numbers = position as number[];
  expect([2, 3]).toContain(numbers.length);
  expect(numbers.every(Number.isFinite)).toBe(true);
  expect(Math.abs(numbers[0] ?? 999)).toBeLessThanOrEqual(180);
  expect(Math.abs(numbers[1] ?? 999)).toBeLessThanOrEqual(90);
}

/** Positive for a ring that runs anticlockwise, as section 3.1.6 asks of an outer ring. */
function twiceArea(ring: readonly number[][]): number {
  const [x0 = 0, y0 = 0] = ring[0] ?? [];
  let sum = 0;
  for (let k = 1; k < ring.length; k += 1) {
    const [ax = 0, ay = 0] = ring[k - 1] ?? [];
    const [bx = 0, by = 0] = ring[k] ?? [];
    sum += (ax - x0) * (by - y0) - (bx - x0) * (ay - y0);
  }
  return sum;
}

function expectedName(mark: string, {position}: Result): string {
  return position?.of === 'mark' ? mark : `${mark} (${position?.of})`;
}

const kindsOf = (features: readonly Feature[]) => features.map(({properties}) => properties.kind);

describe('resultGeoJson', () => {
  test('position, ellipse, line and mark; longitude first', () => {
    const result = invented(STILL_HOUR);
    const features = featuresOf(result);
    expect(kindsOf(features)).toEqual(['position', 'ellipse', 'offset', 'mark']);
    const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = result.position!.geodetic;
    const [lon, lat, height] = features[0]!.geometry.coordinates as number[];
    expect(lon).toBeCloseTo(longitudeDeg, 9);
    expect(lat).toBeCloseTo(latitudeDeg, 9);
    expect(height).toBeCloseTo(ellipsoidalHeightM!, 3);
  });

  test.each([
    ['a jump', DAY_WITH_JUMP],
    ['minutes in float', FLOAT_MINUTES],
    ['a blunder', HEIGHT_BLUNDER],
  ])('%s: every feature keeps to the standard', (_, spec) => {
    const result = invented({...spec, seconds: Math.min(spec.seconds, 7200)});
    const features = featuresOf(result);
    const positions = kindsOf(features).filter((kind) => kind === 'position').length;
    expect(positions).toBe(result.position === null ? result.segments.length : 1);
  });

  test('without a height a position has two coordinates', () => {
    const [position] = featuresOf(invented({...STILL_HOUR, heights: false}));
    expect(position?.geometry.coordinates).toHaveLength(2);
  });

  test('frame, epoch, cautions and the remark on the datum travel with the position', () => {
    const {result} = reducedSample({
      name: 'chapel-ecef.csv',
      mark: 'CHAPEL',
      frame: 'ITRF2020',
      maxLines: 900,
    }).reduced;
    const [position] = featuresOf(result);
    expect(position?.properties).toMatchObject({frame: 'ITRF2020', coordinateEpoch: 2025});
    expect(position?.properties.coordinatesRemark).toMatch(
      /^The coordinates are in ITRF2020 at epoch 2025 and were not transformed/,
    );
    const cautions = position?.properties.cautions as string[];
    const serious = result.notices.filter(
      ({severity}) => severity === 'caution' || severity === 'concern',
    );
    expect(cautions).toEqual(expect.arrayContaining(serious.map(({text}) => text)));
  });

  test('hostile names stay text', () => {
    const name = '</script>"\\\u0000\u2028{{x}}';
    const result = invented({...STILL_HOUR, names: {mark: name, file: name}});
    expect(featuresOf(result)[0]?.properties.name).toBe(expectedName(name, result));
  });

  test('without a position there are cautions and no feature but the mark', () => {
    const still = invented(STILL_HOUR);
    const features = featuresOf({...still, position: null, segments: []});
    expect(kindsOf(features)).toEqual(['mark']);
    expect(featuresOf({...still, position: null, segments: [], reference: null})).toEqual([]);
  });

  test('golden: the same result gives the same bytes', () => {
    expect(resultGeoJson(invented(STILL_HOUR))).toBe(resultGeoJson(invented(STILL_HOUR)));
  });
});
