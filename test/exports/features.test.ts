import {describe, expect, test} from 'vitest';
import {ellipseOutline, rounded} from '../../src/exports/features.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {enuFromGeodetic, localFrame} from '../../src/geodesy/local.ts';

const ELLIPSE = {semiMajorM: 0.02, semiMinorM: 0.008, azimuthDeg: 30};
const CENTRE = {latitudeDeg: 41.7, longitudeDeg: -152.3, ellipsoidalHeightM: -11.2};

describe('ellipseOutline', () => {
  const outline = ellipseOutline(ELLIPSE, CENTRE);
  const frame = localFrame(CENTRE, WGS84);
  const points = outline.map((vertex) => enuFromGeodetic(vertex, frame));

  test('property: every vertex lies on the ellipse, whose long axis points along the azimuth', () => {
    const azimuth = (30 * Math.PI) / 180;
    for (const {eastM, northM} of points) {
      const along = eastM * Math.sin(azimuth) + northM * Math.cos(azimuth);
      const across = eastM * Math.cos(azimuth) - northM * Math.sin(azimuth);
      // Doubles near 150 degrees resolve 3e-14 degrees, 2 nm.
      expect((along / 0.02) ** 2 + (across / 0.008) ** 2).toBeCloseTo(1, 5);
    }
    const [first] = points;
    expect(Math.atan2(first?.eastM ?? 0, first?.northM ?? 1)).toBeCloseTo(azimuth, 6);
  });

  test('is closed and runs anticlockwise', () => {
    expect(outline[outline.length - 1]).toEqual(outline[0]);
    let twiceArea = 0;
    for (let k = 1; k < points.length; k += 1) {
      const a = points[k - 1]!;
      const b = points[k]!;
      twiceArea += a.eastM * b.northM - b.eastM * a.northM;
    }
    // A polygon of 72 sides has 99.87 % of the area: (72 / 2π) sin(2π / 72).
    const share = (72 / (2 * Math.PI)) * Math.sin((2 * Math.PI) / 72);
    expect(twiceArea / 2 / (Math.PI * 0.02 * 0.008)).toBeCloseTo(share, 5);
  });

  test('does not jump round the world at 180 degrees', () => {
    const longitudes = ellipseOutline(ELLIPSE, {...CENTRE, longitudeDeg: 180}).map(
      ({longitudeDeg}) => longitudeDeg,
    );
    expect(Math.max(...longitudes) - Math.min(...longitudes)).toBeLessThan(1e-6);
  });
});

test('rounded never gives a negative zero', () => {
  expect(Object.is(rounded(-1e-9, 4), 0)).toBe(true);
  expect(rounded(-1.23456, 4)).toBe(-1.2346);
});
