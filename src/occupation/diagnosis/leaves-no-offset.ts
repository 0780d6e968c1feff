import {type Hypothesis, notTested} from './hypothesis.ts';

/**
 * Blunders of the catalogue that shift no mean, so no offset speaks for or against them: clocks
 * (T01 GPS time for UTC, T03 midnight or local date), mixed fix classes (Q02), frozen output (Q03)
 * and smoothing (Q04). Reading and screening report them.
 */
export const LEAVES_NO_OFFSET: readonly Hypothesis[] = ['T01', 'T03', 'Q02', 'Q03', 'Q04'].map(
  (code) => ({code, predict: () => notTested('leaves-no-offset')}),
);
