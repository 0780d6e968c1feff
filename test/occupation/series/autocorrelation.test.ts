import {describe, expect, test} from 'vitest';
import {autocorrelationOf} from '../../../src/occupation/series/autocorrelation.ts';
import {randomOf} from '../../report/fixtures.ts';

function columnsOf(eastM: Float64Array, gpsSeconds = Float64Array.from(eastM, (_, i) => i)) {
  return {count: eastM.length, gpsSeconds, eastM, northM: eastM, upM: eastM, hasUp: false};
}

/** A first-order autoregressive series of n values, unit variance, driven by uniform noise. */
function autoregressive(n: number, phi: number, seed: number): Float64Array {
  const random = randomOf(seed);
  const values = new Float64Array(n);
  let value = 0;
  for (let i = 0; i < 1000 + n; i++) {
    value = phi * value + Math.sqrt(12 * (1 - phi * phi)) * (random() - 0.5);
    if (i >= 1000) values[i - 1000] = value;
  }
  return values;
}

describe('autocorrelationOf', () => {
  test('reference: phi to the power of the lag (Box, Jenkins & Reinsel, AR(1))', () => {
    const phi = 0.98;
    const found = autocorrelationOf(columnsOf(autoregressive(400_000, phi, 7)), 1)!;
    found.lagS.forEach((lag, k) => {
      // Bartlett: standard error about sqrt((1 + phi²)/(1 − phi²)/n), 0.016 here; three of them.
      if (lag <= 200) expect(found.value.east![k]!).toBeCloseTo(phi ** lag, 1);
      if (lag <= 200) expect(Math.abs(found.value.east![k]! - phi ** lag)).toBeLessThan(0.048);
    });
  });

  test('property: holes in the record do not move it', () => {
    const whole = autoregressive(50_000, 0.9, 11);
    const kept = Float64Array.from(whole).filter((_, i) => i % 7 !== 3);
    const times = Float64Array.from(whole, (_, i) => i).filter((_, i) => i % 7 !== 3);
    const a = autocorrelationOf(columnsOf(whole), 1)!;
    const b = autocorrelationOf(columnsOf(kept, times), 1)!;
    a.lagS.slice(0, 20).forEach((lag, k) => {
      expect(b.lagS[k]).toBe(lag);
      expect(Math.abs(a.value.east![k]! - b.value.east![k]!)).toBeLessThan(0.03);
    });
  });

  test('too few epochs, no interval, no scatter or hardly any epoch in the grid: none', () => {
    expect(autocorrelationOf(columnsOf(new Float64Array(39)), 1)).toBeNull();
    expect(autocorrelationOf(columnsOf(autoregressive(100, 0, 1)), null)).toBeNull();
    expect(autocorrelationOf(columnsOf(new Float64Array(100).fill(1.1)), 1)).toBeNull();
    const sparse = Float64Array.from({length: 100}, (_, i) => i * 100);
    expect(autocorrelationOf(columnsOf(autoregressive(100, 0, 1), sparse), 1)).toBeNull();
  });
});
