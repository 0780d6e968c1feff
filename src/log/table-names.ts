import {type Measure, type Unit, unitNamed} from './table-units.ts';

/** What a column can hold. */
export type Meaning = keyof typeof ACCEPTED;

/**
 * Every name that a header or `--columns` may use, by what the column holds.
 *
 * Names are compared in any case, without blanks, hyphens and underscores. A unit may stand behind
 * the name in brackets or after an underscore (`x [m]`, `tow_ms`, `h_ft`); without one, lengths are
 * metres, angles degrees and durations seconds. `-` or `skip` leaves a column out, and `...` in
 * last place leaves out all that follow.
 */
export const ACCEPTED = {
  time: names(
    'time datetime date_time timestamp utc utc_time time_utc gps_time gpst time_gps epoch',
  ),
  date: names('date yyyy_mm_dd yyyymmdd utc_date gps_date date_utc date_gps'),
  timeOfDay: names('time_of_day tod hms hhmmss hh_mm_ss'),
  secondOfDay: names('second_of_day seconds_of_day sod', 'duration'),
  year: names('year yyyy'),
  month: names('month mm mon'),
  day: names('day dd'),
  hour: names('hour hh hr'),
  minute: names('minute min'),
  second: names('second sec ss'),
  dayOfYear: names('doy day_of_year ddd'),
  decimalYear: names('decimal_year dec_year year_decimal fractional_year'),
  modifiedJulianDate: names('mjd modified_julian_date'),
  gpsWeek: names('gps_week week wn gps_wn week_number'),
  secondOfWeek: names('tow gps_tow sow gps_sow second_of_week seconds_of_week', 'duration'),
  gpsSeconds: names('gps_seconds seconds_gps', 'duration'),
  unixSeconds: names('unix unix_time unix_seconds posix posix_time', 'duration'),
  elapsed: names('t seconds elapsed elapsed_time seconds_since_start since_start', 'duration'),

  x: names('x ecef_x x_ecef geocentric_x x_geocentric', 'length'),
  y: names('y ecef_y y_ecef geocentric_y y_geocentric', 'length'),
  z: names('z ecef_z z_ecef geocentric_z z_geocentric', 'length'),
  latitude: names('lat latitude geodetic_latitude', 'angle'),
  longitude: names('lon lng long longitude geodetic_longitude', 'angle'),
  ellipsoidalHeight: names(
    'ellipsoidal_height height_ellipsoidal ellipsoid_height ell_height h_ell ell_h hae height_above_ellipsoid geodetic_height',
    'length',
  ),
  height: names('h height hgt', 'length'),
  altitude: names(
    'altitude alt msl height_msl h_msl orthometric_height height_orthometric h_orth elevation elev',
    'length',
  ),
  separation: names(
    'separation geoid_separation geoidal_separation geoid_sep undulation geoid_undulation geoid_height',
    'length',
  ),

  sigmaX: names('sdx sd_x sigx sig_x sigma_x x_sigma std_x x_std sx', 'length'),
  sigmaY: names('sdy sd_y sigy sig_y sigma_y y_sigma std_y y_std sy', 'length'),
  sigmaZ: names('sdz sd_z sigz sig_z sigma_z z_sigma std_z z_std sz', 'length'),
  correlationXy: names('corr_xy cor_xy rho_xy correlation_xy corr_yx cor_yx rho_yx'),
  correlationXz: names('corr_xz cor_xz rho_xz correlation_xz corr_zx cor_zx rho_zx'),
  correlationYz: names('corr_yz cor_yz rho_yz correlation_yz corr_zy cor_zy rho_zy'),
  varianceX: names('cxx cov_xx var_x variance_x', 'variance'),
  varianceY: names('cyy cov_yy var_y variance_y', 'variance'),
  varianceZ: names('czz cov_zz var_z variance_z', 'variance'),
  covarianceXy: names('cxy cov_xy covariance_xy cyx cov_yx', 'variance'),
  covarianceXz: names('cxz cov_xz covariance_xz czx cov_zx', 'variance'),
  covarianceYz: names('cyz cov_yz covariance_yz czy cov_zy', 'variance'),
  sigmaEast: names(
    'sde sd_e sige sig_e sigma_e sigma_east east_sigma std_e std_east sd_east',
    'length',
  ),
  sigmaNorth: names(
    'sdn sd_n sign sig_n sigma_n sigma_north north_sigma std_n std_north sd_north',
    'length',
  ),
  sigmaUp: names('sdu sd_u sigu sig_u sigma_u sigma_up up_sigma std_u std_up sd_up', 'length'),
  varianceEast: names('cee cov_ee var_e variance_e variance_east', 'variance'),
  varianceNorth: names('cnn cov_nn var_n variance_n variance_north', 'variance'),
  varianceUp: names('cuu cov_uu var_u variance_u variance_up', 'variance'),

  quality: names('q quality fix fix_quality gps_quality gga_quality quality_indicator'),
  satellites: names('ns nsat nsats nsv numsv sats satellites num_sats n_sats satellites_used'),
  hdop: names('hdop'),
  pdop: names('pdop'),
  vdop: names('vdop'),
  correctionAge: names('age correction_age age_of_corrections diff_age dgps_age', 'duration'),
  stationId: names('station_id base_id reference_station correction_station ref_id'),

  /** Offsets and grid coordinates: recognised, so that they can be refused as positions. */
  localEast: names('e east de d_e easting', 'length'),
  localNorth: names('n north dn d_n northing', 'length'),
  localUp: names('u up du d_u dh ver vertical', 'length'),
  skip: names('- skip'),
} as const;

interface AcceptedNames {
  readonly names: readonly string[];
  readonly measure: Measure | null;
}

function names(list: string, measure: Measure | null = null): AcceptedNames {
  return {names: list.split(' '), measure};
}

const MEANINGS: ReadonlyMap<string, Meaning> = new Map(
  (Object.keys(ACCEPTED) as Meaning[]).flatMap((meaning) =>
    ACCEPTED[meaning].names.map((name) => [compact(name), meaning] as const),
  ),
);

export interface ColumnName {
  readonly kind: 'column';
  /** As it stands in the header or was given. */
  readonly written: string;
  /** null: a name that means nothing here. */
  readonly meaning: Meaning | null;
  readonly unit: Unit | null;
  /** The time scale that the name states. */
  readonly timeScale: 'utc' | 'gps' | null;
}

export interface RefusedName {
  readonly kind: 'refused';
  readonly message: string;
}

/** Remarks in brackets that change nothing. */
const REMARKS = ['ecef', 'iso', 'iso8601', 'geocentric'];

/** What a column name means; an unknown unit or one of the wrong kind is refused. */
export function columnName(written: string): ColumnName | RefusedName {
  const text = written.trim();
  const bracket = /^([^[({<]*)[[({<]([^\])}>]*)[\])}>](.*)$/.exec(text);
  if (bracket === null) return withUnitBehind(text);
  const name = `${bracket[1]} ${bracket[3]}`.trim();
  const remark = (bracket[2] ?? '').trim();
  const timeScale = scaleNamed(compact(remark));
  if (timeScale !== null) return column(text, meaningOf(name), null, timeScale);
  const unit = unitNamed(remark);
  if (unit !== undefined) return column(text, meaningOf(name), unit, null);
  const meaning = meaningOf(name);
  const joined = meaningOf(`${name}_${remark}`) ?? meaningOf(`${remark}_${name}`);
  if (joined !== null) return column(text, joined, null, null);
  if (meaning === null || remark === '' || REMARKS.includes(compact(remark))) {
    return column(text, meaning, null, null);
  }
  return {
    kind: 'refused',
    message: `cannot read the unit "${remark}" of the column "${text}"; known are m, dm, cm, mm, km, ft, us-ft, deg, rad, dms, s, ms, min, h and d`,
  };
}

/** A name such as `x`, or `x_us_ft` with its unit in the last one or two words. */
function withUnitBehind(text: string): ColumnName | RefusedName {
  const meaning = meaningOf(text);
  if (meaning !== null) return column(text, meaning, null, null);
  const words = text.split(/[\s_-]+/).filter((word) => word !== '');
  for (const length of [2, 1]) {
    const unit = unitNamed(words.slice(-length).join(''));
    const name = meaningOf(words.slice(0, -length).join('_'));
    if (unit !== undefined && name !== null) return column(text, name, unit, null);
  }
  return column(text, null, null, null);
}

function column(
  written: string,
  meaning: Meaning | null,
  unit: Unit | null,
  statedScale: 'utc' | 'gps' | null,
): ColumnName | RefusedName {
  const timeScale = statedScale ?? scaleInside(written);
  if (meaning === null || unit === null) {
    return {kind: 'column', written, meaning, unit: meaning === null ? null : unit, timeScale};
  }
  // `time [s]` counts from somewhere; only a start can say from where.
  if (meaning === 'time' && unit.measure === 'duration') {
    return {kind: 'column', written, meaning: 'elapsed', unit, timeScale};
  }
  const {measure} = ACCEPTED[meaning];
  if (measure === unit.measure) return {kind: 'column', written, meaning, unit, timeScale};
  const expected = measure === null ? 'no unit' : `a unit of ${measure}`;
  return {
    kind: 'refused',
    message: `the column "${written}" takes ${expected}, found "${unit.name}"`,
  };
}

function meaningOf(name: string): Meaning | null {
  return MEANINGS.get(name.trim() === '-' ? '-' : compact(name)) ?? null;
}

function scaleInside(written: string): 'utc' | 'gps' | null {
  const words = written.toLowerCase().split(/[^a-z]+/);
  return words.map(scaleNamed).find((scale) => scale !== null) ?? null;
}

function scaleNamed(word: string): 'utc' | 'gps' | null {
  if (word === 'utc') return 'utc';
  return word === 'gps' || word === 'gpst' ? 'gps' : null;
}

/** A name without what people vary: case, blanks, punctuation. */
function compact(name: string): string {
  return name === '-' ? name : name.toLowerCase().replace(/[^a-z0-9]/g, '');
}
