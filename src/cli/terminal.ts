import {headlineFacts} from '../occupation/headline-facts.ts';
import type {
  DiagnosisFound,
  Notice,
  PerAxis,
  Position,
  Result,
  Segment,
} from '../occupation/result.ts';
import {accidentalSentence, NOTHING_FITS} from '../wording/diagnosis.ts';
import {geoidName} from '../wording/heights.ts';
import {
  coordinateDecimals,
  counted,
  degreeDecimals,
  fixed,
  formatAzimuth,
  formatCount,
  formatDuration,
  formatLength,
  formatRate,
  formatUtc,
  joined,
  type LengthScale,
  lengthScale,
  shownUncertaintyM,
} from '../wording/numbers.ts';
import {headline, type Tone} from '../wording/verdict.ts';

/** How a stream is written to: colours and shapes only where they can be shown. */
export interface TerminalStyle {
  readonly colour: boolean;
  readonly unicode: boolean;
  /** Small plots: only on a terminal, and only where it shows blocks. */
  readonly plots: boolean;
  readonly columns: number;
}

type Paint = 'green' | 'yellow' | 'red' | 'dim' | 'bold';

const CODES: Record<Paint, string> = {green: '32', yellow: '33', red: '31', dim: '2', bold: '1'};
const TONE_PAINT: Record<Tone, Paint> = {
  within: 'green',
  look: 'yellow',
  outside: 'red',
  'not tested': 'dim',
};
const SHAPES: Record<Tone, string> = {within: '●', look: '▲', outside: '■', 'not tested': '○'};
const SEVERITY_SHAPES: Record<Notice['severity'], string> = {
  concern: '■',
  caution: '▲',
  note: '·',
  absent: '○',
};
const PLAIN_SHAPES: Record<Tone, string> = {
  within: '*',
  look: '!',
  outside: '#',
  'not tested': '-',
};

/** The stream's own abilities, and what the user asked for through the environment. */
export function styleOf(
  stream: {readonly isTTY?: boolean; readonly columns?: number},
  environment: Readonly<Record<string, string | undefined>>,
): TerminalStyle {
  const terminal = stream.isTTY === true && environment.TERM !== 'dumb';
  const showsUnicode = !terminal || speaksUtf8(environment);
  return {
    colour: terminal && (environment.NO_COLOR ?? '') === '',
    unicode: showsUnicode,
    plots: terminal && showsUnicode,
    columns: Math.min(100, Math.max(60, stream.columns ?? 100)),
  };
}

/** By the locale, as POSIX has it; systems without one are taken to be of this century. */
function speaksUtf8({
  LC_ALL,
  LC_CTYPE,
  LANG,
}: Readonly<Record<string, string | undefined>>): boolean {
  const locale = [LC_ALL, LC_CTYPE, LANG].find((value) => (value ?? '') !== '');
  return locale === undefined || /utf-?8/i.test(locale);
}

function painted(text: string, paint: Paint, style: TerminalStyle): string {
  return style.colour ? `\u001b[${CODES[paint]}m${text}\u001b[0m` : text;
}

/** The answer on one screen: verdict first, then the numbers, then what to look at. */
export function resultSummary(
  result: Result,
  style: TerminalStyle,
  plot: readonly string[] = [],
): string {
  const {tone, status, sentence} = headline(headlineFacts(result));
  const shapes = style.unicode ? SHAPES : PLAIN_SHAPES;
  const title = [shapes[tone], status.toUpperCase(), result.occupation.mark ?? '']
    .join('  ')
    .trim();
  const blocks = [
    [painted(painted(title, TONE_PAINT[tone], style), 'bold', style), ...wrapped(sentence, style)],
    numberTable(result),
    plot,
    facts(result),
    causeLines(result, style),
    noticeLines(result.notices, style),
  ];
  const text = blocks
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
  return `${text.replaceAll('\u00a0', ' ')}\n`;
}

type Row = readonly [string, PerAxis<number | null>, number | null, string];

function numberTable(result: Result): string[] {
  const position = shownPosition(result);
  const rows: Row[] = [];
  if (result.comparison !== null) {
    const {offsetM, azimuthDeg} = result.comparison;
    const toward = azimuthDeg === null ? '' : `toward ${formatAzimuth(azimuthDeg)}`;
    rows.push(['offset', offsetM, offsetM.horizontal, toward]);
    for (const {differenceM, startUtc, agreement} of result.comparison.otherSetups) {
      const when = startUtc === null ? 'other setup' : `minus ${startUtc.slice(11, 16)} UTC`;
      rows.push([when, differenceM, differenceM.horizontal, agreement]);
    }
  }
  if (position?.uncertainty95M) {
    const {east, north, up, horizontalRadius} = position.uncertainty95M;
    const axes = {
      east: shownUncertaintyM(east),
      north: shownUncertaintyM(north),
      up: shownUncertaintyM(up),
    };
    rows.push(['95 % of the mean', axes, shownUncertaintyM(horizontalRadius), 'radius']);
  }
  if (result.scatter !== null) {
    const {standardDeviationM, r95M} = result.scatter.aboutMean.observed;
    rows.push(['sd of one epoch', standardDeviationM, r95M, '95 % radius of one epoch']);
  }
  if (rows.length === 0) return [];
  const head = ['east', 'north', 'up', 'horizontal'].map((name) => name.padStart(11)).join('');
  return [`${' '.repeat(20)}${head}`, ...rows.map(numberRow)];
}

/** Each row in the unit that suits it: an offset of metres in height beside millimetres in plan. */
function numberRow([name, axes, horizontal, note]: Row): string {
  const values = [axes.east, axes.north, axes.up, horizontal];
  const {unit, perM, decimals} = rowScale(values.filter((value) => value !== null));
  const signed = name === 'offset' || name.startsWith('minus') || name === 'other setup';
  const cells = values.map((valueM, i) => {
    if (valueM === null) return '-'.padStart(11);
    const text = fixed(valueM * perM, decimals);
    const plus = signed && i < 3 && Number(text) > 0 ? '+' : '';
    return `${plus}${text}`.padStart(11);
  });
  return `${name.padEnd(17)}${unit.padEnd(3)}${cells.join('')}  ${note}`.trimEnd();
}

/** Millimetres as long as the smallest value needs them and the largest still reads well. */
function rowScale(valuesM: readonly number[]): LengthScale {
  const sizes = valuesM.map(Math.abs).filter((size) => size > 0);
  const largestM = Math.max(0, ...sizes);
  const smallestM = Math.min(largestM, ...sizes);
  return largestM < 10 && smallestM < 0.05 ? lengthScale(0.01) : lengthScale(largestM);
}

function shownPosition(result: Result): Position | null {
  return result.position ?? null;
}

function facts(result: Result): string[] {
  const lines: [string, string][] = [];
  for (const segment of result.segments) {
    const span = result.segments.length > 1 ? `  ${partText(segment, result)}` : '';
    const scatterM = result.scatter?.aboutMean.observed.r95M ?? null;
    lines.push(['position', `${positionText(segment.position, scatterM)}${span}`]);
  }
  const first = result.segments[0]?.position;
  if (first?.separation != null) lines.push(['height', separationText(first, result)]);
  if (first !== undefined) lines.push(['of', `${first.of}; ${frameText(first)}`]);
  const {epochs, occupation} = result;
  if (occupation.startUtc !== null && occupation.endUtc !== null) {
    const span = (Date.parse(occupation.endUtc) - Date.parse(occupation.startUtc)) / 1000;
    const every =
      epochs.intervalS === null ? '' : `, one epoch every ${formatDuration(epochs.intervalS)}`;
    lines.push([
      'record',
      `${formatUtc(occupation.startUtc)} to ${formatUtc(occupation.endUtc)} UTC, ${formatDuration(span)}${every}`,
    ]);
  }
  const fix = result.screening.fixClassKept;
  lines.push([
    'epochs',
    `${counted(epochs.read, 'epoch')} read, ${formatCount(epochs.used)} used${fix === null ? '' : ` (${fix})`}${screenedText(epochs.screened)}`,
  ]);
  lines.push(['stillness', stillnessText(result)]);
  return lines.map(([name, text]) => `${name.padEnd(11)}${text}`);
}

/** From when to when a part of the record lasts, with the days where there are several. */
function partText({fromUtc, toUtc}: Segment, {epochs}: Result): string {
  const oneDay = epochs.firstUtc?.slice(0, 10) === epochs.lastUtc?.slice(0, 10);
  const shown = (utc: string) => formatUtc(utc).slice(oneDay ? 11 : 0);
  return `${shown(fromUtc)} to ${shown(toUtc)}`;
}

/** As many digits as the uncertainty deserves, or the scatter where there is none. */
function positionText(
  {geodetic, uncertainty95M, orthometricHeightM}: Position,
  scatterM: number | null,
): string {
  const metres = coordinateDecimals(uncertainty95M?.horizontalRadius ?? scatterM);
  const degrees = degreeDecimals(metres);
  const north = geodetic.latitudeDeg >= 0 ? 'N' : 'S';
  const east = geodetic.longitudeDeg >= 0 ? 'E' : 'W';
  const heights = coordinateDecimals(uncertainty95M?.up ?? scatterM);
  const height =
    geodetic.ellipsoidalHeightM !== null
      ? `ellipsoidal height ${fixed(geodetic.ellipsoidalHeightM, heights)} m`
      : orthometricHeightM !== null
        ? `height above the receiver's geoid ${fixed(orthometricHeightM, heights)} m`
        : 'no height';
  return `${fixed(Math.abs(geodetic.latitudeDeg), degrees)}° ${north}  ${fixed(Math.abs(geodetic.longitudeDeg), degrees)}° ${east}  ${height}`;
}

/** The height above the geoid of a named model; the receiver's own is no height to hand on. */
function separationText(
  {orthometricHeightM, separation, uncertainty95M}: Position,
  {scatter}: Result,
): string {
  if (separation === null || orthometricHeightM === null) return 'no height above the geoid';
  const scatterM = scatter?.aboutMean.observed.r95M ?? null;
  const decimals = coordinateDecimals(uncertainty95M?.up ?? scatterM);
  return `${fixed(orthometricHeightM, decimals)} m above ${geoidName(separation)}; separation ${fixed(separation.separationM, 3)} m (${separation.from})`;
}

function frameText({frame, frameFrom, coordinateEpoch}: Position): string {
  if (frame === null) return 'frame not stated';
  const epoch =
    coordinateEpoch === null ? 'epoch not stated' : `epoch ${coordinateEpoch.toFixed(2)}`;
  return `${frame}, ${epoch}${frameFrom === null ? '' : ` (${frameFrom})`}`;
}

function screenedText(screened: Readonly<Record<string, number>>): string {
  const reasons = Object.entries(screened)
    .sort(([, a], [, b]) => b - a)
    .map(([reason, count]) => `${formatCount(count)} ${reason}`);
  return reasons.length === 0 ? '' : `; left out: ${joined(reasons)}`;
}

function stillnessText({stability}: Result): string {
  const rates = [stability.drift.east, stability.drift.north].flatMap((drift) =>
    drift === null ? [] : [drift.detectableMPerHour],
  );
  const power =
    rates.length === 0
      ? ''
      : `; a steady drift of ${formatRate(Math.max(...rates))} would have been seen`;
  const small = stability.steps.filter((step) => !step.material).length;
  const steps = small === 0 ? '' : `; ${counted(small, 'small step')} found, below what matters`;
  return `${stability.verdict}${power}${steps}`;
}

/** More than these would bury the answer; the report and the result list all. */
const CAUSES_SHOWN = 4;

/** What the offset is consistent with, and what to measure to find out. */
function causeLines({comparison}: Result, style: TerminalStyle): string[] {
  const diagnosis = comparison?.diagnosis ?? null;
  if (comparison === null || diagnosis === null) return [];
  const {candidates} = comparison;
  const found = [
    ...candidates.map(({title, advice, predictedM}) => ({title, advice, predictedM})),
    ...diagnosis.pairs.map(({title, predictedM}) => ({title, advice: '', predictedM})),
  ];
  if (found.length === 0) return wrapped(NOTHING_FITS, style);
  const lines = found.slice(0, CAUSES_SHOWN).flatMap(({title, advice, predictedM}) => [
    ...listItem(`${title} (${vectorText(predictedM)})`, style),
    ...wrapped(advice, style, 4)
      .filter((line) => line !== '')
      .map((line) => `    ${line}`),
  ]);
  const more = found.length - CAUSES_SHOWN;
  return [
    'the offset is consistent with',
    ...lines,
    ...(more > 0 ? [`  and ${counted(more, 'more cause')}, in the report and the result`] : []),
    ...accidentalLines(diagnosis, style),
  ];
}

function accidentalLines(diagnosis: DiagnosisFound, style: TerminalStyle): string[] {
  const {tested, accidentalMatches, accidentalWithinM, accidentalOf} = diagnosis;
  if (accidentalOf === null) return [];
  return wrapped(
    accidentalSentence({
      tested: tested.length,
      matches: accidentalMatches,
      withinM: accidentalWithinM,
      of: accidentalOf,
    }),
    style,
    2,
  ).map((line) => `  ${line}`);
}

function listItem(text: string, style: TerminalStyle): string[] {
  const [first = '', ...rest] = wrapped(text, style, 4);
  return [`  - ${first}`, ...rest.map((line) => `    ${line}`)];
}

function vectorText(vectorM: PerAxis<number | null>): string {
  return (['east', 'north', 'up'] as const)
    .flatMap((axis) => {
      const value = vectorM[axis];
      return value === null || value === 0 ? [] : [`${axis} ${formatLength(value, true)}`];
    })
    .join(', ');
}

/** Notices as lines, gravest first; mere notes only when asked for. */
export function noticeLines(
  notices: readonly Notice[],
  style: TerminalStyle,
  withNotes = false,
): string[] {
  const order = {concern: 0, caution: 1, note: 2, absent: 3};
  return [...notices]
    .sort((a, b) => order[a.severity] - order[b.severity])
    .filter(
      ({severity}) =>
        severity === 'concern' || severity === 'caution' || (withNotes && severity === 'note'),
    )
    .flatMap(({severity, text}) => {
      const sign = style.unicode ? SEVERITY_SHAPES[severity] : '!';
      const [head = '', ...rest] = wrapped(text, style, 2);
      const paint = severity === 'concern' ? 'red' : 'yellow';
      return [`${painted(sign, paint, style)} ${head}`, ...rest.map((line) => `  ${line}`)];
    });
}

/** Words laid into lines no longer than the terminal is wide. */
export function wrapped(text: string, style: TerminalStyle, indent = 0): string[] {
  const width = style.columns - indent;
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > width) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  return [...lines, line];
}
