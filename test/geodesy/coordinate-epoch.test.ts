import {expect, test} from 'vitest';
import {checkedCoordinateEpoch, parseCoordinateEpoch} from '../../src/geodesy/coordinate-epoch.ts';

test('decimal years are read', () => {
  expect(parseCoordinateEpoch('2010.0')).toBe(2010);
  expect(parseCoordinateEpoch(' 2026.34 ')).toBe(2026.34);
  expect(parseCoordinateEpoch('1989')).toBe(1989);
});

test.each([
  ['2026-05-04', /as a decimal year, such as 2026.34, found the date/],
  ['now', /as a decimal year, such as 2020.0, found "now"/],
  ['', /as a decimal year/],
  ['26.3', /as a decimal year/],
  ['1975.0', /between 1980 and 2040/],
  ['2041', /between 1980 and 2040/],
])('%s is refused', (text, message) => {
  expect(() => parseCoordinateEpoch(text)).toThrow(message);
});

test('NaN is no epoch', () => {
  expect(() => checkedCoordinateEpoch(Number.NaN)).toThrow(/between 1980 and 2040/);
});
