import {describe, expect, test} from 'vitest';
import {blankSheet} from '../../src/fieldbook/blank-sheet.ts';
import {emptySheet, readSheet} from '../../src/fieldbook/sheet.ts';

describe('blankSheet', () => {
  const lines = blankSheet().split('\n');

  test('reads as a sheet in which nothing is given', () => {
    const {
      lines: _lines,
      path: _path,
      ...given
    } = readSheet(new TextEncoder().encode(blankSheet()), 'b');
    const {lines: _none, path: _empty, ...nothing} = emptySheet();
    expect(given).toEqual(nothing);
  });

  test('explains every key', () => {
    const keys = lines.filter((line) => /^ *[a-z]/.test(line));
    expect(keys.length).toBeGreaterThan(90);
    for (const line of keys) expect(line).toMatch(/^ *[a-z][a-z -]*: +# \S.*[^.]$/);
  });

  test('has a place for what a field log must hold (military field log and network guideline)', () => {
    // Items of the topographic field log of US Army subcourse EN0593A, part E, and of the
    // metadata lists of the agencies: each has its key.
    for (const key of [
      'project',
      'mark',
      'identification',
      'observer',
      'organisation',
      'date',
      'weather',
      'start',
      'stop',
      'receiver',
      'antenna',
      'tribrach',
      'satellites',
      'problems',
      'frame',
      'coordinate epoch',
      'vertical datum',
      'geoid model',
      'projection',
      'units',
      'space weather',
      'obstructions',
      'registration',
      'departures',
    ]) {
      expect(
        lines.some((line) => line.startsWith(`${key}:`)),
        key,
      ).toBe(true);
    }
  });

  test('an example may be typed in behind every key', () => {
    const filled = blankSheet()
      .replace(/^(separation:) +#/m, '$1 44.667 m #')
      .replace(/^( {2}type:) +#/m, '$1 a receiver #');
    expect(readSheet(new TextEncoder().encode(filled), 'b')).toMatchObject({
      separationM: 44.667,
      receiver: {type: 'a receiver'},
    });
  });
});
