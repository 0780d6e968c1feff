import {describe, expect, test} from 'vitest';
import {emptySheet, readSheet} from '../../src/fieldbook/sheet.ts';
import {fullSheet} from './full-sheet.ts';

const sheetOf = (text: string) => readSheet(new TextEncoder().encode(text), 'day.yaml');

describe('readSheet', () => {
  const sheet = sheetOf(fullSheet());

  test('reads every kind of value', () => {
    expect(sheet).toMatchObject({
      path: 'day.yaml',
      project: 'Harbour wall 2026',
      mark: 'PILLAR 4',
      setUpId: 'A',
      date: '2026-05-04',
      start: {utc: '2026-05-04T08:00:00Z', written: '2026-05-04 10:00 +02:00'},
      stop: {utc: '2026-05-04T09:30:00Z'},
      receiver: {serial: '004711', reducedToMark: false, heightEnteredM: 0},
      logPoint: 'antenna reference point',
      coordinateEpoch: 2020,
      separationM: 44.667,
      geoidGrid: 'geoid.gtx',
      units: 'm',
      tolerance: {horizontalM: 0.02, upM: 0.03, reason: 'site specification, clause 4'},
      settings: {fix: 'fixed', minSatellites: 6, maxPdop: 4, settle: '5 min', maxSigma: '30 mm'},
    });
    expect(sheet.standardUncertainties).toEqual([
      {
        of: 'centring',
        planM: 0.001,
        eastM: undefined,
        northM: undefined,
        upM: undefined,
        id: 'tribrach 42',
        from: 'check of 2026-04-01',
      },
      {
        of: 'base',
        planM: undefined,
        eastM: 0.005,
        northM: 0.005,
        upM: 0.01,
        id: 'BASE 1',
        from: 'data sheet',
      },
    ]);
  });

  test('keeps digits and unit of each reading of the antenna height', () => {
    expect(sheet.antenna?.before?.readings).toEqual([
      {kind: 'length', lengthM: 1.8527, stepM: 0.0001, unit: 'm'},
      {kind: 'length', lengthM: 1.853, stepM: 0.001, unit: 'm'},
    ]);
    const check = sheet.antenna?.before?.checkReadings?.[0];
    expect(check?.unit).toBe('ft');
    expect(check?.stepM).toBeCloseTo(0.003048, 15);
  });

  test('knows the line of every key', () => {
    expect(sheet.lines.project).toBe(1);
    const text = fullSheet().split('\n');
    expect(text[(sheet.lines['antenna, plate radius'] ?? 0) - 1]).toContain('plate radius:');
    expect(text[(sheet.lines['antenna, before, readings'] ?? 0) - 1]).toContain('readings:');
  });

  test('a block in which nothing is filled in counts as left out', () => {
    const blank = sheetOf('antenna:\n  type:\n  before:\n    readings:\ntolerance:\n');
    expect(blank.antenna).toBeUndefined();
    expect(blank.tolerance).toBeUndefined();
  });

  test('an empty sheet gives nothing', () => {
    const {path, lines, ...entries} = emptySheet();
    expect(path).toBe('');
    expect(lines).toEqual({});
    expect(Object.values(entries).every((value) => value === undefined)).toBe(true);
    expect(Object.keys(entries).length).toBeGreaterThan(40);
  });
});
