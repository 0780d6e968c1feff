import {describe, expect, test} from 'vitest';
import {InputError, UsageError} from '../../src/errors.ts';
import {type Asked, readLines, readParts} from './table-text.ts';

const XYZ = '4051761.6268,617191.1131,4870822.7374';
const T = '2026-05-04T10:00:00Z';

interface Refusal {
  readonly of: string;
  readonly lines: readonly string[];
  readonly says: string;
  readonly asked?: Asked;
}

const REFUSALS: readonly Refusal[] = [
  {
    of: 'no header',
    lines: [`${T},${XYZ}`],
    says: 'found 4 columns and no header that names them; give --columns',
  },
  {
    of: 'a single column',
    lines: ['x', '1', '2'],
    says: 'need rows with the same three or more columns',
  },
  {
    of: 'prose',
    lines: ['Dear Sir', 'the height is as follows', 'yours'],
    says: 'need rows with the same three or more columns',
  },
  {
    of: 'geocentric and geodetic columns',
    lines: ['time,x,y,z,lat,lon,h', `${T},${XYZ},50,8,1`],
    says: 'found geocentric and geodetic columns and cannot choose',
  },
  {
    of: 'x and y alone',
    lines: ['time,x,y', `${T},1,2`],
    says: 'found only x, y; the columns are time, x, y',
  },
  {of: 'latitude alone', lines: ['time,lat,h', `${T},50,2`], says: 'found only lat'},
  {
    of: 'latitude, longitude and z',
    lines: ['time,lat,lon,z', `${T},50,8,3`],
    says: 'found geocentric and geodetic columns',
  },
  {
    of: 'east, north, up',
    lines: ['time,east,north,up', `${T},1,2,3`],
    says: 'found neither; east, north and up, or grid coordinates, are no position without their origin',
  },
  {
    of: 'grid coordinates',
    lines: ['time,easting,northing,h', `${T},577274.99,69740.5,3`],
    says: 'found neither; east, north and up, or grid coordinates',
  },
  {of: 'no time', lines: ['id,x,y,z', `7,${XYZ}`], says: 'need columns that date the rows'},
  {
    of: 'a bare number as time',
    lines: ['time,x,y,z', `1777888800,${XYZ}`],
    says: 'cannot tell what "1777888800" in the column "time" counts',
  },
  {
    of: 'seconds without a start',
    lines: ['seconds,x,y,z', `12,${XYZ}`],
    says: 'counts from a start that is not given; give --start',
  },
  {
    of: 'a time of day without a date',
    lines: ['time,x,y,z', `10:00:00,${XYZ}`],
    says: 'without a date; give --date',
  },
  {
    of: 'seconds of week without the week',
    lines: ['tow,x,y,z', `100,${XYZ}`],
    says: 'needs a column gps_week beside it',
  },
  {
    of: 'a date with the year last',
    lines: ['date,time,x,y,z', `04/05/2026,10:00:00,${XYZ}`],
    says: 'day and month could be swapped; write it as YYYY-MM-DD',
  },
  {
    of: 'a dotted date with the year last',
    lines: ['time,x,y,z', `04.05.2026 10:00:00,${XYZ}`],
    says: 'day and month could be swapped',
  },
  {
    of: 'a two-digit year',
    lines: ['date,time,x,y,z', `04-05-26,10:00:00,${XYZ}`],
    says: 'two-digit year',
  },
  {
    of: 'two columns of one meaning',
    lines: ['time,utc,x,y,z', `${T},${T},${XYZ}`],
    says: 'the columns "time" and "utc" mean the same',
  },
  {
    of: 'two heights',
    lines: ['time,lat,lon,h,ellipsoidal_height', `${T},50,8,1,2`],
    says: 'found two heights, "h" and "ellipsoidal_height"',
  },
  {
    of: 'an unknown unit',
    lines: ['time,x [chains],y [m],z [m]', `${T},${XYZ}`],
    says: 'cannot read the unit "chains" of the column "x [chains]"',
  },
  {
    of: 'a unit of another kind',
    lines: ['time,lat_m,lon_m,h', `${T},50,8,1`],
    says: 'the column "lat_m" takes a unit of angle, found "m"',
  },
  {
    of: 'a unit where none belongs',
    lines: ['time,x,y,z,hdop [m]', `${T},${XYZ},1`],
    says: 'the column "hdop [m]" takes no unit',
  },
  {
    of: 'an unknown time zone',
    lines: ['time (UTC+2),x,y,z', `2026-05-04 10:00:00,${XYZ}`],
    says: 'cannot read the unit "UTC+2"',
  },
  {
    of: 'a header that is too short',
    lines: ['time,x,y,z', `${T},${XYZ},1,2`, `${T},${XYZ},1,2`],
    says: 'the header names 4 columns and the rows have 6',
  },
  {
    of: 'too few names in --columns',
    lines: [`${T},${XYZ},1`],
    asked: {columns: ['time', 'x', 'y', 'z']},
    says: '--columns names 4 columns and the rows have 5',
  },
  {
    of: 'too many names in --columns',
    lines: [`${T},${XYZ}`],
    asked: {columns: ['time', 'x', 'y', 'z', 'q', '...']},
    says: '--columns names 5 columns and the rows have 4',
  },
  {
    of: 'blanks between decimal commas',
    lines: ['10:00:00 1,5 2,5 3,5', '10:00:01 1,5 2,5 3,5'],
    says: 'cannot tell commas between columns from decimal commas',
  },
  {
    of: 'commas between decimal commas',
    lines: [
      'time,x,y,z',
      '2026-05-04T10:00:00Z,4051761,62 617191,11',
      '2026-05-04T10:00:01Z,4051761,62 617191,11',
    ],
    says: 'cannot tell commas between columns from decimal commas',
  },
  {
    of: 'point and comma as decimals',
    lines: ['time;x;y;z', `${T};4051761,62;617191.11;4870822,7`],
    says: 'found both "4051761,62" and "617191.11"',
  },
  {
    of: 'a comma before three digits',
    lines: ['time;lat;lon;h', `${T};50,123;8,456;100,789`],
    says: 'cannot tell whether "50,123" has decimals or thousands',
  },
  {
    of: 'thousands',
    lines: ['time;x;y;z', `${T};4,051,761.62;617,191.11;4,870,822.73`],
    says: 'need numbers without thousands separators, found "4,051,761.62"',
  },
  {
    of: 'kilometres taken for metres',
    lines: ['time,x,y,z', `${T},4051.7,617.19,4870.8`, `${T},4051.7,617.19,4870.8`],
    says: '2 of 2 rows hold no possible position: x 4051.7, y 617.19, z 4870.8 in metres lie 6366 m from the centre of the Earth',
  },
  {
    of: 'millimetres taken for metres',
    lines: ['time,x,y,z', `${T},4051761626,617191113,4870822737`],
    says: 'rows hold no possible position',
  },
  {
    of: 'degrees and minutes in one number',
    lines: ['time,lat,lon,h', `${T},5006.1234,840.1234,100`],
    says: 'lat 5006.1234 and lon 840.1234 are no latitude and longitude in degrees',
  },
  {
    of: 'latitude and longitude exchanged',
    lines: ['time,lat,lon,h', `${T},144.3,-37.2,100`],
    says: 'lat 144.3 and lon -37.2 are no latitude and longitude',
  },
  {
    of: 'packed degrees, minutes and seconds',
    lines: ['time,lat_dms,lon_dms,h', `${T},50.0612,8.3045,100`],
    says: 'unreadable angle in column lat_dms',
  },
  {
    of: 'displacements called lat and lon',
    lines: ['time,lat,lon,up', `${T},1.2,3.4,5.6`],
    says: 'which is a displacement',
  },
  {
    of: 'GPS time with a zone',
    lines: ['gps_time,x,y,z', `${T},${XYZ}`],
    says: 'named as GPS time and its values carry a time zone',
  },
  {
    of: 'names that state two scales',
    lines: ['gps_date,utc_time,x,y,z', `2026-05-04,10:00:00,${XYZ}`],
    says: 'state UTC and GPS time',
  },
  {
    of: 'rows of which none can be read',
    lines: ['time,x,y,z', `2026-02-30T10:00:00Z,${XYZ}`, `2026-05-04T10:00:00Z,a,b,c`],
    says: 'no row could be read; the first reason is "unreadable time: no such day"',
  },
  {of: 'a header alone', lines: ['time,x,y,z'], says: ''},
];

describe('a table that can be read in two ways, or in none, is refused by name', () => {
  test('there are enough of them', () => {
    expect(REFUSALS.length).toBeGreaterThanOrEqual(30);
  });

  test.each(REFUSALS.filter(({says}) => says !== ''))('$of', ({lines, says, asked}) => {
    const read = () => readLines(lines, asked);
    expect(read).toThrow(says);
    expect(read).toThrow(InputError);
  });

  test('a header alone is a table without epochs', () => {
    expect(readLines(['time,x,y,z']).epochs.count).toBe(0);
  });

  const contradictions: readonly (readonly [string, readonly string[], Asked, string])[] = [
    [
      'an unknown name in --columns',
      [`${T},${XYZ}`],
      {columns: ['time', 'x', 'y', 'zet']},
      '--columns: "zet" is no known column name',
    ],
    [
      'UTC for GPS weeks',
      ['gps_week,tow,x,y,z', `2417,1,${XYZ}`],
      {timeScale: 'utc'},
      '--time-scale utc contradicts the table, whose gps_week, tow means GPS time',
    ],
    [
      'GPS time for Unix seconds',
      ['unix,x,y,z', `1777888800,${XYZ}`],
      {timeScale: 'gps'},
      '--time-scale gps contradicts the table, whose unix means UTC',
    ],
    [
      'GPS time for times in Z',
      ['time,x,y,z', `${T},${XYZ}`],
      {timeScale: 'gps'},
      '--time-scale gps contradicts the table',
    ],
  ];

  test.each(contradictions)('options that contradict the table: %s', (_, lines, asked, says) => {
    expect(() => readLines(lines, asked)).toThrow(says);
    expect(() => readLines(lines, asked)).toThrow(UsageError);
  });

  test('UTF-16 and binary data', () => {
    expect(() => readParts([Uint8Array.of(0xff, 0xfe, 0x74, 0)])).toThrow(
      'written in UTF-16; save it as UTF-8',
    );
    expect(() => readParts([Uint8Array.of(0x74, 0x2c, 0, 0x0a)])).toThrow(
      'this is no text: it holds zero bytes',
    );
  });

  test('an error says in which file and line, and does not depend on the cuts', () => {
    const bytes = new TextEncoder().encode('time,x [chains],y,z\n1,2,3,4\n');
    const messages = new Set<string>();
    for (let cut = 0; cut < bytes.length; cut += 1) {
      try {
        readParts([bytes.subarray(0, cut), bytes.subarray(cut)]);
      } catch (error) {
        if (error instanceof InputError) messages.add(`${error.path}: ${error.message}`);
      }
    }
    expect(messages.size).toBe(1);
    expect([...messages][0]).toMatch(/^table\.csv: cannot read the unit/);
  });
});
