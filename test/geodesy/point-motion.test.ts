import {describe, expect, test} from 'vitest';
import {ITRF2014_PMM, ITRF2020_PMM} from '../../src/geodesy/plates.ts';
import {parsePointMotion} from '../../src/geodesy/point-motion.ts';

describe('the motion of a mark as a user writes it', () => {
  test('rest, plates and velocities', () => {
    expect(parsePointMotion('at rest in ETRF2014')).toEqual({kind: 'at rest', frame: 'ETRF2014'});
    expect(parsePointMotion('plate Eurasia')).toMatchObject({
      kind: 'plate',
      plate: {code: 'EURA'},
      model: ITRF2020_PMM,
    });
    expect(parsePointMotion('Plate north america by ITRF2014-PMM')).toMatchObject({
      plate: {code: 'NOAM'},
      model: ITRF2014_PMM,
    });
    expect(parsePointMotion('xyz -13.6 16.9 10.2 mm/yr in ITRF2020')).toEqual({
      kind: 'geocentric velocity',
      frame: 'ITRF2020',
      mPerYear: {x: -0.0136, y: 0.0169, z: expect.closeTo(0.0102, 15)},
    });
    expect(parsePointMotion('enu 0.0171, 0.0152, -0.0003 m/yr in itrf2014')).toEqual({
      kind: 'local velocity',
      frame: 'ITRF2014',
      mPerYear: {east: 0.0171, north: 0.0152, up: -0.0003},
    });
  });

  test.each([
    ['none', /need the motion of the mark as "at rest in ETRF2014", "plate EURA"/],
    ['', /need the motion of the mark/],
    ['xyz 1 2 3 in ITRF2020', /need the motion of the mark/],
    ['at rest in ITRF2020', /no mark is at rest in ITRF2020/],
    ['at rest in ETRS89', /write ETRF2000/],
    ['at rest in SIRGAS2000', /write a plate-fixed frame such as/],
    ['plate Okhotsk', /no rotation pole/],
    ['plate EURA by NUVEL-1A', /unknown plate motion model/],
    ['xyz -13.6 16.9 10.2 m/yr in ITRF2020', /is the unit mm\/yr\?/],
    ['enu 1 2 3 mm/yr in WGS84', /WGS84\(G2296\)/],
  ])('%s is refused with what to write', (text, message) => {
    expect(() => parsePointMotion(text)).toThrow(message);
  });
});
