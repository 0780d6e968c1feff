import {describe, expect, test} from 'vitest';
import {styleOf} from '../../src/cli/terminal.ts';
import {plotColumns, timePlot} from '../../src/cli/terminal-plot.ts';
import {timeBins} from '../../src/occupation/series/time-bins.ts';

/** One epoch a second; up is missing when null. */
function binsOf(eastM: readonly number[], upM: readonly number[] | null, bins = 8) {
  const count = eastM.length;
  const spanS = count - 1;
  const binned = timeBins({
    gpsSeconds: Float64Array.from({length: count}, (_, i) => i),
    used: Uint8Array.from({length: count}, (_, i) => (Number.isNaN(eastM[i]) ? 0 : 1)),
    eastM: Float64Array.from(eastM),
    northM: Float64Array.from({length: count}, () => 0.001),
    upM: Float64Array.from(upM ?? eastM.map(() => Number.NaN)),
    firstS: 0,
    spanS,
    intervalS: 1,
    bins,
  });
  return {binned, spanS};
}

describe('the plot in the terminal', () => {
  test('a rise climbs from the lowest to the highest block, with its ends in numbers', () => {
    const {binned, spanS} = binsOf(
      [0, 1, 2, 3, 4, 5, 6, 7].map((mm) => mm / 1000),
      null,
    );
    const [east, ...others] = timePlot(binned, spanS);
    expect(east).toMatch(/^east +0\.0\u00a0mm ▁▂▃▄▅▆▇ ?█? \+/);
    expect(east).toMatch(/\+7\.0\u00a0mm$|\+6\.\d\u00a0mm$/);
    // North never changes and there is no up: lines that would say nothing.
    expect(others).toEqual([]);
  });

  test('a hole stays blank', () => {
    const hole = [0, 1, Number.NaN, Number.NaN, 4, 5, 6, 7].map((mm) => mm / 1000);
    const {binned, spanS} = binsOf(hole, null);
    expect(timePlot(binned, spanS)[0]).toMatch(/mm [▁-█]{2} {2}[▁-█]/);
  });

  test('nothing is drawn of a record without scatter or of one bin', () => {
    const {binned, spanS} = binsOf([0, 0, 0, 0], [1, 1, 1, 1]);
    expect(timePlot(binned, spanS)).toEqual([]);
    const one = binsOf([0.001], null);
    expect(timePlot(one.binned, one.spanS)).toEqual([]);
  });

  test('it fits the terminal', () => {
    for (const columns of [60, 80, 100]) {
      const {binned, spanS} = binsOf(
        Array.from({length: 500}, (_, i) => Math.sin(i / 40)),
        Array.from({length: 500}, (_, i) => -12 * Math.cos(i / 90)),
        plotColumns(columns),
      );
      for (const line of timePlot(binned, spanS)) expect(line.length).toBeLessThanOrEqual(columns);
    }
  });
});

describe('what a terminal can show', () => {
  test('plots need a terminal that speaks UTF-8', () => {
    expect(styleOf({isTTY: true, columns: 100}, {LANG: 'de_DE.UTF-8'}).plots).toBe(true);
    expect(styleOf({isTTY: true, columns: 100}, {}).plots).toBe(true);
    expect(styleOf({isTTY: true}, {LANG: 'en_US.UTF-8', LC_ALL: 'C'}).plots).toBe(false);
    expect(styleOf({isTTY: true}, {LC_ALL: 'C'}).unicode).toBe(false);
    expect(styleOf({}, {LANG: 'de_DE.UTF-8'}).plots).toBe(false);
    expect(styleOf({isTTY: true}, {TERM: 'dumb'}).plots).toBe(false);
  });
});
