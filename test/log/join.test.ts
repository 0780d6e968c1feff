import {describe, expect, test} from 'vitest';
import {EpochFlag} from '../../src/epochs/epochs.ts';
import {InputError} from '../../src/errors.ts';
import {joinLogs} from '../../src/log/join.ts';
import {findingOf, gga, lines, readBytes, readText, realLog, rmc} from './nmea-text.ts';

const GSV = 'GPGSV,1,1,01,13,45,100,40';

function log(name: string, seconds: readonly number[], east = '01131.0000000') {
  const bodies = seconds.map((second) => gga(`1200${String(second).padStart(2, '0')}.00`, {east}));
  return readText(lines(rmc('115900.00', '050826'), GSV, ...bodies), {name});
}

function permutations<T>(items: readonly T[]): T[][] {
  if (items.length < 2) return [[...items]];
  return items.flatMap((item, k) =>
    permutations(items.filter((_, other) => other !== k)).map((rest) => [item, ...rest]),
  );
}

describe('logs joined', () => {
  const first = log('a.log', [0, 1, 2, 3]);
  const second = log('b.log', [2, 3, 4, 5], '01131.0000001');
  const third = log('c.log', [8, 9]);

  test('stand in time order, with overlap flagged as repeated', () => {
    const joined = joinLogs([second, first]);
    const {epochs} = joined;
    const t0 = epochs.gpsSeconds[0]!;
    expect([...epochs.gpsSeconds].map((t) => t - t0)).toEqual([0, 1, 2, 2, 3, 3, 4, 5]);
    expect([...epochs.inputIndex]).toEqual([0, 0, 0, 1, 0, 1, 1, 1]);
    const repeated = [...epochs.flags].map((flags) => (flags & EpochFlag.repeated) !== 0);
    expect(repeated).toEqual([false, false, false, true, false, true, false, false]);
    expect(joined.inputs.map(({name}) => name)).toEqual(['a.log', 'b.log']);
    expect(findingOf(joined, 'logs-overlap')?.values).toEqual({epochs: 2});
  });

  test('property: give the same in any order of the arguments', () => {
    const expected = joinLogs([first, second, third]);
    for (const order of permutations([first, second, third])) {
      expect(joinLogs(order)).toEqual(expected);
    }
  });

  test('property: also logs of one name, span and size', () => {
    const twins = [log('a.log', [0, 1]), log('a.log', [0, 1], '01131.0000009'), first];
    for (const order of permutations(twins)) expect(joinLogs(order)).toEqual(joinLogs(twins));
  });

  test('one log stays as it is', () => {
    expect(joinLogs([first])).toBe(first);
  });

  test('satellites are merged by time', () => {
    const {satellites} = joinLogs([third, first]);
    expect(satellites.count).toBe(2);
    expect(satellites.gpsSeconds[0]).toBeLessThanOrEqual(satellites.gpsSeconds[1]!);
  });

  test('findings carry the name of their log', () => {
    const joined = joinLogs([first, third]);
    expect(findingOf(joined, 'frozen-run')?.values).toMatchObject({input: 'a.log'});
    expect(findingOf(joined, 'logs-overlap')).toBeUndefined();
  });

  test('the coarsest resolution and differences between logs are told', () => {
    const coarse = readText(
      lines(
        rmc('130000.00', '050826'),
        'GPGGA,130000.00,4807.03,N,01131.00,E,1,08,0.9,545.4,M,,M,,',
      ),
      {name: 'd.log'},
    );
    const joined = joinLogs([first, coarse]);
    expect(joined.resolution.latitudeDeg).toBeCloseTo(0.01 / 60, 15);
    expect(joined.resolution.separationM).toBeCloseTo(0.001, 15);
    expect(findingOf(joined, 'resolutions-differ')?.values).toMatchObject({
      finestDeg: 1e-7 / 60,
      coarsestDeg: 0.01 / 60,
    });
  });

  test('different datums are told', () => {
    const other = readText(
      lines(rmc('130000.00', '050826'), gga('130000.00'), 'GPDTM,P90,,,,,,,W84'),
    );
    const joined = joinLogs([first, other]);
    expect(joined.datumStated).toBe('P90');
    expect(findingOf(joined, 'datums-differ')?.values).toEqual({datums: 'P90, WGS 84'});
  });

  test('a real log cut in two and joined has the epochs of the whole', () => {
    const bytes = realLog('s02-about-at-rest-20min-q1.log.gz');
    const cut = bytes.indexOf(0x0a, 170_000) + 1;
    const whole = readBytes(bytes);
    const joined = joinLogs([readBytes(bytes.subarray(cut)), readBytes(bytes.subarray(0, cut))]);
    expect(joined.epochs.count).toBe(whole.epochs.count);
    expect(joined.epochs.gpsSeconds).toEqual(whole.epochs.gpsSeconds);
    expect(joined.epochs.latitudeDeg).toEqual(whole.epochs.latitudeDeg);
    expect(joined.epochs.flags).toEqual(whole.epochs.flags);
  });

  test('logs without epochs go last', () => {
    const empty = readText('# nothing\r\n', {name: '0.log'});
    expect(joinLogs([empty, first]).inputs.map(({name}) => name)).toEqual(['a.log', '0.log']);
  });

  test('more than 256 are refused, none is a defect', () => {
    expect(() => joinLogs(Array(257).fill(first))).toThrow(InputError);
    expect(() => joinLogs([])).toThrow(RangeError);
  });
});
