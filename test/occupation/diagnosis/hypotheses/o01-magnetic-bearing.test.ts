import {expect, test} from 'vitest';
import {magneticBearing} from '../../../../src/occupation/diagnosis/hypotheses/o01-magnetic-bearing.ts';
import {bareInput, fullInput, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example O01, 10 m and 4 degrees', () => {
  const found = predictionsOf(magneticBearing, fullInput());
  const sizes = found.map(({offset}) => Math.hypot(offset.eastM, offset.northM));
  expect(sizes).toHaveLength(2);
  for (const size of sizes) expect(size).toBeCloseTo(signature('O01').d ?? 0, 9);
});

test('a true bearing 4 degrees east of the one applied leads to the right of the line', () => {
  const offsetPoint = {eastM: 0, northM: 10};
  const [right] = predictionsOf(magneticBearing, bareInput({offsetPoint, declinationDeg: 4}));
  expect(right?.offset.eastM).toBeCloseTo(10 * Math.sin((4 * Math.PI) / 180), 9);
  expect(right?.offset.northM).toBeLessThan(0);
  // Half a degree of declination acts across the line: 87 mm at 10 m.
  expect(Math.sqrt(right?.covarianceM2[0][0] ?? 0)).toBeCloseTo(0.0871, 3);
});

test('needs an offset point', () => {
  expect(reasonOf(magneticBearing, bareInput())).toBe('no-offset-point');
});

test('needs the declination', () => {
  expect(reasonOf(magneticBearing, fullInput({declinationDeg: null}))).toBe('no-declination');
});
