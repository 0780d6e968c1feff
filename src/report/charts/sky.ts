import type {Sky, SkyCells, SkyTrack, SkyTracks} from '../../occupation/series/sky.ts';
import {type Chart, COLOUR, pixelPaths, pixelTexts, RAMP, type Spec} from './chart.ts';

const PLOT_PX = 268;
const CENTRE_PX = PLOT_PX / 2;
const RADIUS_PX = 116;
const LABEL_ROOM_PX = 15;

/** Signal strengths at which the shades of cells begin, in dB-Hz; the first holds all below. */
export const STRENGTH_FLOORS_DB_HZ = [0, 30, 35, 40, 45, 50] as const;

/** Signal strengths at which the wider paths begin, and the widths. */
export const TRACK_FLOORS_DB_HZ = [0, 35, 40, 45] as const;
const TRACK_WIDTHS_PX = [1, 2, 3.2, 4.6] as const;

/** The sky seen from the antenna: zenith in the middle, horizon at the rim, north up. */
export function skyChart(sky: Sky): Chart {
  const layer: Spec[] = [
    ...(sky.kind === 'cells' ? cellLayers(sky) : []),
    ringLayer(),
    ...(sky.kind === 'tracks' ? trackLayers(sky) : horizonLayers(sky)),
    ...compassLayers(),
  ];
  return {
    spec: {width: PLOT_PX, height: PLOT_PX, layer},
    widthPx: PLOT_PX,
    heightPx: PLOT_PX,
    padding: {left: 38, right: 38, top: 4, bottom: 4},
  };
}

function place(azimuthDeg: number, elevationDeg: number): [number, number] {
  const r = RADIUS_PX * (1 - elevationDeg / 90);
  const azimuth = (azimuthDeg * Math.PI) / 180;
  return [px(CENTRE_PX + r * Math.sin(azimuth)), px(CENTRE_PX - r * Math.cos(azimuth))];
}

function px(value: number): number {
  return Math.round(value * 10) / 10;
}

function shadeOf(strengthDbHz: number): number {
  let shade = 0;
  STRENGTH_FLOORS_DB_HZ.forEach((floor, k) => {
    if (strengthDbHz >= floor) shade = k;
  });
  return shade;
}

function ringLayer(): Spec {
  const ring = (r: number) =>
    `M${CENTRE_PX - r},${CENTRE_PX}a${r},${r},0,1,1,${2 * r},0a${r},${r},0,1,1,${-2 * r},0z`;
  const circles = [1, 2 / 3, 1 / 3].map((share) => ring(px(RADIUS_PX * share))).join('');
  const cross = `M${CENTRE_PX - RADIUS_PX},${CENTRE_PX}h${2 * RADIUS_PX}M${CENTRE_PX},${CENTRE_PX - RADIUS_PX}v${2 * RADIUS_PX}`;
  return pixelPaths([{path: circles + cross}], {
    filled: false,
    fill: null,
    stroke: COLOUR.axis,
    strokeWidth: 0.6,
  });
}

function compassLayers(): Spec[] {
  const at = (azimuthDeg: number, text: string) => {
    const [x, y] = place(azimuthDeg, -8.5);
    return {x, y, text};
  };
  return [
    pixelTexts([at(0, 'N'), at(90, 'E'), at(180, 'S'), at(270, 'W')], {
      baseline: 'middle',
      fontWeight: 'bold',
    }),
    pixelTexts(
      [
        {x: CENTRE_PX + 3, y: px(CENTRE_PX - RADIUS_PX / 3 - 6), text: '60°'},
        {x: CENTRE_PX + 3, y: px(CENTRE_PX - (RADIUS_PX * 2) / 3 - 6), text: '30°'},
      ],
      {align: 'left', baseline: 'middle', color: COLOUR.muted},
    ),
  ];
}

/** Paths of satellites, wider where the signal was stronger, and their names where they end. */
function trackLayers({tracks}: SkyTracks): Spec[] {
  const paths = TRACK_WIDTHS_PX.map(() => '');
  let unheard = '';
  for (const track of tracks) {
    const strength = medianOf(track.carrierToNoiseDbHz);
    const path = track.azimuthDeg.map((_, i) => pieceOf(track, i)).join('');
    if (strength === null) unheard += path;
    else paths[widthClass(strength)] += path;
  }
  const line = {filled: false, fill: null, strokeCap: 'round'};
  return [
    ...(unheard === ''
      ? []
      : [
          pixelPaths([{path: unheard}], {
            ...line,
            stroke: COLOUR.axis,
            strokeWidth: 1.2,
            strokeDash: [1, 3],
          }),
        ]),
    ...paths.flatMap((path, k) =>
      path === ''
        ? []
        : [
            pixelPaths([{path}], {
              ...line,
              stroke: COLOUR.data,
              strokeWidth: TRACK_WIDTHS_PX[k],
            }),
          ],
    ),
    pixelTexts(trackNames(tracks), {baseline: 'middle', dy: -8}),
  ];
}

function widthClass(strengthDbHz: number): number {
  let found = 0;
  TRACK_FLOORS_DB_HZ.forEach((floor, k) => {
    if (strengthDbHz >= floor) found = k;
  });
  return found;
}

/** Median of the strengths heard; null when the satellite was never heard. */
function medianOf(values: readonly (number | null)[]): number | null {
  const heard = values.filter((value) => value !== null).sort((a, b) => a - b);
  return heard[Math.floor(heard.length / 2)] ?? null;
}

/** The step from the point before to this one; the first point of a path is a dot. */
function pieceOf(track: SkyTrack, i: number): string {
  const [x, y] = place(track.azimuthDeg[i]!, track.elevationDeg[i]!);
  const start = `M${px(x - 0.3)},${y}h.6`;
  if (i === 0) return start;
  const [fromX, fromY] = place(track.azimuthDeg[i - 1]!, track.elevationDeg[i - 1]!);
  // Neighbouring samples lie close together; a leap means that the satellite was lost between.
  return Math.hypot(x - fromX, y - fromY) > RADIUS_PX / 4 ? start : `L${x},${y}`;
}

function trackNames(tracks: readonly SkyTrack[]) {
  // The names of the rings are taken.
  const placed: {x: number; y: number; text: string}[] = [];
  const rings = [RADIUS_PX / 3, (RADIUS_PX * 2) / 3].map((r) => ({
    x: CENTRE_PX + 12,
    y: CENTRE_PX - r + 2,
  }));
  for (const track of tracks) {
    const last = track.azimuthDeg.length - 1;
    if (last < 0) continue;
    const [x, y] = place(track.azimuthDeg[last]!, track.elevationDeg[last]!);
    const crowded = [...placed, ...rings].some(
      (other) => Math.abs(other.x - x) < 2 * LABEL_ROOM_PX && Math.abs(other.y - y) < LABEL_ROOM_PX,
    );
    const onCompass = Math.abs(x - CENTRE_PX) < 30 || Math.abs(y - CENTRE_PX) < 22;
    if (!crowded && !(onCompass && Math.hypot(x - CENTRE_PX, y - CENTRE_PX) > RADIUS_PX * 0.8)) {
      placed.push({x, y, text: track.label});
    }
  }
  return placed;
}

function cellLayers({cells}: SkyCells): Spec[] {
  const paths = RAMP.map(() => '');
  for (const cell of cells) {
    const outer = RADIUS_PX * (1 - cell.fromElevationDeg / 90);
    const inner = RADIUS_PX * (1 - cell.toElevationDeg / 90);
    const a = place(cell.fromAzimuthDeg, cell.fromElevationDeg);
    const b = place(cell.toAzimuthDeg, cell.fromElevationDeg);
    const c = place(cell.toAzimuthDeg, cell.toElevationDeg);
    const d = place(cell.fromAzimuthDeg, cell.toElevationDeg);
    paths[shadeOf(cell.medianCarrierToNoiseDbHz)] +=
      `M${a}A${px(outer)},${px(outer)},0,0,1,${b}L${c}A${px(inner)},${px(inner)},0,0,0,${d}Z`;
  }
  return [
    pixelPaths(
      paths.map((path, k) => ({path, fill: RAMP[k]})).filter(({path}) => path !== ''),
      {filled: true},
      {fill: {field: 'fill', type: 'nominal', scale: null}},
    ),
  ];
}

/** The lowest signal heard in each direction. */
function horizonLayers({horizon}: SkyCells): Spec[] {
  const half = horizon.length > 0 ? 180 / horizon.length : 5;
  let path = '';
  let previous: number | null = null;
  for (const {azimuthDeg, elevationDeg} of horizon) {
    if (elevationDeg !== null) {
      const from = place(azimuthDeg - half, elevationDeg);
      const to = place(azimuthDeg + half, elevationDeg);
      path += `${previous === null ? 'M' : 'L'}${from}L${to}`;
    }
    previous = elevationDeg;
  }
  if (path === '') return [];
  const line = {filled: false, fill: null};
  return [
    pixelPaths([{path}], {...line, stroke: COLOUR.paper, strokeWidth: 3.5}),
    pixelPaths([{path}], {...line, stroke: COLOUR.estimate, strokeWidth: 1.4}),
  ];
}
