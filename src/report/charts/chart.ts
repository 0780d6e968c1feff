/**
 * A Vega-Lite specification as plain data. The published type is a union so wide that it neither
 * catches a slip nor fits our builders; the compiler of Vega-Lite refuses what is wrong.
 */
export type Spec = {readonly [key: string]: unknown};

/** A picture to draw: plots of known size inside known padding, so that nothing is measured. */
export interface Chart {
  readonly spec: Spec;
  /** Size of the plots together, without padding. */
  readonly widthPx: number;
  readonly heightPx: number;
  readonly padding: Padding;
}

interface Padding {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function pictureWidth({widthPx, padding}: Chart): number {
  return widthPx + padding.left + padding.right;
}

export function pictureHeight({heightPx, padding}: Chart): number {
  return heightPx + padding.top + padding.bottom;
}

/**
 * Colours by role. Each role has a hex of its own, so that the style sheet can give it another
 * one in the dark by selecting on the attribute; `paper` differs from white for that reason.
 */
export const COLOUR = {
  paper: '#fffffe',
  ink: '#1d2733',
  muted: '#56616f',
  grid: '#e4e8ed',
  axis: '#8b95a3',
  data: '#0072b2',
  dataMid: '#9cc6e2',
  dataPale: '#d3e5f2',
  estimate: '#c84a00',
  flagged: '#8a2f7a',
  third: '#00795a',
} as const;

/** Density from few to many. */
export const RAMP = ['#dceaf5', '#b4d3e9', '#82b6d9', '#4a94c4', '#1b6fa6', '#0b4673'] as const;

const TEXT_PX = 11;

export const CHART_CONFIG: Spec = {
  view: {stroke: null},
  axis: {
    domain: false,
    ticks: false,
    gridColor: COLOUR.grid,
    tickColor: COLOUR.axis,
    domainColor: COLOUR.axis,
    labelColor: COLOUR.muted,
    titleColor: COLOUR.muted,
    labelFontSize: TEXT_PX,
    titleFontSize: TEXT_PX,
    titleFontWeight: 'normal',
    titlePadding: 6,
    labelPadding: 5,
    labelFlush: false,
    labelOverlap: false,
    tickSize: 4,
  },
  axisX: {domain: true, ticks: true},
  text: {fontSize: TEXT_PX, color: COLOUR.ink},
};

/** One empty datum: the data of marks that stand at fixed places. */
export const ONCE: Spec = {values: [{}]};

/** The name of a panel, above its upper left corner. */
export function panelName(text: string): Spec {
  return {
    data: ONCE,
    mark: {type: 'text', x: 0, y: -11, align: 'left', fontWeight: 'bold'},
    encoding: {text: {value: text}},
  };
}

/**
 * Outlines given in pixels of the plot, drawn by the point mark: a shape of size 4 is not scaled.
 *
 * @param paths objects with `path` and whatever the encoding reads
 */
export function pixelPaths(paths: readonly Spec[], mark: Spec, encoding: Spec = {}): Spec {
  return {
    data: {values: paths},
    mark: {type: 'point', size: 4, x: 0, y: 0, opacity: 1, ...mark},
    encoding: {shape: {field: 'path', type: 'nominal', scale: null}, ...encoding},
  };
}

/** Text at pixel places of the plot with a casing of paper, readable on any density. */
export function pixelTexts(
  texts: readonly {readonly x: number; readonly y: number; readonly text: string}[],
  mark: Spec,
): Spec {
  return {
    data: {values: texts},
    mark: {type: 'text', stroke: COLOUR.paper, strokeWidth: 3, ...mark},
    encoding: {
      x: {field: 'x', type: 'quantitative', scale: null, axis: null},
      y: {field: 'y', type: 'quantitative', scale: null, axis: null},
      text: {field: 'text', type: 'nominal'},
    },
  };
}
