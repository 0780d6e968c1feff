import {describe, expect, test} from 'vitest';
import {
  chiSquareCdf,
  chiSquareQuantile,
  chiSquareTail,
  fisherCdf,
  fisherQuantile,
  fisherTail,
  normalCdf,
  normalQuantile,
  normalWithin,
  studentCdf,
  studentQuantile,
  studentWithin,
} from '../../src/statistics/distribution.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly p: string;
  readonly q: string;
  readonly df?: number;
  readonly df1?: number;
  readonly df2?: number;
}
interface Quantiles {
  readonly tables: Readonly<Record<'normal' | 'chi2' | 't' | 'F', readonly Row[]>>;
}

const {tables} = readReference<Quantiles>('b4_quantiles');
const BOUND = 1e-10;

function worst(rows: readonly Row[], quantile: (row: Row) => number): number {
  return rows.reduce((largest, row) => {
    const exact = Number(row.q);
    const found = quantile(row);
    return Math.max(largest, Math.abs(found - exact) / (exact === 0 ? 1 : Math.abs(exact)));
  }, 0);
}

describe('reference: quantiles by mpmath at 40 digits, ≤ 1e-10 relative, every row', () => {
  test('the tables are whole', () => {
    expect(Object.values(tables).map((rows) => rows.length)).toEqual([17, 476, 200, 924]);
  });

  test('normal', () => {
    expect(worst(tables.normal, ({p}) => normalQuantile(Number(p)))).toBeLessThanOrEqual(BOUND);
  });

  test('chi-square', () => {
    expect(worst(tables.chi2, ({p, df}) => chiSquareQuantile(Number(p), df!))).toBeLessThanOrEqual(
      BOUND,
    );
  });

  test('Student', () => {
    expect(worst(tables.t, ({p, df}) => studentQuantile(Number(p), df!))).toBeLessThanOrEqual(
      BOUND,
    );
  });

  test("Fisher's F", () => {
    expect(
      worst(tables.F, ({p, df1, df2}) => fisherQuantile(Number(p), df1!, df2!)),
    ).toBeLessThanOrEqual(BOUND);
  });
});

describe('probabilities', () => {
  test('property: a quantile put back gives its probability', () => {
    for (const p of [0.001, 0.025, 0.3, 0.5, 0.8, 0.975, 0.999]) {
      expect(normalCdf(normalQuantile(p))).toBeCloseTo(p, 12);
      expect(studentCdf(studentQuantile(p, 5), 5)).toBeCloseTo(p, 12);
      expect(chiSquareCdf(chiSquareQuantile(p, 3), 3)).toBeCloseTo(p, 12);
      expect(fisherCdf(fisherQuantile(p, 3, 12), 3, 12)).toBeCloseTo(p, 12);
    }
  });

  test('property: both sides make one, in far tails too', () => {
    expect(chiSquareTail(5.991464547107979, 2)).toBeCloseTo(0.05, 12);
    expect(chiSquareCdf(2, 4) + chiSquareTail(2, 4)).toBeCloseTo(1, 14);
    expect(fisherCdf(2.5, 3, 40) + fisherTail(2.5, 3, 40)).toBeCloseTo(1, 14);
    // e^(−x/2) is the exact tail of chi-square with two degrees of freedom.
    expect(chiSquareTail(200, 2) / Math.exp(-100)).toBeCloseTo(1, 10);
  });

  test('within a limit: the centred normal, the Cauchy distribution, a certain value', () => {
    expect(normalWithin(1.959963984540054, 0, 1)).toBeCloseTo(0.95, 12);
    expect(normalWithin(1, 5, 0)).toBe(0);
    expect(normalWithin(5, 1, 0)).toBe(1);
    // Student with one degree of freedom is Cauchy: P(|X| ≤ 1) = 1/2.
    expect(studentWithin(1, 0, 1, 1)).toBeCloseTo(0.5, 12);
    expect(studentWithin(2, 1, 0.5, 1e9)).toBeCloseTo(normalWithin(2, 1, 0.5), 7);
  });

  test('a probability outside 0 to 1 is refused', () => {
    expect(() => normalQuantile(1.2)).toThrow(RangeError);
    expect(() => studentQuantile(0, 4)).toThrow(RangeError);
  });
});
