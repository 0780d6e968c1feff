import {expect, test} from 'vitest';
import {decodeText, lineAt} from '../../src/fieldbook/decode-text.ts';

test('a byte-order mark is dropped', () => {
  expect(decodeText(new Uint8Array([0xef, 0xbb, 0xbf, 0x61]), 'x')).toBe('a');
});

test('bytes that are not UTF-8 are refused with their line', () => {
  const latin1 = new Uint8Array([0x61, 0x0a, 0x62, 0xfc, 0x72, 0x0a]);
  expect(() => decodeText(latin1, 'x')).toThrow(
    expect.objectContaining({
      lineNumber: 2,
      message: expect.stringContaining('save the file as UTF-8'),
    }),
  );
});

test('control characters are refused with their line', () => {
  expect(() => decodeText(new Uint8Array([0x61, 0x0a, 0x00]), 'x')).toThrow(
    expect.objectContaining({lineNumber: 2}),
  );
});

test('a file far too large is refused before it is read', () => {
  expect(() => decodeText(new Uint8Array(32 * 1024 * 1024 + 1), 'x')).toThrow(/at most 32 MB/);
});

test('lineAt counts from 1', () => {
  expect([0, 1, 2, 9].map((index) => lineAt('a\nb', index))).toEqual([1, 1, 2, 2]);
});
