import {describe, expect, test} from 'vitest';
import {errorEllipse} from '../../src/statistics/ellipse.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly name: string;
  readonly q_ee: string;
  readonly q_en: string;
  readonly q_nn: string;
  readonly s0: string;
  readonly semi_major: string;
  readonly semi_minor: string;
  readonly azimuth_major_deg: string;
}

const {rows} = readReference<{readonly error_ellipse: {readonly rows: readonly Row[]}}>(
  'b5_examples',
).error_ellipse;

function ellipseOf(row: Row) {
  const variance = Number(row.s0) ** 2;
  return errorEllipse({
    eastEast: variance * Number(row.q_ee),
    eastNorth: variance * Number(row.q_en),
    northNorth: variance * Number(row.q_nn),
  });
}

describe('reference: worked examples, axes and azimuth recomputed to 14 digits', () => {
  test('there are nine, two of them after Ghilani & Wolf', () => {
    expect(rows).toHaveLength(9);
  });

  test.each(rows)('$name', (row) => {
    const {semiMajor, semiMinor, azimuthDeg} = ellipseOf(row);
    expect(semiMajor).toBeCloseTo(Number(row.semi_major), 12);
    expect(semiMinor).toBeCloseTo(Number(row.semi_minor), 12);
    if (row.azimuth_major_deg === 'undefined') expect(azimuthDeg).toBeUndefined();
    else expect(azimuthDeg).toBeCloseTo(Number(row.azimuth_major_deg), 9);
  });
});

describe('reference: Ghilani & Wolf, Adjustment Computations, section 19.3 (from memory)', () => {
  test.each([
    ['Wisconsin', 0.25, 0.1, 151, 0.5],
    ['Badger', 0.27, 0.1, 7.6, 0.05],
  ])('%s: %f ft, %f ft, about %f°', (name, major, minor, azimuth, half) => {
    const row = rows.find((one) => one.name === name);
    if (row === undefined) throw new Error(`no row ${name}`);
    const ellipse = ellipseOf(row);
    expect(Math.abs(ellipse.semiMajor - major)).toBeLessThanOrEqual(0.005);
    expect(Math.abs(ellipse.semiMinor - minor)).toBeLessThanOrEqual(0.005);
    expect(Math.abs(ellipse.azimuthDeg! - azimuth)).toBeLessThanOrEqual(half);
  });
});

test('property: axes and azimuth turned back give the covariance', () => {
  for (let k = 0; k < 180; k += 7) {
    const covariance = {
      eastEast: 3 + 2 * Math.cos(k),
      northNorth: 4 + 3 * Math.sin(2 * k),
      eastNorth: 0.9 * Math.sin(k),
    };
    const {semiMajor, semiMinor, azimuthDeg} = errorEllipse(covariance);
    expect(azimuthDeg).toBeGreaterThanOrEqual(0);
    expect(azimuthDeg).toBeLessThan(180);
    const angle = (azimuthDeg! * Math.PI) / 180;
    const [s, c] = [Math.sin(angle), Math.cos(angle)];
    const [a, b] = [semiMajor ** 2, semiMinor ** 2];
    expect(a * s * s + b * c * c).toBeCloseTo(covariance.eastEast, 12);
    expect(a * c * c + b * s * s).toBeCloseTo(covariance.northNorth, 12);
    expect((a - b) * s * c).toBeCloseTo(covariance.eastNorth, 12);
  }
});

test('property: a thin ellipse keeps the digits of its minor axis', () => {
  // One axis of 1, one of 1e-5, along north-east: the covariance is exact in decimals.
  const [sum, difference] = [(1 + 1e-10) / 2, (1 - 1e-10) / 2];
  const {semiMinor, azimuthDeg} = errorEllipse({
    eastEast: sum,
    northNorth: sum,
    eastNorth: difference,
  });
  expect(Math.abs(semiMinor / 1e-5 - 1)).toBeLessThanOrEqual(1e-6);
  expect(azimuthDeg).toBeCloseTo(45, 9);
});

test('edge: no spread is a circle of no size', () => {
  expect(errorEllipse({eastEast: 0, northNorth: 0, eastNorth: 0})).toEqual({
    semiMajor: 0,
    semiMinor: 0,
    azimuthDeg: undefined,
  });
});
