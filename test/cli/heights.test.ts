import {readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {beforeAll, describe, expect, test} from 'vitest';
import type {Result} from '../../src/occupation/result.ts';
import {emptyFolder, sample, stillmark} from './run.ts';

/*
 * Heights above the geoid, from the log to the result. The site of the samples is invented, and so
 * is the geoid over it: a plane, which both interpolations must give back exactly.
 */
const SOUTH = 41.6;
const WEST = 207.6;
const STEP = 0.05;
const ROWS = 5;
const COLUMNS = 5;

function plane(latitudeDeg: number, longitudeDeg: number): number {
  return -14.5 + 0.8 * (latitudeDeg - 41.7) - 0.3 * (longitudeDeg - 207.7);
}

function gtx(): Uint8Array {
  const bytes = Buffer.alloc(40 + 4 * ROWS * COLUMNS);
  for (const [i, value] of [SOUTH, WEST, STEP, STEP].entries()) bytes.writeDoubleBE(value, 8 * i);
  bytes.writeInt32BE(ROWS, 32);
  bytes.writeInt32BE(COLUMNS, 36);
  for (let row = 0; row < ROWS; row++) {
    for (let column = 0; column < COLUMNS; column++) {
      const value = plane(SOUTH + row * STEP, WEST + column * STEP);
      bytes.writeFloatBE(value, 40 + 4 * (row * COLUMNS + column));
    }
  }
  return bytes;
}

const folder = emptyFolder();
const grid = join(folder, 'quillmere.gtx');
const away = join(folder, 'away.gtx');
const log = sample('mole-still.nmea');

beforeAll(() => {
  writeFileSync(grid, gtx());
  const moved = Buffer.from(gtx());
  moved.writeDoubleBE(10, 0);
  writeFileSync(away, moved);
});

function reduced(...words: string[]): Result {
  const path = join(folder, 'result.json');
  const ran = stillmark(['reduce', log, '--result', path, ...words]);
  expect(ran.stderr).not.toMatch(/^stillmark: /m);
  expect(ran.status).toBe(0);
  return JSON.parse(readFileSync(path, 'utf8'));
}

describe('heights above the geoid', () => {
  test.each(['bilinear', 'biquadratic'])('from a grid, %s', (interpolation) => {
    const {position, notices} = reduced('--geoid', grid, '--geoid-interpolation', interpolation);
    const {geodetic, separation, orthometricHeightM} = position!;
    const expected = plane(geodetic.latitudeDeg, geodetic.longitudeDeg + 360);
    expect(separation!.separationM).toBeCloseTo(expected, 5);
    expect(separation).toMatchObject({
      from: 'geoid grid',
      model: 'quillmere.gtx',
      receiverM: -14.6,
    });
    expect(orthometricHeightM).toBe(geodetic.ellipsoidalHeightM! - separation!.separationM);
    expect(notices.map(({code}) => code)).toContain('separations-compared');
  });

  test('from a number, and from the receiver where nothing else is known', () => {
    const stated = reduced('--separation=-14.52m').position!;
    expect(stated.separation).toMatchObject({separationM: -14.52, from: 'command line'});
    const own = reduced().position!;
    expect(own.separation).toEqual({
      separationM: -14.6,
      from: 'receiver',
      model: null,
      receiverM: -14.6,
    });
    expect(own.geodetic).toEqual(stated.geodetic);
  });

  test('none where the grid does not reach, and the reason', () => {
    const {position, notices} = reduced('--geoid', away);
    expect(position!.orthometricHeightM).toBeNull();
    expect(position!.separation).toBeNull();
    const notice = notices.find(({code}) => code === 'geoid-outside')!;
    expect(notice.severity).toBe('concern');
    expect(notice.text).toContain('reaches from 10° to 10.2° in latitude');
  });

  test('a field sheet names a grid that stands beside it', () => {
    const sheet = join(folder, 'sheet.yaml');
    writeFileSync(sheet, 'geoid grid: quillmere.gtx\n');
    const {position, settings} = reduced('--sheet', sheet);
    expect(position!.separation!.from).toBe('geoid grid');
    expect(settings.geoid).toEqual({value: grid, from: 'field sheet'});
  });

  test('a sheet gives the number and names its model', () => {
    const sheet = join(folder, 'number.yaml');
    writeFileSync(sheet, 'separation: -14.53 m\ngeoid model: Quillmere 2024\n');
    expect(reduced('--sheet', sheet).position!.separation).toMatchObject({
      separationM: -14.53,
      from: 'field sheet',
      model: 'Quillmere 2024',
    });
    expect(reduced('--sheet', sheet, '--geoid', grid).position!.separation!.from).toBe(
      'geoid grid',
    );
  });
});

describe('against a mark with a height above the geoid only', () => {
  const marks = join(folder, 'marks.yaml');
  const sheet = join(folder, 'check.yaml');
  beforeAll(() => {
    writeFileSync(
      marks,
      'frame: ITRF2020\ncoordinate epoch: 2025.0\nmarks:\n  - {name: MOLE, latitude: 41.6998870416, longitude: -152.3069815542, orthometric height: 6.851 m}\n',
    );
    writeFileSync(sheet, 'standard uncertainties:\n  - {of: geoid, up: 25 mm}\n');
  });

  function checked(...words: string[]): Result {
    const path = join(folder, 'check.json');
    stillmark(['check', log, '--marks', marks, '--mark', 'MOLE', '--result', path, ...words]);
    return JSON.parse(readFileSync(path, 'utf8'));
  }

  test('the geoid model stands in the budget and in the decision', () => {
    const words = ['--separation=-14.5m', '--tolerance-up', '50mm'];
    const bare = checked(...words);
    expect(bare.comparison!.offsetM.up).toBeCloseTo(
      bare.position!.geodetic.ellipsoidalHeightM! + 14.5 - 6.851,
      9,
    );
    expect(geoidRow(bare)).toMatchObject({standardUncertaintyM: null, from: 'not included'});
    const stated = checked(...words, '--sheet', sheet);
    expect(geoidRow(stated)!.standardUncertaintyM!.up).toBe(0.025);
    // The position itself is no worse for it.
    expect(stated.position!.standardUncertaintyM).toEqual(bare.position!.standardUncertaintyM);
    const probability = (result: Result) => result.comparison!.requirements[0]!.probabilityWithin!;
    expect(probability(bare)).toBeGreaterThan(0.999);
    expect(probability(stated)).toBeLessThan(0.97);
  });

  test("the receiver's own geoid is compared only aloud", () => {
    const {notices} = checked('--tolerance-up', '50mm');
    expect(notices.map(({code}) => code)).toContain('receiver-geoid-compared');
  });

  function geoidRow({budget}: Result) {
    return budget.find(({source}) => source === 'geoid model');
  }
});

describe('what cannot be used is refused with exit status 2', () => {
  test.each([
    ['a grid and a number', ['--geoid', grid, '--separation=-14.5m'], 'not both'],
    ['a log instead of a grid', ['--geoid', sample('mole-still.nmea')], 'GTX and ISG'],
    ['a file that is missing', ['--geoid', join(folder, 'missing.gtx')], 'missing.gtx'],
    ['a number without a unit', ['--separation=-14.5'], 'unit'],
    ['a number that no geoid has', ['--separation=-1450m'], 'at most 120 m'],
  ])('%s', (_, words, says) => {
    const ran = stillmark(['reduce', log, ...words]);
    expect(ran.status).toBe(2);
    expect(ran.stderr).toContain(says);
    expect(ran.stderr).not.toContain('    at ');
    expect(ran.stdout).toBe('');
  });
});
