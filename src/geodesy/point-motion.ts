import {UsageError} from '../errors.ts';
import {frameNamed} from './frame-names.ts';
import {
  ITRF2020_PMM,
  type Plate,
  type PlateMotionModel,
  plateMotionModelNamed,
  plateNamed,
} from './plates.ts';

/** How a point on the ground moves between two epochs; never assumed to be zero in silence. */
export type PointMotion =
  | {
      readonly kind: 'geocentric velocity';
      readonly frame: string;
      readonly mPerYear: {readonly x: number; readonly y: number; readonly z: number};
    }
  | {
      readonly kind: 'local velocity';
      readonly frame: string;
      readonly mPerYear: {readonly east: number; readonly north: number; readonly up: number};
    }
  | {readonly kind: 'at rest'; readonly frame: string}
  | {readonly kind: 'plate'; readonly plate: Plate; readonly model: PlateMotionModel};

/** No plate moves faster; a larger figure has the wrong unit. */
const FASTEST_M_PER_YEAR = 0.25;

const FORMS =
  '"at rest in ETRF2014", "plate EURA", "xyz -13.6 16.9 10.2 mm/yr in ITRF2020" or ' +
  '"enu 17.1 15.2 0.3 mm/yr in ITRF2020"';
const NUMBER = String.raw`[-+]?\d+(?:\.\d*)?`;
const VELOCITY = new RegExp(
  String.raw`^(xyz|enu)\s+(${NUMBER})[\s,]+(${NUMBER})[\s,]+(${NUMBER})\s*(mm|m)/(?:yr|y|a|year)\s+in\s+(.+)$`,
  'i',
);

/**
 * The motion of a point as a user writes it.
 *
 * @throws UsageError that lists the forms, or says what is wrong with the frame, plate or unit
 */
export function parsePointMotion(text: string): PointMotion {
  const trimmed = text.trim();
  const rest = /^at rest in\s+(.+)$/i.exec(trimmed)?.[1];
  if (rest !== undefined) return atRestIn(rest);
  const plate = /^plate\s+(.+?)(?:\s+by\s+(\S+))?$/i.exec(trimmed);
  if (plate !== null) {
    const model = plate[2] === undefined ? ITRF2020_PMM : plateMotionModelNamed(plate[2]);
    return {kind: 'plate', plate: plateNamed(plate[1] ?? '', model), model};
  }
  const velocity = VELOCITY.exec(trimmed);
  if (velocity === null)
    throw new UsageError(`need the motion of the mark as ${FORMS}, found "${text}"`);
  return velocityFrom(velocity, text);
}

/** @throws UsageError unless the frame moves with a plate */
export function atRestIn(frameText: string): PointMotion {
  const frame = frameNamed(frameText);
  if (frame.kind !== 'plate-fixed') {
    throw new UsageError(
      `no mark is at rest in ${frame.name}, which does not move with a plate; write a plate-fixed ` +
        'frame such as ETRF2014, GDA2020 or NATRF2022',
    );
  }
  return {kind: 'at rest', frame: frame.name};
}

function velocityFrom(fields: RegExpExecArray, text: string): PointMotion {
  const [, axes, first, second, third, unit, frameText = ''] = fields;
  const factor = unit?.toLowerCase() === 'mm' ? 1e-3 : 1;
  const [a, b, c] = [Number(first) * factor, Number(second) * factor, Number(third) * factor];
  if (Math.hypot(a, b, c) > FASTEST_M_PER_YEAR) {
    throw new UsageError(
      `need a velocity below ${FASTEST_M_PER_YEAR} m/yr, found "${text}"; is the unit mm/yr?`,
    );
  }
  const frame = frameNamed(frameText).name;
  if (axes?.toLowerCase() === 'xyz') {
    return {kind: 'geocentric velocity', frame, mPerYear: {x: a, y: b, z: c}};
  }
  return {kind: 'local velocity', frame, mPerYear: {east: a, north: b, up: c}};
}
