import {describe, expect, test} from 'vitest';
import {binomialAtMost} from '../bench/truth-bars.ts';
import {AXES} from '../bench/truth-judgement.ts';
import {STILL, step} from '../bench/truth-signals.ts';
import {summariseMeans, trials} from '../bench/truth-trials.ts';
import {scenarioNamed} from './scenarios.ts';

/*
 * The truth about the estimator in small: `npm run bench:truth` has every scenario and bar. A bar is
 * missed when so few successes would come by chance in fewer than one of a hundred such runs.
 */
const REPLICATES = 30;
const FIRST_SEED = 20_000;
const CHANCE = 0.01;

/** Whether so few successes are too few for a rate of at least this much. */
function tooFew(successes: readonly boolean[], rate: number): boolean {
  const held = successes.filter(Boolean).length;
  return binomialAtMost(held, successes.length, rate) < CHANCE;
}

describe('the interval of the mean holds the mark, in each direction', () => {
  test.each([
    ['A', 0.95],
    ['C', 0.95],
    ['G', 0.95],
    ['H', 0.95],
    ['I2', 0.95],
    ['L', 0.95],
    ['Q4', 0.95],
    ['K', 0.88],
  ])('scenario %s: coverage at least %f', (name, rate) => {
    const {holds} = summariseMeans(trials(scenarioNamed(name), STILL, REPLICATES, FIRST_SEED));
    for (const axis of AXES) expect(tooFew(holds[axis], rate), axis).toBe(false);
  });

  test('where it cannot, the warning appears: steeper than flicker noise', () => {
    const {slow, holds} = summariseMeans(trials(scenarioNamed('N'), STILL, 20, FIRST_SEED));
    expect(tooFew(slow, 0.93)).toBe(false);
    expect(tooFew(holds.east, 0.66)).toBe(false);
  });
});

describe('errors that swing', () => {
  test('their mean is known better than that of errors which only forget: a width of 4 at most', () => {
    const quiet = trials(scenarioNamed('G'), STILL, REPLICATES, FIRST_SEED);
    const {widthMedian} = summariseMeans(quiet);
    expect(widthMedian.east).toBeLessThan(4);
    expect(widthMedian.north).toBeLessThan(4);
  });

  test('what they may hide beneath them is said: the warning of slow errors', () => {
    const {slow} = summariseMeans(trials(scenarioNamed('GS'), STILL, 20, FIRST_SEED));
    expect(tooFew(slow, 0.85)).toBe(false);
  });
});

describe('movement', () => {
  test.each(['A', 'C', 'H'])('scenario %s: a still record is called still', (name) => {
    const still = trials(scenarioNamed(name), STILL, REPLICATES, FIRST_SEED + 500);
    const verdicts = still.map(({judgement}) => judgement.verdict === 'still');
    expect(tooFew(verdicts, 0.92)).toBe(false);
  });

  test.each(['A', 'C'])('scenario %s: a knock of 20 mm is found, and matters', (name) => {
    const knocked = trials(scenarioNamed(name), step(20), 15, FIRST_SEED + 900);
    const found = knocked.map(({judgement}) => judgement.stepFound);
    expect(tooFew(found, 0.97)).toBe(false);
    const matters = knocked.map(({judgement}) => judgement.material);
    expect(tooFew(matters, 0.95)).toBe(false);
  });
});
