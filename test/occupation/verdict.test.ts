import {describe, expect, test} from 'vitest';
import type {Decision, Requirement} from '../../src/occupation/result.ts';
import {checkVerdict} from '../../src/occupation/verdict.ts';

function requirement(decision: Decision): Requirement {
  return {of: 'horizontal', toleranceM: 0.02, reason: null, probabilityWithin: null, decision};
}

describe('the answer of a check', () => {
  test.each([
    ['holds', ['accept', 'accept'], 'still'],
    ['off', ['accept', 'reject'], 'still'],
    ['off', ['reject', 'cannot tell'], 'cannot tell'],
    ['cannot tell', ['accept', 'cannot tell'], 'still'],
    ['cannot tell', ['accept'], 'cannot tell'],
    ['cannot tell', [], 'still'],
    ['moving', ['accept'], 'stepped'],
    ['moving', ['reject'], 'travelling'],
    ['moving', [], 'drifting'],
    ['moving', ['accept'], 'settling'],
  ] as const)('is "%s" for %j and a record that is %s', (verdict, decisions, stability) => {
    expect(checkVerdict(decisions.map(requirement), stability)).toBe(verdict);
  });
});
