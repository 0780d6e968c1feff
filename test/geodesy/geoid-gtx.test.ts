import {expect, test} from 'vitest';
import {parseGtx} from '../../src/geodesy/geoid-gtx.ts';
import {windowBytes, windowGrid} from './geoid-window.ts';

function messageOf(bytes: Uint8Array): string {
  const parsed = parseGtx(bytes, 'file.gtx');
  return parsed.kind === 'refused' ? parsed.message : 'accepted';
}

test('the header gives the bounds', () => {
  expect(windowGrid()).toMatchObject({
    southDeg: 44,
    westDeg: 5,
    latitudeStepDeg: 0.25,
    longitudeStepDeg: 0.25,
    rowCount: 21,
    columnCount: 29,
  });
});

test('bytes may start anywhere in their buffer', () => {
  const shifted = new Uint8Array(windowBytes().length + 3);
  shifted.set(windowBytes(), 3);
  const parsed = parseGtx(shifted.subarray(3), 'window');
  expect(parsed.kind === 'geoid grid' && parsed.grid.undulationM).toEqual(windowGrid().undulationM);
});

test('the value −88.8888 means no value', () => {
  const bytes = windowBytes();
  new DataView(bytes.buffer).setFloat32(40, -88.8888);
  const parsed = parseGtx(bytes, 'window');
  expect(parsed.kind === 'geoid grid' && parsed.grid.undulationM[0]).toBeNaN();
});

test('files that are cut, too long or something else are refused', () => {
  const bytes = windowBytes();
  expect(messageOf(bytes.subarray(0, 10))).toMatch(/need a header of 40 bytes, found 10 bytes/);
  expect(messageOf(bytes.subarray(0, 1000))).toMatch(
    /need 2476 bytes for 21 × 29 nodes, found 1000/,
  );
  const longer = new Uint8Array(bytes.length + 1);
  longer.set(bytes);
  expect(messageOf(longer)).toMatch(/found 2477/);
  expect(messageOf(new Uint8Array(60))).toMatch(/at least 2 rows and columns/);
  const elsewhere = windowBytes();
  new DataView(elsewhere.buffer).setFloat64(0, 144);
  expect(messageOf(elsewhere)).toMatch(/bounds on the Earth/);
});
