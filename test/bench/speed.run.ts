import {mkdtempSync, rmSync, statSync} from 'node:fs';
import {tmpdir} from 'node:os';
import {join, resolve} from 'node:path';
import {afterAll, beforeAll, describe, test} from 'vitest';
import {writeDays} from './logs.ts';
import {type Cost, costOf, medianCost} from './whole-command.ts';

/*
 * Speed and memory as ratios within one run. Nothing is asserted: machines differ, and a slow
 * neighbour is no defect. Read the table.
 */

const RUNS = Number(process.env.BENCH_RUNS ?? 3);
const HERE = import.meta.dirname;
const STILLMARK = resolve(HERE, '../../dist/cli/main.js');
const rows: string[] = [];
let folder = '';
let day = '';

function script(name: string): string {
  return join(HERE, name);
}

function row(what: string, cost: Cost, versus?: {name: string; cost: Cost}): void {
  const ratio =
    versus === undefined ? '' : `  ${(cost.wallS / versus.cost.wallS).toFixed(2)} × ${versus.name}`;
  rows.push(
    `${what.padEnd(44)} ${cost.wallS.toFixed(2).padStart(7)} s wall ${cost.cpuS.toFixed(2).padStart(7)} s cpu ${cost.peakMb.toFixed(0).padStart(5)} MB${ratio}`,
  );
}

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillmark-bench-'));
  day = join(folder, 'day.nmea');
  writeDays(day, 1);
  rows.push(`a day at 1 Hz: ${(statSync(day).size / 1e6).toFixed(0)} MB, medians of ${RUNS} runs`);
});

afterAll(() => {
  rmSync(folder, {recursive: true});
  process.stdout.write(`\n${rows.join('\n')}\n`);
});

describe('whole commands', () => {
  test('cold start', () => {
    const floor = medianCost(RUNS, () => costOf(script('one-command.mjs'), []));
    row('the smallest yargs program, --help', floor);
    const help = medianCost(RUNS, () => costOf(STILLMARK, ['--help']));
    row('stillmark --help', help, {name: 'the smallest', cost: floor});
  });

  test('a day at 1 Hz', () => {
    const parse = medianCost(RUNS, () => costOf(script('parse-line-by-line.mjs'), [day]));
    row('nmea-simple, line by line', parse);
    const versus = {name: 'nmea-simple', cost: parse};
    const contents = medianCost(RUNS, () => costOf(STILLMARK, ['contents', day, '--quiet']));
    row('stillmark contents', contents, versus);
    const result = join(folder, 'result.json');
    const reduce = medianCost(RUNS, () =>
      costOf(STILLMARK, ['reduce', day, '--quiet', '--result', result]),
    );
    row('stillmark reduce --result', reduce, versus);
    const report = join(folder, 'report.html');
    const full = medianCost(RUNS, () =>
      costOf(STILLMARK, ['reduce', day, '--quiet', '--report', report]),
    );
    row('stillmark reduce --report', full, versus);
    rows.push(`report: ${(statSync(report).size / 1000).toFixed(0)} kB`);
  });

  test('growth with the size of the log', () => {
    const week = join(folder, 'days.nmea');
    writeDays(week, 4);
    const small = costOf(STILLMARK, ['contents', day, '--quiet']);
    const large = costOf(STILLMARK, ['contents', week, '--quiet']);
    const [smallMb, largeMb] = [statSync(day).size / 1e6, statSync(week).size / 1e6];
    row(`stillmark contents, ${largeMb.toFixed(0)} MB`, large);
    rows.push(
      `four times the bytes: ${(large.wallS / small.wallS).toFixed(2)} × the time, ${((large.peakMb - small.peakMb) / (largeMb - smallMb)).toFixed(2)} MB of memory a MB of log`,
    );
  });
});
