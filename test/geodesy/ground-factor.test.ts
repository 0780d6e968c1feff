import {expect, test} from 'vitest';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {combinedFactor, elevationFactor} from '../../src/geodesy/ground-factor.ts';
import {readReference} from '../reference/read.ts';

interface Row {
  readonly lat: string;
  readonly grid_scale: string;
  readonly ellipsoid_height: string;
  readonly R_gaussian: {readonly elevation_factor: string; readonly combined_factor: string};
}
const {rows, published_example: example} = readReference<{
  combined_factor: {
    rows: readonly Row[];
    published_example: Readonly<
      Record<'grid_factor' | 'R_ft' | 'elevation_ft' | 'combined', string>
    >;
  };
}>('transverse-mercator-exact').combined_factor;

test('reference: elevation and combined factors of seven places, mpmath', () => {
  expect(rows).toHaveLength(7);
  for (const row of rows) {
    const place = {
      latitudeDeg: Number(row.lat),
      ellipsoidalHeightM: Number(row.ellipsoid_height),
    };
    const elevation = elevationFactor(place, WGS84);
    expect(Math.abs(elevation - Number(row.R_gaussian.elevation_factor))).toBeLessThan(1e-13);
    const combined = combinedFactor(Number(row.grid_scale), elevation);
    expect(Math.abs(combined - Number(row.R_gaussian.combined_factor))).toBeLessThan(1e-13);
  }
});

test('reference: a combined factor printed in a surveying forum, 0.999957', () => {
  const radius = Number(example.R_ft);
  const elevation = radius / (radius + Number(example.elevation_ft));
  const combined = combinedFactor(Number(example.grid_factor), elevation);
  expect(Math.abs(combined - Number(example.combined))).toBeLessThan(0.5e-6);
});
