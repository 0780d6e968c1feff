import type {PerAxis} from '../../occupation/result.ts';
import {type LengthUnit, type UnitChoice, unitFor} from '../units.ts';
import {type Chart, COLOUR, ONCE, panelName, type Spec} from './chart.ts';
import {fitted} from './text-width.ts';
import {roundTicks, tickAxis} from './ticks.ts';

export interface CandidatesInput {
  readonly measuredM: PerAxis<number | null>;
  readonly uncertainty95M: PerAxis<number | null> | null;
  readonly candidates: readonly {
    readonly title: string;
    readonly predictedM: PerAxis<number | null>;
  }[];
  readonly units: UnitChoice;
  readonly narrow: boolean;
}

export interface CandidatesChart {
  readonly chart: Chart;
  readonly unit: LengthUnit;
}

const AXES = ['east', 'north', 'up'] as const;
const NAMES: PerAxis<string> = {east: 'East', north: 'North', up: 'Up'};
const WIDE = {plotPx: 146, gapPx: 18, left: 224, rowPx: 24};
const NARROW = {plotPx: 100, gapPx: 14, left: 6, rowPx: 40};

/** The measured offset and what each surviving cause would have made of it, on one scale. */
export function candidatesChart(input: CandidatesInput): CandidatesChart {
  const size = input.narrow ? NARROW : WIDE;
  const rows = [
    {title: 'Measured', offsetM: input.measuredM, measured: true},
    ...input.candidates.map(({title, predictedM}) => ({
      title,
      offsetM: predictedM,
      measured: false,
    })),
  ];
  const values = rows.flatMap(({offsetM}) => AXES.map((axis) => offsetM[axis] ?? 0));
  const low = Math.min(0, ...values);
  const high = Math.max(0, ...values);
  const margin = Math.max((high - low) * 0.12, 0.0005);
  const domainM: [number, number] = [low - margin, high + margin];
  const unit = unitFor(Math.max(Math.abs(low), Math.abs(high)), input.units);
  const panels = AXES.map((axis, i) => panel(axis, i === 0, rows, domainM, unit, input, size));
  return {
    chart: {
      spec: {hconcat: panels, spacing: size.gapPx, bounds: 'flush'},
      widthPx: 3 * size.plotPx + 2 * size.gapPx,
      heightPx: rows.length * size.rowPx,
      padding: {left: size.left, right: 10, top: 24, bottom: 22},
    },
    unit,
  };
}

interface Row {
  readonly title: string;
  readonly offsetM: PerAxis<number | null>;
  readonly measured: boolean;
}

function panel(
  axis: keyof PerAxis,
  first: boolean,
  rows: readonly Row[],
  [lowM, highM]: readonly [number, number],
  unit: LengthUnit,
  input: CandidatesInput,
  size: typeof WIDE,
): Spec {
  const low = lowM * unit.perM;
  const high = highM * unit.perM;
  const x = {
    type: 'quantitative',
    title: null,
    scale: {domain: [low, high], nice: false, zero: false},
    axis: tickAxis(roundTicks(low, high, 4)),
  };
  // In the narrow form the name stands above its bar.
  const barTop = input.narrow ? 21 : 6;
  const bars = rows.flatMap(({offsetM, measured}, i) => {
    const value = offsetM[axis];
    const top = i * size.rowPx + barTop;
    return value === null
      ? []
      : [
          {
            v: value * unit.perM,
            top,
            bottom: top + 12,
            fill: measured ? COLOUR.data : COLOUR.estimate,
          },
        ];
  });
  const heightPx = rows.length * size.rowPx;
  const measured = input.measuredM[axis];
  const u = input.uncertainty95M?.[axis] ?? null;
  const layer: Spec[] = [
    ...(measured === null || u === null
      ? []
      : [
          {
            data: {values: [{from: (measured - u) * unit.perM, to: (measured + u) * unit.perM}]},
            mark: {type: 'rect', fill: COLOUR.dataPale, clip: true},
            encoding: {x: {...x, field: 'from'}, x2: {field: 'to'}},
          },
        ]),
    {
      data: {values: bars},
      mark: {type: 'rect'},
      encoding: {
        x: {...x, field: 'v'},
        x2: {datum: 0},
        y: {field: 'top', type: 'quantitative', scale: null, axis: null},
        y2: {field: 'bottom'},
        fill: {field: 'fill', type: 'nominal', scale: null},
      },
    },
    {
      data: ONCE,
      mark: {type: 'rule', stroke: COLOUR.ink},
      encoding: {x: {...x, datum: 0}},
    },
    panelName(`${NAMES[axis]}, ${unit.name}`),
    ...(first ? titles(rows, input.narrow, size) : []),
  ];
  return {width: size.plotPx, height: heightPx, layer};
}

function titles(rows: readonly Row[], narrow: boolean, size: typeof WIDE): Spec[] {
  const room = narrow ? 3 * size.plotPx + 2 * size.gapPx : size.left - 14;
  return rows.map(({title, measured}, i) => ({
    data: ONCE,
    mark: {
      type: 'text',
      x: narrow ? 0 : -size.left + 2,
      y: i * size.rowPx + 12,
      align: 'left',
      baseline: 'middle',
      stroke: COLOUR.paper,
      strokeWidth: 3,
      ...(measured ? {fontWeight: 'bold'} : {}),
    },
    encoding: {text: {value: fitted(title, room, 11)}},
  }));
}
