import {describe, expect, test} from 'vitest';
import {concatEpochs, EpochsBuilder, takeEpochs} from '../../src/epochs/builder.ts';

function filled(count: number) {
  const builder = new EpochsBuilder();
  for (let k = 0; k < count; k += 1) {
    const row = builder.add();
    builder.block.gpsSeconds[row] = k;
    builder.block.lineNumber[row] = k + 1;
  }
  return builder;
}

describe('EpochsBuilder', () => {
  test('an epoch of which nothing is said is absent in every column', () => {
    const builder = new EpochsBuilder();
    builder.add();
    const {count, ...columns} = builder.finish();
    expect(count).toBe(1);
    const whole = ['fixClass', 'satellites', 'stationId', 'flags', 'inputIndex', 'lineNumber'];
    for (const [name, column] of Object.entries(columns)) {
      expect(column).toHaveLength(1);
      if (!whole.includes(name)) expect(column[0]).toBeNaN();
    }
    expect(columns.satellites[0]).toBe(255);
    expect(columns.stationId[0]).toBe(65_535);
    expect([columns.fixClass[0], columns.flags[0], columns.lineNumber[0]]).toEqual([0, 0, 0]);
  });

  test.each([0, 1, 4095, 4096, 4097, 69_632, 69_633, 200_000])(
    '%i epochs keep their order',
    (n) => {
      const builder = filled(n);
      expect(builder.count).toBe(n);
      const epochs = builder.finish();
      expect(epochs.count).toBe(n);
      expect(epochs.gpsSeconds).toHaveLength(n);
      expect(epochs.gpsSeconds.every((value, k) => value === k)).toBe(true);
      expect(epochs.lineNumber.every((value, k) => value === k + 1)).toBe(true);
      expect(builder.count).toBe(0);
    },
  );

  test('it can be filled again after it was emptied', () => {
    const builder = filled(3);
    builder.finish();
    builder.block.gpsSeconds[builder.add()] = 7;
    expect(() => builder.finish()).not.toThrow();
    const row = builder.add();
    builder.block.gpsSeconds[row] = 8;
    expect([...builder.finish().gpsSeconds]).toEqual([8]);
  });

  test('columns of which nothing is given share their memory, the others do not', () => {
    const builder = new EpochsBuilder();
    for (let k = 0; k < 10; k++) builder.block.hdop[builder.add()] = k === 9 ? 0.7 : Number.NaN;
    const {hdop, pdop, vdop, sigmaUpM, separationM} = builder.finish();
    expect(pdop.every(Number.isNaN)).toBe(true);
    expect(pdop).toHaveLength(10);
    for (const other of [vdop, sigmaUpM, separationM]) expect(other).toBe(pdop);
    expect(hdop).not.toBe(pdop);
    expect(hdop[9]).toBeCloseTo(0.7, 6);
  });

  test('an epoch takes at most 96 bytes', () => {
    const {count, ...columns} = filled(1).finish();
    const bytes = Object.values(columns).reduce((sum, column) => sum + column.BYTES_PER_ELEMENT, 0);
    expect(count).toBe(1);
    expect(bytes).toBeLessThanOrEqual(96);
  });
});

describe('columns rearranged', () => {
  test('rows can be taken in any order and more than once', () => {
    const taken = takeEpochs(filled(5).finish(), Uint32Array.of(4, 0, 0));
    expect(taken.count).toBe(3);
    expect([...taken.gpsSeconds]).toEqual([4, 0, 0]);
    expect([...taken.lineNumber]).toEqual([5, 1, 1]);
  });

  test('columns can be put one behind the other', () => {
    const joined = concatEpochs([filled(2).finish(), filled(0).finish(), filled(3).finish()]);
    expect(joined.count).toBe(5);
    expect([...joined.gpsSeconds]).toEqual([0, 1, 0, 1, 2]);
  });
});
