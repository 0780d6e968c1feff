import type {PerAxis} from '../../occupation/result.ts';
import type {Histogram} from '../../occupation/series/histogram.ts';
import {type LengthUnit, type UnitChoice, unitFor} from '../units.ts';
import {type Chart, COLOUR, ONCE, panelName, type Spec} from './chart.ts';
import {roundTicks, tickAxis} from './ticks.ts';

export interface HistogramsInput {
  readonly histograms: PerAxis<Histogram | null>;
  /** Whether zero is a mark that deserves a line. */
  readonly reference: 'mark' | 'reference' | 'mean';
  readonly units: UnitChoice;
  readonly narrow: boolean;
}

const WIDE = {plotPx: 190, heightPx: 116, gapPx: 40};
const NARROW = {plotPx: 296, heightPx: 96, gapPx: 58};
const NAMES: PerAxis<string> = {east: 'East', north: 'North', up: 'Up'};

/** The distribution of single epochs, per axis, with the normal curve of the same mean and spread. */
export function histogramPanels(input: HistogramsInput): Chart {
  const size = input.narrow ? NARROW : WIDE;
  const axes = (['east', 'north', 'up'] as const).flatMap((axis) => {
    const histogram = input.histograms[axis];
    return histogram === null ? [] : [{axis, histogram}];
  });
  const panels = axes.map(({axis, histogram}) => panel(NAMES[axis], histogram, input, size));
  const n = panels.length;
  const along = (plot: number) => n * plot + (n - 1) * size.gapPx;
  const concat = input.narrow ? {vconcat: panels} : {hconcat: panels};
  return {
    spec: {...concat, spacing: size.gapPx, bounds: 'flush'},
    widthPx: input.narrow ? size.plotPx : along(size.plotPx),
    heightPx: input.narrow ? along(size.heightPx) : size.heightPx,
    padding: {left: 34, right: 14, top: 36, bottom: 24},
  };
}

function panel(
  name: string,
  histogram: Histogram,
  {reference, units}: HistogramsInput,
  size: {plotPx: number; heightPx: number},
): Spec {
  const {fromM, binM, counts, total, meanM} = histogram;
  const toM = fromM + counts.length * binM;
  const unit = unitFor(Math.max(Math.abs(fromM), Math.abs(toM)), units);
  const percent = (count: number) => (100 * count) / total;
  const curve = normalCurve(histogram, unit);
  const highest = Math.max(...counts.map(percent), ...curve.map(({p}) => p));
  const zeroInside = fromM <= 0 && toM >= 0 && reference !== 'mean';
  const x = {
    type: 'quantitative',
    title: null,
    scale: {domain: [fromM * unit.perM, toM * unit.perM], nice: false, zero: false},
    axis: {...tickAxis(roundTicks(fromM * unit.perM, toM * unit.perM, 6)), grid: false},
  };
  const y = {
    type: 'quantitative',
    title: null,
    scale: {domain: [0, highest * 1.04], nice: false},
    axis: tickAxis(roundTicks(0, highest * 1.04, 4)),
  };
  const bars = counts.flatMap((count, k) =>
    count === 0
      ? []
      : [
          {
            from: (fromM + k * binM) * unit.perM,
            to: (fromM + (k + 1) * binM) * unit.perM,
            p: percent(count),
          },
        ],
  );
  const layer: Spec[] = [
    {
      data: {values: bars},
      mark: {type: 'rect', fill: COLOUR.dataMid},
      encoding: {
        x: {...x, field: 'from'},
        x2: {field: 'to'},
        y: {...y, field: 'p'},
        y2: {datum: 0},
      },
    },
    ...(curve.length === 0
      ? []
      : [
          {
            data: {values: curve},
            mark: {type: 'line', stroke: COLOUR.data, strokeWidth: 1.4},
            encoding: {x: {...x, field: 'v'}, y: {...y, field: 'p'}},
          },
        ]),
    ...(zeroInside ? [upright(x, 0, COLOUR.ink, null)] : []),
    upright(x, meanM * unit.perM, COLOUR.estimate, [6, 4]),
    ...names(histogram, zeroInside, reference, size.plotPx),
    {
      ...panelName(`${name}, ${unit.name}`),
      mark: {type: 'text', x: -30, y: -26, align: 'left', fontWeight: 'bold'},
    },
  ];
  return {width: size.plotPx, height: size.heightPx, layer};
}

function upright(x: Spec, at: number, stroke: string, dash: readonly number[] | null): Spec {
  return {
    data: ONCE,
    mark: {type: 'rule', stroke, strokeWidth: 1.4, ...(dash === null ? {} : {strokeDash: dash})},
    encoding: {x: {...x, datum: at}},
  };
}

/** Percent of the epochs per bin that a normal distribution would hold; none without scatter. */
function normalCurve(
  {fromM, binM, counts, meanM, standardDeviationM}: Histogram,
  unit: LengthUnit,
) {
  if (!(standardDeviationM > binM / 10)) return [];
  const points = 60;
  const widthM = counts.length * binM;
  return Array.from({length: points + 1}, (_, k) => {
    const valueM = fromM + (k / points) * widthM;
    const z = (valueM - meanM) / standardDeviationM;
    const density = Math.exp((-z * z) / 2) / (standardDeviationM * Math.sqrt(2 * Math.PI));
    return {v: valueM * unit.perM, p: 100 * density * binM};
  });
}

/** Names of the two lines on their outer sides, kept inside the panel. */
function names(
  {fromM, binM, counts, meanM}: Histogram,
  zeroInside: boolean,
  reference: string,
  plotPx: number,
): Spec[] {
  const toPx = (valueM: number) => ((valueM - fromM) / (counts.length * binM)) * plotPx;
  const meanX = toPx(meanM);
  const zeroX = toPx(0);
  const meanRight = !zeroInside || meanM >= 0;
  const name = (x: number, right: boolean, text: string, color: string): Spec => ({
    data: ONCE,
    mark: {
      type: 'text',
      x: Math.round(x + (right ? 3 : -3)),
      y: -7,
      align: right ? 'left' : 'right',
      fontWeight: 'bold',
      color,
    },
    encoding: {text: {value: text}},
  });
  return [
    name(meanX, meanRight, 'mean', COLOUR.estimate),
    ...(zeroInside ? [name(zeroX, !meanRight, reference, COLOUR.ink)] : []),
  ];
}
