import {describe, expect, test} from 'vitest';
import {InputError} from '../../src/errors.ts';
import {readMarks} from '../../src/fieldbook/marks.ts';
import {readSheet} from '../../src/fieldbook/sheet.ts';

/** What is wrong, the text, the line that the message must name, and the remedy it must hold. */
type Case = readonly [what: string, text: string, line: number, remedy: RegExp];

const bytes = (text: string) => new TextEncoder().encode(text);

function refusalOf(read: () => unknown): InputError {
  try {
    read();
  } catch (error) {
    if (error instanceof InputError) return error;
    throw error;
  }
  throw new Error('expected a refusal, but the file was read');
}

function expectRefusal(error: InputError, path: string, line: number, remedy: RegExp) {
  expect(error.message).toMatch(remedy);
  expect(error.lineNumber).toBe(line);
  expect(error.path).toBe(path);
  expect(error.message).not.toContain('\n');
  expect(error.message).not.toMatch(/\.$|^Error|undefined|\[object/);
}

const MARK = 'marks:\n  - name: P1\n    latitude: 48.1\n    longitude: 16.2\n';
const bomb = `a: &a [x, x, x, x, x, x, x, x, x]\n${['b', 'c', 'd', 'e', 'f']
  .map((key, i) => `${key}: &${key} [${Array(9).fill(`*${'abcde'[i]}`).join(', ')}]`)
  .join('\n')}\n`;

const sheets: readonly Case[] = [
  [
    'an unknown key',
    'mark: P1\nobserv: somebody\n',
    2,
    /no key "observ"; did you mean "observer"\?/,
  ],
  ['a key of another case', 'Mark: P1\n', 1, /did you mean "mark"\?/],
  [
    'a key with a hyphen',
    'mark: P1\ncoordinate-epoch: 2020.0\n',
    2,
    /did you mean "coordinate epoch"\?/,
  ],
  ['a key that resembles nothing', 'qqqq: 1\n', 1, /the keys here are: title, project/],
  [
    'an unknown key in a block',
    'antenna:\n  type: A\n  radius: 0.19 m\n',
    3,
    /did you mean "plate radius"\?/,
  ],
  [
    'a key given twice',
    'mark: P1\nweather: dry\nmark: P2\n',
    3,
    /"mark" stands twice in this block; keep one/,
  ],
  ['a tab as indentation', 'antenna:\n\ttype: A\n', 2, /tab.*use spaces/],
  ['a tab after spaces', 'antenna:\n  type: A\n\tserial: 1\n', 3, /tab.*use spaces/],
  [
    'uneven indentation',
    'antenna:\n  type: A\n serial: 1\n',
    3,
    /indent the keys of one block alike/,
  ],
  ['an alias bomb', bomb, 1, /"&a" names a value to be repeated; remove it/],
  ['an alias', 'mark: P1\nobserver: *mark\n', 2, /write the value out/],
  ['an anchor', 'mark: &m P1\n', 1, /put text with & into quotes/],
  ['a merge key', 'antenna:\n  <<: {type: A}\n', 2, /write the keys out/],
  ['a tag', 'separation: !!float 44.1\n', 1, /put it into quotes/],
  ['two documents', 'mark: P1\n---\nmark: P2\n', 2, /keep one sheet per file and remove the line/],
  ['a colon in a value', 'mark: P1\nweather: dry: no wind\n', 2, /put the value into quotes/],
  ['a number sign in a name', 'mark: PILLAR #4\n', 1, /put the value into quotes/],
  ['a name that is only a comment', 'mark: #4\n', 1, /put the value into quotes/],
  [
    'an open quote',
    'mark: "P1\nweather: dry\n',
    1,
    /quote opens here and is never closed; close it/,
  ],
  ['text behind a quote', 'mark: "P1" north\n', 1, /put the whole value into one pair of quotes/],
  ['a backslash in double quotes', 'remarks: "c:\\qhoto"\n', 1, /use single quotes/],
  ['a value that begins with @', 'client: @board\n', 1, /put it into quotes/],
  [
    'a line without a colon',
    'mark: P1\nweather\nclient: B\n',
    2,
    /write the key, a colon and a space/,
  ],
  ['no space after the colon', 'mark:P1\nclient:B\n', 1, /write a space after each colon/],
  ['text that runs on', 'mark: P1\nremarks: windy\n  later calm\n', 3, /put long text into quotes/],
  ['a list for a sheet', '- mark: P1\n', 1, /"key: value"/],
  ['a list for a word', 'mark: [P1, P2]\n', 1, /expected one value, found a list/],
  ['a word for a block', 'antenna: 1.853 m\n', 1, /expected keys of its own/],
  ['deep brackets', `mark: ${'['.repeat(50_000)}\n`, 1, /close or remove them/],
  ['nested lists', `mark: ${'['.repeat(20)}${']'.repeat(20)}\n`, 1, /remove brackets/],
  ['a length without a unit', 'separation: 44.667\n', 1, /write "44\.667 m" if metres are meant/],
  ['an unknown unit', 'separation: 44.667 metres\n', 1, /unit "metres"; write "44\.667 m"/],
  ['a unit that is none', 'separation: 44.667 kg\n', 1, /write one of m, cm, mm, ft, us-ft or in/],
  ['survey feet misspelt', 'antenna:\n  plate radius: 0.62 usft\n', 2, /write "0\.62 us-ft"/],
  ['a decimal comma', 'separation: 44,667 m\n', 1, /decimal comma.*write 44\.667 m/],
  [
    'digits in groups',
    'receiver:\n  height entered: 1 000.5 m\n',
    2,
    /digits in groups; write 1000\.5 m/,
  ],
  ['a long dash', 'separation: \u221244.6 m\n', 1, /write the sign as a hyphen: -44\.6 m/],
  ['a word for a length', 'separation: unknown\n', 1, /write for example "1\.543 m"/],
  [
    'a length out of reach',
    'separation: 44667 m\n',
    1,
    /from -120 m to 120 m.*check digits and unit/,
  ],
  [
    'centimetres as a reading',
    'antenna:\n  measured: vertical\n  measured to: antenna reference point\n  before: {readings: [185.3 m]}\n',
    4,
    /check digits and unit/,
  ],
  [
    'one reading for a list',
    'antenna:\n  before:\n    readings: 1.853 m\n',
    3,
    /write each item on its own line after "- "/,
  ],
  [
    'a blank reading',
    'antenna:\n  before:\n    readings:\n      - 1.853 m\n      -\n',
    5,
    /fill it in, as .*, or remove it/,
  ],
  [
    'a height of no kind',
    'antenna:\n  measured to: antenna reference point\n  before: {readings: [1.853 m]}\n',
    3,
    /write "measured: vertical" or "measured: slant"/,
  ],
  [
    'a height to no point',
    'antenna:\n  measured: vertical\n  before: {readings: [1.853 m]}\n',
    3,
    /write "measured to: antenna reference point"/,
  ],
  [
    'a slant height without a radius',
    'antenna:\n  measured: slant\n  measured to: slant mark\n  slant mark above reference point: 0 m\n  before: {readings: [1.853 m]}\n',
    2,
    /write for example "plate radius: 0\.1905 m"/,
  ],
  [
    'a slant mark without its height',
    'antenna:\n  measured: slant\n  measured to: slant mark\n  plate radius: 0.19 m\n  before: {readings: [1.853 m]}\n',
    3,
    /"slant mark above reference point: 0\.0350 m"/,
  ],
  [
    'a slant shorter than the radius',
    'antenna:\n  measured: slant\n  measured to: antenna reference point\n  plate radius: 0.9 m\n  before: {readings: [0.85 m]}\n',
    5,
    /not longer than the plate radius.*check both/,
  ],
  [
    'a slope to the phase centre',
    'antenna:\n  measured: slant\n  measured to: phase centre\n  phase centre above reference point: 0.07 m\n  plate radius: 0.1 m\n  before: {readings: [1.8 m]}\n',
    3,
    /write "measured to: slant mark"/,
  ],
  [
    'a phase centre without its offset',
    'antenna:\n  measured: vertical\n  measured to: phase centre\n  before: {readings: [1.8 m]}\n',
    3,
    /"phase centre above reference point: 0\.0712 m"/,
  ],
  [
    'a radius for a vertical height',
    'antenna:\n  measured: vertical\n  measured to: antenna reference point\n  plate radius: 0.19 m\n  before: {readings: [1.8 m]}\n',
    4,
    /write "measured: slant", or remove it/,
  ],
  ['a closing height alone', 'antenna:\n  after: {readings: [1.853 m]}\n', 2, /fill in "before"/],
  [
    'a mean of one',
    'antenna:\n  measured: vertical\n  measured to: antenna reference point\n  before: {readings: [1.8 m]}\n  height used: mean\n',
    5,
    /fill in "after", or write opening/,
  ],
  [
    'check readings alone',
    'antenna:\n  before: {check readings: [6.08 ft]}\n',
    2,
    /write for example "readings: \[1\.853 m/,
  ],
  [
    'a closing height before the opening',
    'antenna:\n  measured: vertical\n  measured to: antenna reference point\n  before: {readings: [1.8 m], at: 2026-05-04T09:00:00Z}\n  after: {readings: [1.8 m], at: 2026-05-04T08:00:00Z}\n',
    5,
    /check both times/,
  ],
  ['a misspelt choice', 'antenna:\n  measured: vertcal\n', 2, /did you mean "vertical"\?/],
  [
    'a choice that is none',
    'antenna:\n  measured: by eye\n',
    2,
    /one of "vertical", "slant".*write one of them/,
  ],
  ['neither yes nor no', 'receiver:\n  reduced to mark: perhaps\n', 2, /write yes or no/],
  [
    'a receiver that reduced and did not',
    'receiver:\n  reduced to mark: yes\nlog point: phase centre\n',
    3,
    /write "log point: mark"/,
  ],
  [
    'a receiver that did not reduce',
    'receiver:\n  reduced to mark: no\nlog point: mark\n',
    3,
    /write "log point: antenna reference point"/,
  ],
  ['a day before its month', 'date: 04.05.2026\n', 1, /write YYYY-MM-DD/],
  ['a day that does not exist', 'date: 2026-02-30\n', 1, /no such day.*write YYYY-MM-DD/],
  [
    'a time without a zone',
    'start: 2026-05-04 10:00\n',
    1,
    /no Z and no offset.*write date, time and Z/,
  ],
  [
    'a session that ends before it starts',
    'start: 2026-05-04 10:00 +02:00\nstop: 2026-05-04 08:00Z\n',
    2,
    /check date, time and offset/,
  ],
  [
    'a date for an epoch',
    'frame: ITRF2020\ncoordinate epoch: 2020-01-01\n',
    2,
    /write the decimal year, such as 2020\.0/,
  ],
  ['an epoch with a comma', 'coordinate epoch: 2020,0\n', 1, /decimal comma.*write 2020\.0/],
  [
    'a bearing without its north',
    'eccentricity:\n  distance: 1 m\n  bearing: 10\n',
    3,
    /write "bearing from: true north"/,
  ],
  [
    'a magnetic bearing without declination',
    'eccentricity:\n  distance: 1 m\n  bearing: 10\n  bearing from: magnetic north\n',
    4,
    /"declination: 3\.5"/,
  ],
  [
    'a bearing of 400 degrees',
    'eccentricity:\n  distance: 1 m\n  bearing: 400\n',
    3,
    /from 0 to below 360.*write decimal degrees/,
  ],
  ['east without north', 'eccentricity:\n  east: 1 m\n', 2, /give both east and north/],
  [
    'two eccentricities',
    'eccentricity:\n  east: 1 m\n  north: 0 m\n  distance: 1 m\n',
    4,
    /not both/,
  ],
  [
    'an uncertainty without a number',
    'standard uncertainties:\n  - of: centring\n',
    2,
    /write for example "plan: 1 mm"/,
  ],
  [
    'an uncertainty of nothing',
    'standard uncertainties:\n  - plan: 1 mm\n',
    2,
    /"of" is missing; write "of: antenna height"/,
  ],
  [
    'an uncertainty given twice',
    'standard uncertainties:\n  - {of: base, up: 1 cm}\n  - {of: base, up: 2 cm}\n',
    3,
    /given twice; keep one/,
  ],
  ['a setting that does not exist', 'settings:\n  max-pdo: 4\n', 2, /did you mean "max-pdop"\?/],
  [
    'a duration without a unit',
    'settings:\n  settle: 300\n',
    2,
    /write it in s, min, h or d, as 5 min/,
  ],
  ['a tolerance of zero', 'tolerance:\n  horizontal: 0 mm\n', 2, /check digits and unit/],
  ['a word for a number', 'settings:\n  min-satellites: six\n', 2, /write it with a decimal point/],
];

const yamlMarks: readonly Case[] = [
  [
    'a mark given twice',
    `${MARK}  - name: p-1\n    latitude: 1\n    longitude: 2\n`,
    5,
    /also on line 2 as "P1"; keep one/,
  ],
  [
    'a mark without a name',
    'marks:\n  - latitude: 48.1\n    longitude: 16.2\n',
    2,
    /"name" is missing; write "name: PILLAR 4"/,
  ],
  [
    'a mark without coordinates',
    'marks:\n  - name: P1\n',
    2,
    /give latitude and longitude, x, y and z/,
  ],
  ['no list of marks', 'frame: ITRF2020\n', 1, /write "marks: \[\{name: PILLAR 4/],
  ['an empty list of marks', 'frame: GDA2020\nmarks:\n', 2, /write "marks: \[\{name: PILLAR 4/],
  [
    'a misspelt coordinate',
    'marks:\n  - name: P1\n    lattitude: 48.1\n    longitude: 16.2\n',
    3,
    /mark P1: .*did you mean "latitude"\?/,
  ],
  ['a latitude alone', 'marks:\n  - name: P1\n    latitude: 48.1\n', 2, /"longitude" is missing/],
  [
    'two kinds of coordinates',
    `${MARK}    easting: 1 m\n    northing: 2 m\n`,
    5,
    /keep one kind of coordinates/,
  ],
  [
    'a global frame without an epoch',
    `${MARK}    frame: ITRF2020\n`,
    5,
    /"coordinate epoch: 2020\.0"/,
  ],
  [
    'an epoch of another frame',
    `frame: GDA2020\ncoordinate epoch: 2020.0\n${MARK}    frame: ITRF2014\n`,
    7,
    /"coordinate epoch: 2020\.0"/,
  ],
  [
    'a velocity without an epoch',
    `${MARK}    velocity: {east: 20 mm/yr, north: 10 mm/yr}\n`,
    5,
    /"coordinate epoch: 2020\.0"/,
  ],
  [
    'a velocity per nothing',
    `${MARK}    velocity: {east: 20 mm, north: 10 mm/yr}\n`,
    5,
    /write it per year, as "20 mm\/yr"/,
  ],
  [
    'half a velocity',
    `coordinate epoch: 2020.0\n${MARK}    velocity: {east: 20 mm/yr}\n`,
    6,
    /give all of them/,
  ],
  [
    'a latitude with a comma',
    'marks:\n  - name: P1\n    latitude: 48,1\n    longitude: 16.2\n',
    3,
    /decimal comma.*write 48\.1/,
  ],
  [
    'a latitude of 91 degrees',
    'marks:\n  - name: P1\n    latitude: 91\n    longitude: 16.2\n',
    3,
    /between -90 and 90/,
  ],
  [
    '60 minutes',
    'marks:\n  - name: P1\n    latitude: 48 60 00 N\n    longitude: 16.2\n',
    3,
    /minutes below 60.*write decimal degrees or/,
  ],
  [
    '75 seconds',
    'marks:\n  - name: P1\n    latitude: 48 12 75.1 N\n    longitude: 16.2\n',
    3,
    /seconds below 60/,
  ],
  [
    'an east latitude',
    'marks:\n  - name: P1\n    latitude: 48 12 30 E\n    longitude: 16.2\n',
    3,
    /need N or S/,
  ],
  [
    'a sign and a letter',
    'marks:\n  - name: P1\n    latitude: -48 12 30 S\n    longitude: 16.2\n',
    3,
    /a sign or a hemisphere letter/,
  ],
  [
    'kilometres as geocentric metres',
    'marks:\n  - name: P1\n    x: 4052.052 m\n    y: 4212.835 m\n    z: 2545.104 m\n',
    3,
    /check digits and units/,
  ],
  [
    'geocentric metres without a unit',
    'marks:\n  - name: P1\n    x: -4052052.9688\n',
    3,
    /write "-4052052\.9688 m"/,
  ],
  [
    'two ellipsoidal heights',
    'marks:\n  - name: P1\n    x: -4052052.9688 m\n    y: 4212835.9507 m\n    z: -2545104.2663 m\n    ellipsoidal height: 603 m\n',
    6,
    /remove one of the two/,
  ],
  [
    'a grid without a projection',
    'marks:\n  - name: P1\n    easting: 1 m\n    northing: 2 m\n',
    3,
    /write for example "projection: UTM 33 N"/,
  ],
  [
    'heights that contradict the separation',
    `${MARK}    ellipsoidal height: 100 m\n    orthometric height: 60 m\n    separation: 44 m\n`,
    7,
    /correct or remove one of the three/,
  ],
  [
    'uncertainty under another name',
    `${MARK}    uncertainty: {east: 3 mm}\n`,
    5,
    /did you mean "standard uncertainty"\?/,
  ],
  [
    'uncertainty along two sets of axes',
    `${MARK}    standard uncertainty: {east: 3 mm, north: 3 mm, x: 3 mm}\n`,
    5,
    /keep east, north and up, or x, y and z/,
  ],
  [
    'a covariance that is none',
    `${MARK}    covariance: {axes: enu, unit: mm2, rows: [[1], [2, 1], [0, 0, 1]]}\n`,
    5,
    /check its numbers and signs/,
  ],
  [
    'an asymmetric covariance',
    `${MARK}    covariance: {axes: enu, unit: mm2, rows: [[4, 1, 0], [2, 4, 0], [0, 0, 4]]}\n`,
    5,
    /give its lower triangle/,
  ],
  [
    'a covariance without a unit',
    `${MARK}    covariance: {axes: enu, rows: [[1]]}\n`,
    5,
    /"unit" is missing; write "unit: m2"/,
  ],
  [
    'a witness bearing without a distance',
    `${MARK}    witness marks:\n      - {name: bolt, bearing: 10}\n`,
    6,
    /"distance: 3\.21 m"/,
  ],
];

const csvMarks: readonly Case[] = [
  [
    'an unknown column',
    'name,lattitude,longitude\nP1,48,16\n',
    1,
    /no column "lattitude"; did you mean "latitude"\?/,
  ],
  ['a column named twice', 'name,latitude,Latitude\nP1,48,16\n', 1, /stands twice; keep one/],
  [
    'a length without a unit',
    'name,easting,northing,projection\r\nP1,1 m,2 m,UTM 33 N\r\nP2,1,2,UTM 33 N\r\n',
    3,
    /mark P2, easting: .*write "1 m"/,
  ],
  [
    'two units',
    'name,orthometric height m\nP1,12 mm\n',
    2,
    /the column is in m, found "12 mm"; write the number alone/,
  ],
  [
    'a decimal comma between commas',
    'name,latitude,longitude\nP1,48,1,16,2\n',
    2,
    /write numbers with a decimal point/,
  ],
  [
    'a decimal comma between semicolons',
    'name;latitude;longitude\nP1;48,1;16,2\n',
    2,
    /decimal comma.*write 48\.1/,
  ],
  [
    'a short row',
    'name,latitude,longitude\nP1,48.1,16.2\nP2,48.1\n',
    3,
    /leave a cell blank, but keep its separator/,
  ],
  [
    'an open quote after CRLF',
    'name,latitude,longitude\r\nP1,48.1,16.2\r\n"P2,48.1,16.2\r\n',
    3,
    /quote opens here and is never closed/,
  ],
  [
    'text behind a quote',
    'name,latitude,longitude\n"P1"x,48.1,16.2\n',
    2,
    /put the whole cell into quotes/,
  ],
  [
    'an error behind a quoted line end',
    'name,description,latitude,longitude\r\nP1,"bolt\r\nin rock",48.1,16.2\r\nP2,,48 75 00,16.2\r\n',
    4,
    /minutes below 60/,
  ],
  [
    'a mark given twice',
    'name,latitude,longitude\nP1,48.1,16.2\nP2,48.1,16.2\nP1,48.1,16.2\n',
    4,
    /also on line 2; keep one/,
  ],
  ['a row without a name', 'name,latitude,longitude\n,48.1,16.2\n', 2, /"name" is missing/],
  ['UTF-16', '\uFEFFname', 1, /save the file as UTF-8/],
  ['an empty file', '', 1, /expected a header line/],
];

describe('readSheet refuses', () => {
  test.each(sheets)('%s', (_what, text, line, remedy) => {
    const error = refusalOf(() => readSheet(bytes(text), 'day.yaml'));
    expectRefusal(error, 'day.yaml', line, remedy);
  });
});

describe('readMarks refuses, in YAML,', () => {
  test.each(yamlMarks)('%s', (_what, text, line, remedy) => {
    const error = refusalOf(() => readMarks(bytes(text), 'marks.yaml'));
    expectRefusal(error, 'marks.yaml', line, remedy);
  });
});

describe('readMarks refuses, in CSV,', () => {
  test.each(csvMarks)('%s', (what, text, line, remedy) => {
    const utf16 = what === 'UTF-16';
    const file = utf16 ? new Uint8Array(Buffer.from(text, 'utf16le')) : bytes(text);
    const error = refusalOf(() => readMarks(file, 'marks.csv'));
    expectRefusal(error, 'marks.csv', line, remedy);
  });
});

test('there are more than sixty of them', () => {
  expect(sheets.length + yamlMarks.length + csvMarks.length).toBeGreaterThan(60);
});
