import {expect, test} from 'vitest';
import {surveyFoot} from '../../../../src/occupation/diagnosis/hypotheses/h01-survey-foot.ts';
import {bareInput, nearestM, offsetOf, predictionsOf, reasonOf, signature} from '../check-input.ts';

test('reference: worked example H01, in grid axes', () => {
  const example = signature('H01');
  const {delta_m: _, convergence_deg = 0, inputs} = signature('G01');
  const gamma = (convergence_deg * Math.PI) / 180;
  const grid = offsetOf(example);
  // Grid north has the bearing of the convergence; grid lengths are k times those on the ellipsoid.
  const expected = {
    eastM: (grid.eastM * Math.cos(gamma) + grid.northM * Math.sin(gamma)) / (inputs.k ?? 1),
    northM: (grid.northM * Math.cos(gamma) - grid.eastM * Math.sin(gamma)) / (inputs.k ?? 1),
    upM: 0,
  };
  expect(nearestM(predictionsOf(surveyFoot, bareInput()), expected)).toBeLessThan(1e-4);
});

test('needs a grid', () => {
  expect(reasonOf(surveyFoot, bareInput({markPlan: {latitudeDeg: 87, longitudeDeg: 0}}))).toBe(
    'no-grid',
  );
});
