import {formatCount, formatDuration} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn, numberCell} from './columns.ts';
import {fixedTable, head, numberHead, row, type Table} from './table.ts';

/** How much longer averaging still helps; null where the record has no even stretch. */
export function allanDeviationTable({series, options}: ReportContext): Table | null {
  const {allan} = series;
  if (allan === null) return null;
  const {averagedS, deviationM, epochs} = allan;
  const shown = (['east', 'north', 'up'] as const).flatMap((axis) => {
    const values = deviationM[axis];
    return values === null ? [] : [{axis, values}];
  });
  const column = lengthColumn(
    shown.flatMap(({values}) => values),
    options.units,
  );
  return fixedTable({
    caption: `Allan deviation, overlapping, of ${formatCount(epochs)} epochs without a hole: how much a mean over this time differs from the next one. It halves from row to row while the errors are independent`,
    heads: [
      head('Averaged over'),
      ...shown.map(({axis}) => numberHead(`${AXIS_NAMES[axis]} ${column.unit.name}`)),
    ],
    rows: averagedS.map((seconds, k) =>
      row(
        formatDuration(seconds),
        shown.map(({values}) => numberCell(column.cell(values[k]))),
      ),
    ),
  });
}

const AXIS_NAMES = {east: 'East', north: 'North', up: 'Up'} as const;
