import {ellipsoid, WGS84} from '../../../src/geodesy/ellipsoid.ts';
import {ecefFromGeodetic, geodeticFromEcef} from '../../../src/geodesy/geocentric.ts';
import {transverseMercator, utmGrid, utmZoneOf} from '../../../src/geodesy/transverse-mercator.ts';
import type {Enu} from '../../../src/geodesy/types.ts';
import type {DiagnosisInput, PlanPlace} from '../../../src/occupation/diagnosis/input.ts';
import {fullInput, NO_ANTENNA, offsetOf, signature} from './check-input.ts';

/** A blunder planted at a site: what the sheet knows, and the offset that it leaves. */
export interface Planted {
  readonly code: string;
  readonly input: DiagnosisInput;
  readonly offset: Enu;
}

const RADIANS = Math.PI / 180;
const HEIGHT_M = 300;

/** East and north of a place seen from another at one height, by geocentric differences. */
export function seenFrom(mark: PlanPlace, place: PlanPlace, upM = 0): Enu {
  const at = (p: PlanPlace) => ecefFromGeodetic({...p, ellipsoidalHeightM: HEIGHT_M}, WGS84);
  const [a, b] = [at(mark), at(place)];
  const [x, y, z] = [b.xM - a.xM, b.yM - a.yM, b.zM - a.zM];
  const lat = mark.latitudeDeg * RADIANS;
  const lon = mark.longitudeDeg * RADIANS;
  return {
    eastM: -Math.sin(lon) * x + Math.cos(lon) * y,
    northM:
      -Math.sin(lat) * Math.cos(lon) * x - Math.sin(lat) * Math.sin(lon) * y + Math.cos(lat) * z,
    upM,
  };
}

/** Every signature of the worked examples that one check can show, at one site. */
export function plantedAt(site: PlanPlace): Planted[] {
  const input = fullInput({markPlan: site});
  return [...heights(input), ...places(input, site), ...laidOff(input)];
}

function withHeight(input: DiagnosisInput, heightM: number, readingM = heightM): DiagnosisInput {
  return {
    ...input,
    antenna: {
      ...(input.antenna ?? NO_ANTENNA),
      arpAboveMarkM: heightM,
      reading: {lengthM: readingM, stepM: 0.001, unitM: 1},
    },
  };
}

function heights(input: DiagnosisInput): Planted[] {
  const two = withHeight(input, 2);
  const inputs: Record<string, DiagnosisInput> = {
    V01: {...withHeight(input, 1.8527)},
    V09: withHeight(input, 2.0625),
    V14: withHeight(input, 1.8),
    V15: withHeight(input, 1.352),
  };
  const printed = ['V01', 'V02', 'V03', 'V04', 'V05', 'V06', 'V07', 'V08', 'V09', 'V10'];
  return [...printed, 'V11', 'V12', 'V13', 'V14', 'V15'].map((code) => ({
    code,
    input:
      code === 'V10'
        ? {...two, separation: {known: [{source: 'mark', separationM: 48}], missingInLog: false}}
        : (inputs[code] ?? two),
    offset: offsetOf(signature(code)),
  }));
}

/** Signatures that are recomputed from the place, apart from the hypotheses. */
function places(input: DiagnosisInput, site: PlanPlace): Planted[] {
  const {latitudeDeg, longitudeDeg} = site;
  const moved = (code: string, place: PlanPlace, upM = 0): Planted => ({
    code,
    input,
    offset: seenFrom(site, place, upM),
  });
  const reread = (read: (degrees: number) => number): PlanPlace => ({
    latitudeDeg: Math.sign(latitudeDeg) * read(Math.abs(latitudeDeg)),
    longitudeDeg,
  });
  const minutes = (degrees: number) => (degrees - Math.floor(degrees)) * 60;
  const planted = [
    surveyFoot(input, site),
    moved('H02', {latitudeDeg: -latitudeDeg, longitudeDeg}),
    moved('H03', {latitudeDeg, longitudeDeg: -longitudeDeg}),
    moved(
      'H05',
      reread((degrees) => Math.floor(degrees) + minutes(degrees) / 100),
    ),
    moved(
      'H06',
      reread((degrees) => Math.floor(degrees) + ((degrees % 1) * 100) / 60),
    ),
    moved(
      'H07',
      reread((degrees) => {
        const whole = Math.floor(minutes(degrees));
        return Math.floor(degrees) + whole / 100 + ((minutes(degrees) - whole) * 60) / 10_000;
      }),
    ),
    moved('H08', {latitudeDeg, longitudeDeg: longitudeDeg - 6}),
    moved('H08', {latitudeDeg, longitudeDeg: longitudeDeg + 6}),
    ...otherEllipsoids(input, site),
    moved('H10', {
      latitudeDeg:
        Math.atan((1 - WGS84.flattening) ** 2 * Math.tan(latitudeDeg * RADIANS)) / RADIANS,
      longitudeDeg,
    }),
  ];
  return Math.abs(longitudeDeg) <= 90
    ? [...planted, moved('H04', {latitudeDeg: longitudeDeg, longitudeDeg: latitudeDeg})]
    : planted;
}

function surveyFoot(input: DiagnosisInput, site: PlanPlace): Planted {
  const zone = utmZoneOf(site);
  if (zone === undefined) throw new Error('beyond UTM');
  const grid = transverseMercator(utmGrid(zone));
  const {eastingM, northingM} = grid.forward(site);
  const read = grid.inverse({
    eastingM: eastingM * (1 + 2.000004e-6),
    northingM: northingM * (1 + 2.000004e-6),
  });
  return {code: 'H01', input, offset: seenFrom(site, read)};
}

function otherEllipsoids(input: DiagnosisInput, site: PlanPlace): Planted[] {
  const ecef = ecefFromGeodetic({...site, ellipsoidalHeightM: HEIGHT_M}, WGS84);
  return [ellipsoid(6378388, 297), ellipsoid(6377397.155, 299.1528128)].map((other) => {
    const read = geodeticFromEcef(ecef, other);
    return {
      code: 'H09',
      input,
      offset: seenFrom(site, read, read.ellipsoidalHeightM - HEIGHT_M),
    };
  });
}

/** Of the point laid off 10 m from the mark: |d| as printed, across the middle direction. */
function laidOff(input: DiagnosisInput): Planted[] {
  const {d = 0, inputs} = signature('O01');
  const azimuth = Math.atan2(6, 8) + ((inputs.D_deg ?? 0) / 2) * RADIANS;
  return [
    {
      code: 'O01',
      input,
      offset: {eastM: d * Math.cos(azimuth), northM: -d * Math.sin(azimuth), upM: 0},
    },
  ];
}
