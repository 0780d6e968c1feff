import type {FrameChangeStep} from '../../occupation/result.ts';
import {fixed} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {textCell} from './columns.ts';
import {fixedTable, head, row, type Table} from './table.ts';

/** How many decimals each kind of parameter is published with, and one more. */
const DECIMALS: readonly (readonly [RegExp, number])[] = [
  [/Mm$/, 3],
  [/Ppb$/, 4],
  [/Mas$/, 5],
  [/MPerYear$/, 6],
];

/**
 * The way from the frame of the log to that of the mark, with every parameter and the point after
 * each step, so that a reader can redo it by hand; null when nothing had to be done.
 */
export function frameChangeTable({result}: ReportContext): Table | null {
  const change = result.comparison?.frameChange ?? null;
  if (change === null || change.steps.length === 0) return null;
  const {east, north, up} = change.standardUncertaintyM;
  const sigma = [east, north, up].map((value) => fixed(value * 1000, 1)).join(', ');
  return fixedTable({
    caption: `From ${place(change.fromFrame, change.fromEpoch)} to ${place(change.toFrame, change.toEpoch)}; standard uncertainty east, north, up ${sigma} mm. Rotations follow the position vector convention: X' = X + T + D X + R × X`,
    heads: [head('Step'), head('Parameters'), head('X, Y, Z after it, m'), head('Source')],
    rows: change.steps.map(stepRow),
  });
}

function stepRow(step: FrameChangeStep) {
  const between = step.from === step.to ? step.from : `${step.from} to ${step.to}`;
  const {x, y, z} = step.ecefM;
  return row(`${between}, ${step.what}, at ${step.epoch.toFixed(3)}`, [
    textCell(
      Object.entries(step.parameters)
        .map(([name, value]) => `${parameterName(name)} ${fixed(value, decimalsOf(name))}`)
        .join('; '),
    ),
    textCell([x, y, z].map((value) => fixed(value, 4)).join(' ')),
    textCell(step.source),
  ]);
}

function place(frame: string, epoch: number | null): string {
  return epoch === null ? frame : `${frame} at ${epoch.toFixed(3)}`;
}

function decimalsOf(name: string): number {
  return DECIMALS.find(([pattern]) => pattern.test(name))?.[1] ?? 6;
}

/** `translationXMm` is "T x mm", as the tables of the frames print it. */
function parameterName(name: string): string {
  return name
    .replace(/^translation([XYZ])Mm$/, 'T$1 mm')
    .replace(/^rotation([XYZ])Mas$/, 'R$1 mas')
    .replace(/^scalePpb$/, 'D ppb')
    .replace(/^velocity([XYZ])MPerYear$/, 'V$1 m/yr');
}
