import type {Geodetic} from '../../src/geodesy/types.ts';

/** Places in three regions of use, to a hundredth of a degree. */
export const PLACES = {
  Berlin: {latitudeDeg: 52.52, longitudeDeg: 13.4, ellipsoidalHeightM: 70},
  Sydney: {latitudeDeg: -33.87, longitudeDeg: 151.21, ellipsoidalHeightM: 50},
  Auckland: {latitudeDeg: -36.85, longitudeDeg: 174.76, ellipsoidalHeightM: 80},
} as const satisfies Record<string, Geodetic>;

/** A request that must get no number: `frame@epoch` on both sides, the place, and the advice. */
export type WrongFrames = readonly [
  from: string,
  to: string,
  place: keyof typeof PLACES,
  advice: RegExp,
];

export const WRONG_FRAMES: readonly WrongFrames[] = [
  ['WGS 84@2020', 'ITRF2020@2020', 'Berlin', /write the one meant, such as WGS84\(G2296\)/],
  ['WGS84@2020', 'WGS84@2020', 'Berlin', /write the one meant, such as WGS84\(G2296\)/],
  ['EPSG:4326@2020', 'ITRF2020@2020', 'Berlin', /WGS84\(G2296\)/],
  ['ITRF2020@2020', 'ETRS89@2020', 'Berlin', /write ETRF2000, ETRF2014, ETRF2020/],
  ['ITRF2020@2020', 'EPSG:4258@2020', 'Berlin', /write ETRF2000/],
  ['ITRF2020@2020', 'NAD83@2010', 'Berlin', /write NAD83\(2011\), NAD83\(PA11\)/],
  ['ITRF2020@2020', 'NAD83(CSRS)@2010', 'Berlin', /write NAD83\(CSRS\)v2 to NAD83\(CSRS\)v8/],
  ['ITRF@2020', 'ETRF2000@2020', 'Berlin', /write the year, such as ITRF2020/],
  ['ITRS@2020', 'ETRF2000@2020', 'Berlin', /write the year, such as ITRF2020/],
  ['ETRF@2020', 'ITRF2020@2020', 'Berlin', /write the year, such as ETRF2000/],
  ['IGS@2020', 'ITRF2020@2020', 'Berlin', /write the year, such as IGS20/],
  ['GDA@2020', 'ITRF2020@2020', 'Sydney', /write GDA94 or GDA2020/],
  ['SIRGAS@2020', 'ITRF2020@2020', 'Berlin', /write SIRGAS2000/],
  ['ITRF14@2020', 'ITRF2020@2020', 'Berlin', /did you mean ITRF2014\?/],
  ['ITRF2015@2020', 'ITRF2020@2020', 'Berlin', /did you mean ITRF2014/],
  ['ETRF2002@2020', 'ITRF2020@2020', 'Berlin', /did you mean .*ETRF2000/],
  ['NAD83(2012)@2020', 'ITRF2020@2020', 'Berlin', /did you mean NAD83\(2011\)/],
  ['IGS2O@2020', 'ITRF2020@2020', 'Berlin', /did you mean IGS20/],
  ['Atlantis@2020', 'ITRF2020@2020', 'Berlin', /write one of the ITRFs/],
  ['@2020', 'ITRF2020@2020', 'Berlin', /need a reference frame, such as ITRF2020/],
  ['ED50@2020', 'ITRF2020@2020', 'Berlin', /transform the mark with the national service/],
  ['OSGB36@2020', 'ITRF2020@2020', 'Berlin', /transform the mark with the national service/],
  ['NAD27@2020', 'ITRF2020@2020', 'Berlin', /transform the mark with the national service/],
  ['UTM 32N@2020', 'ITRF2020@2020', 'Berlin', /write the frame it belongs to/],
  ['EPSG:25832@2020', 'ITRF2020@2020', 'Berlin', /write the frame it belongs to/],
  ['ITRF2020', 'ETRF2000@2020', 'Berlin', /need the coordinate epoch of the coordinates/],
  ['ITRF2020@2020', 'ETRF2000', 'Berlin', /need the coordinate epoch of the result/],
  ['ITRF2020', 'ITRF2020', 'Berlin', /need the coordinate epoch/],
  ['ITRF2020@2020', 'ITRF2014@1975', 'Berlin', /between 1980 and 2040/],
  ['ITRF2020@2055', 'ITRF2014@2020', 'Berlin', /between 1980 and 2040/],
  ['ITRF2020@NaN', 'ITRF2014@2020', 'Berlin', /between 1980 and 2040/],
  ['ITRF2020@2026.9', 'ETRF2000@2010', 'Berlin', /write "at rest in ETRF2000"/],
  ['ITRF2020@2026.9', 'ITRF2014@2010', 'Berlin', /a plate such as "plate EURA"/],
  ['ITRF2020@2026.9', 'NZGD2000', 'Auckland', /transform the mark with the national service/],
  ['NZGD2000', 'ITRF2020@2026.9', 'Auckland', /transform the mark with the national service/],
  ['ITRF2020@2026.9', 'NZGD2000@2026.9', 'Auckland', /belong to epoch 2000, .* write 2000/],
  [
    'ITRF2020@2026.9',
    'JGD2011@2026.9',
    'Berlin',
    /JGD2011 is used between .* a global one such as/,
  ],
  ['ITRF2020@2026.9', 'SIRGAS2000@2026.9', 'Berlin', /SIRGAS2000 is used between/],
  ['ITRF2020@2026.9', 'GDA2020@2020', 'Berlin', /write the frame that is used there/],
  ['ITRF2020@2020', 'NAD83(2011)@2020', 'Sydney', /write the frame that is used there/],
  ['ITRF2020@2020', 'ETRF2000@2020', 'Sydney', /write the frame that is used there/],
  ['ITRF2020@2020', 'CGCS2000', 'Sydney', /CGCS2000 is used between/],
];
