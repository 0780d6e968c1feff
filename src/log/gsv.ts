import {SatelliteSystem} from '../epochs/epochs.ts';
import type {SatellitesBuilder} from '../epochs/satellites-builder.ts';
import {Rejection} from './rejections.ts';
import {systemOfNumber, systemOfTalker} from './satellite-system.ts';
import type {SentenceFields} from './sentence-fields.ts';

/** Total, number, satellites in view; then four fields per satellite and, maybe, a signal id. */
const HEAD_FIELDS = 3;
const FIELDS_PER_SATELLITE = 4;

/** Satellites and their number in one key, so that keys sort by system first. */
const NUMBERS_PER_SYSTEM = 65_536;
const FIRST_ROOM = 64;

/**
 * Gathers the satellites of one sample, sorted by system and number. A satellite that is listed
 * with several signals stands once, with the strongest.
 */
export class SatelliteSample {
  #count = 0;
  #keys = new Int32Array(FIRST_ROOM);
  #elevationDeg = new Float64Array(FIRST_ROOM);
  #azimuthDeg = new Float64Array(FIRST_ROOM);
  #carrierToNoiseDbHz = new Float64Array(FIRST_ROOM);
  /** Elevation, azimuth and strength of the satellite in work. */
  readonly #seen = new Float64Array(3);

  /** Takes a GSV sentence; a carrier-to-noise ratio of zero means "not tracked". */
  take(fields: SentenceFields, talker: number): Rejection {
    const satellites = Math.trunc((fields.count - HEAD_FIELDS) / FIELDS_PER_SATELLITE);
    const ofTalker = systemOfTalker(talker);
    for (let k = 0; k < satellites; k += 1) {
      const field = HEAD_FIELDS + k * FIELDS_PER_SATELLITE;
      const number = fields.whole(field);
      for (let value = 0; value < 3; value += 1) {
        fields.decimalTo(this.#seen, value, field + 1 + value);
      }
      if (fields.fault !== Rejection.none) return fields.fault;
      if (number <= 0) continue;
      const system = ofTalker === SatelliteSystem.unknown ? systemOfNumber(number) : ofTalker;
      this.#keep(system * NUMBERS_PER_SYSTEM + number);
    }
    return Rejection.none;
  }

  #keep(key: number): void {
    // Satellites mostly come in rising order: look from the end.
    let place = this.#count;
    while (place > 0 && (this.#keys[place - 1] ?? 0) > key) place -= 1;
    const [elevationDeg = Number.NaN, azimuthDeg = Number.NaN, ratio = Number.NaN] = this.#seen;
    const isKnown = place > 0 && this.#keys[place - 1] === key;
    if (isKnown) {
      const before = this.#carrierToNoiseDbHz[place - 1] ?? Number.NaN;
      if (ratio > 0 && !(before >= ratio)) this.#carrierToNoiseDbHz[place - 1] = ratio;
      return;
    }
    if (this.#count === this.#keys.length) this.#grow();
    for (const column of this.#columns()) column.copyWithin(place + 1, place, this.#count);
    this.#keys[place] = key;
    this.#elevationDeg[place] = elevationDeg;
    this.#azimuthDeg[place] = azimuthDeg;
    this.#carrierToNoiseDbHz[place] = ratio > 0 ? ratio : Number.NaN;
    this.#count += 1;
  }

  #columns() {
    return [this.#keys, this.#elevationDeg, this.#azimuthDeg, this.#carrierToNoiseDbHz];
  }

  #grow(): void {
    const [keys, elevationDeg, azimuthDeg, carrierToNoiseDbHz] = [
      this.#keys,
      this.#elevationDeg,
      this.#azimuthDeg,
      this.#carrierToNoiseDbHz,
    ];
    const room = 2 * keys.length;
    this.#keys = new Int32Array(room);
    this.#elevationDeg = new Float64Array(room);
    this.#azimuthDeg = new Float64Array(room);
    this.#carrierToNoiseDbHz = new Float64Array(room);
    this.#keys.set(keys);
    this.#elevationDeg.set(elevationDeg);
    this.#azimuthDeg.set(azimuthDeg);
    this.#carrierToNoiseDbHz.set(carrierToNoiseDbHz);
  }

  /** Adds what was gathered, in order of system and number, and starts anew. */
  moveTo(builder: SatellitesBuilder, gpsSeconds: number): void {
    for (let k = 0; k < this.#count; k += 1) {
      const key = this.#keys[k] ?? 0;
      builder.add({
        gpsSeconds,
        system: Math.trunc(key / NUMBERS_PER_SYSTEM),
        satelliteId: key % NUMBERS_PER_SYSTEM,
        elevationDeg: this.#elevationDeg[k] ?? Number.NaN,
        azimuthDeg: this.#azimuthDeg[k] ?? Number.NaN,
        carrierToNoiseDbHz: this.#carrierToNoiseDbHz[k] ?? Number.NaN,
      });
    }
    this.#count = 0;
  }
}
