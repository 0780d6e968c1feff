import {describe, expect, test} from 'vitest';
import {applyHelmert, helmertAt, invertHelmert} from '../../src/geodesy/helmert.ts';

describe('Helmert transformation', () => {
  test('reference: IOGP 373-7-2, method 9606, position vector', () => {
    // WGS 72 to WGS 84: tz 4.5 m, rz 0.554″, scale 0.219 ppm; printed to 0.01 m.
    const parameters = {
      translationMm: [0, 0, 4500],
      scalePpb: 219,
      rotationMas: [0, 0, 554],
    } as const;
    const source = {xM: 3_657_660.66, yM: 255_768.55, zM: 5_201_382.11};
    const found = applyHelmert(source, parameters);
    expect(Math.abs(found.xM - 3_657_660.78)).toBeLessThan(0.01);
    expect(Math.abs(found.yM - 255_778.43)).toBeLessThan(0.005);
    expect(Math.abs(found.zM - 5_201_387.75)).toBeLessThan(0.005);
    const back = invertHelmert(found, parameters);
    expect(back.xM).toBeCloseTo(source.xM, 8);
    expect(back.yM).toBeCloseTo(source.yM, 8);
    expect(back.zM).toBeCloseTo(source.zM, 8);
  });

  test('parameters move with their rates from the reference epoch', () => {
    const set = {
      t0: 2015,
      translationMm: [1, 2, 3],
      scalePpb: 4,
      rotationMas: [5, 6, 7],
      translationRate: [0.1, 0.2, 0.3],
      scaleRate: 0.4,
      rotationRate: [0.5, 0.6, 0.7],
    } as const;
    expect(helmertAt(set, 2015)).toEqual({
      translationMm: [1, 2, 3],
      scalePpb: 4,
      rotationMas: [5, 6, 7],
    });
    expect(helmertAt(set, 2025)).toEqual({
      translationMm: [2, 4, 6],
      scalePpb: 8,
      rotationMas: [10, 12, 14],
    });
  });
});
