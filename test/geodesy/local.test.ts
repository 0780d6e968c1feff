import {describe, expect, test} from 'vitest';
import {GRS80, WGS84} from '../../src/geodesy/ellipsoid.ts';
import {ecefFromGeodetic} from '../../src/geodesy/geocentric.ts';
import {
  ecefFromEnu,
  enuColumns,
  enuFromEcef,
  enuFromGeodetic,
  geodeticFromEnu,
  localFrame,
  localFrameAtEcef,
} from '../../src/geodesy/local.ts';
import {readReference} from '../reference/read.ts';
import {randomFrom} from '../simulate/random.ts';

type Row = Readonly<
  Record<'lat0' | 'lon0' | 'h0' | 'lat' | 'lon' | 'h' | 'x' | 'y' | 'z' | 'e' | 'n' | 'u', string>
>;
const {rows} = readReference<{rows: readonly Row[]}>('local-80-digits');

function frameOf(row: Row) {
  return localFrame(
    {
      latitudeDeg: Number(row.lat0),
      longitudeDeg: Number(row.lon0),
      ellipsoidalHeightM: Number(row.h0),
    },
    WGS84,
  );
}

function targetOf(row: Row) {
  return {
    latitudeDeg: Number(row.lat),
    longitudeDeg: Number(row.lon),
    ellipsoidalHeightM: Number(row.h),
  };
}

function distanceM(found: {eastM: number; northM: number; upM: number}, row: Row): number {
  return Math.hypot(
    found.eastM - Number(row.e),
    found.northM - Number(row.n),
    found.upM - Number(row.u),
  );
}

describe('east, north, up', () => {
  test('reference: 72 vectors of 1 mm to 500 km at 12 origins, mpmath at 80 digits', () => {
    expect(rows).toHaveLength(72);
    for (const row of rows) {
      const frame = frameOf(row);
      const target = targetOf(row);
      expect(distanceM(enuFromGeodetic(target, frame), row)).toBeLessThan(3e-9);
      const ecef = ecefFromGeodetic(target, WGS84);
      expect(distanceM(enuFromEcef(ecef, frame), row)).toBeLessThan(3e-9);
    }
  });

  test('reference: IOGP 373-7-2, methods 9836 and 9837', () => {
    const frame = localFrame({latitudeDeg: 55, longitudeDeg: 5, ellipsoidalHeightM: 200}, WGS84);
    const target = {
      latitudeDeg: 53 + 48 / 60 + 33.82 / 3600,
      longitudeDeg: 2 + 7 / 60 + 46.38 / 3600,
      ellipsoidalHeightM: 73,
    };
    const published = {eastM: -189_013.869, northM: -128_642.04, upM: -4220.171};
    const geodetic = enuFromGeodetic(target, frame);
    const geocentric = enuFromEcef(
      {xM: 3_771_793.968, yM: 140_253.342, zM: 5_124_304.349},
      localFrameAtEcef({xM: 3_652_755.3058, yM: 319_574.6799, zM: 5_201_547.3536}, WGS84),
    );
    for (const axis of ['eastM', 'northM', 'upM'] as const) {
      expect(Math.abs(geodetic[axis] - published[axis])).toBeLessThan(0.0005);
      expect(Math.abs(geocentric[axis] - published[axis])).toBeLessThan(0.0005);
    }
  });

  test('property: columns agree with the geocentric route and return, any place and distance', () => {
    const random = randomFrom(1, 'local frames');
    for (let i = 0; i < 2000; i++) {
      const frame = localFrame(
        {
          latitudeDeg: random.between(-90, 90),
          longitudeDeg: random.between(-180, 180),
          ellipsoidalHeightM: random.between(-400, 9000),
        },
        GRS80,
      );
      const spread = 10 ** random.between(-8, 2);
      const target = {
        latitudeDeg: Math.max(
          -90,
          Math.min(90, frame.origin.latitudeDeg + random.normal() * spread),
        ),
        longitudeDeg: frame.origin.longitudeDeg + random.normal() * spread,
        ellipsoidalHeightM: random.between(-400, 9000),
      };
      const direct = enuFromGeodetic(target, frame);
      const ecef = ecefFromGeodetic(target, GRS80);
      const geocentric = enuFromEcef(ecef, frame);
      expect(Math.abs(direct.eastM - geocentric.eastM)).toBeLessThan(6e-9);
      expect(Math.abs(direct.northM - geocentric.northM)).toBeLessThan(6e-9);
      expect(Math.abs(direct.upM - geocentric.upM)).toBeLessThan(6e-9);
      const back = ecefFromEnu(direct, frame);
      const missM = Math.hypot(back.xM - ecef.xM, back.yM - ecef.yM, back.zM - ecef.zM);
      expect(missM).toBeLessThan(8e-9);
    }
  });

  test('property: across the date line and at the origin itself', () => {
    const frame = localFrame(
      {latitudeDeg: -17, longitudeDeg: 179.9999, ellipsoidalHeightM: 5},
      WGS84,
    );
    const east = enuFromGeodetic(
      {latitudeDeg: -17, longitudeDeg: -179.9999, ellipsoidalHeightM: 5},
      frame,
    );
    expect(east.eastM).toBeGreaterThan(21);
    expect(east.eastM).toBeLessThan(22);
    expect(enuFromGeodetic(frame.origin, frame)).toEqual({eastM: 0, northM: 0, upM: 0});
    const back = geodeticFromEnu(east, frame);
    expect(back.longitudeDeg).toBeCloseTo(-179.9999, 12);
  });

  test('a plan position without height stands at the height of the origin', () => {
    const frame = localFrame({latitudeDeg: 50, longitudeDeg: 10, ellipsoidalHeightM: 300}, WGS84);
    const columns = enuColumns(
      {
        latitudeDeg: Float64Array.of(50.001, 50.001, Number.NaN),
        longitudeDeg: Float64Array.of(10.001, 10.001, 10),
        ellipsoidalHeightM: Float64Array.of(300, Number.NaN, 300),
      },
      frame,
    );
    expect(columns.eastM[1]).toBe(columns.eastM[0]);
    expect(columns.northM[1]).toBe(columns.northM[0]);
    expect(columns.upM[1]).toBeNaN();
    expect(columns.northM[2]).toBeNaN();
    expect(() =>
      localFrame({latitudeDeg: 50, longitudeDeg: 10, ellipsoidalHeightM: Number.NaN}, WGS84),
    ).toThrow(RangeError);
  });
});
