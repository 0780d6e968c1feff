import type {TimeBins} from '../occupation/series/time-bins.ts';
import {formatLength} from '../wording/numbers.ts';

/** Eighths of a line, lowest first. */
const LEVELS = '▁▂▃▄▅▆▇█';
const AXES = ['east', 'north', 'up'] as const;
const LABEL_COLUMNS = 11;
const NUMBER_COLUMNS = 11;
/** More would be finer than a character, fewer would hide a jump. */
const MOST_COLUMNS = 64;

/** How many bins a plot of this terminal has room for. */
export function plotColumns(terminalColumns: number): number {
  return Math.min(MOST_COLUMNS, terminalColumns - LABEL_COLUMNS - 2 * NUMBER_COLUMNS);
}

/**
 * East, north and up over time, a line each: a block per bin at the height of its median, between
 * the least and the greatest median, which stand at the ends; a hole stays blank. Lines for a
 * record whose medians are all the same, or that has fewer than two bins, would say nothing.
 */
export function timePlot({bins, binS}: TimeBins, spanS: number): string[] {
  const count = Math.max(1, Math.ceil(spanS / binS - 1e-6));
  if (bins.length < 2) return [];
  return AXES.flatMap((axis) => {
    const medians = bins.flatMap((bin) => bin[`${axis}M`]?.median ?? []);
    const least = Math.min(...medians);
    const most = Math.max(...medians);
    if (medians.length === 0 || !(most > least)) return [];
    const blocks = Array.from({length: count}, () => ' ');
    for (const bin of bins) {
      const median = bin[`${axis}M`]?.median;
      if (median === undefined) continue;
      const level = Math.round(((median - least) / (most - least)) * (LEVELS.length - 1));
      blocks[Math.round(bin.startS / binS)] = LEVELS[level] ?? ' ';
    }
    const from = formatLength(least, true).padStart(NUMBER_COLUMNS - 1);
    const to = formatLength(most, true);
    return [`${axis.padEnd(LABEL_COLUMNS)}${from} ${blocks.slice(0, count).join('')} ${to}`];
  });
}
