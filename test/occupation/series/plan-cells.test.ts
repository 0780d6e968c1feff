import {describe, expect, test} from 'vitest';
import {histogramOf} from '../../../src/occupation/series/histogram.ts';
import {planCells} from '../../../src/occupation/series/plan-cells.ts';
import {randomOf} from '../../report/fixtures.ts';

const NO_RESOLUTION = {east: null, north: null, up: null};

function cloud(scaleM: number, stepM: number, count = 5000) {
  const random = randomOf(5);
  const values = () =>
    Float64Array.from({length: count}, () => {
      const sum = random() + random() + random() + random() - 2;
      return Math.round((sum * scaleM) / stepM) * stepM;
    });
  const eastM = values();
  const northM = values();
  return {
    count,
    gpsSeconds: Float64Array.from(eastM, (_, i) => i),
    eastM,
    northM,
    upM: eastM,
    hasUp: true,
  };
}

describe('planCells', () => {
  test('property: a cloud a thousand times as wide has cells a thousand times as wide', () => {
    const small = planCells(cloud(0.005, 1e-6), NO_RESOLUTION)!;
    const large = planCells(cloud(5, 1e-3), NO_RESOLUTION)!;
    expect(large.cellEastM / small.cellEastM).toBeCloseTo(1000, 6);
    expect(small.columns).toBeGreaterThan(25);
    expect(small.columns).toBeLessThan(140);
  });

  test('each epoch lies in the cell that counts it', () => {
    const columns = cloud(0.005, 1e-6, 50);
    const cells = planCells(columns, NO_RESOLUTION)!;
    const counted = new Map(
      cells.column.map((column, i) => [`${column},${cells.row[i]}`, cells.count[i]!]),
    );
    for (let i = 0; i < columns.count; i++) {
      const column = Math.floor((columns.eastM[i]! - cells.originEastM) / cells.cellEastM);
      const row = Math.floor((columns.northM[i]! - cells.originNorthM) / cells.cellNorthM);
      const key = `${column},${row}`;
      counted.set(key, (counted.get(key) ?? 0) - 1);
    }
    expect([...counted.values()].every((left) => left === 0)).toBe(true);
  });

  test('the steps of a coarse log make no pattern: cells hold equally many of them', () => {
    const stepM = 0.0018;
    const cells = planCells(cloud(0.03, stepM), {east: stepM, north: stepM, up: null})!;
    const steps = cells.cellEastM / stepM;
    expect(Math.abs(steps - Math.round(steps))).toBeLessThan(1e-9);
  });

  test('a single epoch has one cell in a frame of millimetres', () => {
    const cells = planCells(cloud(0.005, 1e-6, 1), NO_RESOLUTION)!;
    expect(cells.count).toEqual([1]);
    expect(cells.columns * cells.cellEastM).toBeLessThan(0.01);
  });

  test('no epoch, no cells', () => {
    expect(planCells(cloud(1, 1, 0), NO_RESOLUTION)).toBeNull();
  });
});

describe('histogramOf', () => {
  test('counts, mean and deviation are those of the values', () => {
    const values = Float64Array.from([0.001, 0.002, 0.002, 0.003]);
    const histogram = histogramOf(values, null)!;
    expect(histogram.counts.reduce((a, b) => a + b, 0) + histogram.outside).toBe(4);
    expect(histogram.meanM).toBeCloseTo(0.002, 12);
    expect(histogram.standardDeviationM).toBeCloseTo(Math.sqrt(2e-6 / 3), 12);
  });

  test('equal values stand in one bin', () => {
    const histogram = histogramOf(new Float64Array(10).fill(0.5), 0.001)!;
    expect(histogram.counts.filter((count) => count > 0)).toEqual([10]);
  });

  test('no values, no histogram', () => {
    expect(histogramOf(new Float64Array(0), null)).toBeNull();
  });
});
