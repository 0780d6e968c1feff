import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {elementAt, marksFromSinex, readSinex} from '../../src/fieldbook/sinex.ts';

const TEXT = readFileSync(
  join(import.meta.dirname, '../real-logs/sinex-covariance-extract.snx'),
  'utf8',
);
const sinex = readSinex(TEXT, 'extract.snx');

/** The rows of a block, split at blanks: a reading of the file that knows nothing of columns. */
function rowsOf(name: string): string[][] {
  const lines = TEXT.split('\n');
  const from = lines.findIndex((line) => line.startsWith(`+${name}`));
  const to = lines.findIndex((line, i) => i > from && line.startsWith('-'));
  return lines
    .slice(from + 1, to)
    .filter((line) => line.startsWith(' '))
    .map((line) => line.trim().split(/\s+/));
}

/** The digits of a number as the file prints it and as we hold it, in one form. */
function printedDigits(printed: string): string {
  const [mantissa, exponent] = printed.replace(/^\+/, '').split('E');
  const digits = mantissa?.replace(/^-?0?\./, '') ?? '';
  const sign = printed.startsWith('-') ? '-' : '';
  return `${sign}${digits}e${Number(exponent) - 1}`;
}

function heldDigits(value: number, digits: number): string {
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  return `${mantissa?.replace('.', '')}e${Number(exponent)}`;
}

describe('readSinex', () => {
  test('reference: Geoscience Australia, 2025 day 333, every estimate to the last printed digit', () => {
    const rows = rowsOf('SOLUTION/ESTIMATE');
    expect(rows).toHaveLength(45);
    expect(sinex.estimates).toHaveLength(45);
    rows.forEach((row, i) => {
      const estimate = sinex.estimates[i];
      if (estimate === undefined) throw new Error('too few estimates');
      expect([String(estimate.index), estimate.type, estimate.code, estimate.point]).toEqual(
        row.slice(0, 4),
      );
      expect(heldDigits(estimate.value, 15)).toBe(printedDigits(row[8] ?? ''));
      expect(heldDigits(estimate.standardDeviation, 6)).toBe(printedDigits(row[9] ?? ''));
      // 43200 s of day 333: noon of 29 November, 332.5 of 365 days.
      expect(estimate.epoch).toBe(2025 + 332.5 / 365);
    });
  });

  test('reference: the same file, every covariance to the last printed digit', () => {
    const {covariance} = sinex;
    if (covariance === undefined) throw new Error('no covariance');
    let compared = 0;
    for (const [row, column, ...values] of rowsOf('SOLUTION/MATRIX_ESTIMATE')) {
      values.forEach((printed, k) => {
        const value = elementAt(covariance, Number(row) - 1, Number(column) - 1 + k);
        expect(heldDigits(value, 14)).toBe(printedDigits(printed));
        expect(elementAt(covariance, Number(column) - 1 + k, Number(row) - 1)).toBe(value);
        compared++;
      });
    }
    expect(compared).toBe((45 * 46) / 2);
  });

  test('reference: the standard deviations of the file are the roots of its variances', () => {
    const {covariance, estimates} = sinex;
    if (covariance === undefined) throw new Error('no covariance');
    for (const {index, standardDeviation} of estimates) {
      const sigma = Math.sqrt(elementAt(covariance, index - 1, index - 1));
      // Half of the sixth digit, which is the last one printed.
      expect(Math.abs(sigma - standardDeviation)).toBeLessThanOrEqual(
        0.5e-5 * 10 ** Math.floor(Math.log10(standardDeviation)) * 1.0001,
      );
    }
  });

  test('reference: sites and epochs of the same file', () => {
    expect(sinex.sites).toHaveLength(15);
    expect(sinex.sites[0]).toEqual({
      code: 'ALIC',
      point: 'A',
      domes: '50137M001',
      description: 'ALIC 50137M001',
    });
    expect(sinex.epochs).toHaveLength(15);
    expect(sinex.epochs[14]).toMatchObject({code: 'WLMD', point: 'A', solution: '1'});
    expect(sinex.epochs[0]?.mean).toBeCloseTo(2025 + (332 + 43_185 / 86_400) / 365, 12);
  });

  test('property: L and U, COVA and CORR say the same', () => {
    const rows = rowsOf('SOLUTION/MATRIX_ESTIMATE');
    const {covariance} = sinex;
    if (covariance === undefined) throw new Error('no covariance');
    const sigma = (i: number) => Math.sqrt(elementAt(covariance, i, i));
    const before = TEXT.slice(0, TEXT.indexOf('+SOLUTION/MATRIX_ESTIMATE'));
    const element = (triangle: string, row: number, column: number, value: number) => {
      const [a, b] = triangle === 'L' ? [row, column] : [column, row];
      return ` ${String(a).padStart(5)} ${String(b).padStart(5)} ${value.toExponential(13).padStart(21)}`;
    };
    for (const triangle of ['L', 'U']) {
      for (const kind of ['COVA', 'CORR']) {
        const lines = rows.flatMap(([row, column, ...values]) =>
          values.map((_, k) => {
            const i = Number(row) - 1;
            const j = Number(column) - 1 + k;
            const value = elementAt(covariance, i, j);
            const off = i === j ? sigma(i) : value / sigma(i) / sigma(j);
            return element(triangle, i + 1, j + 1, kind === 'COVA' ? value : off);
          }),
        );
        const block = `SOLUTION/MATRIX_ESTIMATE ${triangle} ${kind}`;
        const other = readSinex(`${before}+${block}\n${lines.join('\n')}\n-${block}\n`, 'x.snx');
        if (other.covariance === undefined) throw new Error('no covariance');
        for (let i = 0; i < 45; i++) {
          for (let j = 0; j <= i; j++) {
            const difference = elementAt(other.covariance, i, j) - elementAt(covariance, i, j);
            expect(Math.abs(difference)).toBeLessThan(1e-12 * sigma(i) * sigma(j));
          }
        }
      }
    }
  });

  const head = TEXT.slice(0, TEXT.indexOf('\n') + 1);
  const estimateLine =
    '     1 STAX   ALIC  A    1 25:333:43200 m    0 -.405205296884358E+07 .135326E-02';
  const estimates = `+SOLUTION/ESTIMATE\n${estimateLine}\n-SOLUTION/ESTIMATE\n`;

  test.each([
    [
      'a block that is not closed',
      `${head}+SOLUTION/ESTIMATE\n${estimateLine}\n`,
      2,
      /file complete/,
    ],
    ['a block inside a block', `${head}+SITE/ID\n${estimates}`, 2, /never closed/],
    ['a block given twice', `${head}${estimates}${estimates}`, 5, /keep one/],
    ['a shifted line', `${head}${estimates.replace('-.405', ' -.405')}`, 3, /whole and aligned/],
    [
      'a shifted epoch',
      `${head}${estimates.replace(' 25:333', '  25:333').replace('m    0', 'm   0')}`,
      3,
      /YY:DDD:SSSSS/,
    ],
    ['a broken epoch', `${head}${estimates.replace('25:333', '25:400')}`, 3, /YY:DDD:SSSSS/],
    ['a gap in the index', `${head}${estimates.replace('     1 ', '     2 ')}`, 3, /in order/],
    ['no estimates', `${head}+SITE/ID\n-SITE/ID\n`, undefined, /take the solution file/],
    [
      'an information matrix',
      `${head}${estimates}+SOLUTION/MATRIX_ESTIMATE L INFO\n-SOLUTION/MATRIX_ESTIMATE L INFO\n`,
      5,
      /ask for the covariance/,
    ],
    [
      'an element outside its triangle',
      `${head}${estimates}+SOLUTION/MATRIX_ESTIMATE L COVA\n     1     2  0.1E-05\n-\n`,
      6,
      /does not lie in the L triangle/,
    ],
  ])('%s is refused', (_what, text, lineNumber, message) => {
    expect(() => readSinex(text, 'x.snx')).toThrow(
      expect.objectContaining({lineNumber, message: expect.stringMatching(message)}),
    );
  });
});

describe('marksFromSinex', () => {
  const marks = marksFromSinex(sinex);

  test('reference: a station with its coordinates, epoch and own covariance, and no frame', () => {
    expect(marks.map(({name}) => name)).toHaveLength(15);
    const alic = marks[0];
    expect(alic).toMatchObject({
      name: 'ALIC',
      otherNames: ['50137M001'],
      coordinates: {kind: 'geocentric', xM: -4052052.96884358, yM: 4212835.95074131},
      frame: undefined,
      coordinateEpoch: 2025 + 332.5 / 365,
    });
    expect(alic?.uncertainty).toEqual({
      kind: 'covariance',
      axes: 'xyz',
      correlationsKnown: true,
      covarianceM2: [
        [0.18313251758458e-5, -0.12446803211099e-5, 0.99041950765541e-6],
        [-0.12446803211099e-5, 0.16261047203566e-5, -0.88439735938875e-6],
        [0.99041950765541e-6, -0.88439735938875e-6, 0.11986899802161e-5],
      ],
    });
  });

  test('several solutions of one code keep apart', () => {
    const twice = TEXT.replace(/ BRDW {2}A {4}1/g, ' ALIC  A    2').slice(
      0,
      TEXT.indexOf('+SOLUTION/MATRIX'),
    );
    const names = marksFromSinex(readSinex(twice, 'x.snx')).map(({name}) => name);
    expect(names.slice(0, 2)).toEqual(['ALIC A 1', 'ALIC A 2']);
  });

  test('without a matrix the standard deviations stand alone', () => {
    const bare = readSinex(TEXT.slice(0, TEXT.indexOf('+SOLUTION/MATRIX')), 'x.snx');
    const uncertainty = marksFromSinex(bare)[0]?.uncertainty;
    expect(uncertainty).toMatchObject({correlationsKnown: false});
    expect(uncertainty?.kind === 'covariance' && uncertainty.covarianceM2[0]).toEqual([
      0.00135326 ** 2,
      0,
      0,
    ]);
  });

  test('velocities come along, and other units are refused', () => {
    const rows = ['STAX', 'STAY', 'STAZ', 'VELX', 'VELY', 'VELZ'].map((type, i) => {
      const value = i < 3 ? '0.400000000000000E+07' : '-.200000000000000E-01';
      const unit = i < 3 ? 'm   ' : 'm/y ';
      return ` ${String(i + 1).padStart(5)} ${type}   ALIC  A    1 10:001:00000 ${unit} 0 ${value} .100000E-02`;
    });
    const text = `%=SNX 2.02\n+SOLUTION/ESTIMATE\n${rows.join('\n')}\n-SOLUTION/ESTIMATE\n`;
    const [mark] = marksFromSinex(readSinex(text, 'x.snx'));
    expect(mark?.velocity).toEqual({
      axes: 'xyz',
      xMPerYear: -0.02,
      yMPerYear: -0.02,
      zMPerYear: -0.02,
    });
    expect(mark?.coordinateEpoch).toBe(2010);
    expect(() => marksFromSinex(readSinex(text.replace(/ m {4}0/, ' km   0'), 'x.snx'))).toThrow(
      /expected coordinates in m/,
    );
  });
});
