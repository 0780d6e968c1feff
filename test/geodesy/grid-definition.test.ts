import {describe, expect, test} from 'vitest';
import {UsageError} from '../../src/errors.ts';
import {ellipsoid, GRS80, WGS84} from '../../src/geodesy/ellipsoid.ts';
import {
  axisValuesFromEastNorth,
  eastNorthFromAxisValues,
  parseGrid,
  requireGridFits,
} from '../../src/geodesy/grid-definition.ts';

const OSLO = {place: {latitudeDeg: 59.9, longitudeDeg: 10.7}, ellipsoid: GRS80};

describe('grids as a user writes them', () => {
  test.each([
    ['UTM', 'UTM zone 32N', {zone: 32}],
    ['UTM 33N', 'UTM zone 33N', {zone: 33}],
    ['utm33s', 'UTM zone 33S', {zone: 33, south: true}],
    ['UTM zone 7 S', 'UTM zone 7S', {zone: 7, south: true}],
    ['EPSG:25832', 'EPSG:25832, UTM zone 32N', {zone: 32}],
    ['epsg:7855', 'EPSG:7855, UTM zone 55S', {zone: 55, south: true}],
  ])('%s', (text, name, parameters) => {
    expect(parseGrid(text, OSLO)).toMatchObject({name, method: 'utm', parameters});
  });

  test('a PROJ string keeps its unit and axes apart and leaves datum shifts aside', () => {
    const grid = parseGrid(
      '+proj=tmerc +lat_0=0 +lon_0=19 +k=1 +x_0=0 +y_0=0 +axis=wsu +ellps=bessel ' +
        '+towgs84=598.1,73.7,418.2,0.202,0.045,-2.455,6.7 +units=us-ft +no_defs',
      OSLO,
    );
    expect(grid.axes).toBe('ws');
    expect(grid.unit).toEqual({name: 'us-ft', lengthM: 1200 / 3937});
    expect(grid.leftAside).toEqual(['+towgs84']);
    expect(grid.ellipsoid.semiMajorAxisM).toBe(6_377_397.155);
    expect(grid.parameters).toEqual({lat_0: 0, lon_0: 19, k: 1, x_0: 0, y_0: 0});
    const values = axisValuesFromEastNorth(grid, {eastingM: 1200, northingM: -2400});
    expect(values[0]).toBeCloseTo(-3937, 9);
    expect(values[1]).toBeCloseTo(7874, 9);
    expect(eastNorthFromAxisValues(grid, values).eastingM).toBeCloseTo(1200, 9);
    expect(eastNorthFromAxisValues(grid, values).northingM).toBeCloseTo(-2400, 9);
  });

  test('northing may come first', () => {
    const grid = parseGrid('+proj=utm +zone=32 +ellps=GRS80 +axis=neu', OSLO);
    expect(axisValuesFromEastNorth(grid, {eastingM: 5, northingM: 7})).toEqual([7, 5]);
    expect(eastNorthFromAxisValues(grid, [7, 5])).toEqual({eastingM: 5, northingM: 7});
  });

  test.each([
    ['+proj=utm +zone=32 +a=6378388 +rf=297', 6_378_388, 297],
    ['+proj=utm +zone=32 +a=6378249.2 +b=6356515', 6_378_249.2, 293.466_021_293_6],
    ['+proj=utm +zone=32 +a=6378388 +f=0.003367003367003367', 6_378_388, 297],
    ['+proj=utm +zone=32 +R=6371000', 6_371_000, Number.POSITIVE_INFINITY],
    ['+proj=utm +zone=32 +datum=WGS84', 6_378_137, 298.257223563],
    ['+proj=utm +zone=32 +ellps=WGS72', 6_378_135, 298.26],
    ['+proj=utm +zone=32 +ellps=GSK2011', 6_378_136.5, 298.2564151],
  ])('the ellipsoid of %s is taken as numbers', (text, semiMajorAxisM, inverseFlattening) => {
    const found = parseGrid(text, OSLO).ellipsoid;
    expect(found.semiMajorAxisM).toBe(semiMajorAxisM);
    expect(found.inverseFlattening - inverseFlattening || 0).toBeCloseTo(0, 8);
  });

  test.each([
    ['UTM 32', /hemisphere, such as UTM 32N/],
    ['UTM 61N', /zone from 1 to 60, found 61/],
    ['Gauss', /need a grid as UTM, UTM 32N, an EPSG code/],
    ['EPSG:27700', /write its definition as a PROJ string/],
    ['EPSG:4326', /write its definition as a PROJ string/],
    ['+proj=unknownproj +ellps=GRS80', /need \+proj= one of .* found "unknownproj"/],
    ['+proj=longlat +ellps=GRS80', /need \+proj= one of/],
    ['+proj=pipeline +step +proj=utm +zone=32', /without steps|need one projection/],
    ['+init=epsg:25832 +proj=utm', /need one projection/],
    ['+proj=utm +ellps=GRS80', /need \+zone=/],
    ['+proj=utm +zone=99 +ellps=GRS80', /\+zone= from 1 to 60/],
    ['+proj=utm +zone=32', /need an ellipsoid, such as \+ellps=GRS80/],
    ['+proj=utm +zone=32 +ellps=nonsense', /unknown ellipsoid "nonsense"/],
    ['+proj=utm +zone=32 +a=6378137', /need \+rf= or \+b= beside \+a=/],
    ['+proj=tmerc +lat_0=0 +ellps=GRS80', /need \+lon_0=/],
    ['+proj=lcc +lon_0=3 +ellps=GRS80', /need \+lat_1=/],
    ['+proj=tmerc +lon_0=19d30E +ellps=GRS80', /need a decimal number for \+lon_0=/],
    ['+proj=tmerc +lon_0=9 +pm=paris +ellps=GRS80', /unknown part "\+pm"/],
    ['+proj=tmerc +lon_0=9 +lonn=3 +ellps=GRS80', /unknown part "\+lonn"/],
    ['+proj=tmerc +lon_0=9 +units=chain +ellps=GRS80', /need \+units= one of m, km, ft, us-ft/],
    ['+proj=tmerc +lon_0=9 +axis=xyz +ellps=GRS80', /need \+axis= such as enu or wsu/],
    ['+proj=tmerc +lon_0=9 +lon_0=10 +ellps=GRS80', /found "\+lon_0"/],
  ])('%s is refused with what to write', (text, message) => {
    expect(() => parseGrid(text, OSLO)).toThrow(message);
    expect(() => parseGrid(text, OSLO)).toThrow(UsageError);
  });

  test('UTM alone needs a place that UTM covers', () => {
    expect(() => parseGrid('UTM', {place: null, ellipsoid: GRS80})).toThrow(/need a UTM zone/);
    const pole = {latitudeDeg: 88, longitudeDeg: 0};
    expect(() => parseGrid('UTM', {place: pole, ellipsoid: GRS80})).toThrow(/polar stereographic/);
  });
});

describe('grid and position fit', () => {
  const grid = parseGrid('EPSG:25832', OSLO);

  test('another ellipsoid needs a datum transformation first', () => {
    const british = parseGrid('+proj=tmerc +lon_0=-2 +lat_0=49 +ellps=airy', OSLO);
    expect(() => requireGridFits(british, {ellipsoid: WGS84, frame: null})).toThrow(
      /lies on the ellipsoid airy, the position on WGS 84; transform/,
    );
    expect(() =>
      requireGridFits(grid, {ellipsoid: ellipsoid(6_378_388, 297), frame: null}),
    ).toThrow(UsageError);
    expect(() => requireGridFits(grid, {ellipsoid: WGS84, frame: null})).not.toThrow();
  });

  test('a grid of one frame refuses coordinates of another', () => {
    expect(() => requireGridFits(grid, {ellipsoid: GRS80, frame: 'ETRF2000'})).not.toThrow();
    expect(() => requireGridFits(grid, {ellipsoid: GRS80, frame: 'ITRF2020'})).toThrow(
      /a grid of ETRF, ETRS89, the position is in ITRF2020; transform it first/,
    );
    const australia = parseGrid('EPSG:7855', OSLO);
    expect(() => requireGridFits(australia, {ellipsoid: GRS80, frame: 'GDA94'})).toThrow(
      /a grid of GDA2020/,
    );
    const utm = parseGrid('UTM 32N', OSLO);
    expect(() => requireGridFits(utm, {ellipsoid: GRS80, frame: 'ITRF2020'})).not.toThrow();
  });
});
