import {expect, test} from 'vitest';
import {nearestName, nearestNames} from '../../src/fieldbook/nearest-name.ts';

test('reference: distances of Wagner and Fischer (1974) and Damerau (1964) decide what is near', () => {
  // kitten to sitting takes three changes, a textbook pair: too many for seven letters.
  expect(nearestName('kitten', ['sitting'])).toBeUndefined();
  expect(nearestName('kittin', ['kitten'])).toBe('kitten');
  // One swap of neighbours is one change.
  expect(nearestName('mrak', ['mark'])).toBe('mark');
});

test('case, blanks, hyphens and underscores do not count', () => {
  expect(nearestName('Coordinate_Epoch', ['coordinate epoch'])).toBe('coordinate epoch');
});

test('the nearest comes first, and at most three are named', () => {
  expect(nearestNames('PILLAR 4', ['PILLAR 55', 'PILLAR 14', 'BOLT', 'PILLER 4'])).toEqual([
    'PILLAR 14',
    'PILLER 4',
    'PILLAR 55',
  ]);
  expect(nearestNames('P', ['Q1', 'Q2'])).toEqual([]);
  expect(nearestNames('', ['P1'])).toEqual([]);
});
