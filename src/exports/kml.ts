import type {GeodeticPosition, Result} from '../occupation/result.ts';
import {fixed} from '../wording/numbers.ts';
import {
  cautionTexts,
  datumRemark,
  ellipseOutline,
  type MappedPosition,
  mappedPositions,
  positionName,
} from './features.ts';

const HEIGHT_REMARK =
  'Shown on the ground: KML heights are above sea level, the ellipsoidal height stands in the data.';
/** Lines in pixels and colours as aabbggrr, as KML has them. */
const STYLES = `<Style id="position"><LineStyle><color>ff8a4b1f</color><width>2</width></LineStyle><PolyStyle><color>408a4b1f</color></PolyStyle></Style>
<Style id="offset"><LineStyle><color>ff3c3cb4</color><width>2</width></LineStyle></Style>`;

/**
 * The position, its 95 % ellipse, the mark and the line between them as KML.
 *
 * All geometry is clamped to the ground, because KML heights are orthometric and the position's is
 * ellipsoidal; the heights stand in the extended data with their kind.
 * Source: OGC 07-147r2, OGC KML 2.2 (2008), sections 9.11, 10.1 to 10.8 and 16.9; from memory.
 */
export function resultKml(result: Result): string {
  const placemarks = mappedPositions(result).flatMap((mapped) => placemarksOf(result, mapped));
  const mark = markOf(result);
  if (mark !== undefined) {
    const name = result.reference?.name ?? 'Mark';
    placemarks.push(placemark(name, point(mark), [['kind', 'mark'], ...heightData(mark)]));
  }
  const cautions = cautionTexts(result).map(escaped).join('\n');
  return `<?xml version="1.0" encoding="UTF-8"?>
<kml xmlns="http://www.opengis.net/kml/2.2">
<Document>
<name>${escaped(result.occupation.mark ?? 'Position')}</name>
<description>${cautions}</description>
${STYLES}
${placemarks.join('\n')}
</Document>
</kml>
`;
}

type Data = readonly (readonly [name: string, value: string | number | null])[];

function placemarksOf(result: Result, mapped: MappedPosition): string[] {
  const {position, fromUtc, toUtc} = mapped;
  const name = positionName(result, mapped);
  const {uncertainty95M} = position;
  const data: Data = [
    ['kind', 'position'],
    ['of', position.of],
    ['frame', position.frame],
    ['coordinateEpoch', position.coordinateEpoch],
    ['observedUtc', position.observedUtc],
    ['fromUtc', fromUtc ?? result.epochs.firstUtc],
    ['toUtc', toUtc ?? result.epochs.lastUtc],
    ...heightData(position.geodetic),
    ['orthometricHeightM', position.orthometricHeightM],
    ['uncertainty95HorizontalRadiusM', uncertainty95M?.horizontalRadius ?? null],
    ['uncertainty95UpM', uncertainty95M?.up ?? null],
    ['stability', result.stability.verdict],
    ['verdict', result.verdict],
    ['coordinates', datumRemark(position)],
    ['heights', HEIGHT_REMARK],
  ];
  const placemarks = [placemark(name, point(position.geodetic), data)];
  if (position.ellipse95 !== null) {
    const outline = ellipseOutline(position.ellipse95, position.geodetic)
      .map((vertex) => coordinates(vertex, 11))
      .join(' ');
    const {semiMajorM, semiMinorM, azimuthDeg} = position.ellipse95;
    placemarks.push(
      placemark(
        `${name}, 95 % ellipse`,
        `<Polygon><altitudeMode>clampToGround</altitudeMode><outerBoundaryIs><LinearRing><coordinates>${outline}</coordinates></LinearRing></outerBoundaryIs></Polygon>`,
        [
          ['kind', 'ellipse'],
          ['semiMajorM', semiMajorM],
          ['semiMinorM', semiMinorM],
          ['azimuthDeg', azimuthDeg],
        ],
        'position',
      ),
    );
  }
  const mark = markOf(result);
  if (mark !== undefined) {
    const line = `${coordinates(mark, 10)} ${coordinates(position.geodetic, 10)}`;
    placemarks.push(
      placemark(
        `From the mark to ${name}`,
        `<LineString><altitudeMode>clampToGround</altitudeMode><coordinates>${line}</coordinates></LineString>`,
        [['kind', 'offset']],
        'offset',
      ),
    );
  }
  return placemarks;
}

function placemark(name: string, geometry: string, data: Data, style?: string): string {
  const items = data
    .filter(([, value]) => value !== null)
    .map(([key, value]) => `<Data name="${key}"><value>${escaped(String(value))}</value></Data>`)
    .join('');
  const url = style === undefined ? '' : `<styleUrl>#${style}</styleUrl>`;
  return `<Placemark><name>${escaped(name)}</name>${url}<ExtendedData>${items}</ExtendedData>${geometry}</Placemark>`;
}

function point(place: GeodeticPosition): string {
  return `<Point><altitudeMode>clampToGround</altitudeMode><coordinates>${coordinates(place, 10)}</coordinates></Point>`;
}

function heightData({ellipsoidalHeightM}: GeodeticPosition): Data {
  return [
    ['ellipsoidalHeightM', ellipsoidalHeightM === null ? null : fixed(ellipsoidalHeightM, 4)],
  ];
}

function markOf({reference}: Result): GeodeticPosition | undefined {
  return reference?.from === 'mark' ? reference.geodetic : undefined;
}

function coordinates(
  {longitudeDeg, latitudeDeg}: {longitudeDeg: number; latitudeDeg: number},
  decimals: number,
): string {
  return `${fixed(longitudeDeg, decimals)},${fixed(latitudeDeg, decimals)}`;
}

/** Text for XML 1.0, which has no place for most control characters and lone surrogates. */
function escaped(text: string): string {
  let clean = '';
  for (const character of text.toWellFormed()) {
    const code = character.codePointAt(0) ?? 0;
    const isAllowed =
      code >= 0x20 ? code !== 0xfffe && code !== 0xffff : [9, 10, 13].includes(code);
    clean += isAllowed ? (ENTITIES[character] ?? character) : '\ufffd';
  }
  return clean;
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&apos;',
};
