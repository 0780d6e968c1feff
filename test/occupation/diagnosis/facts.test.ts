import {describe, expect, test} from 'vitest';
import {readMarks} from '../../../src/fieldbook/marks.ts';
import {readSheet} from '../../../src/fieldbook/sheet.ts';
import {WGS84} from '../../../src/geodesy/ellipsoid.ts';
import {reduceAntenna} from '../../../src/occupation/antenna.ts';
import {
  antennaFacts,
  nearbyMarks,
  offsetPointFacts,
  separationFacts,
} from '../../../src/occupation/diagnosis/facts.ts';

const bytes = (text: string) => new TextEncoder().encode(text);

function antennaOf(text: string) {
  const sheet = readSheet(bytes(text), 'day.yaml');
  const reduction = reduceAntenna({sheet, startGpsSeconds: 0, endGpsSeconds: 3600});
  return antennaFacts(sheet, reduction);
}

const ANTENNA = `antenna:
  measured: slant
  measured to: slant mark
  plate radius: 0.1905 m
  slant mark above reference point: 0.0350 m
  before: {readings: [1.8527 m, 1.8527 m]}
  after: {readings: [1.8497 m]}
`;

describe('antenna facts', () => {
  test('reading, reduced heights and who took the height off', () => {
    const facts = antennaOf(`${ANTENNA}log point: antenna reference point\n`);
    expect(facts?.reading).toEqual({lengthM: 1.8527, stepM: 0.0001, unitM: 1});
    expect(facts?.openingM).toBeCloseTo(1.80788, 5);
    expect((facts?.closingM ?? 0) - (facts?.openingM ?? 0)).toBeCloseTo(-0.003, 4);
    expect(facts?.takenOffBy).toBe('stillmark');
    expect(facts?.heightUsed).toBe('mean');
  });

  test.each([
    ['log point: mark\n', 'receiver'],
    ['receiver: {reduced to mark: yes, height entered: 1.8 m}\n', 'receiver'],
    ['', 'not stated'],
    ['log point: phase centre\n', 'nobody'],
  ])('%j: taken off by the %s', (line, by) => {
    expect(antennaOf(ANTENNA + line)?.takenOffBy).toBe(by);
  });

  test('a receiver height alone is a fact, nothing at all is none', () => {
    const alone = antennaOf('receiver: {height entered: 1.8 m}\n');
    expect(alone).toMatchObject({receiverHeightM: 1.8, arpAboveMarkM: null, openingM: null});
    expect(antennaOf('mark: A\n')).toBeNull();
  });
});

test('a set-up over its mark has no offset point', () => {
  expect(offsetPointFacts({eastM: 0, northM: 0, upM: 0.5})).toBeNull();
  expect(offsetPointFacts({eastM: 1, northM: 2, upM: 0})).toEqual({eastM: 1, northM: 2});
});

const MARKS = readMarks(
  bytes(`marks:
  - name: A
    latitude: 50.0
    longitude: 10.0
    ellipsoidal height: 300 m
    orthometric height: 252 m
    witness marks:
      - {name: RM 1, distance: 5 m, bearing: 90, bearing from: true north, up: -0.2 m}
      - {name: RM 2, distance: 7 m, bearing: 0, bearing from: grid north}
      - {name: RM 3, east: 1 m, north: 2 m}
      - {name: RM 4, distance: 3 m}
  - name: B
    latitude: 50.0001
    longitude: 10.0
    ellipsoidal height: 301 m
  - name: C
    latitude: 55.0
    longitude: 10.0
  - name: H
    orthometric height: 250 m
`),
  'marks.yaml',
);
const [mark] = MARKS;

describe('separations', () => {
  const sheet = readSheet(bytes('separation: 47.9 m\n'), 'day.yaml');

  test('of log, mark, sheet and grid, those that are known', () => {
    const facts = separationFacts({
      mark: mark ?? null,
      sheet,
      logSeparationM: null,
      gridUndulationM: 48.1,
      logHasAltitudes: true,
    });
    expect(facts.known).toEqual([
      {source: 'mark', separationM: 48},
      {source: 'sheet', separationM: 47.9},
      {source: 'geoid grid', separationM: 48.1},
    ]);
    expect(facts.missingInLog).toBe(true);
  });

  test('a table of geocentric positions misses no separation', () => {
    const {missingInLog} = separationFacts({
      mark: null,
      sheet,
      logSeparationM: null,
      gridUndulationM: null,
      logHasAltitudes: false,
    });
    expect(missingInLog).toBe(false);
  });
});

describe('nearby marks', () => {
  const found = nearbyMarks(mark!, MARKS, {
    ellipsoid: WGS84,
    convergenceDeg: 0.766,
    declinationDeg: null,
  });
  const named = (name: string) => found.find((one) => one.name === name);

  test('witness marks by bearing, offset or distance', () => {
    expect(named('RM 1')?.upM).toBe(-0.2);
    expect(named('RM 1')?.position).toMatchObject({kind: 'offset', eastM: 5});
    expect(named('RM 2')?.position).toMatchObject({kind: 'offset'});
    expect(named('RM 3')?.position).toEqual({kind: 'offset', eastM: 1, northM: 2});
    expect(named('RM 4')?.position).toEqual({kind: 'distance', distanceM: 3});
  });

  test('other marks within 100 km, with the difference of heights where both have one', () => {
    const position = named('B')?.position;
    // One ten-thousandth of a degree of latitude at 50 N: 11.12 m (30.897 m a second of arc).
    expect(position?.kind === 'offset' ? position.northM : 0).toBeCloseTo(0.36 * 30.897, 2);
    expect(named('B')?.upM).toBeCloseTo(1, 9);
    expect(named('C')).toBeUndefined();
    expect(named('H')).toBeUndefined();
    expect(named('A')).toBeUndefined();
  });

  test('a grid bearing without a convergence is a distance only', () => {
    const [, second] = nearbyMarks(mark!, [], {
      ellipsoid: WGS84,
      convergenceDeg: null,
      declinationDeg: null,
    });
    expect(second?.position).toEqual({kind: 'distance', distanceM: 7});
  });
});
