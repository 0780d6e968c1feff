import {describe, expect, test} from 'vitest';
import {parseAngle} from '../../src/geodesy/angle.ts';
import {ellipsoid, GRS80, WGS84} from '../../src/geodesy/ellipsoid.ts';
import {
  type TransverseMercatorGrid,
  transverseMercator,
  utmGrid,
  utmZoneOf,
} from '../../src/geodesy/transverse-mercator.ts';
import {readReference} from '../reference/read.ts';
import {randomFrom} from '../simulate/random.ts';

interface ExactRow {
  readonly lat: string;
  readonly lon: string;
  readonly zone: number;
  readonly hemisphere: 'N' | 'S';
  readonly easting: string;
  readonly northing: string;
  readonly convergence_deg: string;
  readonly point_scale: string;
}
interface GridRow {
  readonly lon: number;
  readonly lat: number;
  readonly easting: number;
  readonly northing: number;
}
interface PublishedPoint {
  readonly lat_dms: string;
  readonly lon_dms: string;
  readonly easting: string;
  readonly northing: string;
}
interface ExactFile {
  readonly rows: readonly ExactRow[];
  readonly published_points: readonly [
    PublishedPoint & {lat: string; lon: string; point_scale: string; convergence_deg: string},
    {flinders_peak: PublishedPoint; buninyong: PublishedPoint},
    PublishedPoint,
  ];
}
const exact = readReference<ExactFile>('transverse-mercator-exact');

const AIRY_1830 = ellipsoid(6_377_563.396, 299.3249646, 'Airy 1830');
const BRITISH_GRID: TransverseMercatorGrid = {
  ellipsoid: AIRY_1830,
  originLatitudeDeg: 49,
  centralMeridianDeg: -2,
  scaleAtOrigin: 0.9996012717,
  falseEastingM: 400_000,
  falseNorthingM: -100_000,
};

function dms(text: string, kind: 'latitude' | 'longitude'): number {
  const parsed = parseAngle(text, kind);
  if (parsed.kind === 'refused') throw new Error(parsed.message);
  return parsed.degrees;
}

describe('transverse Mercator', () => {
  test('reference: 42 UTM points, exact projection: 0.1 mm, 1e-9°, scale 1e-10', () => {
    expect(exact.rows).toHaveLength(42);
    for (const row of exact.rows) {
      const projection = transverseMercator(utmGrid(row));
      const place = {latitudeDeg: Number(row.lat), longitudeDeg: Number(row.lon)};
      const found = projection.forward(place);
      expect(Math.abs(found.eastingM - Number(row.easting))).toBeLessThan(1e-4);
      expect(Math.abs(found.northingM - Number(row.northing))).toBeLessThan(1e-4);
      expect(Math.abs(found.convergenceDeg - Number(row.convergence_deg))).toBeLessThan(1e-9);
      expect(Math.abs(found.pointScale - Number(row.point_scale))).toBeLessThan(1e-10);
      const back = projection.inverse({
        eastingM: Number(row.easting),
        northingM: Number(row.northing),
      });
      expect(Math.abs(back.latitudeDeg - place.latitudeDeg)).toBeLessThan(1e-9);
      expect(Math.abs(back.longitudeDeg - place.longitudeDeg)).toBeLessThan(1e-9);
    }
  });

  test.each([
    ['test5101_part1', {...BRITISH_GRID, ellipsoid: WGS84}, 59],
    ['test5101_part2', utmGrid({zone: 31, hemisphere: 'N'}), 23],
    ['test5101_part3', utmGrid({zone: 54, hemisphere: 'S'}, GRS80), 23],
  ] as const)('reference: IOGP GIGS %s within the published 0.03 m', (part, grid, count) => {
    const {rows} =
      readReference<Record<typeof part, {rows: readonly GridRow[]}>>('iogp-gigs-2011')[part];
    expect(rows).toHaveLength(count);
    const projection = transverseMercator(grid);
    for (const row of rows) {
      const found = projection.forward({latitudeDeg: row.lat, longitudeDeg: row.lon});
      expect(Math.abs(found.eastingM - row.easting)).toBeLessThan(0.03);
      expect(Math.abs(found.northingM - row.northing)).toBeLessThan(0.03);
    }
  });

  test('reference: 109 Australian stations on their grid', () => {
    const {rows} = readReference<{
      rows: readonly (PublishedPoint & {station: string; zone: number})[];
    }>('australian-stations-2018');
    expect(rows).toHaveLength(109);
    const differencesM = rows.map((row) => {
      const projection = transverseMercator(utmGrid({zone: row.zone, hemisphere: 'S'}, GRS80));
      const found = projection.forward({
        latitudeDeg: dms(row.lat_dms, 'latitude'),
        longitudeDeg: dms(row.lon_dms, 'longitude'),
      });
      return Math.max(
        Math.abs(found.eastingM - Number(row.easting)),
        Math.abs(found.northingM - Number(row.northing)),
      );
    });
    // The printed digits, 1e-5″ (0.31 mm) and 0.1 mm, allow 0.2 mm; six northings of the source
    // lie farther off, for PROJ 9.1.1 just as for us (it finds 0.4 mm at most).
    expect(differencesM.filter((differenceM) => differenceM > 2.05e-4)).toHaveLength(6);
    expect(Math.max(...differencesM)).toBeLessThan(4e-4);
  });

  test('reference: IOGP 373-7-2, method 9807', () => {
    // The example prints k0 rounded to 0.9996013, and its results follow from that.
    const projection = transverseMercator({...BRITISH_GRID, scaleAtOrigin: 0.9996013});
    const found = projection.forward({latitudeDeg: 50.5, longitudeDeg: 0.5});
    expect(Math.abs(found.eastingM - 577_274.99)).toBeLessThan(0.005);
    expect(Math.abs(found.northingM - 69_740.5)).toBeLessThan(0.005);
  });

  test('reference: points printed in the Australian and the British manuals', () => {
    const [withFactors, manual, britain] = exact.published_points;
    const zone55 = transverseMercator(utmGrid({zone: 55, hemisphere: 'S'}, GRS80));
    const found = zone55.forward({
      latitudeDeg: Number(withFactors.lat),
      longitudeDeg: Number(withFactors.lon),
    });
    // Latitude and longitude are printed to 1e-5″: half of it is 0.15 mm, and half of 0.1 mm.
    expect(Math.abs(found.eastingM - Number(withFactors.easting))).toBeLessThan(2e-4);
    expect(Math.abs(found.northingM - Number(withFactors.northing))).toBeLessThan(2e-4);
    expect(Math.abs(found.pointScale - Number(withFactors.point_scale))).toBeLessThan(0.5e-8);
    // The Australian manuals give convergence the opposite sign.
    expect(Math.abs(found.convergenceDeg + Number(withFactors.convergence_deg))).toBeLessThan(
      0.6e-10,
    );
    const british = transverseMercator(BRITISH_GRID);
    for (const [projection, point, toleranceM] of [
      // Printed to 1e-4″, 3.1 mm: half of it.
      [zone55, manual.flinders_peak, 1.6e-3],
      [zone55, manual.buninyong, 1.6e-3],
      [british, britain, 2e-3],
    ] as const) {
      const grid = projection.forward({
        latitudeDeg: dms(point.lat_dms, 'latitude'),
        longitudeDeg: dms(point.lon_dms, 'longitude'),
      });
      expect(Math.abs(grid.eastingM - Number(point.easting))).toBeLessThan(toleranceM);
      expect(Math.abs(grid.northingM - Number(point.northing))).toBeLessThan(toleranceM);
    }
  });

  test('property: there and back within 5e-9 m out to 35° from the meridian', () => {
    const random = randomFrom(1, 'transverse Mercator');
    const projection = transverseMercator({...utmGrid({zone: 31, hemisphere: 'N'})});
    for (let i = 0; i < 10_000; i++) {
      const place = {
        latitudeDeg: random.between(-89.9, 89.9),
        longitudeDeg: random.between(-32, 38),
      };
      const back = projection.inverse(projection.forward(place));
      const metresPerDegree = 111_320;
      const cosLat = Math.cos((place.latitudeDeg * Math.PI) / 180);
      expect(Math.abs(back.latitudeDeg - place.latitudeDeg) * metresPerDegree).toBeLessThan(5e-9);
      expect(
        Math.abs(back.longitudeDeg - place.longitudeDeg) * metresPerDegree * cosLat,
      ).toBeLessThan(5e-9);
    }
  });

  test('property: scale and convergence are those of small steps on the ground', () => {
    const random = randomFrom(2, 'transverse Mercator');
    const projection = transverseMercator(BRITISH_GRID);
    const step = 1e-5;
    for (let i = 0; i < 200; i++) {
      const latitudeDeg = random.between(-70, 70);
      const longitudeDeg = random.between(-20, 16);
      const at = projection.forward({latitudeDeg, longitudeDeg});
      const north = projection.forward({latitudeDeg: latitudeDeg + step, longitudeDeg});
      const south = projection.forward({latitudeDeg: latitudeDeg - step, longitudeDeg});
      const bearingDeg =
        (Math.atan2(north.eastingM - south.eastingM, north.northingM - south.northingM) * 180) /
        Math.PI;
      // The meridian's grid bearing is minus the bearing of grid north.
      expect(Math.abs(bearingDeg + at.convergenceDeg)).toBeLessThan(2e-7);
    }
  });

  test('points that the grid cannot hold are refused', () => {
    const projection = transverseMercator(utmGrid({zone: 31, hemisphere: 'N'}));
    expect(() => projection.forward({latitudeDeg: 0, longitudeDeg: 70})).toThrow(RangeError);
    expect(() => projection.forward({latitudeDeg: Number.NaN, longitudeDeg: 0})).toThrow(
      RangeError,
    );
    expect(() => projection.inverse({eastingM: 5e7, northingM: 0})).toThrow(RangeError);
    expect(() => projection.inverse({eastingM: 5e5, northingM: 2e7})).toThrow(RangeError);
    expect(() => utmGrid({zone: 61, hemisphere: 'N'})).toThrow(RangeError);
  });

  test('the pole is a point of every grid', () => {
    const found = transverseMercator(utmGrid({zone: 31, hemisphere: 'N'})).forward({
      latitudeDeg: 90,
      longitudeDeg: 3,
    });
    // 0.9996 of the meridian quadrant of WGS 84, 10,001,965.7293 m (ellipsoid-constants).
    expect(found.northingM).toBeCloseTo(0.9996 * 10_001_965.729_312_72, 6);
    expect(found.eastingM).toBeCloseTo(500_000, 6);
  });
});

describe('UTM zones', () => {
  test('reference: regular zones and the exceptions of NGA.SIG.0012 (from memory)', () => {
    expect(utmZoneOf({latitudeDeg: 50, longitudeDeg: 10})).toEqual({zone: 32, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: -33, longitudeDeg: 151})).toEqual({zone: 56, hemisphere: 'S'});
    expect(utmZoneOf({latitudeDeg: 0, longitudeDeg: -180})).toEqual({zone: 1, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 0, longitudeDeg: 179.99})).toEqual({zone: 60, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 60, longitudeDeg: 5})).toEqual({zone: 32, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 60, longitudeDeg: 2})).toEqual({zone: 31, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 78, longitudeDeg: 8})).toEqual({zone: 31, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 78, longitudeDeg: 15})).toEqual({zone: 33, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 78, longitudeDeg: 22})).toEqual({zone: 35, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 78, longitudeDeg: 35})).toEqual({zone: 37, hemisphere: 'N'});
    expect(utmZoneOf({latitudeDeg: 85, longitudeDeg: 0})).toBeUndefined();
    expect(utmZoneOf({latitudeDeg: -81, longitudeDeg: 0})).toBeUndefined();
  });
});
