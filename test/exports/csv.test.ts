import {describe, expect, test} from 'vitest';
import {epochCsv} from '../../src/exports/csv.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import {createTableReader} from '../../src/log/table.ts';
import {isoUtc} from '../../src/time/gps-time.ts';
import {reducedSample} from './samples.ts';

const {reduced, log} = reducedSample({name: 'slip-jump.nmea', mark: 'SLIP', maxLines: 30_000});
const chunks = [...epochCsv({...reduced, ...reduced.aboutReference(), epochs: log.epochs})];
const lines = chunks.join('').split('\n');
const header = (lines[0] ?? '').split(',');
const rows = lines.slice(1, -1).map((line) => line.split(','));

function column(name: string): string[] {
  const at = header.indexOf(name);
  expect(at, name).toBeGreaterThanOrEqual(0);
  return rows.map((row) => row[at] ?? '');
}

describe('epochCsv', () => {
  test('one row per epoch read, each as wide as the header, the last line closed', () => {
    expect(rows.length).toBe(log.epochs.count);
    expect(rows.length).toBeGreaterThan(2000);
    expect(rows.every((row) => row.length === header.length)).toBe(true);
    expect(lines[lines.length - 1]).toBe('');
  });

  test('comes in bounded chunks', () => {
    expect(chunks.length).toBeGreaterThan(2);
    expect(Math.max(...chunks.map((chunk) => chunk.length))).toBeLessThan(600_000);
  });

  test('used and screened rows are those of the result', () => {
    const {used, screened} = reduced.result.epochs;
    expect(column('used').filter((text) => text === '1').length).toBe(used);
    const counts: Record<string, number> = {};
    for (const reason of column('reason').filter((text) => text !== '')) {
      counts[reason] = (counts[reason] ?? 0) + 1;
    }
    expect(counts).toEqual(Object.fromEntries(Object.entries(screened).filter(([, n]) => n > 0)));
  });

  test('the same moment stands as UTC and as GPS week and seconds', () => {
    const week = column('gps_week');
    const seconds = column('gps_tow_s');
    column('utc').forEach((utc, k) => {
      expect(isoUtc(Number(week[k]) * 604_800 + Number(seconds[k]), 3)).toBe(utc);
    });
  });

  test('no field says NaN, Infinity or negative zero', () => {
    expect(lines.join('\n')).not.toMatch(/NaN|Infinity|(^|,)-0(\.0*)?(,|$)/m);
  });

  test('property: the table can be read as a log, with the same positions and classes', () => {
    const reader = createTableReader({
      name: 'epochs.csv',
      date: null,
      trustAbsentChecksum: false,
      table: {
        columns: null,
        timeScale: null,
        startGpsSeconds: null,
        semiMajorAxisM: WGS84.semiMajorAxisM,
        inverseFlattening: WGS84.inverseFlattening,
      },
    });
    for (const chunk of chunks) reader.add(new TextEncoder().encode(chunk));
    const {epochs, inputs} = reader.finish();
    expect(inputs[0]?.lines.rejected).toEqual({});
    expect(epochs.count).toBe(log.epochs.count);
    expect([...epochs.fixClass]).toEqual([...log.epochs.fixClass]);
    for (let k = 0; k < epochs.count; k += 1) {
      expect(Math.abs(epochs.latitudeDeg[k]! - log.epochs.latitudeDeg[k]!)).toBeLessThan(6e-11);
      expect(Math.abs(epochs.gpsSeconds[k]! - log.epochs.gpsSeconds[k]!)).toBeLessThan(6e-4);
      expect(
        Math.abs(epochs.ellipsoidalHeightM[k]! - log.epochs.ellipsoidalHeightM[k]!),
      ).toBeLessThan(6e-5);
    }
  });
});
