import {describe, expect, test} from 'vitest';
import {readSheet} from '../../src/fieldbook/sheet.ts';
import {sheetItems} from '../../src/occupation/sheet-items.ts';

function itemsOf(yaml: string): Map<string, string | null> {
  const sheet = readSheet(new TextEncoder().encode(yaml), 'sheet.yaml');
  return new Map(sheetItems(sheet).map(({item, value}) => [item, value]));
}

describe('sheetItems', () => {
  test('readings stay as they were written, with metres behind other units', () => {
    const items = itemsOf(`
antenna:
  measured: vertical
  measured to: antenna reference point
  before:
    readings: [1.740 m, 1742 mm]
    check readings: [5.715 ft]
receiver: {reduced to mark: no}
`);
    expect(items.get('antenna, before, readings')).toBe('1.740 m; 1742 mm (1.7420 m)');
    expect(items.get('antenna, before, check readings')).toBe('5.715 ft (1.7419 m)');
    expect(items.get('receiver, reduced to mark')).toBe('no');
  });

  test('what nobody gave is there as null', () => {
    const items = itemsOf('mark: P7\n');
    expect(items.get('mark')).toBe('P7');
    expect(items.get('observer')).toBeNull();
    expect(items.size).toBeGreaterThan(60);
  });
});
