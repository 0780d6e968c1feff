import type {PerAxis} from '../../occupation/result.ts';
import type {Settling} from '../../occupation/series/settling.ts';
import {type UnitChoice, unitFor} from '../units.ts';
import {type Chart, COLOUR, ONCE, panelName, type Spec} from './chart.ts';
import {elapsedTicks, labelledAxis, roundTicks, tickAxis} from './ticks.ts';

export interface SettlingInput {
  readonly settling: Settling;
  /** Whether zero is a place of its own. */
  readonly showsZero: boolean;
  readonly units: UnitChoice;
  readonly narrow: boolean;
}

const WIDE = {plotPx: 186, heightPx: 124, gapPx: 44};
const NARROW = {plotPx: 296, heightPx: 110, gapPx: 54};
const NAMES: PerAxis<string> = {east: 'East', north: 'North', up: 'Up'};
/** The frame follows what the mean did after this share of the record; before that it may leave. */
const FRAMED_AFTER = 0.01;

/** How the mean of all epochs so far came to its final value, over the logarithm of time. */
export function settlingPanels(input: SettlingInput): Chart {
  const size = input.narrow ? NARROW : WIDE;
  const axes = (['east', 'north', 'up'] as const).filter(
    (axis) => input.settling.meanM[axis] !== null,
  );
  const frames = axes.map((axis) => frameOf(axis, input.settling));
  const panels = axes.map((axis, i) => panel(axis, frames[i]!, input, size));
  const along = (plot: number) => panels.length * plot + (panels.length - 1) * size.gapPx;
  const concat = input.narrow ? {vconcat: panels} : {hconcat: panels};
  return {
    spec: {...concat, spacing: size.gapPx, bounds: 'flush'},
    widthPx: input.narrow ? size.plotPx : along(size.plotPx),
    heightPx: input.narrow ? along(size.heightPx) : size.heightPx,
    padding: {left: 38, right: 16, top: 24, bottom: 24},
  };
}

interface Frame {
  readonly low: number;
  readonly high: number;
}

function frameOf(axis: keyof PerAxis, {elapsedS, meanM, halfWidthM}: Settling): Frame {
  const means = meanM[axis] ?? [];
  const widths = halfWidthM[axis];
  const spanS = elapsedS[elapsedS.length - 1] ?? 0;
  let low = means[means.length - 1] ?? 0;
  let high = low;
  elapsedS.forEach((elapsed, i) => {
    if (elapsed < FRAMED_AFTER * spanS) return;
    const mean = means[i] ?? low;
    // Most of the band of a short record says only that it was short.
    const width = elapsed > 0.1 * spanS ? (widths?.[i] ?? 0) : 0;
    low = Math.min(low, mean - width);
    high = Math.max(high, mean + width);
  });
  const margin = Math.max((high - low) * 0.06, 0.0005);
  return {low: low - margin, high: high + margin};
}

function panel(
  axis: keyof PerAxis,
  frame: Frame,
  {settling, showsZero, units}: SettlingInput,
  size: {plotPx: number; heightPx: number},
): Spec {
  const {elapsedS} = settling;
  const means = settling.meanM[axis] ?? [];
  const widths = settling.halfWidthM[axis];
  const unit = unitFor(Math.max(Math.abs(frame.low), Math.abs(frame.high)), units);
  const low = frame.low * unit.perM;
  const high = frame.high * unit.perM;
  const first = elapsedS[0] ?? 1;
  const last = elapsedS[elapsedS.length - 1] ?? 1;
  const x = {
    field: 't',
    type: 'quantitative',
    title: null,
    scale: {type: 'log', domain: [first, last], nice: false},
    axis: {...labelledAxis(elapsedTicks(first, last, size.plotPx)), grid: false},
  };
  const y = {
    type: 'quantitative',
    title: null,
    scale: {domain: [low, high], nice: false, zero: false},
    axis: tickAxis(roundTicks(low, high, 5)),
  };
  const rows = elapsedS.map((t, i) => {
    const mean = means[i] ?? 0;
    const width = widths?.[i] ?? 0;
    return {
      t,
      mean: mean * unit.perM,
      low: (mean - width) * unit.perM,
      high: (mean + width) * unit.perM,
    };
  });
  const final = means[means.length - 1] ?? 0;
  const layer: Spec[] = [
    ...(widths === null
      ? []
      : [
          {
            mark: {type: 'area', fill: COLOUR.dataPale, clip: true},
            encoding: {x, y: {...y, field: 'low'}, y2: {field: 'high'}},
          },
        ]),
    {
      mark: {type: 'line', stroke: COLOUR.data, strokeWidth: 1.4, clip: true},
      encoding: {x, y: {...y, field: 'mean'}},
    },
    ...(showsZero && frame.low < 0 && frame.high > 0 ? [level(y, 0, COLOUR.ink, null)] : []),
    level(y, final * unit.perM, COLOUR.estimate, [6, 4]),
    panelName(`${NAMES[axis]}, ${unit.name}`),
  ];
  return {width: size.plotPx, height: size.heightPx, data: {values: rows}, layer};
}

function level(y: Spec, at: number, stroke: string, dash: readonly number[] | null): Spec {
  return {
    data: ONCE,
    mark: {type: 'rule', stroke, strokeWidth: 1.2, ...(dash === null ? {} : {strokeDash: dash})},
    encoding: {y: {...y, datum: at}},
  };
}
