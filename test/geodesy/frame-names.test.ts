import {describe, expect, test} from 'vitest';
import {findFrame, frameNamed} from '../../src/geodesy/frame-names.ts';
import {FRAMES} from '../../src/geodesy/frame-table.ts';

describe('names of frames', () => {
  test.each([
    ['itrf2020', 'ITRF2020'],
    ['ITRF 2014', 'ITRF2014'],
    ['itrf-97', 'ITRF97'],
    ['WGS 84 (G2296)', 'WGS84(G2296)'],
    ['wgs84(g1762)', 'WGS84(G1762)'],
    ['NAD83 (2011)', 'NAD83(2011)'],
    ['NAD83(CSRS) v7', 'NAD83(CSRS)v7'],
    ['ETRS89/ETRF2000', 'ETRF2000'],
    ['ETRS89 (ETRF2014)', 'ETRF2014'],
    ['KSA-GRF17', 'KSA-GRF17'],
    ['SIRGAS 2000', 'SIRGAS2000'],
    ['RGF93 v2b', 'ETRS89-FRA(RGF93v2b)'],
    ['igb14', 'IGb14'],
  ])('%s is %s', (text, name) => {
    expect(frameNamed(text).name).toBe(name);
  });

  test('every frame of the table is found by its name, and its parent exists', () => {
    expect(FRAMES.length).toBeGreaterThan(60);
    for (const frame of FRAMES) {
      expect(findFrame(frame.name)).toBe(frame);
      if (frame.parent !== null) expect(findFrame(frame.parent.parent)).toBeDefined();
    }
    expect(new Set(FRAMES.map(({name}) => name)).size).toBe(FRAMES.length);
  });
});
