import {describe, expect, test} from 'vitest';
import {UsageError} from '../../src/errors.ts';
import {COMBINATION_SCHEMA} from '../../src/exports/combination-schema.ts';
import {departureFrom} from '../../src/exports/conform.ts';
import {combinationJson} from '../../src/exports/json.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {geodeticFromEcef} from '../../src/geodesy/geocentric.ts';
import {ecefFromEnu, localFrame} from '../../src/geodesy/local.ts';
import {combineResults} from '../../src/occupation/combine.ts';
import type {NamedResult} from '../../src/occupation/combining/occupations.ts';
import {noticeList} from '../../src/occupation/notices.ts';
import type {BudgetRow, Result} from '../../src/occupation/result.ts';
import {noticeText} from '../../src/wording/notices.ts';
import {reducedSample} from '../exports/samples.ts';
import {randomFrom} from '../simulate/random.ts';

const TEMPLATE = reducedSample({name: 'mole-still.nmea', mark: 'MOLE', maxLines: 9000}).reduced
  .result;
const ORIGIN = localFrame({latitudeDeg: 41.7, longitudeDeg: -152.3, ellipsoidalHeightM: 10}, WGS84);
const PROGRAM = {name: 'stillmark', version: '0'} as const;

interface Planted {
  readonly name: string;
  readonly mark?: string;
  readonly enuM: readonly [number, number, number];
  /** Session repeatability, every axis. */
  readonly ownM?: number;
  /** Standard uncertainty of the base by its id. */
  readonly base?: readonly [id: string, sigmaM: number];
  /** Covariance of east and north by the session alone. */
  readonly eastNorthM2?: number;
  readonly day?: number;
  readonly change?: (result: Result) => Result;
}

function row(source: string, sigmaM: number, more: Partial<BudgetRow> = {}): BudgetRow {
  const standardUncertaintyM = {east: sigmaM, north: sigmaM, up: sigmaM};
  return {source, standardUncertaintyM, sharedBy: null, id: null, from: 'planted', ...more};
}

function planted({
  name,
  mark = 'P',
  enuM,
  ownM = 0.003,
  base,
  eastNorthM2 = 0,
  day = 1,
  change,
}: Planted): NamedResult {
  const [eastM, northM, upM] = enuM;
  const ecef = ecefFromEnu({eastM, northM, upM}, ORIGIN);
  const date = `2026-05-${String(day).padStart(2, '0')}`;
  const result: Result = {
    ...TEMPLATE,
    inputs: [{...TEMPLATE.inputs[0]!, sha256: `hash of ${name}`}],
    occupation: {
      ...TEMPLATE.occupation,
      mark,
      startUtc: `${date}T08:00:00Z`,
      endUtc: `${date}T09:00:00Z`,
    },
    position: {
      ...TEMPLATE.position!,
      of: 'mark',
      frame: 'ITRF2020',
      coordinateEpoch: 2025,
      ecefM: {x: ecef.xM, y: ecef.yM, z: ecef.zM},
      geodetic: geodeticFromEcef(ecef, WGS84),
      covarianceEnuM2: [
        [ownM ** 2, eastNorthM2, 0],
        [eastNorthM2, ownM ** 2, 0],
        [0, 0, ownM ** 2],
      ],
    },
    budget: [
      row('session repeatability', ownM),
      row('the mark', 5, {sharedBy: 'mark', id: mark}),
      ...(base === undefined
        ? []
        : [row('base or network', base[1], {sharedBy: 'base', id: base[0]})]),
    ],
  };
  return {name, result: change?.(result) ?? result};
}

function combined(results: readonly NamedResult[]) {
  return combineResults(results, PROGRAM, noticeList(noticeText));
}

describe('several occupations of one mark', () => {
  test('equal ones: the mean, and their own part smaller by the root of their number', () => {
    const {marks} = combined([
      planted({name: 'a', enuM: [0.001, 0, 0], day: 1}),
      planted({name: 'b', enuM: [-0.001, 0, 0.002], day: 2}),
      planted({name: 'c', enuM: [0, 0.003, -0.002], day: 3}),
    ]);
    const [mark] = marks;
    expect(mark?.standardUncertaintyM.east).toBeCloseTo(0.003 / Math.sqrt(3), 8);
    expect(mark?.occupations.map(({weight}) => weight.up)).toEqual(
      [1, 1, 1].map((w) => expect.closeTo(w / 3, 6)),
    );
    expect(mark?.occupations[2]?.differenceM.north).toBeCloseTo(0.002, 6);
    expect(mark?.agreement).toBe('agrees');
  });

  test('weights follow the inverse variance of what is not shared', () => {
    const [mark] = combined([
      planted({name: 'a', enuM: [0, 0, 0], ownM: 0.001, base: ['B', 0.01]}),
      planted({name: 'b', enuM: [0, 0, 0], ownM: 0.003, base: ['B', 0.01], day: 2}),
    ]).marks;
    expect(mark?.occupations[0]?.weight.east).toBeCloseTo(0.9, 5);
    // The base is one error, undivided.
    const own = 1 / (1 / 0.001 ** 2 + 1 / 0.003 ** 2);
    expect(mark?.standardUncertaintyM.east).toBeCloseTo(Math.sqrt(own + 0.01 ** 2), 7);
    expect(mark?.shared).toEqual(['base or network']);
  });

  test('bases of their own are averaged, and what belongs to the comparison takes no part', () => {
    const [mark] = combined([
      planted({name: 'a', enuM: [0, 0, 0], base: ['B1', 0.004]}),
      planted({name: 'b', enuM: [0, 0, 0], base: ['B2', 0.004], day: 2}),
    ]).marks;
    expect(mark?.standardUncertaintyM.up).toBeCloseTo(0.005 / Math.SQRT2, 7);
    expect(mark?.shared).toEqual([]);
  });

  test('disagreement is said, enlarges the uncertainty and names the odd one', () => {
    const result = combined([
      planted({name: 'a', enuM: [0, 0, 0]}),
      planted({name: 'b', enuM: [0.001, 0.001, 0], day: 2}),
      planted({name: 'odd', enuM: [0.03, 0, 0.001], day: 3}),
    ]);
    const [mark] = result.marks;
    expect(mark?.agreement).toBe('disagrees');
    expect(mark?.accident.plan).toBeLessThan(0.001);
    expect(mark?.accident.up).toBeGreaterThan(0.5);
    expect(mark?.enlargedBy.plan).toBeGreaterThan(3);
    expect(mark?.enlargedBy.up).toBe(1);
    expect(mark?.standardUncertaintyM.east).toBeCloseTo(
      (0.003 / Math.sqrt(3)) * mark!.enlargedBy.plan,
      7,
    );
    const notice = result.notices.find(({code}) => code === 'occupations-disagree');
    expect(notice?.text).toContain('odd the most');
    expect(mark?.occupations[2]?.normalisedError.east).toBeGreaterThan(1);
  });

  test('simulation: the 95 % intervals hold 95 %, and 5 % disagree by accident', () => {
    const random = randomFrom(31, 'combine');
    const trials = 600;
    const held = {east: 0, up: 0};
    let disagree = 0;
    for (let trial = 0; trial < trials; trial++) {
      const baseError = [0, 0, 0].map(() => 0.004 * random.normal());
      const results = [0.002, 0.003, 0.006].map((ownM, k) =>
        planted({
          name: `r${k}`,
          enuM: baseError.map((error) => error + ownM * random.normal()) as [
            number,
            number,
            number,
          ],
          ownM,
          base: ['B', 0.004],
          day: k + 1,
        }),
      );
      const [mark] = combined(results).marks;
      const {east, up} = localOf(mark!.ecefM);
      if (Math.abs(east) <= mark!.uncertainty95M.east) held.east++;
      if (Math.abs(up) <= mark!.uncertainty95M.up) held.up++;
      if (mark!.agreement === 'disagrees') disagree++;
    }
    // Three standard errors of a share of 95 %; agreement is two tests of 5 %.
    expect(held.east / trials).toBeGreaterThan(0.923);
    expect(held.up / trials).toBeGreaterThan(0.923);
    expect(disagree / trials).toBeGreaterThan(0.06);
    expect(disagree / trials).toBeLessThan(0.136);
  });

  function localOf({x, y, z}: {x: number; y: number; z: number}) {
    const {originEcef: o, sinLat, cosLat, sinLon, cosLon} = ORIGIN;
    const [dx, dy, dz] = [x - o.xM, y - o.yM, z - o.zM];
    const outward = cosLon * dx + sinLon * dy;
    return {east: cosLon * dy - sinLon * dx, up: cosLat * outward + sinLat * dz};
  }
});

describe('several marks', () => {
  const a = planted({name: 'a', mark: 'A', enuM: [0, 0, 0], ownM: 0.003, base: ['B', 0.02]});
  const b = planted({
    name: 'b',
    mark: 'B',
    enuM: [300, 400, 0],
    ownM: 0.004,
    base: ['B', 0.02],
    day: 2,
  });

  test('what both share cancels in the distance', () => {
    const [line] = combined([a, b]).distances;
    expect(line?.spatialM).toBeCloseTo(500, 6);
    expect(line?.azimuthDeg).toBeCloseTo((Math.atan2(300, 400) * 180) / Math.PI, 3);
    expect(line?.uncertainty95M.spatial).toBeCloseTo(1.959964 * 0.005, 7);
    expect(line?.cancels).toEqual(['base or network']);
    // Over 500 m the Earth falls away by 500² / 2R, about 2 cm: heights are not "up".
    expect(line?.upM).toBeCloseTo(0, 6);
    expect(line!.heightDifferenceM).toBeGreaterThan(0.0195);
    expect(line!.heightDifferenceM).toBeLessThan(0.0197);
  });

  test('what a service leaves uncertain is another error at another mark', () => {
    const withService = (result: Result): Result => ({
      ...result,
      budget: [
        ...result.budget,
        row('positioning service', 3, {sharedBy: 'service', id: 'open service'}),
      ],
    });
    const far = [
      planted({name: 'a', mark: 'A', enuM: [0, 0, 0], change: withService}),
      planted({name: 'b', mark: 'B', enuM: [300, 400, 0], day: 2, change: withService}),
    ];
    const [line] = combined(far).distances;
    expect(line?.cancels).toEqual([]);
    expect(line?.uncertainty95M.spatial).toBeCloseTo(1.959964 * 3 * Math.SQRT2, 3);
    // At one mark it is one error that repeating does not make smaller.
    const [mark] = combined([
      planted({name: 'a', enuM: [0, 0, 0], change: withService}),
      planted({name: 'b', enuM: [0, 0, 0], day: 2, change: withService}),
    ]).marks;
    expect(mark?.standardUncertaintyM.east).toBeCloseTo(3, 3);
  });

  test('a base without a name cancels nothing', () => {
    const nameless = (name: string, mark: string, day: number) =>
      planted({name, mark, enuM: [100 * day, 0, 0], base: ['', 0.02], day});
    const [line] = combined([nameless('a', 'A', 1), nameless('b', 'B', 2)]).distances;
    expect(line?.cancels).toEqual([]);
    expect(line?.uncertainty95M.spatial).toBeGreaterThan(1.95 * 0.02 * Math.SQRT2);
  });

  test('the order of the results does not matter, byte for byte', () => {
    const c = planted({name: 'c', mark: 'A', enuM: [0.002, 0, 0], base: ['B', 0.02], day: 3});
    const texts = [
      [a, b, c],
      [c, b, a],
      [b, a, c],
    ].map((order) => combinationJson(combined(order)));
    expect(new Set(texts).size).toBe(1);
    expect(departureFrom(COMBINATION_SCHEMA, JSON.parse(texts[0]!))).toBeUndefined();
  });
});

describe('results that cannot be combined', () => {
  const good = planted({name: 'good', enuM: [0, 0, 0]});

  test.each<[string, Planted['change'], RegExp]>([
    [
      'another frame',
      (r) => ({...r, position: {...r.position!, frame: 'ETRF2000'}}),
      /frame ITRF2020 and ETRF2000/,
    ],
    [
      'another epoch',
      (r) => ({...r, position: {...r.position!, coordinateEpoch: 2010}}),
      /epoch 2025 and 2010/,
    ],
    [
      'another point',
      (r) => ({...r, position: {...r.position!, of: 'phase centre'}}),
      /point mark and phase centre/,
    ],
  ])('%s is refused with what to do', (_, change, message) => {
    const other = planted({name: 'other', enuM: [0, 0, 0], day: 2, change: change!});
    expect(() => combined([good, other])).toThrow(UsageError);
    expect(() => combined([good, other])).toThrow(message);
  });

  test('positions that were not brought down to the mark are called so', () => {
    const high = planted({
      name: 'high',
      enuM: [0, 0, 0],
      change: (r) => ({...r, position: {...r.position!, of: 'antenna reference point'}}),
    });
    const codes = combined([high]).notices.map(({code}) => code);
    expect(codes).toContain('combined-not-at-mark');
    expect(combined([good]).notices.map(({code}) => code)).not.toContain('combined-not-at-mark');
  });

  test('the same epochs twice are refused', () => {
    expect(() => combined([good, {...good, name: 'copy'}])).toThrow(/results of the same epochs/);
  });

  test('what has no position, height, uncertainty or name is left out and said', () => {
    const without = (name: string, change: (r: Result) => Result) =>
      planted({name, enuM: [0, 0, 0], day: name.charCodeAt(0) - 90, change});
    const {leftOut, notices, marks} = combined([
      good,
      without('moved', (r) => ({...r, position: null, segments: [...r.segments, ...r.segments]})),
      without('plan', (r) => ({...r, position: {...r.position!, ecefM: null}})),
      without('short', (r) => ({...r, position: {...r.position!, uncertainty95M: null}})),
      without('nameless', (r) => ({...r, occupation: {...r.occupation, mark: null}})),
    ]);
    expect(marks).toHaveLength(1);
    expect(Object.fromEntries(leftOut.map(({name, because}) => [name, because]))).toEqual({
      moved: 'it moved',
      plan: 'no ellipsoidal height',
      short: 'its uncertainty cannot be told',
      nameless: 'it names no mark',
    });
    expect(notices.find(({code}) => code === 'results-left-out')?.text).toContain(
      'moved (it moved)',
    );
  });
});

describe('east and north that err together', () => {
  const twice = (eastNorthM2: number) => [
    planted({name: 'a', enuM: [0, 0, 0], eastNorthM2}),
    planted({name: 'b', enuM: [0, 0, 0], eastNorthM2, day: 2}),
  ];

  test('their covariance is halved by a second occupation, as the variances are', () => {
    const [mark] = combined(twice(5e-6)).marks;
    expect(mark!.covarianceEnuM2[0]![0]).toBeCloseTo(4.5e-6, 10);
    expect(mark!.covarianceEnuM2[0]![1]).toBeCloseTo(2.5e-6, 10);
    expect(mark!.covarianceEnuM2[1]![0]).toBe(mark!.covarianceEnuM2[0]![1]);
    const [apart] = combined(twice(0)).marks;
    expect(mark!.uncertainty95M.horizontalRadius).toBeGreaterThan(
      1.02 * apart!.uncertainty95M.horizontalRadius,
    );
  });

  test('a distance along the way they err is less sure, one across it more', () => {
    const along = (northM: number) => {
      const far = planted({
        name: 'c',
        mark: 'Q',
        enuM: [100, northM, 0],
        eastNorthM2: 5e-6,
        day: 3,
      });
      return combined([...twice(5e-6), far]).distances[0]!.uncertainty95M.spatial;
    };
    // Variances of 4.5 and 9 mm², covariances of 2.5 and 5 mm²: their sum and difference.
    expect(along(100)).toBeCloseTo(1.959963985 * Math.sqrt(13.5e-6 + 7.5e-6), 6);
    expect(along(-100)).toBeCloseTo(1.959963985 * Math.sqrt(13.5e-6 - 7.5e-6), 6);
  });
});
