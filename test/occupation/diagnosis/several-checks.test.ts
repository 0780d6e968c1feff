import {describe, expect, test} from 'vitest';
import type {Enu} from '../../../src/geodesy/types.ts';
import {diagnose} from '../../../src/occupation/diagnosis/diagnose.ts';
import type {DiagnosisInput} from '../../../src/occupation/diagnosis/input.ts';
import {type Random, randomFrom} from '../../simulate/random.ts';
import {fullInput, NOISE_M2, signature, withOffset} from './check-input.ts';
import {noisy} from './noise.ts';

/** Hypotheses that need a second set-up, a second session or a second mark. */
const RUNS = 100;
const NOWHERE: Enu = {eastM: 0, northM: 0, upM: 0};

interface Rates {
  readonly listed: number;
  readonly first: number;
}

function ratesOf(code: string, inputOf: (random: Random) => DiagnosisInput): Rates {
  const random = randomFrom(17, `several checks ${code}`);
  let listed = 0;
  let first = 0;
  for (let run = 0; run < RUNS; run++) {
    const {candidates} = diagnose(inputOf(random));
    const found = candidates.filter((one) => one.code === code && one.freeParameters === 0);
    if (found.length > 0) listed += 1;
    if (found.some(({group}) => group === 1)) first += 1;
  }
  return {listed: listed / RUNS, first: first / RUNS};
}

function expectBars({listed, first}: Rates): void {
  expect(listed).toBeGreaterThanOrEqual(0.98);
  expect(first).toBeGreaterThanOrEqual(0.95);
}

/** Noise so small that an eccentricity of 4 mm is 6 standard uncertainties. */
const FINE_M2 = NOISE_M2.map((row) => row.map((value) => value / 64));

function sameMark(offset: Enu, covarianceM2: readonly (readonly number[])[], turnedDeg: number) {
  return {
    offsetM: {east: offset.eastM, north: offset.northM, up: offset.upM},
    covarianceM2,
    sharedCovarianceM2: null,
    turnedDeg,
    hoursLater: 1,
  };
}

describe('two set-ups turned by half a turn', () => {
  const [eastM = 0, northM = 0] = signature('C01').d1 ?? [];
  const e = {eastM, northM, upM: 0};
  const opposite = {eastM: -eastM, northM: -northM, upM: 0};

  test('C01: 4 mm of eccentricity under 0.6 mm of noise', () => {
    const rates = ratesOf('C01', (random) => {
      const second = noisy(opposite, FINE_M2, random);
      const input = fullInput({
        covarianceM2: FINE_M2,
        sameMarkChecks: [sameMark(second, FINE_M2, 180)],
      });
      return withOffset(input, noisy(e, FINE_M2, random));
    });
    expectBars(rates);
  });

  test('C02: a pole of 2 m tilted by 20 minutes, in one group with C01', () => {
    const {horizontal_m = 0, vertical_m = 0} = signature('C02');
    const rates = ratesOf('C02', (random) => {
      const second = {eastM: -horizontal_m, northM: 0, upM: vertical_m};
      const input = fullInput({
        covarianceM2: FINE_M2,
        sameMarkChecks: [sameMark(noisy(second, FINE_M2, random), FINE_M2, 180)],
      });
      return withOffset(
        input,
        noisy({eastM: horizontal_m, northM: 0, upM: vertical_m}, FINE_M2, random),
      );
    });
    expectBars(rates);
  });

  test('an eccentricity of the mark does not turn: C01 is not listed', () => {
    const rates = ratesOf('C01', (random) => {
      const input = fullInput({
        covarianceM2: FINE_M2,
        sameMarkChecks: [sameMark(noisy(e, FINE_M2, random), FINE_M2, 180)],
      });
      return withOffset(input, noisy(e, FINE_M2, random));
    });
    expect(rates.listed).toBeLessThanOrEqual(0.05);
  });
});

function otherMark(offset: Enu, fromItM: {eastM: number; northM: number} | null) {
  return {
    mark: 'PILLAR 7',
    offsetM: {east: offset.eastM, north: offset.northM, up: offset.upM},
    covarianceM2: NOISE_M2,
    fromItM,
  };
}

describe('another mark checked on the same day', () => {
  test('B01: the same offset on both', () => {
    const base = {eastM: 0.83, northM: -0.41, upM: 0.56};
    const rates = ratesOf('B01', (random) =>
      withOffset(
        fullInput({otherMarkChecks: [otherMark(noisy(base, NOISE_M2, random), null)]}),
        noisy(base, NOISE_M2, random),
      ),
    );
    expectBars(rates);
  });

  test('B01 is not tested, and not offered, when the other mark fits', () => {
    const input = fullInput({otherMarkChecks: [otherMark(NOWHERE, null)]});
    const {candidates, notTested} = diagnose(
      withOffset(input, {eastM: 0.83, northM: -0.41, upM: 0.56}),
    );
    expect(candidates.map(({code}) => code)).not.toContain('B01');
    expect(notTested).toContainEqual({code: 'B01', because: 'other-mark-fits'});
  });

  test('G01: a kilometre of ground taken as grid', () => {
    const deltaM = signature('G01').delta_m ?? 0;
    const rates = ratesOf('G01', (random) =>
      withOffset(
        fullInput({
          otherMarkChecks: [otherMark(noisy(NOWHERE, NOISE_M2, random), {eastM: 600, northM: 800})],
        }),
        noisy({eastM: 0.6 * deltaM, northM: 0.8 * deltaM, upM: 0}, NOISE_M2, random),
      ),
    );
    expectBars(rates);
  });

  test('V18: the height datum of the region on both', () => {
    const datum = {eastM: 0, northM: 0, upM: 0.34};
    const rates = ratesOf('V18', (random) =>
      withOffset(
        fullInput({otherMarkChecks: [otherMark(noisy(datum, NOISE_M2, random), null)]}),
        noisy(datum, NOISE_M2, random),
      ),
    );
    expectBars(rates);
  });
});

describe('heights before and after, and the tide', () => {
  test('V19: 160 mm of even sinking under the opening height', () => {
    const antenna = {...fullInput().antenna!, closingM: 1.84, heightUsed: 'opening' as const};
    const rates = ratesOf('V19', (random) =>
      withOffset(fullInput({antenna}), noisy({eastM: 0, northM: 0, upM: -0.08}, NOISE_M2, random)),
    );
    expectBars(rates);
  });

  test('L01: listed last for two sessions half a tide apart', () => {
    const offsetM = {east: 0, north: 0, up: -0.02};
    const other = {...sameMark(NOWHERE, FINE_M2, 0), turnedDeg: null, hoursLater: 6.2, offsetM};
    const {candidates} = diagnose(
      withOffset(fullInput({covarianceM2: FINE_M2, sameMarkChecks: [other]}), {
        eastM: 0.001,
        northM: 0,
        upM: 0.02,
      }),
    );
    const found = candidates.find(({code}) => code === 'L01');
    expect(found?.freeParameters).toBe(3);
    expect(found?.predictedM.up).toBeCloseTo(0.02, 9);
  });
});

describe('frames, epochs and marks', () => {
  test('F01: a mark in ETRF2000 taken as ITRF2014 at 2025.0 (PROJ 9.1.1)', () => {
    const frames = {
      ...fullInput().frames,
      measured: {frame: 'ITRF2014', epoch: 2025},
      reference: null,
    };
    const planted = {eastM: 0.6646, northM: 0.6361, upM: 0.0148};
    const rates = ratesOf('F01', (random) =>
      withOffset(fullInput({frames}), noisy(planted, NOISE_M2, random)),
    );
    expectBars(rates);
  });

  test('F02: fifteen years of the Eurasian plate', () => {
    const planted = {eastM: 15 * 0.01948, northM: 15 * 0.01568, upM: 0};
    const rates = ratesOf('F02', (random) =>
      withOffset(fullInput(), noisy(planted, NOISE_M2, random)),
    );
    expect(rates.listed).toBeGreaterThanOrEqual(0.98);
  });

  test('B02: the witness mark occupied instead', () => {
    const rates = ratesOf('B02', (random) =>
      withOffset(fullInput(), noisy({eastM: 3.21, northM: -1.47, upM: -0.12}, NOISE_M2, random)),
    );
    expectBars(rates);
  });
});
