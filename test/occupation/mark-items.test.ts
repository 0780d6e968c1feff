import {describe, expect, test} from 'vitest';
import {readMarks} from '../../src/fieldbook/marks.ts';
import {markItems} from '../../src/occupation/mark-items.ts';

function itemsOf(yaml: string): Record<string, string | null> {
  const [mark] = readMarks(new TextEncoder().encode(yaml), 'marks.yaml');
  return Object.fromEntries(markItems(mark!).map(({item, value}) => [item, value]));
}

describe('markItems', () => {
  test('a grid position with everything stated', () => {
    const items = itemsOf(`
projection: UTM 33N
vertical datum: EVRF2019
marks:
  - name: P7
    other names: [7, old 7]
    description: brass bolt
    easting: 500123.456 m
    northing: 5345678.901 m
    orthometric height: 186.789 m
    separation: 44.667 m
    frame: ETRF2000
    coordinate epoch: 2010.0
    velocity: {east: 21.3 mm/yr, north: 14.9 mm/yr, up: 0 mm/yr}
    standard uncertainty: {east: 3 mm, north: 3 mm}
    witness marks:
      - {name: nail, east: 1.2 m, north: -0.5 m, up: 0.1 m}
      - {name: pin, distance: 3.21 m, bearing: 45, bearing from: true north}
`);
    expect(items).toEqual({
      name: 'P7',
      'other names': '7; old 7',
      description: 'brass bolt',
      projection: 'UTM 33N',
      easting: '500123.456 m',
      northing: '5345678.901 m',
      'ellipsoidal height': null,
      'orthometric height': '186.789 m',
      separation: '44.667 m',
      frame: 'ETRF2000',
      'coordinate epoch': '2010',
      'vertical datum': 'EVRF2019',
      'geoid model': null,
      velocity: 'east 21.3 mm/yr, north 14.9 mm/yr, up 0 mm/yr',
      'standard uncertainty': 'east 3 mm, north 3 mm',
      'witness marks': 'nail east 1.2 m north -0.5 m up 0.1 m; pin at 3.21 m 45° from true north',
    });
  });

  test('a geocentric position with a covariance, and what nobody stated as null', () => {
    const items = itemsOf(`
marks:
  - name: A
    x: 4027893.675 m
    y: 307045.9069 m
    z: 4919475.1721 m
    covariance: {axes: xyz, unit: mm2, rows: [[4], [0, 9], [0, 0, 16]]}
`);
    expect(items.x).toBe('4027893.675 m');
    expect(items['standard uncertainty']).toBe(
      'x 2.00 mm, y 3.00 mm, z 4.00 mm; with its covariances',
    );
    expect(items.description).toBeNull();
    expect(items.frame).toBeNull();
    expect(items).not.toHaveProperty('latitude');
  });

  test('no mark has no record', () => {
    expect(markItems(null)).toEqual([]);
  });
});
