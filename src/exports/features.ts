import {WGS84} from '../geodesy/ellipsoid.ts';
import {geodeticFromEnu, localFrame} from '../geodesy/local.ts';
import type {Geodetic} from '../geodesy/types.ts';
import type {Ellipse, GeodeticPosition, Position, Result} from '../occupation/result.ts';

/** One mean with what a map says of it; a record that a step splits has several. */
export interface MappedPosition {
  /** Counted from 1; null when the whole record has one position. */
  readonly part: number | null;
  readonly fromUtc: string | null;
  readonly toUtc: string | null;
  readonly position: Position;
}

/** The positions that a map shows: the one of the record, else those of its parts. */
export function mappedPositions({position, segments}: Result): MappedPosition[] {
  if (position !== null) return [{part: null, fromUtc: null, toUtc: null, position}];
  return segments.map((segment, k) => ({
    part: k + 1,
    fromUtc: segment.fromUtc,
    toUtc: segment.toUtc,
    position: segment.position,
  }));
}

/** The name under which a position appears; one that is not the mark's says what it is of. */
export function positionName({occupation}: Result, {part, position}: MappedPosition): string {
  const mark = occupation.mark ?? 'Position';
  const name = position.of === 'mark' ? mark : `${mark} (${position.of})`;
  return part === null ? name : `${name}, part ${part}`;
}

/** Texts of the notices that a reader of a map must not miss. */
export function cautionTexts({notices, comparison}: Result): string[] {
  const serious = notices.filter(({severity}) => severity === 'concern' || severity === 'caution');
  return [...serious.map(({text}) => text), ...(comparison?.assumptions ?? [])];
}

/** What the format takes the coordinates for, and what they are. */
export function datumRemark(position: Position): string {
  const frame = position.frame ?? 'a frame that was not stated';
  const epoch = position.coordinateEpoch === null ? '' : ` at epoch ${position.coordinateEpoch}`;
  return `The coordinates are in ${frame}${epoch} and were not transformed; the format takes them for WGS 84.`;
}

const ELLIPSE_VERTICES = 72;

/**
 * The outline of an error ellipse about a position, anticlockwise and closed, at the height of the
 * position; longitudes run on past ±180° where the outline does.
 */
export function ellipseOutline(ellipse: Ellipse, centre: GeodeticPosition): Geodetic[] {
  const origin = {...centre, ellipsoidalHeightM: centre.ellipsoidalHeightM ?? 0};
  const frame = localFrame(origin, WGS84);
  const azimuthRad = (ellipse.azimuthDeg * Math.PI) / 180;
  const sin = Math.sin(azimuthRad);
  const cos = Math.cos(azimuthRad);
  const outline: Geodetic[] = [];
  for (let k = 0; k < ELLIPSE_VERTICES; k += 1) {
    const angle = (-2 * Math.PI * k) / ELLIPSE_VERTICES;
    const along = ellipse.semiMajorM * Math.cos(angle);
    const across = ellipse.semiMinorM * Math.sin(angle);
    // Across is clockwise from along, so a falling angle runs anticlockwise.
    const enu = {eastM: along * sin + across * cos, northM: along * cos - across * sin, upM: 0};
    const vertex = geodeticFromEnu(enu, frame);
    outline.push({
      ...vertex,
      longitudeDeg: nearTo(vertex.longitudeDeg, centre.longitudeDeg),
    });
  }
  const [first] = outline;
  return first === undefined ? [] : [...outline, first];
}

function nearTo(longitudeDeg: number, centreDeg: number): number {
  if (longitudeDeg - centreDeg > 180) return longitudeDeg - 360;
  return longitudeDeg - centreDeg < -180 ? longitudeDeg + 360 : longitudeDeg;
}

/** Rounded to so many decimals, and never −0: for formats that keep numbers as numbers. */
export function rounded(value: number, decimals: number): number {
  return Number(value.toFixed(decimals)) + 0;
}
