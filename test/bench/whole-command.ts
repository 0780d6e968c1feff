import {spawnSync} from 'node:child_process';
import {resolve} from 'node:path';

/** What one run of a whole command cost. */
export interface Cost {
  readonly wallS: number;
  readonly cpuS: number;
  readonly peakMb: number;
}

const MEASURED = resolve(import.meta.dirname, 'measured.mjs');

/**
 * Runs a script of Node in a process of its own and measures it from inside: wall time includes the
 * start of the process, CPU time both threads, memory the peak of the resident set.
 */
export function costOf(script: string, words: readonly string[]): Cost {
  const startedMs = performance.now();
  const {stderr, status} = spawnSync('node', [MEASURED, script, ...words], {
    encoding: 'utf8',
    stdio: ['ignore', 'ignore', 'pipe'],
    maxBuffer: 1 << 26,
  });
  const wallS = (performance.now() - startedMs) / 1000;
  const usage = /MEASURED (\{.*\})/.exec(stderr);
  if (usage === null)
    throw new Error(`costOf: ${script} ended with ${status}: ${stderr.slice(0, 500)}`);
  const {cpuS, peakMb} = JSON.parse(usage[1]!) as {cpuS: number; peakMb: number};
  return {wallS, cpuS, peakMb};
}

/** The run with the median wall time, after one run that only warms the file cache. */
export function medianCost(runs: number, run: () => Cost): Cost {
  run();
  const costs = Array.from({length: runs}, run).sort((a, b) => a.wallS - b.wallS);
  return costs[costs.length >> 1]!;
}
