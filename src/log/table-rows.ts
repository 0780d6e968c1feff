import type {EpochsBuilder} from '../epochs/builder.ts';
import {EpochFlag, FixClass} from '../epochs/epochs.ts';
import {parseAngle, wrappedLongitudeDeg} from '../geodesy/angle.ts';
import {
  type Ellipsoid,
  ellipsoid,
  gaussianRadiusM,
  primeVerticalRadiusM,
} from '../geodesy/ellipsoid.ts';
import {geodeticFromEcef} from '../geodesy/geocentric.ts';
import type {Geodetic} from '../geodesy/types.ts';
import type {LogResolution, ReadOptions} from './contents.ts';
import {FieldSplitter, textOf} from './delimited.ts';
import {NumberDecoder, NumberState} from './delimited-number.ts';
import type {NumberColumn, PositionColumns, SigmaColumns, TableLayout} from './table-layout.ts';
import {fixClassOfWord} from './table-quality.ts';
import {localSigmas} from './table-sigmas.ts';
import {TableClock} from './table-time.ts';

/** A geocentric distance between the deepest places on Earth and beyond the satellites. */
const RADIUS_LIMITS_M = [6.2e6, 5e7] as const;
const HEIGHT_LIMITS_M = [-20_000, 4.4e7] as const;
const POWERS_OF_TEN = Array.from({length: 16}, (_, power) => Number(`1e${power}`));
const DEGREES_PER_RADIAN = 180 / Math.PI;
const NOT_GIVEN_SATELLITES = 255;
const NOT_GIVEN_STATION = 65_535;

/** Positions that cannot be, kept apart because many of them mean a misread column. */
export interface Implausible {
  count: number;
  first: string;
}

type SigmaParts = Extract<SigmaColumns, {kind: 'geocentric'}>;

/** Decodes rows into the columns of epochs; a row is taken whole or not at all. */
export class RowDecoder {
  readonly implausible: Implausible = {count: 0, first: ''};
  /** Rows whose sigmas are all exactly zero, which means that they were not given. */
  zeroSigmas = 0;
  readonly fields: FieldSplitter;
  readonly #layout: TableLayout;
  readonly #numbers: NumberDecoder;
  readonly #clock: TableClock;
  readonly #ellipsoid: Ellipsoid;
  readonly #builder: EpochsBuilder;
  readonly #extraFlags: number;
  /** Why the row at hand is refused; empty while it is not. */
  #reason = '';
  #ellipsoidalHeightM = Number.NaN;
  #altitudeM = Number.NaN;
  #separationM = Number.NaN;
  /** Smallest steps seen so far, in metres or degrees. */
  #latitudeStep = Number.POSITIVE_INFINITY;
  #longitudeStep = Number.POSITIVE_INFINITY;
  #heightStepM = Number.POSITIVE_INFINITY;
  #separationStepM = Number.POSITIVE_INFINITY;
  #place: Geodetic | undefined;

  constructor(layout: TableLayout, options: ReadOptions, builder: EpochsBuilder) {
    const {table, date} = options;
    this.#layout = layout;
    this.#builder = builder;
    this.fields = new FieldSplitter(layout.delimiter);
    this.#numbers = new NumberDecoder(layout.decimalMark);
    this.#clock = new TableClock(layout, this.#numbers, {
      startGpsSeconds: table.startGpsSeconds,
      date,
    });
    this.#ellipsoid = ellipsoid(table.semiMajorAxisM, table.inverseFlattening);
    this.#extraFlags = layout.time.kind === 'clock' ? EpochFlag.dateAssumed : 0;
  }

  /** Takes one row; returns why it was rejected, or an empty text. */
  take(bytes: Uint8Array, from: number, to: number, lineNumber: number): string {
    const {fields} = this;
    const layout = this.#layout;
    fields.split(bytes, from, to);
    if (!this.#hasAllFields()) return 'wrong column count';
    this.#reason = '';
    const gpsSeconds = this.#clock.read(bytes, fields);
    if (Number.isNaN(gpsSeconds)) return `unreadable time: ${this.#clock.refusal}`;
    const place = this.#position(bytes, layout.position);
    if (place === undefined) return this.#reason;

    const quality = this.#quality(bytes);
    const satellites = this.#optional(bytes, layout.satellites);
    const hdop = this.#optional(bytes, layout.hdop);
    const pdop = this.#optional(bytes, layout.pdop);
    const vdop = this.#optional(bytes, layout.vdop);
    const age = this.#optional(bytes, layout.correctionAge);
    const station = this.#optional(bytes, layout.stationId);
    const sigmas = layout.sigmas === null ? undefined : this.#sigmas(bytes, layout.sigmas, place);
    if (this.#reason !== '') return this.#reason;

    const row = this.#builder.add();
    const {block} = this.#builder;
    block.gpsSeconds[row] = gpsSeconds;
    block.latitudeDeg[row] = place.latitudeDeg;
    block.longitudeDeg[row] = place.longitudeDeg;
    block.ellipsoidalHeightM[row] = this.#ellipsoidalHeightM;
    block.altitudeM[row] = this.#altitudeM;
    block.separationM[row] = this.#separationM;
    block.fixClass[row] = quality;
    block.satellites[row] = wholeBelow(satellites, NOT_GIVEN_SATELLITES);
    block.hdop[row] = hdop;
    block.pdop[row] = pdop;
    block.vdop[row] = vdop;
    block.correctionAgeS[row] = age;
    block.stationId[row] = wholeBelow(station, NOT_GIVEN_STATION);
    if (sigmas !== undefined) {
      block.sigmaEastM[row] = sigmas.eastM;
      block.sigmaNorthM[row] = sigmas.northM;
      block.sigmaUpM[row] = sigmas.upM;
    }
    const planOnly = Number.isNaN(this.#ellipsoidalHeightM) && Number.isNaN(this.#altitudeM);
    block.flags[row] =
      this.#extraFlags |
      (quality === FixClass.none ? EpochFlag.invalid : 0) |
      (planOnly ? EpochFlag.planOnly : 0);
    block.lineNumber[row] = lineNumber;
    return '';
  }

  /** The steps that the digits of the table can express. */
  resolution(): LogResolution {
    const place = this.#place;
    if (place === undefined) {
      return {
        latitudeDeg: Number.NaN,
        longitudeDeg: Number.NaN,
        heightM: Number.NaN,
        separationM: Number.NaN,
      };
    }
    if (this.#layout.position.kind === 'geodetic') {
      return {
        latitudeDeg: finite(this.#latitudeStep),
        longitudeDeg: finite(this.#longitudeStep),
        heightM: finite(this.#heightStepM),
        separationM: finite(this.#separationStepM),
      };
    }
    // Equal steps along X, Y and Z are equal steps along every direction, as far as rounding goes.
    const stepM = finite(this.#heightStepM);
    const cosLat = Math.cos(place.latitudeDeg / DEGREES_PER_RADIAN);
    const parallelM = primeVerticalRadiusM(place, this.#ellipsoid) * Math.max(cosLat, 1e-6);
    return {
      latitudeDeg: (stepM / gaussianRadiusM(place, this.#ellipsoid)) * DEGREES_PER_RADIAN,
      longitudeDeg: (stepM / parallelM) * DEGREES_PER_RADIAN,
      heightM: stepM,
      separationM: Number.NaN,
    };
  }

  #hasAllFields(): boolean {
    const {count} = this.fields;
    const expected = this.#layout.fields;
    // A delimiter at the end of the row opens an empty field.
    return count === expected || (count === expected + 1 && this.fields.isEmpty(expected));
  }

  #position(bytes: Uint8Array, columns: PositionColumns): Geodetic | undefined {
    const place =
      columns.kind === 'geocentric'
        ? this.#geocentric(bytes, columns)
        : this.#geodetic(bytes, columns);
    if (place !== undefined) this.#place ??= place;
    return place;
  }

  #geocentric(
    bytes: Uint8Array,
    {x, y, z}: Extract<PositionColumns, {kind: 'geocentric'}>,
  ): Geodetic | undefined {
    const numbers = this.#numbers;
    let decimals = 0;
    const xM = this.#required(bytes, x);
    decimals = numbers.decimals;
    const yM = this.#required(bytes, y);
    decimals = Math.max(decimals, numbers.decimals);
    const zM = this.#required(bytes, z);
    decimals = Math.max(decimals, numbers.decimals);
    if (this.#reason !== '') return undefined;
    if (xM === 0 && yM === 0 && zM === 0) return this.#refuse('no position');
    const radiusM = Math.sqrt(xM * xM + yM * yM + zM * zM);
    if (!(radiusM >= RADIUS_LIMITS_M[0] && radiusM <= RADIUS_LIMITS_M[1])) {
      return this.#cannotBe(
        'not on or near the Earth',
        `${x.name} ${xM}, ${y.name} ${yM}, ${z.name} ${zM} in metres lie ${Math.round(radiusM)} m from the centre of the Earth`,
      );
    }
    const place = geodeticFromEcef({xM, yM, zM}, this.#ellipsoid);
    this.#ellipsoidalHeightM = place.ellipsoidalHeightM;
    this.#heightStepM = smaller(this.#heightStepM, x.factor, decimals);
    return place;
  }

  #geodetic(
    bytes: Uint8Array,
    columns: Extract<PositionColumns, {kind: 'geodetic'}>,
  ): Geodetic | undefined {
    const latitudeDeg = this.#angle(bytes, columns.latitude, 'latitude', columns.sexagesimal);
    const longitude = this.#angle(bytes, columns.longitude, 'longitude', columns.sexagesimal);
    const ellipsoidal = this.#optional(bytes, columns.ellipsoidalHeight);
    const heightDecimals = this.#numbers.decimals;
    const altitudeM = this.#optional(bytes, columns.altitude);
    const altitudeDecimals = this.#numbers.decimals;
    const separationM = this.#optional(bytes, columns.separation);
    const separationDecimals = this.#numbers.decimals;
    if (this.#reason !== '') return undefined;
    if (latitudeDeg === 0 && longitude === 0) return this.#refuse('no position');
    if (Math.abs(latitudeDeg) > 90 || longitude < -180 || longitude > 360) {
      return this.#cannotBe(
        'latitude or longitude out of range',
        `${columns.latitude.name} ${latitudeDeg} and ${columns.longitude.name} ${longitude} are no latitude and longitude in degrees`,
      );
    }
    const ellipsoidalHeightM = Number.isNaN(ellipsoidal) ? altitudeM + separationM : ellipsoidal;
    const heightM = Number.isNaN(ellipsoidalHeightM) ? altitudeM : ellipsoidalHeightM;
    if (heightM < HEIGHT_LIMITS_M[0] || heightM > HEIGHT_LIMITS_M[1]) {
      const name = (columns.ellipsoidalHeight ?? columns.altitude)?.name ?? 'height';
      return this.#cannotBe(
        'height out of range',
        `${name} ${heightM} m is no height on or near the Earth`,
      );
    }
    this.#ellipsoidalHeightM = ellipsoidalHeightM;
    this.#altitudeM = altitudeM;
    this.#separationM = separationM;
    const {ellipsoidalHeight, altitude, separation} = columns;
    if (ellipsoidalHeight !== null && !Number.isNaN(ellipsoidal)) {
      this.#heightStepM = smaller(this.#heightStepM, ellipsoidalHeight.factor, heightDecimals);
    } else if (altitude !== null && !Number.isNaN(altitudeM)) {
      this.#heightStepM = smaller(this.#heightStepM, altitude.factor, altitudeDecimals);
    }
    if (separation !== null && !Number.isNaN(separationM)) {
      this.#separationStepM = smaller(this.#separationStepM, separation.factor, separationDecimals);
    }
    return {latitudeDeg, longitudeDeg: wrappedLongitudeDeg(longitude), ellipsoidalHeightM};
  }

  /** Decimal degrees, or degrees, minutes and seconds in one field. */
  #angle(
    bytes: Uint8Array,
    column: NumberColumn,
    kind: 'latitude' | 'longitude',
    sexagesimal: boolean,
  ): number {
    const from = this.fields.start(column.field);
    const to = this.fields.end(column.field);
    const number = this.#numbers.decode(bytes, from, to);
    const {state} = this.#numbers;
    if (state === NumberState.present && !sexagesimal) {
      this.#seeAngleStep(kind, column.factor, this.#numbers.decimals);
      return number * column.factor;
    }
    if (state === NumberState.absent) return this.#refuseNumber('no position');
    const text = textOf(bytes, from, to);
    // Of 50.0612 nobody can tell whether the decimals are minutes and seconds.
    const parsed = state === NumberState.present ? undefined : parseAngle(text, kind);
    if (parsed?.kind !== 'angle') {
      return this.#refuseNumber(`unreadable angle in column ${shownName(column)}`);
    }
    const decimals = /\.(\d*)/.exec(text)?.[1]?.length ?? 0;
    const parts = text.match(/\d+(\.\d*)?/g)?.length ?? 1;
    this.#seeAngleStep(kind, 1 / 60 ** (parts - 1), decimals);
    return parsed.degrees;
  }

  #seeAngleStep(kind: 'latitude' | 'longitude', factor: number, decimals: number): void {
    if (kind === 'latitude') this.#latitudeStep = smaller(this.#latitudeStep, factor, decimals);
    else this.#longitudeStep = smaller(this.#longitudeStep, factor, decimals);
  }

  #quality(bytes: Uint8Array): FixClass {
    const {qualityField: field, qualityClasses} = this.#layout;
    if (field === null) return FixClass.unknown;
    const from = this.fields.start(field);
    const to = this.fields.end(field);
    const number = this.#numbers.decode(bytes, from, to);
    if (this.#numbers.state === NumberState.absent) return FixClass.unknown;
    const fixClass =
      this.#numbers.state === NumberState.present
        ? qualityClasses.get(number)
        : fixClassOfWord(textOf(bytes, from, to));
    if (fixClass !== undefined) return fixClass;
    this.#reason = 'unknown quality';
    return FixClass.unknown;
  }

  #sigmas(
    bytes: Uint8Array,
    columns: SigmaColumns,
    place: Geodetic,
  ): {eastM: number; northM: number; upM: number} | undefined {
    if (columns.kind === 'geocentric') return this.#rotatedSigmas(bytes, columns, place);
    const east = this.#optional(bytes, columns.east);
    const north = this.#optional(bytes, columns.north);
    const up = this.#optional(bytes, columns.up);
    if (!(east !== 0 || north !== 0 || up !== 0)) this.zeroSigmas += 1;
    const root = (value: number): number => {
      if (!(value > 0)) return Number.NaN;
      return columns.squared ? Math.sqrt(value) : value;
    };
    return {eastM: root(east), northM: root(north), upM: root(up)};
  }

  #rotatedSigmas(bytes: Uint8Array, columns: SigmaParts, place: Geodetic) {
    const given = {
      x: this.#optional(bytes, columns.x),
      y: this.#optional(bytes, columns.y),
      z: this.#optional(bytes, columns.z),
      xy: columns.xy === null ? 0 : this.#optional(bytes, columns.xy),
      xz: columns.xz === null ? 0 : this.#optional(bytes, columns.xz),
      yz: columns.yz === null ? 0 : this.#optional(bytes, columns.yz),
    };
    if (given.x === 0 && given.y === 0 && given.z === 0) this.zeroSigmas += 1;
    return localSigmas(given, columns, place, this.#ellipsoid);
  }

  /** A number that the row cannot do without, in SI units. */
  #required(bytes: Uint8Array, column: NumberColumn): number {
    const value = this.#optional(bytes, column);
    return this.#numbers.state === NumberState.absent ? this.#refuseNumber('no position') : value;
  }

  /** A number in SI units; NaN when the field is empty or there is no such column. */
  #optional(bytes: Uint8Array, column: NumberColumn | null): number {
    if (column === null) return Number.NaN;
    const {field, factor} = column;
    const value = this.#numbers.decode(bytes, this.fields.start(field), this.fields.end(field));
    if (this.#numbers.state === NumberState.unreadable) {
      this.#reason ||= `unreadable number in column ${shownName(column)}`;
    }
    return factor === 1 ? value : value * factor;
  }

  #refuseNumber(reason: string): number {
    this.#reason ||= reason;
    return Number.NaN;
  }

  #refuse(reason: string): undefined {
    this.#reason = reason;
    return undefined;
  }

  #cannotBe(reason: string, seen: string): undefined {
    if (this.implausible.count === 0) this.implausible.first = seen;
    this.implausible.count += 1;
    return this.#refuse(reason);
  }
}

function wholeBelow(value: number, notGiven: number): number {
  return value >= 0 && value < notGiven ? Math.floor(value) : notGiven;
}

/** The step of a number with so many decimals, or the step so far if that is smaller. */
function smaller(step: number, factor: number, decimals: number): number {
  const own = factor / (POWERS_OF_TEN[decimals] ?? 10 ** decimals);
  return Math.min(own, step);
}

function finite(step: number): number {
  return Number.isFinite(step) ? step : Number.NaN;
}

function shownName({name}: NumberColumn): string {
  return name.replace(/[^\x20-\x7e]/g, '·').slice(0, 40);
}
