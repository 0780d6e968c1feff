import {describe, expect, test} from 'vitest';
import {NumberDecoder, NumberState} from '../../src/log/delimited-number.ts';
import {randomFrom} from '../simulate/random.ts';

const DOT = 0x2e;
const COMMA = 0x2c;

function decoded(text: string, mark = DOT): {value: number; state: number; decimals: number} {
  const decoder = new NumberDecoder(mark);
  // Bytes around the field must not be looked at.
  const bytes = new TextEncoder().encode(`7${text}7`);
  const value = decoder.decode(bytes, 1, bytes.length - 1);
  return {value, state: decoder.state, decimals: decoder.decimals};
}

describe('NumberDecoder', () => {
  const numbers: readonly (readonly [string, number, number])[] = [
    ['0', 0, 0],
    ['-0.50', -0.5, 2],
    ['+12', 12, 0],
    ['.5', 0.5, 1],
    ['5.', 5, 0],
    ['4051761.6267707', 4051761.6267707, 7],
    ['50.123456789012345678', 50.123456789012344, 18],
    ['1e3', 1000, 0],
    ['1.5D-03', 0.0015, 4],
    ['-4.05176E+06', -4051760, 0],
    ['0.20000004768372', 0.20000004768372, 14],
  ];

  test.each(numbers)('%s', (text, value, decimals) => {
    expect(decoded(text)).toEqual({value, state: NumberState.present, decimals});
  });

  test.each(['', 'nan', 'NaN', 'NA', 'n/a', 'null', '-', '--', '***', '?'])(
    '%j is absent',
    (text) => {
      expect(decoded(text)).toMatchObject({value: Number.NaN, state: NumberState.absent});
    },
  );

  test.each(['1.2.3', '12a', '1 2', '0x10', 'inf', '1e', 'e5', '1,5', '--5', '1e9999', '1e999'])(
    '%j is unreadable',
    (text) => {
      expect(decoded(text)).toMatchObject({value: Number.NaN, state: NumberState.unreadable});
    },
  );

  test('a decimal comma where it is the decimal mark', () => {
    expect(decoded('-3,25', COMMA)).toEqual({
      value: -3.25,
      state: NumberState.present,
      decimals: 2,
    });
    expect(decoded('3.25', COMMA).state).toBe(NumberState.unreadable);
    expect(decoded('1,5e-2', COMMA).value).toBe(0.015);
  });

  // ECMA-262, StringToNumber, rounds correctly; so must the decoder, to the last bit.
  test('property: 20,000 random numbers come out as Number reads them', () => {
    const random = randomFrom(20260504, 'delimited numbers');
    let compared = 0;
    for (let k = 0; k < 20_000; k += 1) {
      const decimals = Math.floor(random.uniform() * 12);
      const text = ((random.uniform() - 0.5) * 10 ** Math.floor(random.uniform() * 9)).toFixed(
        decimals,
      );
      const {value} = decoded(text);
      if (!Object.is(value, Number(text))) expect(`${text}: ${value}`).toBe(text);
      compared += 1;
    }
    expect(compared).toBe(20_000);
  });
});
