import {describe, expect, test} from 'vitest';
import {geoidUndulationM} from '../../src/geodesy/geoid-grid.ts';
import {parseIsg} from '../../src/geodesy/geoid-isg.ts';
import {geoidWindow, windowGrid} from './geoid-window.ts';

const grid = windowGrid();

/** The window as an ISG file: values row by row or column by column, in any of the orders. */
function isgText(header: readonly string[], ordering: string): string {
  const [outer, inner] = ordering.split(', ');
  const rows = Array.from({length: grid.rowCount}, (_, row) => row);
  const columns = Array.from({length: grid.columnCount}, (_, column) => column);
  const axisOf = (part: string | undefined) => {
    if (part === 'S-to-N') return {isRow: true, order: rows};
    if (part === 'N-to-S') return {isRow: true, order: rows.toReversed()};
    if (part === 'W-to-E') return {isRow: false, order: columns};
    return {isRow: false, order: columns.toReversed()};
  };
  const [first, second] = [axisOf(outer), axisOf(inner)];
  const lines = first.order.map((i) =>
    second.order
      .map((j) => {
        const [row, column] = first.isRow ? [i, j] : [j, i];
        return (grid.undulationM[row * grid.columnCount + column] ?? Number.NaN).toFixed(4);
      })
      .join(' '),
  );
  return ['begin_of_head ====', ...header, 'end_of_head ======', ...lines, ''].join('\n');
}

const VERSION_2 = [
  'model name : EGM96 window',
  'data type : geoid',
  'data units : meters',
  'data format : grid',
  'coord type : geodetic',
  'coord units : deg',
  'lat min = 44.0000',
  'lat max = 49.0000',
  'lon min = 5.0000',
  'lon max = 12.0000',
  'delta lat = 0.2500',
  'delta lon = 0.2500',
  'nrows = 21',
  'ncols = 29',
  'nodata = -9999.0000',
  'ISG format = 2.0',
];
const VERSION_2_DMS = VERSION_2.map((line) =>
  line
    .replace('coord units : deg', 'coord units : dms')
    .replace(/^(l.. m.. = )(\d+)\.0000$/, `$1$2°00'00"`)
    .replace('= 0.2500', `= 0°15'00"`),
);
const VERSION_1 = [
  'model name : EGM96 window',
  'units : meters',
  'lat min = 43.875',
  'lat max = 49.125',
  'lon min = 4.875',
  'lon max = 12.125',
  'delta lat = 0.25',
  'delta lon = 0.25',
  'nrows = 21',
  'ncols = 29',
  'nodata = -9999.0000',
  'ISG format = 1.0',
];

function largestDifferenceM(text: string): number {
  const parsed = parseIsg(text, 'window.isg');
  if (parsed.kind === 'refused') throw new Error(parsed.message);
  return Math.max(
    ...geoidWindow.points.map(([latitudeDeg, longitudeDeg, undulationM]) => {
      const found = geoidUndulationM(parsed.grid, {latitudeDeg, longitudeDeg}, 'bilinear');
      return Math.abs((found ?? Number.NaN) - undulationM);
    }),
  );
}

describe('geoid grids of the International Service for the Geoid', () => {
  test.each([
    'N-to-S, W-to-E',
    'S-to-N, W-to-E',
    'N-to-S, E-to-W',
    'S-to-N, E-to-W',
    'W-to-E, N-to-S',
    'W-to-E, S-to-N',
    'E-to-W, N-to-S',
    'E-to-W, S-to-N',
  ])('reference: PROJ 9.1.1 within 0.1 mm, ordering %s', (ordering) => {
    const header = [...VERSION_2, `data ordering : ${ordering}`];
    expect(largestDifferenceM(isgText(header, ordering))).toBeLessThan(1e-4);
  });

  test('reference: the same in degrees, minutes and seconds, and in version 1.0 by cell edges', () => {
    const ordering = 'N-to-S, W-to-E';
    expect(largestDifferenceM(isgText(VERSION_2_DMS, ordering))).toBeLessThan(1e-4);
    expect(largestDifferenceM(isgText(VERSION_1, ordering))).toBeLessThan(1e-4);
    const windows = isgText(VERSION_2, ordering).replaceAll('\n', '\r\n');
    expect(largestDifferenceM(windows)).toBeLessThan(1e-4);
  });

  test('a step printed with few digits is replaced by what the bounds say', () => {
    const header = VERSION_2.map((line) => line.replace('= 0.2500', '= 0.2496'));
    expect(largestDifferenceM(isgText(header, 'N-to-S, W-to-E'))).toBeLessThan(1e-4);
  });

  test('the header names the model, and nodata means no value', () => {
    const text = isgText(VERSION_2, 'N-to-S, W-to-E').replace(
      (grid.undulationM[20 * 29] ?? 0).toFixed(4),
      '-9999.0000',
    );
    const parsed = parseIsg(text, 'window.isg');
    if (parsed.kind === 'refused') throw new Error(parsed.message);
    expect(parsed.grid.name).toBe('EGM96 window');
    expect(parsed.grid.undulationM[20 * 29]).toBeNaN();
  });

  test.each<[string, (text: string) => string, RegExp]>([
    ['no end of head', (text) => text.replace('end_of_head', 'end'), /need a line "end_of_head"/],
    ['another version', (text) => text.replace('format = 2.0', 'format = 3.0'), /found "3.0"/],
    ['scattered points', (text) => text.replace(': grid', ': sparse'), /need data format grid/],
    ['projected', (text) => text.replace(': geodetic', ': projected'), /need coord type geodetic/],
    ['feet', (text) => text.replace(': meters', ': feet'), /need data units meters, found "feet"/],
    ['no rows', (text) => text.replace('nrows = 21', 'nrows = 0'), /need nrows of at least 2/],
    [
      'no bounds',
      (text) => text.replace('lat min = 44.0000', ''),
      /lat min in degrees, found "nothing"/,
    ],
    ['bounds in words', (text) => text.replace('= 44.0000', '= south'), /found "south"/],
    ['wrong bounds', (text) => text.replace('= 49.0000', '= 48.0000'), /bounds that fit 21 nodes/],
    ['a value missing', (text) => text.trim().replace(/\S+$/, ''), /need 609 values .* found 608/],
    ['a word among values', (text) => text.trim().replace(/\S+$/, 'x'), /need numbers/],
    [
      'a strange ordering',
      (text) => text.replace('end_of_head', 'data ordering : N-to-S, N-to-S\nend_of_head'),
      /need a data ordering such as/,
    ],
  ])('%s is refused', (_name, spoil, message) => {
    const parsed = parseIsg(spoil(isgText(VERSION_2, 'N-to-S, W-to-E')), 'window.isg');
    expect(parsed.kind === 'refused' ? parsed.message : 'accepted').toMatch(message);
  });
});
