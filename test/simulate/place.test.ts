import {expect, test} from 'vitest';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {ecefFromGeodetic} from '../../src/geodesy/geocentric.ts';
import {ecefFromEnu, localFrame} from '../../src/geodesy/local.ts';
import {geocentricNear, placeNear} from './place.ts';
import {randomFrom} from './random.ts';

/** Distance between two geocentric points. */
function apartM(one: readonly [number, number, number], other: readonly [number, number, number]) {
  return Math.hypot(one[0] - other[0], one[1] - other[1], one[2] - other[2]);
}

test('property: both closed formulas agree with the rigorous conversions of the core', () => {
  const random = randomFrom(1, 'places');
  for (let k = 0; k < 2000; k++) {
    const mark = {
      latitudeDeg: random.between(-75, 75),
      longitudeDeg: random.between(-180, 180),
      ellipsoidalHeightM: random.between(-100, 4000),
    };
    const azimuth = random.between(0, 2 * Math.PI);
    const distanceM = random.between(0, 200);
    const offset = {
      eastM: distanceM * Math.sin(azimuth),
      northM: distanceM * Math.cos(azimuth),
      upM: random.between(-20, 20),
    };
    const {xM, yM, zM} = ecefFromEnu(offset, localFrame(mark, WGS84));
    expect(apartM(geocentricNear(mark, offset), [xM, yM, zM])).toBeLessThan(1e-8);
    const near = ecefFromGeodetic(placeNear(mark, offset), WGS84);
    expect(apartM([near.xM, near.yM, near.zM], [xM, yM, zM])).toBeLessThan(5e-5);
  }
});
