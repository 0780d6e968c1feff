import {SatelliteSystem, type Satellites} from '../../epochs/epochs.ts';

/** What stood in the sky: paths of satellites for short records, cells for long ones. */
export type Sky = SkyTracks | SkyCells;

interface SkyFacts {
  /** Satellites seen per system, such as `GPS`: 12. */
  readonly systems: readonly {readonly name: string; readonly satellites: number}[];
}

export interface SkyTracks extends SkyFacts {
  readonly kind: 'tracks';
  readonly tracks: readonly SkyTrack[];
}

export interface SkyTrack {
  /** Letter of the system and number, such as G07 (letters as in RINEX 3). */
  readonly label: string;
  readonly azimuthDeg: readonly number[];
  readonly elevationDeg: readonly number[];
  /** null where the satellite was seen without a signal. */
  readonly carrierToNoiseDbHz: readonly (number | null)[];
}

export interface SkyCells extends SkyFacts {
  readonly kind: 'cells';
  readonly cells: readonly SkyCell[];
  /** Lowest elevation at which a signal was received, per sector of azimuth. */
  readonly horizon: readonly {readonly azimuthDeg: number; readonly elevationDeg: number | null}[];
}

interface SkyCell {
  readonly fromAzimuthDeg: number;
  readonly toAzimuthDeg: number;
  readonly fromElevationDeg: number;
  readonly toElevationDeg: number;
  readonly medianCarrierToNoiseDbHz: number;
}

const LONGEST_WITH_TRACKS_S = 6 * 3600;
/** Points of all tracks together: what one figure can carry. */
const TRACK_POINTS = 900;
const SHORTEST_STEP_S = 60;
/** More steps would show the whole degrees of GSV as a staircase. */
const STEPS_OF_A_TRACK = 20;

const SYSTEM_NAMES: ReadonlyMap<number, {letter: string; name: string}> = new Map([
  [SatelliteSystem.unknown, {letter: 'X', name: 'system not stated'}],
  [SatelliteSystem.gps, {letter: 'G', name: 'GPS'}],
  [SatelliteSystem.glonass, {letter: 'R', name: 'GLONASS'}],
  [SatelliteSystem.galileo, {letter: 'E', name: 'Galileo'}],
  [SatelliteSystem.beidou, {letter: 'C', name: 'BeiDou'}],
  [SatelliteSystem.qzss, {letter: 'J', name: 'QZSS'}],
  [SatelliteSystem.navic, {letter: 'I', name: 'NavIC'}],
]);

function systemOf(code: number): {letter: string; name: string} {
  return SYSTEM_NAMES.get(code) ?? {letter: 'X', name: 'system not stated'};
}

export function skyOf(satellites: Satellites, firstS: number, spanS: number): Sky | null {
  if (satellites.count === 0) return null;
  const systems = satellitesPerSystem(satellites);
  if (spanS <= LONGEST_WITH_TRACKS_S) {
    const tracks = tracksOf(satellites, firstS, spanS);
    return tracks.length === 0 ? null : {kind: 'tracks', systems, tracks};
  }
  const {cells, horizon} = cellsOf(satellites);
  return cells.length === 0 ? null : {kind: 'cells', systems, cells, horizon};
}

function satellitesPerSystem({count, system, satelliteId}: Satellites) {
  const seen = new Map<string, Set<number>>();
  for (let i = 0; i < count; i++) {
    const {name} = systemOf(system[i]!);
    const ids = seen.get(name) ?? new Set<number>();
    ids.add(satelliteId[i]!);
    seen.set(name, ids);
  }
  return [...seen]
    .map(([name, ids]) => ({name, satellites: ids.size}))
    .sort((a, b) => b.satellites - a.satellites || (a.name < b.name ? -1 : 1));
}

interface GrowingTrack {
  label: string;
  lastStep: number;
  azimuthDeg: number[];
  elevationDeg: number[];
  carrierToNoiseDbHz: (number | null)[];
}

function tracksOf(satellites: Satellites, firstS: number, spanS: number): SkyTrack[] {
  const tracks = new Map<number, GrowingTrack>();
  const bySize = new Set<number>();
  for (let i = 0; i < satellites.count; i++) {
    bySize.add(satellites.system[i]! * 65_536 + satellites.satelliteId[i]!);
  }
  const stepS = Math.max(
    SHORTEST_STEP_S,
    spanS / STEPS_OF_A_TRACK,
    (spanS * bySize.size) / TRACK_POINTS,
  );
  for (let i = 0; i < satellites.count; i++) {
    const elevationDeg = satellites.elevationDeg[i]!;
    const azimuthDeg = satellites.azimuthDeg[i]!;
    if (!(elevationDeg >= 0 && elevationDeg <= 90) || Number.isNaN(azimuthDeg)) continue;
    const key = satellites.system[i]! * 65_536 + satellites.satelliteId[i]!;
    const step = Math.floor((satellites.gpsSeconds[i]! - firstS) / stepS);
    const track = tracks.get(key) ?? startTrack(satellites, i);
    tracks.set(key, track);
    if (step === track.lastStep) continue;
    track.lastStep = step;
    track.azimuthDeg.push(azimuthDeg);
    track.elevationDeg.push(elevationDeg);
    const strength = satellites.carrierToNoiseDbHz[i]!;
    track.carrierToNoiseDbHz.push(strength > 0 ? strength : null);
  }
  return [...tracks.values()]
    .map(({lastStep: _, ...track}) => track)
    .sort((a, b) => (a.label < b.label ? -1 : 1));
}

function startTrack({system, satelliteId}: Satellites, i: number): GrowingTrack {
  const label = systemOf(system[i]!).letter + String(satelliteId[i]!).padStart(2, '0');
  return {
    label,
    lastStep: Number.NEGATIVE_INFINITY,
    azimuthDeg: [],
    elevationDeg: [],
    carrierToNoiseDbHz: [],
  };
}

const ELEVATION_STEP_DEG = 10;
/** Sectors per ring of elevation, fewer toward the zenith so that cells stay about as wide. */
const SECTORS = [36, 36, 36, 24, 24, 18, 12, 8, 4];
const HORIZON_SECTORS = 36;
const HIGHEST_DB_HZ = 63;

function cellsOf(satellites: Satellites) {
  const starts = SECTORS.map((_, ring) => SECTORS.slice(0, ring).reduce((a, b) => a + b, 0));
  const total = SECTORS.reduce((a, b) => a + b, 0);
  const histograms = new Uint32Array(total * (HIGHEST_DB_HZ + 1));
  const lowest = new Array<number | null>(HORIZON_SECTORS).fill(null);
  for (let i = 0; i < satellites.count; i++) {
    const elevationDeg = satellites.elevationDeg[i]!;
    const azimuthDeg = satellites.azimuthDeg[i]!;
    const strength = satellites.carrierToNoiseDbHz[i]!;
    if (!(elevationDeg >= 0 && elevationDeg <= 90 && azimuthDeg >= 0 && strength > 0)) continue;
    const ring = Math.min(SECTORS.length - 1, Math.floor(elevationDeg / ELEVATION_STEP_DEG));
    const sectors = SECTORS[ring]!;
    const sector = Math.floor(((azimuthDeg % 360) / 360) * sectors);
    const level = Math.min(HIGHEST_DB_HZ, Math.round(strength));
    histograms[(starts[ring]! + sector) * (HIGHEST_DB_HZ + 1) + level]!++;
    const toward = Math.floor(((azimuthDeg % 360) / 360) * HORIZON_SECTORS);
    lowest[toward] = Math.min(lowest[toward] ?? 90, elevationDeg);
  }
  const cells: SkyCell[] = [];
  SECTORS.forEach((sectors, ring) => {
    for (let sector = 0; sector < sectors; sector++) {
      const from = (starts[ring]! + sector) * (HIGHEST_DB_HZ + 1);
      const median = medianLevel(histograms.subarray(from, from + HIGHEST_DB_HZ + 1));
      if (median === null) continue;
      cells.push({
        fromAzimuthDeg: (sector * 360) / sectors,
        toAzimuthDeg: ((sector + 1) * 360) / sectors,
        fromElevationDeg: ring * ELEVATION_STEP_DEG,
        toElevationDeg: (ring + 1) * ELEVATION_STEP_DEG,
        medianCarrierToNoiseDbHz: median,
      });
    }
  });
  const horizon = lowest.map((elevationDeg, k) => ({
    azimuthDeg: ((k + 0.5) * 360) / HORIZON_SECTORS,
    elevationDeg,
  }));
  return {cells, horizon};
}

/** Lower median of whole dB-Hz from their counts; null when nothing was counted. */
function medianLevel(counts: Uint32Array): number | null {
  return levelAt(counts, 0.5);
}

/** The smallest level that at least this share of the counts does not exceed. */
export function levelAt(counts: Uint32Array, share: number): number | null {
  let total = 0;
  for (let level = 0; level < counts.length; level++) total += counts[level]!;
  if (total === 0) return null;
  let below = 0;
  for (let level = 0; level < counts.length; level++) {
    below += counts[level]!;
    if (below >= share * total) return level;
  }
  return counts.length - 1;
}
