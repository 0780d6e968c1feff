import type {SignalBin, SignalBins} from '../../occupation/series/signal-bins.ts';
import {type Chart, COLOUR, ONCE, panelName, type Spec} from './chart.ts';
import {clockTicks, labelledAxis, roundTicks, tickAxis} from './ticks.ts';

export interface SignalInput {
  readonly bins: SignalBins;
  readonly spanS: number;
  readonly startUtc: string;
  readonly maxHdop: number | null;
  readonly maxCorrectionAgeS: number | null;
  readonly narrow: boolean;
}

interface Triple {
  readonly low: number;
  readonly middle: number;
  readonly high: number;
}

interface SignalPanel {
  readonly name: string;
  readonly heightPx: number;
  readonly fromZero: boolean;
  readonly limit: number | null;
  readonly of: (bin: SignalBin) => Triple | null;
}

const SIZES = {
  wide: {plotPx: 640, gapPx: 30, ticks: 9, left: 40},
  narrow: {plotPx: 296, gapPx: 30, ticks: 4, left: 36},
};

/** What the record says of its signals, one panel for each thing it says. */
export function signalPanels(input: SignalInput): Chart {
  const size = input.narrow ? SIZES.narrow : SIZES.wide;
  const panels = panelsOf(input);
  const ticks = clockTicks(input.startUtc, input.spanS, size.ticks);
  const shown = panels.map((panel, i) => {
    const last = i === panels.length - 1;
    const axis = labelledAxis(ticks);
    return panelSpec(panel, input, size.plotPx, {
      field: 't',
      type: 'quantitative',
      title: null,
      scale: {domain: [0, Math.max(input.spanS, input.bins.binS)], nice: false, zero: false},
      axis: last
        ? axis
        : {values: axis.values, labels: false, ticks: false, domain: false, grid: true},
    });
  });
  return {
    spec: {vconcat: shown, spacing: size.gapPx, bounds: 'flush'},
    widthPx: size.plotPx,
    heightPx:
      panels.reduce((sum, {heightPx}) => sum + heightPx, 0) + size.gapPx * (panels.length - 1),
    padding: {left: size.left, right: 14, top: 24, bottom: 22},
  };
}

function panelsOf({bins, maxHdop, maxCorrectionAgeS}: SignalInput): SignalPanel[] {
  const panels: SignalPanel[] = [];
  const numbers = (five: SignalBin['hdop']): Triple | null =>
    five === null ? null : {low: five.least, middle: five.median, high: five.most};
  if (bins.has.carrierToNoise) {
    panels.push({
      name: 'Signal strength C/N0, dB-Hz',
      heightPx: 72,
      fromZero: false,
      limit: null,
      of: ({carrierToNoiseDbHz: c}) =>
        c === null ? null : {low: c.p5, middle: c.median, high: c.p95},
    });
  }
  if (bins.has.satellites) {
    panels.push({
      name: 'Satellites used',
      heightPx: 46,
      fromZero: true,
      limit: null,
      of: (bin) => numbers(bin.satellites),
    });
  }
  if (bins.has.hdop) {
    panels.push({
      name: 'HDOP',
      heightPx: 46,
      fromZero: true,
      limit: maxHdop,
      of: (bin) => numbers(bin.hdop),
    });
  }
  if (bins.has.correctionAge) {
    panels.push({
      name: 'Age of corrections, s',
      heightPx: 46,
      fromZero: true,
      limit: maxCorrectionAgeS,
      of: (bin) => numbers(bin.correctionAgeS),
    });
  }
  return panels;
}

function panelSpec(panel: SignalPanel, {bins}: SignalInput, plotPx: number, x: Spec): Spec {
  const rows: {t: number; run: number; low: number; middle: number; high: number}[] = [];
  bins.bins.forEach((bin, i) => {
    const numbers = panel.of(bin);
    if (numbers === null) return;
    const begins = bins.bins[i - 1]?.run !== bin.run;
    const ends = bins.bins[i + 1]?.run !== bin.run;
    if (begins) rows.push({t: bin.startS, run: bin.run, ...numbers});
    if (!(begins && ends)) rows.push({t: bin.startS + bins.binS / 2, run: bin.run, ...numbers});
    if (ends) rows.push({t: bin.startS + bins.binS, run: bin.run, ...numbers});
  });
  const least = Math.min(...rows.map(({low}) => low));
  const most = Math.max(...rows.map(({high}) => high));
  const limit = panel.limit !== null && panel.limit <= 3 * most ? panel.limit : null;
  const top = Math.max(most, limit ?? 0);
  const low = panel.fromZero ? 0 : Math.floor((least - 1) / 5) * 5;
  const high = panel.fromZero ? (top > 0 ? top * 1.15 : 1) : Math.ceil((top + 1) / 5) * 5;
  const y = {
    type: 'quantitative',
    title: null,
    scale: {domain: [low, high], nice: false, zero: false},
    axis: tickAxis(wholeTicks(low, high, panel)),
  };
  const layer: Spec[] = [
    {
      mark: {type: 'area', fill: COLOUR.dataPale, clip: true},
      encoding: {x, y: {...y, field: 'low'}, y2: {field: 'high'}, detail: {field: 'run'}},
    },
    {
      mark: {type: 'line', stroke: COLOUR.data, strokeWidth: 1.4, clip: true},
      encoding: {x, y: {...y, field: 'middle'}, detail: {field: 'run'}},
    },
    ...(limit === null
      ? []
      : [
          {
            data: ONCE,
            mark: {type: 'rule', stroke: COLOUR.ink, strokeDash: [2, 3]},
            encoding: {y: {...y, datum: limit}},
          },
        ]),
    panelName(panel.name),
  ];
  return {width: plotPx, height: panel.heightPx, data: {values: rows}, layer};
}

function wholeTicks(low: number, high: number, panel: SignalPanel) {
  const ticks = roundTicks(low, high, panel.heightPx > 60 ? 4 : 3);
  if (ticks.decimals === 0 || high < 3) return ticks;
  return {values: ticks.values.filter((value) => Number.isInteger(value)), decimals: 0};
}
