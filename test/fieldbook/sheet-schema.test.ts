import {Ajv} from 'ajv';
import {describe, expect, test} from 'vitest';
import {parse} from 'yaml';
import {InputError} from '../../src/errors.ts';
import {blankSheet} from '../../src/fieldbook/blank-sheet.ts';
import {readSheet} from '../../src/fieldbook/sheet.ts';
import {sheetSchema} from '../../src/fieldbook/sheet-schema.ts';
import {fullSheet} from './full-sheet.ts';

const validate = new Ajv({strict: true, strictTypes: false}).compile(sheetSchema());

/** What an editor sees: YAML 1.2 with its core schema, not our reader. */
const editorAccepts = (text: string) => validate(parse(text));

function readerAccepts(text: string): boolean {
  try {
    readSheet(new TextEncoder().encode(text), 'x.yaml');
    return true;
  } catch (error) {
    if (error instanceof InputError) return false;
    throw error;
  }
}

interface Block {
  readonly properties?: Readonly<Record<string, Block>>;
  readonly items?: Block;
}

/** Every way from the top of the schema to a value. */
function keysOf(block: Block, trail: string): string[] {
  if (block.items !== undefined) return keysOf(block.items, trail);
  if (block.properties === undefined) return [trail];
  return Object.entries(block.properties).flatMap(([key, inner]) =>
    keysOf(inner, trail === '' ? key : `${trail}, ${key}`),
  );
}

function keysOfData(value: unknown, trail: string): string[] {
  if (Array.isArray(value)) return value.flatMap((item) => keysOfData(item, trail));
  if (typeof value !== 'object' || value === null) return [trail];
  return Object.entries(value).flatMap(([key, inner]) =>
    keysOfData(inner, trail === '' ? key : `${trail}, ${key}`),
  );
}

describe('sheetSchema', () => {
  test('accepts the blank and the full sheet, as the reader does', () => {
    for (const text of [blankSheet(), fullSheet()]) {
      expect(editorAccepts(text), JSON.stringify(validate.errors)).toBe(true);
      expect(readerAccepts(text)).toBe(true);
    }
  });

  test('knows the keys of the full sheet, which fills in all but the plain eccentricity', () => {
    const known = new Set(keysOf(sheetSchema() as Block, ''));
    const filled = new Set(keysOfData(parse(fullSheet()), ''));
    expect([...filled].filter((key) => !known.has(key))).toEqual([]);
    expect([...known].filter((key) => !filled.has(key))).toEqual([
      'eccentricity, east',
      'eccentricity, north',
    ]);
  });

  test.each([
    'mark: P1',
    'mark: 0012',
    'mark: yes',
    'coordinate epoch: "2020.0"',
    'separation: -12.3 us-ft',
    'separation: 12.3m',
    'eccentricity: {distance: 1 m, bearing: 10.5, bearing from: true north}',
    'antenna: {measured: vertical, measured to: phase centre, phase centre above reference point: 1 cm, before: {readings: [1.8 m]}}',
    'receiver: {reduced to mark: yes}',
    'receiver: {reduced to mark: true}',
    'start: 2026-05-04T08:00Z',
    'start: 2026-05-04 08:00:00.5 +0200',
    'settings: {min-satellites: 5, settle: 90s, max-sigma: 3cm}',
    'standard uncertainties: [{of: base, up: 1 mm}]',
    'tolerance: {}',
  ])('and the reader accept: %s', (text) => {
    expect(editorAccepts(text), JSON.stringify(validate.errors)).toBe(true);
    expect(readerAccepts(text)).toBe(true);
  });

  test.each([
    'observ: x',
    'antenna: {radius: 0.19 m}',
    'antenna: 1.8 m',
    'mark: [P1, P2]',
    'separation: 44.6',
    'separation: 44.6 metres',
    'separation: 44,6 m',
    'separation: "44.6"',
    'coordinate epoch: 1820.0',
    'coordinate epoch: 2020-01-01',
    'antenna: {measured: vertcal}',
    'antenna: {before: {readings: 1.8 m}}',
    'antenna: {before: {readings: [1.8]}}',
    'receiver: {reduced to mark: perhaps}',
    'date: 04.05.2026',
    'start: 2026-05-04 10:00',
    'settings: {min-satellites: six}',
    'settings: {settle: 5}',
    'settings: {max-pdop: 1000}',
    'settings: {max-sigma: 30}',
    'standard uncertainties: {of: base}',
    'standard uncertainties: [{up: 1 mm}]',
    'units: feet',
  ])('and the reader refuse: %s', (text) => {
    expect(editorAccepts(text)).toBe(false);
    expect(readerAccepts(text)).toBe(false);
  });
});
