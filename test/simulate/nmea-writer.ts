import {
  type Dilution,
  dilutionOf,
  type SatelliteInView,
  type SystemName,
  satellitesInView,
} from './constellation.ts';
import {
  type CivilDate,
  civilTime,
  latitudeFields,
  longitudeFields,
  sentence,
} from './nmea-fields.ts';
import type {SimulatedOccupation} from './occupation.ts';
import {type Place, placeNear} from './place.ts';

export type SentenceType =
  | 'GGA'
  | 'GNS'
  | 'RMC'
  | 'GSA'
  | 'GSV'
  | 'GST'
  | 'ZDA'
  | 'VTG'
  | 'GLL'
  | 'DTM';

export interface NmeaOptions {
  /** Where the offsets of the occupation start from: the antenna reference point. */
  readonly place: Place;
  readonly separationM: number;
  readonly date: CivilDate;
  /** Time of day of the first epoch, UTC. */
  readonly startS: number;
  readonly minuteDecimals: number;
  readonly heightDecimals: number;
  readonly separationDecimals: number;
  /** Which sentences, in this order, and every how many seconds. */
  readonly sentences: readonly (readonly [SentenceType, number])[];
  readonly systems: readonly SystemName[];
  /** What the receiver claims for its own standard deviations. */
  readonly claimedSigmaM: {readonly east: number; readonly north: number; readonly up: number};
  readonly correctionStation: string;
}

/** Everything about one epoch that its sentences print. */
interface Burst {
  readonly time: string;
  readonly date: string;
  readonly dateFields: string;
  readonly latitude: string;
  readonly longitude: string;
  readonly altitude: string;
  readonly separation: string;
  readonly quality: number;
  readonly inView: readonly SatelliteInView[];
  readonly used: readonly SatelliteInView[];
  readonly dilution: Dilution;
  readonly ageS: string;
  readonly options: NmeaOptions;
}

/** Satellites lower than this are tracked but not used. */
const MASK_DEG = 12;
/** How long one picture of the sky serves: elevations move by 0.1 degree in that time. */
const SKY_S = 10;

/** The sentences of an occupation, without line ends, one burst an epoch. */
export function nmeaSentences(occupation: SimulatedOccupation, options: NmeaOptions): string[] {
  const lines: string[] = [];
  let skyAtS = Number.NEGATIVE_INFINITY;
  let inView: SatelliteInView[] = [];
  let dilution: Dilution = {pdop: 0, hdop: 0, vdop: 0};
  for (let i = 0; i < occupation.elapsedS.length; i++) {
    const elapsedS = occupation.elapsedS[i]!;
    const atS = options.startS + elapsedS;
    if (elapsedS >= skyAtS + SKY_S) {
      skyAtS = elapsedS;
      inView = satellitesInView(options.place, atS, 5).filter((satellite) =>
        options.systems.includes(satellite.system),
      );
      dilution = dilutionOf(inView.filter(isUsed));
    }
    const place = placeNear(options.place, {
      eastM: occupation.eastM[i]!,
      northM: occupation.northM[i]!,
      upM: occupation.upM[i]!,
    });
    const altitudeM = place.ellipsoidalHeightM - options.separationM;
    const burst: Burst = {
      ...civilTime(options.date, atS),
      latitude: latitudeFields(place.latitudeDeg, options.minuteDecimals),
      longitude: longitudeFields(place.longitudeDeg, options.minuteDecimals),
      altitude: altitudeM.toFixed(options.heightDecimals),
      separation: options.separationM.toFixed(options.separationDecimals),
      quality: occupation.fixClass[i]!,
      inView,
      used: inView.filter(isUsed),
      dilution,
      ageS: (1 + (Math.round(atS) % 3) * 0.2).toFixed(1),
      options,
    };
    for (const [type, everyS] of options.sentences) {
      if (isDue(elapsedS, everyS)) lines.push(...sentencesOf(type, burst));
    }
  }
  return lines;
}

function isUsed(satellite: SatelliteInView): boolean {
  return satellite.elevationDeg >= MASK_DEG;
}

function isDue(elapsedS: number, everyS: number): boolean {
  const remainder = elapsedS % everyS;
  return remainder < 1e-6 || everyS - remainder < 1e-6;
}

function sentencesOf(type: SentenceType, burst: Burst): string[] {
  switch (type) {
    case 'GGA':
      return [sentence(gga(burst))];
    case 'GNS':
      return [sentence(gns(burst))];
    case 'RMC':
      return [sentence(rmc(burst))];
    case 'GSA':
      return gsa(burst);
    case 'GSV':
      return gsv(burst);
    case 'GST':
      return [sentence(gst(burst))];
    case 'ZDA':
      return [sentence(`GNZDA,${burst.time},${burst.dateFields},00,00`)];
    case 'VTG':
      return [sentence(`GNVTG,,T,,M,0.004,N,0.007,K,${modeOf(burst.quality)}`)];
    case 'GLL':
      return [
        sentence(
          `GNGLL,${burst.latitude},${burst.longitude},${burst.time},A,${modeOf(burst.quality)}`,
        ),
      ];
    case 'DTM':
      return [sentence('GNDTM,W84,,0.0,N,0.0,E,0.0,W84')];
  }
}

function gga(burst: Burst): string {
  const {time, latitude, longitude, quality, used, dilution, altitude, separation} = burst;
  const place = `${time},${latitude},${longitude},${quality}`;
  const geometry = `${String(used.length).padStart(2, '0')},${dilution.hdop.toFixed(2)}`;
  return `GNGGA,${place},${geometry},${altitude},M,${separation},M,${corrections(burst)}`;
}

function gns(burst: Burst): string {
  const {time, latitude, longitude, quality, used, dilution, altitude, separation} = burst;
  const modes = SYSTEMS.map(({system}) =>
    used.some((satellite) => satellite.system === system) ? modeOf(quality) : 'N',
  ).join('');
  const geometry = `${String(used.length).padStart(2, '0')},${dilution.hdop.toFixed(2)}`;
  const place = `${time},${latitude},${longitude},${modes}`;
  return `GNGNS,${place},${geometry},${altitude},${separation},${corrections(burst)},V`;
}

function corrections(burst: Burst): string {
  return burst.quality === 1 ? ',' : `${burst.ageS},${burst.options.correctionStation}`;
}

function rmc(burst: Burst): string {
  const {time, latitude, longitude, date, quality} = burst;
  return `GNRMC,${time},A,${latitude},${longitude},0.004,,${date},,,${modeOf(quality)},V`;
}

/** Mode indicator of RMC, GLL, VTG and GNS that goes with a GGA quality. */
function modeOf(quality: number): string {
  return {1: 'A', 2: 'D', 4: 'R', 5: 'F'}[quality] ?? 'N';
}

/** Systems in the order of their NMEA 0183 v4.11 system ids, with the signal id of GSV. */
const SYSTEMS: readonly {
  readonly system: SystemName;
  readonly systemId: number;
  readonly talker: string;
  readonly signalId: number;
}[] = [
  {system: 'gps', systemId: 1, talker: 'GP', signalId: 1},
  {system: 'glonass', systemId: 2, talker: 'GL', signalId: 1},
  {system: 'galileo', systemId: 3, talker: 'GA', signalId: 7},
  {system: 'beidou', systemId: 4, talker: 'GB', signalId: 1},
];

function gsa(burst: Burst): string[] {
  const {pdop, hdop, vdop} = burst.dilution;
  const dops = `${pdop.toFixed(2)},${hdop.toFixed(2)},${vdop.toFixed(2)}`;
  return SYSTEMS.flatMap(({system, systemId}) => {
    const ids = burst.used
      .filter((satellite) => satellite.system === system)
      .map((satellite) => String(satellite.id).padStart(2, '0'));
    if (ids.length === 0) return [];
    const fields = [...ids.slice(0, 12), ...new Array<string>(12).fill('')].slice(0, 12);
    return [sentence(`GNGSA,A,3,${fields.join(',')},${dops},${systemId}`)];
  });
}

function gsv(burst: Burst): string[] {
  return SYSTEMS.flatMap(({system, talker, signalId}) => {
    const seen = burst.inView.filter((satellite) => satellite.system === system);
    const messages = Math.ceil(seen.length / 4);
    return Array.from({length: messages}, (_, k) => {
      const satellites = seen.slice(4 * k, 4 * k + 4).map(satelliteFields);
      const head = `${talker}GSV,${messages},${k + 1},${String(seen.length).padStart(2, '0')}`;
      return sentence(`${head},${satellites.join(',')},${signalId}`);
    });
  });
}

function satelliteFields(satellite: SatelliteInView): string {
  const elevation = String(Math.round(satellite.elevationDeg)).padStart(2, '0');
  const azimuth = String(Math.round(satellite.azimuthDeg) % 360).padStart(3, '0');
  const signal = String(Math.round(satellite.carrierToNoiseDbHz)).padStart(2, '0');
  return `${String(satellite.id).padStart(2, '0')},${elevation},${azimuth},${signal}`;
}

/** GST with an ellipse along the axes: the larger of the two is the semi-major axis. */
function gst(burst: Burst): string {
  const factor = burst.quality === 4 ? 1 : 20;
  const {east, north, up} = burst.options.claimedSigmaM;
  const print = (sigmaM: number) => (sigmaM * factor).toFixed(4);
  const [major, minor] = [Math.max(east, north), Math.min(east, north)];
  const azimuth = east >= north ? '90.0' : '0.0';
  const ellipse = `${print(major)},${print(minor)},${azimuth}`;
  return `GNGST,${burst.time},${print(major)},${ellipse},${print(north)},${print(east)},${print(up)}`;
}
