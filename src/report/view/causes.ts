import {accidentalSentence} from '../../wording/diagnosis.ts';
import {fixed} from '../../wording/numbers.ts';
import type {ReportContext} from '../context.ts';
import {lengthColumn, numberCell, textCell} from './columns.ts';
import {head, numberHead, row, stacking, type Table} from './table.ts';

/** The suspected causes in the order of how well they fit, with what to do about each. */
export function causesTable({result, options}: ReportContext): Table | null {
  const comparison = result.comparison;
  const diagnosis = comparison?.diagnosis ?? null;
  if (comparison === null || diagnosis === null) return null;
  const {candidates, offsetM} = comparison;
  const {pairs} = diagnosis;
  if (candidates.length + pairs.length === 0) return null;
  const column = lengthColumn(
    [
      ...[offsetM.east, offsetM.north, offsetM.up],
      ...[...candidates, ...pairs].flatMap(({predictedM: p}) => [p.east, p.north, p.up]),
    ],
    options.units,
  );
  const cells = (p: {east: number | null; north: number | null; up: number | null}) => [
    numberCell(column.cell(p.east)),
    numberCell(column.cell(p.north)),
    numberCell(column.cell(p.up)),
  ];
  const name = column.unit.name;
  return stacking({
    caption:
      'The offset measured, and what each everyday mistake that it is consistent with would leave; the best fit first',
    heads: [
      head('Cause'),
      numberHead(`East ${name}`),
      numberHead(`North ${name}`),
      numberHead(`Up ${name}`),
      numberHead('Misfit'),
      head('What to do'),
    ],
    rows: [
      row('Measured', [...cells(offsetM), textCell(''), textCell('')]),
      ...candidates.map((candidate) =>
        row(candidate.title, [
          ...cells(candidate.predictedM),
          numberCell(fixed(candidate.misfit, 1)),
          textCell(candidate.advice),
        ]),
      ),
      ...pairs.map((pair) =>
        row(pair.title, [
          ...cells(pair.predictedM),
          numberCell(fixed(pair.misfit, 1)),
          textCell('Measure what each of the two asks for.'),
        ]),
      ),
    ],
  });
}

/** How easily such an offset matches the list by accident; null when nothing was asked. */
export function accidentalNote({result}: ReportContext): string | null {
  const diagnosis = result.comparison?.diagnosis ?? null;
  if (diagnosis === null || diagnosis.accidentalOf === null) return null;
  return accidentalSentence({
    tested: diagnosis.tested.length,
    matches: diagnosis.accidentalMatches,
    withinM: diagnosis.accidentalWithinM,
    of: diagnosis.accidentalOf,
  });
}
