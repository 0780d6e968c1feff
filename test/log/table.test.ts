import {isDeepStrictEqual} from 'node:util';
import {describe, expect, test} from 'vitest';
import {EpochFlag, FixClass} from '../../src/epochs/epochs.ts';
import {GRS80} from '../../src/geodesy/ellipsoid.ts';
import {readReference} from '../reference/read.ts';
import {randomFrom} from '../simulate/random.ts';
import {findingCodes, linesAccounted, readLines, readParts, realTable} from './table-text.ts';

interface Station {
  readonly station: string;
  readonly lat_dms: string;
  readonly lon_dms: string;
  readonly h: string;
  readonly x: string;
  readonly y: string;
  readonly z: string;
}

const {rows: STATIONS} = readReference<{rows: readonly Station[]}>('australian-stations-2018');
const ON_GRS80 = {semiMajorAxisM: GRS80.semiMajorAxisM, inverseFlattening: GRS80.inverseFlattening};

function degreesOf(dms: string): number {
  const [degrees = '', minutes = '', seconds = ''] = dms.split(' ');
  const magnitude = Math.abs(Number(degrees)) + Number(minutes) / 60 + Number(seconds) / 3600;
  return degrees.startsWith('-') ? -magnitude : magnitude;
}

describe('reference: 109 stations published by Geoscience Australia (2018)', () => {
  const second = (k: number): string =>
    `2026-05-04T10:${String(Math.floor(k / 60)).padStart(2, '0')}:${String(k % 60).padStart(2, '0')}Z`;
  // 1e-5 arc seconds and 0.1 mm are printed; the published X Y Z round to 0.05 mm on each axis.
  const halfDigitDeg = 0.5e-5 / 3600;
  const roundingM = 0.5e-4 * (1 + Math.sqrt(3));
  const metreDeg = 1 / 100_000;

  test('geocentric rows give the published latitude, longitude and height', () => {
    const {epochs} = readLines(
      ['time,x,y,z', ...STATIONS.map(({x, y, z}, k) => [second(k), x, y, z].join())],
      ON_GRS80,
    );
    expect(epochs.count).toBe(109);
    STATIONS.forEach(({lat_dms, lon_dms, h}, k) => {
      const slack = halfDigitDeg + roundingM * metreDeg * 1.3;
      expect(Math.abs((epochs.latitudeDeg[k] ?? 0) - degreesOf(lat_dms))).toBeLessThan(slack);
      expect(Math.abs((epochs.longitudeDeg[k] ?? 0) - degreesOf(lon_dms))).toBeLessThan(slack);
      expect(Math.abs((epochs.ellipsoidalHeightM[k] ?? 0) - Number(h))).toBeLessThan(
        roundingM + 0.5e-4,
      );
    });
  });

  test.each([
    ['as they are printed', (text: string) => text],
    ['with colons', (text: string) => text.replaceAll(' ', ':')],
    [
      'with marks',
      (text: string) =>
        text
          .replace(' ', '° ')
          .replace(/ (?=[\d.]+$)/, "' ")
          .concat('"'),
    ],
  ])('geodetic rows in degrees, minutes and seconds %s', (_, write) => {
    const rows = STATIONS.map(({lat_dms, lon_dms, h}, k) =>
      [second(k), write(lat_dms), write(lon_dms), h].join(';'),
    );
    const contents = readLines(['time;latitude;longitude;ellipsoidal height', ...rows], ON_GRS80);
    expect(contents.epochs.count).toBe(109);
    STATIONS.forEach(({lat_dms, lon_dms, h}, k) => {
      expect(contents.epochs.latitudeDeg[k]).toBeCloseTo(degreesOf(lat_dms), 12);
      expect(contents.epochs.longitudeDeg[k]).toBeCloseTo(degreesOf(lon_dms), 12);
      expect(contents.epochs.ellipsoidalHeightM[k]).toBe(Number(h));
    });
    expect(contents.resolution.latitudeDeg).toBeCloseTo(1e-5 / 3600, 15);
    expect(contents.resolution.heightM).toBe(1e-4);
  });
});

describe('reference: real tables (test/real-logs/README.md)', () => {
  test('s17, ECEF daily: every row, and its own sigmas agree with its covariance', () => {
    const bytes = realTable('s17-ecef-daily-covariance-extract.txt.gz');
    const local = readParts([bytes]);
    const [input] = local.inputs;
    expect(input?.lines).toEqual({total: 1096, used: 1095, ignored: {header: 1}, rejected: {}});
    expect(input?.lineEnds).toEqual({CRLF: 0, LF: 1096, 'CR CR LF': 0, none: 0});
    expect(local.epochs.gpsSeconds.length).toBe(1095);
    expect(findingCodes(local)).toContain('date-without-time');

    // The same table, its local sigmas left out: X Y Z sigmas and correlations must rotate to them.
    const columns = '-,-,x,y,z,sdx,sdy,sdz,corr_xy,corr_xz,corr_yz,-,-,-,-,-,-'.split(',');
    const rotated = readParts([bytes], {columns: ['date', ...columns.slice(1)]});
    expect(rotated.epochs.count).toBe(1095);
    for (let k = 0; k < 1095; k += 1) {
      for (const axis of ['sigmaEastM', 'sigmaNorthM', 'sigmaUpM'] as const) {
        // Both are printed to 0.1 mm; three rounded sigmas reach one result.
        expect(
          Math.abs((rotated.epochs[axis][k] ?? 9) - (local.epochs[axis][k] ?? 0)),
        ).toBeLessThan(1.5e-4);
      }
    }
  });

  test('s23, ECEF vehicle at 5 Hz without a header', () => {
    const contents = readParts([realTable('s23-ecef-vehicle-5hz-33s-stop.txt.gz')], {
      columns: ['-', 't', 'x', 'y', 'z', '...'],
      startGpsSeconds: 1_000_000_000,
    });
    expect(contents.inputs[0]?.lines).toEqual({total: 3575, used: 3575, ignored: {}, rejected: {}});
    const {gpsSeconds, latitudeDeg, longitudeDeg} = contents.epochs;
    expect((gpsSeconds[3574] ?? 0) - (gpsSeconds[0] ?? 0)).toBeCloseTo(714.8, 6);
    // Frankfurt, as the file's name says; north and east.
    expect(latitudeDeg[0]).toBeCloseTo(50.1, 1);
    expect(longitudeDeg[0]).toBeCloseTo(8.66, 1);
    expect(contents.epochs.sigmaEastM.every(Number.isNaN)).toBe(true);
  });

  test('s23 with its covariance columns: zeros are no covariance', () => {
    const columns = '-,t,x,y,z,cxx,cxy,cxz,cyx,cyy,cyz,czx,czy,czz'.split(',');
    // The lower half repeats the upper one and means the same.
    expect(() => readParts([realTable('s23-ecef-vehicle-5hz-33s-stop.txt.gz')], {columns})).toThrow(
      'the columns "cxy" and "cyx" mean the same',
    );
    const contents = readParts([realTable('s23-ecef-vehicle-5hz-33s-stop.txt.gz')], {
      columns: '-,t,x,y,z,cxx,cxy,cxz,-,cyy,cyz,-,-,czz'.split(','),
      startGpsSeconds: 1_000_000_000,
    });
    expect(contents.findings).toContainEqual({
      code: 'sigmas-zero',
      severity: 'note',
      values: {rows: 3575},
    });
    expect(contents.epochs.sigmaUpM.every(Number.isNaN)).toBe(true);
  });

  test('s16, displacements in millimetres: refused by the names and by the values', () => {
    const bytes = realTable('s16-neu-daily-mm.csv.gz');
    expect(() => readParts([bytes])).toThrow(
      'the columns "lat" and "lon" stand beside "ver", which is a displacement',
    );
    expect(() => readParts([bytes], {columns: ['time', 'lon', 'lat', '...']})).toThrow(
      /rows hold no possible position: lat 90\.69 and lon -54\.89/,
    );
  });
});

const TIMES = [0, 1, 2].map((second) => `2026-05-04T10:00:0${second}Z`);
const XYZ = ['4051761.6268', '617191.1131', '4870822.7374'];

describe('the shape of a table', () => {
  const expected = readLines(['time,x,y,z', ...TIMES.map((time) => [time, ...XYZ].join())]).epochs;

  const shapes: readonly (readonly [string, readonly string[]])[] = [
    ['tabs', ['time\tx\ty\tz', ...TIMES.map((time) => [time, ...XYZ].join('\t'))]],
    ['semicolons', ['time;x;y;z', ...TIMES.map((time) => [time, ...XYZ].join(' ; '))]],
    ['blanks', ['time x y z', ...TIMES.map((time) => `  ${[time, ...XYZ].join('   ')}  `)]],
    [
      'decimal commas',
      ['time;x;y;z', ...TIMES.map((time) => [time, ...XYZ].join(';').replaceAll('.', ','))],
    ],
    ['quotes', ['"time","x","y","z"', ...TIMES.map((time) => `"${[time, ...XYZ].join('","')}"`)]],
    [
      'a delimiter at the end',
      ['time,x,y,z,', ...TIMES.map((time) => `${[time, ...XYZ].join()},`)],
    ],
    ['a header without it', ['time,x,y,z', ...TIMES.map((time) => `${[time, ...XYZ].join()},`)]],
    ['capitals and units', ['TIME,X [m],Y_M,Z(m)', ...TIMES.map((time) => [time, ...XYZ].join())]],
    ['a line of units', ['time,x,y,z', '-,m,m,m', ...TIMES.map((time) => [time, ...XYZ].join())]],
    [
      'a header in a comment',
      ['# made by hand', '# time x y z', '#', ...TIMES.map((time) => [time, ...XYZ].join(' '))],
    ],
    [
      'other columns between',
      [
        'id,time,x,note,y,z',
        ...TIMES.map((time) => ['7', time, XYZ[0], 'a b', XYZ[1], XYZ[2]].join()),
      ],
    ],
    [
      'date and time under one name',
      [
        '% UTC x y z',
        ...TIMES.map((time) => [time.replace('T', ' ').replace('Z', ''), ...XYZ].join(' ')),
      ],
    ],
    [
      'every kind of comment',
      [
        '% one',
        '! two',
        '// three',
        '; four',
        'time,x,y,z',
        ...TIMES.map((time) => [time, ...XYZ].join()),
        '# five',
      ],
    ],
    ['a byte order mark', ['\ufefftime,x,y,z', ...TIMES.map((time) => [time, ...XYZ].join())]],
    [
      'a repeated header',
      [
        'time,x,y,z',
        [TIMES[0], ...XYZ].join(),
        'time,x,y,z',
        [TIMES[1], ...XYZ].join(),
        '',
        [TIMES[2], ...XYZ].join(),
      ],
    ],
  ];

  test.each(shapes)('%s', (_, lines) => {
    const contents = readLines(lines);
    for (const column of [
      'gpsSeconds',
      'latitudeDeg',
      'longitudeDeg',
      'ellipsoidalHeightM',
    ] as const) {
      expect([...contents.epochs[column]]).toEqual([...expected[column]]);
    }
    expect(linesAccounted(contents)).toBe(lines.length);
    expect(contents.inputs[0]?.lines.rejected).toEqual({});
  });

  test('lengths in other units are metres inside', () => {
    const written: Readonly<Record<string, number>> = {
      mm: 1e-3,
      cm: 1e-2,
      dm: 0.1,
      km: 1000,
      ft: 0.3048,
      us_ft: 1200 / 3937,
    };
    for (const [unit, factor] of Object.entries(written)) {
      const values = XYZ.map((value) => String(Number(value) / factor));
      const names = ['x', 'y', 'z'].map((name) => `${name}_${unit}`);
      const {epochs} = readLines([`time,${names.join()}`, [TIMES[0], ...values].join()]);
      expect(epochs.latitudeDeg[0]).toBeCloseTo(expected.latitudeDeg[0] ?? 0, 12);
      expect(epochs.ellipsoidalHeightM[0]).toBeCloseTo(expected.ellipsoidalHeightM[0] ?? 0, 7);
    }
  });

  test('angles in radians are degrees inside', () => {
    const {epochs} = readLines(['time,lat_rad,lon (rad),h', `${TIMES[0]},0.5,-1.25,10`]);
    expect(epochs.latitudeDeg[0]).toBeCloseTo((0.5 * 180) / Math.PI, 13);
    expect(epochs.longitudeDeg[0]).toBeCloseTo((-1.25 * 180) / Math.PI, 13);
  });

  test('nothing but comments, or nothing at all, is a table without epochs', () => {
    for (const lines of [[], ['# nothing'], ['', '% a', '']]) {
      const contents = readLines(lines);
      expect(contents.epochs.count).toBe(0);
      expect(linesAccounted(contents)).toBe(lines.length);
    }
  });
});

describe('what a row gives', () => {
  function single(names: string, values: string) {
    const contents = readLines([`time,${names}`, `${TIMES[0]},${values}`]);
    expect(contents.epochs.count).toBe(1);
    return contents;
  }

  test('latitude and longitude alone are a plan position', () => {
    const {epochs} = single('lat,lon', '50.5,8.5');
    expect(epochs.ellipsoidalHeightM[0]).toBeNaN();
    expect(epochs.flags[0]).toBe(EpochFlag.planOnly);
  });

  test('longitudes up to 360 are wrapped', () => {
    expect(single('lat,lon,h', '-33,288.5,1').epochs.longitudeDeg[0]).toBe(-71.5);
  });

  test('a bare height is taken as ellipsoidal, aloud; one that says so is not', () => {
    expect(findingCodes(single('lat,lon,h', '50,8,100'))).toContain('height-taken-as-ellipsoidal');
    expect(findingCodes(single('lat,lon,ell_height', '50,8,100'))).not.toContain(
      'height-taken-as-ellipsoidal',
    );
  });

  test('an altitude is no ellipsoidal height without a separation', () => {
    const alone = single('lat,lon,alt', '50,8,100');
    expect(alone.epochs.ellipsoidalHeightM[0]).toBeNaN();
    expect(alone.epochs.altitudeM[0]).toBe(100);
    expect(alone.epochs.flags[0]).toBe(0);
    expect(findingCodes(alone)).toContain('altitude-without-separation');
    const both = single('lat,lon,alt,undulation', '50,8,100,47.5');
    expect(both.epochs.ellipsoidalHeightM[0]).toBe(147.5);
    expect(both.epochs.separationM[0]).toBe(47.5);
  });

  const qualities: readonly (readonly [string, FixClass])[] = [
    ['0', FixClass.none],
    ['1', FixClass.autonomous],
    ['2', FixClass.differential],
    ['3', FixClass.precise],
    ['4', FixClass.fixed],
    ['5', FixClass.float],
    ['6', FixClass.notMeasured],
    ['7', FixClass.notMeasured],
    ['8', FixClass.notMeasured],
    ['', FixClass.unknown],
    ['RTK fixed', FixClass.fixed],
    ['float', FixClass.float],
    ['SBAS', FixClass.differential],
    ['single', FixClass.autonomous],
    ['PPP', FixClass.precise],
  ];

  test.each(qualities)('quality "%s" is class %i', (quality, fixClass) => {
    const {epochs} = single('x,y,z,q', [...XYZ, quality].join());
    expect(epochs.fixClass[0]).toBe(fixClass);
    expect(epochs.flags[0]).toBe(fixClass === FixClass.none ? EpochFlag.invalid : 0);
  });

  test('no quality column is an unknown class', () => {
    expect(single('x,y,z', XYZ.join()).epochs.fixClass[0]).toBe(FixClass.unknown);
  });

  test('a legend in a comment beats the GGA meaning of numbers', () => {
    const lines = [
      '% Q=1:fix,2:float,4:dgps,5:single',
      'time,x,y,z,Q',
      `${TIMES[0]},${XYZ.join()},1`,
    ];
    const contents = readLines(lines);
    expect(contents.epochs.fixClass[0]).toBe(FixClass.fixed);
    expect(findingCodes(contents)).toContain('quality-from-comment');
    expect(findingCodes(readLines(lines.slice(1)))).toContain('quality-as-gga');
  });

  test('satellites, dilution, age and station', () => {
    const {epochs} = single(
      'x,y,z,ns,hdop,pdop,vdop,age,base_id',
      [...XYZ, 17, 0.75, 1.5, 1.25, 2, 1023].join(),
    );
    expect(epochs.satellites[0]).toBe(17);
    expect(epochs.hdop[0]).toBe(0.75);
    expect(epochs.pdop[0]).toBe(1.5);
    expect(epochs.vdop[0]).toBe(1.25);
    expect(epochs.correctionAgeS[0]).toBe(2);
    expect(epochs.stationId[0]).toBe(1023);
    const empty = single('x,y,z,ns,hdop,base_id', `${XYZ.join()},,,`).epochs;
    expect([empty.satellites[0], empty.hdop[0], empty.stationId[0]]).toEqual([
      255,
      Number.NaN,
      65_535,
    ]);
  });

  test('a variance is the square of a sigma, and zero is not given', () => {
    const {epochs} = single('x,y,z,var_e,var_n,var_u', [...XYZ, '0.0004', '0', '0.0009'].join());
    expect(epochs.sigmaEastM[0]).toBeCloseTo(0.02, 7);
    expect(epochs.sigmaNorthM[0]).toBeNaN();
    expect(epochs.sigmaUpM[0]).toBeCloseTo(0.03, 7);
  });

  test('equal geocentric sigmas rotate to equal local ones; missing correlations are said', () => {
    const contents = single('x,y,z,sdx_mm,sdy_mm,sdz_mm', [...XYZ, 5, 5, 5].join());
    for (const axis of ['sigmaEastM', 'sigmaNorthM', 'sigmaUpM'] as const) {
      expect(contents.epochs[axis][0]).toBeCloseTo(0.005, 8);
    }
    expect(findingCodes(contents)).toContain('sigma-correlation-assumed-zero');
  });

  test('what cannot be a covariance is left out', () => {
    const names = 'x,y,z,sdx,sdy,sdz,corr_xy,corr_xz,corr_yz';
    expect(single(names, [...XYZ, 1, 1, 1, 1.5, 0, 0].join()).epochs.sigmaUpM[0]).toBeNaN();
    expect(single(names, [...XYZ, 1, 1, 1, -0.9, -0.9, -0.9].join()).epochs.count).toBe(1);
  });
});

describe('order, repetition and stillness', () => {
  test('rows that run back are put into order and flagged', () => {
    const at = (second: number, x: string): string =>
      `2026-05-04T10:00:${String(second).padStart(2, '0')}Z,${x},617191.1131,4870822.7374`;
    const {epochs} = readLines([
      'time,x,y,z',
      at(0, '4051761.1'),
      at(2, '4051761.2'),
      at(1, '4051761.3'),
      at(2, '4051761.4'),
      at(3, '4051761.4'),
    ]);
    const first = epochs.gpsSeconds[0] ?? 0;
    expect([...epochs.gpsSeconds].map((seconds) => seconds - first)).toEqual([0, 1, 2, 2, 3]);
    expect([...epochs.lineNumber]).toEqual([2, 4, 3, 5, 6]);
    expect([...epochs.flags]).toEqual([
      0,
      EpochFlag.outOfOrder,
      0,
      EpochFlag.repeated,
      EpochFlag.frozen,
    ]);
  });
});

describe('findings about the rows as a whole', () => {
  const row = (time: string, x: string): string => `${time},${x},617191.1131,4870822.7374`;

  test('time that runs back, repeated and frozen epochs are counted', () => {
    const {findings} = readLines([
      'time,x,y,z',
      row('2026-05-04T10:00:01Z', '4051761.1'),
      row('2026-05-04T10:00:00Z', '4051761.2'),
      row('2026-05-04T10:00:01Z', '4051761.3'),
      row('2026-05-04T10:00:02Z', '4051761.3'),
      row('2026-05-04T10:00:05Z', '4051761.3'),
    ]);
    expect(findings).toContainEqual({
      code: 'time-back',
      severity: 'caution',
      values: {times: 1, largestS: 1, firstLineNumber: 3},
    });
    expect(findings).toContainEqual({
      code: 'repeated-epochs',
      severity: 'caution',
      values: {epochs: 1},
    });
    expect(findings).toContainEqual({
      code: 'frozen-run',
      severity: 'note',
      values: {epochs: 2, longestEpochs: 3, longestS: 4},
    });
  });

  test('a date from the options, missing heights and coarse digits are said', () => {
    const {findings} = readLines(['time,lat,lon', '10:00:00,50.12345,8.5'], {
      date: {year: 2026, month: 5, day: 4},
    });
    const codes = findings.map(({code}) => code);
    expect(codes).toEqual(
      expect.arrayContaining(['date-assumed', 'height-absent', 'resolution-coarse']),
    );
    expect(findings.find(({code}) => code === 'date-assumed')?.values).toEqual({
      date: '2026-05-04',
    });
  });
});

describe('rejected rows', () => {
  const GOOD = `${TIMES[0]},${XYZ.join()},4,0.01`;
  const bad: readonly (readonly [string, string])[] = [
    [`${TIMES[1]},${XYZ.join()},4`, 'wrong column count'],
    [`${TIMES[1]},${XYZ.join()},4,0.01,7`, 'wrong column count'],
    [`${TIMES[1]},4051761.62.68,617191.1131,4870822.7374,4,0.01`, 'unreadable number in column x'],
    [`${TIMES[1]},4051761.6268,617191.1131,4870822.7374,4,abc`, 'unreadable number in column sde'],
    [`${TIMES[1]},0,0,0,4,0.01`, 'no position'],
    [`${TIMES[1]},,,,4,0.01`, 'no position'],
    [`${TIMES[1]},nan,nan,nan,4,0.01`, 'no position'],
    [`${TIMES[1]},4051761.6268,617191.1131,1.7374,4,0.01`, 'not on or near the Earth'],
    [`${TIMES[1]},${XYZ.join()},9,0.01`, 'unknown quality'],
    [`${TIMES[1]},${XYZ.join()},maybe,0.01`, 'unknown quality'],
    ['garbage', 'wrong column count'],
  ];

  test.each(bad)('%s: %s', (row, reason) => {
    const contents = readLines(['time,x,y,z,q,sde', GOOD, GOOD, GOOD, row]);
    expect(contents.inputs[0]?.lines.rejected).toEqual({[reason]: 1});
    expect(contents.inputs[0]?.rejectedLines).toEqual([
      {lineNumber: 5, reason, excerpt: row.slice(0, 80)},
    ]);
    expect(contents.epochs.count).toBe(3);
    expect(linesAccounted(contents)).toBe(5);
  });

  test('a latitude beyond the pole among good ones, an angle that is none, a height that cannot be', () => {
    const good = TIMES.map((time) => `${time},50.5,8.5,100`);
    const contents = readLines([
      'time,lat,lon,h',
      ...good,
      `${TIMES[0]},95,8.5,100`,
      `${TIMES[0]},50x,8.5,100`,
      `${TIMES[0]},50.5,8.5,-30000`,
      `${TIMES[0]},0,0,0`,
    ]);
    expect(contents.inputs[0]?.lines.rejected).toEqual({
      'latitude or longitude out of range': 1,
      'unreadable angle in column lat': 1,
      'height out of range': 1,
      'no position': 1,
    });
  });

  test('of each reason the first five are shown, control characters replaced', () => {
    const lines = ['time,x,y,z', ...TIMES.map((time) => [time, ...XYZ].join())];
    for (let k = 0; k < 6; k += 1) lines.push('bad\u0007row');
    const [input] = readLines([...lines, ...lines.slice(1, 4), ...lines.slice(1, 4)]).inputs;
    expect(input?.lines.rejected).toEqual({'wrong column count': 6});
    expect(input?.rejectedLines.length).toBe(5);
    expect(input?.rejectedLines[0]?.excerpt).toBe('bad·row');
  });

  test('a line beyond all measure', () => {
    const contents = readLines(['time,x,y,z', [TIMES[0], ...XYZ].join(), 'x'.repeat(70_000)]);
    expect(contents.inputs[0]?.lines.rejected).toEqual({'line too long': 1});
  });
});

describe('the bytes in any chunks', () => {
  const text = [
    '# a table',
    '',
    'date;time;lat;lon;h;Q',
    ...TIMES.map(
      (time, k) => `${time.slice(0, 10)};${time.slice(11, 19)};50,123456${k};8,5;100,2${k};4`,
    ),
    'bad',
    '2026-05-04;10:00:03;;;;1',
    '2026-05-04;10:00:02;50,1;8,5;1;1',
  ].join('\r\n');
  const bytes = new TextEncoder().encode(`${text}\r\n2026-05-04;10:00:09;50,1;8,5;1;5`);
  const whole = readParts([bytes]);

  test('the table is worth the trouble', () => {
    expect(whole.epochs.count).toBe(5);
    expect(whole.inputs[0]?.lines.rejected).toEqual({'wrong column count': 1, 'no position': 1});
    expect(whole.inputs[0]?.lineEnds).toEqual({CRLF: 9, LF: 0, 'CR CR LF': 0, none: 1});
    expect(linesAccounted(whole)).toBe(10);
  });

  test('property: cut at every byte, it gives one and the same result', () => {
    for (let cut = 1; cut < bytes.length; cut += 1) {
      const parts = readParts([bytes.subarray(0, cut), bytes.subarray(cut)]);
      if (!isDeepStrictEqual(parts, whole)) expect(parts, `cut at ${cut}`).toEqual(whole);
    }
    expect(readParts([...bytes].map((byte) => Uint8Array.of(byte)))).toEqual(whole);
  });

  test('property: the accounts of 2,000 mutated tables add up, or the table is refused in words', () => {
    const random = randomFrom(7, 'mutated tables');
    let read = 0;
    for (let k = 0; k < 2000; k += 1) {
      const mutated = bytes.slice();
      for (let n = 0; n < 1 + 4 * random.uniform(); n += 1) {
        mutated[Math.floor(random.uniform() * mutated.length)] = Math.floor(random.uniform() * 256);
      }
      try {
        const contents = readParts([mutated]);
        expect(linesAccounted(contents)).toBe(contents.inputs[0]?.lines.total);
        expect(contents.epochs.count).toBe(contents.inputs[0]?.lines.used);
        read += 1;
      } catch (error) {
        expect((error as Error).name).toBe('InputError');
      }
    }
    expect(read).toBeGreaterThan(1000);
  });
});
