import {candidatesFinding} from '../../wording/findings.ts';
import {candidatesChart} from '../charts/candidates.ts';
import {type ReportContext, singlePosition} from '../context.ts';
import type {Figure} from './figure.ts';

const MOST_SHOWN = 6;

/** null when no everyday mistake fits, or nothing was compared. */
export function causesFigure(context: ReportContext): Figure | null {
  const {result, options} = context;
  const comparison = result.comparison;
  if (comparison === null || comparison.candidates.length === 0) return null;
  const input = {
    measuredM: comparison.offsetM,
    uncertainty95M: singlePosition(context)?.uncertainty95M ?? null,
    candidates: comparison.candidates.slice(0, MOST_SHOWN),
    units: options.units,
  };
  const {chart} = candidatesChart({...input, narrow: false});
  return {
    kind: 'figure',
    id: 'causes',
    title: 'The measured offset beside what each suspected cause predicts',
    finding: candidatesFinding(comparison.candidates.length),
    note: 'One scale for all three directions. The pale band is the 95 % interval of the measured offset.',
    wide: chart,
    narrow: candidatesChart({...input, narrow: true}).chart,
    legend: [
      {shape: 'block-data', text: 'measured'},
      {shape: 'block-estimate', text: 'predicted by the cause'},
      {shape: 'block-pale', text: '95 % of the measured'},
    ],
    readout: [],
  };
}
