import type {FrameChange, FrameChangeStep} from '../../occupation/result.ts';
import {
  frameParametersText,
  framePlaceText,
  ROTATION_CONVENTION,
} from '../../wording/frame-steps.ts';
import {fixed} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {textCell} from './columns.ts';
import {fixedTable, head, row, type Table} from './table.ts';

/**
 * The way from the frame of the log to that of the mark, with every parameter and the point after
 * each step, so that a reader can redo it by hand; null when nothing had to be done.
 */
export function frameChangeTable({result}: ReportContext): Table | null {
  const change = result.comparison?.frameChange ?? null;
  if (change === null || change.steps.length === 0) return null;
  const sigma = threeAxes(change.standardUncertaintyM, 1000, 1);
  const mismatch = threeAxes(change.mismatchM, 1, 4);
  return fixedTable({
    caption: `From ${framePlaceText(change.fromFrame, change.fromEpoch)} to ${framePlaceText(change.toFrame, change.toEpoch)}; standard uncertainty east, north, up ${sigma} mm. Compared without these steps, the offset would be wrong by ${mismatch} m. Rotations follow the ${ROTATION_CONVENTION}`,
    heads: [head('Step'), head('Parameters'), head('X, Y, Z after it, m'), head('Source')],
    rows: change.steps.map(stepRow),
  });
}

function threeAxes({east, north, up}: FrameChange['mismatchM'], perM: number, decimals: number) {
  return [east, north, up].map((value) => fixed(value * perM, decimals)).join(', ');
}

function stepRow(step: FrameChangeStep) {
  const between = step.from === step.to ? step.from : `${step.from} to ${step.to}`;
  const {x, y, z} = step.ecefM;
  return row(`${between}, ${step.what}, at ${step.epoch.toFixed(3)}`, [
    textCell(frameParametersText(step.parameters)),
    textCell([x, y, z].map((value) => fixed(value, 4)).join(' ')),
    textCell(step.source),
  ]);
}
