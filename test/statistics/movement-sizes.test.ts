import {describe, expect, test} from 'vitest';
import {fitModels} from '../../src/statistics/model-fits.ts';
import {
  movementSizes,
  settlingRegressor,
  stepRegressor,
} from '../../src/statistics/movement-sizes.ts';
import {timeCells} from '../../src/statistics/time-cells.ts';
import {randomFrom} from '../simulate/random.ts';

const COUNT = 1600;
const SIGMA = 0.003;

function record(seed: number, east: (i: number) => number) {
  const elapsedS = Float64Array.from({length: COUNT}, (_, i) => i);
  const components = [0, 1].map((c) => {
    const random = randomFrom(seed, `sizes ${c}`);
    return Float64Array.from(
      {length: COUNT},
      (_, i) => SIGMA * random.normal() + (c === 0 ? east(i) : 0),
    );
  });
  return timeCells(elapsedS, components, 1);
}

describe('sizes of movements', () => {
  test('property: three planted steps, errors as large as they say', () => {
    // Epochs 400, 805 and 1203: on the edge of a cell and within two of them.
    const steps = [
      [400, 0.01],
      [805, -0.004],
      [1203, 0.006],
    ] as const;
    const deviates: number[] = [];
    for (let seed = 0; seed < 20; seed++) {
      const cells = record(seed, (i) =>
        steps.reduce((sum, [at, size]) => sum + (i >= at ? size : 0), 0),
      );
      const regressors = steps.map(([at]) => stepRegressor(cells, at / cells.widthS));
      const [east, north] = movementSizes(cells, fitModels(cells), regressors, 'plan');
      steps.forEach(([, size], k) => {
        deviates.push((east!.sizes[k]! - size) / east!.standardErrors[k]!);
        deviates.push(north!.sizes[k]! / north!.standardErrors[k]!);
      });
    }
    const within = deviates.filter((z) => Math.abs(z) <= 1.96).length / deviates.length;
    expect(within).toBeGreaterThanOrEqual(0.9);
    // Errors that are honest give one; the models that allow for slow noise make them larger.
    const square = deviates.reduce((sum, z) => sum + z * z, 0) / deviates.length;
    expect(square).toBeLessThan(1.4);
    expect(square).toBeGreaterThan(0.3);
  });

  test('property: settling by its size at the start', () => {
    for (let seed = 0; seed < 10; seed++) {
      const cells = record(seed, (i) => 0.02 * Math.exp(-i / (0.12 * COUNT)));
      const [east, north] = movementSizes(
        cells,
        fitModels(cells),
        [settlingRegressor(cells, 0.12)],
        'plan',
      );
      expect(Math.abs(east!.sizes[0]! - 0.02)).toBeLessThanOrEqual(4 * east!.standardErrors[0]!);
      expect(Math.abs(north!.sizes[0]!)).toBeLessThanOrEqual(4 * north!.standardErrors[0]!);
      expect(east!.standardErrors[0]!).toBeLessThan(0.002);
    }
  });

  test('property: without noise to speak of the sizes are exact', () => {
    const elapsedS = Float64Array.from({length: COUNT}, (_, i) => i);
    const random = randomFrom(1, 'no noise to speak of');
    const east = elapsedS.map((t) => 7 + (t < 805 ? 0 : 3) + 1e-9 * random.normal());
    const cells = timeCells(elapsedS, [east], 1);
    const [sized] = movementSizes(
      cells,
      fitModels(cells),
      [stepRegressor(cells, 805 / cells.widthS)],
      'none',
    );
    expect(sized!.sizes[0]!).toBeCloseTo(3, 8);
  });

  test('two steps in one cell are told apart by nothing, and stay finite', () => {
    const cells = record(3, (i) => (i < 800 ? 0 : 0.01));
    const regressor = stepRegressor(cells, 80);
    const [east] = movementSizes(cells, fitModels(cells), [regressor, regressor], 'plan');
    expect(east!.sizes[0]! + east!.sizes[1]!).toBeCloseTo(0.01, 3);
    expect(east!.standardErrors.every(Number.isFinite)).toBe(true);
  });
});

describe('regressors', () => {
  const cells = record(1, () => 0);

  test('a step takes the part of its cell that comes after it', () => {
    const regressor = stepRegressor(cells, 10.25);
    expect([...regressor.subarray(8, 13)]).toEqual([0, 0, 0.75, 1, 1]);
  });

  test('settling starts at one and falls by e each time constant', () => {
    const regressor = settlingRegressor(cells, 0.25);
    expect(regressor[0]).toBe(1);
    expect(regressor[40]! * Math.E).toBeCloseTo(1, 12);
  });
});
