import {describe, expect, test} from 'vitest';
import {
  type LengthUnit,
  METRES_PER_UNIT,
  readLength,
  readNumber,
  readRate,
} from '../../src/fieldbook/quantity.ts';

/** Lehmer's generator with the multiplier of Park and Miller (1988), doi:10.1145/63039.63042. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 16_807) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

function lengthM(text: string): number {
  const read = readLength(text);
  return read.kind === 'length' ? read.lengthM : Number.NaN;
}

describe('readLength', () => {
  test('reference: international foot of 1959 and U.S. survey foot (85 FR 62698)', () => {
    expect(lengthM('1 ft')).toBe(0.3048);
    expect(lengthM('3937 us-ft')).toBeCloseTo(1200, 12);
    expect(lengthM('1 us-ft') / lengthM('1 ft')).toBeCloseTo(1.000002000004, 12);
    expect(lengthM('1 in')).toBe(0.0254);
  });

  test('property: a length comes back from every unit and every number of digits', () => {
    const random = seeded(7);
    for (const unit of Object.keys(METRES_PER_UNIT) as LengthUnit[]) {
      for (let i = 0; i < 200; i++) {
        const decimals = Math.floor(random() * 6);
        const written = (random() * 200 - 100).toFixed(decimals);
        const read = readLength(`${written}${i % 2 === 0 ? ' ' : ''}${unit}`);
        if (read.kind === 'refused') throw new Error(read.message);
        const back = read.lengthM / METRES_PER_UNIT[unit];
        expect(back.toFixed(decimals).replace(/^-(0(\.0*)?)$/, '$1')).toBe(
          written.replace(/^-(0(\.0*)?)$/, '$1'),
        );
        expect(read.stepM).toBeCloseTo(10 ** -decimals * METRES_PER_UNIT[unit], 15);
        expect(read.unit).toBe(unit);
      }
    }
  });

  test('whole millimetres and centimetres are the nearest number of metres', () => {
    for (let mm = -3000; mm <= 3000; mm++) {
      expect(lengthM(`${mm} mm`)).toBe(mm === 0 ? 0 : Number((mm / 1000).toFixed(3)));
    }
    expect(lengthM('3 cm')).toBe(0.03);
  });

  test('there is no negative zero', () => {
    expect(Object.is(lengthM('-0.000 m'), 0)).toBe(true);
  });

  test.each([
    ['1.5', 'write "1.5 m"'],
    ['1,5 m', 'write 1.5 m'],
    ["1'234.5 m", 'write 1234.5 m'],
    ['.5 m', 'write 0.5 m'],
    ['5. m', 'write 5 m'],
    ['6 feet', 'write "6 ft"'],
    ['6 M', 'write "6 m"'],
    ['1e3 m', 'write it with a decimal point'],
    ['--1 m', 'write it with a decimal point'],
    ['', 'write for example "1.543 m"'],
  ])('%s is refused with what to write', (text, remedy) => {
    const read = readLength(text);
    expect(read.kind === 'refused' && read.message).toContain(remedy);
  });
});

test('readNumber takes plain decimals only', () => {
  expect(readNumber(' -12.50 ')).toEqual({kind: 'number', value: -12.5});
  for (const text of ['', '0x10', 'Infinity', 'NaN', '1e5', '1.2.3']) {
    expect(readNumber(text).kind).toBe('refused');
  }
});

test('readRate needs "per year"', () => {
  expect(readRate('21.3 mm/yr')).toMatchObject({kind: 'length', lengthM: 0.0213});
  expect(readRate('0.07 ft / yr')).toMatchObject({unit: 'ft'});
  expect(readRate('21.3 mm').kind).toBe('refused');
});
