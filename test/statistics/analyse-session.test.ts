import {describe, expect, test} from 'vitest';
import {analyseSession} from '../../src/statistics/analyse-session.ts';
import {studentQuantile} from '../../src/statistics/distribution.ts';
import {randomFrom} from '../simulate/random.ts';

const NO_DIGITS = [0, 0, 0];

function times(count: number, stepS = 1): Float64Array {
  return Float64Array.from({length: count}, (_, i) => i * stepS);
}

/** White noise of one millimetre a component, twice that in height. */
function white(count: number, seed: number, add = (_i: number) => 0): Float64Array[] {
  return [1, 1, 2].map((sigma, c) => {
    const random = randomFrom(seed, `component ${c}`);
    return Float64Array.from(
      {length: count},
      (_, i) => 0.001 * sigma * random.normal() + (c === 0 ? add(i) : 0),
    );
  });
}

function analysed(components: readonly Float64Array[], elapsedS = times(components[0]!.length)) {
  return analyseSession({elapsedS, components, resolutions: NO_DIGITS});
}

describe('the mean', () => {
  test('property: white noise gives about the interval of Student', () => {
    const ratios = Array.from({length: 12}, (_, seed) => {
      const {components} = analysed(white(1800, seed));
      return (
        components[0]!.halfWidth95! / ((studentQuantile(0.975, 159) * 0.001) / Math.sqrt(1800))
      );
    }).sort((a, b) => a - b);
    expect(ratios[6]!).toBeGreaterThan(0.9);
    expect(ratios[6]!).toBeLessThan(1.6);
  });

  test('property: offsets and scale change what they must and nothing else', () => {
    const plain = analysed(white(900, 3));
    const moved = analysed(white(900, 3).map((column) => column.map((v) => 1000 * v + 6_378_137)));
    expect(moved.components[1]!.halfWidth95! / plain.components[1]!.halfWidth95!).toBeCloseTo(
      1000,
      3,
    );
    expect(moved.components[1]!.mean - 6_378_137).toBeCloseTo(1000 * plain.components[1]!.mean, 6);
    expect(moved.movement).toBe(plain.movement);
  });

  test('property: east and north are treated alike', () => {
    const [a, b, c] = white(900, 4);
    const one = analysed([a!, b!, c!]);
    const other = analysed([b!, a!, c!]);
    expect(other.components[1]!.halfWidth95!).toBeCloseTo(one.components[0]!.halfWidth95!, 12);
    expect(other.planCorrelation).toBeCloseTo(one.planCorrelation, 10);
  });

  test('two components alone are a record without height', () => {
    const {components, movement} = analysed(white(900, 5).slice(0, 2));
    expect(components).toHaveLength(2);
    expect(components[1]!.halfWidth95).toBeGreaterThan(0);
    expect(movement).toBe('none');
  });

  test.each([
    ['fewer than 30 epochs', times(29, 10)],
    ['less than two minutes', times(100, 1)],
  ])('%s: no interval, no verdict, and why', (_, elapsedS) => {
    const analysis = analysed(white(elapsedS.length, 1), elapsedS);
    expect(analysis.components.map(({halfWidth95}) => halfWidth95)).toEqual([
      undefined,
      undefined,
      undefined,
    ]);
    expect(analysis.movement).toBe('cannot tell');
    expect(analysis.limits.map(({code}) => code)).toEqual(['too-short']);
    expect(analysis.requiredTime(0, 0.001)).toBeUndefined();
  });

  test('a component that never changes has no spread, the others keep theirs', () => {
    const [east, , up] = white(900, 6);
    const analysis = analysed([east!, new Float64Array(900).fill(7), up!]);
    expect(analysis.components[1]).toMatchObject({mean: 7, halfWidth95: 0});
    expect(analysis.components[0]!.halfWidth95).toBeGreaterThan(0);
    expect(analysis.limits).toContainEqual({code: 'no-spread', components: [1]});
  });

  test('nothing varies: half a step of the digits is all that is known', () => {
    const still = new Float64Array(600).fill(2);
    const analysis = analyseSession({
      elapsedS: times(600),
      components: [still, still, still],
      resolutions: [0.1, 0.1, 0.5],
    });
    expect(analysis.components[0]!.quantisation95).toBeCloseTo(0.05, 12);
    expect(analysis.components[2]!.quantisation95).toBeCloseTo(0.25, 12);
    expect(analysis.movement).toBe('cannot tell');
  });

  test('more than half of the record missing: an interval, but no verdict on movement', () => {
    const elapsedS = Float64Array.from(
      {length: 600},
      (_, i) => Math.floor(i / 100) * 500 + (i % 100),
    );
    const analysis = analysed(white(600, 7), elapsedS);
    expect(analysis.components[0]!.halfWidth95).toBeGreaterThan(0);
    expect(analysis.movement).toBe('cannot tell');
    expect(analysis.limits.map(({code}) => code)).toContain('mostly-gaps');
  });

  test('required time: four times the epochs for half the width, in white noise', () => {
    const analysis = analysed(white(1800, 8));
    const now = analysis.components[0]!.halfWidth95!;
    const {aboutS, allowS} = analysis.requiredTime(0, now / 2)!;
    expect(aboutS / 7200).toBeGreaterThan(0.5);
    expect(aboutS / 7200).toBeLessThan(2);
    expect(allowS).toBeGreaterThanOrEqual(aboutS);
    expect(analysis.requiredTime(0, now * 5)).toBeUndefined();
    expect(analysis.halfWidth95After(0, 1800)! / now).toBeCloseTo(1, 2);
    expect(analysis.halfWidth95After(0, 450)!).toBeGreaterThan(now);
  });
});

describe('movement', () => {
  test('a step: found once, on its second, with its size', () => {
    const {movement, steps} = analysed(white(1800, 11, (i) => (i < 700 ? 0 : 0.005)));
    expect(movement).toBe('step');
    expect(steps).toHaveLength(1);
    expect(Math.abs(steps[0]!.elapsedS - 699.5)).toBeLessThanOrEqual(3);
    expect(steps[0]!.interval95S[0]).toBeLessThanOrEqual(699.5);
    expect(steps[0]!.interval95S[1]).toBeGreaterThanOrEqual(699.5);
    expect(Math.abs(steps[0]!.sizes[0]! - 0.005)).toBeLessThanOrEqual(
      4 * steps[0]!.standardErrors[0]!,
    );
  });

  test('three steps are split into three', () => {
    const staircase = (i: number) =>
      0.006 * (Number(i > 500) - 2 * Number(i > 1100) + Number(i > 1500));
    const {steps} = analysed(white(1800, 12, staircase));
    expect(steps.map(({elapsedS}) => Math.round(elapsedS / 10) * 10)).toEqual([500, 1100, 1500]);
  });

  test('an excursion that comes back at once is no step', () => {
    const away = (i: number) => (i >= 900 && i < 915 ? 0.003 : 0);
    expect(analysed(white(1800, 13, away)).movement).toBe('none');
  });

  test('a drift, with its rate inside its interval', () => {
    const {movement, components} = analysed(white(1800, 14, (i) => (0.006 * i) / 1800));
    expect(movement).toBe('drift');
    const {perS, halfWidth95PerS} = components[0]!.drift!;
    expect(Math.abs(perS - 0.006 / 1800)).toBeLessThanOrEqual(1.5 * halfWidth95PerS);
  });

  test('settling, with its size', () => {
    const {movement, settling} = analysed(white(1800, 15, (i) => 0.01 * Math.exp(-i / 180)));
    expect(movement).toBe('settling');
    expect(settling!.sizes[0]! / 0.01).toBeGreaterThan(0.8);
    expect(settling!.sizes[0]! / 0.01).toBeLessThan(1.25);
  });

  test('a step thought away leaves the width of the quiet record', () => {
    const quiet = analysed(white(1800, 16)).components[0]!.halfWidth95!;
    const stepped = analysed(white(1800, 16, (i) => (i < 900 ? 0 : 0.02)));
    const [without] = stepped.halfWidthsWithout({steps: [0]});
    expect(stepped.components[0]!.halfWidth95! / quiet).toBeGreaterThan(20);
    expect(without! / quiet).toBeGreaterThan(0.5);
    expect(without! / quiet).toBeLessThan(2);
  });

  test('property: white noise alone is called movement in at most 5 of 100 records', () => {
    let moved = 0;
    for (let seed = 100; seed < 160; seed++) {
      if (analysed(white(600, seed)).movement !== 'none') moved++;
    }
    expect(moved).toBeLessThanOrEqual(3);
  });
});
