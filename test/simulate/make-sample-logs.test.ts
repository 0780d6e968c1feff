import {mkdirSync, readFileSync, writeFileSync} from 'node:fs';
import {resolve} from 'node:path';
import {describe, expect, test} from 'vitest';
import {readMarks} from '../../src/fieldbook/marks.ts';
import {readSheet} from '../../src/fieldbook/sheet.ts';
import {sampleLogs} from './make-sample-logs.ts';
import {QUILLMERE} from './quillmere.ts';

const FOLDER = resolve(import.meta.dirname, '../../sample-logs');
const LARGEST_BYTES = 1.2e6;

describe('sample logs', () => {
  const logs = sampleLogs();
  if (process.env.SAMPLE_LOGS === 'write') {
    mkdirSync(FOLDER, {recursive: true});
    for (const [name, bytes] of logs) writeFileSync(resolve(FOLDER, name), bytes);
  }

  test.each([...logs.keys()])('golden: %s is what the simulator writes', (name) => {
    const bytes = logs.get(name)!;
    expect(Buffer.compare(readFileSync(resolve(FOLDER, name)), bytes)).toBe(0);
    expect(bytes.length).toBeLessThan(LARGEST_BYTES);
  });

  test('property: each has a line in the README', () => {
    const readme = readFileSync(resolve(FOLDER, 'README.md'), 'utf8');
    for (const name of logs.keys()) expect(readme).toContain(`\`${name}\``);
  });
});

describe('the marks of Quillmere', () => {
  const path = resolve(FOLDER, 'marks.yaml');
  const marks = readMarks(readFileSync(path), 'marks.yaml');

  test.each(Object.entries(QUILLMERE))(
    'property: %s is where the simulator put it',
    (name, place) => {
      const mark = marks.find((candidate) => candidate.name === name)!;
      const {latitudeDeg, longitudeDeg, ellipsoidalHeightM} = place;
      expect(mark.coordinates).toMatchObject({
        kind: 'geodetic',
        latitudeDeg,
        longitudeDeg,
        ellipsoidalHeightM,
      });
      expect(mark.tolerance).toMatchObject({horizontalM: 0.02, upM: 0.03});
    },
  );

  test('property: there are no others', () => {
    expect(marks.map((mark) => mark.name).sort()).toEqual(Object.keys(QUILLMERE).sort());
  });
});

test('property: the field sheet tells of the occupation that was simulated', () => {
  const sheet = readSheet(readFileSync(resolve(FOLDER, 'sheet.yaml')), 'sheet.yaml');
  expect(sheet.mark).toBe('MOLE');
  expect(sheet.antenna?.before?.readings?.length).toBe(3);
  expect(sheet.frame).toBe('ITRF2020');
});
