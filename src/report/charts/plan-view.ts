import type {Ellipse} from '../../occupation/result.ts';
import type {PlanCells} from '../../occupation/series/plan-cells.ts';
import {type LengthUnit, type UnitChoice, unitFor} from '../units.ts';
import {type Chart, COLOUR, pixelPaths, pixelTexts, RAMP, type Spec} from './chart.ts';
import {roundTicks, tickAxis} from './ticks.ts';

export interface PlanViewInput {
  readonly cells: PlanCells;
  /** About the reference; null when the record has no one mean. */
  readonly meanM: {readonly east: number; readonly north: number} | null;
  readonly meanEllipse: Ellipse | null;
  readonly epochEllipse: Ellipse | null;
  /** null when the reference is not a mark. */
  readonly mark: {readonly toleranceM: number | null} | null;
  readonly referenceName: string;
  readonly units: UnitChoice;
}

export interface PlanView {
  readonly chart: Chart;
  readonly unit: LengthUnit;
  /** What could be shown of the mark. */
  readonly markShown: 'inside' | 'beyond the frame' | 'none';
  readonly toleranceShown: boolean;
  /** Counts at which the classes of density begin. */
  readonly classFloors: readonly number[];
}

const PLOT_PX = 284;
/** The frame grows to hold mark and tolerance only while the cloud stays readable. */
const LARGEST_FRAME_WITH_RING = 2.6;
const LARGEST_FRAME_WITH_MARK = 3.5;

interface Frame {
  readonly east: number;
  readonly north: number;
  readonly half: number;
}

/** The cloud of single epochs in plan, true to scale, with what was concluded from it. */
export function planView(input: PlanViewInput): PlanView {
  const {cells, mark} = input;
  const meanM = input.meanM ?? middleOf(cells);
  const {frame, markInside, ringInside} = frameOf(input, meanM);
  const pxPerM = PLOT_PX / (2 * frame.half);
  const toPx = (eastM: number, northM: number): [number, number] => [
    (eastM - frame.east + frame.half) * pxPerM,
    (frame.north + frame.half - northM) * pxPerM,
  ];
  const largest = Math.max(Math.abs(frame.east) + frame.half, Math.abs(frame.north) + frame.half);
  const unit = unitFor(largest, input.units);
  const classFloors = densityFloors(cells.count);
  const layers: Spec[] = [
    frameLayer(frame, unit, input.referenceName),
    pixelPaths(
      cellPaths(cells, classFloors, toPx, pxPerM),
      {filled: true, clip: true},
      {fill: {field: 'fill', type: 'nominal', scale: null}},
    ),
  ];
  const [meanX, meanY] = toPx(meanM.east, meanM.north);
  const [markX, markY] = toPx(0, 0);
  if (mark !== null && markInside) {
    if (mark.toleranceM !== null && ringInside) {
      const r = mark.toleranceM * pxPerM;
      layers.push(...cased(ellipsePath(markX, markY, r, r, 0), COLOUR.ink, [2, 3]));
    }
    if (input.meanM !== null) {
      layers.push(...cased(`M${markX},${markY}L${meanX},${meanY}`, COLOUR.ink, null));
    }
  }
  const outline = (ellipse: Ellipse) =>
    ellipsePath(
      meanX,
      meanY,
      ellipse.semiMajorM * pxPerM,
      ellipse.semiMinorM * pxPerM,
      ellipse.azimuthDeg,
    );
  if (input.epochEllipse !== null) {
    layers.push(...cased(outline(input.epochEllipse), COLOUR.estimate, [6, 4]));
  }
  if (input.meanEllipse !== null) {
    layers.push(...cased(outline(input.meanEllipse), COLOUR.estimate, null));
  }
  if (input.meanM !== null)
    layers.push(
      pixelPaths([{path: dot(meanX, meanY, 3)}], {
        filled: true,
        fill: COLOUR.estimate,
        stroke: COLOUR.paper,
        strokeWidth: 1,
      }),
    );
  const texts = labels({meanX, meanY, markX, markY, mean: input.meanM !== null, mark: markInside});
  if (mark !== null && markInside) {
    layers.push(
      ...cased(`M${markX - 6},${markY}h12M${markX},${markY - 6}v12`, COLOUR.ink, null, 2),
    );
  }
  if (mark !== null && !markInside) layers.push(...towardMark(meanX, meanY, markX, markY));
  for (const {align, ...text} of texts) {
    layers.push(pixelTexts([text], {align, baseline: 'middle', fontWeight: 'bold'}));
  }
  return {
    chart: {
      spec: {width: PLOT_PX, height: PLOT_PX, layer: layers},
      widthPx: PLOT_PX,
      heightPx: PLOT_PX,
      padding: {left: 52, right: 8, top: 8, bottom: 38},
    },
    unit,
    markShown: mark === null ? 'none' : markInside ? 'inside' : 'beyond the frame',
    toleranceShown: ringInside && mark?.toleranceM != null,
    classFloors,
  };
}

function middleOf(cells: PlanCells) {
  return {
    east: cells.originEastM + (cells.columns * cells.cellEastM) / 2,
    north: cells.originNorthM + (cells.rows * cells.cellNorthM) / 2,
  };
}

function frameOf(
  {cells, mark, epochEllipse, meanEllipse}: PlanViewInput,
  meanM: {east: number; north: number},
) {
  const box = {
    west: Math.min(cells.originEastM, meanM.east),
    east: Math.max(cells.originEastM + cells.columns * cells.cellEastM, meanM.east),
    south: Math.min(cells.originNorthM, meanM.north),
    north: Math.max(cells.originNorthM + cells.rows * cells.cellNorthM, meanM.north),
  };
  const cloud = frameAround(box);
  for (const ellipse of [epochEllipse, meanEllipse]) {
    if (ellipse === null || ellipse.semiMajorM > 1.5 * cloud.half) continue;
    box.west = Math.min(box.west, meanM.east - ellipse.semiMajorM);
    box.east = Math.max(box.east, meanM.east + ellipse.semiMajorM);
    box.south = Math.min(box.south, meanM.north - ellipse.semiMajorM);
    box.north = Math.max(box.north, meanM.north + ellipse.semiMajorM);
  }
  const own = frameAround(box);
  if (mark === null) return {frame: own, markInside: false, ringInside: false};
  const around = (radiusM: number) =>
    frameAround({
      west: Math.min(box.west, -radiusM),
      east: Math.max(box.east, radiusM),
      south: Math.min(box.south, -radiusM),
      north: Math.max(box.north, radiusM),
    });
  if (mark.toleranceM !== null) {
    const withRing = around(mark.toleranceM * 1.04);
    if (withRing.half <= LARGEST_FRAME_WITH_RING * cloud.half) {
      return {frame: withRing, markInside: true, ringInside: true};
    }
  }
  const withMark = around(0.15 * cloud.half);
  if (withMark.half <= LARGEST_FRAME_WITH_MARK * cloud.half) {
    const ringInside = mark.toleranceM !== null && mark.toleranceM < 2 * withMark.half;
    return {frame: withMark, markInside: true, ringInside};
  }
  return {frame: own, markInside: false, ringInside: false};
}

function frameAround(box: {west: number; east: number; south: number; north: number}): Frame {
  return {
    east: (box.west + box.east) / 2,
    north: (box.south + box.north) / 2,
    half: (Math.max(box.east - box.west, box.north - box.south) / 2) * 1.03,
  };
}

function frameLayer(frame: Frame, unit: LengthUnit, of: string): Spec {
  const axis = (middle: number, name: string) => {
    const low = (middle - frame.half) * unit.perM;
    const high = (middle + frame.half) * unit.perM;
    return {
      field: 'v',
      type: 'quantitative',
      scale: {domain: [low, high], nice: false, zero: false},
      axis: {...tickAxis(roundTicks(low, high, 6)), title: `${name} of ${of}, ${unit.name}`},
    };
  };
  return {
    data: {values: []},
    mark: {type: 'point', opacity: 0},
    encoding: {x: axis(frame.east, 'East'), y: axis(frame.north, 'North')},
  };
}

/** Six classes of counts, their floors evenly spaced in the logarithm up to the fullest cell. */
function densityFloors(counts: readonly number[]): number[] {
  let most = 1;
  for (const count of counts) most = Math.max(most, count);
  const floors = RAMP.map((_, k) => Math.ceil(most ** (k / RAMP.length)));
  return [...new Set(floors)];
}

type ToPx = (eastM: number, northM: number) => [number, number];

/** One outline per class: neighbours in a row become one rectangle. */
function cellPaths(cells: PlanCells, floors: readonly number[], toPx: ToPx, pxPerM: number) {
  const paths = floors.map(() => '');
  const widthPx = cells.cellEastM * pxPerM;
  const heightPx = cells.cellNorthM * pxPerM;
  for (let i = 0; i < cells.count.length; ) {
    const level = classOf(cells.count[i]!, floors);
    let length = 1;
    while (
      cells.row[i + length] === cells.row[i] &&
      cells.column[i + length] === cells.column[i]! + length &&
      classOf(cells.count[i + length]!, floors) === level
    ) {
      length++;
    }
    const [x, y] = toPx(
      cells.originEastM + cells.column[i]! * cells.cellEastM,
      cells.originNorthM + (cells.row[i]! + 1) * cells.cellNorthM,
    );
    const width = px(length * widthPx);
    paths[level] += `M${px(x)},${px(y)}h${width}v${px(heightPx)}h${-width}z`;
    i += length;
  }
  const shades = shadesFor(floors.length);
  return paths.map((path, level) => ({path, fill: shades[level]})).filter(({path}) => path !== '');
}

/** Few classes take the darker shades: a lone epoch must be seen. */
export function shadesFor(classes: number): readonly string[] {
  return classes <= 2 ? RAMP.slice(3, 3 + classes) : RAMP.slice(RAMP.length - classes);
}

function classOf(count: number, floors: readonly number[]): number {
  let level = 0;
  for (let k = 1; k < floors.length; k++) if (count >= floors[k]!) level = k;
  return level;
}

function px(value: number): number {
  return Math.round(value * 100) / 100;
}

/** An outline over the density: a casing of paper below the line keeps it visible on any shade. */
function cased(path: string, stroke: string, dash: readonly number[] | null, width = 1.5): Spec[] {
  const line = {filled: false, clip: true, fill: null};
  return [
    pixelPaths([{path}], {...line, stroke: COLOUR.paper, strokeWidth: width + 2.5}),
    pixelPaths([{path}], {
      ...line,
      stroke,
      strokeWidth: width,
      ...(dash === null ? {} : {strokeDash: dash}),
    }),
  ];
}

/** Four Bézier quarters of an ellipse whose long axis points to the azimuth. */
function ellipsePath(
  x: number,
  y: number,
  semiMajorPx: number,
  semiMinorPx: number,
  azimuthDeg: number,
): string {
  const azimuth = (azimuthDeg * Math.PI) / 180;
  const major = [semiMajorPx * Math.sin(azimuth), -semiMajorPx * Math.cos(azimuth)] as const;
  const minor = [semiMinorPx * Math.cos(azimuth), semiMinorPx * Math.sin(azimuth)] as const;
  // Handle length for a quarter of a circle: 4/3 (√2 − 1).
  const k = 0.5522847498;
  const at = (a: number, b: number) =>
    `${px(x + a * major[0] + b * minor[0])},${px(y + a * major[1] + b * minor[1])}`;
  return [
    `M${at(1, 0)}`,
    `C${at(1, k)},${at(k, 1)},${at(0, 1)}`,
    `C${at(-k, 1)},${at(-1, k)},${at(-1, 0)}`,
    `C${at(-1, -k)},${at(-k, -1)},${at(0, -1)}`,
    `C${at(k, -1)},${at(1, -k)},${at(1, 0)}Z`,
  ].join('');
}

function dot(x: number, y: number, r: number): string {
  return ellipsePath(x, y, r, r, 0);
}

interface LabelPlaces {
  readonly meanX: number;
  readonly meanY: number;
  readonly markX: number;
  readonly markY: number;
  readonly mean: boolean;
  readonly mark: boolean;
}

/** The two names stand on opposite sides, away from the line between the points. */
function labels({meanX, meanY, markX, markY, mean, mark}: LabelPlaces) {
  const toRight = markX <= meanX;
  const name = (x: number, y: number, right: boolean, text: string) => ({
    x: px(x + (right ? 11 : -11)),
    y: px(Math.min(PLOT_PX - 8, Math.max(8, y))),
    text,
    align: right ? 'left' : 'right',
  });
  if (!mark) return mean ? [name(meanX, meanY - 12, true, 'mean')] : [];
  if (!mean) return [name(markX, markY - 12, !toRight, 'mark')];
  // Points nearly above each other need the second direction too.
  const apart = Math.abs(markY - meanY) < 14 && Math.abs(markX - meanX) < 40 ? 9 : 0;
  const lower = markY > meanY ? 1 : -1;
  return [
    name(meanX, meanY - lower * apart, toRight, 'mean'),
    name(markX, markY + lower * apart, !toRight, 'mark'),
  ];
}

/** An arrow at the rim of the frame that points to a mark beyond it. */
function towardMark(meanX: number, meanY: number, markX: number, markY: number): Spec[] {
  const length = Math.hypot(markX - meanX, markY - meanY);
  const [ux, uy] = [(markX - meanX) / length, (markY - meanY) / length];
  const reach = Math.min(
    ux > 0 ? (PLOT_PX - 6 - meanX) / ux : ux < 0 ? (6 - meanX) / ux : Number.POSITIVE_INFINITY,
    uy > 0 ? (PLOT_PX - 6 - meanY) / uy : uy < 0 ? (6 - meanY) / uy : Number.POSITIVE_INFINITY,
  );
  const tip = [meanX + ux * reach, meanY + uy * reach] as const;
  const wing = (side: number) =>
    `${px(tip[0] - 9 * ux + side * 4 * uy)},${px(tip[1] - 9 * uy - side * 4 * ux)}`;
  const shaft = `M${px(tip[0] - 44 * ux)},${px(tip[1] - 44 * uy)}L${px(tip[0])},${px(tip[1])}`;
  const x = Math.min(PLOT_PX - 44, Math.max(44, tip[0] - 58 * ux));
  const y = Math.min(PLOT_PX - 10, Math.max(10, tip[1] - 58 * uy));
  return [
    ...cased(`${shaft}M${wing(1)}L${px(tip[0])},${px(tip[1])}L${wing(-1)}`, COLOUR.ink, null),
    pixelTexts([{x: px(x), y: px(y), text: 'to the mark'}], {
      align: 'center',
      baseline: 'middle',
      fontWeight: 'bold',
    }),
  ];
}
