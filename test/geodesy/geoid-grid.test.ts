import {describe, expect, test} from 'vitest';
import {type GeoidGrid, geoidUndulationM} from '../../src/geodesy/geoid-grid.ts';
import {randomFrom} from '../simulate/random.ts';
import {geoidWindow, windowGrid} from './geoid-window.ts';

/** A grid of a function of row and column. */
function gridOf(
  rowCount: number,
  columnCount: number,
  stepDeg: number,
  undulation: (row: number, column: number) => number,
): GeoidGrid {
  const undulationM = new Float32Array(rowCount * columnCount);
  for (let row = 0; row < rowCount; row++) {
    for (let column = 0; column < columnCount; column++) {
      undulationM[row * columnCount + column] = undulation(row, column);
    }
  }
  return {
    name: 'made up',
    southDeg: -10,
    westDeg: 0,
    latitudeStepDeg: stepDeg,
    longitudeStepDeg: stepDeg,
    rowCount,
    columnCount,
    undulationM,
  };
}

describe('geoid undulation', () => {
  test('reference: EGM96 at 200 places, PROJ 9.1.1 vgridshift, within 0.1 mm', () => {
    const grid = windowGrid();
    expect(geoidWindow.points).toHaveLength(200);
    for (const [latitudeDeg, longitudeDeg, undulationM] of geoidWindow.points) {
      const found = geoidUndulationM(grid, {latitudeDeg, longitudeDeg}, 'bilinear');
      expect(Math.abs((found ?? Number.NaN) - undulationM)).toBeLessThan(1e-4);
    }
  });

  test('property: biquadratic is exact for a quadratic surface, bilinear for a bilinear one', () => {
    const random = randomFrom(1, 'geoid');
    const quadratic = (row: number, column: number) =>
      40 +
      row * 0.5 -
      column * 0.25 +
      (row * row) / 16 -
      (column * column) / 8 +
      (row * column) / 4;
    const bilinear = (row: number, column: number) => 40 + row * 0.5 - (row * column) / 4;
    const ofSecond = gridOf(9, 12, 0.5, quadratic);
    const ofFirst = gridOf(9, 12, 0.5, bilinear);
    for (let i = 0; i < 500; i++) {
      const row = random.between(0, 8);
      const column = random.between(0, 11);
      const place = {latitudeDeg: -10 + row * 0.5, longitudeDeg: column * 0.5};
      expect(geoidUndulationM(ofSecond, place, 'biquadratic')).toBeCloseTo(
        quadratic(row, column),
        9,
      );
      expect(geoidUndulationM(ofFirst, place, 'bilinear')).toBeCloseTo(bilinear(row, column), 9);
    }
  });

  test('property: both interpolations return the nodes', () => {
    const grid = windowGrid();
    for (const [row, column] of [
      [0, 0],
      [20, 28],
      [7, 13],
      [20, 0],
    ] as const) {
      const place = {
        latitudeDeg: grid.southDeg + row * grid.latitudeStepDeg,
        longitudeDeg: grid.westDeg + column * grid.longitudeStepDeg,
      };
      const node = grid.undulationM[row * grid.columnCount + column] ?? Number.NaN;
      expect(geoidUndulationM(grid, place, 'bilinear')).toBeCloseTo(node, 9);
      expect(geoidUndulationM(grid, place, 'biquadratic')).toBeCloseTo(node, 9);
    }
  });

  test('outside the grid there is no undulation, and the bounds belong to it', () => {
    const grid = windowGrid();
    const at = (latitudeDeg: number, longitudeDeg: number) =>
      geoidUndulationM(grid, {latitudeDeg, longitudeDeg}, 'bilinear');
    expect(at(43.999, 8)).toBeUndefined();
    expect(at(49.001, 8)).toBeUndefined();
    expect(at(46, 4.999)).toBeUndefined();
    expect(at(46, 12.001)).toBeUndefined();
    expect(at(46, 8 - 360)).toBe(at(46, 8));
    expect(at(44, 5)).toBeDefined();
    expect(at(49, 12)).toBeDefined();
    expect(at(Number.NaN, 8)).toBeUndefined();
    expect(at(46, Number.NaN)).toBeUndefined();
    expect(at(46, 5 - 1e-11)).toBeDefined();
  });

  test('a node without a value spoils only the cells that touch it', () => {
    const grid = gridOf(4, 4, 1, (row, column) => (row === 0 && column === 0 ? Number.NaN : 10));
    const at = (latitudeDeg: number, longitudeDeg: number) =>
      geoidUndulationM(grid, {latitudeDeg, longitudeDeg}, 'bilinear');
    expect(at(-9.5, 0.5)).toBeUndefined();
    expect(at(-9.5, 1.5)).toBe(10);
    expect(at(-9, 0.5)).toBe(10);
  });

  test('a grid round the Earth continues across its seam', () => {
    const grid = gridOf(5, 36, 10, (_row, column) => Math.abs(18 - column));
    const at = (longitudeDeg: number, interpolation: 'bilinear' | 'biquadratic') =>
      geoidUndulationM(grid, {latitudeDeg: 5, longitudeDeg}, interpolation);
    expect(at(355, 'bilinear')).toBeCloseTo(17.5, 9);
    expect(at(-5, 'bilinear')).toBeCloseTo(17.5, 9);
    // Through 17, 18, 17 at −10, 0 and 10 degrees: 18 − (λ/10)².
    expect(at(2, 'biquadratic')).toBeCloseTo(18 - 0.04, 9);
    expect(at(358, 'biquadratic')).toBeCloseTo(18 - 0.04, 9);
  });
});
