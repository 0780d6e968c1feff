import {describe, expect, test} from 'vitest';
import {readSheet} from '../../src/fieldbook/sheet.ts';
import {
  type AntennaReduction,
  arpAboveMarkM,
  eccentricityEnu,
  heightAboveMarkM,
  reduceAntenna,
  verticalFromSlantM,
} from '../../src/occupation/antenna.ts';
import {readReference} from '../reference/read.ts';

interface SlantReference {
  readonly example: {
    readonly circleDiameterM: number;
    readonly slantM: number;
    readonly slantMarkAboveArpM: number;
    readonly slantMarkAboveMarkM: number;
    readonly arpAboveMarkM: number;
  };
  readonly slantTakenForVertical: {readonly slantM: number; readonly errorUpM: number};
  readonly verticalTakenForSlant: {readonly verticalM: number; readonly errorUpM: number};
}

const reference = readReference<SlantReference>('slant-height');
/** 0.01 mm, the bound that slant reduction must hold; the values are printed to that digit. */
const BOUND_M = 0.5e-5;

const START = 1_000_000;
const END = START + 3600;

function reduce(text: string): AntennaReduction {
  const sheet = readSheet(new TextEncoder().encode(text), 'day.yaml');
  return reduceAntenna({sheet, startGpsSeconds: START, endGpsSeconds: END});
}

const codes = ({findings}: AntennaReduction) => findings.map(({code}) => code);

const SLANT = `antenna:
  measured: slant
  measured to: slant mark
  plate radius: 0.1905 m
  slant mark above reference point: 0.0350 m
  phase centre above reference point: 0.0712 m
`;
const VERTICAL = `antenna:
  measured: vertical
  measured to: antenna reference point
  phase centre above reference point: 0.0712 m
`;
const ARP = 'log point: antenna reference point\n';

describe('slant reduction', () => {
  const {example, slantTakenForVertical, verticalTakenForSlant} = reference;
  const slant = `${SLANT}  before: {readings: [1.8527 m]}\n${ARP}`;

  test('reference: example on slant heights (2019), slant mark and reference point', () => {
    const vertical = verticalFromSlantM(example.slantM, example.circleDiameterM / 2);
    expect(Math.abs(vertical - example.slantMarkAboveMarkM)).toBeLessThan(BOUND_M);
    const {antennaHeightM, opening} = reduce(slant);
    expect(Math.abs((antennaHeightM ?? 0) - example.arpAboveMarkM)).toBeLessThan(BOUND_M);
    expect(opening.verticalM).toBe(antennaHeightM);
  });

  test('reference: V01, a slant height taken for a vertical one', () => {
    const right = reduce(slant).opening.verticalM;
    const wrong = reduce(`${VERTICAL}  before: {readings: [1.8527 m]}\n${ARP}`).opening.verticalM;
    expect(Math.abs(right - wrong - slantTakenForVertical.errorUpM)).toBeLessThan(BOUND_M);
  });

  test('reference: V02, a vertical height taken for a slant one', () => {
    const right = reduce(`${VERTICAL}  before: {readings: [2.000 m]}\n${ARP}`).opening.verticalM;
    const wrong = reduce(`${SLANT}  before: {readings: [2.000 m]}\n${ARP}`).opening.verticalM;
    expect(Math.abs(right - wrong - verticalTakenForSlant.errorUpM)).toBeLessThan(BOUND_M);
  });

  test('property: the slope over a vertical height gives the height back', () => {
    for (let k = 1; k <= 200; k++) {
      const heightM = 0.05 * k;
      const radiusM = 0.002 * k;
      expect(verticalFromSlantM(Math.hypot(heightM, radiusM), radiusM)).toBeCloseTo(heightM, 12);
    }
  });

  test('a slant that cannot be is refused', () => {
    expect(() => verticalFromSlantM(0.1, 0.2)).toThrow(RangeError);
    expect(() => verticalFromSlantM(Number.NaN, 0.2)).toThrow(RangeError);
    expect(() => verticalFromSlantM(1, -0.1)).toThrow(RangeError);
  });
});

describe('the point that is reached', () => {
  const before = '  before: {readings: [1.800 m, 1.800 m]}\n';

  test.each([
    ['antenna reference point', 'mark', 1.8, []],
    ['phase centre', 'mark', 1.8712, []],
    ['mark', 'mark', 0, []],
    ['not stated', 'antenna, point not stated', 0, ['antenna-height-not-applied']],
  ])('with a height, from the %s: %s', (logPoint, point, verticalM, expected) => {
    const reduction = reduce(`${VERTICAL}${before}log point: ${logPoint}\n`);
    expect(reduction.pointReached).toBe(point);
    expect(reduction.opening.verticalM).toBeCloseTo(verticalM, 12);
    expect(reduction.antennaHeightM).toBeCloseTo(1.8, 12);
    expect(codes(reduction)).toEqual(expected);
  });

  test.each([
    ['antenna reference point', 'antenna reference point', 0, ['antenna-height-not-given']],
    ['phase centre', 'antenna reference point', 0.0712, ['antenna-height-not-given']],
    ['mark', 'mark', 0, []],
    ['not stated', 'antenna, point not stated', 0, ['antenna-log-point-not-stated']],
  ])('without a height, from the %s: %s', (logPoint, point, verticalM, expected) => {
    const reduction = reduce(
      `antenna: {phase centre above reference point: 0.0712 m}\nlog point: ${logPoint}\n`,
    );
    expect(reduction.pointReached).toBe(point);
    expect(reduction.opening.verticalM).toBe(verticalM);
    expect(reduction.antennaHeightM).toBeNull();
    expect(reduction.heightUsed).toBeNull();
    expect(codes(reduction)).toEqual(expected);
  });

  test('a phase centre of unknown height cannot be left', () => {
    const reduction = reduce(
      `antenna:\n  measured: vertical\n  measured to: antenna reference point\n${before}log point: phase centre\n`,
    );
    expect(reduction.pointReached).toBe('phase centre');
    expect(heightAboveMarkM(reduction, START)).toBe(0);
    expect(codes(reduction)).toEqual(['antenna-phase-centre-not-given']);
  });

  test('a receiver that reduced to the mark leaves nothing to take off', () => {
    const reduction = reduce(`${VERTICAL}${before}receiver: {reduced to mark: yes}\n`);
    expect(reduction.pointReached).toBe('mark');
    expect(heightAboveMarkM(reduction, START)).toBe(0);
    expect(codes(reduction)).toEqual([]);
  });

  test('a height typed into the receiver that was not measured is a concern', () => {
    const entered = (height: string) =>
      reduce(`${VERTICAL}${before}receiver: {reduced to mark: yes, height entered: ${height}}\n`);
    expect(codes(entered('1.803 m'))).toEqual([]);
    expect(entered('5.9055 m').findings[0]).toMatchObject({
      code: 'antenna-receiver-height-differs',
      severity: 'concern',
      values: {enteredM: 5.9055, limitM: 0.003},
    });
  });

  test('measured up to the phase centre, and of the phase centre: its offset cancels', () => {
    const reduction = reduce(
      'antenna:\n  measured: vertical\n  measured to: phase centre\n  phase centre above reference point: 0.0712 m\n  before: {readings: [1.8712 m]}\nlog point: phase centre\n',
    );
    expect(reduction.opening.verticalM).toBeCloseTo(1.8712, 12);
    expect(reduction.antennaHeightM).toBeCloseTo(1.8, 12);
  });

  test('measured plumb to the slant mark', () => {
    expect(
      reduce(
        `${SLANT.replace('slant\n  measured to', 'vertical\n  measured to')}  before: {readings: [1.835 m]}\n${ARP}`,
      ).antennaHeightM,
    ).toBeCloseTo(1.8, 12);
  });
});

describe('several readings', () => {
  const sheet = (readings: string, check = '') =>
    reduce(`${VERTICAL}  before:\n    readings: ${readings}\n    check readings: ${check}\n${ARP}`);

  test('are averaged', () => {
    expect(sheet('[1.800 m, 1.801 m, 1.803 m]').opening.verticalM).toBeCloseTo(5.404 / 3, 12);
  });

  test('may differ by 3 mm and no more', () => {
    expect(codes(sheet('[1.800 m, 1.803 m]'))).toEqual([]);
    expect(sheet('[1.800 m, 1.8031 m]').findings[0]).toMatchObject({
      code: 'antenna-readings-disagree',
      severity: 'concern',
      values: {when: 'opening', limitM: 0.003},
    });
    expect(codes(sheet('[1.800 m, 1.800 m]', '[5.90 ft, 5.92 ft]'))).toContain(
      'antenna-readings-disagree',
    );
  });

  test('in a second unit must agree within 3 mm', () => {
    // 1.800 m is 5.9055 ft.
    expect(codes(sheet('[1.800 m]', '[5.91 ft]'))).toEqual([]);
    expect(sheet('[1.800 m]', '[5.80 ft]').findings[0]).toMatchObject({
      code: 'antenna-units-disagree',
      severity: 'concern',
      values: {when: 'opening', limitM: 0.003},
    });
  });

  test('in a second unit too coarse to tell are said to be so', () => {
    expect(codes(sheet('[1.800 m]', '[5.9 ft]'))).toEqual(['antenna-check-too-coarse']);
    expect(codes(sheet('[1.800 m]', '[6.1 ft]'))).toEqual(['antenna-units-disagree']);
  });

  test('in the same unit are no second scale', () => {
    expect(codes(sheet('[1.800 m]', '[1800 mm]'))).toEqual(['antenna-check-same-unit']);
  });

  test('one alone is said to be alone', () => {
    expect(codes(sheet('[1.800 m]'))).toEqual(['antenna-read-once']);
  });
});

describe('heights before and after', () => {
  const sunk = (used: string, at = '') =>
    reduce(
      `${VERTICAL}  before: {readings: [1.800 m, 1.800 m]}\n  after: {readings: [1.790 m, 1.790 m]${at}}\n  height used: ${used}\n${ARP}`,
    );

  test.each([
    ['opening', [1.8, 1.8, 1.8], 1.8],
    ['mean', [1.795, 1.795, 1.795], 1.795],
    ['interpolated', [1.8, 1.795, 1.79], 1.795],
    ['', [1.795, 1.795, 1.795], 1.795],
  ])('%s', (used, expected, antennaHeightM) => {
    const reduction = sunk(used);
    const heights = [START, START + 1800, END].map((at) => heightAboveMarkM(reduction, at));
    heights.forEach((height, i) => {
      expect(height).toBeCloseTo(expected[i] ?? Number.NaN, 12);
    });
    expect(reduction.heightUsed).toBe(used === '' ? 'mean' : used);
    expect(reduction.antennaHeightM).toBeCloseTo(antennaHeightM, 12);
    expect(reduction.findings).toMatchObject([
      {code: 'antenna-height-changed', severity: 'caution', values: {limitM: 0.003}},
    ]);
    expect(reduction.findings[0]?.values.changeM).toBeCloseTo(-0.01, 12);
  });

  test('interpolated heights stay as measured outside the two moments', () => {
    const reduction = sunk('interpolated');
    expect(heightAboveMarkM(reduction, START - 1e4)).toBe(reduction.opening.verticalM);
    expect(heightAboveMarkM(reduction, END + 1e4)).toBeCloseTo(1.79, 12);
  });

  test('two measurements at one moment are averaged', () => {
    const reduction = {...sunk('interpolated')};
    const closing = {...reduction.closing, gpsSeconds: reduction.opening.gpsSeconds};
    expect(heightAboveMarkM({...reduction, closing}, START)).toBeCloseTo(1.795, 12);
  });

  test('the moments of the sheet come first', () => {
    const reduction = sunk('interpolated', ', at: 2026-05-04T09:35:00Z');
    expect(reduction.opening.gpsSeconds).toBe(START);
    // 2026-05-04 is 16920 days after 1980-01-06, and 18 leap seconds came since.
    expect(reduction.closing.gpsSeconds).toBe(16_920 * 86_400 + 9 * 3600 + 35 * 60 + 18);
  });

  test('only the change of the height is taken off when the log is of the phase centre', () => {
    const reduction = reduce(
      `${VERTICAL}  before: {readings: [1.800 m]}\n  after: {readings: [1.790 m]}\nlog point: phase centre\n`,
    );
    expect(reduction.opening.verticalM).toBeCloseTo(1.8712, 12);
    expect(reduction.closing.verticalM).toBeCloseTo(1.8612, 12);
  });
});

describe('standard uncertainty of the height', () => {
  test('stated by the user', () => {
    const {uncertainty} = reduce(
      `${VERTICAL}  before: {readings: [1.800 m]}\n${ARP}standard uncertainties:\n  - {of: antenna height, up: 2 mm, id: tape 3, from: calibration}\n`,
    );
    expect(uncertainty).toEqual({
      standardUncertaintyM: 0.002,
      from: 'stated',
      id: 'tape 3',
      source: 'calibration',
    });
  });

  test('of one reading is not known', () => {
    expect(reduce(`${VERTICAL}  before: {readings: [1.800 m]}\n${ARP}`).uncertainty).toBeNull();
  });

  test('of two readings rests on the 3 mm within which they pass (JCGM 100:2008, 4.3.7)', () => {
    const {uncertainty} = reduce(`${VERTICAL}  before: {readings: [1.800 m, 1.801 m]}\n${ARP}`);
    expect(uncertainty?.from).toBe('readings within their limit');
    expect(uncertainty?.standardUncertaintyM).toBeCloseTo(Math.sqrt(3 + 1 / 12) / 1000, 12);
  });

  test('of many readings is their scatter, widened for few (JCGM 101:2008, 6.4.9.4)', () => {
    // Deviations from 1.802: −2, −1, 0, 1, 2 mm, so s² = 2.5 mm² with 4 degrees of freedom.
    const {uncertainty} = reduce(
      `${VERTICAL}  before: {readings: [1.800 m, 1.801 m, 1.802 m, 1.803 m, 1.804 m]}\n${ARP}`,
    );
    expect(uncertainty?.from).toBe('scatter of the readings');
    expect(uncertainty?.standardUncertaintyM).toBeCloseTo(
      Math.sqrt((2.5 / 5) * (4 / 2) + 1 / 12) / 1000,
      12,
    );
  });

  test.each([
    ['opening', 100 / 3],
    ['mean', 100 / 12],
    ['interpolated', 0],
  ])('holds the unknown course of a change of 10 mm: %s', (used, addedMm2) => {
    const {uncertainty} = reduce(
      `${VERTICAL}  before: {readings: [1.800 m]}\n  after: {readings: [1.790 m]}\n  height used: ${used}\n${ARP}`,
    );
    expect(uncertainty?.standardUncertaintyM).toBeCloseTo(
      Math.sqrt(3 + 1 / 12 + addedMm2) / 1000,
      12,
    );
  });

  test('property: of before and after with several readings each, both count', () => {
    const four = '[1.800 m, 1.801 m, 1.802 m, 1.803 m]';
    const one = reduce(`${VERTICAL}  before: {readings: ${four}}\n${ARP}`).uncertainty;
    const two = reduce(
      `${VERTICAL}  before: {readings: ${four}}\n  after: {readings: ${four}}\n${ARP}`,
    );
    expect(two.uncertainty?.standardUncertaintyM).toBeLessThan(one?.standardUncertaintyM ?? 0);
  });
});

describe('arpAboveMarkM', () => {
  test('a reading to the reference point is the height', () => {
    const sheet = readSheet(
      new TextEncoder().encode(`${VERTICAL}  before: {readings: [1.8 m]}\n`),
      'x',
    );
    if (sheet.antenna === undefined) throw new Error('no antenna');
    expect(arpAboveMarkM(1.8, sheet.antenna)).toBe(1.8);
  });
});

describe('eccentricityEnu', () => {
  const entry = (text: string) => {
    const {eccentricity} = readSheet(
      new TextEncoder().encode(`eccentricity: {${text}}\n`),
      'day.yaml',
    );
    if (eccentricity === undefined) throw new Error('no eccentricity');
    return eccentricity;
  };

  test('east, north and up as given', () => {
    expect(eccentricityEnu(entry('east: 0.012 m, north: -0.034 m, up: 0.5 m'), undefined)).toEqual({
      kind: 'known',
      enu: {eastM: 0.012, northM: -0.034, upM: 0.5},
    });
    expect(eccentricityEnu(entry('up: 0.5 m'), undefined)).toEqual({
      kind: 'known',
      enu: {eastM: 0, northM: 0, upM: 0.5},
    });
  });

  test.each([
    ['true north', 90, undefined],
    ['grid north', 88.5, 1.5],
    ['magnetic north', 86.5, undefined],
  ])('due east by a bearing from %s', (north, bearing, convergenceDeg) => {
    const declination = north === 'magnetic north' ? ', declination: 3.5' : '';
    const read = eccentricityEnu(
      entry(`distance: 2 m, bearing: ${bearing}, bearing from: ${north}${declination}`),
      convergenceDeg,
    );
    if (read.kind !== 'known') throw new Error('not known');
    expect(read.enu.eastM).toBeCloseTo(2, 12);
    expect(read.enu.northM).toBeCloseTo(0, 12);
  });

  test('a grid bearing needs the convergence', () => {
    const read = eccentricityEnu(
      entry('distance: 2 m, bearing: 90, bearing from: grid north'),
      undefined,
    );
    expect(read).toEqual({kind: 'convergence needed'});
  });
});
