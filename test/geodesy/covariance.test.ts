import {describe, expect, test} from 'vitest';
import {covarianceEcefFromEnu, covarianceEnuFromEcef} from '../../src/geodesy/covariance.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {localFrame} from '../../src/geodesy/local.ts';
import type {Matrix3} from '../../src/geodesy/types.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly lat: string;
  readonly lon: string;
  readonly cov_xyz: readonly (readonly (string | number)[])[];
  readonly cov_enu: readonly (readonly (string | number)[])[];
}
const {covariance_rotation: rows} = readReference<{covariance_rotation: readonly Row[]}>(
  'local-80-digits',
);

function matrixOf(values: Row['cov_xyz']): Matrix3 {
  const row = (i: number) => values[i]!.map(Number) as unknown as Matrix3[0];
  return [row(0), row(1), row(2)];
}

describe('covariance rotation', () => {
  test('reference: three covariances, mpmath at 80 digits', () => {
    expect(rows).toHaveLength(3);
    for (const row of rows) {
      const frame = localFrame(
        {latitudeDeg: Number(row.lat), longitudeDeg: Number(row.lon), ellipsoidalHeightM: 0},
        WGS84,
      );
      const ecef = matrixOf(row.cov_xyz);
      const enu = covarianceEnuFromEcef(ecef, frame);
      const expected = matrixOf(row.cov_enu);
      const back = covarianceEcefFromEnu(enu, frame);
      for (let i = 0; i < 3; i++) {
        for (let j = 0; j < 3; j++) {
          expect(Math.abs(enu[i]![j]! - expected[i]![j]!)).toBeLessThan(1e-18);
          expect(Math.abs(back[i]![j]! - ecef[i]![j]!)).toBeLessThan(1e-18);
          expect(enu[i]![j]).toBe(enu[j]![i]);
        }
      }
    }
  });
});
