import {UsageError} from '../errors.ts';
import {sexagesimal} from '../geodesy/angle.ts';
import {covarianceEcefFromEnu} from '../geodesy/covariance.ts';
import {WGS84} from '../geodesy/ellipsoid.ts';
import {localFrame} from '../geodesy/local.ts';
import type {Matrix3} from '../geodesy/types.ts';
import type {Covariance3, Position, Result} from '../occupation/result.ts';
import {
  civilFromDays,
  dayOfYear,
  daysFromCivil,
  daysInYear,
  SECONDS_PER_DAY,
} from '../time/calendar.ts';

/** A field that the file has no value for. */
const NO_TIME = '00:000:00000';
const UNCONSTRAINED = 2;
const AXES = ['X', 'Y', 'Z'] as const;

/**
 * The position and its covariance as SINEX: one site, one solution per part of the record.
 *
 * The coordinates stand at the coordinate epoch (`_REF_EPOCH__`) and the observation span in
 * SOLUTION/EPOCHS. SINEX has no field for the frame; it stands in FILE/COMMENT, as does what point
 * the coordinates are of. The creation time is left open, so that the same log gives the same file.
 * Source: SINEX, Solution (Software/technique) INdependent EXchange Format, version 2.02 (IERS, 1
 * December 2006), Appendix I, sections 3 to 5, 12, 18, 21, 23 and 27; columns checked against a
 * published file.
 *
 * @throws UsageError when frame, coordinate epoch, X Y Z or covariance are missing
 */
export function resultSinex(result: Result): string {
  const solutions = solutionsOf(result);
  const [first] = solutions;
  if (first === undefined) {
    throw new UsageError('--sinex: this record gives no position, so there is nothing to write');
  }
  const code = siteCode(result.occupation.mark);
  const last = solutions[solutions.length - 1] ?? first;
  const span = `${sinexTime(first.fromUtc)} ${sinexTime(last.toUtc)}`;
  const parameters = String(3 * solutions.length).padStart(5, '0');
  const lines = [
    `%=SNX 2.02 --- ${NO_TIME} --- ${span} P ${parameters} ${UNCONSTRAINED} S`,
    ...fileBlocks(result, first.position),
    ...siteId(result, code, first),
    ...epochs(code, solutions),
    ...estimates(code, solutions),
    ...matrix(solutions),
    '%ENDSNX',
  ];
  return `${lines.join('\n')}\n`;
}

interface Solution {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly position: Position;
  readonly xM: readonly [number, number, number];
  readonly covarianceM2: Matrix3;
  readonly coordinateEpoch: number;
}

function solutionsOf(result: Result): Solution[] {
  return result.segments.map(({fromUtc, toUtc, position}) => {
    const own = result.segments.length === 1 ? (result.position ?? position) : position;
    const {ecefM, frame, coordinateEpoch, covarianceEnuM2} = own;
    if (ecefM === null) throw missing('an ellipsoidal height', 'a log or sheet that gives one');
    if (frame === null) throw missing('the frame', '--frame, such as --frame ITRF2020');
    if (coordinateEpoch === null) {
      throw missing('the coordinate epoch', '--coordinate-epoch with a decimal year');
    }
    const covarianceM2 = completeCovariance(covarianceEnuM2);
    if (covarianceM2 === undefined) {
      throw missing('the covariance of the mean', 'a longer record, or look at its notices');
    }
    const origin = {...own.geodetic, ellipsoidalHeightM: own.geodetic.ellipsoidalHeightM ?? 0};
    return {
      fromUtc,
      toUtc,
      position: own,
      xM: [ecefM.x, ecefM.y, ecefM.z],
      covarianceM2: covarianceEcefFromEnu(covarianceM2, localFrame(origin, WGS84)),
      coordinateEpoch,
    };
  });
}

function missing(what: string, give: string): UsageError {
  return new UsageError(`--sinex needs ${what}, which this result does not have; give ${give}`);
}

function completeCovariance(covariance: Covariance3 | null): Matrix3 | undefined {
  if (covariance === null) return undefined;
  const rows = covariance.map((row) => row.map((value) => value ?? Number.NaN));
  return rows.flat().every(Number.isFinite) ? (rows as unknown as Matrix3) : undefined;
}

function fileBlocks(result: Result, position: Position): string[] {
  const comments = [
    `REFERENCE FRAME ${position.frame ?? ''}${position.frameFrom === 'assumed' ? ' (ASSUMED)' : ''}`,
    `COORDINATES ARE OF THE POINT: ${position.of}`,
    'REF_EPOCH IS THE COORDINATE EPOCH, NOT THE DATE OF OBSERVATION',
    'CREATION TIME LEFT OPEN: THE SAME LOG GIVES THE SAME FILE',
    ...result.inputs.map(({name}) => `INPUT ${name}`),
  ];
  return [
    ...block('FILE/REFERENCE', [
      ` ${left('DESCRIPTION', 18)} ${left('MEAN POSITION OF A STATIC OCCUPATION', 60)}`,
      ` ${left('SOFTWARE', 18)} ${left(`${result.program.name} ${result.program.version}`, 60)}`,
    ]),
    ...block(
      'FILE/COMMENT',
      comments.map((comment) => ` ${ascii(comment).slice(0, 79)}`),
    ),
  ];
}

function siteId({occupation}: Result, code: string, {position}: Solution): string[] {
  const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = position.geodetic;
  // Coordinates of an antenna must not pass for those of the mark below it.
  const point = position.of === 'mark' ? '' : 'ANTENNA OVER ';
  const name = left(`${point}${occupation.mark ?? 'MARK'}`, 22);
  const east = longitudeDeg < 0 ? longitudeDeg + 360 : longitudeDeg;
  const height = (ellipsoidalHeightM ?? 0).toFixed(1).padStart(7);
  return block('SITE/ID', [
    '*CODE PT __DOMES__ T _STATION DESCRIPTION__ APPROX_LON_ APPROX_LAT_ _APP_H_',
    ` ${code}  A --------- P ${name} ${angle(east)} ${angle(latitudeDeg)} ${height}`,
  ]);
}

function epochs(code: string, solutions: readonly Solution[]): string[] {
  return block('SOLUTION/EPOCHS', [
    '*CODE PT SOLN T _DATA_START_ __DATA_END__ _MEAN_EPOCH_',
    ...solutions.map(
      ({fromUtc, toUtc, position}, k) =>
        ` ${code}  A ${right(k + 1, 4)} P ${sinexTime(fromUtc)} ${sinexTime(toUtc)} ${sinexTime(position.observedUtc)}`,
    ),
  ]);
}

function estimates(code: string, solutions: readonly Solution[]): string[] {
  const rows = solutions.flatMap(({xM, covarianceM2, coordinateEpoch}, k) =>
    AXES.map((axis, i) => {
      const index = right(3 * k + i + 1, 5);
      const sigmaM = Math.sqrt(covarianceM2[i]?.[i] ?? Number.NaN);
      return ` ${index} STA${axis}   ${code}  A ${right(k + 1, 4)} ${timeOfDecimalYear(coordinateEpoch)} m    ${UNCONSTRAINED} ${exponential(xM[i] ?? Number.NaN, 15)} ${shortExponential(sigmaM)}`;
    }),
  );
  return block('SOLUTION/ESTIMATE', [
    '*INDEX TYPE__ CODE PT SOLN _REF_EPOCH__ UNIT S __ESTIMATED VALUE____ _STD_DEV___',
    ...rows,
  ]);
}

/** Lower triangle; the parts of one record share no epoch, so nothing stands between them. */
function matrix(solutions: readonly Solution[]): string[] {
  const rows = solutions.flatMap(({covarianceM2}, k) =>
    covarianceM2.map((row, i) => {
      const values = row.slice(0, i + 1).map((value) => matrixElement(value));
      return ` ${right(3 * k + i + 1, 5)} ${right(3 * k + 1, 5)} ${values.join(' ')}`;
    }),
  );
  return block('SOLUTION/MATRIX_ESTIMATE L COVA', [
    '*PARA1 PARA2 ____PARA2+0__________ ____PARA2+1__________ ____PARA2+2__________',
    ...rows,
  ]);
}

function block(name: string, lines: readonly string[]): string[] {
  return [`+${name}`, ...lines, `-${name}`];
}

/** Four letters or digits of the mark's name; SINEX has no longer codes. */
function siteCode(mark: string | null): string {
  const letters = ascii(mark ?? 'MARK')
    .toUpperCase()
    .replace(/[^A-Z0-9]/g, '')
    .slice(0, 4);
  return (letters === '' ? 'MARK' : letters).padEnd(4, '_');
}

/** yy:ddd:sssss of a UTC text. */
function sinexTime(utc: string): string {
  const parts = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2}(?:\.\d+)?)Z$/.exec(utc);
  if (parts === null) throw new RangeError(`sinexTime: need UTC as ISO 8601, got ${utc}`);
  const [year = 0, month = 0, day = 0, hour = 0, minute = 0, second = 0] = parts
    .slice(1)
    .map(Number);
  return timeOf({year, month, day}, hour * 3600 + minute * 60 + second);
}

function timeOfDecimalYear(decimalYear: number): string {
  const year = Math.floor(decimalYear);
  const days = (decimalYear - year) * daysInYear(year);
  const firstDay = daysFromCivil({year, month: 1, day: 1});
  return timeOf(civilFromDays(firstDay + Math.floor(days)), (days % 1) * SECONDS_PER_DAY);
}

function timeOf(date: {year: number; month: number; day: number}, secondOfDay: number): string {
  const seconds = Math.min(Math.round(secondOfDay), SECONDS_PER_DAY);
  const year = String(date.year % 100).padStart(2, '0');
  const day = String(dayOfYear(date)).padStart(3, '0');
  return `${year}:${day}:${String(seconds).padStart(5, '0')}`;
}

/** ddd mm ss.s in 11 columns; the sign stands before the degrees, which may be zero. */
function angle(degrees: number): string {
  const {negative, degrees: whole, minutes, seconds} = sexagesimal(degrees, 1);
  const signed = `${negative ? '-' : ''}${whole}`;
  return `${signed.padStart(3)} ${right(minutes, 2)} ${seconds.toFixed(1).padStart(4)}`;
}

/** Fortran E21.15 as SINEX files have it: 0.123456789012345E+07, -.123456789012345E+07. */
function exponential(value: number, digits: number): string {
  const [mantissa = '', exponent = '0'] = Math.abs(value)
    .toExponential(digits - 1)
    .split('e');
  const power = value === 0 ? 0 : Number(exponent) + 1;
  const sign = power < 0 ? '-' : '+';
  const figures = mantissa.replace('.', '');
  return `${value < 0 ? '-' : '0'}.${figures}E${sign}${String(Math.abs(power)).padStart(2, '0')}`;
}

/** Fortran E11.6, positive: .123456E-02. */
function shortExponential(value: number): string {
  return exponential(value, 6).slice(1);
}

/** Fortran E21.14: one column for the sign, which is a blank when positive. */
function matrixElement(value: number): string {
  return `${value < 0 ? '-' : ' '}0${exponential(Math.abs(value), 14).slice(1)}`;
}

function left(text: string, width: number): string {
  return ascii(text).slice(0, width).padEnd(width);
}

function right(value: number, width: number): string {
  return String(value).padStart(width);
}

/** SINEX is ASCII; a control character would break its columns. */
function ascii(text: string): string {
  return text.replace(/[^\x20-\x7e]/g, '?');
}
