import type {PerAxis} from '../../occupation/result.ts';
import {correlationFinding, settlingFinding} from '../../wording/findings.ts';
import {formatDuration} from '../../wording/numbers.ts';
import {autocorrelationChart} from '../charts/autocorrelation.ts';
import {settlingPanels} from '../charts/settling.ts';
import {type ReportContext, referenceName, singlePosition} from '../context.ts';
import {absent, type FigureOrReason, type LegendKey} from './figure.ts';

const SETTLING = 'The mean of all epochs so far';
const CORRELATION = 'Likeness of epochs over the time between them';

export function settlingFigure(context: ReportContext): FigureOrReason {
  const {result, series, options} = context;
  if (singlePosition(context) === null) {
    return absent(
      SETTLING,
      result.segments.length > 1
        ? 'the positions moved, so the record has no one mean to settle'
        : 'the record has no mean position',
    );
  }
  if (series.settling === null) {
    return absent(SETTLING, 'the record is too short to follow its mean');
  }
  const {secondHalfM, halfWidthM} = series.settling;
  const banded = halfWidthM.east !== null || halfWidthM.north !== null;
  const horizontal =
    secondHalfM.east === null || secondHalfM.north === null
      ? null
      : Math.hypot(secondHalfM.east, secondHalfM.north);
  const name = referenceName(context);
  const legend: LegendKey[] = [
    {shape: 'line-data', text: 'mean so far'},
    ...(banded
      ? ([{shape: 'block-pale', text: '95 % of the mean, this record alone'}] as const)
      : []),
    {shape: 'dash-estimate', text: 'final mean'},
    ...(name === 'mean' ? [] : ([{shape: 'line-ink', text: name}] as const)),
  ];
  const shared = {
    settling: series.settling,
    showsZero: name !== 'mean',
    units: options.units,
  };
  return {
    kind: 'figure',
    id: 'settling',
    title: SETTLING,
    finding: settlingFinding(horizontal, secondHalfM.up),
    note: banded
      ? 'Time is logarithmic. Neighbouring epochs are alike, so the band narrows far more slowly than for independent ones.'
      : 'Time is logarithmic. No band: the uncertainty of the mean could not be computed from this record.',
    wide: settlingPanels({...shared, narrow: false}),
    narrow: settlingPanels({...shared, narrow: true}),
    legend,
    readout: [],
  };
}

export function correlationFigure(context: ReportContext): FigureOrReason {
  const {result, series} = context;
  if (series.autocorrelation === null) {
    return absent(CORRELATION, 'the record is too short, too uneven or without any scatter');
  }
  const position = singlePosition(context);
  const looks = position?.independentLooks ?? null;
  const times = position?.correlationTimeS ?? null;
  const least = leastOf([looks?.east, looks?.north, looks?.up]);
  const longest = mostOf([times?.east, times?.north, times?.up]);
  return {
    kind: 'figure',
    id: 'correlation',
    title: CORRELATION,
    finding: correlationFinding({
      epochs: result.epochs.used,
      looks: least,
      correlationTimeS: longest,
    }),
    note: `1: the later epoch repeats the earlier one; 0: a fresh look. ${perDirection(looks, times)}Time is logarithmic.`,
    wide: autocorrelationChart(series.autocorrelation),
    narrow: null,
    legend: [],
    readout: [],
  };
}

/** Looks and correlation times of the three directions; nothing where they could not be told. */
function perDirection(
  looks: PerAxis<number | null> | null,
  times: PerAxis<number | null> | null,
): string {
  const parts = (['east', 'north', 'up'] as const).flatMap((axis) => {
    const count = looks?.[axis] ?? null;
    const timeS = times?.[axis] ?? null;
    if (count === null || timeS === null) return [];
    return [`${axis} ${count.toFixed(count < 9.95 ? 1 : 0)} (${formatDuration(timeS)})`];
  });
  return parts.length === 0 ? '' : `Independent looks (correlation time): ${parts.join(', ')}. `;
}

function leastOf(values: readonly (number | null | undefined)[]): number | null {
  const known = values.filter((value) => value !== null && value !== undefined);
  return known.length === 0 ? null : Math.min(...known);
}

function mostOf(values: readonly (number | null | undefined)[]): number | null {
  const known = values.filter((value) => value !== null && value !== undefined);
  return known.length === 0 ? null : Math.max(...known);
}
