import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {findMark, readMarks} from '../../src/fieldbook/marks.ts';
import {sexagesimal} from '../../src/geodesy/angle.ts';

const marksOf = (text: string, path: string) => readMarks(new TextEncoder().encode(text), path);

const YAML = `
frame: ITRF2020
coordinate epoch: 2020.0
vertical datum: EVRF2019
tolerance: {horizontal: 20 mm, up: 30 mm, reason: "site specification, clause 4"}
marks:
  - name: PILLAR 4
    other names: [P4, 1204]
    latitude: 48 12 30.12345 N
    longitude: 16 22 10.56789 E
    ellipsoidal height: 231.456 m
    orthometric height: 186.789 m
    separation: 44.667 m
    velocity: {east: 21.3 mm/yr, north: 14.9 mm/yr}
    standard uncertainty: {east: 3 mm, north: 4 mm, up: 6 mm}
    witness marks:
      - {name: old bolt, distance: 3.21 m, bearing: 123 45 10, bearing from: grid north, up: -0.4 m}
      - {name: nail, east: 1 m, north: -2 m}
      - {name: pipe, distance: 5 ft}
      - name: somewhere near
  - name: BENCH 7
    orthometric height: 190.1234 m
    standard uncertainty: {up: 1 mm}
    tolerance: {up: 5 mm}
  - name: 0012
    frame: GDA2020
    easting: 500123.456 m
    northing: 5345678.901 us-ft
    projection: UTM 33 N
  - name: CORE
    x: -4052052.9688 m
    y: 4212835.9507 m
    z: -2545104.2663 m
    orthometric height: 600 m
    velocity: {x: -39 mm/yr, y: -5 mm/yr, z: 54 mm/yr}
    covariance: {axes: xyz, unit: mm2, rows: [[1.8], [-1.2, 1.6], [0.9, -0.8, 1.2]]}
`;

describe('readMarks, YAML', () => {
  const marks = marksOf(YAML, 'marks.yaml');

  test('a geodetic mark with all that may be said about it', () => {
    expect(marks[0]).toEqual({
      name: 'PILLAR 4',
      otherNames: ['P4', '1204'],
      lineNumber: 7,
      description: undefined,
      coordinates: {
        kind: 'geodetic',
        latitudeDeg: (48 * 3600 + 12 * 60 + 30.12345) / 3600,
        longitudeDeg: (16 * 3600 + 22 * 60 + 10.56789) / 3600,
        ellipsoidalHeightM: 231.456,
        orthometricHeightM: 186.789,
      },
      frame: 'ITRF2020',
      coordinateEpoch: 2020,
      verticalDatum: 'EVRF2019',
      geoidModel: undefined,
      separationM: 44.667,
      velocity: {axes: 'enu', eastMPerYear: 0.0213, northMPerYear: 0.0149, upMPerYear: 0},
      uncertainty: {kind: 'standard', eastM: 0.003, northM: 0.004, upM: 0.006},
      tolerance: {
        horizontalM: 0.02,
        eastM: undefined,
        northM: undefined,
        upM: 0.03,
        reason: 'site specification, clause 4',
      },
      witnessMarks: [
        {
          name: 'old bolt',
          lineNumber: 17,
          position: {
            kind: 'distance and bearing',
            distanceM: 3.21,
            bearingDeg: (123 * 3600 + 45 * 60 + 10) / 3600,
            bearingFrom: 'grid north',
          },
          upM: -0.4,
        },
        {
          name: 'nail',
          lineNumber: 18,
          position: {kind: 'offset', eastM: 1, northM: -2},
          upM: undefined,
        },
        {
          name: 'pipe',
          lineNumber: 19,
          position: {kind: 'distance', distanceM: 1.524},
          upM: undefined,
        },
        {name: 'somewhere near', lineNumber: 20, position: undefined, upM: undefined},
      ],
    });
  });

  test('a height alone, with its own tolerance', () => {
    expect(marks[1]?.coordinates).toEqual({
      kind: 'height only',
      ellipsoidalHeightM: undefined,
      orthometricHeightM: 190.1234,
    });
    expect(marks[1]?.uncertainty).toEqual({
      kind: 'standard',
      eastM: undefined,
      northM: undefined,
      upM: 0.001,
    });
    expect(marks[1]?.tolerance).toMatchObject({upM: 0.005, horizontalM: undefined});
  });

  test('a plan in a grid; the epoch of the file belongs to another frame', () => {
    expect(marks[2]).toMatchObject({name: '0012', frame: 'GDA2020', coordinateEpoch: undefined});
    expect(marks[2]?.coordinates).toEqual({
      kind: 'grid',
      projection: 'UTM 33 N',
      eastingM: 500123.456,
      northingM: (5345678.901 * 1200) / 3937,
      ellipsoidalHeightM: undefined,
      orthometricHeightM: undefined,
    });
  });

  test('geocentric coordinates with a covariance', () => {
    expect(marks[3]?.coordinates).toMatchObject({kind: 'geocentric', xM: -4052052.9688});
    expect(marks[3]?.velocity).toMatchObject({axes: 'xyz', zMPerYear: 0.054});
    const {uncertainty} = marks[3] ?? {};
    if (uncertainty?.kind !== 'covariance') throw new Error('no covariance');
    expect(uncertainty).toMatchObject({axes: 'xyz', correlationsKnown: true});
    expect(uncertainty.covarianceM2[1][0]).toBeCloseTo(-1.2e-6, 18);
    expect(uncertainty.covarianceM2[0][1]).toBe(uncertainty.covarianceM2[1][0]);
    expect(uncertainty.covarianceM2[2][2]).toBeCloseTo(1.2e-6, 18);
  });
});

test('property: angles come back from degrees, minutes and seconds to 1e-10 degrees', () => {
  // Every latitude and longitude on an uneven mesh, printed with six decimals of the second.
  const angles = Array.from({length: 400}, (_, i) => ({
    latitudeDeg: -89.9 + ((i * 37.123456789) % 179.8),
    longitudeDeg: -179.9 + ((i * 71.987654321) % 359.8),
  }));
  const dms = (degrees: number, letters: string) => {
    const {negative, degrees: whole, minutes, seconds} = sexagesimal(degrees, 6);
    return `${whole} ${minutes} ${seconds.toFixed(6)} ${negative ? letters[1] : letters[0]}`;
  };
  const rows = angles.map(
    ({latitudeDeg, longitudeDeg}, i) =>
      `M${i},${dms(latitudeDeg, 'NS')},${dms(longitudeDeg, 'EW')}`,
  );
  const marks = marksOf(`name,latitude,longitude\n${rows.join('\n')}\n`, 'm.csv');
  marks.forEach(({coordinates}, i) => {
    if (coordinates.kind !== 'geodetic') throw new Error('not geodetic');
    // Half of a millionth of a second is 1.4e-10 degrees.
    expect(Math.abs(coordinates.latitudeDeg - (angles[i]?.latitudeDeg ?? 0))).toBeLessThan(1.5e-10);
    expect(Math.abs(coordinates.longitudeDeg - (angles[i]?.longitudeDeg ?? 0))).toBeLessThan(
      1.5e-10,
    );
  });
});

describe('readMarks, CSV', () => {
  test('columns with units, blocks as columns, quotes, CRLF and a byte-order mark', () => {
    const [first, second] = marksOf(
      '\uFEFFname;x (m);y (m);z (m);frame;Coordinate_Epoch;standard uncertainty x [mm];standard uncertainty y [mm];standard uncertainty z [mm];velocity_x_mm/yr;velocity_y_mm/yr;velocity_z_mm/yr;tolerance horizontal;tolerance reason;description\r\n' +
        '"P;1";-4052052.9688;4212835.9507;-2545104.2663;ITRF2020;2020.0;1;2;3;-39;-5;54;20 mm;clause 4;"a ""bolt"""\r\n' +
        'P2;-4052052;4212835;-2545104;;;;;;;;;;;\r\n',
      'marks.csv',
    );
    expect(first).toMatchObject({
      name: 'P;1',
      lineNumber: 2,
      coordinates: {kind: 'geocentric', xM: -4052052.9688, zM: -2545104.2663},
      frame: 'ITRF2020',
      coordinateEpoch: 2020,
      description: 'a "bolt"',
      velocity: {axes: 'xyz', xMPerYear: -0.039},
      tolerance: {horizontalM: 0.02, reason: 'clause 4'},
      uncertainty: {kind: 'covariance', axes: 'xyz', correlationsKnown: false},
    });
    expect(second).toMatchObject({
      name: 'P2',
      frame: undefined,
      uncertainty: undefined,
      tolerance: undefined,
      velocity: undefined,
    });
  });

  test('the same marks say the same in YAML and in CSV', () => {
    const yaml = marksOf(
      'marks:\n  - {name: A, latitude: 10 30 S, longitude: -20.5, ellipsoidal height: 12.5 ft}\n',
      'a.yaml',
    );
    const csv = marksOf(
      'name,latitude,longitude,ellipsoidal height ft\nA,-10.5,20 30 W,12.5\n',
      'a.csv',
    );
    expect(csv[0]?.coordinates).toEqual(yaml[0]?.coordinates);
  });
});

describe('the format', () => {
  test('of SINEX is told by its first line, whatever the name', () => {
    const bytes = readFileSync(
      join(import.meta.dirname, '../real-logs/sinex-covariance-extract.snx'),
    );
    expect(readMarks(bytes, 'stations.txt')).toHaveLength(15);
  });

  test('of a file named .snx must be SINEX', () => {
    expect(() => marksOf('name,latitude\n', 'a.snx')).toThrow(/SOLUTION\/ESTIMATE/);
  });

  test('without a telling name is told by its looks', () => {
    expect(marksOf(YAML, 'marks.txt')).toHaveLength(4);
    expect(marksOf('name,latitude,longitude\nA,1,2\n', 'marks.txt')).toHaveLength(1);
    expect(marksOf('name,latitude,longitude\nA: 1,1,2\n', 'marks')).toHaveLength(1);
  });
});

describe('findMark', () => {
  const marks = marksOf(YAML, 'marks.yaml');

  test.each(['PILLAR 4', 'pillar-4', 'P4', 'p 4'])('finds %s', (name) => {
    expect(findMark(marks, name)).toMatchObject({kind: 'found', mark: {name: 'PILLAR 4'}});
  });

  test('suggests, and never takes, a name that is near', () => {
    expect(findMark(marks, 'PILAR 4')).toEqual({kind: 'not found', near: ['PILLAR 4']});
    expect(findMark(marks, 'zzzzzz')).toEqual({kind: 'not found', near: []});
  });

  test('an other name that two marks share finds neither', () => {
    const twice = marksOf(
      'marks:\n  - {name: A, other names: [X], latitude: 1, longitude: 2}\n  - {name: B, other names: [X], latitude: 1, longitude: 2}\n',
      'm.yaml',
    );
    expect(findMark(twice, 'X').kind).toBe('not found');
  });
});
