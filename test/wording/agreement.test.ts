import {expect, test} from 'vitest';
import {AGREEMENT_SENTENCES} from '../../src/wording/agreement.ts';

test('each pair of decision and agreement has a sentence of its own', () => {
  const codes = ['accept', 'reject', 'cannot-tell'].flatMap((decision) =>
    ['agrees', 'disagrees', 'untested'].map((agreement) => `${decision}-${agreement}`),
  );
  expect(Object.keys(AGREEMENT_SENTENCES).sort()).toEqual(codes.sort());
  const sentences = codes.map((code) => AGREEMENT_SENTENCES[code]!({where: 'in height'}));
  expect(new Set(sentences).size).toBe(9);
});

test.each(['accept', 'reject', 'cannot-tell'])('where both disagree is named: %s', (decision) => {
  const sentence = AGREEMENT_SENTENCES[`${decision}-disagrees`]!({where: 'in height'});
  expect(sentence).toContain('in height');
});
