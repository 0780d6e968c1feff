import {randomFrom} from './random.ts';

/** A satellite above the horizon of a place. */
export interface SatelliteInView {
  readonly system: SystemName;
  /** Number as NMEA 0183 v4.11 gives it. */
  readonly id: number;
  readonly elevationDeg: number;
  readonly azimuthDeg: number;
  readonly carrierToNoiseDbHz: number;
}

export type SystemName = 'gps' | 'glonass' | 'galileo' | 'beidou';

interface Walker {
  readonly system: SystemName;
  readonly firstId: number;
  readonly planes: number;
  readonly perPlane: number;
  readonly inclinationDeg: number;
  readonly radiusM: number;
  readonly nodeDeg: number;
}

/**
 * Invented constellations on circular orbits with the planes, inclinations and radii of the real
 * ones (interface documents of the four systems; from memory). They rise and set as real ones do,
 * but no satellite is where its namesake is.
 */
const WALKERS: readonly Walker[] = [
  {
    system: 'gps',
    firstId: 1,
    planes: 6,
    perPlane: 5,
    inclinationDeg: 55,
    radiusM: 26.56e6,
    nodeDeg: 17,
  },
  {
    system: 'glonass',
    firstId: 65,
    planes: 3,
    perPlane: 8,
    inclinationDeg: 64.8,
    radiusM: 25.51e6,
    nodeDeg: 40,
  },
  {
    system: 'galileo',
    firstId: 1,
    planes: 3,
    perPlane: 8,
    inclinationDeg: 56,
    radiusM: 29.6e6,
    nodeDeg: 5,
  },
  {
    system: 'beidou',
    firstId: 19,
    planes: 3,
    perPlane: 8,
    inclinationDeg: 55,
    radiusM: 27.91e6,
    nodeDeg: 77,
  },
];

const GRAVITY_M3_PER_S2 = 3.986005e14;
const EARTH_TURN_RAD_PER_S = 7.2921151467e-5;
const EARTH_RADIUS_M = 6.371e6;
const DEG = Math.PI / 180;

/**
 * The satellites at least `maskDeg` above the horizon, system by system, by number.
 *
 * @param seconds  since any fixed origin
 */
export function satellitesInView(
  place: {readonly latitudeDeg: number; readonly longitudeDeg: number},
  seconds: number,
  maskDeg: number,
): SatelliteInView[] {
  const inView: SatelliteInView[] = [];
  for (const walker of WALKERS) {
    for (let index = 0; index < walker.planes * walker.perPlane; index++) {
      const {elevationDeg, azimuthDeg} = direction(place, walker, index, seconds);
      if (elevationDeg < maskDeg) continue;
      const id = walker.firstId + index;
      const minute = Math.floor(seconds / 60);
      const fading = randomFrom(minute, `${walker.system} ${id}`).between(-1.5, 1.5);
      const carrierToNoiseDbHz = 33 + 16 * Math.sin(elevationDeg * DEG) + fading;
      inView.push({system: walker.system, id, elevationDeg, azimuthDeg, carrierToNoiseDbHz});
    }
  }
  return inView;
}

function direction(
  place: {readonly latitudeDeg: number; readonly longitudeDeg: number},
  walker: Walker,
  index: number,
  seconds: number,
) {
  const plane = Math.floor(index / walker.perPlane);
  const slot = index % walker.perPlane;
  const motion = Math.sqrt(GRAVITY_M3_PER_S2 / walker.radiusM ** 3);
  // Half a step of phase between planes keeps satellites from crossing the equator together.
  const alongRad = 2 * Math.PI * (slot / walker.perPlane + plane / 7) + motion * seconds;
  const nodeRad =
    walker.nodeDeg * DEG + (2 * Math.PI * plane) / walker.planes - EARTH_TURN_RAD_PER_S * seconds;
  const acrossM = walker.radiusM * Math.sin(alongRad) * Math.cos(walker.inclinationDeg * DEG);
  const alongM = walker.radiusM * Math.cos(alongRad);
  const x = alongM * Math.cos(nodeRad) - acrossM * Math.sin(nodeRad);
  const y = alongM * Math.sin(nodeRad) + acrossM * Math.cos(nodeRad);
  const z = walker.radiusM * Math.sin(alongRad) * Math.sin(walker.inclinationDeg * DEG);
  return seenFrom(place, x, y, z);
}

/** Elevation and azimuth on a spherical Earth, which is all that a sky plot needs. */
function seenFrom(
  place: {readonly latitudeDeg: number; readonly longitudeDeg: number},
  x: number,
  y: number,
  z: number,
) {
  const phi = place.latitudeDeg * DEG;
  const lambda = place.longitudeDeg * DEG;
  const towardsM = x * Math.cos(lambda) + y * Math.sin(lambda);
  const eastM = y * Math.cos(lambda) - x * Math.sin(lambda);
  const northM = z * Math.cos(phi) - towardsM * Math.sin(phi);
  const upM = z * Math.sin(phi) + towardsM * Math.cos(phi) - EARTH_RADIUS_M;
  const azimuthDeg = Math.atan2(eastM, northM) / DEG;
  return {
    elevationDeg: Math.atan2(upM, Math.hypot(eastM, northM)) / DEG,
    azimuthDeg: azimuthDeg < 0 ? azimuthDeg + 360 : azimuthDeg,
  };
}

/** Dilution of precision of position and clock from some satellites; needs at least four. */
export interface Dilution {
  readonly pdop: number;
  readonly hdop: number;
  readonly vdop: number;
}

export function dilutionOf(satellites: readonly SatelliteInView[]): Dilution {
  const normal = Array.from({length: 4}, () => new Array<number>(4).fill(0));
  for (const {elevationDeg, azimuthDeg} of satellites) {
    const level = Math.cos(elevationDeg * DEG);
    const row = [
      level * Math.sin(azimuthDeg * DEG),
      level * Math.cos(azimuthDeg * DEG),
      Math.sin(elevationDeg * DEG),
      1,
    ];
    for (let i = 0; i < 4; i++) {
      for (let j = 0; j < 4; j++) normal[i]![j]! += row[i]! * row[j]!;
    }
  }
  const [east, north, up] = inverseDiagonal(normal);
  return {
    pdop: Math.sqrt(east! + north! + up!),
    hdop: Math.sqrt(east! + north!),
    vdop: Math.sqrt(up!),
  };
}

/** The diagonal of the inverse of a positive definite matrix, by Gauss–Jordan without pivoting. */
function inverseDiagonal(matrix: readonly (readonly number[])[]): number[] {
  const n = matrix.length;
  const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let k = 0; k < n; k++) {
    const pivot = work[k]![k]!;
    work[k] = work[k]!.map((value) => value / pivot);
    for (let i = 0; i < n; i++) {
      if (i === k) continue;
      const factor = work[i]![k]!;
      work[i] = work[i]!.map((value, j) => value - factor * work[k]![j]!);
    }
  }
  return work.map((row, i) => row[n + i]!);
}
