import {describe, expect, test} from 'vitest';
import {noiseModels} from '../../src/statistics/noise-models.ts';
import {factorOf, whiten} from '../../src/statistics/semiseparable.ts';
import {stepProducts} from '../../src/statistics/step-products.ts';
import {swingModels} from '../../src/statistics/swing-models.ts';
import type {TimeCells} from '../../src/statistics/time-cells.ts';

function cellsAt(index: readonly number[]): TimeCells {
  return {
    widthS: 10,
    spanS: 10 * (index.at(-1)! + 1),
    index: Int32Array.from(index),
    counts: Float64Array.from(index, (cell) => 3 + ((cell * 5) % 7)),
    means: [],
    expected: index.at(-1)! + 1,
  };
}

const RECORDS = [
  {name: 'a record without gaps', cells: cellsAt(Array.from({length: 300}, (_, i) => i))},
  {
    name: 'gaps',
    cells: cellsAt([0, 1, 2, 3, 9, 10, 11, 12, 40, 41, 42, 44, 46, 47, 48, 120, 121, 122]),
  },
] as const;

describe('products of whitened steps are those of steps whitened one by one', () => {
  test.each(RECORDS)('$name, every noise model', ({cells}) => {
    const m = cells.index.length;
    const ones = new Float64Array(m).fill(1);
    const wave = Float64Array.from(cells.index, (cell) => Math.sin(cell / 3) + 0.02 * cell);
    let worst = 0;
    const {widthS, spanS} = cells;
    const swing = {share: 1, periodS: 9 * widthS, dampingS: 14 * widthS};
    const swings = swingModels(widthS, spanS, swing);
    for (const model of [...noiseModels(widthS, spanS), ...swings]) {
      const factor = factorOf(model, cells);
      const columns = [whiten(factor, ones), whiten(factor, wave)];
      const {squares, projections} = stepProducts(factor, columns);
      for (let at = 0; at < m; at++) {
        const step = whiten(
          factor,
          Float64Array.from(ones, (_, n) => (n < at ? 0 : 1)),
        );
        const size = Math.sqrt(product(step, step));
        worst = Math.max(worst, Math.abs(squares[at]! / size ** 2 - 1));
        columns.forEach((column, c) => {
          const bound = size * Math.sqrt(product(column, column));
          const miss = Math.abs(projections[c]![at]! - product(step, column));
          worst = Math.max(worst, miss / bound);
        });
      }
    }
    expect(worst).toBeLessThan(1e-10);
  });
});

function product(a: Float64Array, b: Float64Array): number {
  return a.reduce((sum, value, n) => sum + value * b[n]!, 0);
}
