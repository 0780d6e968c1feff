import {describe, expect, test} from 'vitest';
import {
  compassWord,
  coordinateDecimals,
  counted,
  fixed,
  formatAzimuth,
  formatCount,
  formatDms,
  formatDuration,
  formatGivenLength,
  formatLength,
  formatMoment,
  formatPercent,
  formatRate,
  formatUncertainty,
  formatUtc,
  joined,
  proseNumber,
  shownUncertaintyM,
} from '../../src/wording/numbers.ts';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('numbers', () => {
  test('a negative zero is never printed', () => {
    expect(fixed(-0.0004, 3)).toBe('0.000');
    expect(proseNumber(-0, 1, true)).toBe('0.0');
    expect(proseNumber(-1.25, 1, true)).toBe('\u22121.3');
    expect(proseNumber(2, 1, true)).toBe('+2.0');
  });

  test.each([
    [0.0152, '15.2 mm'],
    [0.09996, '100 mm'],
    [0.345, '345 mm'],
    [0.9996, '1.00 m'],
    [12.345, '12.35 m'],
    [345.6, '346 m'],
    [12345, '12.35 km'],
    [-0.0024, '\u22122.4 mm'],
  ])('%f m reads "%s"', (valueM, text) => {
    expect(plain(formatLength(valueM))).toBe(text);
  });

  test('a given length gains no digits', () => {
    expect(plain(formatGivenLength(0.02))).toBe('20 mm');
    expect(plain(formatGivenLength(0.0305))).toBe('30.5 mm');
    expect(plain(formatGivenLength(1.5))).toBe('1.5 m');
  });

  test.each([
    [0.003, 4],
    [0.02, 3],
    [0.2, 2],
    [3, 1],
    [80, 0],
    [0.00001, 4],
  ])('an uncertainty of %f m deserves %i decimals of a metre', (uncertaintyM, decimals) => {
    expect(coordinateDecimals(uncertaintyM)).toBe(decimals);
  });

  test.each([
    [0.0301, '30.1 mm per hour'],
    [0.0006, '0.6 mm per hour'],
    [0.0001, '2.4 mm per day'],
    [0.000002, '17.5 mm per year'],
    [0, '0.0 mm per year'],
    [83.7, '83.70 m per hour'],
  ])('a rate of %f m per hour reads "%s"', (mPerHour, text) => {
    expect(plain(formatRate(mPerHour))).toBe(text);
  });

  test.each([
    [0.05, '0.05 s'],
    [1.5, '1.5 s'],
    [47, '47 s'],
    [200, '3 min 20 s'],
    [3600, '1 h'],
    [8040, '2 h 14 min'],
    [90000, '1 d 1 h'],
  ])('%f s reads "%s"', (durationS, text) => {
    expect(plain(formatDuration(durationS))).toBe(text);
  });

  test('a share is never rounded to a false 0 or 100 percent', () => {
    expect(plain(formatPercent(0))).toBe('0 %');
    expect(plain(formatPercent(0.0001))).toBe('under 0.1 %');
    expect(plain(formatPercent(0.9999))).toBe('99.9 %');
    expect(plain(formatPercent(1))).toBe('100 %');
    expect(plain(formatPercent(0.042))).toBe('4.2 %');
  });

  test('counts, angles, times and lists', () => {
    expect(plain(formatCount(1234567))).toBe('1 234 567');
    expect(plain(counted(1, 'epoch'))).toBe('1 epoch');
    expect(plain(counted(2400, 'epoch'))).toBe('2400 epochs');
    expect(formatAzimuth(359.7)).toBe('000°');
    expect(compassWord(128)).toBe('south-east');
    expect(compassWord(-10)).toBe('north');
    expect(formatUtc('2026-05-04T10:20:30.50Z')).toBe('2026-05-04 10:20:30');
    expect(joined(['a', 'b', 'c'])).toBe('a, b and c');
    const parts = {negative: true, degrees: 5, minutes: 4, seconds: 7.65432};
    expect(plain(formatDms(parts, 3, 'NS'))).toBe('5° 04′ 07.654″ S');
  });
});

describe('formatMoment', () => {
  test('the clock within a day, and the date as well beyond', () => {
    expect(formatMoment('2026-05-12T10:38:09Z', 3600)).toBe('10:38:09');
    expect(formatMoment('2026-05-12T10:38:09Z', 3 * 86_400)).toBe('2026-05-12 10:38:09');
  });
});

describe('uncertainties', () => {
  test('none is ever shown as nothing; the others as any length', () => {
    expect(plain(formatUncertainty(0.000_004))).toBe('0.1 mm');
    expect(plain(formatUncertainty(0.000_16))).toBe('0.2 mm');
    expect(plain(formatUncertainty(0.0123))).toBe('12.3 mm');
    expect(shownUncertaintyM(null)).toBeNull();
    // What does not vary at all is no uncertainty to be rounded up.
    expect(shownUncertaintyM(0)).toBe(0);
  });
});
