import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {UsageError} from '../../src/errors.ts';
import {resultSinex} from '../../src/exports/sinex.ts';
import {elementAt, readSinex} from '../../src/fieldbook/sinex.ts';
import {covarianceEnuFromEcef} from '../../src/geodesy/covariance.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {localFrame} from '../../src/geodesy/local.ts';
import type {Matrix3} from '../../src/geodesy/types.ts';
import type {Position, Result} from '../../src/occupation/result.ts';
import {DAY_WITH_JUMP, STILL_HOUR} from '../report/fixtures.ts';
import {invented} from './samples.ts';

const COVARIANCE = [
  [4e-6, 1e-6, -2e-7],
  [1e-6, 9e-6, 3e-7],
  [-2e-7, 3e-7, 2.5e-5],
] as const satisfies Matrix3;

function complete(result: Result): Result {
  const whole = (position: Position): Position => ({
    ...position,
    frame: 'ITRF2020',
    frameFrom: 'option',
    coordinateEpoch: 2025.5,
    covarianceEnuM2: COVARIANCE,
  });
  return {
    ...result,
    position: result.position === null ? null : whole(result.position),
    segments: result.segments.map((segment) => ({...segment, position: whole(segment.position)})),
  };
}

const RESULT = complete(invented(STILL_HOUR));
const TEXT = resultSinex(RESULT);

/** The published file: its columns are those that any reader of SINEX meets. */
const PUBLISHED = readFileSync(
  join(import.meta.dirname, '../real-logs/sinex-covariance-extract.snx'),
  'latin1',
);

/** The shape of a line: what stands in each column, letters and digits made alike. */
function shape(line: string): string {
  return line.replace(/[A-Za-z]/g, 'a').replace(/\d/g, '9');
}

function blockLines(text: string, name: string): string[] {
  const lines = text.split(/\r?\n/);
  const from = lines.indexOf(`+${name}`);
  const to = lines.indexOf(`-${name}`);
  expect(from, name).toBeGreaterThan(0);
  return lines.slice(from + 1, to).filter((line) => line.startsWith(' '));
}

describe('reference: a SINEX file published by Geoscience Australia (test/real-logs)', () => {
  const blocks = [
    'SITE/ID',
    'SOLUTION/EPOCHS',
    'SOLUTION/ESTIMATE',
    'SOLUTION/MATRIX_ESTIMATE L COVA',
  ];

  test.each(blocks)('%s: the heading is the same to the column', (name) => {
    const headingOf = (text: string): string => {
      const lines = text.split(/\r?\n/);
      return lines[lines.indexOf(`+${name}`) + 1] ?? '';
    };
    expect(headingOf(TEXT)).toBe(headingOf(PUBLISHED));
  });

  test('SOLUTION/EPOCHS and SOLUTION/ESTIMATE: values stand in the same columns', () => {
    const shapes = new Set(
      blockLines(PUBLISHED, 'SOLUTION/ESTIMATE').map((line) =>
        shape(line.replace(/ [-0]\./, ' 0.')),
      ),
    );
    for (const line of blockLines(TEXT, 'SOLUTION/ESTIMATE')) {
      // The index and the mark's code have other lengths than those published.
      const alike = [...shapes].some(
        (published) =>
          published.slice(13) ===
          shape(line.replace(/ [-0]\./, ' 0.').replace(/_/g, 'a')).slice(13),
      );
      expect(alike, line).toBe(true);
    }
    const [epochs = ''] = blockLines(TEXT, 'SOLUTION/EPOCHS');
    const [published = ''] = blockLines(PUBLISHED, 'SOLUTION/EPOCHS');
    expect(shape(epochs.replace(/_/g, 'A'))).toBe(shape(published));
  });

  test('SITE/ID and the header line are as long, their times and angles in the same columns', () => {
    const [site = ''] = blockLines(TEXT, 'SITE/ID');
    const [published = ''] = blockLines(PUBLISHED, 'SITE/ID');
    expect(site.length).toBe(published.length);
    expect(site.slice(43)).toMatch(
      /^ [ \d]{3} [ \d]{2} [ \d]\d\.\d [- \d]{3} [ \d]{2} [ \d]\d\.\d [- \d]{5}\.\d$/,
    );
    const [ours = ''] = TEXT.split('\n');
    const [theirs = ''] = PUBLISHED.split(/\r?\n/);
    expect(shape(ours).replaceAll('---', 'aaa')).toBe(shape(theirs));
  });
});

describe('resultSinex', () => {
  test('no line is longer than 80 characters, and all are ASCII', () => {
    const lines = TEXT.split('\n');
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(80);
    expect(TEXT).toMatch(/^[\x20-\x7e\n]*$/);
    expect(lines[lines.length - 2]).toBe('%ENDSNX');
  });

  test('read back, coordinates and covariance are those of the result', () => {
    const sinex = readSinex(TEXT, 'own.snx');
    const {ecefM, geodetic} = RESULT.position!;
    expect(sinex.estimates.map(({type}) => type)).toEqual(['STAX', 'STAY', 'STAZ']);
    const [x, y, z] = sinex.estimates.map(({value}) => value);
    // Fifteen figures of seven before the point leave eight behind it.
    expect(x).toBeCloseTo(ecefM!.x, 7);
    expect(y).toBeCloseTo(ecefM!.y, 7);
    expect(z).toBeCloseTo(ecefM!.z, 7);
    expect(sinex.estimates[0]?.epoch).toBeCloseTo(2025.5, 6);
    const matrix = sinex.covariance!;
    const at = (i: number, j: number): number => elementAt(matrix, i, j);
    const ecef: Matrix3 = [
      [at(0, 0), at(0, 1), at(0, 2)],
      [at(1, 0), at(1, 1), at(1, 2)],
      [at(2, 0), at(2, 1), at(2, 2)],
    ];
    const frame = localFrame({...geodetic, ellipsoidalHeightM: 0}, WGS84);
    const back = covarianceEnuFromEcef(ecef, frame);
    for (const i of [0, 1, 2] as const) {
      for (const j of [0, 1, 2] as const) {
        expect(Math.abs(back[i][j] - COVARIANCE[i][j])).toBeLessThan(1e-17);
      }
      expect(sinex.estimates[i]!.standardDeviation).toBeCloseTo(Math.sqrt(ecef[i][i]), 7);
    }
  });

  test('a record in parts is one site with several solutions', () => {
    const jump = complete(invented({...DAY_WITH_JUMP, seconds: 7200}));
    expect(jump.segments.length).toBeGreaterThan(1);
    const sinex = readSinex(resultSinex(jump), 'parts.snx');
    expect(sinex.epochs.map(({solution}) => solution.trim())).toEqual(
      jump.segments.map((_, k) => String(k + 1)),
    );
    expect(sinex.estimates.length).toBe(3 * jump.segments.length);
    expect(elementAt(sinex.covariance!, 0, 3)).toBe(0);
  });

  test('frame, point and epoch are said in comments', () => {
    const comments = blockLines(TEXT, 'FILE/COMMENT').join('\n');
    expect(comments).toContain('REFERENCE FRAME ITRF2020');
    expect(comments).toContain(`COORDINATES ARE OF THE POINT: ${RESULT.position!.of}`);
    expect(resultSinex(assumed(RESULT))).toContain('REFERENCE FRAME ITRF2020 (ASSUMED)');
  });

  test('hostile names keep the columns', () => {
    for (const mark of [
      '\n-SITE/ID\n',
      'é',
      '',
      'a very long name of a mark that goes on',
      '%ENDSNX',
    ]) {
      const text = resultSinex({...RESULT, occupation: {...RESULT.occupation, mark}});
      expect(readSinex(text, 'hostile.snx').sites.length).toBe(1);
      expect(Math.max(...text.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
      const [site = ''] = blockLines(text, 'SITE/ID');
      expect(site.length).toBe(75);
    }
  });

  const missing: readonly (readonly [string, Result, string])[] = [
    ['no position', {...RESULT, position: null, segments: []}, 'this record gives no position'],
    [
      'no frame',
      changed({frame: null}),
      '--sinex needs the frame, which this result does not have; give --frame',
    ],
    ['no epoch', changed({coordinateEpoch: null}), 'needs the coordinate epoch'],
    ['no covariance', changed({covarianceEnuM2: null}), 'needs the covariance of the mean'],
    [
      'no height in the covariance',
      changed({
        covarianceEnuM2: [
          [1, 0, null],
          [0, 1, null],
          [null, null, null],
        ],
      }),
      'needs the covariance of the mean',
    ],
    [
      'no height',
      complete(invented({...STILL_HOUR, heights: false})),
      'needs an ellipsoidal height',
    ],
  ];

  test.each(missing)('%s is refused with what to give', (_, result, message) => {
    expect(() => resultSinex(result)).toThrow(message);
    expect(() => resultSinex(result)).toThrow(UsageError);
  });
});

function changed(parts: Partial<Position>): Result {
  return {
    ...RESULT,
    position: {...RESULT.position!, ...parts},
    segments: RESULT.segments.map((segment) => ({
      ...segment,
      position: {...segment.position, ...parts},
    })),
  };
}

function assumed(result: Result): Result {
  return {...result, position: {...result.position!, frameFrom: 'assumed'}};
}
