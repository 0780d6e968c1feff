import {describe, expect, test} from 'vitest';
import {
  type AngleKind,
  parseAngle,
  sexagesimal,
  wrappedLongitudeDeg,
} from '../../src/geodesy/angle.ts';
import {readReference} from '../reference/read.ts';
import {randomFrom} from '../simulate/random.ts';

function degreesOf(text: string, kind: AngleKind = 'latitude'): number | string {
  const parsed = parseAngle(text, kind);
  return parsed.kind === 'angle' ? parsed.degrees : parsed.message;
}

describe('angles as people write them', () => {
  test('reference: 109 Australian stations, degrees-minutes-seconds and decimal degrees of X, Y', () => {
    const {rows} = readReference<{
      rows: readonly Readonly<Record<'lon_dms' | 'x' | 'y', string>>[];
    }>('australian-stations-2018');
    for (const row of rows) {
      const fromPlane = (Math.atan2(Number(row.y), Number(row.x)) * 180) / Math.PI;
      const found = degreesOf(row.lon_dms, 'longitude');
      expect(Math.abs(Number(found) - fromPlane)).toBeLessThan(1e-5 / 3600);
    }
  });

  test.each<[string, AngleKind, number]>([
    ['-33.8688', 'latitude', -33.8688],
    ['+33.8688°', 'latitude', 33.8688],
    ['33.8688 S', 'latitude', -33.8688],
    ['S33.8688', 'latitude', -33.8688],
    ['.5', 'latitude', 0.5],
    ['45.', 'latitude', 45],
    ['−33.5', 'latitude', -33.5],
    ['-0 30 00', 'latitude', -0.5],
    ['0°30′00″S', 'latitude', -0.5],
    [`50°30'36"N`, 'latitude', 50.51],
    [`50° 30' 36'' N`, 'latitude', 50.51],
    ['50d30m36s', 'latitude', 50.51],
    ['50d30m36sS', 'latitude', -50.51],
    ['50:30:36', 'latitude', 50.51],
    ['50 30 36', 'latitude', 50.51],
    ['N 50 30 36', 'latitude', 50.51],
    ['50 30.6', 'latitude', 50.51],
    [`50°30.6'`, 'latitude', 50.51],
    ['50:30', 'latitude', 50.5],
    ['  7 ', 'latitude', 7],
    ['-90', 'latitude', -90],
    ['151 12 33.5 E', 'longitude', 151 + 12 / 60 + 33.5 / 3600],
    ['151 12 33.5 w', 'longitude', -(151 + 12 / 60 + 33.5 / 3600)],
    ['359.5', 'longitude', 359.5],
    ['-0', 'longitude', 0],
  ])('%s as %s', (text, kind, expected) => {
    const found = degreesOf(text, kind);
    expect(found).toBeTypeOf('number');
    expect(Number(found)).toBeCloseTo(expected, 13);
    expect(Object.is(found, -0)).toBe(false);
  });

  test.each<[string, AngleKind, RegExp]>([
    ['', 'latitude', /found nothing/],
    ['north', 'latitude', /such as -33.8688/],
    ['91', 'latitude', /between -90 and 90/],
    ['-181', 'longitude', /between -180 and 360/],
    ['50 60 00', 'latitude', /minutes below 60, found 60/],
    ['50 30 60', 'latitude', /seconds below 60, found 60/],
    ['50 30.5 10', 'latitude', /whole minutes/],
    ['50.5 30 10', 'latitude', /such as/],
    ['50 30 10 5', 'latitude', /such as/],
    ['-50 N', 'latitude', /a sign or a hemisphere letter/],
    ['N 50 S', 'latitude', /one hemisphere letter/],
    ['50 E', 'latitude', /need N or S for a latitude, found E/],
    ['50 N', 'longitude', /need E or W for a longitude, found N/],
    ['50,5', 'latitude', /such as/],
    ['1e2', 'longitude', /such as/],
    ['NaN', 'latitude', /such as|letter/],
    ['--5', 'latitude', /such as/],
    ['50 -30 10', 'latitude', /such as/],
    ['0x10', 'latitude', /such as/],
  ])('%s as %s is refused', (text, kind, message) => {
    expect(degreesOf(text, kind)).toMatch(message);
  });
});

describe('angles in degrees, minutes and seconds', () => {
  test('59.9999″ carries into minutes and degrees', () => {
    expect(sexagesimal(9.99999999, 3)).toEqual({
      negative: false,
      degrees: 10,
      minutes: 0,
      seconds: 0,
    });
    expect(sexagesimal(-0.5, 2)).toEqual({negative: true, degrees: 0, minutes: 30, seconds: 0});
    expect(sexagesimal(-1e-9, 3)).toEqual({negative: false, degrees: 0, minutes: 0, seconds: 0});
    expect(sexagesimal(50.51, 5)).toEqual({negative: false, degrees: 50, minutes: 30, seconds: 36});
  });

  test('property: what is split and read again is the angle to the last decimal', () => {
    const random = randomFrom(1, 'angles');
    for (let i = 0; i < 5000; i++) {
      const latitudeDeg = random.between(-90, 90);
      const {negative, degrees, minutes, seconds} = sexagesimal(latitudeDeg, 5);
      expect(minutes).toBeLessThan(60);
      expect(seconds).toBeLessThan(60);
      const text = `${negative ? '-' : ''}${degrees} ${minutes} ${seconds.toFixed(5)}`;
      const found = Number(degreesOf(text));
      expect(Math.abs(found - latitudeDeg) * 3600).toBeLessThan(0.5001e-5);
    }
  });

  test('longitudes wrap into −180 (excluded) to 180', () => {
    expect(wrappedLongitudeDeg(190)).toBe(-170);
    expect(wrappedLongitudeDeg(-180)).toBe(180);
    expect(wrappedLongitudeDeg(-190)).toBe(170);
    expect(wrappedLongitudeDeg(540)).toBe(180);
    expect(wrappedLongitudeDeg(12)).toBe(12);
  });
});
