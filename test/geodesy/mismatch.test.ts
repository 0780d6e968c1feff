import {describe, expect, test} from 'vitest';
import {
  expectedMismatch,
  plateVelocityEnu,
  plausibleMismatches,
} from '../../src/geodesy/mismatch.ts';
import {ITRF2020_PMM, plateNamed} from '../../src/geodesy/plates.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly city: string;
  readonly lat: number;
  readonly lon: number;
  readonly national_frame: string;
  readonly dE_mm: number;
  readonly dN_mm: number;
  readonly dU_mm: number;
  readonly plate: string;
  readonly plate_velocity_ENU_mm_per_yr: readonly [number, number, number];
}
const {epoch, rows} = readReference<{epoch: number; rows: readonly Row[]}>('frames-mismatch');

/** Our names of the frames in the table; the epoch where the table fixes one. */
const FRAMES: Readonly<Record<string, {frame: string; epoch: number | null}>> = {
  'ETRF2000 (ETRS89)': {frame: 'ETRF2000', epoch},
  'ETRS89/DREF91/2025': {frame: 'ETRS89-DEU(2025)', epoch},
  'NAD83(2011) @2010.0': {frame: 'NAD83(2011)', epoch: 2010},
  'NAD83(2011) @2026.9': {frame: 'NAD83(2011)', epoch},
  NATRF2022: {frame: 'NATRF2022', epoch},
  'NAD83(CSRS)v8 @2010.0': {frame: 'NAD83(CSRS)v8', epoch: 2010},
  'NAD83(PA11) @2010.0': {frame: 'NAD83(PA11)', epoch: 2010},
  'Mexico ITRF2008 @2010.0': {frame: 'MexicoITRF2008', epoch: null},
  'SIRGAS2000 = ITRF2000 @2000.4': {frame: 'SIRGAS2000', epoch: null},
  'Hartebeesthoek94 = ITRF91 @1994.0': {frame: 'Hartebeesthoek94', epoch: null},
  'KSA-GRF17 = ITRF2014 @2017.0': {frame: 'KSA-GRF17', epoch},
  'CGCS2000 = ITRF97 @2000.0': {frame: 'CGCS2000', epoch: null},
  'JGD2000/JGD2011 west = ITRF94 @1997.0': {frame: 'JGD2000', epoch: null},
  GDA2020: {frame: 'GDA2020', epoch},
  GDA94: {frame: 'GDA94', epoch},
  'NZGD2000 = ITRF96 (LINZ) @2000.0': {frame: 'NZGD2000', epoch: null},
};

function placeOf(row: Row) {
  return {latitudeDeg: row.lat, longitudeDeg: row.lon, ellipsoidalHeightM: 0};
}

describe('expected mismatch', () => {
  test('reference: 17 rows of ITRF2020 at 2026.9 against national frames, within 1 mm', () => {
    expect(rows).toHaveLength(17);
    for (const row of rows) {
      const reference = FRAMES[row.national_frame];
      if (reference === undefined) throw new Error(`no name for ${row.national_frame}`);
      const found = expectedMismatch({
        place: placeOf(row),
        measured: {frame: 'ITRF2020', epoch},
        reference,
        motion: {kind: 'plate', plate: plateNamed(row.plate, ITRF2020_PMM), model: ITRF2020_PMM},
      });
      expect(Math.abs(found.eastM * 1000 - row.dE_mm), row.city).toBeLessThanOrEqual(1);
      expect(Math.abs(found.northM * 1000 - row.dN_mm), row.city).toBeLessThanOrEqual(1);
      expect(Math.abs(found.upM * 1000 - row.dU_mm), row.city).toBeLessThanOrEqual(1);
    }
  });

  test('reference: plate velocities of the same table, within the printed 0.1 mm per year', () => {
    for (const row of rows) {
      const found = plateVelocityEnu(
        placeOf(row),
        plateNamed(row.plate, ITRF2020_PMM),
        ITRF2020_PMM,
      );
      // Half of the printed 0.1, and the 0.01 mm per year that velocities are asked to hold.
      const [east, north, up] = row.plate_velocity_ENU_mm_per_yr;
      expect(Math.abs(found.eastM * 1000 - east), row.city).toBeLessThanOrEqual(0.06);
      expect(Math.abs(found.northM * 1000 - north), row.city).toBeLessThanOrEqual(0.06);
      expect(Math.abs(found.upM * 1000 - up), row.city).toBeLessThanOrEqual(0.06);
    }
  });

  test('plausible mismatches are those of the frames in use at the place', () => {
    const sydney = {latitudeDeg: -33.87, longitudeDeg: 151.21, ellipsoidalHeightM: 0};
    const found = plausibleMismatches(sydney, {frame: 'ITRF2020', epoch});
    expect(found.map(({frame}) => frame)).toEqual(['GDA2020', 'GDA94']);
    expect(found[1]?.mismatch.northM).toBeCloseTo(1.779, 2);
    expect(plausibleMismatches({...sydney, longitudeDeg: 80}, {frame: 'ITRF2020', epoch})).toEqual(
      [],
    );
  });
});
