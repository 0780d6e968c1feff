import {decodeText} from './decode-text.ts';
import type {MappingNode, Node, Place} from './node.ts';
import {refuse} from './node.ts';
import type {ValueOf} from './shape.ts';
import {lineOfKey, within} from './shape.ts';
import {type sheetFields, sheetShape} from './sheet-shape.ts';
import {readYaml} from './yaml.ts';

export type SheetEntries = ValueOf<typeof sheetFields>;
export type AntennaEntry = NonNullable<SheetEntries['antenna']>;
export type AntennaReadings = NonNullable<AntennaEntry['before']>;
export type EccentricityEntry = NonNullable<SheetEntries['eccentricity']>;
export type StatedUncertainty = NonNullable<SheetEntries['standardUncertainties']>[number];

/** What was written down in the field about one occupation; `undefined` is "not given". */
export interface Sheet extends SheetEntries {
  readonly path: string;
  /** Line of each key that stands in the sheet, by its way from the top: "antenna, plate radius". */
  readonly lines: Readonly<Record<string, number>>;
}

/**
 * Reads a field sheet.
 *
 * @param path  how messages call the file
 * @throws InputError for the first thing that is wrong, with its line and what to write instead
 */
export function readSheet(bytes: Uint8Array, path: string): Sheet {
  const node = readYaml(decodeText(bytes, path), path);
  const place = {path, trail: ''};
  const entries = sheetShape.read(node, place);
  refuseContradictions(entries, node, place);
  return {...entries, path, lines: linesOf(node)};
}

/** A sheet in which nothing is given, for occupations without one. */
export function emptySheet(): Sheet {
  const nothing: MappingNode = {kind: 'mapping', entries: [], lineNumber: 1};
  return {...sheetShape.read(nothing, {path: '', trail: ''}), path: '', lines: {}};
}

function linesOf(node: Node, trail = ''): Record<string, number> {
  if (node.kind !== 'mapping') return {};
  const lines: Record<string, number> = {};
  for (const {key, lineNumber, value} of node.entries) {
    const here = trail === '' ? key : `${trail}, ${key}`;
    lines[here] = lineNumber;
    Object.assign(lines, linesOf(value, here));
  }
  return lines;
}

function refuseContradictions(sheet: SheetEntries, node: Node, place: Place): void {
  if (sheet.start && sheet.stop && sheet.stop.gpsSeconds <= sheet.start.gpsSeconds) {
    refuse(
      within(place, 'stop'),
      lineOfKey(node, 'stop'),
      `the session stops at ${sheet.stop.utc}, not after its start at ${sheet.start.utc}; check date, time and offset`,
    );
  }
  const reduced = sheet.receiver?.reducedToMark;
  if (reduced === true && sheet.logPoint !== undefined && sheet.logPoint !== 'mark') {
    refuse(
      within(place, 'log point'),
      lineOfKey(node, 'log point'),
      `the receiver reduced to the mark, so the log cannot be of the ${sheet.logPoint}; write "log point: mark", or "reduced to mark: no" under receiver`,
    );
  }
  if (reduced === false && sheet.logPoint === 'mark') {
    refuse(
      within(place, 'log point'),
      lineOfKey(node, 'log point'),
      'the log cannot be of the mark when the receiver did not reduce to it; write "log point: antenna reference point" (or phase centre), or "reduced to mark: yes" under receiver',
    );
  }
  refuseAntenna(sheet.antenna, nodeOf(node, 'antenna'), within(place, 'antenna'));
  refuseEccentricity(
    sheet.eccentricity,
    nodeOf(node, 'eccentricity'),
    within(place, 'eccentricity'),
  );
  refuseStated(sheet, nodeOf(node, 'standard uncertainties'), place);
}

function nodeOf(node: Node, key: string): Node {
  if (node.kind !== 'mapping') return node;
  return node.entries.find((entry) => entry.key === key)?.value ?? node;
}

/** What the reduction of the height needs, and what cannot be true at once. */
function refuseAntenna(antenna: SheetEntries['antenna'], node: Node, place: Place): void {
  if (antenna === undefined) return;
  const no = (key: string, message: string): never =>
    refuse(within(place, key), lineOfKey(node, key), message);
  const {before, after, measured, measuredTo, plateRadiusM, heightUsed} = antenna;
  if (before === undefined && after !== undefined) {
    no('after', 'a height after the session is given, but none before it; fill in "before"');
  }
  for (const [key, readings] of [
    ['before', before],
    ['after', after],
  ] as const) {
    if (readings !== undefined && readings.readings === undefined) {
      no(key, '"readings" is missing; write for example "readings: [1.853 m, 1.852 m]"');
    }
  }
  if ((heightUsed === 'mean' || heightUsed === 'interpolated') && after === undefined) {
    no(
      'height used',
      `"${heightUsed}" needs a height after the session; fill in "after", or write opening`,
    );
  }
  if (before?.at && after?.at && after.at.gpsSeconds <= before.at.gpsSeconds) {
    no(
      'after',
      `the height after the session was measured at ${after.at.utc}, not after the one before it; check both times`,
    );
  }
  if (before === undefined) return;
  if (measured === undefined) {
    no(
      'before',
      'how the height was measured is missing; write "measured: vertical" or "measured: slant" under antenna',
    );
  }
  if (measuredTo === undefined) {
    no(
      'before',
      'to which point the height was measured is missing; write "measured to: antenna reference point" (or slant mark, phase centre) under antenna',
    );
  }
  if (measured === 'vertical' && plateRadiusM !== undefined && measuredTo !== 'slant mark') {
    no(
      'plate radius',
      'a plate radius belongs to a slant height; write "measured: slant", or remove it',
    );
  }
  if (measuredTo === 'slant mark' && antenna.slantMarkAboveArpM === undefined) {
    no(
      'measured to',
      'the height of the slant mark is missing; write for example "slant mark above reference point: 0.0350 m" (0 m if they lie level)',
    );
  }
  if (measuredTo === 'phase centre' && antenna.phaseCentreAboveArpM === undefined) {
    no(
      'measured to',
      'the height of the phase centre is missing; write for example "phase centre above reference point: 0.0712 m" from the calibration',
    );
  }
  if (measured === 'slant') refuseSlant(antenna, no);
}

function refuseSlant(antenna: AntennaEntry, no: (key: string, message: string) => never): void {
  const {before, after, measuredTo, plateRadiusM} = antenna;
  if (measuredTo === 'phase centre') {
    no(
      'measured to',
      'nobody can tape a slope to the phase centre; write "measured to: slant mark"',
    );
  }
  if (plateRadiusM === undefined) {
    no(
      'measured',
      'a slant height needs the radius of its plate; write for example "plate radius: 0.1905 m"',
    );
  }
  for (const [key, block] of [
    ['before', before],
    ['after', after],
  ] as const) {
    for (const {lengthM} of [...(block?.readings ?? []), ...(block?.checkReadings ?? [])]) {
      if (lengthM <= plateRadiusM) {
        no(
          key,
          `a slant reading of ${lengthM} m is not longer than the plate radius of ${plateRadiusM} m; check both`,
        );
      }
    }
  }
}

function refuseEccentricity(value: SheetEntries['eccentricity'], node: Node, place: Place): void {
  if (value === undefined) return;
  const no = (key: string, message: string): never => refuse(place, lineOfKey(node, key), message);
  const {eastM, northM, distanceM, bearingDeg, bearingFrom} = value;
  const offset = eastM !== undefined || northM !== undefined;
  const polar = distanceM !== undefined || bearingDeg !== undefined;
  if (offset && polar) no('distance', 'give east and north, or distance and bearing, not both');
  if (offset && (eastM === undefined || northM === undefined)) {
    no('east', 'give both east and north, 0 m where there is no offset');
  }
  if (!polar) return;
  if (distanceM === undefined || bearingDeg === undefined) {
    no(
      'distance',
      'give both distance and bearing, as "distance: 1.234 m" and "bearing: 123 45 10"',
    );
  }
  if (bearingFrom === undefined) {
    no(
      'bearing',
      'which north the bearing counts from is missing; write "bearing from: true north" (or grid north, magnetic north)',
    );
  }
  if (bearingFrom === 'magnetic north' && value.declinationDeg === undefined) {
    no(
      'bearing from',
      'a magnetic bearing needs the declination; write for example "declination: 3.5" (degrees, east positive)',
    );
  }
}

function refuseStated(sheet: SheetEntries, node: Node, place: Place): void {
  const seen = new Set<string>();
  (sheet.standardUncertainties ?? []).forEach((stated, index) => {
    const item = node.kind === 'list' ? node.items[index] : undefined;
    const lineNumber = item?.lineNumber ?? node.lineNumber;
    const no = (message: string): never =>
      refuse(within(place, `standard uncertainty of ${stated.of}`), lineNumber, message);
    const {planM, eastM, northM, upM} = stated;
    if (seen.has(stated.of)) no('is given twice; keep one');
    seen.add(stated.of);
    if ([planM, eastM, northM, upM].every((value) => value === undefined)) {
      no('holds no number; write for example "plan: 1 mm" or "up: 1 mm"');
    }
    if (planM !== undefined && (eastM !== undefined || northM !== undefined)) {
      no('give plan, or east and north, not both');
    }
    if ((eastM === undefined) !== (northM === undefined)) no('give both east and north');
  });
}
