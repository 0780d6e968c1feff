import {describe, expect, test} from 'vitest';
import {shortNumber, shortPath} from '../../../src/report/svg/path.ts';
import {randomOf} from '../fixtures.ts';

/** Where a path of M, l, h, v and Z stands after each step: an independent reading of it. */
function pointsOf(d: string): [number, number][] {
  const points: [number, number][] = [];
  let [x, y] = [0, 0];
  for (const [, letter, rest] of d.matchAll(/([MlhvLZ])([^MlhvLZ]*)/g)) {
    const n = [...rest!.matchAll(/-?(?:\d+\.?\d*|\.\d+)/g)].map(([text]) => Number(text));
    const take = letter === 'h' || letter === 'v' ? 1 : 2;
    for (let i = 0; i + take <= n.length; i += take) {
      if (letter === 'M' || letter === 'L') [x, y] = [n[i]!, n[i + 1]!];
      if (letter === 'l') [x, y] = [x + n[i]!, y + n[i + 1]!];
      if (letter === 'h') x += n[i]!;
      if (letter === 'v') y += n[i]!;
      points.push([x, y]);
    }
  }
  return points;
}

describe('shortPath', () => {
  test('property: no point is more than 0.05 px from its place, after a thousand steps', () => {
    const random = randomOf(3);
    const exact = Array.from({length: 1000}, (_, i) => [i * 0.617, 100 * random()] as const);
    const long = exact.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${x},${y}`).join('');
    const short = shortPath(long);
    const read = pointsOf(short);
    expect(read).toHaveLength(1000);
    read.forEach(([x, y], i) => {
      expect(Math.abs(x - exact[i]![0])).toBeLessThanOrEqual(0.0501);
      expect(Math.abs(y - exact[i]![1])).toBeLessThanOrEqual(0.0501);
    });
    expect(short.length).toBeLessThan(long.length / 2);
  });

  test('level and upright steps take one number, steps to the same place none', () => {
    expect(shortPath('M0,0L10,0L10,5L10,5L10.01,5.02Z')).toBe('M0 0h10v5Z');
  });

  test('relative commands are read as such', () => {
    expect(shortPath('M1,1h2v3h-2z')).toBe('M1 1h2v3h-2Z');
    expect(shortPath('M10,10c1,1,2,2,3,3l1,1')).toBe('M10 10c1 1 2 2 3 3l1 1');
  });

  test('a command it does not know leaves the path as it is', () => {
    const arc = 'M1.23456,0A2,2,0,1,1,3,3Z';
    expect(shortPath(arc)).toBe(arc);
  });

  test('numbers are as short as they can be', () => {
    expect([0.04, -0.04, 0.26, -0.5, 12, 3.96].map(shortNumber)).toEqual([
      '0',
      '0',
      '.3',
      '-.5',
      '12',
      '4',
    ]);
  });
});
