import {describe, expect, test} from 'vitest';
import {allanDeviation} from '../../src/statistics/allan.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly statistic: string;
  readonly averaging_factors: readonly number[];
  readonly published: readonly string[];
}
interface Sp1065 {
  readonly generator: {readonly n0: number; readonly last_n: number};
  readonly nine_point: {readonly frequency: readonly number[]; readonly table: readonly Row[]};
  readonly thousand_point: {readonly table: readonly Row[]};
}

const reference = readReference<Sp1065>('b2_allan_sp1065');

/** n[i+1] = 16807 n[i] mod 2147483647, equation 73 of the handbook. */
function thousandPoints(): Float64Array {
  const values = new Float64Array(1000);
  let n = reference.generator.n0;
  for (let i = 0; i < 1000; i++) {
    values[i] = n / 2147483647;
    if (i < 999) n = (16807 * n) % 2147483647;
  }
  expect(n).toBe(reference.generator.last_n);
  return values;
}

/** The value with as many significant digits as the handbook prints. */
function printed(value: number, like: string): number {
  const digits = like.replace(/e.*$/i, '').replace(/[.-]/g, '').replace(/^0+/, '').length;
  return Number(value.toPrecision(digits));
}

const KINDS = {ADEV: 'plain', OADEV: 'overlapping'} as const;

describe('reference: NIST SP 1065 (2008), section 12, all printed digits', () => {
  const sets = [
    ['nine points', Float64Array.from(reference.nine_point.frequency), reference.nine_point.table],
    ['thousand points', thousandPoints(), reference.thousand_point.table],
  ] as const;

  test.each(sets)('%s', (_, values, table) => {
    const rows = table.filter(({statistic}) => statistic in KINDS);
    expect(rows).toHaveLength(2);
    for (const {statistic, averaging_factors, published} of rows) {
      averaging_factors.forEach((factor, i) => {
        const kind = KINDS[statistic as keyof typeof KINDS];
        const {deviation} = allanDeviation(values, factor, kind)!;
        expect(printed(deviation, published[i]!)).toBe(Number(published[i]));
      });
    }
  });
});

test('edges: too short a record, and a factor that is none', () => {
  expect(allanDeviation(Float64Array.of(1, 2, 3), 2, 'plain')).toBeUndefined();
  expect(() => allanDeviation(Float64Array.of(1, 2), 0, 'plain')).toThrow(RangeError);
});

test('property: an offset and a linear phase change nothing but by rounding', () => {
  const values = thousandPoints();
  const moved = values.map((value) => value + 6_378_137);
  const [a, b] = [values, moved].map((v) => allanDeviation(v, 10, 'overlapping')!.deviation);
  expect(b! / a!).toBeCloseTo(1, 7);
});
