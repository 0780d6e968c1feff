import {describe, expect, test} from 'vitest';
import {spread} from '../../../src/report/charts/autocorrelation.ts';
import {fitted, textWidthPx} from '../../../src/report/charts/text-width.ts';
import {
  clockAfter,
  clockTicks,
  elapsedTicks,
  roundTicks,
  secondsBetween,
} from '../../../src/report/charts/ticks.ts';

describe('roundTicks', () => {
  test('steps are 1, 2, 5; a metre log and a millimetre log both work', () => {
    expect(roundTicks(-21, 33, 6)).toEqual({values: [-20, -10, 0, 10, 20, 30], decimals: 0});
    expect(roundTicks(1.483, 1.561, 5)).toEqual({values: [1.5, 1.52, 1.54, 1.56], decimals: 2});
    expect(roundTicks(-430_100, -430_000, 4).values).toContain(-430_050);
  });

  test('there is no negative zero', () => {
    for (const value of roundTicks(-0.3, 0.3, 6).values) expect(Object.is(value, -0)).toBe(false);
  });
});

describe('clockTicks', () => {
  test('a day from midnight ends at 24:00', () => {
    const {labels} = clockTicks('2026-05-04T00:00:00Z', 86_400, 9);
    expect(labels[0]).toBe('00:00');
    expect(labels.at(-1)).toBe('24:00');
  });

  test('a night that begins at an odd moment has round times', () => {
    const {values, labels} = clockTicks('2016-12-31T23:52:30.5Z', 900, 6);
    expect(labels).toEqual(['23:55', '24:00', '00:05']);
    expect(values[0]).toBeCloseTo(149.5, 9);
  });

  test('over several days midnight carries the date', () => {
    const {labels} = clockTicks('2026-02-27T06:00:00Z', 3 * 86_400, 8);
    expect(labels).toContain('28 Feb');
    expect(labels).toContain('1 Mar');
  });

  test('a few seconds are labelled with seconds', () => {
    expect(clockTicks('2026-05-04T10:00:00Z', 4, 4).labels).toContain('10:00:02');
  });
});

describe('times', () => {
  test('clockAfter and secondsBetween run through midnight', () => {
    expect(clockAfter('2026-05-04T23:59:50Z', 15, true)).toBe('00:00:05');
    expect(clockAfter('2026-05-04T23:59:50Z', 15, false)).toBe('00:00');
    expect(secondsBetween('2026-02-28T23:59:59Z', '2026-03-01T00:00:01.5Z')).toBe(2.5);
  });

  test('ticks of elapsed time keep apart', () => {
    const {labels} = elapsedTicks(1, 86_400, 186);
    expect(labels).toEqual(['1 s', '1 min', '1 h']);
  });
});

describe('labels', () => {
  test('a line that is too long ends in an ellipsis inside its room', () => {
    expect(fitted('short', 200, 11)).toBe('short');
    const cut = fitted('Another pole length entered than stood in the field', 120, 11);
    expect(cut.endsWith('…')).toBe(true);
    expect(textWidthPx(cut, 11)).toBeLessThanOrEqual(120);
  });

  test('labels at the end of lines are spread, in order', () => {
    expect(spread([100, 101, 102])).toEqual([100, 113, 126]);
    const low = spread([199, 200, 198]);
    expect(Math.max(...low)).toBeLessThanOrEqual(200);
    const sorted = [...low].sort((a, b) => a - b);
    expect(sorted[1]! - sorted[0]!).toBeGreaterThanOrEqual(13);
  });
});
