import type {Autocorrelation} from '../../occupation/series/autocorrelation.ts';
import {type Chart, COLOUR, ONCE, type Spec} from './chart.ts';
import {elapsedTicks, labelledAxis} from './ticks.ts';

const PLOT_PX = 250;
const HEIGHT_PX = 200;
const LABEL_GAP_PX = 13;

const LINES = [
  {axis: 'east', name: 'east', stroke: COLOUR.data, dash: null},
  {axis: 'north', name: 'north', stroke: COLOUR.third, dash: [6, 3]},
  {axis: 'up', name: 'up', stroke: COLOUR.ink, dash: [2, 2]},
] as const;

/** Likeness of epochs over the logarithm of the time between them. */
export function autocorrelationChart({lagS, value}: Autocorrelation): Chart {
  const first = lagS[0] ?? 1;
  const last = lagS[lagS.length - 1] ?? 1;
  const shown = LINES.flatMap((line) => {
    const values = value[line.axis];
    return values === null ? [] : [{...line, values}];
  });
  const least = Math.min(-0.2, ...shown.flatMap(({values}) => values));
  const low = Math.max(-1, Math.floor(least * 5) / 5);
  const x = {
    type: 'quantitative',
    scale: {type: 'log', domain: [first, last], nice: false},
    title: 'time between two epochs',
    axis: {...labelledAxis(elapsedTicks(first, last, PLOT_PX)), grid: false},
  };
  const y = {
    type: 'quantitative',
    title: null,
    scale: {domain: [low, 1], nice: false, zero: false},
    axis: {values: [-1, -0.8, -0.6, -0.4, -0.2, 0, 0.2, 0.4, 0.6, 0.8, 1], format: '.1f'},
  };
  const toPx = (v: number) => ((1 - v) / (1 - low)) * HEIGHT_PX;
  const ends = spread(shown.map(({values}) => toPx(values[values.length - 1] ?? 0)));
  const layer: Spec[] = [
    level(y, 0, COLOUR.axis, null),
    level(y, Math.exp(-1), COLOUR.ink, [2, 3]),
    {
      data: ONCE,
      mark: {
        type: 'text',
        x: PLOT_PX - 2,
        y: toPx(Math.exp(-1)) - 8,
        align: 'right',
        color: COLOUR.muted,
      },
      encoding: {text: {value: '1/e'}},
    },
    ...shown.map(({values, stroke, dash}) => ({
      data: {values: values.map((v, i) => ({t: lagS[i], v}))},
      mark: {type: 'line', stroke, strokeWidth: 1.6, ...(dash === null ? {} : {strokeDash: dash})},
      encoding: {x: {...x, field: 't'}, y: {...y, field: 'v'}},
    })),
    ...shown.map(({name, stroke}, i) => ({
      data: ONCE,
      mark: {
        type: 'text',
        x: PLOT_PX + 5,
        y: ends[i],
        align: 'left',
        color: stroke,
        fontWeight: 'bold',
      },
      encoding: {text: {value: name}},
    })),
  ];
  return {
    spec: {width: PLOT_PX, height: HEIGHT_PX, layer},
    widthPx: PLOT_PX,
    heightPx: HEIGHT_PX,
    padding: {left: 38, right: 56, top: 10, bottom: 40},
  };
}

function level(y: Spec, at: number, stroke: string, dash: readonly number[] | null): Spec {
  return {
    data: ONCE,
    mark: {type: 'rule', stroke, strokeWidth: 1, ...(dash === null ? {} : {strokeDash: dash})},
    encoding: {y: {...y, datum: at}},
  };
}

/** Places as near as possible to the wished ones that keep labels apart, in the given order. */
export function spread(wishedPx: readonly number[]): number[] {
  const order = wishedPx.map((place, i) => ({place, i})).sort((a, b) => a.place - b.place);
  const places = [...wishedPx];
  let free = Number.NEGATIVE_INFINITY;
  for (const {place, i} of order) {
    places[i] = Math.max(place, free);
    free = places[i]! + LABEL_GAP_PX;
  }
  // What was pushed below the plot comes back up as a block.
  let limit = HEIGHT_PX;
  for (const {i} of order.reverse()) {
    places[i] = Math.min(places[i]!, limit);
    limit = places[i]! - LABEL_GAP_PX;
  }
  return places;
}
