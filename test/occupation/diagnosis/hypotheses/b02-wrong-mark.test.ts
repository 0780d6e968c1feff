import {expect, test} from 'vitest';
import {wrongMark} from '../../../../src/occupation/diagnosis/hypotheses/b02-wrong-mark.ts';
import {
  bareInput,
  fullInput,
  nearestM,
  predictionsOf,
  reasonOf,
  withOffset,
} from '../check-input.ts';

test('the vector to a listed mark, with its height or an open one', () => {
  const found = predictionsOf(wrongMark, fullInput());
  expect(nearestM(found, {eastM: 3.21, northM: -1.47, upM: -0.12})).toBe(0);
  const nail = found.find(({values}) => values.name === 'OLD NAIL');
  expect(Math.sqrt(nail?.covarianceM2[2][2] ?? 0)).toBeCloseTo(0.5, 9);
});

test('a mark of which only the distance is known lies in the direction of the offset', () => {
  const nearbyMarks = [
    {
      name: 'BOLT',
      position: {kind: 'distance' as const, distanceM: 5},
      upM: null,
      standardUncertaintyM: null,
    },
  ];
  const [found] = predictionsOf(
    wrongMark,
    withOffset(bareInput({nearbyMarks}), {eastM: 3.01, northM: 4.01, upM: 0}),
  );
  expect(Math.hypot(found?.offset.eastM ?? 0, found?.offset.northM ?? 0)).toBeCloseTo(5, 9);
  expect(found?.freeParameters).toBe(1);
});

test('an unlisted nail fits plan offsets from 30 mm to 50 m, not the height', () => {
  const [found] = predictionsOf(wrongMark, withOffset(bareInput(), {eastM: 2, northM: 0, upM: 1}));
  expect(found?.offset).toEqual({eastM: 2, northM: 0, upM: 0});
  expect(found?.freeParameters).toBe(2);
});

test('needs a nearby mark, or an offset like one', () => {
  expect(reasonOf(wrongMark, bareInput())).toBe('no-nearby-mark');
});
