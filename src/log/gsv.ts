import {SatelliteSystem} from '../epochs/epochs.ts';
import type {SatellitesBuilder} from '../epochs/satellites-builder.ts';
import {Rejection} from './rejections.ts';
import {systemOfNumber, systemOfTalker} from './satellite-system.ts';
import type {SentenceFields} from './sentence-fields.ts';

/** Total, number, satellites in view; then four fields per satellite and, maybe, a signal id. */
const HEAD_FIELDS = 3;
const FIELDS_PER_SATELLITE = 4;

interface Seen {
  readonly elevationDeg: number;
  readonly azimuthDeg: number;
  carrierToNoiseDbHz: number;
}

/**
 * Gathers the satellites of one sample. A satellite that is listed with several signals stands once,
 * with the strongest.
 */
export class SatelliteSample {
  readonly #seen = new Map<number, Seen>();
  readonly #value = new Float64Array(1);

  /** Takes a GSV sentence; a carrier-to-noise ratio of zero means "not tracked". */
  take(fields: SentenceFields, talker: number): Rejection {
    const satellites = Math.trunc((fields.count - HEAD_FIELDS) / FIELDS_PER_SATELLITE);
    const ofTalker = systemOfTalker(talker);
    for (let k = 0; k < satellites; k += 1) {
      const field = HEAD_FIELDS + k * FIELDS_PER_SATELLITE;
      const number = fields.whole(field);
      const elevationDeg = this.#decimal(fields, field + 1);
      const azimuthDeg = this.#decimal(fields, field + 2);
      const ratio = this.#decimal(fields, field + 3);
      if (fields.fault !== Rejection.none) return fields.fault;
      if (number <= 0) continue;
      const system = ofTalker === SatelliteSystem.unknown ? systemOfNumber(number) : ofTalker;
      const carrierToNoiseDbHz = ratio > 0 ? ratio : Number.NaN;
      this.#keepStrongest(system * 65_536 + number, {elevationDeg, azimuthDeg, carrierToNoiseDbHz});
    }
    return Rejection.none;
  }

  #decimal(fields: SentenceFields, field: number): number {
    fields.decimalTo(this.#value, 0, field);
    return this.#value[0] ?? Number.NaN;
  }

  #keepStrongest(key: number, one: Seen): void {
    const before = this.#seen.get(key);
    if (before === undefined) this.#seen.set(key, one);
    else if (!(before.carrierToNoiseDbHz >= one.carrierToNoiseDbHz)) {
      if (!Number.isNaN(one.carrierToNoiseDbHz)) {
        before.carrierToNoiseDbHz = one.carrierToNoiseDbHz;
      }
    }
  }

  /** Adds what was gathered, in order of system and number, and starts anew. */
  moveTo(builder: SatellitesBuilder, gpsSeconds: number): void {
    const keys = [...this.#seen.keys()].sort((a, b) => a - b);
    for (const key of keys) {
      const seen = this.#seen.get(key);
      if (seen === undefined) continue;
      const system = Math.trunc(key / 65_536);
      builder.add({gpsSeconds, system, satelliteId: key % 65_536, ...seen});
    }
    this.#seen.clear();
  }
}
