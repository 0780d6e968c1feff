import {describe, expect, test} from 'vitest';
import {type Asked, compareWithMark, couldPass} from '../../src/occupation/compare.ts';

const HORIZONTAL: Asked = {of: 'horizontal', toleranceM: 0.02, reason: null};
const UP: Asked = {of: 'up', toleranceM: 0.03, reason: 'site brief'};

function diagonal(east: number, north: number, up: number) {
  return [
    [east ** 2, 0, 0],
    [0, north ** 2, 0],
    [0, 0, up ** 2],
  ];
}

function compared(
  offset: {east: number | null; north: number | null; up: number | null},
  mark: number[][] | null = null,
) {
  return compareWithMark({
    mark: 'P7',
    offsetM: offset,
    covarianceM2: diagonal(0.004, 0.004, 0.008),
    markCovarianceM2: mark,
    asked: [HORIZONTAL, UP],
    assumptions: [],
    frameChange: null,
  });
}

describe('the decision', () => {
  test('reference: JCGM 106:2012, 7.4: the probability of conformity of a normal value', () => {
    // Φ((30 − 10) / 8) − Φ((−30 − 10) / 8) = Φ(2.5) − Φ(−5), from tables of the normal distribution.
    const {requirements} = compared({east: 0, north: 0, up: 0.01});
    expect(requirements[1]!.probabilityWithin).toBeCloseTo(0.99379 - 2.87e-7, 5);
    expect(requirements[1]!.decision).toBe('accept');
  });

  test('reference: centred circle: 1 − exp(−r²/2σ²), the Rayleigh distribution', () => {
    const {requirements} = compared({east: 0, north: 0, up: 0});
    expect(requirements[0]!.probabilityWithin).toBeCloseTo(1 - Math.exp(-(5 ** 2) / 2), 9);
  });

  test.each([
    [0.005, 'accept'],
    [0.016, 'cannot tell'],
    [0.022, 'cannot tell'],
    [0.035, 'reject'],
  ])('an offset of %f m against 20 mm with 4 mm per axis: %s', (east, decision) => {
    expect(compared({east, north: 0, up: 0}).requirements[0]!.decision).toBe(decision);
  });

  test('a component that cannot be compared is not decided', () => {
    const {requirements, offsetM} = compared({east: 0.001, north: 0.001, up: null});
    expect(requirements[1]).toMatchObject({probabilityWithin: null, decision: 'cannot tell'});
    expect(offsetM.horizontal).toBeCloseTo(0.001 * Math.SQRT2, 12);
  });

  test('the uncertainty of the mark counts', () => {
    const offset = {east: 0.012, north: 0, up: 0};
    expect(compared(offset).requirements[0]!.decision).toBe('accept');
    const loose = compared(offset, diagonal(0.01, 0.01, 0.01));
    expect(loose.requirements[0]!.decision).toBe('cannot tell');
  });

  test('a tolerance that no offset could meet is recognised', () => {
    expect(couldPass(HORIZONTAL, diagonal(0.004, 0.004, 0.008))).toBe(true);
    expect(couldPass({...HORIZONTAL, toleranceM: 0.005}, diagonal(0.004, 0.004, 0.008))).toBe(
      false,
    );
  });
});

describe('agreement', () => {
  test('is not tested against a mark without uncertainty', () => {
    expect(compared({east: 0.1, north: 0, up: 0}).agreement).toBe('not tested');
  });

  test('is the joint 95 % ellipse in plan', () => {
    const mark = diagonal(0.003, 0.003, 0.006);
    // Joint σ = 5 mm per axis: the 95 % circle has a radius of 2.4477 × 5 mm = 12.24 mm.
    expect(compared({east: 0.0122, north: 0, up: 0}, mark).agreement).toBe('agrees');
    expect(compared({east: 0.0123, north: 0, up: 0}, mark).agreement).toBe('disagrees');
    expect(compared({east: 0.0122, north: 0, up: 0}, mark).normalisedError.horizontal).toBeCloseTo(
      0.0122 / (0.005 * Math.sqrt(5.991464547)),
      8,
    );
    // And 1.96 × 10 mm in height.
    expect(compared({east: 0, north: 0, up: 0.0195}, mark).agreement).toBe('agrees');
    expect(compared({east: 0, north: 0, up: -0.0197}, mark).agreement).toBe('disagrees');
  });

  test('the direction is an azimuth from north, clockwise', () => {
    expect(compared({east: -0.01, north: 0, up: 0}).azimuthDeg).toBeCloseTo(270, 10);
    expect(compared({east: 0, north: 0, up: 0}).azimuthDeg).toBeNull();
  });
});
