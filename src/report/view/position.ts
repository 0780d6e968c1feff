import {sexagesimal} from '../../geodesy/angle.ts';
import type {Position, Segment} from '../../occupation/result.ts';
import {geoidName} from '../../wording/heights.ts';
import {
  arcSecondDecimals,
  coordinateDecimals,
  degreeDecimals,
  fixed,
  formatDms,
  formatLength,
  formatUtc,
} from '../../wording/numbers.ts';
import {spanBesideUtc} from '../../wording/time-zone.ts';
import {hasMark, type ReportContext, referenceName} from '../context.ts';
import {largeUnit} from '../units.ts';
import {type LengthColumn, lengthColumn, numberCell, textCell} from './columns.ts';
import {fixedTable, head, numberHead, type Row, row, stacking, type Table} from './table.ts';

/** Offsets, uncertainty and scatter per axis; null where the record has no one position. */
export function offsetTable(context: ReportContext): Table | null {
  const {result, series, options} = context;
  const {position, comparison, scatter} = result;
  if (position === null) return null;
  const u = position.uncertainty95M;
  const deviations = scatter?.aboutMean.observed.standardDeviationM ?? null;
  const offsets = comparison?.offsetM ?? meansAboutReference(context);
  const column = lengthColumn(
    [
      ...[offsets?.east, offsets?.north, offsets?.up],
      ...[u?.east, u?.north, u?.up, u?.horizontalRadius],
      ...[deviations?.east, deviations?.north, deviations?.up],
    ],
    options.units,
  );
  const rows = (['east', 'north', 'up'] as const)
    .filter((axis) => axis !== 'up' || series.histograms.up !== null || u?.up != null)
    .map((axis) =>
      row(AXIS_NAMES[axis], [
        ...(offsets === null ? [] : [numberCell(column.cell(offsets[axis]))]),
        numberCell(column.uncertainty(u?.[axis])),
        numberCell(column.cell(deviations?.[axis])),
      ]),
    );
  const horizontal = comparison?.offsetM.horizontal ?? null;
  rows.push(
    row(
      'Plan',
      [
        ...(offsets === null ? [] : [numberCell(column.cell(horizontal ?? distance(offsets)))]),
        numberCell(column.uncertainty(u?.horizontalRadius)),
        numberCell(column.cell(scatter?.aboutMean.observed.drmsM)),
      ],
      true,
    ),
  );
  const name = column.unit.name;
  return fixedTable({
    caption:
      offsets === null
        ? 'How well the mean is known; SD: one epoch'
        : `Mean minus ${referenceName(context)}, local horizon; SD: one epoch`,
    heads: [
      head('Direction'),
      ...(offsets === null ? [] : [numberHead(`Offset ${name}`)]),
      numberHead(`95 % ± ${name}`),
      numberHead(`SD ${name}`),
    ],
    rows,
  });
}

const AXIS_NAMES = {east: 'East', north: 'North', up: 'Up'} as const;

/** Only where the reference is a place of its own: about the mean all offsets are zero. */
function meansAboutReference(context: ReportContext) {
  const {east, north, up} = context.series.histograms;
  if (referenceName(context) === 'mean' || east === null || north === null) return null;
  return {east: east.meanM, north: north.meanM, up: up?.meanM ?? null};
}

function distance({east, north}: {east: number | null; north: number | null}): number | null {
  return east === null || north === null ? null : Math.hypot(east, north);
}

/** The coordinates of the position, one a row, with the digits they deserve. */
export function coordinateTable(context: ReportContext): Table | null {
  const position = context.result.position;
  if (position === null) return null;
  return fixedTable({
    caption: coordinateCaption(position),
    heads: [head('Coordinate'), numberHead('Value'), head('Unit')],
    rows: coordinateRows(position, context),
  });
}

function coordinateCaption({of, frame, frameFrom, coordinateEpoch}: Position): string {
  const where = frame === null ? 'not stated' : `${frame}${fromText(frameFrom)}`;
  const when = coordinateEpoch === null ? 'epoch not stated' : `epoch ${fixed(coordinateEpoch, 2)}`;
  const what = of === 'mark' ? 'Mark' : of.charAt(0).toUpperCase() + of.slice(1);
  return `${what}. Frame and epoch: ${where}, ${when}`;
}

function fromText(from: Position['frameFrom']): string {
  if (from === null) return '';
  return from === 'assumed'
    ? ' (assumed)'
    : ` (from the ${from === 'sheet' ? 'field sheet' : 'command line'})`;
}

function coordinateRows(position: Position, {options}: ReportContext): Row[] {
  const {geodetic, uncertainty95M, ecefM, grid, orthometricHeightM, separation} = position;
  const planDecimals = coordinateDecimals(uncertainty95M?.horizontalRadius ?? null);
  const upDecimals = coordinateDecimals(uncertainty95M?.up ?? null);
  const unit = largeUnit(options.units);
  const length = (name: string, valueM: number, decimals: number) =>
    row(name, [numberCell(fixed(valueM * unit.perM, decimals)), textCell(unit.name)]);
  const rows = [
    angleRow('Latitude', geodetic.latitudeDeg, 'NS', planDecimals, options.angles),
    angleRow('Longitude', geodetic.longitudeDeg, 'EW', planDecimals, options.angles),
    geodetic.ellipsoidalHeightM === null
      ? row('Ellipsoidal height', [textCell('not in the log'), textCell('')])
      : length('Ellipsoidal height', geodetic.ellipsoidalHeightM, upDecimals),
  ];
  if (orthometricHeightM !== null) {
    rows.push(length(`Height above ${heightFrom(position)}`, orthometricHeightM, upDecimals));
  }
  if (separation !== null) {
    rows.push(length('Geoid separation', separation.separationM, 3));
  }
  if (grid !== null) {
    rows.push(
      length(`${grid.name}, easting`, grid.eastingM, planDecimals),
      length(`${grid.name}, northing`, grid.northingM, planDecimals),
    );
  }
  if (ecefM !== null) {
    const decimals = Math.max(planDecimals, upDecimals);
    rows.push(
      length('Geocentric X', ecefM.x, decimals),
      length('Geocentric Y', ecefM.y, decimals),
      length('Geocentric Z', ecefM.z, decimals),
    );
  }
  return rows;
}

/** An altitude without a separation is above the receiver's own geoid too. */
function heightFrom({separation}: Position): string {
  return geoidName(separation ?? {from: 'receiver', model: null});
}

function angleRow(
  name: string,
  degrees: number,
  hemispheres: 'NS' | 'EW',
  metreDecimals: number,
  angles: 'dms' | 'deg',
): Row {
  if (angles === 'dms') {
    const decimals = arcSecondDecimals(metreDecimals);
    const text = formatDms(sexagesimal(degrees, decimals), decimals, hemispheres);
    return row(name, [textCell(text), textCell('')]);
  }
  const text = fixed(degrees, degreeDecimals(metreDecimals));
  return row(name, [
    numberCell(text),
    textCell(hemispheres === 'NS' ? '°\u00a0north' : '°\u00a0east'),
  ]);
}

/** The parts that movement split the record into, each with its own position. */
export function segmentTable(context: ReportContext): Table | null {
  const {segments, position} = context.result;
  if (position !== null || segments.length === 0) return null;
  const {options} = context;
  const radii = segments.map((segment) => segment.position.uncertainty95M?.horizontalRadius);
  const ups = segments.map((segment) => segment.position.uncertainty95M?.up);
  const column = lengthColumn([...radii, ...ups], options.units);
  const first = segments[0]?.position;
  // One number of decimals per column: that of the best known part.
  const decimals = {
    plan: Math.max(...radii.map((radiusM) => coordinateDecimals(radiusM ?? null))),
    up: Math.max(...ups.map((upM) => coordinateDecimals(upM ?? null))),
  };
  return stacking({
    caption: `Each part has its own mean. ${first === undefined ? '' : coordinateCaption(first)}`,
    heads: [
      head('Part, UTC'),
      numberHead('Epochs'),
      numberHead('Latitude °'),
      numberHead('Longitude °'),
      numberHead(`Ell. height ${largeUnit(options.units).name}`),
      numberHead(`95 % plan ${column.unit.name}`),
      numberHead(`95 % up ${column.unit.name}`),
    ],
    rows: segments.map((segment) => segmentRow(segment, column, decimals, context)),
  });
}

function segmentRow(
  {fromUtc, toUtc, epochs, position}: Segment,
  column: LengthColumn,
  decimals: {readonly plan: number; readonly up: number},
  {options}: ReportContext,
): Row {
  const {geodetic, uncertainty95M} = position;
  const degrees = degreeDecimals(decimals.plan);
  const height = geodetic.ellipsoidalHeightM;
  const sameDay = fromUtc.slice(0, 10) === toUtc.slice(0, 10);
  return row(
    `${formatUtc(fromUtc)} to ${sameDay ? formatUtc(toUtc).slice(11) : formatUtc(toUtc)}${spanBesideUtc(fromUtc, toUtc, options.timeZone)}`,
    [
      numberCell(String(epochs)),
      numberCell(fixed(geodetic.latitudeDeg, degrees)),
      numberCell(fixed(geodetic.longitudeDeg, degrees)),
      numberCell(height === null ? '' : fixed(height * largeUnit(options.units).perM, decimals.up)),
      numberCell(column.uncertainty(uncertainty95M?.horizontalRadius)),
      numberCell(column.uncertainty(uncertainty95M?.up)),
    ],
  );
}

/** What the position is of and what it rests on, in a line or two below the coordinates. */
export function positionNotes(context: ReportContext): string[] {
  const {result} = context;
  const position = result.position ?? result.segments[0]?.position ?? null;
  const notes: string[] = [];
  if (position !== null) {
    const height = result.occupation.antennaHeightM;
    notes.push(
      position.of === 'mark' && height !== null
        ? `Reduced to the mark by an antenna height of ${formatLength(height)}.`
        : position.of === 'mark'
          ? 'The position is that of the mark.'
          : position.of === 'antenna, point not stated'
            ? 'Nobody stated which point of the antenna the position is of, nor its height above the mark.'
            : `The position is that of the ${position.of}, not of a mark below it.`,
    );
  }
  if (position?.grid) {
    const {convergenceDeg, pointScale, combinedFactor} = position.grid;
    const combined =
      combinedFactor === null ? '' : `, combined factor ${combinedFactor.toFixed(8)}`;
    notes.push(
      `Grid north bears ${fixed(convergenceDeg, 5)}° from true north; ${pointScale === null ? 'its scale depends on the direction' : `point scale ${pointScale.toFixed(8)}`}${combined}.`,
    );
  }
  const missing = result.budget.filter((line) => line.standardUncertaintyM === null);
  if (missing.length > 0 && position?.uncertainty95M) {
    notes.push(`The 95 % figures leave out: ${missing.map(({source}) => source).join(', ')}.`);
  }
  if (hasMark(context) && result.reference?.name !== null && result.reference !== null) {
    notes.push(`Offsets are measured minus reference; the reference is ${result.reference.name}.`);
  }
  return notes;
}
