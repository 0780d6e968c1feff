import type {Satellites} from './epochs.ts';

const FIRST_ROWS = 256;

type SatelliteColumns = Omit<Satellites, 'count'>;

/** What a log says of one satellite at one time; NaN where it says nothing. */
export interface SatelliteSeen {
  readonly gpsSeconds: number;
  readonly system: number;
  readonly satelliteId: number;
  readonly elevationDeg: number;
  readonly azimuthDeg: number;
  readonly carrierToNoiseDbHz: number;
}

/** The columns of satellites seen, growing by doubling: they stay small beside the epochs. */
export class SatellitesBuilder {
  #rows = FIRST_ROWS;
  #columns = createColumns(FIRST_ROWS);
  #count = 0;

  get count(): number {
    return this.#count;
  }

  add(seen: SatelliteSeen): void {
    if (this.#count === this.#rows) this.#double();
    const row = this.#count;
    this.#columns.gpsSeconds[row] = seen.gpsSeconds;
    this.#columns.system[row] = seen.system;
    this.#columns.satelliteId[row] = seen.satelliteId;
    this.#columns.elevationDeg[row] = seen.elevationDeg;
    this.#columns.azimuthDeg[row] = seen.azimuthDeg;
    this.#columns.carrierToNoiseDbHz[row] = seen.carrierToNoiseDbHz;
    this.#count += 1;
  }

  /** In the order of adding. */
  finish(): Satellites {
    return {count: this.#count, ...copied(this.#columns, this.#count, this.#count)};
  }

  #double(): void {
    this.#columns = copied(this.#columns, this.#count, this.#rows * 2);
    this.#rows *= 2;
  }
}

/** All of them, by time; of equal times those of the earlier part first. */
export function mergeSatellites(parts: readonly Satellites[]): Satellites {
  const builder = new SatellitesBuilder();
  const rows = parts.flatMap((part) => Array.from({length: part.count}, (_, k) => ({part, k})));
  rows.sort((a, b) => a.part.gpsSeconds[a.k]! - b.part.gpsSeconds[b.k]!);
  for (const {part, k} of rows) {
    builder.add({
      gpsSeconds: part.gpsSeconds[k]!,
      system: part.system[k]!,
      satelliteId: part.satelliteId[k]!,
      elevationDeg: part.elevationDeg[k]!,
      azimuthDeg: part.azimuthDeg[k]!,
      carrierToNoiseDbHz: part.carrierToNoiseDbHz[k]!,
    });
  }
  return builder.finish();
}

function createColumns(rows: number): SatelliteColumns {
  return {
    gpsSeconds: new Float64Array(rows),
    system: new Uint8Array(rows),
    satelliteId: new Uint16Array(rows),
    elevationDeg: new Float32Array(rows),
    azimuthDeg: new Float32Array(rows),
    carrierToNoiseDbHz: new Float32Array(rows),
  };
}

function copied(from: SatelliteColumns, count: number, rows: number): SatelliteColumns {
  const to = createColumns(rows);
  for (const name of Object.keys(to) as (keyof SatelliteColumns)[]) {
    to[name].set(from[name].subarray(0, count));
  }
  return to;
}
