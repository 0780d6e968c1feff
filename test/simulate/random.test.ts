import {describe, expect, test} from 'vitest';
import {randomFrom, xoshiro128} from './random.ts';

describe('random numbers', () => {
  // The first outputs of xoshiro128starstar.c, version 1.1 (Blackman & Vigna, prng.di.unimi.it),
  // from state {1, 2, 3, 4}, as printed in the tests of the Rust crate rand_xoshiro.
  test('reference: xoshiro128** of Blackman and Vigna', () => {
    const next = xoshiro128([1, 2, 3, 4]);
    const words = Array.from({length: 10}, next);
    expect(words).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597,
      4258142804,
    ]);
  });

  test('property: normal deviates have the moments of the normal distribution', () => {
    const random = randomFrom(7, 'moments');
    const n = 400_000;
    let [first, second, third, fourth] = [0, 0, 0, 0];
    for (let i = 0; i < n; i++) {
      const z = random.normal();
      first += z;
      second += z * z;
      third += z ** 3;
      fourth += z ** 4;
    }
    // Four standard errors each: the variances of the powers are 1, 2, 15 and 96.
    expect(Math.abs(first / n)).toBeLessThan(4 * Math.sqrt(1 / n));
    expect(Math.abs(second / n - 1)).toBeLessThan(4 * Math.sqrt(2 / n));
    expect(Math.abs(third / n)).toBeLessThan(4 * Math.sqrt(15 / n));
    expect(Math.abs(fourth / n - 3)).toBeLessThan(4 * Math.sqrt(96 / n));
  });

  test('property: uniform numbers fill twenty boxes evenly', () => {
    const random = randomFrom(8, 'boxes');
    const n = 200_000;
    const boxes = new Array<number>(20).fill(0);
    for (let i = 0; i < n; i++) boxes[Math.floor(20 * random.uniform())]! += 1;
    const expected = n / 20;
    const chiSquare = boxes.reduce((sum, box) => sum + (box - expected) ** 2 / expected, 0);
    // Chi-square of 19 degrees: 43.8 is exceeded once in a thousand.
    expect(chiSquare).toBeLessThan(43.8);
  });

  test('property: a seed repeats, neighbouring seeds and other purposes are uncorrelated', () => {
    const n = 100_000;
    const draw = (seed: number, purpose: string) => {
      const random = randomFrom(seed, purpose);
      return Float64Array.from({length: n}, () => random.normal());
    };
    const base = draw(1, 'east');
    expect(draw(1, 'east')).toEqual(base);
    for (const other of [draw(2, 'east'), draw(1, 'north'), draw(4294967297, 'east')]) {
      const product = base.reduce((sum, value, i) => sum + value * other[i]!, 0);
      expect(Math.abs(product / n)).toBeLessThan(4 / Math.sqrt(n));
    }
  });
});
