import {describe, expect, test} from 'vitest';
import {readMarks} from '../../../src/fieldbook/marks.ts';
import {readSheet} from '../../../src/fieldbook/sheet.ts';
import {WGS84} from '../../../src/geodesy/ellipsoid.ts';
import {createLogReader} from '../../../src/log/reader.ts';
import {reduceAntenna} from '../../../src/occupation/antenna.ts';
import {diagnose} from '../../../src/occupation/diagnosis/diagnose.ts';
import {
  antennaFacts,
  nearbyMarks,
  separationFacts,
} from '../../../src/occupation/diagnosis/facts.ts';
import {reduceOccupation} from '../../../src/occupation/reduce.ts';
import {simulate} from '../../simulate/simulate.ts';
import {ecefTable} from '../../simulate/table-writer.ts';
import {bareInput, offsetOf, SITES, signature} from './check-input.ts';

/** From the bytes of a log to the causes, at every kind of place. */
const SCENARIO = {
  name: 'diagnosis',
  about: '5, 5 and 10 mm of noise, correlated over half a minute',
  durationS: 2400,
  intervalS: 1,
  noise: {
    east: [{kind: 'gauss-markov', sdM: 0.005, tauS: 30}],
    north: [{kind: 'gauss-markov', sdM: 0.005, tauS: 30}],
    up: [{kind: 'gauss-markov', sdM: 0.01, tauS: 30}],
  },
} as const;

const SHEET = `mark: A
log point: mark
receiver: {reduced to mark: yes, height entered: 2.000 m}
antenna:
  measured: vertical
  measured to: antenna reference point
  before: {readings: [2.000 m, 2.000 m]}
`;

interface Planted {
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
}

function causesOf(
  site: {latitudeDeg: number; longitudeDeg: number},
  planted: Planted,
  seed: number,
) {
  const bytes = (text: string) => new TextEncoder().encode(text);
  const place = {...site, ellipsoidalHeightM: 300};
  const displaced = simulate(SCENARIO, seed, (clean) => ({
    ...clean,
    eastM: clean.eastM.map((value) => value + planted.eastM),
    northM: clean.northM.map((value) => value + planted.northM),
    upM: clean.upM.map((value) => value + planted.upM),
  }));
  const lines = ecefTable(displaced, {
    place,
    date: {year: 2025, month: 6, day: 1},
    startS: 36_000,
    decimals: 4,
    claimedSigmaM: {x: 0.01, y: 0.01, z: 0.01},
    satellites: 20,
  });
  const reader = createLogReader({
    name: 'day.csv',
    date: null,
    trustAbsentChecksum: false,
    table: {
      columns: null,
      timeScale: null,
      startGpsSeconds: null,
      semiMajorAxisM: WGS84.semiMajorAxisM,
      inverseFlattening: WGS84.inverseFlattening,
    },
  });
  reader.add(bytes(`${lines.join('\n')}\n`));
  const log = reader.finish();
  const marks = readMarks(
    bytes(`marks:
  - name: A
    latitude: ${site.latitudeDeg}
    longitude: ${site.longitudeDeg}
    ellipsoidal height: 300 m
    separation: 48 m
    standard uncertainty: {east: 2 mm, north: 2 mm, up: 4 mm}
    witness marks:
      - {name: RM 1, east: 3.21 m, north: -1.47 m, up: -0.12 m}
`),
    'marks.yaml',
  );
  const mark = marks[0]!;
  const sheet = readSheet(bytes(SHEET), 'day.yaml');
  const {result} = reduceOccupation({
    command: 'check',
    program: {name: 'stillmark', version: '0.0.0'},
    inputs: [],
    log,
    ellipsoid: WGS84,
    rules: {
      fix: 'best',
      minSatellites: null,
      maxHdop: null,
      maxPdop: null,
      maxAgeS: null,
      maxSigmaM: null,
      fromGpsSeconds: null,
      toGpsSeconds: null,
      settleS: 0,
    },
    at: null,
    mark,
    markName: 'A',
    sheet,
    asked: [{of: 'horizontal', toleranceM: 0.02, reason: null}],
    frame: null,
    motion: null,
    geoid: {grid: null, stated: null},
    earlier: [],
    grid: null,
    coordinateEpoch: null,
    movementLimitM: null,
    wantM: null,
    settings: {},
    say: (code) => code,
    marks: [],
    sayCause: {title: (code) => code, advice: (code) => code, pair: () => 'two at once'},
  });
  const {comparison, position} = result;
  if (comparison === null || position?.covarianceEnuM2 == null) throw new Error('no comparison');
  const markVariances = [0.002, 0.002, 0.004].map((sigmaM) => sigmaM ** 2);
  return diagnose(
    bareInput({
      offsetM: comparison.offsetM,
      covarianceM2: position.covarianceEnuM2.map((row, i) =>
        row.map((value, j) => (value ?? Number.NaN) + (i === j ? markVariances[i]! : 0)),
      ),
      markPlan: site,
      antenna: antennaFacts(
        sheet,
        reduceAntenna({sheet, startGpsSeconds: 0, endGpsSeconds: SCENARIO.durationS}),
      ),
      separation: separationFacts({
        mark,
        sheet,
        logSeparationM: null,
        gridUndulationM: null,
        logHasAltitudes: false,
      }),
      nearbyMarks: nearbyMarks(mark, marks, {
        ellipsoid: WGS84,
        convergenceDeg: null,
        declinationDeg: null,
      }),
    }),
  );
}

describe.each(Object.entries(SITES))('a whole log at %s', (_, site) => {
  test.each([
    {code: 'V03', offset: offsetOf(signature('V03'))},
    {code: 'V08', offset: offsetOf(signature('V08'))},
    {code: 'V10', offset: offsetOf(signature('V10'))},
    {code: 'B02', offset: {eastM: 3.21, northM: -1.47, upM: -0.12}},
  ])('$code comes in the first group', ({code, offset}) => {
    const {candidates} = causesOf(site, offset, 5);
    const first = candidates.filter(({group}) => group === 1).map((one) => one.code);
    expect(first).toContain(code);
  });

  test('an honest mark lists nothing', () => {
    expect(causesOf(site, {eastM: 0, northM: 0, upM: 0}, 9).candidates).toEqual([]);
  });
});
