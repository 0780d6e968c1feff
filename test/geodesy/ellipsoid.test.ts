import {describe, expect, test} from 'vitest';
import {
  type Ellipsoid,
  ellipsoid,
  GRS80,
  gaussianRadiusM,
  meridianRadiusM,
  parseEllipsoid,
  primeVerticalRadiusM,
  WGS84,
} from '../../src/geodesy/ellipsoid.ts';
import {readReference} from '../reference/read.ts';

type Derived = Readonly<Record<'f' | 'b_m' | 'e2' | 'third_flattening_n', string>>;
interface Constants {
  readonly wgs84: {readonly derived_recomputed: Derived};
  readonly grs80: {readonly derived_from_rounded_inverse_f_298_257222101: Derived};
  readonly radii_of_curvature_wgs84: readonly Readonly<
    Record<'lat' | 'M' | 'N' | 'gaussian_mean', string>
  >[];
}
const constants = readReference<Constants>('ellipsoid-constants');

describe('ellipsoid', () => {
  test.each([
    ['WGS 84', WGS84, constants.wgs84.derived_recomputed],
    ['GRS 80', GRS80, constants.grs80.derived_from_rounded_inverse_f_298_257222101],
  ] satisfies [string, Ellipsoid, Derived][])(
    'reference: constants derived from a and 1/f at 80 digits, %s',
    (_name, found, expected) => {
      expect(found.flattening).toBeCloseTo(Number(expected.f), 17);
      expect(found.eccentricitySquared).toBeCloseTo(Number(expected.e2), 16);
      expect(found.thirdFlattening).toBeCloseTo(Number(expected.third_flattening_n), 17);
      expect(Math.abs(found.semiMinorAxisM - Number(expected.b_m))).toBeLessThan(2e-9);
    },
  );

  test('reference: radii of curvature of WGS 84 at 9 latitudes, 80 digits', () => {
    expect(constants.radii_of_curvature_wgs84).toHaveLength(9);
    for (const row of constants.radii_of_curvature_wgs84) {
      const place = {latitudeDeg: Number(row.lat)};
      // Half of the last printed digit.
      expect(Math.abs(meridianRadiusM(place, WGS84) - Number(row.M))).toBeLessThan(5.1e-7);
      expect(Math.abs(primeVerticalRadiusM(place, WGS84) - Number(row.N))).toBeLessThan(5.1e-7);
      const gaussian = gaussianRadiusM(place, WGS84);
      expect(Math.abs(gaussian - Number(row.gaussian_mean))).toBeLessThan(5.1e-7);
    }
  });

  test('impossible ellipsoids are refused', () => {
    expect(() => ellipsoid(0, 298)).toThrow(RangeError);
    expect(() => ellipsoid(Number.POSITIVE_INFINITY, 298)).toThrow(RangeError);
    expect(() => ellipsoid(6_378_137, 0.003)).toThrow(RangeError);
    expect(() => ellipsoid(6_378_137, Number.NaN)).toThrow(RangeError);
  });
});

describe('ellipsoid as a user writes it', () => {
  test('names, pairs and the sphere', () => {
    expect(parseEllipsoid('wgs 84')).toEqual({kind: 'ellipsoid', ellipsoid: WGS84});
    expect(parseEllipsoid('GRS-80')).toEqual({kind: 'ellipsoid', ellipsoid: GRS80});
    expect(parseEllipsoid('6378388, 297')).toEqual({
      kind: 'ellipsoid',
      ellipsoid: ellipsoid(6_378_388, 297),
    });
    expect(parseEllipsoid('6371000,0')).toMatchObject({
      ellipsoid: {flattening: 0, semiMinorAxisM: 6_371_000, eccentricitySquared: 0},
    });
  });

  test.each([
    ['clarke', /need WGS84, GRS80, or a,1\/f such as 6378388,297, found "clarke"/],
    ['6378388,297,1', /need WGS84/],
    ['6378.388,297', /metres/],
    ['a,297', /need the semi-major axis in metres before the comma, found "a"/],
    ['6378388,1/297', /need the inverse flattening after the comma, found "1\/297"/],
    ['6378388,0.0033670033670033669', /write 297/],
    ['6378388,6356911.946', /semi-minor axis/],
    ['6378388,2.97', /about 298/],
    ['-6378388,297', /semi-major axis/],
  ])('%s is refused with what to write', (text, message) => {
    const parsed = parseEllipsoid(text);
    expect(parsed.kind === 'refused' ? parsed.message : 'accepted').toMatch(message);
  });
});
