import {lengthAsWritten, type ReadLength} from '../fieldbook/quantity.ts';
import {type Fields, isMapping} from '../fieldbook/shape.ts';
import type {Sheet} from '../fieldbook/sheet.ts';
import {sheetSections} from '../fieldbook/sheet-shape.ts';
import type {SheetItem} from './result.ts';

/** Sections that are computed with and shown elsewhere, not facts for the record. */
const SHOWN_ELSEWHERE = new Set(['settings']);

/** Every item of the field sheet in its order, blank ones too, so that a report has its line. */
export function sheetItems(sheet: Sheet): SheetItem[] {
  const values: Readonly<Record<string, unknown>> = {...sheet};
  return sheetSections.flatMap(({title, fields}) =>
    itemsOf(fields, values, '').map(({item, value}) => ({section: title, item, value})),
  );
}

function itemsOf(
  fields: Fields,
  values: Readonly<Record<string, unknown>>,
  trail: string,
): Omit<SheetItem, 'section'>[] {
  return Object.entries(fields).flatMap(([name, {key, shape}]) => {
    if (SHOWN_ELSEWHERE.has(name)) return [];
    const item = trail === '' ? key : `${trail}, ${key}`;
    const value = values[name];
    if (isMapping(shape)) {
      return itemsOf(shape.fields, (value ?? {}) as Readonly<Record<string, unknown>>, item);
    }
    return [{item, value: value === undefined ? null : written(name, value)}];
  });
}

/** A value as a person would have written it; the unit is in the name of its property. */
function written(name: string, value: unknown): string {
  if (Array.isArray(value)) return value.map((one) => written(name, one)).join('; ');
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') return `${value}${unitOf(name)}`;
  if (typeof value !== 'object' || value === null) return String(value);
  if ('written' in value) return String(value.written);
  if ('lengthM' in value) return lengthAsWritten(value as ReadLength);
  return Object.entries(value)
    .filter(([, part]) => part !== undefined)
    .map(([part, of]) => `${partName(part)} ${written(part, of)}`)
    .join(', ');
}

function unitOf(name: string): string {
  if (name.endsWith('Deg')) return '°';
  return /[a-z]M$/.test(name) ? ' m' : '';
}

/** `upM` and `planM` are up and plan. */
function partName(property: string): string {
  return property.replace(/(M|Deg)$/, '');
}
