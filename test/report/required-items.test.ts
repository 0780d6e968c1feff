import {readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {emptyFolder, sample, stillmark} from '../cli/run.ts';
import {fullSheet} from '../fieldbook/full-sheet.ts';

/*
 * What a report of a GNSS survey must contain: the union of published lists, each item as a value
 * or as a labelled blank line. Sources, read as quoted in secondary documents: Survey Report
 * Requirements of the Survey and Land Registration Bureau of Bahrain [B]; survey report template
 * and Adjustment Source form of New South Wales [N]; US Army subcourse EN0593A, part E [A]; control
 * narrative of the Louisiana State University Center for GeoInformatics [L]; Baufachliche
 * Richtlinien Vermessung, Umfang der Nachweise für GNSS-Messungen [D]; LINZ kb/333 [Z]; TxDOT GPS
 * manual, chapter 6 [T].
 */
const folder = emptyFolder();

function page(name: string, ...words: string[]): string {
  const path = join(folder, `${name}.html`);
  const {stderr} = stillmark([
    'check',
    sample('mole-still.nmea'),
    '--marks',
    sample('marks.yaml'),
    '--mark',
    'MOLE',
    '--report',
    path,
    ...words,
  ]);
  expect(stderr).not.toMatch(/^stillmark: /m);
  const html = readFileSync(path, 'utf8');
  // What a reader sees: no script, no style, no hidden drawing.
  return html
    .slice(html.indexOf('<body'), html.indexOf('id="result"'))
    .replace(/<svg.*?<\/svg>/gs, '');
}

/** The sheet in which everything is filled in, for the log and the mark of the sample. */
function sheetOfTheSample(): string {
  return fullSheet()
    .split('\nsettings:')[0]!
    .replace(/^geoid grid: .*\n/m, '')
    .replace(/^mark: .*$/m, 'mark: MOLE')
    .replace(/^separation: .*$/m, 'separation: -14.620 m')
    .replace(/^coordinate epoch: .*$/m, 'coordinate epoch: 2025.0')
    .replace(/^projection: .*$/m, 'projection: UTM 5N');
}

/** Another set-up over the same mark: the repeat determination. */
function earlierResult(): string {
  const path = join(folder, 'earlier.json');
  stillmark([
    'check',
    sample('mole-still.nmea'),
    '--sheet',
    sample('sheet.yaml'),
    '--marks',
    sample('marks.yaml'),
    '--to-utc',
    '2026-05-12T09:30:00',
    '--result',
    path,
  ]);
  return path;
}

/** Items that only people know: a labelled line, filled in or blank. */
const LABELLED: readonly (readonly [item: string, label: string])[] = [
  ['project [B]', 'project'],
  ['client [B]', 'client'],
  ['address [B]', 'address'],
  ['date [B]', 'date'],
  ['company [B]', 'organisation'],
  ['responsible person [B]', 'responsible'],
  ['registration [B]', 'registration'],
  ['purpose [N]', 'purpose'],
  ['location and background [N]', 'location'],
  ['personnel [B, N, A]', 'observer'],
  ['receiver [B, N, A]', 'receiver, type'],
  ['receiver serial number [B, N, A]', 'receiver, serial'],
  ['antenna [B, N, A]', 'antenna, type'],
  ['antenna serial number [B, N, A]', 'antenna, serial'],
  ['antenna type by its international code [N]', 'antenna, code'],
  ['software of the receiver and its version [N, B]', 'receiver, software'],
  ['firmware of the receiver [N]', 'receiver, firmware'],
  ['technique and real-time mode [N, A, L]', 'corrections, mode'],
  ['correction source [N, L]', 'corrections, source'],
  ['constellations [N]', 'satellites'],
  ['weather [N, A]', 'weather'],
  ['single, double or triple occupation [N]', 'occupation of this mark'],
  ['length of the baseline [N]', 'corrections, distance to base'],
  ['local fit and its residuals at tie points [N, D]', 'corrections, local fit'],
  ['quality thresholds in the receiver [N, L]', 'corrections, limits'],
  ['datum and realisation [L]', 'frame'],
  ['epoch [L]', 'coordinate epoch'],
  ['vertical datum [L]', 'vertical datum'],
  ['geoid model [L, D]', 'geoid model'],
  ['projection and zone [L]', 'projection'],
  ['units [L]', 'units'],
  ['antenna corrections used [D]', 'antenna, phase centre above reference point'],
  ['how accuracy risk was managed [Z]', 'accuracy risk'],
  ['deliverables [B]', 'deliverables'],
  ['conclusions and recommendations [B]', 'conclusions'],
  ['photographs and diagrams [B]', 'photographs'],
  ['departures from the specification, with approval [T]', 'departures'],
  ['how the mark was identified [A]', 'identification'],
];

/** Items that the record gives: what a reader must find on the page. */
const COMPUTED: readonly (readonly [item: string, found: RegExp])[] = [
  ['title [B]', /<h1/],
  ['session and its length [N, A]', /09:12:00.*09:51:59/s],
  ['program and version [N, B]', /stillmark 0\.1\.0|stillmark<[^>]*> 0\.1\.0/],
  ['quality thresholds of the screening [N, L]', /min-satellites|fewest satellites/],
  ['coordinates of the point [D]', /41\.69988/],
  ['check for gross errors on the control point [D]', /toward/],
  [
    'differences between repeat determinations [D]',
    /This setup minus other setups on the same mark.*disagrees/s,
  ],
  ['accuracy with interpretation [B]', /95\s?%/],
  ['rejected observations [N]', /left out|Left out|rejected/],
  ['the criterion of rejection [N]', /4\.5 robust standard deviations/],
  ['control schedule with the description of the mark [B]', /bolt in the crown of the breakwater/],
  ['log sheets: fingerprint of the raw log [N, A]', /f0e0e73771e0746c/],
  ['signature of the one responsible [B]', /Computed by, date/],
];

describe('what published lists require of a report', () => {
  const filled = join(folder, 'full.yaml');
  writeFileSync(filled, sheetOfTheSample());
  const blank = page('blank');
  const withSheet = page('filled', '--sheet', filled, '--with', earlierResult());

  test.each(LABELLED)('%s: a labelled blank line where nobody gave it', (_, label) => {
    const given = blank.includes(`<dt>${label}</dt>`);
    const open = blank.includes(`<li>${label}</li>`);
    expect(given || open).toBe(true);
  });

  test.each(LABELLED)('%s: a value where the sheet gives it', (_, label) => {
    const row = new RegExp(`<dt>${label}</dt><dd><bdi>[^<]+</bdi></dd>`);
    expect(row.test(withSheet)).toBe(true);
  });

  test.each(COMPUTED)('%s', (_, found) => {
    expect(found.test(withSheet)).toBe(true);
  });
});
