/**
 * The epochs of one occupation as columns: equal-length typed arrays, one element per epoch, in
 * time order.
 *
 * NaN (or 0 where said) marks what the log did not give. Time is held on the continuous GPS scale,
 * so that elapsed times are right across a leap second; UTC exists only at both ends.
 */
export interface Epochs {
  readonly count: number;
  /** Seconds of GPS time since 1980-01-06T00:00:00. */
  readonly gpsSeconds: Float64Array;
  readonly latitudeDeg: Float64Array;
  readonly longitudeDeg: Float64Array;
  /** NaN when the log gives no height, or an altitude without a geoid separation. */
  readonly ellipsoidalHeightM: Float64Array;
  /** Altitude above the receiver's own geoid model; NaN when absent. */
  readonly altitudeM: Float64Array;
  /** Geoid separation as the receiver printed it; NaN when absent. */
  readonly separationM: Float32Array;
  /** A `FixClass` value. */
  readonly fixClass: Uint8Array;
  /** Satellites used; 255 when not given. */
  readonly satellites: Uint8Array;
  readonly hdop: Float32Array;
  readonly pdop: Float32Array;
  readonly vdop: Float32Array;
  /** Age of corrections; NaN when absent. */
  readonly correctionAgeS: Float32Array;
  /** Correction station; 65535 when not given. */
  readonly stationId: Uint16Array;
  /** The receiver's or table's own standard deviations; NaN when absent. */
  readonly sigmaEastM: Float32Array;
  readonly sigmaNorthM: Float32Array;
  readonly sigmaUpM: Float32Array;
  /** Bits of `EpochFlag`. */
  readonly flags: Uint16Array;
  /** Which input the epoch came from, counted from 0. */
  readonly inputIndex: Uint8Array;
  /** Line of the sentence or row that gave the position, counted from 1. */
  readonly lineNumber: Uint32Array;
}

/**
 * What kind of solution an epoch is, best last within the comparable ones.
 *
 * `precise` (GGA quality 3, GNS mode P, which includes precise point positioning) and `unknown`
 * (a table without a quality column) are classes apart: never better or worse than another.
 */
export const FixClass = {
  none: 0,
  autonomous: 1,
  differential: 2,
  float: 3,
  fixed: 4,
  precise: 5,
  unknown: 6,
  /** GGA quality 6, 7 and 8: dead reckoning, manual input, simulator. Never a measurement. */
  notMeasured: 7,
} as const;
export type FixClass = (typeof FixClass)[keyof typeof FixClass];

/** Facts about an epoch that screening and findings rest on; combined as bits. */
export const EpochFlag = {
  /** RMC status V, mode N, or quality 0: the receiver itself says that the position is invalid. */
  invalid: 1,
  /** Same time as the epoch before it (a second talker, a repeated line, an overlap of files). */
  repeated: 2,
  /** Exactly the position of the epoch before it, at a later time. */
  frozen: 4,
  /** Stood earlier in time than its predecessor in the file and was put into order. */
  outOfOrder: 8,
  /** The satellite count is a lower bound ("12" in a GGA sentence without a GSA count). */
  satellitesAtLeast: 16,
  /** No date reached this epoch from its own log; it rests on `--date`. */
  dateAssumed: 32,
  /** Plan position only: the log gives no height. */
  planOnly: 64,
} as const;

/** Satellites seen, sampled about every 30 s: one element per satellite and sample. */
export interface Satellites {
  readonly count: number;
  readonly gpsSeconds: Float64Array;
  /** A `SatelliteSystem` value. */
  readonly system: Uint8Array;
  readonly satelliteId: Uint16Array;
  /** NaN when not given. */
  readonly elevationDeg: Float32Array;
  readonly azimuthDeg: Float32Array;
  /** Strongest signal of the satellite at that time, dB-Hz; NaN when not tracked. */
  readonly carrierToNoiseDbHz: Float32Array;
}

/** Numbers as in the system id of GSA and GSV (NMEA 0183 v4.11); 0 where a log does not say. */
export const SatelliteSystem = {
  unknown: 0,
  gps: 1,
  glonass: 2,
  galileo: 3,
  beidou: 4,
  qzss: 5,
  navic: 6,
} as const;
