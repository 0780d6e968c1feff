import type {ContentsResult} from '../occupation/contents-result.ts';
import type {InputAccount} from '../occupation/result.ts';
import {
  counted,
  fixed,
  formatCount,
  formatDuration,
  formatLength,
  formatUtc,
  joined,
} from '../wording/numbers.ts';
import {noticeLines, type TerminalStyle, wrapped} from './terminal.ts';

/** How many rejected lines are shown; the JSON holds all the examples that were kept. */
const REJECTED_SHOWN = 8;

/** What is in the logs, on a screen: inputs, epochs, standing periods, findings. */
export function contentsSummary(result: ContentsResult, style: TerminalStyle): string {
  const blocks = [
    ...result.inputs.map((input) => inputLines(input, style)),
    epochLines(result),
    standingLines(result),
    rejectedLines(result),
    noticeLines(result.notices, style, true),
  ];
  const text = blocks
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
  return `${text.replaceAll('\u00a0', ' ')}\n`;
}

function inputLines(input: InputAccount, style: TerminalStyle): string[] {
  const {lines} = input;
  const ignored = total(lines.ignored);
  const rejected = total(lines.rejected);
  const entries: [string, string][] = [
    [
      'lines',
      `${formatCount(lines.total)} = ${formatCount(lines.used)} used + ${formatCount(ignored)} ignored + ${formatCount(rejected)} rejected`,
    ],
    [input.kind === 'nmea' ? 'sentences' : 'rows', listed(input.sentences)],
    ['ignored', listed(lines.ignored)],
    ['rejected', listed(lines.rejected)],
  ];
  if (input.betweenBytes > 0) {
    entries.push(['between', `${counted(input.betweenBytes, 'byte')} that belong to no line`]);
  }
  return [
    `${input.name}  ${formatCount(input.bytes)} bytes, ${input.kind}`,
    ...entries
      .filter(([, text]) => text !== '')
      .flatMap(([name, text]) => hanging(name, text, style)),
  ];
}

function hanging(name: string, text: string, style: TerminalStyle): string[] {
  const [first = '', ...rest] = wrapped(text, style, 13);
  return [`  ${name.padEnd(11)}${first}`, ...rest.map((line) => ' '.repeat(13) + line)];
}

function listed(counts: Readonly<Record<string, number>>): string {
  return Object.entries(counts)
    .sort(([nameA, a], [nameB, b]) => b - a || (nameA < nameB ? -1 : 1))
    .map(([name, count]) => `${name} ${formatCount(count)}`)
    .join(', ');
}

function total(counts: Readonly<Record<string, number>>): number {
  return Object.values(counts).reduce((sum, count) => sum + count, 0);
}

function epochLines({epochs, satellites}: ContentsResult): string[] {
  if (epochs.read === 0) return ['no epoch with a position'];
  const lines: [string, string][] = [
    ['epochs', `${formatCount(epochs.read)}: ${listed(epochs.fixClasses)}`],
  ];
  if (epochs.firstUtc !== null && epochs.lastUtc !== null) {
    const spanS = (Date.parse(epochs.lastUtc) - Date.parse(epochs.firstUtc)) / 1000;
    const every = epochs.intervalS === null ? '' : `, every ${formatDuration(epochs.intervalS)}`;
    lines.push([
      'span',
      `${formatUtc(epochs.firstUtc)} to ${formatUtc(epochs.lastUtc)} UTC, ${formatDuration(spanS)}${every}`,
    ]);
  }
  if (epochs.gaps.length > 0) {
    const longest = epochs.gaps.reduce((a, b) => (b.durationS > a.durationS ? b : a));
    lines.push([
      'gaps',
      `${epochs.gaps.length}, the longest ${formatDuration(longest.durationS)} from ${formatUtc(longest.fromUtc)}`,
    ]);
  }
  const {east, north, up} = epochs.resolutionM;
  const digits = [
    ['north', north],
    ['east', east],
    ['up', up],
  ].flatMap(([axis, value]) =>
    typeof value === 'number' ? [`${axis} ${formatLength(value)}`] : [],
  );
  if (digits.length > 0) lines.push(['digits', `positions in steps of ${joined(digits)}`]);
  if (satellites.length > 0) {
    lines.push([
      'satellites',
      satellites
        .map(({system, satellites: count, medianCarrierToNoiseDbHz: strength}) =>
          strength === null
            ? `${system} ${count}`
            : `${system} ${count} (${strength.toFixed(0)} dB-Hz)`,
        )
        .join(', '),
    ]);
  }
  return lines.map(([name, text]) => `${name.padEnd(13)}${text}`);
}

function standingLines({standing}: ContentsResult): string[] {
  if (standing.length === 0)
    return ['the receiver never stood still long enough to call it a setup'];
  return [
    'stood still   from                 to                   for          epochs  mean latitude   longitude       sd east, north, up',
    ...standing.map((period) => {
      const {mean, scatterM} = period;
      const scatter = [scatterM.east, scatterM.north, scatterM.up]
        .map((value) => (value === null ? '-' : formatLength(value)))
        .join(', ');
      return [
        `  ${String(period.number).padStart(3)}        `,
        formatUtc(period.fromUtc).padEnd(21),
        formatUtc(period.toUtc).padEnd(21),
        formatDuration(period.durationS).padEnd(13),
        String(period.epochs).padStart(6),
        `  ${fixed(mean.latitudeDeg, 7).padStart(11)}`,
        `  ${fixed(mean.longitudeDeg, 7).padStart(12)}   `,
        scatter,
      ].join('');
    }),
  ];
}

function rejectedLines({rejectedLines: lines}: ContentsResult): string[] {
  if (lines.length === 0) return [];
  const more = lines.length > REJECTED_SHOWN ? ` (${REJECTED_SHOWN} of ${lines.length} kept)` : '';
  return [
    `rejected lines${more}`,
    ...lines
      .slice(0, REJECTED_SHOWN)
      .map(
        ({input, lineNumber, reason, excerpt}) => `  ${input}:${lineNumber}  ${reason}: ${excerpt}`,
      ),
  ];
}
