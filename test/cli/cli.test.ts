import {existsSync, readdirSync, readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {gzipSync} from 'node:zlib';
import {describe, expect, test} from 'vitest';
import {emptyFolder, sample, stillmark} from './run.ts';

const CHECK_MOLE = [
  'check',
  sample('mole-still.nmea'),
  '--marks',
  sample('marks.yaml'),
  '--sheet',
  sample('sheet.yaml'),
];

describe('asking for help', () => {
  test('names the commands and the exit statuses, in English whatever the locale', () => {
    const {status, stdout} = stillmark(['--help'], {env: {LC_ALL: 'de_DE.UTF-8', LANG: 'de_DE'}});
    expect(status).toBe(0);
    for (const word of ['contents', 'reduce', 'check', 'Exit status', 'Options:']) {
      expect(stdout).toContain(word);
    }
  });

  test.each(['contents', 'reduce', 'check'])('%s shows three examples', (command) => {
    const {status, stdout} = stillmark([command, '--help']);
    expect(status).toBe(0);
    expect(stdout.split(`stillmark ${command} `).length - 1).toBeGreaterThanOrEqual(3);
  });

  test('the version is that of the package', () => {
    const {version} = JSON.parse(readFileSync('package.json', 'utf8'));
    expect(stillmark(['--version']).stdout.trim()).toBe(version);
  });
});

describe('requests that cannot be met', () => {
  test.each([
    [[], 'name a command'],
    [['chek', 'x.log'], 'Did you mean check?'],
    [['reduce', sample('mole-still.nmea'), '--tolerence', '20mm'], 'tolerence'],
    [['reduce', 'nowhere.log'], 'no such file'],
    [['reduce', 'src'], 'this is a folder'],
    [['reduce', sample('mole-still.nmea'), '--max-sigma', '20'], 'without a unit'],
    [['reduce', sample('mole-still.nmea'), '--max-age', '5'], 'with its unit'],
    [
      ['reduce', sample('mole-still.nmea'), '--at', '41.7'],
      'latitude,longitude,ellipsoidal height',
    ],
    [['reduce', sample('mole-still.nmea'), '--max-hdop', 'low'], 'number'],
    [['reduce', sample('mole-still.nmea'), '--fix', 'good'], 'fix'],
    [['reduce', sample('mole-still.nmea'), '--stand', '9'], 'standing periods'],
    [['reduce', sample('mole-still.nmea'), '--report', '/nowhere/r.html'], 'folder does not exist'],
    [['reduce', sample('mole-still.nmea'), '--result', sample('mole-still.nmea')], 'also an input'],
    [['reduce', sample('mole-still.nmea'), '--result', '-', '--epochs', '-'], 'only one output'],
    [
      ['reduce', sample('mole-still.nmea'), '--settle', '1min', '--settle', '2min'],
      'given 2 times',
    ],
    [
      ['reduce', sample('mole-still.nmea'), '--grid', 'EPSG:25832', '--frame', 'ITRF2014'],
      'is a grid of ETRF, ETRS89',
    ],
    [['reduce', sample('mole-still.nmea'), '--coordinate-epoch', 'May 2026'], 'decimal year'],
    [['check', sample('mole-still.nmea')], 'name of the mark'],
    [['check', sample('mole-still.nmea'), '--mark', 'MOLE'], '--marks'],
    [
      ['check', sample('mole-still.nmea'), '--mark', 'MOLLE', '--marks', sample('marks.yaml')],
      'near in name: MOLE',
    ],
  ])('%j: says what and what to do, exit 2, no stack trace', (words, says) => {
    const {status, stdout, stderr} = stillmark(words);
    expect(stderr).toContain(says);
    expect(stderr).not.toMatch(/^\s+at /m);
    expect(stdout).toBe('');
    expect(status).toBe(2);
  });

  test('a log without a date asks for one, and takes it', () => {
    const folder = emptyFolder();
    const dateless = join(folder, 'dateless.nmea');
    const lines = readFileSync(sample('mole-still.nmea'), 'utf8')
      .split('\r\n')
      .filter((line) => line.includes('GGA'))
      .slice(0, 200);
    writeFileSync(dateless, lines.join('\r\n'));
    const refused = stillmark(['reduce', dateless]);
    expect(refused.status).toBe(2);
    expect(refused.stderr).toContain('--date YYYY-MM-DD');
    const taken = stillmark(['reduce', dateless, '--date', '2026-05-12']);
    expect(taken.status).toBe(0);
    expect(taken.stdout).toContain('2026-05-12 09:12:00');
  });
});

describe('outputs', () => {
  test('appear complete or not at all, and equal input gives equal bytes', () => {
    const folder = emptyFolder();
    const at = (name: string) => join(folder, name);
    const outputs = ['result', 'epochs', 'geojson', 'kml', 'report'];
    const words = [...CHECK_MOLE, ...outputs.flatMap((name) => [`--${name}`, at(name)])];
    const first = stillmark(words, {env: {TZ: 'UTC'}});
    expect(first.stderr).toBe('');
    const bytes = outputs.map((name) => readFileSync(at(name)));
    stillmark(words, {env: {TZ: 'America/St_Johns', LC_ALL: 'de_DE.UTF-8'}});
    outputs.forEach((name, i) => {
      expect(readFileSync(at(name)).equals(bytes[i]!), name).toBe(true);
    });
    expect(readdirSync(folder).sort()).toEqual([...outputs].sort());
  });

  test('the time axis of the report counts from the first epoch read, used or not', () => {
    const folder = emptyFolder();
    const report = join(folder, 'settled.html');
    const words = ['reduce', sample('mole-still.nmea'), '--settle', '10min', '--report', report];
    expect(stillmark(words).status).toBe(0);
    const page = readFileSync(report, 'utf8');
    // The log begins at 09:12:00; the ten minutes left out stand on the axis as what they are.
    expect(page).toContain('09:12:00 no epoch used');
    expect(page).toMatch(/09:22:00 east /);
    expect(page).toContain('2026-05-12 09:22:00 to 09:51:59 UTC');
  });

  test('a failed run leaves an earlier output as it was', () => {
    const folder = emptyFolder();
    const kept = join(folder, 'kept.json');
    writeFileSync(kept, 'earlier');
    expect(stillmark(['reduce', 'nowhere.log', '--result', kept]).status).toBe(2);
    expect(readFileSync(kept, 'utf8')).toBe('earlier');
  });

  test('a file of ours says nothing of where or when it was made', () => {
    const {stdout} = stillmark([...CHECK_MOLE, '--result', '-']);
    expect(stdout).not.toContain(process.cwd());
    expect(JSON.parse(stdout).inputs[0].name).toBe('mole-still.nmea');
  });

  test('gzip and standard input give the same position', () => {
    const folder = emptyFolder();
    const packed = join(folder, 'mole.nmea.gz');
    const bytes = readFileSync(sample('mole-still.nmea'));
    writeFileSync(packed, gzipSync(bytes));
    const position = (ran: {stdout: string}) => JSON.parse(ran.stdout).position.ecefM;
    const plain = position(stillmark(['reduce', sample('mole-still.nmea'), '--result', '-']));
    expect(position(stillmark(['reduce', packed, '--result', '-']))).toEqual(plain);
    expect(position(stillmark(['reduce', '-', '--result', '-'], {input: bytes}))).toEqual(plain);
  });

  test('damaged gzip and an empty file are named', () => {
    const folder = emptyFolder();
    const cut = join(folder, 'cut.gz');
    writeFileSync(cut, gzipSync(readFileSync(sample('mole-still.nmea'))).subarray(0, 5000));
    expect(stillmark(['contents', cut])).toMatchObject({status: 2});
    expect(stillmark(['contents', cut]).stderr).toContain('cut short');
    const empty = join(folder, 'empty.log');
    writeFileSync(empty, '');
    expect(stillmark(['contents', empty]).stderr).toContain('empty');
    expect(existsSync(empty)).toBe(true);
  });

  test('the summary is plain text when piped, and NO_COLOR is obeyed', () => {
    expect(stillmark(CHECK_MOLE).stdout).not.toContain('\u001b');
  });
});
