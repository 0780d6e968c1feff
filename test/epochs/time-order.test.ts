import {describe, expect, test} from 'vitest';
import {EpochsBuilder} from '../../src/epochs/builder.ts';
import {EpochFlag, type Epochs} from '../../src/epochs/epochs.ts';
import {flagOutOfOrder, flagRepeatedAndFrozen, inTimeOrder} from '../../src/epochs/time-order.ts';
import {randomFrom} from '../simulate/random.ts';

function epochsAt(times: readonly number[], latitudes: readonly number[] = []): Epochs {
  const builder = new EpochsBuilder();
  times.forEach((time, k) => {
    const row = builder.add();
    builder.block.gpsSeconds[row] = time;
    builder.block.latitudeDeg[row] = latitudes[k] ?? k;
    builder.block.longitudeDeg[row] = 11;
    builder.block.lineNumber[row] = k + 1;
  });
  return builder.finish();
}

describe('inTimeOrder', () => {
  test('epochs in order are returned as they are', () => {
    const epochs = epochsAt([1, 2, 2, 3]);
    expect(inTimeOrder(epochs)).toBe(epochs);
    expect(inTimeOrder(epochsAt([])).count).toBe(0);
  });

  test('property: any disorder is sorted, and equal times keep their order', () => {
    const random = randomFrom(7, 'time order');
    for (let trial = 0; trial < 200; trial += 1) {
      const n = 1 + Math.floor(random.uniform() * 60);
      const times = Array.from({length: n}, () => Math.floor(random.uniform() * 20));
      const sorted = inTimeOrder(epochsAt(times));
      // Array.prototype.sort is stable (ECMA-262 since 2019).
      const expected = times.map((time, k) => ({time, k})).sort((a, b) => a.time - b.time);
      expect([...sorted.gpsSeconds]).toEqual(expected.map(({time}) => time));
      expect([...sorted.lineNumber]).toEqual(expected.map(({k}) => k + 1));
    }
  });
});

describe('flags', () => {
  test('of epochs earlier than their predecessor', () => {
    const epochs = epochsAt([10, 11, 4, 5, 12, 11.5]);
    expect(flagOutOfOrder(epochs)).toEqual({times: 2, largestS: 7, firstLineNumber: 3});
    const flagged = [...epochs.flags].map((flags) => flags === EpochFlag.outOfOrder);
    expect(flagged).toEqual([false, false, true, false, false, true]);
  });

  test('of repeated times and frozen positions', () => {
    const epochs = epochsAt([1, 2, 2, 3, 4, 5], [7, 8, 8, 8, 9, 9]);
    expect(flagRepeatedAndFrozen(epochs)).toEqual({
      repeated: 1,
      frozen: 2,
      longestFrozenEpochs: 3,
      longestFrozenS: 1,
    });
    const {repeated, frozen} = EpochFlag;
    expect([...epochs.flags]).toEqual([0, 0, repeated, frozen, 0, frozen]);
  });
});
