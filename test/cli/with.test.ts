import {readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {beforeAll, describe, expect, test} from 'vitest';
import type {Result} from '../../src/occupation/result.ts';
import {simulate} from '../simulate/simulate.ts';
import {ecefTable} from '../simulate/table-writer.ts';
import {emptyFolder, sample, stillmark} from './run.ts';

/** Checks set beside one another, from the logs to the causes. The place is invented. */
const SCENARIO = {
  name: 'two set-ups',
  about: '2, 2 and 4 mm of noise, correlated over ten seconds',
  durationS: 1200,
  intervalS: 1,
  noise: {
    east: [{kind: 'gauss-markov', sdM: 0.002, tauS: 10}],
    north: [{kind: 'gauss-markov', sdM: 0.002, tauS: 10}],
    up: [{kind: 'gauss-markov', sdM: 0.004, tauS: 10}],
  },
} as const;

const PLACES = {
  A: {latitudeDeg: 52.4, longitudeDeg: -30.2, ellipsoidalHeightM: 60},
  B: {latitudeDeg: 52.403, longitudeDeg: -30.194, ellipsoidalHeightM: 64},
};
const MARKS = Object.entries(PLACES)
  .map(
    ([name, place]) =>
      `  - {name: ${name}, latitude: ${place.latitudeDeg}, longitude: ${place.longitudeDeg}, ellipsoidal height: ${place.ellipsoidalHeightM} m, standard uncertainty: {east: 1 mm, north: 1 mm, up: 2 mm}}`,
  )
  .join('\n');

const folder = emptyFolder();
const marks = join(folder, 'marks.yaml');

interface Setup {
  readonly name: string;
  readonly mark: 'A' | 'B';
  readonly startS: number;
  readonly offset: readonly [number, number, number];
  readonly turned?: number;
  readonly with?: readonly string[];
}

let seed = 100;

function check(setup: Setup): Result {
  const [eastM, northM, upM] = setup.offset;
  seed += 1;
  const displaced = simulate(SCENARIO, seed, (clean) => ({
    ...clean,
    eastM: clean.eastM.map((value) => value + eastM),
    northM: clean.northM.map((value) => value + northM),
    upM: clean.upM.map((value) => value + upM),
  }));
  const lines = ecefTable(displaced, {
    place: PLACES[setup.mark],
    date: {year: 2026, month: 3, day: 2},
    startS: setup.startS,
    decimals: 4,
    claimedSigmaM: {x: 0.01, y: 0.01, z: 0.01},
    satellites: 20,
  });
  const path = (kind: string) => join(folder, `${setup.name}.${kind}`);
  writeFileSync(path('csv'), `${lines.join('\n')}\n`);
  writeFileSync(
    path('yaml'),
    `mark: ${setup.mark}\nset-up: ${setup.name}\nlog point: mark\nreceiver: {reduced to mark: yes}\ntribrach: {orientation: turned by ${setup.turned ?? 0} degrees}\nstandard uncertainties:\n  - {of: base, plan: 3 mm, up: 5 mm, id: base 1}\n`,
  );
  const beside = (setup.with ?? []).flatMap((name) => ['--with', join(folder, `${name}.json`)]);
  const words = ['--sheet', path('yaml'), '--marks', marks, '--tolerance', '5mm'];
  const ran = stillmark(['check', path('csv'), ...words, ...beside, '--result', path('json')]);
  expect(ran.stderr).not.toContain('stillmark:');
  return JSON.parse(readFileSync(path('json'), 'utf8'));
}

const codes = ({notices}: Result) => notices.map(({code}) => code);

beforeAll(() => writeFileSync(marks, `marks:\n${MARKS}\n`));

describe('an opening and a closing check of one mark', () => {
  test('that agree say so, with the difference', () => {
    check({name: 'opening', mark: 'A', startS: 25_000, offset: [0.001, 0, 0]});
    const closing = check({
      name: 'closing',
      mark: 'A',
      startS: 60_000,
      offset: [0.001, 0, 0],
      with: ['opening'],
    });
    const [beside] = closing.comparison!.otherSetups;
    expect(beside).toMatchObject({
      name: 'opening.json',
      setUpId: 'opening',
      agreement: 'agrees',
      cancels: ['base or network', 'the mark'],
    });
    expect(beside!.hoursEarlier).toBeCloseTo(35_000 / 3600, 6);
    expect(beside!.differenceM.horizontal).toBeLessThan(0.002);
    expect(codes(closing)).toContain('setups-agree');
    expect(closing.settings.with!.value).toContain('opening.json');
  });

  test('that differ by more than both are worth are a concern', () => {
    const closing = check({
      name: 'sunk',
      mark: 'A',
      startS: 60_000,
      offset: [0.001, 0, -0.012],
      with: ['opening'],
    });
    const [beside] = closing.comparison!.otherSetups;
    expect(beside!.agreement).toBe('disagrees');
    expect(beside!.differenceM.up).toBeCloseTo(-0.012, 2);
    expect(closing.notices.find(({code}) => code === 'setups-disagree')!.severity).toBe('concern');
  });
});

test('two set-ups turned by half a turn show the plummet', () => {
  check({name: 'first', mark: 'A', startS: 25_000, offset: [0.012, 0.006, 0], turned: 0});
  const second = check({
    name: 'second',
    mark: 'A',
    startS: 32_000,
    offset: [-0.012, -0.006, 0],
    turned: 180,
    with: ['first'],
  });
  const cause = second.comparison!.candidates.find(({code}) => code === 'C01')!;
  expect(cause.group).toBe(1);
  expect(cause.predictedM.east).toBeCloseTo(-0.012, 2);
});

test('another mark with the same offset shows the base', () => {
  check({name: 'at-b', mark: 'B', startS: 25_000, offset: [0.31, -0.22, 0.4]});
  const atA = check({
    name: 'at-a',
    mark: 'A',
    startS: 32_000,
    offset: [0.31, -0.22, 0.4],
    with: ['at-b'],
  });
  const cause = atA.comparison!.candidates.find(({code}) => code === 'B01')!;
  expect(cause.group).toBe(1);
  expect(cause.title).toContain('B');
  expect(atA.comparison!.otherSetups).toEqual([]);
});

test('a result with other coordinates of the mark is not used, and that is said', () => {
  const moved = join(folder, 'opening.json');
  const document: Result = JSON.parse(readFileSync(moved, 'utf8'));
  const reference = {
    ...document.reference!,
    geodetic: {...document.reference!.geodetic, latitudeDeg: 52.4001},
  };
  writeFileSync(join(folder, 'moved.json'), JSON.stringify({...document, reference}));
  const result = check({
    name: 'last',
    mark: 'A',
    startS: 60_000,
    offset: [0, 0, 0],
    with: ['moved'],
  });
  expect(result.comparison!.otherSetups).toEqual([]);
  expect(codes(result)).toContain('setup-with-other-coordinates');
});

describe('what is no result of a check is refused with exit status 2', () => {
  const text = (name: string, content: string) => {
    const path = join(folder, name);
    writeFileSync(path, content);
    return path;
  };
  test.each([
    ['no JSON', () => text('text.json', 'not JSON'), 'no JSON'],
    [
      'another document',
      () => text('other.json', '{"schema": "x"}'),
      'no result of this stillmark',
    ],
    [
      'a result with a number missing',
      () =>
        text(
          'short.json',
          readFileSync(join(folder, 'opening.json'), 'utf8').replace(
            /"bytes": \d+/,
            '"bytes": "x"',
          ),
        ),
      'inputs[0].bytes should be a whole number',
    ],
    ['a missing file', () => join(folder, 'missing.json'), 'no such file'],
    [
      'a result of reduce',
      () => {
        const path = join(folder, 'reduced.json');
        stillmark(['reduce', sample('mole-still.nmea'), '--result', path]);
        return path;
      },
      'a reduce without a position compared',
    ],
  ])('%s', (_, path, says) => {
    const words = ['--marks', sample('marks.yaml'), '--mark', 'MOLE'];
    const ran = stillmark(['check', sample('mole-still.nmea'), ...words, '--with', path()]);
    expect(ran.status).toBe(2);
    expect(ran.stderr).toContain(says);
    expect(ran.stdout).toBe('');
  });
});
