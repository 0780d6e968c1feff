import {expect, test} from 'vitest';
import {otherEllipsoid} from '../../../../src/occupation/diagnosis/hypotheses/h09-other-ellipsoid.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

/** Gaussian radius at 50 N, plus the height of the mark. */
const RADIUS_M = 6_382_000 + 300;

// "Clarke 1880 (RGS)" of the example is PROJ's clrk80, 1/f 293.4663.
test.each(['H09-intl', 'H09-bessel', 'H09-clrk66', 'H09-clrk80'])(
  'reference: worked example %s',
  (id) => {
    const printed = offsetOf(signature(id));
    // The example sees the point at its own height, offsets put both at one height.
    const northM = (printed.northM * RADIUS_M) / (RADIUS_M + printed.upM);
    const curvatureM = printed.northM ** 2 / (2 * RADIUS_M);
    const expected = {eastM: 0, northM, upM: printed.upM + curvatureM};
    // Printed to a millimetre.
    expect(nearestM(predictionsOf(otherEllipsoid, bareInput()), expected)).toBeLessThan(1.5e-3);
  },
);

test('needs a plan position', () => {
  expect(reasonOf(otherEllipsoid, bareInput({markPlan: null}))).toBe('no-plan');
});

test('needs a height', () => {
  expect(reasonOf(otherEllipsoid, bareInput({ellipsoidalHeightM: null}))).toBe(
    'no-ellipsoidal-height',
  );
});
