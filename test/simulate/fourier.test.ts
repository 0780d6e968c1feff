import {expect, test} from 'vitest';
import {convolveTail} from './fourier.ts';
import {randomFrom} from './random.ts';

test.each([
  [7, 7],
  [64, 10],
  [100, 1],
  [129, 129],
])(
  'property: the last samples of a convolution of %i equal the sum by definition',
  (total, wanted) => {
    const random = randomFrom(total, 'convolution');
    const signal = Float64Array.from({length: total}, () => random.normal());
    const kernel = Float64Array.from({length: total}, () => random.normal());
    const fast = convolveTail(signal, kernel, wanted);
    expect(fast.length).toBe(wanted);
    for (let k = 0; k < wanted; k++) {
      const at = total - wanted + k;
      let sum = 0;
      for (let j = 0; j <= at; j++) sum += kernel[j]! * signal[at - j]!;
      expect(Math.abs(fast[k]! - sum)).toBeLessThan(1e-11);
    }
  },
);
