import {describe, expect, test} from 'vitest';
import {diagnose} from '../../../src/occupation/diagnosis/diagnose.ts';
import {misfit} from '../../../src/occupation/diagnosis/misfit.ts';
import {bareInput, fullInput, NO_ANTENNA, NOISE_M2, withOffset} from './check-input.ts';

const up = (upM: number) => ({eastM: 0, northM: 0, upM});
const codes = ({candidates}: ReturnType<typeof diagnose>) => candidates.map(({code}) => code);

describe('the misfit', () => {
  test('reference: rᵀ C⁻¹ r by cofactors, worked by hand', () => {
    // C = [[4, 1, 0], [1, 3, 0], [0, 0, 2]]: det of the plan block 11; r = (1, 2, 2).
    const c = [
      [4, 1, 0],
      [1, 3, 0],
      [0, 0, 2],
    ];
    const byHand = (3 * 1 - 2 * 1 * 1 * 2 + 4 * 4) / 11 + 4 / 2;
    expect(misfit({eastM: 1, northM: 2, upM: 2}, [0, 1, 2], [c])).toBeCloseTo(byHand, 12);
    expect(misfit({eastM: 1, northM: 2, upM: 2}, [2], [c])).toBeCloseTo(2, 12);
  });

  test('a covariance that is not positive definite fits nothing', () => {
    const c = [
      [1, 2, 0],
      [2, 1, 0],
      [0, 0, 1],
    ];
    expect(misfit(up(1), [0, 1, 2], [c])).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('the gate', () => {
  test('reference: opens beyond χ² at 99 %, 11.345 for three axes and 6.635 for one (tables)', () => {
    const sigmaM = 0.01;
    const covarianceM2 = [
      [sigmaM ** 2, 0, 0],
      [0, sigmaM ** 2, 0],
      [0, 0, sigmaM ** 2],
    ];
    const asked = (offset: number, heightOnly: boolean) => {
      const input = withOffset(fullInput({covarianceM2}), up(offset));
      const offsetM = heightOnly ? {east: null, north: null, up: offset} : input.offsetM;
      return diagnose({...input, offsetM}).asked;
    };
    expect(asked(Math.sqrt(11.33) * sigmaM, false)).toBeNull();
    expect(asked(Math.sqrt(11.36) * sigmaM, false)).toBe('the offset is more than noise');
    expect(asked(Math.sqrt(6.62) * sigmaM, true)).toBeNull();
    expect(asked(Math.sqrt(6.65) * sigmaM, true)).toBe('the offset is more than noise');
  });

  test('closed: nothing listed, but what could be tested is', () => {
    const found = diagnose(withOffset(fullInput(), up(0.01)));
    expect(found.asked).toBeNull();
    expect(found.candidates).toEqual([]);
    expect(found.testedHypotheses).toContain('V03');
    expect(found.notTested).toContainEqual({code: 'T01', because: 'leaves-no-offset'});
  });

  test('a tolerance within the noise opens it, and free hypotheses stay out', () => {
    const asked = [{of: 'horizontal', toleranceM: 0.004, reason: null}] as const;
    const found = diagnose(withOffset(fullInput({asked}), {eastM: 0.006, northM: 0, upM: 0}));
    expect(found.asked).toBe('a tolerance is exceeded');
    expect(found.candidates).toEqual([]);
  });
});

describe('ranking and groups', () => {
  test('V11 and V12 leave one vector: one group, the first', () => {
    const {candidates} = diagnose(withOffset(fullInput(), up(-48)));
    const groups = candidates.filter(({code}) => code === 'V11' || code === 'V12');
    expect(groups.map(({group}) => group)).toEqual([1, 1]);
  });

  test('V03 and V09 are 2 cm apart at 2 m: one group where the height is known to 1 cm', () => {
    const found = diagnose(withOffset(fullInput(), up(1.99)));
    const first = found.candidates.filter(({group}) => group === 1).map(({code}) => code);
    expect(first).toEqual(expect.arrayContaining(['V03', 'V09']));
  });

  test('a millimetre of noise tells them apart', () => {
    const covarianceM2 = NOISE_M2.map((row) => row.map((value) => value / 100));
    const found = diagnose(withOffset(fullInput({covarianceM2}), up(2)));
    const groupOf = (code: string) => found.candidates.find((one) => one.code === code)?.group;
    expect(groupOf('V03')).toBe(1);
    expect(groupOf('V09')).not.toBe(1);
  });

  test('those with free parameters come last, in groups of their own', () => {
    const {candidates} = diagnose(withOffset(fullInput(), up(2)));
    const free = candidates.map(({freeParameters}) => freeParameters > 0);
    expect(free.indexOf(true)).toBeGreaterThan(0);
    expect(free.lastIndexOf(false)).toBeLessThan(free.indexOf(true));
    const fixedGroups = new Set(
      candidates.filter(({freeParameters}) => freeParameters === 0).map(({group}) => group),
    );
    for (const {freeParameters, group} of candidates) {
      if (freeParameters > 0) expect(fixedGroups.has(group)).toBe(false);
    }
  });

  test('misfits rise within a group, and none exceeds χ² at 99.9 %: 16.266 for three axes', () => {
    const {candidates} = diagnose(withOffset(fullInput(), up(1.97)));
    expect(candidates.length).toBeGreaterThan(2);
    for (const {misfit: t} of candidates) expect(t).toBeLessThanOrEqual(16.267);
  });
});

describe('what was not compared', () => {
  test('plan only: causes of the height are not tested, with the reason', () => {
    const input = fullInput();
    const offsetM = {east: 2, north: 1, up: null};
    const found = diagnose({...input, offsetM});
    expect(found.degreesOfFreedom).toBe(2);
    expect(found.notTested).toContainEqual({code: 'V03', because: 'axes-not-compared'});
    for (const {predictedM} of found.candidates) expect(predictedM.up).toBeNull();
  });

  test('height only: the height not taken off is found', () => {
    const offsetM = {east: null, north: null, up: 2};
    const found = diagnose({...fullInput({markPlan: null}), offsetM});
    expect(found.degreesOfFreedom).toBe(1);
    expect(codes(found)).toContain('V03');
    expect(found.notTested).toContainEqual({code: 'H02', because: 'no-plan'});
  });

  test('a height without a variance counts as not compared', () => {
    const covarianceM2 = [
      [25e-6, 0, Number.NaN],
      [0, 25e-6, Number.NaN],
      [Number.NaN, Number.NaN, Number.NaN],
    ];
    const found = diagnose({...fullInput({covarianceM2}), offsetM: {east: 1, north: 1, up: 1}});
    expect(found.degreesOfFreedom).toBe(2);
    expect(found.noBlunderMisfit).toBeCloseTo(80_000, 6);
  });

  test('nothing compared: nothing diagnosed', () => {
    const found = diagnose({...fullInput(), offsetM: {east: null, north: null, up: null}});
    expect(found).toMatchObject({asked: null, noBlunderMisfit: null, candidates: []});
  });
});

describe('accidental matches', () => {
  test('reference: the rule K t / W for heights of half-width t within W', () => {
    const antenna = {...NO_ANTENNA, arpAboveMarkM: 2, takenOffBy: 'receiver' as const};
    const found = diagnose({
      ...bareInput({antenna, markPlan: null}),
      offsetM: {east: null, north: null, up: 2.6},
    });
    // By hand, within 3 m: V03 2, V04 -2, V07 -1.39, V08 1.39, V09 1.98, five pole lengths either
    // way, and ±1 and ±0.1 of V16.
    const predictionsWithin3M = 5 + 10 + 4;
    const halfWidthM = Math.sqrt(10.828) * Math.sqrt(100e-6 + 4e-6);
    expect(found.accidental.withinM).toBe(3);
    expect(found.accidental.of).toBe('height');
    const rule = (predictionsWithin3M * halfWidthM) / 3;
    expect(found.accidental.matches / rule).toBeGreaterThan(0.95);
    expect(found.accidental.matches / rule).toBeLessThan(1.05);
  });

  test('a larger offset widens the range', () => {
    const found = diagnose(withOffset(fullInput(), up(-48)));
    expect(found.accidental.withinM).toBe(48);
  });
});

describe('pairs', () => {
  test('a height not taken off over a wrong mark', () => {
    const swapped = diagnose(withOffset(fullInput(), {eastM: 3.21, northM: -1.47, upM: -0.12}));
    expect(swapped.pairs).toEqual([]);
    expect(codes(swapped)).toContain('B02');
    const both = diagnose(withOffset(fullInput(), {eastM: 3.21, northM: -1.47, upM: 1.88}));
    expect(both.pairs[0]?.plan.code).toBe('B02');
    expect(both.pairs.map(({height}) => height.code)).toContain('V03');
    expect(both.accidental.pairs).toBeGreaterThan(0);
  });
});
