import {readdirSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {emptyFolder, sample, stillmark} from './run.ts';

/*
 * Field sheets and marks files as people mistype them, through the built command. What each message
 * must say is tested beside the readers; here: the exit status, one message with file and line, and
 * nothing written.
 */

/** What is wrong, the text, the line that the message names, and what it says there. */
type Case = readonly [what: string, text: string, line: number, says: RegExp];

const MARK =
  'marks:\n  - name: MOLE\n    latitude: 41.6998870416\n    longitude: -152.3069815542\n';

const sheets: readonly Case[] = [
  ['a wrong key', 'mark: MOLE\nobserv: somebody\n', 2, /did you mean "observer"\?/],
  ['a length without a unit', 'mark: MOLE\nseparation: -14.620\n', 2, /write "-14\.620 m"/],
  ['a decimal comma', 'mark: MOLE\nseparation: -14,620 m\n', 2, /decimal comma/],
  ['a tab as indentation', 'mark: MOLE\nantenna:\n\tmeasured: slant\n', 3, /use spaces/],
  ['an alias bomb', 'mark: MOLE\nproblems: &a [x, x]\nweather: [*a, *a]\n', 2, /remove it/],
  ['a key given twice', 'mark: MOLE\nweather: dry\nweather: wet\n', 3, /keep one/],
  [
    'a slant height without the plate radius',
    'mark: MOLE\nantenna:\n  measured: slant\n  measured to: slant mark\n  slant mark above reference point: 0 m\n  before: {readings: [1.853 m]}\n',
    3,
    /plate radius/,
  ],
  [
    'a bearing from grid north without a grid',
    'mark: MOLE\neccentricity:\n  distance: 0.5 m\n  bearing: 10\n  bearing from: grid north\n',
    4,
    /grid/,
  ],
];

const marks: readonly Case[] = [
  ['an unknown key', `${MARK}    heigth: 5.2 m\n`, 5, /no key "heigth"/],
  ['a mark given twice', `${MARK}${MARK.replace('marks:\n', '')}`, 5, /keep one/],
  ['a missing epoch', `${MARK}    frame: ITRF2020\n`, 5, /coordinate epoch/],
  ['minutes above 59', MARK.replace('41.6998870416', '41 61 59.59 N'), 3, /minutes below 60/],
  ['no list of marks', 'frame: ITRF2020\n', 1, /marks/],
];

const csv: readonly Case[] = [
  [
    'an open quote after CRLF',
    'name,latitude,longitude\r\nMOLE,41.69,-152.3\r\n"QUAY,41.7,-152.3\r\n',
    3,
    /never closed/,
  ],
  ['a decimal comma', 'name;latitude;longitude\nMOLE;41,69;-152,30\n', 2, /decimal comma/],
];

const sinex: readonly Case[] = [
  ['a block that never ends', '%=SNX 2.02\n+SITE/ID\n', 2, /SITE\/ID/],
];

/** Runs a check with one bad file and asks for every kind of output. */
function expectRefused(
  file: string,
  text: string,
  words: readonly string[],
  {2: line, 3: says}: Case,
) {
  const folder = emptyFolder();
  const path = join(folder, file);
  writeFileSync(path, text);
  const outputs = ['result', 'report', 'epochs', 'geojson', 'kml', 'sinex'].flatMap((name) => [
    `--${name}`,
    join(folder, `out.${name}`),
  ]);
  const ran = stillmark(['check', sample('mole-still.nmea'), ...words, path, ...outputs]);
  expect(ran.status).toBe(2);
  expect(ran.stdout).toBe('');
  expect(ran.stderr).toMatch(says);
  const [message, ...rest] = ran.stderr.split('\n');
  expect(message!.startsWith(`stillmark: ${path}, line ${line}: `), message).toBe(true);
  expect(rest).toEqual(['']);
  expect(readdirSync(folder)).toEqual([file]);
}

const withMarks = ['--marks', sample('marks.yaml')];
const withMark = ['--mark', 'MOLE'];

describe('a malformed field sheet', () => {
  test.each(sheets)('%s', (...one) => {
    expectRefused('sheet.yaml', one[1], [...withMarks, ...withMark, '--sheet'], one);
  });
});

describe('a malformed marks file', () => {
  test.each(marks)('YAML: %s', (...one) => {
    expectRefused('marks.yaml', one[1], [...withMark, '--marks'], one);
  });
  test.each(csv)('CSV: %s', (...one) => {
    expectRefused('marks.csv', one[1], [...withMark, '--marks'], one);
  });
  test.each(sinex)('SINEX: %s', (...one) => {
    expectRefused('marks.snx', one[1], [...withMark, '--marks'], one);
  });
});
