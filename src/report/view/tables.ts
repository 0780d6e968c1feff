import type {InputAccount, PerAxis, ScatterMeasures} from '../../occupation/result.ts';
import {fixed, formatCount, formatUtc} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn, numberCell, textCell} from './columns.ts';
import {head, numberHead, row, type Table} from './table.ts';

const NOT_INCLUDED = 'not included';

/** Where the uncertainty comes from, row by row. */
export function budgetTable({result, options}: ReportContext): Table | null {
  if (result.budget.length === 0) return null;
  const total = result.position?.standardUncertaintyM ?? null;
  const column = lengthColumn(
    [
      ...result.budget.flatMap(({standardUncertaintyM: u}) => [u?.east, u?.north, u?.up]),
      ...[total?.east, total?.north, total?.up],
    ],
    options.units,
  );
  const cells = (u: PerAxis<number | null> | null) => [
    numberCell(column.cell(u?.east)),
    numberCell(column.cell(u?.north)),
    numberCell(column.cell(u?.up)),
  ];
  const name = column.unit.name;
  return {
    caption: 'Standard uncertainties; 95 % is about twice as much',
    heads: [
      head('Source'),
      numberHead(`East ${name}`),
      numberHead(`North ${name}`),
      numberHead(`Up ${name}`),
      head('From'),
      head('Shared by'),
    ],
    rows: [
      ...result.budget.map((line) =>
        row(line.source, [
          ...cells(line.standardUncertaintyM),
          textCell(line.standardUncertaintyM === null ? NOT_INCLUDED : line.from),
          textCell([line.sharedBy, line.id].filter((part) => part !== null).join(': ')),
        ]),
      ),
      ...(total === null
        ? []
        : [
            row(
              'All together',
              [...cells(total), textCell('root of the sum of squares'), textCell('')],
              true,
            ),
          ]),
    ],
  };
}

/** Scatter of single epochs as observed, and as a normal distribution would have it. */
export function scatterTable({result, options}: ReportContext): Table | null {
  const {scatter} = result;
  if (scatter === null) return null;
  const {observed, normalTheory} = scatter.aboutMean;
  const about = scatter.aboutReference.observed;
  const measures = [observed, normalTheory, about];
  const receiver = result.screening.receiverSigmaM;
  const column = lengthColumn(measures.flatMap(valuesOf), options.units);
  const line = (name: string, of: (m: ScatterMeasures) => number | null | undefined) =>
    row(
      name,
      measures.map((m) => numberCell(column.cell(of(m)))),
    );
  const name = column.unit.name;
  const rows = [
    line('Standard deviation, east', (m) => m.standardDeviationM.east),
    line('Standard deviation, north', (m) => m.standardDeviationM.north),
    line('Standard deviation, up', (m) => m.standardDeviationM.up),
    line('Root mean square distance in plan', (m) => m.drmsM),
    line('Radius that holds 50 %', (m) => m.cepM),
    line('Radius that holds 95 %', (m) => m.r95M),
    line('Standard ellipse, long half-axis', (m) => m.ellipse?.semiMajorM),
    line('Standard ellipse, short half-axis', (m) => m.ellipse?.semiMinorM),
    row(
      'Standard ellipse, azimuth of the long axis, degrees',
      measures.map((m) => numberCell(m.ellipse === null ? '' : fixed(m.ellipse.azimuthDeg, 0))),
    ),
  ];
  if (receiver !== null) {
    for (const axis of ['east', 'north', 'up'] as const) {
      rows.push(
        row(`Receiver's own sigma, ${axis}, median`, [
          numberCell(column.cell(receiver[axis])),
          textCell(''),
          textCell(''),
        ]),
      );
    }
  }
  return {
    caption: `Scatter of single epochs, ${name}`,
    heads: [
      head('Measure'),
      numberHead('About the mean, observed'),
      numberHead('About the mean, if normal'),
      numberHead('About the reference, observed'),
    ],
    rows: rows.filter(({cells}) => cells.some(({text}) => text !== '')),
  };
}

function valuesOf(m: ScatterMeasures): (number | null | undefined)[] {
  const {east, north, up} = m.standardDeviationM;
  return [east, north, up, m.drmsM, m.r95M, m.ellipse?.semiMajorM];
}

/** What happened to each epoch; the rows add up to the epochs read. */
export function screeningTable({result}: ReportContext): Table {
  const {epochs} = result;
  const share = (count: number) => (epochs.read === 0 ? '' : fixed((100 * count) / epochs.read, 2));
  const line = (name: string, rule: string, count: number, total = false) =>
    row(name, [textCell(rule), numberCell(String(count)), numberCell(share(count))], total);
  const left = Object.entries(epochs.screened)
    .filter(([, count]) => count > 0)
    .sort(([a, n], [b, m]) => m - n || (a < b ? -1 : 1));
  return {
    caption: 'What happened to each epoch',
    heads: [head('Fate'), head('Rule'), numberHead('Epochs'), numberHead('Share %')],
    rows: [
      line('Used', 'passed every rule', epochs.used),
      ...left.map(([reason, count]) => line('Left out', reason, count)),
      line('Read', 'all of the above', epochs.read, true),
    ],
  };
}

/** What happened to each line of each input; the rows add up to the lines of the files. */
export function lineTable({result}: ReportContext): Table {
  const rows = result.inputs.flatMap(({name, lines}) => {
    const of = (fate: string, reason: string, count: number, total = false) =>
      row(name, [textCell(fate), textCell(reason), numberCell(String(count))], total);
    return [
      of('used', '', lines.used),
      ...sorted(lines.ignored).map(([type, count]) => of('ignored', type, count)),
      ...sorted(lines.rejected).map(([reason, count]) => of('rejected', reason, count)),
      of('total', '', lines.total, true),
    ];
  });
  return {
    caption: 'What happened to each line',
    heads: [head('File'), head('Fate'), head('Type or reason'), numberHead('Lines')],
    rows,
  };
}

function sorted(counts: Readonly<Record<string, number>>): [string, number][] {
  return Object.entries(counts)
    .filter(([, count]) => count > 0)
    .sort(([a, n], [b, m]) => m - n || (a < b ? -1 : 1));
}

export interface InputView {
  readonly name: string;
  readonly facts: string;
  readonly sentences: string;
  readonly sha256: string;
}

export function inputViews({result}: ReportContext): InputView[] {
  return result.inputs.map((input) => ({
    name: input.name,
    facts: inputFacts(input),
    sentences: sorted(input.sentences)
      .map(([type, count]) => `${type} ${formatCount(count)}`)
      .join(', '),
    sha256: input.sha256,
  }));
}

function inputFacts({kind, bytes, betweenBytes, firstUtc, lastUtc}: InputAccount): string {
  const span =
    firstUtc === null || lastUtc === null
      ? 'no time'
      : `${formatUtc(firstUtc)} to ${formatUtc(lastUtc)} UTC`;
  const binary = betweenBytes > 0 ? `, ${formatCount(betweenBytes)} bytes between sentences` : '';
  return `${kind === 'nmea' ? 'NMEA 0183' : 'table'}, ${formatCount(bytes)} bytes${binary}, ${span}`;
}

/** Settings that somebody chose; all of them are in the data block. */
export function settingsTable({result}: ReportContext): Table | null {
  const chosen = Object.entries(result.settings)
    .filter(([, setting]) => setting.from !== 'default')
    .sort(([a], [b]) => (a < b ? -1 : 1));
  if (chosen.length === 0) return null;
  return {
    caption: 'Settings that differ from the defaults',
    heads: [head('Setting'), head('Value'), head('From')],
    rows: chosen.map(([name, {value, from}]) =>
      row(name, [textCell(value === null ? 'none' : String(value)), textCell(from)]),
    ),
  };
}
