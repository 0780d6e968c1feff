import {expect, test} from 'vitest';
import {neighbouringZone} from '../../../../src/occupation/diagnosis/hypotheses/h08-neighbouring-zone.ts';
import {bareInput, nearestM, predictionsOf, reasonOf, SITES, signature} from '../check-input.ts';
import {seenFrom} from '../planted.ts';

test('reference: worked examples H08, zone 32 read as 31 and as 33', () => {
  const site = SITES['mid-latitude north'];
  for (const id of ['H08-31', 'H08-33']) {
    const longitudeDeg = signature(id).lon_read ?? 0;
    const expected = seenFrom(site, {latitudeDeg: 50, longitudeDeg});
    expect(nearestM(predictionsOf(neighbouringZone, bareInput()), expected)).toBeLessThan(1e-5);
  }
});

test('zone 1 is the neighbour of zone 60', () => {
  const input = bareInput({markPlan: SITES['near the antimeridian']});
  const zones = predictionsOf(neighbouringZone, input).map(({values}) => values.readAs);
  expect(zones).toEqual([59, 1]);
});

test('Svalbard has every other zone', () => {
  const input = bareInput({markPlan: SITES['high latitude']});
  const zones = predictionsOf(neighbouringZone, input).map(({values}) => values.readAs);
  expect(zones).toEqual([31, 32, 34, 35]);
});

test('UTM ends at 84 degrees', () => {
  expect(
    reasonOf(neighbouringZone, bareInput({markPlan: {latitudeDeg: 87, longitudeDeg: 0}})),
  ).toBe('no-grid');
});

test('needs a plan position', () => {
  expect(reasonOf(neighbouringZone, bareInput({markPlan: null}))).toBe('no-plan');
});
