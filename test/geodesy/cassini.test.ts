import {expect, test} from 'vitest';
import {cassiniForward} from '../../src/geodesy/cassini.ts';
import {ellipsoid} from '../../src/geodesy/ellipsoid.ts';
import {randomFrom} from '../simulate/random.ts';

test('property: on a sphere it is arcsin(cos φ sin λ), to the seventh order of the distance', () => {
  const radiusM = 6_371_000;
  const forward = cassiniForward({
    ellipsoid: ellipsoid(radiusM, Number.POSITIVE_INFINITY),
    originLatitudeDeg: 10,
    centralMeridianDeg: -61,
    falseEastingM: 1000,
    falseNorthingM: 2000,
  });
  const random = randomFrom(1, 'Cassini-Soldner');
  for (let i = 0; i < 500; i++) {
    const latitudeDeg = random.between(-50, 50);
    const longitudeDeg = -61 + random.between(-2, 2);
    const phi = (latitudeDeg * Math.PI) / 180;
    const lambda = ((longitudeDeg + 61) * Math.PI) / 180;
    const found = forward({latitudeDeg, longitudeDeg});
    const east = Math.asin(Math.cos(phi) * Math.sin(lambda));
    const north = Math.atan2(Math.tan(phi), Math.cos(lambda)) - (10 * Math.PI) / 180;
    expect(Math.abs(found.eastingM - 1000 - radiusM * east)).toBeLessThan(2e-5);
    expect(Math.abs(found.northingM - 2000 - radiusM * north)).toBeLessThan(1e-3);
  }
});
