import {describe, expect, test} from 'vitest';
import {UsageError} from '../../src/errors.ts';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {frameNamed} from '../../src/geodesy/frame-names.ts';
import {
  type FrameAndEpoch,
  planBetween,
  planTransformation,
  transformByPlan,
  transformPosition,
} from '../../src/geodesy/frames.ts';
import {ecefFromGeodetic} from '../../src/geodesy/geocentric.ts';
import {applyHelmert, helmertAt, type Vector3} from '../../src/geodesy/helmert.ts';
import {ITRF2020_PMM, plateNamed} from '../../src/geodesy/plates.ts';
import {atRestIn, type PointMotion} from '../../src/geodesy/point-motion.ts';
import type {Ecef} from '../../src/geodesy/types.ts';
import {readReference} from '../reference/read.ts';
import {PLACES, WRONG_FRAMES} from './wrong-frames.ts';

function ecefOf([xM, yM, zM]: readonly number[]): Ecef {
  return {xM: xM ?? Number.NaN, yM: yM ?? Number.NaN, zM: zM ?? Number.NaN};
}

function distanceM(a: Ecef, b: Ecef): number {
  return Math.hypot(a.xM - b.xM, a.yM - b.yM, a.zM - b.zM);
}

/** "ITRF2014@2018.0" as frame and epoch. */
function sideOf(text: string): FrameAndEpoch {
  const [frame = '', epoch] = text.split('@');
  return {frame, epoch: epoch === undefined ? null : Number(epoch)};
}

function transformed(
  ecef: Ecef,
  from: string,
  to: string,
  motion: PointMotion | null = null,
): Ecef {
  return transformPosition({ecef, from: sideOf(from), to: sideOf(to), motion}).ecef;
}

interface ProjRow {
  readonly pair: string;
  readonly epoch: number;
  readonly xyz_in: readonly number[];
  readonly proj_xyz: readonly number[];
  readonly differs_mm?: number;
}

describe('frames against PROJ', () => {
  const {rows} = readReference<{rows: readonly ProjRow[]}>('frames-proj');

  function differenceMm(row: ProjRow): number {
    const [from = '', to = ''] = row.pair.split('>');
    const found = transformed(ecefOf(row.xyz_in), `${from}@${row.epoch}`, `${to}@${row.epoch}`);
    return distanceM(found, ecefOf(row.proj_xyz)) * 1000;
  }

  test('reference: 73 rows of PROJ 9.1.1 pipelines within 0.001 mm', () => {
    const agreeing = rows.filter((row) => row.differs_mm === undefined);
    expect(agreeing).toHaveLength(73);
    for (const row of agreeing) expect(differenceMm(row), row.pair).toBeLessThan(0.001);
  });

  test('reference: 8 rows differ because the sources differ, by what the sources differ', () => {
    // GDA94: over GDA2020 (GDA2020 Technical Manual) instead of the direct sets of 2010. WGS 84:
    // identical with its ITRF instead of the sets between realisations. Both are the later
    // publication; the file says which row is which.
    const differing = rows.filter((row) => row.differs_mm !== undefined);
    expect(differing).toHaveLength(8);
    for (const row of differing) {
      expect(Math.abs(differenceMm(row) - (row.differs_mm ?? 0)), row.pair).toBeLessThan(0.001);
      expect(row.differs_mm).toBeLessThan(row.pair.startsWith('WGS') ? 30 : 101);
    }
  });
});

interface PublishedSet {
  readonly id: string;
  readonly from: string;
  readonly to: string;
  readonly t0: number | null;
  readonly T: Vector3;
  readonly D: number;
  readonly R: Vector3;
  readonly dT: Vector3;
  readonly dD: number;
  readonly dR: Vector3;
  readonly chain_differs_mm: Readonly<Record<string, number>>;
}

describe('the chain through the hub', () => {
  const {rows} = readReference<{rows: readonly PublishedSet[]}>('frames-published-sets');
  /** Sets that an other publication contradicts, and by how much at most within 1990 to 2026.9. */
  const CONTRADICTED: readonly string[] = [
    // IERS ITRF96 = ITRF97; the set below starts from the other ITRF96, of the IGS.
    'ITRF96>NAD83(CORS96)',
    // Dawson & Woods (2010) against today's route over GDA2020.
    'ITRF2008>GDA94',
    'ITRF2005>GDA94',
    'ITRF2000>GDA94',
    'ITRF97>GDA94',
    'ITRF96>GDA94',
    // Seven parameters between realisations against their identity with an ITRF.
    'WGS 84 (G2139)>WGS 84 (G2296)',
    'WGS 84 (G1762)>WGS 84 (G2139)',
    'WGS 84 (G1674)>WGS 84 (G1762)',
    'WGS 84 (G1150)>WGS 84 (G1762)',
    'WGS 84 (G1150)>WGS 84 (G1674)',
    // Takes WGS 84 (G1762) as ITRF2014, where we take it as ITRF2008.
    'GDA2020>WGS 84 (G1762)',
  ];

  function largestDifferenceMm(row: PublishedSet): number {
    const set = {
      t0: row.t0 ?? 2000,
      translationMm: row.T,
      scalePpb: row.D,
      rotationMas: row.R,
      translationRate: row.dT,
      scaleRate: row.dD,
      rotationRate: row.dR,
    };
    let largest = 0;
    for (const epoch of [1990, 2000, 2010, 2020, 2026.9]) {
      for (const [latitudeDeg, longitudeDeg] of [
        [0, 0],
        [52, 5],
        [-37, 145],
        [40, -105],
        [-78, 167],
      ] as const) {
        const ecef = ecefFromGeodetic({latitudeDeg, longitudeDeg, ellipsoidalHeightM: 0}, GRS80);
        const direct = applyHelmert(ecef, helmertAt(set, epoch));
        const from = {frame: frameNamed(row.from), epoch};
        // Parameters hold everywhere; without the areas of use they can be compared everywhere.
        const plan = {...planBetween(from, {frame: frameNamed(row.to), epoch}, null), frames: []};
        const chain = transformByPlan(plan, ecef);
        largest = Math.max(largest, distanceM(direct, chain) * 1000);
      }
    }
    return largest;
  }

  test('reference: 105 published direct sets come back within 0.01 mm, 1990 to 2026.9', () => {
    const agreeing = rows.filter((row) => !CONTRADICTED.includes(row.id));
    expect(rows).toHaveLength(117);
    expect(agreeing).toHaveLength(105);
    for (const row of agreeing) expect(largestDifferenceMm(row), row.id).toBeLessThan(0.01);
  });

  test('reference: the 12 others differ by no more than their publications do', () => {
    for (const id of CONTRADICTED) {
      const row = rows.find((candidate) => candidate.id === id);
      if (row === undefined) throw new Error(`no row ${id}`);
      const published = Math.max(...Object.values(row.chain_differs_mm));
      const found = largestDifferenceMm(row);
      expect(found, id).toBeGreaterThan(1);
      // The published figure bounds the worst place on Earth; ours are five places.
      expect(found, id).toBeLessThan(published + 0.01);
    }
  });
});

type Coordinates = Readonly<Record<string, readonly number[]>>;
interface WorkedExamples {
  readonly euref_tn1_appendix_B: {
    readonly station_velocity_ITRF2020_m_per_yr: readonly [number, number, number];
    readonly epochs: Readonly<Record<'2010' | '2020', Coordinates>>;
    readonly ETRF2020_velocity: readonly [number, number, number];
  };
  readonly gda2020_technical_manual: {readonly ALIC: Coordinates};
  readonly ngs_coordinate_files: Readonly<
    Record<'TTCD' | 'TORP' | 'ALA1' | 'P041', Readonly<Record<string, readonly (number | null)[]>>>
  >;
  readonly proj_gie_itrf2000_itrf93: Coordinates;
}

describe('published examples', () => {
  const examples = readReference<WorkedExamples>('frames-worked-examples');

  test('reference: EUREF Technical Note 1, Appendix B, ten positions within 0.1 mm', () => {
    const {epochs} = examples.euref_tn1_appendix_B;
    let compared = 0;
    for (const epoch of ['2010', '2020'] as const) {
      const table = epochs[epoch];
      const start = ecefOf(table.ITRF2020 ?? []);
      for (const frame of ['ETRF2020', 'ITRF2014', 'ETRF2014', 'ITRF2000', 'ETRF2000']) {
        const found = transformed(start, `ITRF2020@${epoch}`, `${frame}@${epoch}`);
        const published = ecefOf(table[frame] ?? []);
        expect(Math.abs(found.xM - published.xM), frame).toBeLessThan(1e-4);
        expect(Math.abs(found.yM - published.yM), frame).toBeLessThan(1e-4);
        expect(Math.abs(found.zM - published.zM), frame).toBeLessThan(1e-4);
        compared++;
      }
    }
    expect(compared).toBe(10);
  });

  test('reference: the same, ITRF2020 at 2010 to ETRF2020 at 2020 by the published velocity', () => {
    const {epochs, station_velocity_ITRF2020_m_per_yr: v} = examples.euref_tn1_appendix_B;
    const motion: PointMotion = {
      kind: 'geocentric velocity',
      frame: 'ITRF2020',
      mPerYear: {x: v[0], y: v[1], z: v[2]},
    };
    const start = ecefOf(epochs['2010'].ITRF2020 ?? []);
    const there = transformed(start, 'ITRF2020@2010', 'ETRF2020@2020', motion);
    expect(distanceM(there, ecefOf(epochs['2020'].ETRF2020 ?? []))).toBeLessThan(2e-4);
    // Ten years in ETRF2020 show the published velocity; the positions are printed to 0.1 mm.
    const before = transformed(start, 'ITRF2020@2010', 'ETRF2020@2010');
    const [vx, vy, vz] = examples.euref_tn1_appendix_B.ETRF2020_velocity;
    expect(Math.abs((there.xM - before.xM) / 10 - vx)).toBeLessThan(1e-5);
    expect(Math.abs((there.yM - before.yM) / 10 - vy)).toBeLessThan(1e-5);
    expect(Math.abs((there.zM - before.zM) / 10 - vz)).toBeLessThan(1e-5);
  });

  test('reference: GDA2020 Technical Manual, ALIC, within 0.1 mm', () => {
    const {ALIC} = examples.gda2020_technical_manual;
    const at = (key: string) => ecefOf(ALIC[key] ?? []);
    const gda2020 = transformed(at('GDA94'), 'GDA94@2020', 'GDA2020@2020');
    expect(distanceM(gda2020, at('GDA2020_from_GDA94'))).toBeLessThan(1e-4);
    const fromItrf = transformed(at('ITRF2014@2018.0'), 'ITRF2014@2018', 'GDA2020@2018');
    expect(distanceM(fromItrf, at('GDA2020_from_ITRF2014@2018.0'))).toBeLessThan(1e-4);
    const later = transformed(
      at('ITRF2014@2018.0'),
      'ITRF2014@2018',
      'ATRF2014@2025',
      atRestIn('GDA2020'),
    );
    expect(distanceM(later, at('ATRF2014@2025.0_from_2018.0'))).toBeLessThan(1e-4);
  });

  test('reference: station files of the US National Geodetic Survey within 0.5 mm', () => {
    const {TTCD, TORP, ALA1} = examples.ngs_coordinate_files;
    for (const station of [TTCD, TORP]) {
      const start = ecefOf((station['ITRF2014@2010.0'] ?? []).map(Number));
      const found = transformed(start, 'ITRF2014@2010', 'NAD83(2011)@2010');
      const [x, y] = station['NAD83(2011)@2010.0'] ?? [];
      expect(Math.abs(found.xM - Number(x))).toBeLessThan(5e-4);
      expect(Math.abs(found.yM - Number(y))).toBeLessThan(5e-4);
    }
    const [x, y, z] = (ALA1.velocity ?? []).map(Number);
    const found = transformed(
      ecefOf((ALA1['ITRF2020@2020.0'] ?? []).map(Number)),
      'ITRF2020@2020',
      'NAD83(2011)@2010',
      {
        kind: 'geocentric velocity',
        frame: 'ITRF2020',
        mPerYear: {x: x ?? Number.NaN, y: y ?? Number.NaN, z: z ?? Number.NaN},
      },
    );
    const published = ecefOf((ALA1['NAD83(2011)@2010.0'] ?? []).map(Number));
    expect(Math.abs(found.xM - published.xM)).toBeLessThan(5e-4);
    expect(Math.abs(found.yM - published.yM)).toBeLessThan(5e-4);
    expect(Math.abs(found.zM - published.zM)).toBeLessThan(5e-4);
  });

  test('reference: a plate model misses what is not plate motion by what the file says', () => {
    // The station sinks by 3 mm per year; the model knows no vertical motion.
    const {P041} = examples.ngs_coordinate_files;
    const found = transformed(
      ecefOf((P041['ITRF2020@2020.0'] ?? []).map(Number)),
      'ITRF2020@2020',
      'NAD83(2011)@2010',
      {kind: 'plate', plate: plateNamed('NOAM', ITRF2020_PMM), model: ITRF2020_PMM},
    );
    const published = ecefOf((P041['NAD83(2011)@2010.0'] ?? []).map(Number));
    const [dx = 0, dy = 0, dz = 0] = (P041.residual_mm_with_PMM_NOAM ?? []).map(Number);
    expect(Math.abs((found.xM - published.xM) * 1000 - dx)).toBeLessThan(0.1);
    expect(Math.abs((found.yM - published.yM) * 1000 - dy)).toBeLessThan(0.1);
    expect(Math.abs((found.zM - published.zM) * 1000 - dz)).toBeLessThan(0.1);
  });

  test('reference: Onsala, ITRF2000 to ITRF93 at 2017.0 (PROJ test suite), within 0.1 mm', () => {
    const table = examples.proj_gie_itrf2000_itrf93;
    const found = transformed(
      ecefOf(table['ITRF2000@2017.0'] ?? []),
      'ITRF2000@2017',
      'ITRF93@2017',
    );
    expect(distanceM(found, ecefOf(table['ITRF93@2017.0'] ?? []))).toBeLessThan(1e-4);
  });
});

const BERLIN = ecefFromGeodetic(PLACES.Berlin, GRS80);

describe('what a reader can redo', () => {
  test('every step carries its parameters, and redoing them gives the result', () => {
    const result = transformPosition({
      ecef: BERLIN,
      from: {frame: 'IGS14', epoch: 2026.9},
      to: {frame: 'ETRF2000', epoch: 2010},
      motion: atRestIn('ETRF2014'),
    });
    expect(result.plan.steps.map((step) => step.kind)).toEqual([
      'coincident',
      'helmert',
      'at rest',
      'helmert',
      'helmert',
      'helmert',
    ]);
    let at = BERLIN;
    for (const {step, ecef} of result.trace) {
      if (step.kind === 'helmert') {
        const {translationMm: t, scalePpb, rotationMas: r} = step.parameters;
        const mas = 4.848_136_811_095_36e-9;
        const sign = step.inverted ? -1 : 1;
        at = {
          xM:
            at.xM +
            sign * (t[0] / 1e3 + scalePpb * 1e-9 * at.xM + (r[1] * at.zM - r[2] * at.yM) * mas),
          yM:
            at.yM +
            sign * (t[1] / 1e3 + scalePpb * 1e-9 * at.yM + (r[2] * at.xM - r[0] * at.zM) * mas),
          zM:
            at.zM +
            sign * (t[2] / 1e3 + scalePpb * 1e-9 * at.zM + (r[0] * at.yM - r[1] * at.xM) * mas),
        };
        expect(step.source).toMatch(/EUREF|EPSG/);
      }
      // By hand an inverse is the same displacement subtracted: good to 1e-7 m here.
      expect(distanceM(at, ecef)).toBeLessThan(1e-6);
    }
    expect(distanceM(at, result.ecef)).toBeLessThan(1e-6);
    expect(result.plan.frame).toBe('ETRF2000');
    expect(result.plan.epoch).toBe(2010);
  });

  test('property: there and back is the same point, for every pair of frames', () => {
    const names = ['ITRF2014', 'ITRF93', 'IGS08', 'WGS84(G1150)', 'ETRF2000', 'ETRS89-DEU(2016)'];
    const motion: PointMotion = {
      kind: 'plate',
      plate: plateNamed('EURA', ITRF2020_PMM),
      model: ITRF2020_PMM,
    };
    for (const a of names) {
      for (const b of names) {
        const there = transformed(BERLIN, `${a}@2005.5`, `${b}@2024`, motion);
        const back = transformed(there, `${b}@2024`, `${a}@2005.5`, motion);
        // The plate's velocity is that of the start of each leg: half a metre farther on it is the
        // same to 1e-9 m per year.
        expect(distanceM(back, BERLIN), `${a} ${b}`).toBeLessThan(1e-7);
      }
    }
  });

  test('the uncertainty has a row per link that is not a definition, and one for the motion', () => {
    const {uncertainties, standardUncertaintyM} = planTransformation({
      from: {frame: 'WGS84(G2139)', epoch: 2026},
      to: {frame: 'ETRF2020', epoch: 2016},
      motion: {kind: 'plate', plate: plateNamed('Eurasia', ITRF2020_PMM), model: ITRF2020_PMM},
    });
    expect(uncertainties).toEqual([
      {
        source: 'WGS84(G2139) to ITRF2014',
        standardUncertaintyM: {east: 0.02, north: 0.02, up: 0.02},
      },
      {
        source: 'ITRF2014 to ITRF2020',
        standardUncertaintyM: {east: 0.002, north: 0.002, up: 0.002},
      },
      {
        source: 'motion by ITRF2020-PMM',
        standardUncertaintyM: {east: 0.0025, north: 0.0025, up: 0.02},
      },
    ]);
    expect(standardUncertaintyM.east).toBeCloseTo(Math.hypot(0.02, 0.002, 0.0025), 12);
    expect(standardUncertaintyM.up).toBeCloseTo(Math.hypot(0.02, 0.002, 0.02), 12);
  });

  test('a plate motion is traced with its velocity', () => {
    const {trace} = transformPosition({
      ecef: BERLIN,
      from: {frame: 'ITRF2020', epoch: 2020},
      to: {frame: 'ITRF2020', epoch: 2010},
      motion: {kind: 'plate', plate: plateNamed('EURA', ITRF2020_PMM), model: ITRF2020_PMM},
    });
    expect(trace).toHaveLength(1);
    const velocity = trace[0]?.velocity;
    expect(velocity).toBeTruthy();
    if (velocity === null || velocity === undefined) return;
    // 24.6 mm per year in Berlin: 19.4 east and 15.1 north (frames-mismatch).
    expect(Math.hypot(velocity.xM, velocity.yM, velocity.zM)).toBeCloseTo(0.0246, 4);
    expect(trace[0]?.ecef.xM).toBeCloseTo(BERLIN.xM - 10 * velocity.xM, 9);
  });

  test('a local velocity is the geocentric one turned', () => {
    const motion: PointMotion = {
      kind: 'local velocity',
      frame: 'ITRF2020',
      mPerYear: {east: 0, north: 0, up: 0.01},
    };
    const found = transformed(BERLIN, 'ITRF2020@2010', 'ITRF2020@2020', motion);
    expect(distanceM(found, BERLIN)).toBeCloseTo(0.1, 9);
    expect(Math.hypot(found.xM, found.yM, found.zM)).toBeGreaterThan(
      Math.hypot(BERLIN.xM, BERLIN.yM, BERLIN.zM) + 0.0999,
    );
  });
});

describe('comparison with itself', () => {
  test('any one name at equal epochs needs no parameters', () => {
    for (const frame of ['site frame 7', 'NZGD2000', 'JGD2011', 'GDA2020', 'ITRF2020']) {
      const side = {frame, epoch: 2020.5};
      const same = transformPosition({ecef: BERLIN, from: side, to: side, motion: null});
      expect(same.ecef).toBe(BERLIN);
      expect(same.trace).toEqual([]);
    }
    const noEpoch = {frame: 'site frame 7', epoch: null};
    expect(planTransformation({from: noEpoch, to: noEpoch, motion: null}).epoch).toBe(null);
    expect(
      planTransformation({
        from: {frame: 'NZGD2000', epoch: null},
        to: {frame: 'nzgd 2000', epoch: 2000},
        motion: null,
      }).epoch,
    ).toBe(2000);
  });

  test('frames of a fixed epoch know it', () => {
    const place = {latitudeDeg: -23.55, longitudeDeg: -46.63, ellipsoidalHeightM: 0};
    const {plan} = transformPosition({
      ecef: ecefFromGeodetic(place, GRS80),
      from: {frame: 'ITRF2000', epoch: 2000.4},
      to: {frame: 'SIRGAS 2000', epoch: null},
      motion: null,
    });
    expect(plan.epoch).toBe(2000.4);
    expect(plan.steps.map((step) => step.kind)).toEqual(['coincident']);
  });
});

describe('wrong or incomplete requests', () => {
  test.each(WRONG_FRAMES)('%s to %s gets no number but advice', (from, to, place, message) => {
    const ecef = ecefFromGeodetic(PLACES[place], GRS80);
    let thrown: unknown;
    try {
      transformPosition({ecef, from: sideOf(from), to: sideOf(to), motion: null});
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(UsageError);
    expect(thrown instanceof UsageError ? thrown.message : '').toMatch(message);
  });

  test('a motion stated in a frame that is not used there is refused', () => {
    expect(() =>
      transformPosition({
        ecef: BERLIN,
        from: {frame: 'ITRF2020', epoch: 2020},
        to: {frame: 'ITRF2020', epoch: 2010},
        motion: atRestIn('GDA2020'),
      }),
    ).toThrow(/GDA2020 is used between/);
  });
});
