import {spawnSync} from 'node:child_process';
import {resolve} from 'node:path';

/** What one run of a whole command cost; NaN where it was not measured. */
export interface Cost {
  readonly wallS: number;
  readonly cpuS: number;
  readonly peakMb: number;
}

const MEASURED = resolve(import.meta.dirname, 'measured.mjs');

/**
 * Runs a script of Node in a process of its own and measures it from inside: wall time includes the
 * start of the process, CPU time all threads, memory the peak of the resident set.
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

/** Wall time of any other command; undefined when it is not there or fails. */
export function wallOf(command: string, words: readonly string[]): Cost | undefined {
  const startedMs = performance.now();
  const {status} = spawnSync(command, words, {stdio: 'ignore'});
  const wallS = (performance.now() - startedMs) / 1000;
  return status === 0 ? {wallS, cpuS: Number.NaN, peakMb: Number.NaN} : undefined;
}

/** The run with the median wall time, after one run that only warms the file cache. */
export function medianCost(runs: number, run: () => Cost): Cost {
  run();
  const costs = Array.from({length: runs}, run).sort((a, b) => a.wallS - b.wallS);
  return costs[costs.length >> 1]!;
}
