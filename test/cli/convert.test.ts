import {execFile} from 'node:child_process';
import {existsSync, readFileSync, writeFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {gzipSync} from 'node:zlib';
import {beforeAll, describe, expect, test} from 'vitest';
import {PLACES, WRONG_FRAMES} from '../geodesy/wrong-frames.ts';
import {readReference} from '../reference/read.ts';
import {emptyFolder, type Ran, stillmark} from './run.ts';

const folder = emptyFolder();
const COMMAND = resolve(import.meta.dirname, '../../dist/cli/main.js');

function file(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('stillmark convert', () => {
  test('reference: IOGP method 9807, the worked example, to its printed 0.01 m', () => {
    interface Guidance {
      readonly examples: readonly {
        readonly id: string;
        readonly input: Readonly<
          Record<'lat_0' | 'lon_0' | 'k_0' | 'fe' | 'fn' | 'lat' | 'lon', string>
        > & {
          readonly ellipsoid: {readonly a: string; readonly rf: string};
        };
        readonly published: {readonly easting: string; readonly northing: string};
      }[];
    }
    const {examples: rows} = readReference<Guidance>('epsg-guidance-note-7-2');
    const {input, published} = rows.find(({id}) => id === '9807')!;
    const {a, rf} = input.ellipsoid;
    const {stdout, status} = stillmark([
      'convert',
      `${input.lat}, ${input.lon}`,
      '--from',
      'geodetic',
      '--to',
      `+proj=tmerc +lat_0=${input.lat_0} +lon_0=${input.lon_0} +k=${input.k_0} +x_0=${input.fe} +y_0=${input.fn} +a=${a} +rf=${rf}`,
      '--ellipsoid',
      `${a},${rf}`,
    ]);
    expect(status).toBe(0);
    const found = (axis: string) => Number(new RegExp(`${axis}_m\\s+(\\S+)`).exec(stdout)?.[1]);
    expect(Math.abs(found('easting') - Number(published.easting))).toBeLessThan(0.01);
    expect(Math.abs(found('northing') - Number(published.northing))).toBeLessThan(0.01);
  });

  test('southern and western numbers need no care', () => {
    const words = ['convert', '-33.5,-70.2,20', '--from', 'geodetic', '--to', 'geocentric'];
    const {stdout, status} = stillmark(words);
    expect(status).toBe(0);
    expect(stdout).toMatch(/x_m\s+1803\d+\.\d{5}\n\s+y_m\s+-5009\d+/);
    const apart = stillmark(['convert', '-33.5', '-70.2', '20', ...words.slice(2)]);
    expect(apart.stdout).toBe(stdout);
  });

  test('every step between frames is printed so that it can be redone', () => {
    const {stdout, status} = stillmark([
      'convert',
      '4027893.5389,307046.0755,4919475.2745',
      '--from',
      'geocentric',
      '--from-frame',
      'ITRF2020',
      '--from-epoch',
      '2020.0',
      '--to-frame',
      'ETRF2020',
    ]);
    expect(status).toBe(0);
    // EUREF Technical Note 1, Appendix B: the published position at 2020.0.
    for (const [axis, published] of [
      ['x', 4027893.9574],
      ['y', 307045.5561],
      ['z', 4919474.9643],
    ] as const) {
      const found = Number(new RegExp(`to .*?${axis}_m\\s+(\\S+)`, 's').exec(stdout)?.[1]);
      expect(Math.abs(found - published)).toBeLessThanOrEqual(1e-4);
    }
    expect(stdout).toMatch(/ITRF2020 to ETRF2020, similarity/);
    expect(stdout).toMatch(/RX mas -?\d.*source: EUREF Technical Note 1/s);
  });

  test('a list, packed or not, is written whole; rows without an answer give status 3', () => {
    const text = 'name,lat,lon,h\nA,50,9,100\nB,95,9,100\nC,51,9,100\n';
    const plain = file('plain.csv', text);
    const packed = file('packed.csv.gz', gzipSync(text));
    const output = join(folder, 'out.csv');
    const {status, stderr} = stillmark([
      'convert',
      '--list',
      plain,
      '--to',
      'UTM 32N',
      '--output',
      output,
    ]);
    expect(status).toBe(3);
    expect(stderr).toContain(`${plain}, line 3: need a latitude between -90 and 90`);
    expect(stderr).toContain('2\u00a0rows converted from geodetic, WGS 84 to UTM zone 32N');
    const written = readFileSync(output, 'utf8');
    expect(written.trimEnd().split('\n')).toHaveLength(3);
    const direct = stillmark(['convert', '--list', packed, '--to', 'UTM 32N', '-q']);
    expect(direct.stdout).toBe(written);
    const piped = stillmark(['convert', '--list', '-', '--to', 'UTM 32N'], {input: text});
    expect(piped.stdout).toBe(written);
  });

  test('what is written can be read again', () => {
    const list = file('again.csv', 'name,lat,lon,ellipsoidal_height\nA,50.5,9.25,123.456\n');
    const there = stillmark(['convert', '--list', list, '--to', 'geocentric']).stdout;
    const back = stillmark(['convert', '--list', '-', '--to', 'geodetic', '--angles', 'dms'], {
      input: there,
    }).stdout;
    const again = stillmark(['convert', '--list', '-', '--to', 'geodetic'], {input: back}).stdout;
    expect(again).toBe(
      'name,latitude_deg,longitude_deg,ellipsoidal_height_m\nA,50.5000000000,9.2500000000,123.45600\n',
    );
  });

  test.each<[string, readonly string[], RegExp]>([
    ['nothing to convert', ['--from', 'geodetic', '--to', 'UTM'], /name a position/],
    ['no kind', ['50,9,1', '--to', 'UTM'], /write --from geocentric, geodetic, local or a grid/],
    ['nothing wanted', ['50,9,1', '--from', 'geodetic'], /need what to convert to/],
    ['two numbers', ['50,9', '--from', 'geocentric', '--to', 'UTM'], /need x, y, z, set apart/],
    ['no such file', ['--list', 'nowhere.csv', '--to', 'UTM'], /no such file/],
    ['a position and a list', ['50,9', '--list', 'a.csv', '--to', 'UTM'], /not both/],
    ['half a decimal', ['50,9', '--from', 'geodetic', '--to', 'UTM', '--decimals', '2.5'], /--dec/],
    ['a date as epoch', ['50,9,1', '--from', 'geodetic', '--from-epoch', '2020-05-04'], /decimal/],
    ['an unknown option', ['50,9,1', '--into', 'UTM'], /into/],
  ])('%s is refused with status 2', (_, words, message) => {
    const {status, stdout, stderr} = stillmark(['convert', ...words]);
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toMatch(message);
    expect(stderr).not.toMatch(/\n\s+at /);
  });

  test('a header that cannot be used leaves no output', () => {
    const list = file('bad.csv', 'name,x,y\nA,1,2\n');
    const output = join(folder, 'none.csv');
    const {status} = stillmark([
      'convert',
      '--list',
      list,
      '--from',
      'geocentric',
      '--to',
      'UTM',
      '--output',
      output,
    ]);
    expect(status).toBe(2);
    expect(existsSync(output)).toBe(false);
  });
});

/** Options of one side, `frame@epoch`. */
function side(prefix: 'from' | 'to', text: string): string[] {
  const [frame = '', epoch] = text.split('@');
  return [`--${prefix}-frame`, frame, ...(epoch === undefined ? [] : [`--${prefix}-epoch`, epoch])];
}

describe('wrong or incomplete requests for frames', () => {
  // Two have other words here: a result without an epoch gets that of the given coordinates, and
  // NaN is no decimal year.
  const wrong = WRONG_FRAMES.filter(([from, to]) => to !== 'ETRF2000' && !from.endsWith('NaN'));
  const answers: Ran[] = [];

  beforeAll(async () => {
    const run = ([from, to, place]: (typeof wrong)[number]) =>
      new Promise<Ran>((done) => {
        const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = PLACES[place];
        const position = `${latitudeDeg},${longitudeDeg},${ellipsoidalHeightM}`;
        const words = ['convert', '--from', 'geodetic', ...side('from', from), ...side('to', to)];
        execFile('node', [COMMAND, ...words, '--', position], (error, stdout, stderr) => {
          done({status: typeof error?.code === 'number' ? error.code : 0, stdout, stderr});
        });
      });
    // As many at a time as the smallest machine has cores.
    for (let i = 0; i < wrong.length; i += 2) {
      answers.push(...(await Promise.all(wrong.slice(i, i + 2).map(run))));
    }
  }, 120_000);

  test('there are at least 40', () => {
    expect(wrong.length).toBeGreaterThanOrEqual(40);
  });

  test.each(wrong.map((one, i) => [one[0], one[1], i, one[3]] as const))(
    '%s to %s gets no number but advice',
    (_from, _to, i, advice) => {
      const {status, stdout, stderr} = answers[i]!;
      expect(status).toBe(2);
      expect(stdout).toBe('');
      expect(stderr).toMatch(advice);
    },
  );
});
