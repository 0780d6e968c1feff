import {expect, test} from 'vitest';
import {WGS84} from '../../../../src/geodesy/ellipsoid.ts';
import {transverseMercator, utmGrid} from '../../../../src/geodesy/transverse-mercator.ts';
import {leadingDigits} from '../../../../src/occupation/diagnosis/hypotheses/h12-leading-digits.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, SITES, signature} from '../check-input.ts';
import {seenFrom} from '../planted.ts';

const grid = transverseMercator(utmGrid({zone: 32, hemisphere: 'N'}, WGS84));
const site = SITES['mid-latitude north'];

test('reference: E 571 666 of worked example H01 without its first digit is 500 km too short', () => {
  const {E = 0, N = 0} = signature('H01').inputs;
  const expected = seenFrom(site, grid.inverse({eastingM: E - 500_000, northingM: N}));
  expect(nearestM(predictionsOf(leadingDigits, bareInput()), expected)).toBeLessThan(1e-4);
});

test('property: a mark that lost 5 500 000 m of its northing', () => {
  const {E = 0, N = 0} = signature('H01').inputs;
  const expected = seenFrom(site, grid.inverse({eastingM: E, northingM: N - 5_500_000}));
  expect(nearestM(predictionsOf(leadingDigits, bareInput()), expected)).toBeLessThan(1e-4);
});

test('needs a grid', () => {
  expect(reasonOf(leadingDigits, bareInput({markPlan: null}))).toBe('no-grid');
});
