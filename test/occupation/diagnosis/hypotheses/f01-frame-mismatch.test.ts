import {expect, test} from 'vitest';
import {frameMismatch} from '../../../../src/occupation/diagnosis/hypotheses/f01-frame-mismatch.ts';
import {bareInput, nearestM, predictionsOf, reasonOf} from '../check-input.ts';

/** Of a frame taken for another, 10 mm: the printed values are of other versions of the sets. */
const BOUND_M = 0.012;

interface Row {
  readonly what: string;
  readonly measured: string;
  readonly reference: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly targetMinusSource: readonly [number, number, number];
}

// Source: computed with PROJ 9.1.1 and the parameters of the EPSG dataset, coordinate epoch 2025.0.
const ROWS: readonly Row[] = [
  {
    what: 'ITRF2014 to ETRF2000',
    measured: 'ITRF2014',
    reference: 'ETRF2000',
    latitudeDeg: 50,
    longitudeDeg: 10,
    targetMinusSource: [-0.6646, -0.6361, -0.0148],
  },
  {
    what: 'ITRF2014 to GDA2020',
    measured: 'ITRF2014',
    reference: 'GDA2020',
    latitudeDeg: -35.344,
    longitudeDeg: 149.158,
    targetMinusSource: [-0.0915, -0.276, 0.0009],
  },
  {
    what: 'ITRF2014 to GDA94',
    measured: 'ITRF2014',
    reference: 'GDA94',
    latitudeDeg: -35.344,
    longitudeDeg: 149.158,
    targetMinusSource: [-0.5953, -1.7024, 0.0937],
  },
  {
    what: 'ITRF2014 to NAD83(2011)',
    measured: 'ITRF2014',
    reference: 'NAD83(2011)',
    latitudeDeg: 40,
    longitudeDeg: -105,
    targetMinusSource: [1.3209, -0.5299, 0.8547],
  },
];

test.each(ROWS)('reference: PROJ 9.1.1, $what at 2025.0', (row) => {
  const {latitudeDeg, longitudeDeg, measured, targetMinusSource} = row;
  const input = bareInput({
    markPlan: {latitudeDeg, longitudeDeg},
    frames: {...bareInput().frames, measured: {frame: measured, epoch: 2025}},
  });
  const found = predictionsOf(frameMismatch, input).filter(
    ({values}) => values.side === 'mark' && values.frame === row.reference,
  );
  const [eastM, northM, upM] = targetMinusSource;
  expect(nearestM(found, {eastM: -eastM, northM: -northM, upM: -upM})).toBeLessThan(BOUND_M);
});

test('both sides known and not transformed: one offset with both names', () => {
  const frames = {
    ...bareInput().frames,
    measured: {frame: 'ITRF2014', epoch: 2025},
    reference: {frame: 'ETRF2000', epoch: null},
  };
  const [found] = predictionsOf(frameMismatch, bareInput({frames}));
  expect(found?.values).toEqual({side: 'both', frame: 'ITRF2014', other: 'ETRF2000'});
});

test('property: a log in the frame of the mark, transformed in vain, is off the other way', () => {
  const measured = {frame: 'ITRF2014', epoch: 2025};
  const reference = {frame: 'ETRF2000', epoch: 2025};
  const found = (transformed: boolean) =>
    predictionsOf(
      frameMismatch,
      bareInput({frames: {...bareInput().frames, measured, reference, transformed}}),
    );
  const untouched = found(false).find(({values}) => values.side === 'both');
  const inVain = found(true).find(
    ({values}) => values.side === 'measured' && values.frame === 'ETRF2000',
  );
  // Source of the size: PROJ 9.1.1, as above.
  expect(untouched?.offset.eastM).toBeCloseTo(0.6646, 1);
  expect(inVain?.offset.eastM).toBeCloseTo(-(untouched?.offset.eastM ?? 0), 6);
});

test('needs a plan position', () => {
  expect(reasonOf(frameMismatch, bareInput({markPlan: null}))).toBe('no-plan');
});

test('where no national frame is known nothing differs', () => {
  expect(
    reasonOf(frameMismatch, bareInput({markPlan: {latitudeDeg: -80, longitudeDeg: -120}})),
  ).toBe('no-frame');
});
