import type {PerAxis} from '../../occupation/result.ts';
import type {FiveNumbers} from '../../occupation/series/five-numbers.ts';
import type {TimeBins} from '../../occupation/series/time-bins.ts';
import type {PartMean} from '../../occupation/series.ts';
import {proseNumber} from '../../wording/numbers.ts';
import {type LengthUnit, offsetDecimals, type UnitChoice, unitFor} from '../units.ts';
import {type Chart, COLOUR, ONCE, panelName, type Spec} from './chart.ts';
import {textWidthPx} from './text-width.ts';
import {clockTicks, type LabelledTicks, labelledAxis, roundTicks, tickAxis} from './ticks.ts';

export interface OverTimeInput {
  readonly bins: TimeBins;
  readonly spanS: number;
  readonly startUtc: string;
  readonly referenceName: 'mark' | 'reference' | 'mean';
  readonly meanM: PerAxis<number | null>;
  /** The parts between jumps that matter, each with its mean. */
  readonly parts: readonly PartMean[];
  /** Only where the drift matters: a line through the mean at the middle of the record. */
  readonly driftMPerS: PerAxis<number | null>;
  readonly steps: readonly {readonly elapsedS: number; readonly label: string}[];
  readonly gaps: readonly {readonly fromS: number; readonly toS: number}[];
  readonly units: UnitChoice;
  readonly narrow: boolean;
}

export interface OverTime {
  readonly chart: Chart;
  readonly unit: LengthUnit;
  /** false when each bin holds one epoch and there are no bands. */
  readonly hasBands: boolean;
  readonly showsDrift: boolean;
}

const SIZES = {
  wide: {plotPx: 640, panelsPx: 310, leastPanelPx: 54, gapPx: 32, ticks: 9, left: 52},
  narrow: {plotPx: 284, panelsPx: 330, leastPanelPx: 60, gapPx: 34, ticks: 4, left: 50},
};
const STRIP_PX = 14;

type Axis = keyof PerAxis;
const NAMES: Readonly<Record<Axis, string>> = {east: 'East', north: 'North', up: 'Up'};

interface Panel {
  readonly axis: Axis;
  readonly name: string;
  /** Subtracted from all values: the mean when the reference is far outside the data. */
  readonly originM: number;
  readonly showsZero: boolean;
  readonly low: number;
  readonly high: number;
  readonly heightPx: number;
}

/** East, north and up against time, one millimetre equally tall in all three. */
export function overTime(input: OverTimeInput): OverTime {
  const size = input.narrow ? SIZES.narrow : SIZES.wide;
  const axes = (['east', 'north', 'up'] as const).filter((axis) => input.bins.range[axis] !== null);
  const spans = axes.map((axis) => frameOf(axis, input));
  const unit = unitFor(Math.max(...spans.map(({low, high}) => high - low)), input.units);
  const panels = panelsOf(spans, size.panelsPx, size.leastPanelPx, unit, input);
  const ticks = clockTicks(input.startUtc, input.spanS, size.ticks);
  const domain = timeDomain(input);
  const hasBands = input.bins.bins.some(({eastM}) => eastM.least !== eastM.most);
  const time = {domain, ticks, plotPx: size.plotPx};
  const shown = panels.map((panel) => panelSpec(panel, input, unit, time, hasBands));
  shown.push(stripSpec(input, time));
  const gaps = size.gapPx * (shown.length - 1);
  return {
    chart: {
      spec: {vconcat: shown, spacing: size.gapPx, bounds: 'flush'},
      widthPx: size.plotPx,
      heightPx: panels.reduce((sum, {heightPx}) => sum + heightPx, 0) + STRIP_PX + gaps,
      padding: {left: size.left, right: 12, top: input.steps.length > 0 ? 36 : 24, bottom: 22},
    },
    unit,
    hasBands,
    showsDrift: axes.some((axis) => input.driftMPerS[axis] !== null),
  };
}

function timeDomain({bins, spanS}: OverTimeInput): [number, number] {
  // One bin only: half a bin of room on each side instead of an axis without length.
  return spanS > 0 ? [0, spanS] : [-bins.binS / 2, bins.binS * 1.5];
}

interface AxisFrame {
  readonly axis: Axis;
  readonly originM: number;
  readonly showsZero: boolean;
  readonly low: number;
  readonly high: number;
}

/** The record's range, grown to hold the reference when that does not flatten the record. */
function frameOf(axis: Axis, {bins, meanM, referenceName}: OverTimeInput): AxisFrame {
  const range = bins.range[axis] ?? {leastM: 0, mostM: 0};
  const width = Math.max(range.mostM - range.leastM, 0.002);
  const distance = Math.max(range.leastM, -range.mostM, 0);
  if (distance <= 1.2 * width) {
    const low = Math.min(range.leastM, 0);
    const high = Math.max(range.mostM, 0);
    // About the mean, zero is the dashed line of the mean itself.
    return {axis, originM: 0, showsZero: referenceName !== 'mean', low, high};
  }
  const originM = distance > 20 * width ? (meanM[axis] ?? range.leastM) : 0;
  const low = range.leastM - originM;
  return {axis, originM, showsZero: false, low, high: range.mostM - originM};
}

function panelsOf(
  frames: readonly AxisFrame[],
  budgetPx: number,
  leastPx: number,
  unit: LengthUnit,
  input: OverTimeInput,
): Panel[] {
  const widths = frames.map(({low, high}) => Math.max(high - low, 0.002) * 1.08);
  const heightsAt = (pxPerM: number) => widths.map((width) => Math.max(leastPx, width * pxPerM));
  const total = (pxPerM: number) => heightsAt(pxPerM).reduce((a, b) => a + b, 0);
  // The scale at which the panels fill their share of the page; the least height may exceed it.
  let low = 0;
  let high = budgetPx / Math.max(...widths);
  for (let k = 0; k < 40; k++) {
    const middle = (low + high) / 2;
    if (total(middle) > budgetPx) high = middle;
    else low = middle;
  }
  const pxPerM = Math.max(low, 1e-12);
  return frames.map((frame, i) => {
    const heightPx = Math.round(heightsAt(pxPerM)[i]!);
    const middle = (frame.low + frame.high) / 2;
    const half = heightPx / pxPerM / 2;
    return {
      ...frame,
      name: panelTitle(frame, unit, input.referenceName),
      low: middle - half,
      high: middle + half,
      heightPx,
    };
  });
}

function panelTitle({axis, originM}: AxisFrame, unit: LengthUnit, reference: string): string {
  const from = axis === 'up' ? 'from' : 'of';
  if (originM === 0) return `${NAMES[axis]} ${from} ${reference}, ${unit.name}`;
  const away = proseNumber(originM * unit.perM, offsetDecimals(originM, unit), true);
  return `${NAMES[axis]} ${from} its mean, ${unit.name} (${away} from ${reference})`;
}

interface TimeAxis {
  readonly domain: readonly [number, number];
  readonly ticks: LabelledTicks;
  readonly plotPx: number;
}

function xEncoding(time: TimeAxis, field: string, labelled: boolean): Spec {
  const axis = labelledAxis(time.ticks);
  return {
    field,
    type: 'quantitative',
    scale: {domain: time.domain, nice: false, zero: false},
    title: null,
    axis: labelled
      ? {...axis, grid: false}
      : {values: axis.values, labels: false, ticks: false, domain: false, grid: true},
  };
}

function panelSpec(
  panel: Panel,
  input: OverTimeInput,
  unit: LengthUnit,
  time: TimeAxis,
  hasBands: boolean,
): Spec {
  const scaled = (valueM: number) => Number(((valueM - panel.originM) * unit.perM).toFixed(4));
  const low = panel.low * unit.perM;
  const high = panel.high * unit.perM;
  const y = {
    type: 'quantitative',
    title: null,
    scale: {domain: [low, high], nice: false, zero: false},
    axis: tickAxis(roundTicks(low, high, Math.max(2, panel.heightPx / 26))),
  };
  const x = xEncoding(time, 't', false);
  const rows = lineRows(input, panel.axis, scaled);
  const band = (from: string, to: string, fill: string): Spec => ({
    mark: {type: 'area', fill, clip: true},
    encoding: {x, y: {...y, field: from}, y2: {field: to}, detail: {field: 'run'}},
  });
  const meanM = input.meanM[panel.axis];
  const layer: Spec[] = [
    ...gapLayers(input, x),
    {
      data: {values: rows},
      layer: [
        ...(hasBands
          ? [band('least', 'most', COLOUR.dataPale), band('p5', 'p95', COLOUR.dataMid)]
          : []),
        ...(panel.showsZero ? [referenceLine(y)] : []),
        {
          mark: {type: 'line', stroke: COLOUR.data, strokeWidth: hasBands ? 1.4 : 1, clip: true},
          encoding: {x, y: {...y, field: 'median'}, detail: {field: 'run'}},
        },
        ...(rows.length === 1 ? [loneEpoch(x, y)] : []),
      ],
    },
    ...estimateLines(scaled, meanM, panel.axis, input, x, y),
    ...stepLayers(input, x, time, panel.axis === 'east'),
    panelName(panel.name),
  ];
  return {width: time.plotPx, height: panel.heightPx, layer};
}

function loneEpoch(x: Spec, y: Spec): Spec {
  return {
    mark: {type: 'point', filled: true, opacity: 1, size: 30, color: COLOUR.data},
    encoding: {x, y: {...y, field: 'median'}},
  };
}

function referenceLine(y: Spec): Spec {
  return {
    data: ONCE,
    mark: {type: 'rule', stroke: COLOUR.ink, strokeWidth: 1},
    encoding: {y: {...y, datum: 0}},
  };
}

/** Medians at the middle of their bins; a run begins and ends at the edges of its bins. */
function lineRows({bins}: OverTimeInput, axis: Axis, scaled: (valueM: number) => number) {
  const single = bins.bins.every(({used}) => used === 1);
  const rows: Spec[] = [];
  const all = bins.bins;
  all.forEach((bin, i) => {
    const numbers = axis === 'east' ? bin.eastM : axis === 'north' ? bin.northM : bin.upM;
    if (numbers === null) return;
    const row = (t: number) => rows.push({t, run: bin.run, ...scaledNumbers(numbers, scaled)});
    const begins = !single && all[i - 1]?.run !== bin.run;
    const ends = !single && all[i + 1]?.run !== bin.run;
    if (begins) row(bin.startS);
    if (single || !(begins && ends)) row(bin.startS + (single ? 0 : bins.binS / 2));
    if (ends) row(bin.startS + bins.binS);
  });
  return rows;
}

function scaledNumbers({least, p5, median, p95, most}: FiveNumbers, scaled: (v: number) => number) {
  return {
    least: scaled(least),
    p5: scaled(p5),
    median: scaled(median),
    p95: scaled(p95),
    most: scaled(most),
  };
}

/**
 * The mean, where drift matters the fitted line, and across jumps that matter the mean of each
 * part: dashed, in the colour of estimates.
 */
function estimateLines(
  scaled: (valueM: number) => number,
  meanM: number | null,
  axis: Axis,
  {driftMPerS, spanS, steps, parts}: OverTimeInput,
  x: Spec,
  y: Spec,
): Spec[] {
  const rate = driftMPerS[axis];
  const lines =
    rate === null && steps.length > 0
      ? parts.map((part) => ({from: part.fromS, to: part.toS, meanM: part.meanM[axis], rate: 0}))
      : [{from: 0, to: spanS, meanM, rate: rate ?? 0}];
  const values = lines.flatMap((line, k) => {
    if (line.meanM === null) return [];
    const half = (line.rate * (line.to - line.from)) / 2;
    return [
      {t: line.from, v: scaled(line.meanM - half), part: k},
      {t: line.to, v: scaled(line.meanM + half), part: k},
    ];
  });
  if (values.length === 0) return [];
  return [
    {
      data: {values},
      mark: {
        type: 'line',
        stroke: COLOUR.estimate,
        strokeWidth: 1.2,
        strokeDash: [6, 4],
        clip: true,
      },
      encoding: {x, y: {...y, field: 'v'}, detail: {field: 'part'}},
    },
  ];
}

function gapLayers({gaps}: OverTimeInput, x: Spec): Spec[] {
  if (gaps.length === 0) return [];
  return [
    {
      data: {values: gaps.map(({fromS, toS}) => ({from: fromS, to: toS}))},
      mark: {type: 'rect', fill: COLOUR.grid, clip: true},
      encoding: {x: {...x, field: 'from'}, x2: {field: 'to'}},
    },
  ];
}

function stepLayers({steps}: OverTimeInput, x: Spec, time: TimeAxis, named: boolean): Spec[] {
  if (steps.length === 0) return [];
  const lines: Spec = {
    data: {values: steps.map(({elapsedS}) => ({t: elapsedS}))},
    mark: {type: 'rule', stroke: COLOUR.flagged, strokeWidth: 1.4, strokeDash: [4, 3]},
    encoding: {x: {...x, field: 't'}},
  };
  if (!named) return [lines];
  return [lines, ...stepNames(steps, time)];
}

/** Labels above the first panel, those left out that would run into one another. */
function stepNames(steps: OverTimeInput['steps'], time: TimeAxis): Spec[] {
  let freeFrom = 0;
  return steps.flatMap(({elapsedS, label}) => {
    const [from, to] = time.domain;
    const x = ((elapsedS - from) / (to - from)) * time.plotPx;
    const width = textWidthPx(label, 12);
    const left = Math.min(Math.max(0, x - width / 2), time.plotPx - width);
    if (left < freeFrom) return [];
    freeFrom = left + width + 10;
    return [
      {
        data: ONCE,
        mark: {
          type: 'text',
          x: Math.round(left + width / 2),
          y: -25,
          color: COLOUR.flagged,
          fontWeight: 'bold',
        },
        encoding: {text: {value: label}},
      },
    ];
  });
}

function stripName(leftOut: boolean, gaps: boolean): string {
  if (leftOut) return gaps ? 'Epochs left out, and gaps' : 'Epochs left out; no gap';
  return gaps ? 'Gaps; no epoch left out' : 'No epoch left out, no gap';
}

/** Which epochs were left out, and where there were none. */
function stripSpec(input: OverTimeInput, time: TimeAxis): Spec {
  const {bins, gaps} = input;
  const x = xEncoding(time, 'from', true);
  const leastS = ((time.domain[1] - time.domain[0]) / time.plotPx) * 1.2;
  const leftOut = bins.leftOut.map(({startS, share}) => ({
    from: startS,
    to: startS + Math.max(bins.binS, leastS),
    top: Math.round(STRIP_PX * (1 - Math.max(0.16, share)) * 10) / 10,
  }));
  return {
    width: time.plotPx,
    height: STRIP_PX,
    layer: [
      {
        data: {values: [{from: time.domain[0]}]},
        mark: {type: 'tick', opacity: 0},
        encoding: {x},
      },
      {
        data: {values: gaps.map(({fromS, toS}) => ({from: fromS, to: toS}))},
        mark: {type: 'rect', fill: COLOUR.axis, clip: true},
        encoding: {x, x2: {field: 'to'}},
      },
      {
        data: {values: leftOut},
        mark: {type: 'rect', fill: COLOUR.flagged, clip: true},
        encoding: {
          x,
          x2: {field: 'to'},
          y: {field: 'top', type: 'quantitative', scale: null, axis: null},
          y2: {value: STRIP_PX},
        },
      },
      panelName(stripName(leftOut.length > 0, gaps.length > 0)),
    ],
  };
}
