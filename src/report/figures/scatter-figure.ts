import type {Histogram} from '../../occupation/series/histogram.ts';
import {scatterFinding} from '../../wording/findings.ts';
import {counted, formatGivenLength, formatLength} from '../../wording/numbers.ts';
import {histogramPanels} from '../charts/histograms.ts';
import {type ReportContext, referenceName} from '../context.ts';
import {absent, type FigureOrReason} from './figure.ts';

const TITLE = 'Histograms of east, north and up';
const LEAST_EPOCHS = 10;

export function scatterFigure(context: ReportContext): FigureOrReason {
  const {result, series, options} = context;
  const {east, north, up} = series.histograms;
  if (east === null || north === null || result.epochs.used < LEAST_EPOCHS) {
    return absent(
      TITLE,
      `${counted(result.epochs.used, 'epoch')} used; a histogram needs at least ${LEAST_EPOCHS}`,
    );
  }
  const shared = {
    histograms: series.histograms,
    reference: referenceName(context),
    units: options.units,
  };
  const all = [east, north, ...(up === null ? [] : [up])];
  const outside = Math.max(...all.map((histogram) => histogram.outside));
  const observed = result.scatter?.aboutMean.observed.r95M ?? null;
  const normal = result.scatter?.aboutMean.normalTheory.r95M ?? null;
  return {
    kind: 'figure',
    id: 'histograms',
    title: TITLE,
    finding: scatterFinding(observed, normal),
    note: [
      `Percent of the epochs per bin; bins of ${binText(all)}.`,
      'Curve: the normal distribution of the same mean and standard deviation.',
      outside > 0 ? `At most ${counted(outside, 'epoch')} per panel outside the frame.` : '',
    ]
      .filter((part) => part !== '')
      .join(' '),
    wide: histogramPanels({...shared, narrow: false}),
    narrow: histogramPanels({...shared, narrow: true}),
    legend: [],
    readout: [],
  };
}

function binText(histograms: readonly Histogram[]): string {
  const texts = histograms.map(({binM}) => {
    const rounded = Number(binM.toPrecision(3));
    return rounded < 1 ? formatGivenLength(rounded) : formatLength(rounded);
  });
  return [...new Set(texts)].length === 1
    ? (texts[0] ?? '')
    : `${texts.join(', ')} (east, north, up)`;
}
