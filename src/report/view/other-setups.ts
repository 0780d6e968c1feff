import {fixed, formatUtc} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn, numberCell, textCell} from './columns.ts';
import {head, numberHead, row, stacking, type Table} from './table.ts';

/** This setup minus each of the others that were named; null when none was. */
export function otherSetupsTable({result, options}: ReportContext): Table | null {
  const setups = result.comparison?.otherSetups ?? [];
  if (setups.length === 0) return null;
  const column = lengthColumn(
    setups.flatMap(({differenceM, uncertainty95M}) => [
      ...[differenceM.east, differenceM.north, differenceM.up, differenceM.horizontal],
      uncertainty95M?.horizontalRadius,
    ]),
    options.units,
  );
  const unit = column.unit.name;
  return stacking({
    caption: 'This setup minus other setups on the same mark',
    heads: [
      head('Other setup, UTC'),
      numberHead(`East ${unit}`),
      numberHead(`North ${unit}`),
      numberHead(`Up ${unit}`),
      numberHead(`Plan ${unit}`),
      numberHead(`95 % plan ${unit}`),
      numberHead('Hours earlier'),
      head('Outcome'),
    ],
    rows: setups.map((setup) =>
      row(setup.startUtc === null ? setup.name : `${setup.name}, ${formatUtc(setup.startUtc)}`, [
        numberCell(column.cell(setup.differenceM.east)),
        numberCell(column.cell(setup.differenceM.north)),
        numberCell(column.cell(setup.differenceM.up)),
        numberCell(column.cell(setup.differenceM.horizontal)),
        numberCell(column.uncertainty(setup.uncertainty95M?.horizontalRadius)),
        numberCell(fixed(setup.hoursEarlier, 1)),
        textCell(setup.agreement),
      ]),
    ),
  });
}
