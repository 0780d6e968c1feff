import {describe, expect, test} from 'vitest';
import {parseAngle} from '../../src/geodesy/angle.ts';
import {type Ellipsoid, ellipsoid, GRS80, WGS84} from '../../src/geodesy/ellipsoid.ts';
import {ecefFromGeodetic, geodeticFromEcef} from '../../src/geodesy/geocentric.ts';
import type {Ecef, Geodetic} from '../../src/geodesy/types.ts';
import {readReference} from '../reference/read.ts';
import {randomFrom} from '../simulate/random.ts';

type Row = Readonly<Record<'lat' | 'lon' | 'h' | 'x' | 'y' | 'z' | 'tag', string>>;
const exact = readReference<{forward: readonly Row[]; reverse: readonly Row[]}>(
  'geocentric-80-digits',
);

const RADIANS_PER_DEGREE = Math.PI / 180;

function geodeticOf(row: Omit<Row, 'tag'>): Geodetic {
  return {
    latitudeDeg: Number(row.lat),
    longitudeDeg: Number(row.lon),
    ellipsoidalHeightM: Number(row.h),
  };
}

function ecefOf(row: {x: string; y: string; z: string}): Ecef {
  return {xM: Number(row.x), yM: Number(row.y), zM: Number(row.z)};
}

function distanceM(a: Ecef, b: Ecef): number {
  return Math.hypot(a.xM - b.xM, a.yM - b.yM, a.zM - b.zM);
}

function dms(text: string, kind: 'latitude' | 'longitude'): number {
  const parsed = parseAngle(text, kind);
  if (parsed.kind === 'refused') throw new Error(parsed.message);
  return parsed.degrees;
}

/** Differences of a reverse conversion from the 80-digit row. */
function reverseErrors(row: Row) {
  const found = geodeticFromEcef(ecefOf(row), WGS84);
  const expected = geodeticOf(row);
  return {
    latRad: Math.abs(found.latitudeDeg - expected.latitudeDeg) * RADIANS_PER_DEGREE,
    lonRad: Math.abs(found.longitudeDeg - expected.longitudeDeg) * RADIANS_PER_DEGREE,
    heightM: Math.abs(found.ellipsoidalHeightM - expected.ellipsoidalHeightM),
  };
}

/** Within 1 km of the evolute's cusp, or farther out than 60,000 km. */
function isIllConditioned(row: Row): boolean {
  const p = Math.hypot(Number(row.x), Number(row.y));
  return Math.abs(p - 42_697.67) < 1000 && Math.abs(Number(row.z)) < 1000;
}

function isFarOut(row: Row): boolean {
  return Math.hypot(Number(row.x), Number(row.y), Number(row.z)) > 6e7;
}

describe('geocentric from geodetic', () => {
  test('reference: 176 points from −10 km to 40,000 km, mpmath at 80 digits', () => {
    expect(exact.forward).toHaveLength(176);
    for (const row of exact.forward) {
      const found = ecefFromGeodetic(geodeticOf(row), WGS84);
      expect(distanceM(found, ecefOf(row)), JSON.stringify(row)).toBeLessThan(2e-8);
    }
  });
});

describe('geodetic from geocentric', () => {
  const ordinary = exact.reverse.filter((row) => !isIllConditioned(row) && !isFarOut(row));
  const illConditioned = exact.reverse.filter(isIllConditioned);
  const farOut = exact.reverse.filter(isFarOut);

  test('reference: ordinary points, poles, axis, centre and deep interior, mpmath at 80 digits', () => {
    expect(ordinary.length + illConditioned.length + farOut.length).toBe(280);
    expect(ordinary).toHaveLength(258);
    for (const row of ordinary) {
      const errors = reverseErrors(row);
      expect(errors.heightM, JSON.stringify(row)).toBeLessThan(2e-8);
      expect(errors.latRad, JSON.stringify(row)).toBeLessThan(2e-14);
      expect(errors.lonRad, JSON.stringify(row)).toBeLessThan(2e-14);
    }
  });

  test('reference: beside the cusp of the evolute the latitude holds 2e-13 rad, all else as above', () => {
    // The latitude there moves as the square root of the place: the last bit of 42,697.67 m is
    // worth 2e-13 rad. The point itself is still found to 2e-8 m, as the bound on height shows.
    for (const row of illConditioned) {
      const errors = reverseErrors(row);
      expect(errors.heightM, JSON.stringify(row)).toBeLessThan(2e-8);
      expect(errors.latRad, JSON.stringify(row)).toBeLessThan(2e-13);
      expect(errors.lonRad, JSON.stringify(row)).toBeLessThan(2e-14);
    }
  });

  test('reference: as far as the Moon the height holds the spacing of doubles', () => {
    expect(farOut.length).toBeGreaterThan(0);
    for (const row of farOut) {
      const errors = reverseErrors(row);
      expect(errors.heightM, JSON.stringify(row)).toBeLessThan(6e-8);
      expect(errors.latRad, JSON.stringify(row)).toBeLessThan(2e-14);
    }
  });
});

interface EpsgExample {
  readonly id: string;
  readonly input: {
    readonly ellipsoid: {readonly a: string; readonly rf: string};
    readonly lat_dms: string;
    readonly lon_dms: string;
    readonly h: string;
    readonly x: string;
    readonly y: string;
    readonly z: string;
  };
  readonly published: Readonly<Record<'x' | 'y' | 'z' | 'lat_dms' | 'lon_dms' | 'h', string>>;
}

describe('published examples', () => {
  const {examples} = readReference<{examples: readonly EpsgExample[]}>('epsg-guidance-note-7-2');
  function example(id: string): EpsgExample {
    const found = examples.find((candidate) => candidate.id === id);
    if (found === undefined) throw new Error(`no example ${id}`);
    return found;
  }

  test('reference: IOGP 373-7-2, method 9602, forward', () => {
    const {input, published} = example('9602-forward');
    const found = ecefFromGeodetic(
      {
        latitudeDeg: dms(input.lat_dms, 'latitude'),
        longitudeDeg: dms(input.lon_dms, 'longitude'),
        ellipsoidalHeightM: Number(input.h),
      },
      ellipsoid(Number(input.ellipsoid.a), Number(input.ellipsoid.rf)),
    );
    expect(Math.abs(found.xM - Number(published.x))).toBeLessThan(0.005);
    expect(Math.abs(found.yM - Number(published.y))).toBeLessThan(0.005);
    expect(Math.abs(found.zM - Number(published.z))).toBeLessThan(0.005);
  });

  test('reference: IOGP 373-7-2, method 9602, reverse, International 1924', () => {
    const {input, published} = example('9602-reverse-ED50');
    const found = geodeticFromEcef(
      ecefOf(input),
      ellipsoid(Number(input.ellipsoid.a), Number(input.ellipsoid.rf)),
    );
    const arcSecond = 1 / 3600;
    // Half of the last printed digit; the height of the example is cut, not rounded (28.0266).
    expect(Math.abs(found.latitudeDeg - dms(published.lat_dms, 'latitude'))).toBeLessThan(
      0.0005 * arcSecond,
    );
    expect(Math.abs(found.longitudeDeg - dms(published.lon_dms, 'longitude'))).toBeLessThan(
      0.0005 * arcSecond,
    );
    expect(Math.abs(found.ellipsoidalHeightM - Number(published.h))).toBeLessThan(0.01);
  });

  test('reference: IOGP GIGS 5201, 27 points within the published 0.01 m', () => {
    const {test5201} = readReference<{
      test5201: readonly Readonly<Record<'x' | 'y' | 'z' | 'lat' | 'lon' | 'h', string>>[];
    }>('iogp-gigs-2011');
    expect(test5201).toHaveLength(27);
    for (const row of test5201) {
      const geodetic = {
        latitudeDeg: Number(row.lat),
        longitudeDeg: Number(row.lon),
        ellipsoidalHeightM: Number(row.h),
      };
      const ecef = ecefOf(row);
      expect(distanceM(ecefFromGeodetic(geodetic, WGS84), ecef)).toBeLessThan(0.01);
      const found = geodeticFromEcef(ecef, WGS84);
      expect(Math.abs(found.ellipsoidalHeightM - Number(row.h))).toBeLessThan(0.01);
      expect(distanceM(ecefFromGeodetic(found, WGS84), ecef)).toBeLessThan(5e-9);
    }
  });

  test('reference: 109 Australian stations, latitude, longitude, height and X, Y, Z', () => {
    const {rows} = readReference<{
      rows: readonly Readonly<
        Record<'station' | 'lat_dms' | 'lon_dms' | 'h' | 'x' | 'y' | 'z', string>
      >[];
    }>('australian-stations-2018');
    expect(rows).toHaveLength(109);
    for (const row of rows) {
      const found = geodeticFromEcef(ecefOf(row), GRS80);
      const lat = dms(row.lat_dms, 'latitude');
      const lon = dms(row.lon_dms, 'longitude');
      // Half of the last printed digit of both sides: 1e-5″ is 0.31 mm; X, Y, Z are printed to
      // 0.1 mm, whose rounding is worth up to 0.09 mm in position.
      const toleranceDeg = (0.5e-5 + 0.29e-5) / 3600;
      expect(Math.abs(found.latitudeDeg - lat), row.station).toBeLessThan(toleranceDeg);
      expect(
        Math.abs(found.longitudeDeg - lon) * Math.cos(lat * RADIANS_PER_DEGREE),
        row.station,
      ).toBeLessThan(toleranceDeg);
      expect(Math.abs(found.ellipsoidalHeightM - Number(row.h)), row.station).toBeLessThan(1.5e-4);
      const forward = ecefFromGeodetic(
        {latitudeDeg: lat, longitudeDeg: lon, ellipsoidalHeightM: Number(row.h)},
        GRS80,
      );
      expect(distanceM(forward, ecefOf(row)), row.station).toBeLessThan(3.2e-4);
    }
  });
});

/**
 * Latitude by the classical iteration: start from N = a, stop when the latitude changes by less
 * than 1e-10 rad or the height by less than 1 mm (common practice, no source).
 */
function classicalLatitude(
  {xM, yM, zM}: Ecef,
  {semiMajorAxisM: a, eccentricitySquared: e2}: Ellipsoid,
) {
  const p = Math.hypot(xM, yM);
  let primeVerticalM = a;
  let latRad = 0;
  let heightM = 0;
  for (let pass = 0; pass < 20; pass++) {
    const nextLatRad = Math.atan2(zM + e2 * primeVerticalM * Math.sin(latRad), p);
    primeVerticalM = a / Math.sqrt(1 - e2 * Math.sin(nextLatRad) ** 2);
    const nextHeightM =
      p * Math.cos(nextLatRad) +
      zM * Math.sin(nextLatRad) -
      a * Math.sqrt(1 - e2 * Math.sin(nextLatRad) ** 2);
    const settled =
      pass > 0 && (Math.abs(nextLatRad - latRad) < 1e-10 || Math.abs(nextHeightM - heightM) < 1e-3);
    latRad = nextLatRad;
    heightM = nextHeightM;
    if (settled) break;
  }
  return {latRad, heightM};
}

describe('the classical iteration', () => {
  test('reference: agrees within what its stopping rule leaves, at the heights of table a7', () => {
    const {rows} = readReference<{rows: readonly {h: number}[]}>('latitude-iteration');
    expect(rows).toHaveLength(12);
    for (const {h} of rows) {
      for (let latitudeDeg = 1; latitudeDeg < 90; latitudeDeg++) {
        const ecef = ecefFromGeodetic(
          {latitudeDeg, longitudeDeg: 10, ellipsoidalHeightM: h},
          WGS84,
        );
        const classical = classicalLatitude(ecef, WGS84);
        const found = geodeticFromEcef(ecef, WGS84);
        // Each pass shrinks the error about e²-fold, and the height is good to the second order of
        // the latitude's error: a last change of 1 mm in height can leave 2e-7 rad.
        expect(Math.abs(found.latitudeDeg * RADIANS_PER_DEGREE - classical.latRad)).toBeLessThan(
          2e-7,
        );
        expect(Math.abs(found.ellipsoidalHeightM - classical.heightM)).toBeLessThan(1e-3);
      }
    }
  });
});

describe('round trips', () => {
  test.each([1, 2, 3])('property: 10,000 random points, seed %i, return within 5e-9 m', (seed) => {
    const random = randomFrom(seed, 'round trip');
    let worstM = 0;
    for (let i = 0; i < 10_000; i++) {
      const ecef = ecefFromGeodetic(
        {
          latitudeDeg: random.between(-90, 90),
          longitudeDeg: random.between(-180, 180),
          ellipsoidalHeightM: random.between(-10_000, 20_000),
        },
        WGS84,
      );
      const back = ecefFromGeodetic(geodeticFromEcef(ecef, WGS84), WGS84);
      worstM = Math.max(worstM, distanceM(ecef, back));
    }
    expect(worstM).toBeLessThan(5e-9);
  });

  test('property: the whole interior returns within 1e-8 m, the foot point being the nearest', () => {
    const random = randomFrom(4, 'interior');
    for (let i = 0; i < 10_000; i++) {
      const scale = 10 ** random.between(0, 6.8);
      const ecef = {
        xM: random.between(-1, 1) * scale,
        yM: random.between(-1, 1) * scale,
        zM: random.between(-1, 1) * scale,
      };
      const found = geodeticFromEcef(ecef, WGS84);
      expect(distanceM(ecef, ecefFromGeodetic(found, WGS84))).toBeLessThan(1e-8);
      // Inside the evolute there are other normals; theirs are longer than the semi-minor axis.
      if (found.ellipsoidalHeightM < 0) {
        expect(-found.ellipsoidalHeightM).toBeLessThanOrEqual(WGS84.semiMinorAxisM);
      }
    }
  });

  test('property: on a sphere the height is the distance from the centre less the radius', () => {
    const sphere = ellipsoid(6_371_000, Number.POSITIVE_INFINITY);
    for (const radiusM of [1, 1e5, 6_371_000, 7e6]) {
      const found = geodeticFromEcef({xM: 0.6 * radiusM, yM: 0, zM: -0.8 * radiusM}, sphere);
      expect(found.ellipsoidalHeightM).toBeCloseTo(radiusM - 6_371_000, 7);
      expect(found.latitudeDeg).toBeCloseTo(Math.atan2(-0.8, 0.6) / RADIANS_PER_DEGREE, 12);
    }
    expect(geodeticFromEcef({xM: 0, yM: 0, zM: 0}, sphere)).toEqual({
      latitudeDeg: 90,
      longitudeDeg: 0,
      ellipsoidalHeightM: -6_371_000,
    });
  });

  test('NaN in, NaN out', () => {
    const found = geodeticFromEcef({xM: Number.NaN, yM: 0, zM: 0}, WGS84);
    expect(found.latitudeDeg).toBeNaN();
    expect(found.ellipsoidalHeightM).toBeNaN();
  });
});
