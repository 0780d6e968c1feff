import {describe, expect, test} from 'vitest';
import {mergeSatellites, SatellitesBuilder} from '../../src/epochs/satellites-builder.ts';

function seen(times: readonly number[], satelliteId: number) {
  const builder = new SatellitesBuilder();
  for (const gpsSeconds of times) {
    const angles = {elevationDeg: 45, azimuthDeg: 100, carrierToNoiseDbHz: Number.NaN};
    builder.add({gpsSeconds, system: 1, satelliteId, ...angles});
  }
  return builder.finish();
}

describe('satellites seen', () => {
  test('grow beyond the first rows', () => {
    const times = [...Array(1000).keys()];
    const {count, gpsSeconds, carrierToNoiseDbHz} = seen(times, 13);
    expect(count).toBe(1000);
    expect([...gpsSeconds]).toEqual(times);
    expect(carrierToNoiseDbHz).toHaveLength(1000);
    expect(carrierToNoiseDbHz[999]).toBeNaN();
  });

  test('are merged by time, of equal times the first part first', () => {
    const merged = mergeSatellites([seen([1, 3, 5], 13), seen([0, 3], 14)]);
    expect([...merged.gpsSeconds]).toEqual([0, 1, 3, 3, 5]);
    expect([...merged.satelliteId]).toEqual([14, 13, 13, 14, 13]);
  });
});
