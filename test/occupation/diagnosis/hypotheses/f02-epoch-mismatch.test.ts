import {expect, test} from 'vitest';
import {epochMismatch} from '../../../../src/occupation/diagnosis/hypotheses/f02-epoch-mismatch.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, withOffset} from '../check-input.ts';

interface Row {
  readonly plate: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly mmPerYear: readonly [number, number];
}

// Source: plate motion model of ITRF2014 (Altamimi et al. 2017), computed with PROJ 9.1.1.
const ROWS: readonly Row[] = [
  {plate: 'EURA', latitudeDeg: 50, longitudeDeg: 10, mmPerYear: [19.48, 15.68]},
  {plate: 'AUST', latitudeDeg: -35.344, longitudeDeg: 149.158, mmPerYear: [18.4, 55.26]},
];

test.each(ROWS)('reference: ITRF2014 plate motion of $plate over 15 years', (row) => {
  const {latitudeDeg, longitudeDeg, mmPerYear} = row;
  const frames = {...bareInput().frames, reference: {frame: 'ITRF2014', epoch: 2010}};
  const input = bareInput({markPlan: {latitudeDeg, longitudeDeg}, frames});
  const found = predictionsOf(epochMismatch, input).filter(({values}) => values.known === true);
  const expected = {eastM: mmPerYear[0] * 0.015, northM: mmPerYear[1] * 0.015, upM: 0};
  // The national frames move with other poles than the model: 1 mm a year.
  expect(nearestM(found, expected)).toBeLessThan(0.015);
});

test('the stated motion of the mark comes before that of its plate', () => {
  const motion = {
    kind: 'local velocity' as const,
    frame: 'ITRF2020',
    mPerYear: {east: 0.03, north: -0.01, up: 0},
  };
  const frames = {...bareInput().frames, motion, reference: {frame: 'ITRF2020', epoch: 2015}};
  const found = predictionsOf(epochMismatch, bareInput({frames}));
  expect(nearestM(found, {eastM: 0.3, northM: -0.1, upM: 0})).toBeLessThan(1e-4);
});

test('without epochs only the direction is tested', () => {
  const input = withOffset(bareInput(), {eastM: 0.1948, northM: 0.1568, upM: 0});
  const [found] = predictionsOf(epochMismatch, input);
  expect(found?.freeParameters).toBe(1);
  expect(found?.values.years).toBeCloseTo(10, 0);
});

test('needs a plan position', () => {
  expect(reasonOf(epochMismatch, bareInput({markPlan: null}))).toBe('no-plan');
});

test('frames of several plates leave the velocity open', () => {
  expect(
    reasonOf(epochMismatch, bareInput({markPlan: {latitudeDeg: 20, longitudeDeg: -156}})),
  ).toBe('no-velocity');
});

test('needs epochs, or an offset along the motion', () => {
  expect(reasonOf(epochMismatch, bareInput())).toBe('no-epochs');
});
