import {describe, expect, test} from 'vitest';
import {intervalSentences} from '../../src/wording/interval.ts';

const FACTS = {radius95M: 0.0076, epochs: 2400, looks: 2.61, leftOut: 0, leansOnModel: false};

describe('what the interval means, for a client', () => {
  test('two sentences: the chance, and why many epochs do not help', () => {
    const text = intervalSentences(FACTS)!;
    expect(text.match(/[.](\s|$)/g)).toHaveLength(2);
    expect(text).toContain('In 19 of 20 such occupations the true point lies within 7.6\u00a0mm');
    expect(text).toContain('2400\u00a0epochs tell no more than about 2.6 independent ones');
  });

  test('it promises less where the figure leans on a model or leaves something out', () => {
    expect(intervalSentences({...FACTS, leansOnModel: true})).toMatch(
      /^If the errors are of the kind assumed, in 19 of 20/,
    );
    expect(intervalSentences({...FACTS, leftOut: 2})).toContain('listed as left out');
  });

  test('nothing is said without an interval', () => {
    expect(intervalSentences({...FACTS, radius95M: null})).toBeNull();
    expect(intervalSentences({...FACTS, looks: null})).toBeNull();
  });
});
