import type {
  Mark,
  MarkCoordinates,
  MarkUncertainty,
  MarkVelocity,
  WitnessMark,
} from '../fieldbook/mark.ts';
import type {SheetItem} from './result.ts';

const SECTION = 'The mark, as its record gives it';

/** The record of the mark item by item, blank ones too, so that a report has its line. */
export function markItems(mark: Mark | null): SheetItem[] {
  if (mark === null) return [];
  const {coordinates} = mark;
  const values: readonly (readonly [item: string, value: string | null])[] = [
    ['name', mark.name],
    ['other names', mark.otherNames.length === 0 ? null : mark.otherNames.join('; ')],
    ['description', mark.description ?? null],
    ...planItems(coordinates),
    ['ellipsoidal height', metres(ellipsoidalHeightOf(coordinates))],
    ['orthometric height', metres(coordinates.orthometricHeightM)],
    ['separation', metres(mark.separationM)],
    ['frame', mark.frame ?? null],
    ['coordinate epoch', mark.coordinateEpoch === undefined ? null : String(mark.coordinateEpoch)],
    ['vertical datum', mark.verticalDatum ?? null],
    ['geoid model', mark.geoidModel ?? null],
    ['velocity', mark.velocity === undefined ? null : velocityText(mark.velocity)],
    [
      'standard uncertainty',
      mark.uncertainty === undefined ? null : uncertaintyText(mark.uncertainty),
    ],
    [
      'witness marks',
      mark.witnessMarks.length === 0 ? null : mark.witnessMarks.map(witnessText).join('; '),
    ],
  ];
  return values.map(([item, value]) => ({section: SECTION, item, value}));
}

function planItems(coordinates: MarkCoordinates): (readonly [string, string])[] {
  switch (coordinates.kind) {
    case 'geocentric':
      return [
        ['x', `${coordinates.xM} m`],
        ['y', `${coordinates.yM} m`],
        ['z', `${coordinates.zM} m`],
      ];
    case 'geodetic':
      return [
        ['latitude', `${coordinates.latitudeDeg}°`],
        ['longitude', `${coordinates.longitudeDeg}°`],
      ];
    case 'grid':
      return [
        ['projection', coordinates.projection],
        ['easting', `${coordinates.eastingM} m`],
        ['northing', `${coordinates.northingM} m`],
      ];
    case 'height only':
      return [];
  }
}

function ellipsoidalHeightOf(coordinates: MarkCoordinates): number | undefined {
  return coordinates.kind === 'geocentric' ? undefined : coordinates.ellipsoidalHeightM;
}

function metres(valueM: number | undefined): string | null {
  return valueM === undefined ? null : `${valueM} m`;
}

/** Free of the last bits of a conversion from the unit that was written. */
function plain(value: number): string {
  return String(Number(value.toPrecision(12)));
}

function velocityText(velocity: MarkVelocity): string {
  const perYear =
    velocity.axes === 'xyz'
      ? {x: velocity.xMPerYear, y: velocity.yMPerYear, z: velocity.zMPerYear}
      : {east: velocity.eastMPerYear, north: velocity.northMPerYear, up: velocity.upMPerYear};
  return Object.entries(perYear)
    .map(([axis, mPerYear]) => `${axis} ${plain(mPerYear * 1000)} mm/yr`)
    .join(', ');
}

function uncertaintyText(uncertainty: MarkUncertainty): string {
  if (uncertainty.kind === 'standard') {
    const {eastM, northM, upM} = uncertainty;
    return Object.entries({east: eastM, north: northM, up: upM})
      .flatMap(([axis, m]) => (m === undefined ? [] : [`${axis} ${plain(m * 1000)} mm`]))
      .join(', ');
  }
  const names = uncertainty.axes === 'xyz' ? ['x', 'y', 'z'] : ['east', 'north', 'up'];
  const roots = names.map((axis, i) => {
    const varianceM2 = uncertainty.covarianceM2[i]?.[i] ?? 0;
    return `${axis} ${(Math.sqrt(varianceM2) * 1000).toFixed(2)} mm`;
  });
  return `${roots.join(', ')}; ${uncertainty.correlationsKnown ? 'with its covariances' : 'variances only'}`;
}

function witnessText({name, position, upM}: WitnessMark): string {
  const height = upM === undefined ? [] : [`up ${upM} m`];
  return [name, ...positionParts(position), ...height].join(' ');
}

function positionParts(position: WitnessMark['position']): string[] {
  switch (position?.kind) {
    case undefined:
      return [];
    case 'offset':
      return [`east ${position.eastM} m`, `north ${position.northM} m`];
    case 'distance':
      return [`at ${position.distanceM} m`];
    case 'distance and bearing':
      return [`at ${position.distanceM} m`, `${position.bearingDeg}° from ${position.bearingFrom}`];
  }
}
