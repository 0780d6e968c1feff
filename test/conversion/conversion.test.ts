import {describe, expect, test} from 'vitest';
import {type ConversionRequest, planConversion} from '../../src/conversion/conversion.ts';
import type {Triple} from '../../src/conversion/form.ts';
import {UsageError} from '../../src/errors.ts';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {parsePointMotion} from '../../src/geodesy/point-motion.ts';
import {readReference} from '../reference/read.ts';

const NOTHING_STATED: ConversionRequest = {
  from: 'geodetic',
  to: 'geodetic',
  fromFrame: null,
  fromEpoch: null,
  toFrame: null,
  toEpoch: null,
  motion: null,
  ellipsoid: null,
  origin: null,
};

function converted(values: Triple, request: Partial<ConversionRequest>): Triple {
  return planConversion({...NOTHING_STATED, ...request}).convert(values);
}

interface EurefExample {
  readonly euref_tn1_appendix_B: {
    readonly epochs: Readonly<Record<string, Readonly<Record<string, Triple>>>>;
  };
}
interface Projections {
  readonly epsg: readonly (readonly [
    code: number,
    lat: number,
    lon: number,
    easting: number,
    northing: number,
  ])[];
}

describe('planConversion', () => {
  test('reference: EUREF Technical Note 1, Appendix B, within 0.1 mm in every axis', () => {
    const {epochs} = readReference<EurefExample>('frames-worked-examples').euref_tn1_appendix_B;
    let compared = 0;
    for (const [epoch, positions] of Object.entries(epochs)) {
      const given = positions.ITRF2020!;
      for (const [frame, published] of Object.entries(positions)) {
        const found = converted(given, {
          from: 'geocentric',
          to: 'geocentric',
          fromFrame: 'ITRF2020',
          fromEpoch: Number(epoch),
          toFrame: frame,
        });
        for (const axis of [0, 1, 2] as const) {
          expect(Math.abs(found[axis] - published[axis])).toBeLessThanOrEqual(1e-4);
        }
        compared++;
      }
    }
    expect(compared).toBe(12);
  });

  test('reference: grids by EPSG code, PROJ 9.1.1, within 0.1 mm there and back', () => {
    const {epsg} = readReference<Projections>('map-projections');
    expect(epsg.length).toBeGreaterThan(10);
    for (const [code, lat, lon, easting, northing] of epsg) {
      const grid = `EPSG:${code}`;
      const [e, n] = converted([lat, lon, 0], {to: grid, ellipsoid: GRS80});
      expect(Math.hypot(e - easting, n - northing), grid).toBeLessThan(1e-4);
      const [backLat, backLon] = converted([easting, northing, 0], {
        from: grid,
        ellipsoid: GRS80,
      });
      expect(Math.abs(backLat - lat), grid).toBeLessThan(1e-9);
      expect(Math.abs(backLon - lon) * Math.cos((lat * Math.PI) / 180), grid).toBeLessThan(1e-9);
    }
  });

  test('the same form, without a frame, gives the same bits', () => {
    const values: Triple = [50.123456789, 9.2, 210.5];
    expect(converted(values, {})).toEqual(values);
    const metres: Triple = [4027893.675, 307045.9069, 4919475.1721];
    expect(converted(metres, {from: 'geocentric', to: 'geocentric'})).toEqual(metres);
  });

  test('every form comes back within 0.01 mm by way of every other', () => {
    const origin = {latitudeDeg: -33.5, longitudeDeg: 151.2, ellipsoidalHeightM: 20};
    const start: Triple = [-33.51, 151.25, 45.5];
    const forms = ['geocentric', 'geodetic', 'local', 'UTM 56S'];
    for (const a of forms) {
      const first = converted(start, {to: a, origin});
      for (const b of forms) {
        const there = converted(first, {from: a, to: b, origin});
        const back = converted(there, {from: b, to: 'geodetic', origin});
        expect(Math.abs(back[0] - start[0]), `${a} ${b}`).toBeLessThan(1e-10);
        expect(Math.abs(back[1] - start[1]), `${a} ${b}`).toBeLessThan(1e-10);
        expect(Math.abs(back[2] - start[2]), `${a} ${b}`).toBeLessThan(1e-5);
      }
    }
  });

  test('a plan position needs no height where none is used', () => {
    const [easting, northing, height] = converted([50, 9, Number.NaN], {to: 'UTM 32N'});
    expect(easting).toBeCloseTo(500_000, 6);
    expect(northing).toBeGreaterThan(5_500_000);
    expect(height).toBeNaN();
    expect(() => converted([50, 9, Number.NaN], {to: 'geocentric'})).toThrow(
      /need an ellipsoidal height/,
    );
    const frames = {fromFrame: 'ITRF2020', fromEpoch: 2020, toFrame: 'ETRF2000'};
    expect(() => converted([50, 9, Number.NaN], frames)).toThrow(/need an ellipsoidal height/);
  });

  test('the epoch of the result is that of its frame, else that of the given coordinates', () => {
    const stated = {fromFrame: 'ITRF2014', fromEpoch: 2020};
    const plan = (request: Partial<ConversionRequest>) =>
      planConversion({...NOTHING_STATED, ...stated, ...request}).plan;
    expect(plan({toFrame: 'ITRF2020'})?.epoch).toBe(2020);
    const motion = parsePointMotion('plate SOAM');
    expect(plan({fromEpoch: 2026, toFrame: 'SIRGAS2000', motion})?.epoch).toBe(2000.4);
  });

  test('GRS 80 belongs to the frames, WGS 84 to its realisations and to unstated ones', () => {
    const name = (request: Partial<ConversionRequest>) =>
      planConversion({...NOTHING_STATED, ...request}).to.name;
    expect(name({fromFrame: 'ITRF2020', fromEpoch: 2020})).toBe('geodetic, GRS 80');
    expect(name({fromFrame: 'WGS84(G2139)', fromEpoch: 2020})).toBe('geodetic, WGS 84');
    expect(name({})).toBe('geodetic, WGS 84');
  });

  test.each<[string, Partial<ConversionRequest>, RegExp]>([
    ['an epoch without a frame', {fromEpoch: 2020}, /write --from-frame/],
    ['a wanted frame alone', {toFrame: 'ETRF2000'}, /write --from-frame/],
    ['local without an origin', {to: 'local'}, /write --at/],
    ['a grid that nobody knows', {to: 'EPSG:1'}, /EPSG:1/],
    ['UTM without a zone as source', {from: 'UTM'}, /need the UTM zone/],
    [
      'a grid of another frame',
      {to: 'EPSG:25832', fromFrame: 'ITRF2020', fromEpoch: 2020},
      /is a grid of ETRF/,
    ],
    ['a grid on another ellipsoid', {to: '+proj=tmerc +lon_0=9 +ellps=bessel'}, /ellipsoid/],
  ])('%s is refused with what to write', (_, request, advice) => {
    let thrown: unknown;
    try {
      converted([50, 9, 100], request);
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(UsageError);
    expect(String(thrown)).toMatch(advice);
  });

  test('local to local in two frames is refused: there are two origins', () => {
    const origin = {latitudeDeg: 50, longitudeDeg: 9, ellipsoidalHeightM: 100};
    const frames = {fromFrame: 'ITRF2020', fromEpoch: 2020, toFrame: 'ETRF2000'};
    expect(() => converted([1, 2, 3], {from: 'local', to: 'local', origin, ...frames})).toThrow(
      /two origins/,
    );
  });

  test('a geocentric position far from the ground is refused', () => {
    const toGeodetic = {from: 'geocentric', to: 'geodetic'};
    expect(() => converted([4_027_893_675, 307_045_906, 4_919_475_172], toGeodetic)).toThrow(
      /km from the centre of the Earth; check the unit/,
    );
    expect(() => converted([0, 0, 0], toGeodetic)).toThrow(/0\.0 km from the centre/);
  });
});
