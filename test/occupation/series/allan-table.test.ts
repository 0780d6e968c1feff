import {describe, expect, test} from 'vitest';
import {allanTable} from '../../../src/occupation/series/allan-table.ts';
import {randomFrom} from '../../simulate/random.ts';

function columnsOf(gpsSeconds: readonly number[], hasUp = true) {
  const random = randomFrom(7, 'allan');
  const noise = () => Float64Array.from(gpsSeconds, () => 0.01 * random.normal());
  return {
    count: gpsSeconds.length,
    gpsSeconds: Float64Array.from(gpsSeconds),
    eastM: noise(),
    northM: noise(),
    upM: noise(),
    hasUp,
  };
}

const seconds = (count: number, from = 0) => Array.from({length: count}, (_, i) => from + i);

describe('allanTable', () => {
  test('white noise halves from row to row, within its own scatter', () => {
    const table = allanTable(columnsOf(seconds(40_000)), 1)!;
    expect(table.epochs).toBe(40_000);
    expect(table.averagedS.slice(0, 4)).toEqual([1, 4, 16, 64]);
    const east = table.deviationM.east!;
    expect(Math.abs(east[0]! / 0.01 - 1)).toBeLessThan(0.02);
    for (let k = 1; k < 5; k++)
      expect(Math.abs((2 * east[k]!) / east[k - 1]! - 1)).toBeLessThan(0.1);
  });

  test('the longest stretch without a hole counts', () => {
    const table = allanTable(
      columnsOf([...seconds(100), ...seconds(300, 150), ...seconds(80, 500)]),
      1,
    );
    expect(table?.epochs).toBe(300);
  });

  test('no up without heights, and no table of a few epochs or of no interval', () => {
    expect(allanTable(columnsOf(seconds(200), false), 1)?.deviationM.up).toBeNull();
    expect(allanTable(columnsOf(seconds(63)), 1)).toBeNull();
    expect(allanTable(columnsOf(seconds(200)), null)).toBeNull();
  });
});
