import {describe, expect, test} from 'vitest';
import {settlingOf} from '../../../src/occupation/series/settling.ts';

function columnsOf(eastM: number[]) {
  const column = Float64Array.from(eastM);
  const gpsSeconds = Float64Array.from(eastM, (_, i) => 50 + i);
  return {count: eastM.length, gpsSeconds, eastM: column, northM: column, upM: column, hasUp: true};
}

describe('settlingOf', () => {
  const ramp = Array.from({length: 1000}, (_, i) => i / 1000);

  test('the mean so far, at times that end with the record', () => {
    const {elapsedS, meanM} = settlingOf(columnsOf(ramp), null)!;
    expect(elapsedS.at(-1)).toBe(999);
    expect(elapsedS.length).toBeLessThanOrEqual(80);
    // The mean of 0 … t is t/2.
    for (const [k, t] of elapsedS.entries()) {
      expect(meanM.east![k]).toBeCloseTo(t / 2000, 9);
    }
  });

  test('the band is that of the given half-widths, or none', () => {
    const half = (elapsedS: number) => ({east: 1 / elapsedS, north: 2 / elapsedS, up: null});
    const {elapsedS, halfWidthM} = settlingOf(columnsOf(ramp), half)!;
    expect(halfWidthM.east).toEqual(elapsedS.map((t) => 1 / t));
    expect(halfWidthM.up).toBeNull();
    expect(settlingOf(columnsOf(ramp), null)!.halfWidthM.east).toBeNull();
  });

  test('the furthest stand of the second half', () => {
    const {secondHalfM} = settlingOf(columnsOf(ramp), null)!;
    // From t/2 at half the record to t/2 at its end, but for the spacing of the points.
    expect(secondHalfM.east!).toBeGreaterThan(0.22);
    expect(secondHalfM.east!).toBeLessThanOrEqual(0.25);
  });

  test('nothing for a handful of epochs', () => {
    expect(settlingOf(columnsOf([1, 2, 3]), null)).toBeNull();
    expect(
      settlingOf({...columnsOf(ramp), gpsSeconds: new Float64Array(1000).fill(5)}, null),
    ).toBeNull();
  });
});
