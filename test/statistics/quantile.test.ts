import {describe, expect, test} from 'vitest';
import {median, quantile, quantiles} from '../../src/statistics/quantile.ts';
import {randomFrom} from '../simulate/random.ts';

describe('quantiles by selection', () => {
  test('property: agree with a full sort, interpolated between order statistics', () => {
    const random = randomFrom(1, 'quantiles');
    for (const count of [1, 2, 3, 10, 101, 5000]) {
      const values = Float64Array.from({length: count}, () => random.normal());
      const before = values.slice();
      const sorted = values.slice().sort();
      for (const p of [0, 0.05, 0.25, 0.5, 0.731, 0.95, 1]) {
        const at = p * (count - 1);
        const low = sorted[Math.floor(at)]!;
        const high = sorted[Math.ceil(at)]!;
        expect(quantile(values, p)).toBeCloseTo(low + (at - Math.floor(at)) * (high - low), 12);
      }
      expect(values).toEqual(before);
    }
  });

  test('equal and few values, several at once', () => {
    expect(median(Float64Array.of(4, 4, 4, 4))).toBe(4);
    expect(median(Float64Array.of(3, 1, 2))).toBe(2);
    expect(quantiles(Float64Array.of(1, 2, 3, 4, 5), [0.25, 0.75])).toEqual([2, 4]);
  });

  test('what has no order is refused', () => {
    expect(() => median(Float64Array.of(1, Number.NaN))).toThrow(RangeError);
    expect(() => median(new Float64Array(0))).toThrow(RangeError);
    expect(() => quantile(Float64Array.of(1), 1.5)).toThrow(RangeError);
  });
});
