import {readFileSync} from 'node:fs';
import {resolve} from 'node:path';
import {describe, expect, test} from 'vitest';
import {FixClass} from '../../src/epochs/epochs.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {enuColumns, localFrame} from '../../src/geodesy/local.ts';
import type {LogContents} from '../../src/log/contents.ts';
import {createLogReader} from '../../src/log/reader.ts';
import {moleOccupation} from './make-sample-logs.ts';
import {above, type QuillmereMark} from './quillmere.ts';

function contentsOf(name: string): LogContents {
  const reader = createLogReader({
    name,
    date: null,
    trustAbsentChecksum: false,
    table: {
      columns: null,
      timeScale: null,
      startGpsSeconds: null,
      semiMajorAxisM: WGS84.semiMajorAxisM,
      inverseFlattening: 298.257223563,
    },
  });
  reader.add(readFileSync(resolve(import.meta.dirname, '../../sample-logs', name)));
  return reader.finish();
}

/** Offsets of the epochs from where the antenna stood. */
function offsets({epochs}: LogContents, mark: QuillmereMark, antennaHeightM: number) {
  return enuColumns(epochs, localFrame(above(mark, antennaHeightM), WGS84));
}

function largest(column: Float64Array): number {
  return column.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}

describe('the sample logs as read', () => {
  test('property: the offsets over MOLE are those that were simulated, to the digits of the log', () => {
    const contents = contentsOf('mole-still.nmea');
    const truth = moleOccupation();
    const {eastM, northM, upM} = offsets(contents, 'MOLE', 1.742);
    expect(contents.epochs.count).toBe(2400);
    // Eight decimals of a minute are 0.02 mm; heights have four decimals.
    expect(largest(eastM.map((value, i) => value - truth.eastM[i]!))).toBeLessThan(0.000015);
    expect(largest(northM.map((value, i) => value - truth.northM[i]!))).toBeLessThan(0.000015);
    expect(largest(upM.map((value, i) => value - truth.upM[i]!))).toBeLessThan(0.000051);
    const [input] = contents.inputs;
    expect(input!.lines.used).toBe(input!.lines.total);
    expect(contents.findings).toEqual([]);
  });

  test('property: over SLIP the fix is lost half-way and comes back elsewhere', () => {
    const contents = contentsOf('slip-jump.nmea');
    const {eastM, northM} = offsets(contents, 'SLIP', 1.655);
    const {fixClass, gpsSeconds, count} = contents.epochs;
    expect(fixClass.filter((quality) => quality === FixClass.float).length).toBe(13);
    const mean = (column: Float64Array, from: number, to: number) =>
      column.subarray(from, to).reduce((sum, value) => sum + value, 0) / (to - from);
    const lost = fixClass.indexOf(FixClass.float);
    const back = lost + 13;
    expect(gpsSeconds[back]! - gpsSeconds[lost]!).toBe(20);
    const jumpEastM = mean(eastM, back, count) - mean(eastM, 0, lost);
    const jumpNorthM = mean(northM, back, count) - mean(northM, 0, lost);
    expect(Math.hypot(jumpEastM, jumpNorthM)).toBeGreaterThan(0.02);
    expect(Math.hypot(jumpEastM, jumpNorthM)).toBeLessThan(0.03);
  });

  test('property: the table over CHAPEL stays within millimetres of the mark', () => {
    const contents = contentsOf('chapel-ecef.csv');
    const {eastM, northM, upM} = offsets(contents, 'CHAPEL', 1.502);
    expect(contents.epochs.count).toBe(720);
    expect(largest(eastM)).toBeLessThan(0.02);
    expect(largest(northM)).toBeLessThan(0.02);
    expect(largest(upM)).toBeLessThan(0.04);
  });

  test('property: the ugly log adds up, and shows each of its faults', () => {
    const contents = contentsOf('quay-ugly.log');
    const [input] = contents.inputs;
    const {total, used, ignored, rejected} = input!.lines;
    const sum = (counts: Readonly<Record<string, number>>) =>
      Object.values(counts).reduce((all, count) => all + count, 0);
    expect(used + sum(ignored) + sum(rejected)).toBe(total);
    expect(input!.betweenBytes).toBeGreaterThan(1000);
    for (const count of Object.values(input!.lineEnds)) expect(count).toBeGreaterThan(0);
    expect(Object.keys(ignored)).toEqual(
      expect.arrayContaining(['!AIVDM', 'DPT', 'blank', 'proprietary', 'text']),
    );
    expect(Object.keys(rejected)).toEqual(
      expect.arrayContaining(['bad checksum', 'cut short', 'no checksum']),
    );
    expect(contents.findings.map(({code}) => code)).toEqual(
      expect.arrayContaining([
        'leap-second-seen',
        'time-back',
        'repeated-epochs',
        'frozen-run',
        'two-talkers',
        'no-position',
        'separation-absent',
        'checksum-absent',
        'bad-checksums',
        'last-line-cut',
        'binary-between',
      ]),
    );
  });

  test('property: no fault of the ugly log reaches a fixed position', () => {
    const contents = contentsOf('quay-ugly.log');
    const {eastM, northM, upM} = offsets(contents, 'QUAY', 1.61);
    const {fixClass, gpsSeconds, count} = contents.epochs;
    const fixed = (column: Float64Array) => column.filter((_, i) => fixClass[i] === FixClass.fixed);
    expect(fixed(eastM).length).toBeGreaterThan(650);
    expect(largest(fixed(eastM))).toBeLessThan(0.02);
    expect(largest(fixed(northM))).toBeLessThan(0.02);
    expect(largest(fixed(upM))).toBeLessThan(0.04);
    // 2017 begins at 1167264018 s of GPS time, 460 s and a leap second after 23:52:20.
    expect(gpsSeconds[0]).toBe(1167264018 - 461);
    expect(gpsSeconds[count - 1]! - gpsSeconds[0]!).toBeLessThanOrEqual(760);
  });
});
