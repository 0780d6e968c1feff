import {expect, test} from 'vitest';
import {referenceWrong} from '../../../../src/occupation/diagnosis/hypotheses/b03-reference-wrong.ts';
import {bareInput, predictionsOf, withOffset} from '../check-input.ts';

test('it is fitted to every offset, and says so', () => {
  const [found] = predictionsOf(
    referenceWrong,
    withOffset(bareInput(), {eastM: 1, northM: 2, upM: 2}),
  );
  expect(found?.values.sizeM).toBe(3);
  expect(found?.freeParameters).toBe(3);
});
