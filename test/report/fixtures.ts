import {type Epochs, FixClass, SatelliteSystem, type Satellites} from '../../src/epochs/epochs.ts';
import {emptySheet} from '../../src/fieldbook/sheet.ts';
import type {
  Candidate,
  Notice,
  OtherSetup,
  PerAxis,
  Position,
  Requirement,
  Result,
  ScatterMeasures,
  Step,
} from '../../src/occupation/result.ts';
import {buildSeries, type ChartSeries} from '../../src/occupation/series.ts';
import {sheetItems} from '../../src/occupation/sheet-items.ts';

/*
 * Invented occupations for the tests of the report: seeded, far from any real place or person.
 * Their numbers are consistent with their columns where the report shows both.
 */

export interface SampleSpec {
  readonly seconds: number;
  readonly intervalS: number;
  /** Standard deviations of white and of slowly changing noise, for E, N; up has 1.8 times both. */
  readonly whiteM: number;
  readonly slowM: number;
  readonly slowS: number;
  readonly offsetM: PerAxis;
  readonly stepM: number;
  readonly driftM: number;
  readonly gap: boolean;
  /** Share of epochs left out. */
  readonly leftOut: number;
  readonly heights: boolean;
  readonly satellites: boolean;
  readonly quality: boolean;
  readonly resolutionM: number;
  readonly mark: boolean;
  readonly toleranceM: number | null;
  readonly candidates: readonly Candidate[];
  readonly names: {readonly mark: string; readonly file: string};
  readonly longitudeDeg: number;
  readonly seed: number;
}

export const STILL_HOUR: SampleSpec = {
  seconds: 3600,
  intervalS: 1,
  whiteM: 0.003,
  slowM: 0.004,
  slowS: 240,
  offsetM: {east: 0.0092, north: -0.0061, up: 0.0113},
  stepM: 0,
  driftM: 0,
  gap: false,
  leftOut: 0.01,
  heights: true,
  satellites: true,
  quality: true,
  resolutionM: 0.0001,
  mark: true,
  toleranceM: 0.02,
  candidates: [],
  names: {mark: 'Skerry 4', file: 'skerry4.nmea'},
  longitudeDeg: -6.31,
  seed: 1,
};

export const DAY_WITH_JUMP: SampleSpec = {
  ...STILL_HOUR,
  seconds: 86_400,
  whiteM: 0.004,
  slowM: 0.005,
  slowS: 900,
  stepM: 0.012,
  gap: true,
  names: {mark: 'Harbour pillar 7', file: 'pillar7-day.nmea'},
  seed: 2,
};

export const FLOAT_MINUTES: SampleSpec = {
  ...STILL_HOUR,
  seconds: 180,
  whiteM: 0.15,
  slowM: 0.9,
  slowS: 60,
  offsetM: {east: 0, north: 0, up: 0},
  leftOut: 0.12,
  mark: false,
  toleranceM: null,
  names: {mark: 'Quarry gate', file: 'gate.nmea'},
  seed: 3,
};

export const HEIGHT_BLUNDER: SampleSpec = {
  ...STILL_HOUR,
  seconds: 5400,
  offsetM: {east: 0.004, north: 0.003, up: 1.5137},
  candidates: [
    {
      code: 'V03',
      title: 'Antenna height not applied',
      predictedM: {east: 0, north: 0, up: 1.513},
      misfit: 0.4,
      group: 1,
      advice: 'Apply the height, and state which point the log describes.',
    },
    {
      code: 'V14',
      title: 'Another pole length entered than stood in the field',
      predictedM: {east: 0, north: 0, up: 1.5},
      misfit: 2.1,
      group: 1,
      advice: 'Check the stop of the pole.',
    },
  ],
  names: {mark: 'Lighthouse step', file: 'step.nmea'},
  seed: 4,
};

/** A small generator with a full period (mulberry32), so that every run draws the same record. */
export function randomOf(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

function normalOf(random: () => number): () => number {
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** What the field sheet of the samples states; everything else in it is left blank. */
const STATED: Readonly<Record<string, string>> = {
  purpose: 'opening check before the survey of the slipway',
  weather: 'overcast, wind from the west',
  problems: 'none',
};

/** GPS seconds of 2026-05-04T06:00:00Z. */
const START = 1_461_909_618;
const START_MS = Date.UTC(2026, 4, 4, 6, 0, 0);

function iso(elapsedS: number): string {
  return new Date(START_MS + elapsedS * 1000).toISOString().replace('.000Z', 'Z');
}

/** The parts on both sides of a planted step, or the whole. */
function partsOf({seconds, stepM}: SampleSpec): {fromUtc: string; toUtc: string}[] {
  const edges = stepM > 0 ? [0, Math.floor(0.62 * seconds), seconds] : [0, seconds];
  return edges.slice(1).map((end, k) => ({fromUtc: iso(edges[k]!), toUtc: iso(end - 1)}));
}

export interface Sample {
  readonly result: Result;
  readonly series: ChartSeries;
}

interface Columns {
  readonly epochs: Epochs;
  readonly used: Uint8Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly upM: Float64Array;
  readonly gap: readonly [number, number] | null;
}

export function sample(spec: SampleSpec): Sample {
  const columns = columnsOf(spec);
  const series = buildSeries({
    ...columns,
    satellites: satellitesOf(spec),
    intervalS: spec.seconds > 0 ? spec.intervalS : null,
    resolutionM: {
      east: spec.resolutionM,
      north: spec.resolutionM,
      up: spec.heights ? spec.resolutionM : null,
    },
    parts: partsOf(spec),
    settlingHalfWidthM: (elapsedS) => ({
      east: halfWidthM(spec, elapsedS),
      north: halfWidthM(spec, elapsedS),
      up: spec.heights ? 1.8 * halfWidthM(spec, elapsedS) : null,
    }),
  });
  return {result: resultOf(spec, columns, series), series};
}

/** 1.96 standard errors of the mean of white noise plus a first-order Gauss-Markov process. */
function halfWidthM(spec: SampleSpec, elapsedS: number): number {
  const ratio = spec.slowS / Math.max(elapsedS, spec.intervalS);
  const slow = spec.slowM ** 2 * 2 * ratio * (1 - ratio * (1 - Math.exp(-1 / ratio)));
  const white = (spec.whiteM ** 2 * spec.intervalS) / Math.max(elapsedS, spec.intervalS);
  return 1.96 * Math.sqrt(slow + white);
}

function columnsOf(spec: SampleSpec): Columns {
  const random = randomOf(spec.seed);
  const normal = normalOf(random);
  const all = Math.max(1, Math.round(spec.seconds / spec.intervalS));
  const gap: [number, number] | null = spec.gap
    ? [Math.round(spec.seconds * 0.36), Math.round(spec.seconds * 0.37)]
    : null;
  const kept: number[] = [];
  for (let i = 0; i < all; i++) {
    const t = i * spec.intervalS;
    if (gap === null || t <= gap[0] || t >= gap[1]) kept.push(t);
  }
  const count = kept.length;
  const keep = Math.exp(-spec.intervalS / spec.slowS);
  const kick = spec.slowM * Math.sqrt(1 - keep * keep);
  const slow = {
    east: spec.slowM * normal(),
    north: spec.slowM * normal(),
    up: spec.slowM * normal(),
  };
  const used = new Uint8Array(count);
  const axes = [0, 1, 2].map(() => new Float64Array(count));
  const quantised = (valueM: number) => Math.round(valueM / spec.resolutionM) * spec.resolutionM;
  for (let i = 0; i < count; i++) {
    slow.east = keep * slow.east + kick * normal();
    slow.north = keep * slow.north + kick * normal();
    slow.up = keep * slow.up + kick * normal();
    const t = kept[i]!;
    const moved = t > 0.62 * spec.seconds ? spec.stepM : 0;
    const drift = spec.driftM * (t / Math.max(1, spec.seconds));
    const out = random() < spec.leftOut;
    used[i] = out ? 0 : 1;
    const far = out ? 20 * spec.whiteM : 0;
    axes[0]![i] = quantised(
      spec.offsetM.east + slow.east + spec.whiteM * normal() + moved + drift + far,
    );
    axes[1]![i] = quantised(spec.offsetM.north + slow.north + spec.whiteM * normal() - moved / 2);
    axes[2]![i] = spec.heights
      ? quantised(spec.offsetM.up + 1.8 * (slow.up + spec.whiteM * normal()) - drift)
      : Number.NaN;
  }
  return {
    epochs: epochColumns(spec, kept, random),
    used,
    eastM: axes[0]!,
    northM: axes[1]!,
    upM: axes[2]!,
    gap,
  };
}

function epochColumns(spec: SampleSpec, times: readonly number[], random: () => number): Epochs {
  const count = times.length;
  const none = () => new Float32Array(count).fill(Number.NaN);
  const hdop = none();
  const satellites = new Uint8Array(count).fill(255);
  const age = none();
  if (spec.quality) {
    for (let i = 0; i < count; i++) {
      const t = times[i]!;
      satellites[i] = 15 + Math.round(3 * Math.sin(t / 4000)) + (random() < 0.1 ? -1 : 0);
      hdop[i] = Number((0.8 - 0.2 * Math.sin(t / 4000)).toFixed(1));
      age[i] = Math.floor(random() * 3) + 1;
    }
  }
  return {
    count,
    gpsSeconds: Float64Array.from(times, (t) => START + t),
    latitudeDeg: new Float64Array(count).fill(57.2),
    longitudeDeg: new Float64Array(count).fill(spec.longitudeDeg),
    ellipsoidalHeightM: new Float64Array(count).fill(spec.heights ? 61 : Number.NaN),
    altitudeM: new Float64Array(count).fill(Number.NaN),
    separationM: none(),
    fixClass: new Uint8Array(count).fill(FixClass.fixed),
    satellites,
    hdop,
    pdop: none(),
    vdop: none(),
    correctionAgeS: age,
    stationId: new Uint16Array(count).fill(65_535),
    sigmaEastM: none(),
    sigmaNorthM: none(),
    sigmaUpM: none(),
    flags: new Uint16Array(count),
    inputIndex: new Uint8Array(count),
    lineNumber: new Uint32Array(count),
  };
}

/** Circular paths across the sky with a shadow in the north, sampled every 30 s. */
function satellitesOf(spec: SampleSpec): Satellites {
  const random = randomOf(spec.seed + 100);
  const rows: number[][] = [];
  const systems = [
    [SatelliteSystem.gps, 11],
    [SatelliteSystem.glonass, 8],
    [SatelliteSystem.galileo, 9],
    [SatelliteSystem.beidou, 10],
  ] as const;
  for (const [system, number] of spec.satellites ? systems : []) {
    for (let id = 1; id <= number; id++) {
      const phase = random() * 2 * Math.PI;
      const tilt = (random() * 2 - 1) * 1.2;
      const turn = random() * 2 * Math.PI;
      for (let t = 0; t < Math.max(30, spec.seconds); t += 30) {
        const angle = phase + (t / 43_080) * 2 * Math.PI;
        const x =
          Math.cos(angle) * Math.cos(turn) - Math.sin(angle) * Math.sin(turn) * Math.cos(tilt);
        const y =
          Math.cos(angle) * Math.sin(turn) + Math.sin(angle) * Math.cos(turn) * Math.cos(tilt);
        const z = Math.sin(angle) * Math.sin(tilt);
        const elevationDeg =
          (Math.asin(Math.max(-1, Math.min(1, Math.abs(z) * 1.05))) * 180) / Math.PI;
        const azimuthDeg = ((Math.atan2(x, y) * 180) / Math.PI + 360) % 360;
        if (z < 0.04) continue;
        const shadow = (azimuthDeg < 28 || azimuthDeg > 332) && elevationDeg < 33;
        const strength = shadow ? Number.NaN : 31 + elevationDeg / 5 + random() * 5;
        rows.push([START + t, system, id, elevationDeg, azimuthDeg, strength]);
      }
    }
  }
  rows.sort((a, b) => a[0]! - b[0]!);
  const column = (k: number) => rows.map((row) => row[k]!);
  return {
    count: rows.length,
    gpsSeconds: Float64Array.from(column(0)),
    system: Uint8Array.from(column(1)),
    satelliteId: Uint16Array.from(column(2)),
    elevationDeg: Float32Array.from(column(3)),
    azimuthDeg: Float32Array.from(column(4)),
    carrierToNoiseDbHz: Float32Array.from(column(5)),
  };
}

function resultOf(spec: SampleSpec, columns: Columns, series: ChartSeries): Result {
  const read = columns.epochs.count;
  const used = columns.used.reduce((sum, flag) => sum + flag, 0);
  const jumped = spec.stepM > 0 && used > 100;
  const position = used === 0 || jumped ? null : positionOf(spec, series);
  const lastS = columns.epochs.gpsSeconds[read - 1]! - START;
  const steps: Step[] = jumped
    ? [
        {
          utc: iso(Math.floor(0.62 * spec.seconds)),
          interval95Utc: [iso(0.61 * spec.seconds), iso(0.63 * spec.seconds)],
          eastM: spec.stepM,
          northM: -spec.stepM / 2,
          upM: spec.heights ? 0.0004 : null,
          material: true,
          beside: [],
        },
      ]
    : [];
  const measures = used > 1 ? measuresOf(series) : null;
  const compared = spec.mark && position !== null;
  const verdict = spec.mark
    ? jumped
      ? 'moving'
      : Math.hypot(spec.offsetM.east, spec.offsetM.north, spec.offsetM.up) > 0.1
        ? 'off'
        : used < 30
          ? 'cannot tell'
          : 'holds'
    : null;
  return {
    schema: 'stillmark.result/1',
    program: {name: 'stillmark', version: '0.1.0'},
    command: spec.mark ? 'check' : 'reduce',
    inputs: [
      {
        name: spec.names.file,
        bytes: read * 412,
        sha256: '8d0f4a7b'.repeat(8),
        kind: spec.satellites || spec.quality ? 'nmea' : 'table',
        lines: {
          total: read * 5 + 3,
          used: read * 4,
          ignored: {VTG: read},
          rejected: {'bad checksum': 2, 'cut short': 1},
        },
        betweenBytes: 0,
        sentences: {GNGGA: read, GNRMC: read, GNGST: read, GNGSA: read},
        firstUtc: iso(0),
        lastUtc: iso(lastS),
      },
    ],
    occupation: {
      mark: spec.names.mark,
      setUpId: null,
      startUtc: iso(0),
      endUtc: iso(lastS),
      antennaHeightM: 1.513,
      heightUsed: 'opening',
    },
    fieldSheet: sheetItems(emptySheet()).map((item) => ({
      ...item,
      value: item.item === 'mark' ? spec.names.mark : (STATED[item.item] ?? null),
    })),
    markRecord: [],
    epochs: {
      read,
      used,
      screened: used === read ? {} : {'far from its neighbours': read - used},
      firstUtc: iso(0),
      lastUtc: iso(lastS),
      intervalS: read > 1 ? spec.intervalS : null,
      gaps:
        columns.gap === null
          ? []
          : [
              {
                fromUtc: iso(columns.gap[0]),
                toUtc: iso(columns.gap[1]),
                durationS: columns.gap[1] - columns.gap[0],
              },
            ],
      resolutionM: {
        east: spec.resolutionM,
        north: spec.resolutionM,
        up: spec.heights ? spec.resolutionM : null,
      },
      fixClasses: {fixed: read},
    },
    reference: {
      from: spec.mark ? 'mark' : 'mean',
      name: spec.mark ? spec.names.mark : null,
      geodetic: {latitudeDeg: 57.2, longitudeDeg: spec.longitudeDeg, ellipsoidalHeightM: 60.98},
      ecefM: {x: 3_444_000.1, y: -381_000.2, z: 5_337_000.3},
    },
    position,
    segments:
      used === 0
        ? []
        : jumped
          ? partsOf(spec).map((part, k) => ({
              ...part,
              epochs: Math.round(used * (k === 0 ? 0.62 : 0.38)),
              position: positionOf(spec, series),
            }))
          : [{fromUtc: iso(0), toUtc: iso(lastS), epochs: used, position: position!}],
    budget: budgetOf(spec, used),
    scatter:
      measures === null
        ? null
        : {
            aboutMean: {observed: measures, normalTheory: scaled(measures, 0.98)},
            aboutReference: {observed: scaled(measures, 1.4), normalTheory: scaled(measures, 1.4)},
          },
    screening: {
      fixClassKept: used === 0 ? null : 'fixed',
      withoutScreening:
        used === 0
          ? null
          : {offsetFromResultM: {east: 0.0002, north: -0.0001, up: 0.0003}, epochs: read},
      receiverSigmaM: null,
    },
    stability: {
      verdict:
        used < 60 ? 'cannot tell' : jumped ? 'stepped' : spec.driftM > 0 ? 'drifting' : 'still',
      drift: driftOf(spec, used),
      steps,
      settling: null,
      movementLimitM: {horizontal: 0.005, up: spec.heights ? 0.008 : null},
    },
    comparison: compared
      ? {
          mark: spec.names.mark,
          offsetM: {
            ...offsets(series, spec.heights),
            horizontal: Math.hypot(series.histograms.east!.meanM, series.histograms.north!.meanM),
          },
          azimuthDeg:
            ((Math.atan2(series.histograms.east!.meanM, series.histograms.north!.meanM) * 180) /
              Math.PI +
              360) %
            360,
          requirements: requirementsOf(spec, verdict === 'off'),
          normalisedError: {east: 0.8, north: 0.7, up: spec.heights ? 0.9 : null, horizontal: 1.2},
          agreement: 'disagrees',
          assumptions: ['the mark has the frame and the epoch of the log'],
          frameChange: null,
          diagnosis: null,
          otherSetups: [otherSetup(spec.heights)],
          candidates: spec.candidates,
        }
      : null,
    verdict,
    settings: {
      tolerance: {value: '20mm', from: 'command line'},
      fix: {value: 'best', from: 'default'},
      'max-hdop': {value: null, from: 'default'},
    },
    notices: noticesOf(spec, position),
  };
}

function offsets(series: ChartSeries, heights: boolean): PerAxis<number | null> {
  return {
    east: series.histograms.east!.meanM,
    north: series.histograms.north!.meanM,
    up: heights ? (series.histograms.up?.meanM ?? null) : null,
  };
}

function positionOf(spec: SampleSpec, series: ChartSeries): Position {
  const known = series.spanS >= 59 && spec.whiteM + spec.slowM > 0;
  const halfM = halfWidthM(spec, Math.max(series.spanS, 1));
  const looks = (spec.whiteM ** 2 + spec.slowM ** 2) / Math.max(1e-12, (halfM / 1.96) ** 2);
  const perAxis = (value: number, up: number) => ({
    east: value,
    north: value,
    up: spec.heights ? up : null,
  });
  return {
    of: 'mark',
    frame: 'ITRF2020',
    frameFrom: 'sheet',
    coordinateEpoch: 2026.34,
    observedUtc: iso(series.spanS / 2),
    ecefM: spec.heights ? {x: 3_444_012.1234, y: -381_013.2345, z: 5_337_014.3456} : null,
    geodetic: {
      latitudeDeg: 57.2012345678,
      longitudeDeg: spec.longitudeDeg,
      ellipsoidalHeightM: spec.heights ? 60.9876 : null,
    },
    orthometricHeightM: spec.heights ? 4.321 : null,
    separation: null,
    grid: null,
    originEcefM: {x: 3_444_012, y: -381_013, z: 5_337_014},
    standardUncertaintyM: known ? perAxis(halfM / 1.96, (1.8 * halfM) / 1.96) : null,
    uncertainty95M: known
      ? {...perAxis(halfM, 1.8 * halfM), horizontalRadius: 1.249 * halfM}
      : null,
    ellipse95: known ? {semiMajorM: 1.3 * halfM, semiMinorM: 1.15 * halfM, azimuthDeg: 35} : null,
    covarianceEnuM2: known
      ? [
          [halfM ** 2 / 3.84, 0, spec.heights ? 0 : null],
          [0, halfM ** 2 / 3.84, spec.heights ? 0 : null],
          [spec.heights ? 0 : null, spec.heights ? 0 : null, spec.heights ? halfM ** 2 : null],
        ]
      : null,
    independentLooks: known ? perAxis(looks, looks * 0.8) : null,
    correlationTimeS: known
      ? perAxis(series.spanS / (2 * looks), series.spanS / (1.6 * looks))
      : null,
  };
}

function measuresOf(series: ChartSeries): ScatterMeasures {
  const deviation = (axis: 'east' | 'north' | 'up') =>
    series.histograms[axis]?.standardDeviationM ?? null;
  const [east, north] = [deviation('east') ?? 0, deviation('north') ?? 0];
  return {
    standardDeviationM: {east, north, up: deviation('up')},
    drmsM: Math.hypot(east, north),
    cepM: 0.5887 * (east + north),
    r95M: 1.7308 * Math.hypot(east, north),
    ellipse:
      east > 0 && north > 0
        ? {
            semiMajorM: Math.max(east, north) * 1.05,
            semiMinorM: Math.min(east, north) * 0.9,
            azimuthDeg: 62,
          }
        : null,
  };
}

function scaled(m: ScatterMeasures, factor: number): ScatterMeasures {
  const by = (value: number | null) => (value === null ? null : value * factor);
  return {
    standardDeviationM: {
      east: by(m.standardDeviationM.east),
      north: by(m.standardDeviationM.north),
      up: by(m.standardDeviationM.up),
    },
    drmsM: by(m.drmsM),
    cepM: by(m.cepM),
    r95M: by(m.r95M),
    ellipse:
      m.ellipse === null
        ? null
        : {
            semiMajorM: m.ellipse.semiMajorM * factor,
            semiMinorM: m.ellipse.semiMinorM * factor,
            azimuthDeg: m.ellipse.azimuthDeg,
          },
  };
}

function driftOf(spec: SampleSpec, used: number): Result['stability']['drift'] {
  if (used < 60) return {east: null, north: null, up: null};
  const hours = spec.seconds / 3600;
  const drift = (rateMPerHour: number, material: boolean) => ({
    rateMPerHour,
    interval95MPerHour: [rateMPerHour - 0.002, rateMPerHour + 0.002] as const,
    detectableMPerHour: (3 * halfWidthM(spec, spec.seconds)) / hours,
    material,
  });
  const rate = spec.driftM / hours;
  return {
    east: drift(rate, spec.driftM > 0),
    north: drift(0.0001, false),
    up: spec.heights ? drift(-rate, spec.driftM > 0) : null,
  };
}

function requirementsOf(spec: SampleSpec, off: boolean): Requirement[] {
  if (spec.toleranceM === null) return [];
  const requirements: Requirement[] = [
    {
      of: 'horizontal',
      toleranceM: spec.toleranceM,
      reason: 'control mark reused as a tie',
      probabilityWithin: 0.999,
      decision: 'accept',
    },
  ];
  if (spec.heights) {
    requirements.push({
      of: 'up',
      toleranceM: 0.03,
      reason: null,
      probabilityWithin: off ? 0.0001 : 0.998,
      decision: off ? 'reject' : 'accept',
    });
  }
  return requirements;
}

function budgetOf(spec: SampleSpec, used: number): Result['budget'] {
  if (used === 0) return [];
  const sessionM = halfWidthM(spec, Math.max(1, spec.seconds)) / 1.96;
  const up = (valueM: number) => (spec.heights ? valueM : null);
  return [
    {
      source: 'session repeatability',
      standardUncertaintyM:
        spec.seconds < 60 ? null : {east: sessionM, north: sessionM, up: up(1.8 * sessionM)},
      sharedBy: null,
      id: null,
      from: 'this record',
    },
    {
      source: 'base or network',
      standardUncertaintyM: null,
      sharedBy: 'base',
      id: null,
      from: 'not included',
    },
    {
      source: 'antenna height',
      standardUncertaintyM: {east: 0, north: 0, up: up(0.001)},
      sharedBy: 'antenna',
      id: 'tape 3',
      from: 'field sheet',
    },
  ];
}

function noticesOf(spec: SampleSpec, position: Position | null): Notice[] {
  const notices: Notice[] = [
    {
      code: 'base-not-included',
      severity: 'caution',
      about: ['budget'],
      values: {},
      text: 'The uncertainty of the base or network is not included: nobody gave it.',
    },
  ];
  if (position === null) {
    notices.push({
      code: 'step-material',
      severity: 'concern',
      about: ['position'],
      values: {sizeM: spec.stepM},
      text: 'Each side of the jump has its own mean; find out which setup is the right one and measure again.',
    });
  }
  return notices;
}

function otherSetup(heights: boolean): OtherSetup {
  return {
    name: 'opening.json',
    setUpId: null,
    startUtc: iso(-9000),
    endUtc: iso(-7200),
    hoursEarlier: 2.75,
    differenceM: {east: 0.0021, north: -0.0034, up: heights ? 0.0042 : null, horizontal: 0.004},
    uncertainty95M: {
      east: 0.006,
      north: 0.006,
      up: heights ? 0.011 : null,
      horizontalRadius: 0.0075,
    },
    normalisedError: {east: 0.35, north: 0.57, up: heights ? 0.38 : null, horizontal: 0.53},
    agreement: 'agrees',
    cancels: ['base or network'],
  };
}
