import {expect, test} from 'vitest';
import {orthometricReference} from '../../../../src/occupation/diagnosis/hypotheses/v10-orthometric-reference.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

/** Half of the last digit printed. */
const PRINTED_M = 0.5e-5;

test('reference: worked example V10', () => {
  const example = signature('V10');
  const found = predictionsOf(
    orthometricReference,
    bareInput({separation: {known: [{source: 'mark', separationM: 48}], missingInLog: false}}),
  );
  expect(nearestM(found, offsetOf(example))).toBeLessThan(PRINTED_M);
});

test('needs a separation', () => {
  expect(reasonOf(orthometricReference, bareInput())).toBe('no-separation');
});

test('property: a table in a receiver is worth less than a model', () => {
  const sigmaM = (source: 'log' | 'geoid grid') => {
    const separation = {known: [{source, separationM: 48}], missingInLog: false};
    const [found] = predictionsOf(orthometricReference, bareInput({separation}));
    return Math.sqrt(found?.covarianceM2[2][2] ?? 0);
  };
  expect(sigmaM('geoid grid')).toBeCloseTo(0.05, 12);
  expect(sigmaM('log')).toBeGreaterThan(0.3);
});
