import {describe, expect, test} from 'vitest';
import {LineCutter, MOST_LINE_BYTES} from '../../src/log/delimited-lines.ts';

function linesOf(parts: readonly Uint8Array[]): {
  lines: string[];
  long: boolean[];
  ends: Readonly<Record<string, number>>;
} {
  const lines: string[] = [];
  const long: boolean[] = [];
  const cutter = new LineCutter((bytes, from, to, tooLong) => {
    lines.push(new TextDecoder().decode(bytes.subarray(from, to)));
    long.push(tooLong);
  });
  for (const part of parts) cutter.add(part);
  cutter.finish();
  return {lines, long, ends: {...cutter.lineEnds}};
}

const encode = (text: string): Uint8Array => new TextEncoder().encode(text);

describe('LineCutter', () => {
  test('counts every kind of line end', () => {
    expect(linesOf([encode('a\r\nb\n\r\r\nc\r\r\nd')])).toEqual({
      lines: ['a', 'b', '', 'c', 'd'],
      long: [false, false, false, false, false],
      ends: {CRLF: 1, LF: 1, 'CR CR LF': 2, none: 1},
    });
  });

  test('nothing is no line, and a line feed at the end opens none', () => {
    expect(linesOf([]).lines).toEqual([]);
    expect(linesOf([encode('a\n')]).lines).toEqual(['a']);
  });

  test('property: any two cuts give the same lines', () => {
    const bytes = encode('time,x\r\n1,2\n\n3,4\r\r\n\r\nlast');
    const whole = linesOf([bytes]);
    for (let a = 0; a <= bytes.length; a += 1) {
      for (let b = a; b <= bytes.length; b += 1) {
        const parts = [bytes.subarray(0, a), bytes.subarray(a, b), bytes.subarray(b)];
        expect(linesOf(parts)).toEqual(whole);
      }
    }
  });

  test.each([-2, -1, 0, 1, 2, 3, 1000])(
    'property: a line of the longest length and %i bytes is the same in one part and in many',
    (more) => {
      const line = 'x'.repeat(MOST_LINE_BYTES + more);
      const bytes = encode(`a\n${line}\r\nb\n`);
      const whole = linesOf([bytes]);
      expect(whole.long).toEqual([false, more >= 0, false]);
      for (const size of [1000, 65_536, 65_537, 65_539, 65_540]) {
        const parts: Uint8Array[] = [];
        for (let at = 0; at < bytes.length; at += size) parts.push(bytes.subarray(at, at + size));
        expect(linesOf(parts)).toEqual(whole);
      }
    },
  );
});
