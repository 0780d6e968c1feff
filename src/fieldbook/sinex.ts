import {InputError} from '../errors.ts';
import type {Matrix3} from '../geodesy/types.ts';
import {civilFromDayOfYear, daysInYear, SECONDS_PER_DAY} from '../time/calendar.ts';
import type {Mark, MarkVelocity} from './mark.ts';

/** The blocks of a SINEX file that say where stations are and how well that is known. */
export interface Sinex {
  readonly path: string;
  readonly sites: readonly SinexSite[];
  readonly epochs: readonly SinexEpochs[];
  readonly estimates: readonly SinexEstimate[];
  /** Covariance of all estimates in their own units; undefined when the file holds no matrix. */
  readonly covariance: SymmetricMatrix | undefined;
}

interface SinexSite {
  readonly code: string;
  readonly point: string;
  readonly domes: string;
  readonly description: string;
}

interface SinexEpochs {
  readonly code: string;
  readonly point: string;
  readonly solution: string;
  /** Decimal years; undefined for 00:000:00000. */
  readonly start: number | undefined;
  readonly end: number | undefined;
  readonly mean: number | undefined;
}

interface SinexEstimate {
  /** Counted from 1, as in the file. */
  readonly index: number;
  /** STAX, STAY, STAZ, VELX, … */
  readonly type: string;
  readonly code: string;
  readonly point: string;
  readonly solution: string;
  readonly epoch: number | undefined;
  readonly unit: string;
  readonly value: number;
  readonly standardDeviation: number;
  readonly lineNumber: number;
}

/** Lower triangle by rows: element (i, j), j ≤ i, counted from 0, stands at i(i + 1)/2 + j. */
export interface SymmetricMatrix {
  readonly size: number;
  readonly packed: Float64Array;
}

export function elementAt({packed}: SymmetricMatrix, row: number, column: number): number {
  const i = Math.max(row, column);
  const j = Math.min(row, column);
  return packed[(i * (i + 1)) / 2 + j]!;
}

/** More estimates than this would need over 3 GB for their matrix. */
const MAX_ESTIMATES = 20_000;

/**
 * Reads a SINEX file: SITE/ID, SOLUTION/EPOCHS, SOLUTION/ESTIMATE and SOLUTION/MATRIX_ESTIMATE, the
 * last as L or U triangle, COVA or CORR. Other blocks are passed over.
 *
 * Fields are taken by column. Matrix elements that are not listed are zero, as the format says.
 * Source: SINEX, Solution (Software/technique) INdependent EXchange Format, version 2.02 (IERS,
 * 2006), sections 2 and 3; CORR: standard deviations on the diagonal, correlations beside it.
 *
 * @throws InputError for a block that is not closed, a field that is no number, or no estimates
 */
export function readSinex(text: string, path: string): Sinex {
  const blocks = blocksOf(text, path);
  const estimates = linesOf(blocks, 'SOLUTION/ESTIMATE').map((line) => estimateFrom(line, path));
  if (estimates.length === 0) {
    throw new InputError(
      'expected a block SOLUTION/ESTIMATE with station coordinates, found none; take the solution file, not a summary',
      {path},
    );
  }
  refuseGaps(estimates, path);
  const matrix = [...blocks.values()].find(({name}) => name.startsWith('SOLUTION/MATRIX_ESTIMATE'));
  return {
    path,
    sites: linesOf(blocks, 'SITE/ID').map(siteFrom),
    epochs: linesOf(blocks, 'SOLUTION/EPOCHS').map((line) => epochsFrom(line, path)),
    estimates,
    covariance: matrix === undefined ? undefined : covarianceFrom(matrix, estimates.length, path),
  };
}

interface Line {
  readonly text: string;
  readonly lineNumber: number;
}

interface Block {
  /** With what stands behind the name, such as "SOLUTION/MATRIX_ESTIMATE L COVA". */
  readonly name: string;
  readonly lines: Line[];
  readonly lineNumber: number;
}

function blocksOf(text: string, path: string): Map<string, Block> {
  const blocks = new Map<string, Block>();
  let open: Block | undefined;
  text.split(/\r\n|\n|\r/).forEach((line, index) => {
    const lineNumber = index + 1;
    if (line.startsWith('+')) {
      if (open) throw notClosed(open, path);
      open = {name: line.slice(1).trim().replace(/\s+/g, ' '), lines: [], lineNumber};
      if (blocks.has(open.name)) {
        throw new InputError(`block ${open.name} stands twice; keep one`, {path, lineNumber});
      }
      blocks.set(open.name, open);
    } else if (line.startsWith('-')) {
      open = undefined;
    } else if (line.startsWith(' ') && line.trim() !== '') {
      open?.lines.push({text: line, lineNumber});
    }
  });
  if (open) throw notClosed(open, path);
  return blocks;
}

function notClosed({name, lineNumber}: Block, path: string): InputError {
  return new InputError(`block ${name} is never closed; is the file complete?`, {path, lineNumber});
}

function linesOf(blocks: ReadonlyMap<string, Block>, name: string): readonly Line[] {
  return blocks.get(name)?.lines ?? [];
}

/** Columns counted from 1, both ends included, as the format's tables print them. */
function field({text}: Line, first: number, last: number): string {
  return text.slice(first - 1, last).trim();
}

/** Whether a blank stands on both sides: a line shifted by one column would lose a digit unseen. */
function standsAlone({text}: Line, first: number, last: number): boolean {
  return (text[first - 2] ?? ' ') === ' ' && (text[last] ?? ' ') === ' ';
}

function siteFrom(line: Line): SinexSite {
  return {
    code: field(line, 2, 5),
    point: field(line, 7, 8),
    domes: field(line, 10, 18),
    description: field(line, 22, 43),
  };
}

function epochsFrom(line: Line, path: string): SinexEpochs {
  return {
    code: field(line, 2, 5),
    point: field(line, 7, 8),
    solution: field(line, 10, 13),
    start: epochFrom(line, 17, path),
    end: epochFrom(line, 30, path),
    mean: epochFrom(line, 43, path),
  };
}

function estimateFrom(line: Line, path: string): SinexEstimate {
  return {
    index: numberFrom(line, 2, 6, path),
    type: field(line, 8, 13),
    code: field(line, 15, 18),
    point: field(line, 20, 21),
    solution: field(line, 23, 26),
    epoch: epochFrom(line, 28, path),
    unit: field(line, 41, 44),
    value: numberFrom(line, 48, 68, path),
    standardDeviation: numberFrom(line, 70, 80, path),
    lineNumber: line.lineNumber,
  };
}

function refuseGaps(estimates: readonly SinexEstimate[], path: string): void {
  if (estimates.length > MAX_ESTIMATES) {
    throw new InputError(
      `expected at most ${MAX_ESTIMATES} estimates, found ${estimates.length}; extract the stations you need`,
      {path},
    );
  }
  estimates.forEach(({index, lineNumber}, position) => {
    if (index === position + 1) return;
    throw new InputError(
      `expected estimate ${position + 1}, found ${index}; the block must list them in order, without gaps`,
      {path, lineNumber},
    );
  });
}

/** A number as FORTRAN prints it: `-.405205296884358E+07`, `0.1D-03`. */
const FORTRAN_NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[ED][+-]?\d+)?$/i;

function numberFrom(line: Line, first: number, last: number, path: string): number {
  const written = field(line, first, last);
  if (!FORTRAN_NUMBER.test(written) || !standsAlone(line, first, last)) {
    throw new InputError(
      `expected a number in columns ${first} to ${last}, found "${written}"; is the line whole and aligned?`,
      {path, lineNumber: line.lineNumber},
    );
  }
  return Number(written.replace(/D/i, 'E'));
}

/** `YY:DDD:SSSSS` as a decimal year; two-digit years up to 50 belong to this century. */
function epochFrom(line: Line, first: number, path: string): number | undefined {
  const written = field(line, first, first + 11);
  if (!standsAlone(line, first, first + 11)) throw badEpoch(line, first, path);
  if (written === '' || written === '00:000:00000') return undefined;
  const parts = /^(\d{2}):(\d{3}):(\d{5})$/.exec(written);
  const shortYear = Number(parts?.[1]);
  const year = shortYear + (shortYear <= 50 ? 2000 : 1900);
  const dayNumber = Number(parts?.[2]);
  const second = Number(parts?.[3]);
  if (
    parts === null ||
    civilFromDayOfYear(year, dayNumber) === undefined ||
    second > SECONDS_PER_DAY
  ) {
    throw badEpoch(line, first, path);
  }
  return year + (dayNumber - 1 + second / SECONDS_PER_DAY) / daysInYear(year);
}

function badEpoch(line: Line, first: number, path: string): InputError {
  const written = field(line, first, first + 11);
  return new InputError(
    `expected an epoch YY:DDD:SSSSS in columns ${first} to ${first + 11}, found "${written}"; is the line whole and aligned?`,
    {path, lineNumber: line.lineNumber},
  );
}

function covarianceFrom(block: Block, size: number, path: string): SymmetricMatrix {
  const [, triangle, kind] = block.name.split(' ');
  if ((triangle !== 'L' && triangle !== 'U') || (kind !== 'COVA' && kind !== 'CORR')) {
    throw new InputError(
      `expected MATRIX_ESTIMATE with L or U and COVA or CORR, found "${block.name}"; ask for the covariance, not the information matrix`,
      {path, lineNumber: block.lineNumber},
    );
  }
  const packed = new Float64Array((size * (size + 1)) / 2);
  for (const line of block.lines) {
    const row = numberFrom(line, 2, 6, path);
    const column = numberFrom(line, 8, 12, path);
    for (let k = 0; k < 3; k++) {
      const first = 14 + 22 * k;
      if (field(line, first, first + 20) === '') continue;
      const value = numberFrom(line, first, first + 20, path);
      const at = column + k;
      const inside = Math.min(row, at) >= 1 && Math.max(row, at) <= size;
      if (!inside || (triangle === 'L' ? at > row : at < row)) {
        throw new InputError(
          `element ${row}, ${at} does not lie in the ${triangle} triangle of ${size} estimates; is the file whole?`,
          {path, lineNumber: line.lineNumber},
        );
      }
      const i = Math.max(row, at) - 1;
      const j = Math.min(row, at) - 1;
      packed[(i * (i + 1)) / 2 + j] = value;
    }
  }
  return {size, packed: kind === 'COVA' ? packed : fromCorrelations(packed, size)};
}

function fromCorrelations(packed: Float64Array, size: number): Float64Array {
  const sigma = (i: number) => packed[(i * (i + 1)) / 2 + i]!;
  const covariance = new Float64Array(packed.length);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) {
      const at = (i * (i + 1)) / 2 + j;
      covariance[at] = sigma(i) * sigma(j) * (i === j ? 1 : packed[at]!);
    }
  }
  return covariance;
}

/**
 * The stations of a SINEX file as marks.
 *
 * A station is named by its four-character code, and by code, point and solution where the code has
 * several solutions. SINEX does not name the frame, so that stays open. Sites without all three
 * coordinates are passed over.
 */
export function marksFromSinex(sinex: Sinex): Mark[] {
  const stations = new Map<string, SinexEstimate[]>();
  for (const estimate of sinex.estimates) {
    const {code, point, solution} = estimate;
    const key = `${code} ${point} ${solution}`;
    const known = stations.get(key);
    if (known) known.push(estimate);
    else stations.set(key, [estimate]);
  }
  const solutionsPerCode = new Map<string, number>();
  for (const key of stations.keys()) {
    const code = key.split(' ')[0] ?? '';
    solutionsPerCode.set(code, (solutionsPerCode.get(code) ?? 0) + 1);
  }
  const marks: Mark[] = [];
  for (const [key, estimates] of stations) {
    const mark = markOf(sinex, estimates);
    if (mark === undefined) continue;
    const only = solutionsPerCode.get(mark.name) === 1;
    marks.push(only ? mark : {...mark, name: key});
  }
  return marks;
}

function markOf(sinex: Sinex, estimates: readonly SinexEstimate[]): Mark | undefined {
  const [x, y, z] = ['STAX', 'STAY', 'STAZ'].map((type) =>
    estimates.find((estimate) => estimate.type === type),
  );
  if (x === undefined || y === undefined || z === undefined) return undefined;
  for (const {unit, lineNumber} of [x, y, z]) {
    if (unit === 'm') continue;
    throw new InputError(`expected coordinates in m, found "${unit}"; is the line aligned?`, {
      path: sinex.path,
      lineNumber,
    });
  }
  const site = sinex.sites.find(({code, point}) => code === x.code && point === x.point);
  const domes = site?.domes ?? '';
  return {
    name: x.code,
    otherNames: domes === '' || domes.includes('---') ? [] : [domes],
    lineNumber: x.lineNumber,
    description: site?.description,
    coordinates: {
      kind: 'geocentric',
      xM: x.value,
      yM: y.value,
      zM: z.value,
      orthometricHeightM: undefined,
    },
    frame: undefined,
    coordinateEpoch: x.epoch,
    verticalDatum: undefined,
    geoidModel: undefined,
    separationM: undefined,
    velocity: velocityOf(estimates),
    uncertainty: {
      kind: 'covariance',
      axes: 'xyz',
      covarianceM2: covarianceOf([x, y, z], sinex.covariance),
      correlationsKnown: sinex.covariance !== undefined,
    },
    tolerance: undefined,
    witnessMarks: [],
  };
}

/** Without a matrix the standard deviations of the estimates are all there is. */
function covarianceOf(
  axes: readonly [SinexEstimate, SinexEstimate, SinexEstimate],
  covariance: SymmetricMatrix | undefined,
): Matrix3 {
  const [x, y, z] = axes;
  const between = (a: SinexEstimate, b: SinexEstimate) => {
    if (covariance !== undefined) return elementAt(covariance, a.index - 1, b.index - 1);
    return a === b ? a.standardDeviation ** 2 : 0;
  };
  return [
    [between(x, x), between(x, y), between(x, z)],
    [between(y, x), between(y, y), between(y, z)],
    [between(z, x), between(z, y), between(z, z)],
  ];
}

function velocityOf(estimates: readonly SinexEstimate[]): MarkVelocity | undefined {
  const [x, y, z] = ['VELX', 'VELY', 'VELZ'].map(
    (type) => estimates.find((estimate) => estimate.type === type)?.value,
  );
  if (x === undefined || y === undefined || z === undefined) return undefined;
  return {axes: 'xyz', xMPerYear: x, yMPerYear: y, zMPerYear: z};
}
