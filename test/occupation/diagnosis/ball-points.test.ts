import {expect, test} from 'vitest';
import {ballPoints} from '../../../src/occupation/diagnosis/ball-points.ts';

test.each([1, 2, 3])('property: points fill the ball of %i dimensions evenly', (dimensions) => {
  const radii = ballPoints(dimensions, 512).map((point) => Math.hypot(...point));
  expect(Math.max(...radii)).toBeLessThanOrEqual(1);
  for (const radius of [0.3, 0.6, 0.9]) {
    const inside = radii.filter((value) => value <= radius).length / radii.length;
    expect(inside).toBeCloseTo(radius ** dimensions, 1);
  }
});

test('property: as many points on one side as on the other', () => {
  for (const dimensions of [1, 2, 3]) {
    const points = ballPoints(dimensions, 512);
    for (let axis = 0; axis < dimensions; axis++) {
      const positive = points.filter((point) => (point[axis] ?? 0) > 0).length;
      expect(Math.abs(positive / points.length - 0.5)).toBeLessThan(0.02);
    }
  }
});
