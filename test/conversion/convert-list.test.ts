import {describe, expect, test} from 'vitest';
import {planConversion} from '../../src/conversion/conversion.ts';
import {ListConverter, type ListRequest} from '../../src/conversion/convert-list.ts';

interface Wanted {
  readonly from?: string;
  readonly to: string;
  readonly request?: Partial<ListRequest>;
  /** Size of the pieces in which the text arrives. */
  readonly pieceLength?: number;
}

function convertedList(text: string, {from, to, request, pieceLength = 7}: Wanted) {
  const refused: string[] = [];
  const converter = new ListConverter({
    path: 'list.csv',
    columns: null,
    plan: (header) =>
      planConversion({
        from: from ?? header ?? 'nothing',
        to,
        fromFrame: null,
        fromEpoch: null,
        toFrame: null,
        toEpoch: null,
        motion: null,
        ellipsoid: null,
        origin: {latitudeDeg: 50, longitudeDeg: 9, ellipsoidalHeightM: 100},
      }),
    style: {decimals: 3, angles: 'deg'},
    factors: false,
    refuse: (line, reason) => refused.push(`${line}: ${reason}`),
    ...request,
  });
  let out = '';
  for (let at = 0; at < text.length; at += pieceLength) {
    out += converter.take(text.slice(at, at + pieceLength));
  }
  out += converter.end();
  return {rows: out.trimEnd().split('\n'), refused, counts: converter.counts(), converter};
}

describe('ListConverter', () => {
  test('coordinates are replaced where they stood, all else is copied', () => {
    const {rows, counts} = convertedList(
      '\ufeffname,latitude,longitude,height,remark\r\n# site 4\r\n"A, old",50,9,100,"say ""x"""\r\n\r\nB,50,9.00001,,\r\n',
      {to: 'UTM 32N'},
    );
    expect(rows).toEqual([
      'name,easting_m,northing_m,ellipsoidal_height_m,remark',
      '# site 4',
      '"A, old",500000.000,5538630.703,100.000,"say ""x"""',
      'B,500000.717,5538630.703,,',
    ]);
    expect(counts).toEqual({converted: 2, refused: 0, comments: 1, blank: 1});
  });

  test.each([1, 2, 5, 64, 10_000])('pieces of %d characters give the same', (pieceLength) => {
    const text = 'id;x;y;z\nA;4027893.675;307045.9069;4919475.1721\nB;4027893;307045;4919475';
    const whole = convertedList(text, {to: 'geodetic', pieceLength: 1e6}).rows;
    expect(convertedList(text, {to: 'geodetic', pieceLength}).rows).toEqual(whole);
    expect(whole).toHaveLength(3);
  });

  test('a list of positions that are blanks apart, without a header', () => {
    const {rows} = convertedList('A 500000 5538630.703 100\n', {
      from: 'UTM 32N',
      to: 'geodetic',
      request: {columns: ['name', 'easting', 'northing', 'height']},
    });
    expect(rows).toEqual([
      'name latitude_deg longitude_deg ellipsoidal_height_m',
      'A 50.00000000 9.00000000 100.000',
    ]);
  });

  test('a row without an answer is named, the others go on', () => {
    const {rows, refused, counts} = convertedList(
      'name,x,y,z\nA,4027893.675,307045.9069,4919475.1721\nB,4027893.675,,4919475\nC,1,2,3\nD,4027893,675,307045,4919475\nE,4027893.675,abc,4919475\n',
      {to: 'geodetic'},
    );
    expect(rows).toHaveLength(2);
    expect(refused).toEqual([
      expect.stringMatching(/^3: need y in metres, found nothing/),
      expect.stringMatching(/^4: need a position near the ground/),
      expect.stringMatching(/^5: need 4 cells as in the header, found 5/),
      expect.stringMatching(/^6: need y in metres, found "abc"/),
    ]);
    expect(counts.refused).toBe(4);
  });

  test('a quote that is never closed and a decimal comma are called so', () => {
    const {refused} = convertedList('name;lat;lon\n"A;50;9\nB;50,5;9\n', {to: 'UTM 32N'});
    expect(refused).toEqual([
      expect.stringMatching(/^2: a quote opens in this row and is never closed/),
      expect.stringMatching(/^3: need a latitude .* found "50,5"; write a decimal point/),
    ]);
  });

  test('units in the header count', () => {
    const {rows} = convertedList('east_mm,north_cm,up_ft\n1500,200,10\n', {
      from: 'local',
      to: 'local',
    });
    expect(rows[1]).toBe('1.500,2.000,3.048');
  });

  test('degrees, minutes and seconds are read and written', () => {
    const {rows} = convertedList('lat,lon,h\n50 30 36.5 N,9 00 00 W,1\n', {
      to: 'geodetic',
      request: {style: {decimals: 4, angles: 'dms'}},
    });
    expect(rows).toEqual([
      'latitude_dms,longitude_dms,ellipsoidal_height_m',
      '50 30 36.50000 N,9 00 00.00000 W,1.0000',
    ]);
  });

  test('UTM alone gives each position its zone, and factors where they are wanted', () => {
    const {rows} = convertedList('lat,lon,h\n50,9,0\n-50,15,0\n', {
      to: 'UTM',
      request: {factors: true},
    });
    expect(rows[0]).toBe(
      'easting_m,northing_m,ellipsoidal_height_m,grid,convergence_deg,point_scale,elevation_factor,combined_factor',
    );
    expect(rows[1]).toMatch(/,UTM zone 32N,-?0\.0+,0\.9996000000,1\.0000000000,0\.9996000000$/);
    expect(rows[2]).toMatch(/,UTM zone 33S,/);
  });

  test('a grid keeps its unit and the directions of its axes', () => {
    const southOrientated = '+proj=tmerc +axis=wsu +lat_0=0 +lon_0=21 +k=1 +ellps=WGS84';
    const {rows} = convertedList('lat,lon\n-33,20.5\n', {to: southOrientated});
    expect(rows[0]).toBe('westing_m,southing_m');
    const [westing, southing] = rows[1]!.split(',').map(Number);
    expect(westing).toBeGreaterThan(46_000);
    expect(southing).toBeGreaterThan(3_600_000);
    const back = convertedList(rows.join('\n'), {from: southOrientated, to: 'geodetic'});
    expect(back.rows[1]).toBe('-33.00000000,20.50000000');
  });

  test('what a name leaves open about the height is remembered', () => {
    const vague = convertedList('lat,lon,h\n50,9,0\n', {to: 'geodetic'});
    expect(vague.converter.prepared()?.layout.vagueHeight).toBe('h');
    const clear = convertedList('lat,lon,ellipsoidal_height\n50,9,0\n', {to: 'geodetic'});
    expect(clear.converter.prepared()?.layout.vagueHeight).toBeNull();
  });

  test.each([
    ['numbers in place of a header', '4027893.675,307045.9069,4919475.1721\n', /name them with --/],
    ['a missing column', 'name,x,y\nA,1,2\n', /need the columns x,y,z of geocentric coordinates/],
    ['a column that is there twice', 'x,y,z,ecef_x\n1,2,3,4\n', /two columns hold the x/],
    ['a unit that nobody knows', 'x [ell],y,z\n1,2,3\n', /cannot read the unit "ell"/],
  ])('%s is refused with file and line', (_, text, advice) => {
    expect(() => convertedList(text, {from: 'geocentric', to: 'geodetic'})).toThrow(advice);
  });

  test('heights above the geoid are not taken for ellipsoidal ones', () => {
    expect(() => convertedList('lat,lon,altitude\n50,9,100\n', {to: 'geocentric'})).toThrow(
      /height above the geoid; add the separation/,
    );
  });

  test('an empty list is refused', () => {
    expect(() => convertedList('\n# nothing\n', {to: 'geodetic'})).toThrow(/found nothing/);
  });
});
