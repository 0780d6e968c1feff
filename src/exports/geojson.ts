import type {GeodeticPosition, Position, Result} from '../occupation/result.ts';
import {
  cautionTexts,
  datumRemark,
  ellipseOutline,
  type MappedPosition,
  mappedPositions,
  positionName,
  rounded,
} from './features.ts';

/** 1e-10 degrees are 0.01 mm on the ground; an ellipse of millimetres needs one digit more. */
const POSITION_DECIMALS = 10;
const OUTLINE_DECIMALS = 11;
const HEIGHT_DECIMALS = 4;

/**
 * The position, its 95 % ellipse, the mark and the line between them as GeoJSON.
 *
 * Coordinates are longitude, latitude and, where it is known, the ellipsoidal height. They stay in
 * the frame of the position: the properties name it, because RFC 7946 takes every coordinate for
 * WGS 84. Without a position the collection is empty and carries the cautions alone.
 * Source: RFC 7946 (2016), sections 3.1, 3.1.6 (outer rings anticlockwise), 4 and 6 (foreign
 * members).
 */
export function resultGeoJson(result: Result): string {
  const mapped = mappedPositions(result);
  const features = mapped.flatMap((one) => featuresOf(result, one));
  const mark = markFeature(result);
  const collection = {
    type: 'FeatureCollection',
    features: mark === undefined ? features : [...features, mark],
    program: `${result.program.name} ${result.program.version}`,
    verdict: result.verdict,
    stability: result.stability.verdict,
    cautions: cautionTexts(result),
  };
  return `${JSON.stringify(collection, undefined, 1)}\n`;
}

function featuresOf(result: Result, mapped: MappedPosition): object[] {
  const {position} = mapped;
  const name = positionName(result, mapped);
  const features: object[] = [
    feature(
      {type: 'Point', coordinates: coordinates(position.geodetic)},
      {
        kind: 'position',
        name,
        ...propertiesOf(result, mapped),
      },
    ),
  ];
  if (position.ellipse95 !== null) {
    const ring = ellipseOutline(position.ellipse95, position.geodetic).map(
      ({longitudeDeg, latitudeDeg}) => [
        rounded(longitudeDeg, OUTLINE_DECIMALS),
        rounded(latitudeDeg, OUTLINE_DECIMALS),
      ],
    );
    features.push(
      feature(
        {type: 'Polygon', coordinates: [ring]},
        {kind: 'ellipse', name: `${name}, 95 % ellipse`, confidence: 0.95, ...position.ellipse95},
      ),
    );
  }
  const mark = markOf(result);
  if (mark !== undefined) {
    const line = [coordinates(mark), coordinates(position.geodetic)].map(([lon, lat]) => [
      lon,
      lat,
    ]);
    features.push(
      feature(
        {type: 'LineString', coordinates: line},
        {
          kind: 'offset',
          name: `From the mark to ${name}`,
          offsetM: result.comparison?.offsetM ?? null,
        },
      ),
    );
  }
  return features;
}

function propertiesOf(result: Result, {position, fromUtc, toUtc}: MappedPosition): object {
  return {
    of: position.of,
    ...frameProperties(position),
    observedUtc: position.observedUtc,
    fromUtc: fromUtc ?? result.occupation.startUtc ?? result.epochs.firstUtc,
    toUtc: toUtc ?? result.occupation.endUtc ?? result.epochs.lastUtc,
    epochsUsed: result.epochs.used,
    orthometricHeightM: position.orthometricHeightM,
    uncertainty95M: position.uncertainty95M,
    verdict: result.verdict,
    stability: result.stability.verdict,
    cautions: cautionTexts(result),
  };
}

function frameProperties(position: Position): object {
  return {
    frame: position.frame,
    frameFrom: position.frameFrom,
    coordinateEpoch: position.coordinateEpoch,
    coordinatesRemark: datumRemark(position),
  };
}

function markFeature(result: Result): object | undefined {
  const mark = markOf(result);
  if (mark === undefined) return undefined;
  return feature(
    {type: 'Point', coordinates: coordinates(mark)},
    {kind: 'mark', name: result.reference?.name ?? 'Mark'},
  );
}

function markOf({reference}: Result): GeodeticPosition | undefined {
  return reference?.from === 'mark' ? reference.geodetic : undefined;
}

function coordinates({latitudeDeg, longitudeDeg, ellipsoidalHeightM}: GeodeticPosition): number[] {
  const plan = [rounded(longitudeDeg, POSITION_DECIMALS), rounded(latitudeDeg, POSITION_DECIMALS)];
  return ellipsoidalHeightM === null
    ? plan
    : [...plan, rounded(ellipsoidalHeightM, HEIGHT_DECIMALS)];
}

function feature(geometry: object, properties: object): object {
  return {type: 'Feature', geometry, properties};
}
