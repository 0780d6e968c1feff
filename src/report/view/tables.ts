import type {InputAccount, PerAxis, ScatterMeasures} from '../../occupation/result.ts';
import {fixed, formatCount, formatUtc} from '../../wording/numbers.ts';
import {besideUtc} from '../../wording/time-zone.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn, numberCell, textCell} from './columns.ts';
import {fixedTable, head, numberHead, row, stacking, type Table} from './table.ts';

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
  return stacking({
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
  });
}

/** Scatter of single epochs as observed, as a normal distribution would have it, and as believed. */
export function scatterTable({result, options}: ReportContext): Table | null {
  const {scatter} = result;
  if (scatter === null) return null;
  const {aboutMean, aboutReference} = scatter;
  const lines: [string, ScatterMeasures][] = [
    ['About the mean, observed', aboutMean.observed],
    ['About the mean, if normal', aboutMean.normalTheory],
    ['About the reference, observed', aboutReference.observed],
  ];
  const receiver = result.screening.receiverSigmaM;
  if (receiver !== null) {
    const none = {drmsM: null, cepM: null, r95M: null, ellipse: null};
    lines.push(["Receiver's own sigma, median", {standardDeviationM: receiver, ...none}]);
  }
  const column = lengthColumn(
    lines.flatMap(([, measures]) => valuesOf(measures)),
    options.units,
  );
  return stacking({
    caption: `Scatter of single epochs in ${column.unit.name}. SD: standard deviation; DRMS: root mean square distance in plan; 50 % and 95 %: radii in plan that hold so many; a, b: half-axes of the ellipse of one standard deviation, and the azimuth of a in degrees`,
    heads: [
      head('Scatter'),
      ...['SD east', 'SD north', 'SD up', 'DRMS', '50 %', '95 %', 'a', 'b', 'azimuth'].map(
        numberHead,
      ),
    ],
    rows: lines.map(([name, m]) =>
      row(name, [
        ...[m.standardDeviationM.east, m.standardDeviationM.north, m.standardDeviationM.up].map(
          (valueM) => numberCell(column.cell(valueM)),
        ),
        ...[m.drmsM, m.cepM, m.r95M, m.ellipse?.semiMajorM, m.ellipse?.semiMinorM].map((valueM) =>
          numberCell(column.cell(valueM)),
        ),
        numberCell(m.ellipse === null ? '' : fixed(m.ellipse.azimuthDeg, 0)),
      ]),
    ),
  });
}

/** Every jump found, whether it matters or not; null when there was none. */
export function stepsTable({result, options}: ReportContext): Table | null {
  const {steps} = result.stability;
  if (steps.length === 0) return null;
  const column = lengthColumn(
    steps.flatMap((step) => [step.eastM, step.northM, step.upM]),
    options.units,
  );
  const name = column.unit.name;
  return stacking({
    caption: 'Jumps of the positions, after minus before',
    heads: [
      head('UTC'),
      numberHead(`East ${name}`),
      numberHead(`North ${name}`),
      numberHead(`Up ${name}`),
      head('Weight'),
      head('Beside it in the log'),
    ],
    rows: steps.map((step) =>
      row(`${formatUtc(step.utc)}${besideUtc(step.utc, options.timeZone)}`, [
        numberCell(column.cell(step.eastM)),
        numberCell(column.cell(step.northM)),
        numberCell(column.cell(step.upM)),
        textCell(step.material ? 'matters' : 'below the movement limit'),
        textCell(step.beside.join(', ')),
      ]),
    ),
  });
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
  return fixedTable({
    caption: 'What happened to each epoch',
    heads: [head('Fate'), head('Rule'), numberHead('Epochs'), numberHead('Share %')],
    rows: [
      line('Used', 'passed every rule', epochs.used),
      ...left.map(([reason, count]) => line('Left out', reason, count)),
      line('Read', 'all of the above', epochs.read, true),
    ],
  });
}

/** What happened to each line of each input; the rows add up to the lines of the files. */
export function lineTable({result}: ReportContext): Table {
  const several = result.inputs.length > 1;
  const rows = result.inputs.flatMap(({name, lines}) => {
    const of = (fate: string, reason: string, count: number, total = false) =>
      row(
        fate,
        [...(several ? [textCell(name)] : []), textCell(reason), numberCell(String(count))],
        total,
      );
    return [
      of('used', '', lines.used),
      ...sorted(lines.ignored).map(([type, count]) => of('ignored', type, count)),
      ...sorted(lines.rejected).map(([reason, count]) => of('rejected', reason, count)),
      of('total', '', lines.total, true),
    ];
  });
  return fixedTable({
    caption: 'What happened to each line',
    heads: [
      head('Fate'),
      ...(several ? [head('File')] : []),
      head('Type or reason'),
      numberHead('Lines'),
    ],
    rows,
  });
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
  return fixedTable({
    caption: 'Settings that differ from the defaults',
    heads: [head('Setting'), head('Value'), head('From')],
    rows: chosen.map(([name, {value, from}]) =>
      row(name, [textCell(value === null ? 'none' : String(value)), textCell(from)]),
    ),
  });
}
