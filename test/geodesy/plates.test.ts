import {describe, expect, test} from 'vitest';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {enuFromEcefVector, localFrameAtEcef} from '../../src/geodesy/local.ts';
import {
  ITRF2014_PMM,
  ITRF2020_PMM,
  type PlateMotionModel,
  plateMotionModelNamed,
  plateNamed,
  plateVelocity,
} from '../../src/geodesy/plates.ts';
import {readReference} from '../reference/read.ts';

interface Reference {
  readonly models: Readonly<
    Record<
      'ITRF2020-PMM' | 'ITRF2014-PMM',
      {
        readonly plates: Readonly<
          Record<
            string,
            {
              readonly mas_per_yr: readonly number[];
              readonly deg_per_Myr_other_source: readonly number[];
            }
          >
        >;
      }
    >
  >;
  readonly velocities: readonly {
    readonly model: string;
    readonly plate: string;
    readonly xyz: readonly [number, number, number];
    readonly v_mm_per_yr: readonly [number, number, number];
  }[];
}
const reference = readReference<Reference>('plate-motion-models');

describe('plate motion', () => {
  test.each([
    ['ITRF2020-PMM', ITRF2020_PMM],
    ['ITRF2014-PMM', ITRF2014_PMM],
  ] as const)('reference: the poles of %s in two independent transcriptions', (name, model) => {
    const {plates} = reference.models[name];
    expect(model.plates.map(({code}) => code).sort()).toEqual(Object.keys(plates).sort());
    for (const {code, rotationMasPerYear} of model.plates) {
      const row = plates[code];
      expect(rotationMasPerYear).toEqual(row?.mas_per_yr);
      rotationMasPerYear.forEach((masPerYear, axis) => {
        // A degree per million years is 3.6 mas per year; printed to 1e-4: half of it, and of 1e-3.
        const other = (row?.deg_per_Myr_other_source[axis] ?? Number.NaN) * 3.6;
        expect(Math.abs(other - masPerYear), code).toBeLessThan(7e-4);
      });
    }
  });

  test('reference: velocities on 24 plates by PROJ 9.1.1 within 0.01 mm per year', () => {
    expect(reference.velocities).toHaveLength(24);
    for (const row of reference.velocities) {
      const model = plateMotionModelNamed(row.model);
      const withoutBias: PlateMotionModel = {...model, originRateBiasMPerYear: [0, 0, 0]};
      const [xM, yM, zM] = row.xyz;
      const found = plateVelocity({xM, yM, zM}, plateNamed(row.plate, model), withoutBias);
      expect(Math.abs(found.xM * 1000 - row.v_mm_per_yr[0]), row.plate).toBeLessThan(0.01);
      expect(Math.abs(found.yM * 1000 - row.v_mm_per_yr[1]), row.plate).toBeLessThan(0.01);
      expect(Math.abs(found.zM * 1000 - row.v_mm_per_yr[2]), row.plate).toBeLessThan(0.01);
    }
  });

  test('the origin rate bias is horizontal: no more than its length, nothing upward', () => {
    const point = {xM: 3_783_000, yM: 901_000, zM: 5_038_000};
    const plate = plateNamed('EURA', ITRF2020_PMM);
    const withBias = plateVelocity(point, plate, ITRF2020_PMM);
    const without = plateVelocity(point, plate, {
      ...ITRF2020_PMM,
      originRateBiasMPerYear: [0, 0, 0],
    });
    const bias = enuFromEcefVector(
      {xM: withBias.xM - without.xM, yM: withBias.yM - without.yM, zM: withBias.zM - without.zM},
      localFrameAtEcef(point, GRS80),
    );
    expect(Math.abs(bias.upM)).toBeLessThan(1e-15);
    expect(Math.hypot(bias.eastM, bias.northM)).toBeGreaterThan(1e-4);
    expect(Math.hypot(bias.eastM, bias.northM)).toBeLessThan(0.9e-3);
  });

  test('plates are found by code and by name', () => {
    expect(plateNamed('Eurasia', ITRF2020_PMM).code).toBe('EURA');
    expect(plateNamed('north american plate', ITRF2020_PMM).code).toBe('NOAM');
    expect(plateNamed('Africa', ITRF2014_PMM).code).toBe('NUBI');
    expect(plateMotionModelNamed('itrf2014 pmm')).toBe(ITRF2014_PMM);
  });

  test.each(['Okhotsk', 'Sunda', 'Philippine Sea', 'Cocos', 'Anatolia', ''])(
    'the plate "%s" has no pole, and the message says what to write',
    (name) => {
      expect(() => plateNamed(name, ITRF2020_PMM)).toThrow(
        /no rotation pole .* write one of AMUR, ANTA, .* or the velocity of the mark/,
      );
    },
  );

  test('the Amurian and Caribbean plates are only in the later model', () => {
    expect(() => plateNamed('AMUR', ITRF2014_PMM)).toThrow(/ITRF2014-PMM has no rotation pole/);
    expect(() => plateMotionModelNamed('NUVEL-1A')).toThrow(/write ITRF2020-PMM or ITRF2014-PMM/);
  });
});
