import {describe, expect, test} from 'vitest';
import {covariance, lagOneAutocorrelation, mean, moments} from '../../src/statistics/moments.ts';
import {readReference} from '../reference/read.ts';

interface Strd {
  readonly univariate: readonly {
    readonly name: string;
    readonly certified: {
      readonly mean: string;
      readonly sd: string;
      readonly lag1_autocorrelation: string;
    };
    readonly data: readonly string[];
  }[];
}

const {univariate} = readReference<Strd>('b1_nist_strd');

/** Certified digits that a value agrees with: the log relative error of the NIST StRD. */
function digits(value: number, certified: string): number {
  const exact = Number(certified);
  if (value === exact) return 17;
  return -Math.log10(Math.abs(value - exact) / (exact === 0 ? 1 : Math.abs(exact)));
}

/** The leading digits of these sets are lost when the input is rounded to a double. */
const HARDEST = ['NumAcc3', 'NumAcc4'];

describe('mean and standard deviation', () => {
  test('the reference holds the nine univariate sets', () => {
    expect(univariate.map(({name}) => name)).toHaveLength(9);
  });

  test.each(univariate)(
    'reference: NIST StRD, $name: ≥ 13 certified digits (≥ 8 for NumAcc3 and NumAcc4)',
    ({name, certified, data}) => {
      const found = moments(Float64Array.from(data, Number))!;
      const least = HARDEST.includes(name) ? 8 : 13;
      expect(digits(found.mean, certified.mean)).toBeGreaterThanOrEqual(13);
      expect(digits(found.standardDeviation!, certified.sd)).toBeGreaterThanOrEqual(least);
    },
  );

  test.each(univariate)(
    'reference: NIST StRD, $name: lag-1 autocorrelation, ≥ 9 digits',
    ({name, certified, data}) => {
      const lag1 = lagOneAutocorrelation(Float64Array.from(data, Number))!;
      expect(digits(lag1, certified.lag1_autocorrelation)).toBeGreaterThanOrEqual(
        HARDEST.includes(name) ? 8 : 9,
      );
    },
  );

  test('property: a huge offset changes the spread by nothing that matters', () => {
    const small = Float64Array.from({length: 1000}, (_, i) => Math.sin(i) * 0.001);
    const large = small.map((value) => value + 6_378_137);
    const [near, far] = [moments(small)!, moments(large)!];
    expect(far.standardDeviation! / near.standardDeviation!).toBeCloseTo(1, 6);
    expect(far.mean - 6_378_137).toBeCloseTo(near.mean, 8);
  });

  test('edges: nothing, one value, a mask', () => {
    expect(moments(new Float64Array(0))).toBeUndefined();
    expect(moments(Float64Array.of(3))!.standardDeviation).toBeUndefined();
    expect(mean(Float64Array.of(1, 2, 9), Uint8Array.of(1, 1, 0))).toBe(1.5);
    expect(mean(new Float64Array(0))).toBeUndefined();
    expect(lagOneAutocorrelation(Float64Array.of(2, 2, 2))).toBeUndefined();
  });

  test('covariance of a line with itself and with its mirror', () => {
    const line = Float64Array.of(1, 2, 3, 4);
    const mirror = line.map((value) => -2 * value);
    expect(covariance(line, line)).toBeCloseTo(5 / 3, 14);
    expect(covariance(line, mirror)).toBeCloseTo(-10 / 3, 14);
    expect(covariance(Float64Array.of(1), Float64Array.of(1))).toBeUndefined();
  });
});
