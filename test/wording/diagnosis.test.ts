import {describe, expect, test} from 'vitest';
import {HYPOTHESES} from '../../src/occupation/diagnosis/catalogue.ts';
import {diagnose} from '../../src/occupation/diagnosis/diagnose.ts';
import type {DiagnosisInput} from '../../src/occupation/diagnosis/input.ts';
import {CAUSES} from '../../src/wording/causes.ts';
import {
  accidentalSentence,
  causeAdvice,
  causeTitle,
  notTestedReason,
  pairTitle,
} from '../../src/wording/diagnosis.ts';
import {bareInput, fullInput, NOISE_M2, withOffset} from '../occupation/diagnosis/check-input.ts';

/** Inputs under which every hypothesis predicts something, or says why not. */
const INPUTS: readonly DiagnosisInput[] = [
  withOffset(fullInput(), {eastM: 0.006, northM: 0.004, upM: 0.03}),
  withOffset(fullInput(), {eastM: 3, northM: 2, upM: 4}),
  withOffset(
    bareInput({separation: {known: [{source: 'sheet', separationM: 40}], missingInLog: true}}),
    {
      eastM: 0.02,
      northM: 0.03,
      upM: 0.1,
    },
  ),
  withOffset(
    fullInput({
      antenna: {...fullInput().antenna!, openingM: 2, closingM: 1.98, heightUsed: 'opening'},
      otherMarkChecks: [
        {
          mark: 'PILLAR 7',
          offsetM: {east: 0.3, north: 0.1, up: 0.2},
          covarianceM2: NOISE_M2,
          fromItM: {eastM: 900, northM: -400},
        },
      ],
      sameMarkChecks: [
        {
          offsetM: {east: -0.012, north: 0.02, up: 0},
          covarianceM2: NOISE_M2,
          sharedCovarianceM2: null,
          turnedDeg: 180,
          hoursLater: 1,
        },
        {
          offsetM: {east: 0.002, north: 0.004, up: -0.02},
          covarianceM2: NOISE_M2,
          sharedCovarianceM2: null,
          turnedDeg: null,
          hoursLater: 6.2,
        },
      ],
    }),
    {eastM: 0.012, northM: 0.01, upM: 0.03},
  ),
];

const PREDICTED = INPUTS.flatMap((input) =>
  HYPOTHESES.flatMap(({code, predict}) => {
    const outcome = predict(input);
    return outcome.kind === 'predicted'
      ? outcome.predictions.map(({values}) => ({code, values}))
      : [];
  }),
);

describe('every cause', () => {
  test('occurs in these tests', () => {
    const silent = ['T01', 'T03', 'Q02', 'Q03', 'Q04'];
    const codes = HYPOTHESES.map(({code}) => code).filter((code) => !silent.includes(code));
    expect([...new Set(PREDICTED.map(({code}) => code))].sort()).toEqual([...codes].sort());
    expect(Object.keys(CAUSES).sort()).toEqual([...codes].sort());
  });

  test('has a title without a number gone wrong, and blames nothing', () => {
    for (const {code, values} of PREDICTED) {
      const text = `${causeTitle(code, values)} ${causeAdvice(code, values)}`;
      expect(text, code).not.toMatch(/NaN|undefined|null|Infinity|caused|because of/);
      expect(text, code).not.toMatch(/-\d/);
    }
  });

  test('has advice that says what to measure, read or ask', () => {
    for (const {code, values} of PREDICTED) {
      const advice = causeAdvice(code, values);
      expect(advice, code).toMatch(
        /measure|occupy|check|tape|log again|lay the|lay the point|make a sketch|compare/i,
      );
      expect(advice, code).toMatch(/\.$/);
      expect(advice, code).not.toMatch(/\bcorrect the (height|value)/i);
    }
  });
});

test('every reason for not testing has words', () => {
  const reasons = INPUTS.flatMap((input) => diagnose(input).notTested.map(({because}) => because));
  expect(reasons.length).toBeGreaterThan(20);
  for (const because of reasons) expect(notTestedReason(because)).toMatch(/^[a-z]/);
});

test('the accidental matches are said with what they are counted over', () => {
  const facts = {tested: 31, matches: 0.234, withinM: 3, of: 'height'} as const;
  expect(accidentalSentence(facts)).toContain('about 0.2');
  expect(accidentalSentence({...facts, matches: 1e-6})).toContain('fewer than 0.001');
  expect(accidentalSentence({...facts, matches: 0.034})).toContain('about 0.03');
});

test('a pair names both', () => {
  const plan = {code: 'H04', values: {}};
  const height = {code: 'V03', values: {heightM: 2, by: 'receiver'}};
  expect(pairTitle(plan, height)).toBe(
    'two mistakes at once: latitude and longitude swapped and the antenna height of 2.00\u00a0m (receiver) not taken off',
  );
});

test('an unknown code is a defect', () => {
  expect(() => causeTitle('X99', {})).toThrow('X99');
  expect(() => notTestedReason('whatever')).toThrow('whatever');
});
