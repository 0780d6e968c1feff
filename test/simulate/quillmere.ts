import type {NmeaOptions} from './nmea-writer.ts';
import type {Place} from './place.ts';
import type {Scenario} from './scenarios.ts';

/**
 * The invented harbour of the sample logs: four marks on an island that does not exist, in open
 * ocean. Ellipsoidal heights are orthometric heights plus a separation of −14.620 m.
 */
export const QUILLMERE = {
  QUAY: {latitudeDeg: 41.7012345678, longitudeDeg: -152.3104567891, ellipsoidalHeightM: -11.208},
  SLIP: {latitudeDeg: 41.7024118203, longitudeDeg: -152.3086402517, ellipsoidalHeightM: -12.744},
  MOLE: {latitudeDeg: 41.6998870416, longitudeDeg: -152.3069815542, ellipsoidalHeightM: -9.39},
  CHAPEL: {latitudeDeg: 41.7041567729, longitudeDeg: -152.3121980376, ellipsoidalHeightM: 6.424},
} as const satisfies Record<string, Place>;

export type QuillmereMark = keyof typeof QUILLMERE;

/** Where the antenna reference point stands, plumb over a mark. */
export function above(mark: QuillmereMark, antennaHeightM: number): Place {
  const place = QUILLMERE[mark];
  return {...place, ellipsoidalHeightM: place.ellipsoidalHeightM + antennaHeightM};
}

const COMMON_TERMS = [
  {kind: 'white', sdM: 0.0018},
  {kind: 'gauss-markov', sdM: 0.0025, tauS: 100},
  {kind: 'gauss-markov', sdM: 0.002, tauS: 700},
] as const;

/** Errors of a fixed solution close to its base: millimetres, with memories of 2 and 12 minutes. */
export function harbourScenario(name: string, durationS: number, intervalS: number): Scenario {
  const up = COMMON_TERMS.map((term) => ({...term, sdM: 1.9 * term.sdM}));
  return {
    name,
    about: 'fixed solution in the harbour',
    durationS,
    intervalS,
    noise: {east: COMMON_TERMS, north: COMMON_TERMS, up},
  };
}

/** How the receiver of the harbour is set up. */
export const HARBOUR_NMEA: NmeaOptions = {
  place: QUILLMERE.MOLE,
  separationM: -14.6,
  date: {year: 2026, month: 5, day: 12},
  startS: 0,
  minuteDecimals: 8,
  heightDecimals: 4,
  separationDecimals: 3,
  sentences: [
    ['GGA', 1],
    ['RMC', 1],
    ['GST', 1],
    ['GSA', 10],
    ['GSV', 30],
    ['ZDA', 60],
  ],
  systems: ['gps', 'glonass', 'galileo', 'beidou'],
  claimedSigmaM: {east: 0.0061, north: 0.0068, up: 0.0123},
  correctionStation: '0731',
};
