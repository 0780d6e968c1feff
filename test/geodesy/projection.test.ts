import {describe, expect, test} from 'vitest';
import {UsageError} from '../../src/errors.ts';
import {GRS80, meridianRadiusM, primeVerticalRadiusM, WGS84} from '../../src/geodesy/ellipsoid.ts';
import {
  axisValuesFromEastNorth,
  eastNorthFromAxisValues,
  parseGrid,
} from '../../src/geodesy/grid-definition.ts';
import {projectionOf} from '../../src/geodesy/projection.ts';
import {readReference} from '../reference/read.ts';

interface Point {
  readonly lon: number;
  readonly lat: number;
  readonly x: number;
  readonly y: number;
  readonly convergence: number;
  readonly h: number;
  readonly k: number;
}
interface Reference {
  readonly rows: readonly {
    readonly name: string;
    readonly definition: string;
    readonly points: readonly Point[];
  }[];
  readonly epsg: readonly (readonly [
    code: number,
    lat: number,
    lon: number,
    easting: number,
    northing: number,
  ])[];
}
const reference = readReference<Reference>('map-projections');
const ANYWHERE = {place: null, ellipsoid: GRS80};

/** 25 projections of 12 points each. */
const CASES = reference.rows.map((row) => [row.name, row] as const);

describe('map projections', () => {
  test('there are 25 of them', () => {
    expect(CASES).toHaveLength(25);
    expect(CASES.every(([, row]) => row.points.length === 12)).toBe(true);
  });

  test.each(CASES)('reference: %s, PROJ 9.1.1, within 0.1 mm there and back', (_name, row) => {
    const definition = parseGrid(row.definition, ANYWHERE);
    const projection = projectionOf(definition);
    for (const point of row.points) {
      const place = {latitudeDeg: point.lat, longitudeDeg: point.lon};
      const found = projection.forward(place);
      const [x, y] = axisValuesFromEastNorth(definition, found);
      expect(Math.abs(x - point.x) * definition.unit.lengthM).toBeLessThan(1e-4);
      expect(Math.abs(y - point.y) * definition.unit.lengthM).toBeLessThan(1e-4);
      const back = projection.inverse(eastNorthFromAxisValues(definition, [point.x, point.y]));
      const northM =
        (back.latitudeDeg - point.lat) *
        (Math.PI / 180) *
        meridianRadiusM(place, definition.ellipsoid);
      const eastM =
        (back.longitudeDeg - point.lon) *
        (Math.PI / 180) *
        primeVerticalRadiusM(place, definition.ellipsoid) *
        Math.cos((point.lat * Math.PI) / 180);
      expect(Math.hypot(northM, eastM)).toBeLessThan(1e-4);
    }
  });

  test.each(CASES)('reference: %s, convergence and scales of PROJ 9.1.1', (_name, row) => {
    const projection = projectionOf(parseGrid(row.definition, ANYWHERE));
    for (const point of row.points) {
      const found = projection.factors({latitudeDeg: point.lat, longitudeDeg: point.lon});
      // Both sides differentiate numerically; PROJ itself keeps 2e-10° and 1e-10 at UTM points.
      expect(Math.abs(found.convergenceDeg - point.convergence)).toBeLessThan(1e-8);
      expect(Math.abs(found.meridianScale / point.h - 1)).toBeLessThan(1e-9);
      expect(Math.abs(found.parallelScale / point.k - 1)).toBeLessThan(1e-9);
      if (Math.abs(point.h - point.k) < 1e-9) {
        expect(Math.abs((found.pointScale ?? Number.NaN) / point.h - 1)).toBeLessThan(1e-9);
      }
    }
  });

  test('projections that are not conformal have no point scale', () => {
    const conformal = CASES.filter(([, row]) => {
      const projection = projectionOf(parseGrid(row.definition, ANYWHERE));
      const {lat, lon} = row.points[0]!;
      return projection.factors({latitudeDeg: lat, longitudeDeg: lon}).pointScale !== undefined;
    });
    const others = CASES.filter((row) => !conformal.includes(row)).map(([name]) => name);
    expect(others).toEqual([
      'LAEA Europe (EPSG:3035)',
      'Albers (EPSG:3577)',
      'Cassini (EPSG:2314-like)',
      'Polyconic (EPSG:5880)',
    ]);
  });

  test('reference: EPSG codes of UTM families and national grids, PROJ 9.1.1, within 0.1 mm', () => {
    expect(reference.epsg).toHaveLength(225);
    for (const [code, latitudeDeg, longitudeDeg, eastingM, northingM] of reference.epsg) {
      const definition = parseGrid(`EPSG:${code}`, {place: null, ellipsoid: WGS84});
      const found = projectionOf(definition).forward({latitudeDeg, longitudeDeg});
      expect(Math.abs(found.eastingM - eastingM), `EPSG:${code}`).toBeLessThan(1e-4);
      expect(Math.abs(found.northingM - northingM), `EPSG:${code}`).toBeLessThan(1e-4);
    }
  });

  test('places that a grid cannot hold are refused by name, never answered with NaN', () => {
    const utm = projectionOf(parseGrid('UTM 32N', ANYWHERE));
    expect(() => utm.forward({latitudeDeg: 0, longitudeDeg: 100})).toThrow(
      /UTM zone 32N cannot hold this position/,
    );
    const lambert = projectionOf(parseGrid('EPSG:2154', ANYWHERE));
    expect(() => lambert.forward({latitudeDeg: Number.NaN, longitudeDeg: 3})).toThrow(UsageError);
    expect(() => lambert.forward({latitudeDeg: -90, longitudeDeg: 3})).toThrow(UsageError);
    expect(() => lambert.inverse({eastingM: Number.NaN, northingM: 0})).toThrow(UsageError);
  });
});
