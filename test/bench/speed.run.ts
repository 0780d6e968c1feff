import {spawnSync} from 'node:child_process';
import {mkdtempSync, rmSync, statSync, writeFileSync} from 'node:fs';
import {tmpdir} from 'node:os';
import {join, resolve} from 'node:path';
import {afterAll, beforeAll, describe, test} from 'vitest';
import {analyseSession} from '../../src/statistics/analyse-session.ts';
import {blockMedianScreen} from '../../src/statistics/robust.ts';
import {scenarioNamed} from '../simulate/scenarios.ts';
import {simulate} from '../simulate/simulate.ts';
import {writeDays, writeTwentyHertz} from './logs.ts';
import {BenchTable} from './table.ts';
import {type Cost, costOf, medianCost, wallOf} from './whole-command.ts';

/*
 * Speed and memory as ratios within one run, beside what a user would do otherwise. Nothing is
 * asserted: machines differ, and a slow neighbour is no defect. Read the table.
 */

const RUNS = Number(process.env.BENCH_RUNS ?? 5);
/** Days at 1 Hz in the long log and the longest: 53 MB each. */
const LONG_DAYS = Number(process.env.BENCH_LONG_DAYS ?? 6);
const LONGEST_DAYS = Number(process.env.BENCH_LONGEST_DAYS ?? 19);
/** Days at 20 Hz in the log with the most epochs: 1.7 million and 240 MB each. */
const FAST_DAYS = Number(process.env.BENCH_FAST_DAYS ?? 7);
const HERE = import.meta.dirname;
const STILLMARK = resolve(HERE, '../../dist/cli/main.js');
const RESULTS = resolve(HERE, '../../bench-results/speed.json');
const AWK_FIELDS = '$1 ~ /GGA$/ {print $2, $3, $5, $10}';
const table = new BenchTable();
let folder = '';
let day = '';
let long = '';

function script(name: string): string {
  return join(HERE, name);
}

function contents(log: string): Cost {
  return costOf(STILLMARK, ['contents', log, '--quiet']);
}

/** Seconds that a script measures in itself and prints. */
function medianSeconds(...words: readonly string[]): Cost {
  return medianCost(RUNS, () => {
    const ran = spawnSync('node', [script('arrays-to-html.mjs'), ...words], {encoding: 'utf8'});
    if (ran.status !== 0) throw new Error(ran.stderr);
    return {wallS: Number(ran.stdout), cpuS: Number.NaN, peakMb: Number.NaN};
  });
}

function megabytes(path: string): number {
  return statSync(path).size / 1e6;
}

/** The Python script over a log, once: it is slow. undefined where its modules are missing. */
function inPython(log: string): Cost | undefined {
  const modules = 'import numpy, pynmea2, pyproj';
  const command = ['python3', '/usr/bin/python3'].find(
    (one) => wallOf(one, ['-c', modules]) !== undefined,
  );
  return command === undefined ? undefined : wallOf(command, [script('python-baseline.py'), log]);
}

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillmark-bench-'));
  day = join(folder, 'day.nmea');
  long = join(folder, 'long.nmea');
  writeDays(day, 1);
  writeDays(long, LONG_DAYS);
  table.remark(`medians of ${RUNS} runs`);
});

afterAll(() => {
  rmSync(folder, {recursive: true});
  table.print();
  table.save(RESULTS);
  process.stdout.write('also in bench-results/speed.json\n');
});

describe('whole commands', () => {
  test('cold start', () => {
    const floor = medianCost(RUNS, () => costOf(script('one-command.mjs'), []));
    table.row('the smallest yargs program, --help', floor);
    const help = medianCost(RUNS, () => costOf(STILLMARK, ['--help']));
    table.row('stillmark --help', help, {'the smallest': floor});
  });

  test('a day at 1 Hz', () => {
    table.remark(`a day at 1 Hz, seven sentences an epoch: ${megabytes(day).toFixed(0)} MB`);
    const parse = medianCost(RUNS, () => costOf(script('parse-line-by-line.mjs'), [day]));
    table.row('nmea-simple, line by line', parse);
    const byPython = inPython(day);
    if (byPython === undefined) {
      table.remark('no Python with numpy, pynmea2 and pyproj: left out');
    } else {
      table.row('Python: parse, project, mean and spread', byPython);
    }
    const versus = {'nmea-simple': parse, Python: byPython};
    const listed = table.row(
      'stillmark contents',
      medianCost(RUNS, () => contents(day)),
      versus,
    );
    const result = join(folder, 'result.json');
    const reduce = medianCost(RUNS, () =>
      costOf(STILLMARK, ['reduce', day, '--quiet', '--result', result]),
    );
    table.row('stillmark reduce --result', reduce, {...versus, contents: listed});
    const report = join(folder, 'report.html');
    const full = medianCost(RUNS, () =>
      costOf(STILLMARK, ['reduce', day, '--quiet', '--report', report]),
    );
    table.row('stillmark reduce --report', full, versus);
    table.remark(`report: ${(statSync(report).size / 1000).toFixed(0)} kB`);
    const vega = table.row('import of Vega and one chart', medianSeconds('chart'));
    table.row('from the columns of the day to the page', medianSeconds('page', day, result), {
      'one chart': vega,
    });
  });

  test('a long log', () => {
    table.remark(`${LONG_DAYS} days at 1 Hz: ${megabytes(long).toFixed(0)} MB`);
    const others = {
      'wc -l': wallOf('wc', ['-l', long]) && medianCost(RUNS, () => wallOf('wc', ['-l', long])!),
      awk:
        wallOf('awk', ['-F,', AWK_FIELDS, long]) &&
        medianCost(RUNS, () => wallOf('awk', ['-F,', AWK_FIELDS, long])!),
      'nmea-simple': costOf(script('parse-line-by-line.mjs'), [long]),
      Python: inPython(long),
    };
    for (const [name, cost] of Object.entries(others)) {
      if (cost === undefined) table.remark(`${name}: not there`);
      else table.row(name, cost);
    }
    const listed = medianCost(RUNS, () => contents(long));
    table.row('stillmark contents', listed, others);
    const result = join(folder, 'result.json');
    const reduce = medianCost(RUNS, () =>
      costOf(STILLMARK, ['reduce', long, '--quiet', '--result', result]),
    );
    table.row('stillmark reduce --result', reduce, {contents: listed});
    // Standard input is read by one thread: the same work undivided.
    const undivided = medianCost(RUNS, () => {
      const cost = wallOf('sh', ['-c', `node ${STILLMARK} contents - --quiet < ${long}`]);
      if (cost === undefined) throw new Error('contents of standard input failed');
      return cost;
    });
    table.row('stillmark contents, one thread', undivided, {'several threads': listed});
  });

  test('growth with the size of the log', () => {
    const longest = join(folder, 'longest.nmea');
    writeDays(longest, LONGEST_DAYS);
    const empty = join(folder, 'one-line.nmea');
    writeFileSync(empty, '$GPZDA,120000.00,04,05,2026,00,00*6D\r\n');
    const [none, some, most] = [empty, long, longest].map((log) =>
      medianCost(Math.min(RUNS, 3), () => contents(log)),
    );
    table.row('stillmark contents, one line', none!);
    table.row(`stillmark contents, ${megabytes(longest).toFixed(0)} MB`, most!);
    const perByte = (most!.wallS - none!.wallS) / megabytes(longest);
    const before = (some!.wallS - none!.wallS) / megabytes(long);
    table.remark(
      `time a megabyte, ${megabytes(longest).toFixed(0)} MB over ${megabytes(long).toFixed(0)} MB: ${(perByte / before).toFixed(2)} ×`,
    );
  });

  test('days at 20 Hz', () => {
    const fast = join(folder, 'fast.nmea');
    writeTwentyHertz(fast, FAST_DAYS);
    const epochs = (FAST_DAYS * 1.728).toFixed(1);
    table.remark(`${FAST_DAYS} days at 20 Hz, ${epochs} million epochs: once each`);
    table.row('stillmark contents, 20 Hz', contents(fast));
    const result = join(folder, 'result.json');
    const words = ['reduce', fast, '--quiet', '--result', result];
    table.row('stillmark reduce --result, 20 Hz', costOf(STILLMARK, words));
    rmSync(fast);
  });
});

describe('conversion', () => {
  test('a million points, geocentric to geodetic', () => {
    const {stdout} = spawnSync('node', [script('convert-points.mjs')], {encoding: 'utf8'});
    const {oursS, proj4jsS} = JSON.parse(stdout) as {oursS: number; proj4jsS: number};
    const cost = (wallS: number) => ({wallS, cpuS: Number.NaN, peakMb: Number.NaN});
    const theirs = table.row('a million points by proj4js', cost(proj4jsS));
    table.row('a million points by stillmark', cost(oursS), {proj4js: theirs});
  });

  test('a list of a million rows', () => {
    const list = join(folder, 'million.csv');
    const rows = Array.from({length: 1_000_000}, (_, i) => {
      const latitude = 45 + ((i * 0.618_034) % 10);
      const longitude = 6 + ((i * 0.414_214) % 6);
      return `P${i},${latitude.toFixed(9)},${longitude.toFixed(9)},${(i % 500).toFixed(4)}`;
    });
    writeFileSync(list, `name,latitude,longitude,height\n${rows.join('\n')}\n`);
    const output = join(folder, 'converted.csv');
    for (const to of ['geocentric', 'UTM 32N']) {
      const words = ['convert', '--list', list, '--to', to, '--output', output, '--quiet'];
      table.row(
        `stillmark convert, a million rows to ${to}`,
        medianCost(RUNS, () => costOf(STILLMARK, words)),
      );
    }
  });
});

describe('statistics', () => {
  test.each([86_400, 1_000_000, 1_728_000])('of an occupation of %d epochs', (epochs) => {
    const scenario = {...scenarioNamed('F'), durationS: 86_400, intervalS: 86_400 / epochs};
    const {elapsedS, eastM, northM, upM} = simulate(scenario, 1);
    const components = [eastM, northM, upM];
    const resolutions = [0, 0, 0];
    const times = Array.from({length: Math.min(RUNS, 3)}, () => {
      const before = process.cpuUsage();
      blockMedianScreen({elapsedS, components, resolutions});
      analyseSession({elapsedS, components, resolutions});
      const {user, system} = process.cpuUsage(before);
      return (user + system) / 1e6;
    }).sort((a, b) => a - b);
    const cpuS = times[times.length >> 1]!;
    table.row(`complete statistics, ${epochs} epochs`, {
      wallS: Number.NaN,
      cpuS,
      peakMb: Number.NaN,
    });
  });
});
