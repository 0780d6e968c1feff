import {describe, expect, test} from 'vitest';
import {EpochFlag, FixClass, SatelliteSystem} from '../../src/epochs/epochs.ts';
import {accountOf, findingOf, gga, lines, readText, rmc, sentence} from './nmea-text.ts';

const GSA = (hdop: string, ids = '13,16,21,15,10,29,27,20,,,,') =>
  `GNGSA,A,3,${ids},1.05,${hdop},0.83,1`;

describe('the fields of an epoch', () => {
  test('come from the sentences that share its time', () => {
    const {epochs} = readText(
      lines(
        gga('120000.00'),
        rmc('120000.00', '050826'),
        'GNGST,120000.00,15,0.011,0.009,12.3,0.012,0.034,0.056',
        GSA('0.64'),
      ),
    );
    expect(epochs.count).toBe(1);
    expect(epochs.latitudeDeg[0]).toBe(48 + 7.038 / 60);
    expect(epochs.longitudeDeg[0]).toBe(11 + 31 / 60);
    expect(epochs.altitudeM[0]).toBe(545.4);
    expect(epochs.separationM[0]).toBeCloseTo(46.9, 5);
    expect(epochs.ellipsoidalHeightM[0]).toBe(545.4 + 46.9);
    expect(epochs.fixClass[0]).toBe(FixClass.fixed);
    expect(epochs.satellites[0]).toBe(8);
    expect(epochs.hdop[0]).toBeCloseTo(0.8, 6);
    expect(epochs.pdop[0]).toBeCloseTo(1.05, 6);
    expect(epochs.vdop[0]).toBeCloseTo(0.83, 6);
    expect(epochs.correctionAgeS[0]).toBe(1);
    expect(epochs.stationId[0]).toBe(123);
    // Latitude is north, longitude east.
    expect(epochs.sigmaNorthM[0]).toBeCloseTo(0.012, 8);
    expect(epochs.sigmaEastM[0]).toBeCloseTo(0.034, 8);
    expect(epochs.sigmaUpM[0]).toBeCloseTo(0.056, 8);
    expect(epochs.flags[0]).toBe(0);
    expect(epochs.lineNumber[0]).toBe(1);
  });

  test('are absent where the log leaves them empty', () => {
    const {epochs} = readText(lines('GPGGA,120000.00,4807.0,S,01131.0,W,1,,,,M,,M,,'));
    expect(epochs.latitudeDeg[0]).toBe(-(48 + 7 / 60));
    expect(epochs.longitudeDeg[0]).toBe(-(11 + 31 / 60));
    expect(epochs.satellites[0]).toBe(255);
    expect(epochs.stationId[0]).toBe(65_535);
    for (const column of [
      'altitudeM',
      'separationM',
      'ellipsoidalHeightM',
      'hdop',
      'pdop',
    ] as const) {
      expect(epochs[column][0]).toBeNaN();
    }
    expect(epochs.flags[0]! & EpochFlag.planOnly).not.toBe(0);
  });

  test('an altitude without a separation is no ellipsoidal height', () => {
    const contents = readText(lines('GPGGA,120000.00,4807.0,N,01131.0,E,1,08,0.9,545.4,M,,M,,'));
    expect(contents.epochs.altitudeM[0]).toBe(545.4);
    expect(contents.epochs.ellipsoidalHeightM[0]).toBeNaN();
    expect(findingOf(contents, 'separation-absent')?.values).toEqual({epochs: 1, ofEpochs: 1});
  });

  test('sentences of one epoch need not stand together', () => {
    const {epochs} = readText(
      lines(
        gga('120000.00'),
        'GNZDA,120000.12,05,08,2026,00,00',
        gga('120001.00'),
        'GNGST,120000.00,15,,,,0.012,0.034,0.056',
        'GNGST,120001.00,15,,,,0.112,0.034,0.056',
      ),
    );
    expect(epochs.count).toBe(2);
    expect(epochs.sigmaNorthM[0]).toBeCloseTo(0.012, 7);
    expect(epochs.sigmaNorthM[1]).toBeCloseTo(0.112, 7);
  });

  test('several rates in one log: positions ten times as often as RMC', () => {
    const text = [...Array(30).keys()]
      .map((k) => {
        const time = `1200${String(Math.floor(k / 10)).padStart(2, '0')}.${k % 10}0`;
        return lines(gga(time), ...(k % 10 === 0 ? [rmc(time, '050826')] : []));
      })
      .join('');
    const contents = readText(text);
    expect(contents.epochs.count).toBe(30);
    expect(findingOf(contents, 'no-date')).toBeUndefined();
    expect(findingOf(contents, 'mixed-rates')).toBeUndefined();
  });

  test('two rates one after the other are told', () => {
    const slow = [...Array(20).keys()].map((k) => gga(`1200${String(k).padStart(2, '0')}.00`));
    const fast = [...Array(40).keys()].map((k) => gga(`12010${(k / 10).toFixed(2)}`));
    const contents = readText(lines(...slow, ...fast));
    expect(findingOf(contents, 'mixed-rates')?.values).toMatchObject({commonS: 0.1, otherS: 1});
  });
});

describe('validity', () => {
  test.each([
    ['quality 0', gga('120000.00', {quality: 0}), 'A', true],
    ['status V', gga('120000.00'), 'V', true],
    ['status A', gga('120000.00'), 'A', false],
  ])('%s', (_, body, status, invalid) => {
    const {epochs} = readText(lines(body, rmc('120000.00', '050826', status)));
    expect((epochs.flags[0]! & EpochFlag.invalid) !== 0).toBe(invalid);
  });

  test('mode N of RMC makes an epoch invalid, navigational status V does not', () => {
    const body = (tail: string) => `GNRMC,120000.00,A,4807.0,N,01131.0,E,0.0,,050826,,,${tail}`;
    const flagged = (tail: string) => readText(lines(gga('120000.00'), body(tail))).epochs.flags[0];
    expect(flagged('N')).toBe(EpochFlag.invalid);
    expect(flagged('R,V')).toBe(0);
  });

  test.each([
    ['RR', FixClass.fixed],
    ['RF', FixClass.float],
    ['RD', FixClass.differential],
    ['AAAAN', FixClass.autonomous],
    ['RNNN', FixClass.fixed],
    ['PR', FixClass.precise],
    ['NN', FixClass.none],
    ['RE', FixClass.notMeasured],
    ['', FixClass.unknown],
    ['X', FixClass.unknown],
  ])('GNS with the modes %j has class %i', (modes, fixClass) => {
    const body = `GNGNS,120000.00,4807.0,N,01131.0,E,${modes},14,0.8,545.4,46.9,,,V`;
    expect(readText(lines(body)).epochs.fixClass[0]).toBe(fixClass);
  });

  test('the quality of GGA outranks the modes of GNS', () => {
    const gns = 'GNGNS,120000.00,4807.0,N,01131.0,E,AA,14,0.8,545.4,46.9,,,V';
    for (const order of [
      [gga('120000.00'), gns],
      [gns, gga('120000.00')],
    ]) {
      const {epochs} = readText(lines(...order));
      expect(epochs.count).toBe(1);
      expect(epochs.fixClass[0]).toBe(FixClass.fixed);
    }
  });

  test('a position of zeros is none, whatever its quality', () => {
    const zero = (quality: number) =>
      `GPGGA,120000.00,0000.0,N,00000.0,E,${quality},08,0.9,0.0,M,0.0,M,,`;
    const contents = readText(lines(zero(0), zero(1)));
    expect(contents.epochs.count).toBe(0);
    expect(findingOf(contents, 'zero-position')?.values).toEqual({sentences: 2});
  });
});

describe('satellites used', () => {
  test('are summed over systems, each satellite once', () => {
    const {epochs} = readText(
      lines(
        gga('120000.00', {satellites: '12'}),
        GSA('0.64', '13,16,21,15,,,,,,,,'),
        'GNGSA,A,3,66,67,68,,,,,,,,,,1.05,0.64,0.83,2',
        // The same again, as some receivers repeat it.
        GSA('0.64', '13,16,21,15,,,,,,,,'),
        gga('120001.00', {satellites: '12'}),
      ),
    );
    expect(epochs.satellites[0]).toBe(7);
    expect(epochs.flags[0]! & EpochFlag.satellitesAtLeast).toBe(0);
    expect(epochs.satellites[1]).toBe(12);
    expect(epochs.flags[1]! & EpochFlag.satellitesAtLeast).not.toBe(0);
  });

  test('without system ids, a talker of one system and GN do not count a satellite twice', () => {
    const {epochs} = readText(
      lines(
        gga('120000.00'),
        'GPGSA,A,3,13,16,,,,,,,,,,,1.05,0.64,0.83',
        'GNGSA,A,3,13,16,66,,,,,,,,,,1.05,0.64,0.83',
      ),
    );
    expect(epochs.satellites[0]).toBe(3);
  });

  test('twelve means twelve when the log has larger counts', () => {
    const {epochs} = readText(
      lines(gga('120000.00', {satellites: '12'}), gga('120001.00', {satellites: '14'})),
    );
    expect(epochs.flags[0]! & EpochFlag.satellitesAtLeast).toBe(0);
  });

  test('GNS says how many more than twelve there are', () => {
    const gns = 'GNGNS,120000.00,4807.0380000,N,01131.0000000,E,RR,19,0.8,545.4,46.9,,,V';
    const {epochs} = readText(lines(gga('120000.00', {satellites: '12'}), gns));
    expect(epochs.satellites[0]).toBe(19);
    expect(epochs.flags[0]! & EpochFlag.satellitesAtLeast).toBe(0);
  });
});

describe('GSA belongs to its burst', () => {
  const times = [...Array(20).keys()].map((k) => `1200${String(k).padStart(2, '0')}.00`);
  const hdops = times.map((_, k) => (0.6 + 0.1 * (k % 7)).toFixed(1));

  test('trailing it', () => {
    const bodies = times.flatMap((time, k) => [gga(time, {hdop: hdops[k]!}), pdopOf(k)]);
    const {epochs} = readText(lines(...bodies));
    expect([...epochs.pdop].slice(2).map((v) => v.toFixed(2))).toEqual(expected(2));
  });

  test('leading it', () => {
    const bodies = times.flatMap((time, k) => [pdopOf(k), gga(time, {hdop: hdops[k]!})]);
    const {epochs} = readText(lines(...bodies));
    expect([...epochs.pdop].map((v) => v.toFixed(2))).toEqual(expected(0));
  });

  test('leading it in a log that begins in the middle of a burst', () => {
    const bodies = times.flatMap((time, k) => [pdopOf(k), gga(time, {hdop: hdops[k]!})]);
    const {epochs} = readText(lines(...bodies.slice(1)));
    // Only where the HDOP changes for the first time it could not be known yet.
    expect([...epochs.pdop].slice(2).map((v) => v.toFixed(2))).toEqual(expected(2));
  });

  test('inside it', () => {
    const bodies = times.flatMap((time, k) => [
      gga(time, {hdop: hdops[k]!}),
      pdopOf(k),
      rmc(time, '050826'),
    ]);
    const {epochs} = readText(lines(...bodies));
    expect([...epochs.pdop].map((v) => v.toFixed(2))).toEqual(expected(0));
  });

  test('gives the HDOP that GGA leaves empty', () => {
    const {epochs} = readText(lines(gga('120000.00', {hdop: ''}), GSA('0.64')));
    expect(epochs.hdop[0]).toBeCloseTo(0.64, 6);
  });

  function pdopOf(k: number): string {
    return `GNGSA,A,3,13,16,21,15,,,,,,,,,${(2 + k / 100).toFixed(2)},${hdops[k]},0.83,1`;
  }
  function expected(from: number): string[] {
    return times.map((_, k) => (2 + k / 100).toFixed(2)).slice(from);
  }
});

describe('repetition and order', () => {
  test('of two talkers the better position is kept, of equals that of all systems', () => {
    const gp = gga('120000.00', {talker: 'GP', quality: 4, east: '01131.0000005'});
    const gn = gga('120000.00', {talker: 'GN', quality: 5});
    for (const order of [
      [gp, gn],
      [gn, gp],
    ]) {
      const contents = readText(lines(...order));
      expect(contents.epochs.count).toBe(1);
      expect(contents.epochs.fixClass[0]).toBe(FixClass.fixed);
      expect(findingOf(contents, 'two-talkers')?.values).toEqual({epochs: 1, talkers: 'GN, GP'});
    }
    const equals = [gp, gga('120000.00', {talker: 'GN', quality: 4})];
    for (const order of [equals, [...equals].reverse()]) {
      expect(readText(lines(...order)).epochs.longitudeDeg[0]).toBe(11 + 31 / 60);
    }
  });

  test('a repeated sentence is a repeated epoch', () => {
    const positions = [gga('120000.00'), gga('120000.00'), gga('120001.00')];
    const contents = readText(lines(...positions, rmc('120001.00', '050826')));
    expect(contents.epochs.count).toBe(3);
    expect([...contents.epochs.flags]).toEqual([0, EpochFlag.repeated, EpochFlag.frozen]);
    expect(findingOf(contents, 'repeated-epochs')?.values).toEqual({epochs: 1});
    expect(findingOf(contents, 'frozen-run')?.values).toEqual({
      epochs: 1,
      longestEpochs: 3,
      longestS: 1,
    });
  });

  test('an epoch that stands too late is put into order', () => {
    const contents = readText(
      lines(...['120000.00', '120002.00', '120001.00', '120003.00'].map((time) => gga(time))),
    );
    const {epochs} = contents;
    expect([...epochs.lineNumber]).toEqual([1, 3, 2, 4]);
    expect(epochs.flags[1]! & EpochFlag.outOfOrder).not.toBe(0);
    expect(findingOf(contents, 'time-back')?.values).toEqual({
      times: 1,
      largestS: 1,
      firstLineNumber: 3,
    });
  });
});

describe('positions without GGA and GNS', () => {
  test('come from RMC, in plan only', () => {
    const contents = readText(
      lines(
        rmc('120000.00', '050826'),
        rmc('120001.00', '050826', 'V'),
        'GNGLL,4907.0,N,01131.0,E,120002.00,A,A',
      ),
    );
    const {epochs} = contents;
    expect(epochs.count).toBe(2);
    expect(epochs.latitudeDeg[0]).toBe(48 + 7.038 / 60);
    expect(epochs.ellipsoidalHeightM[0]).toBeNaN();
    expect(epochs.fixClass[0]).toBe(FixClass.autonomous);
    expect(epochs.flags[0]).toBe(EpochFlag.planOnly);
    expect(epochs.flags[1]! & EpochFlag.invalid).not.toBe(0);
    expect(findingOf(contents, 'plan-only')?.values).toEqual({source: 'RMC', epochs: 2});
    expect(accountOf(contents).lines.ignored).toEqual({GLL: 1});
  });

  test('come from GLL where there is nothing else, dated by ZDA', () => {
    const contents = readText(
      lines(
        'GPGLL,4907.0,N,01131.0,E,120002.00,A',
        'GPZDA,120002.00,05,08,2026,00,00',
        'GPGLL,4907.1,N,01131.0,E,120003.00,V',
        'GPGLL,,,,,120004.00,V',
      ),
    );
    expect(contents.epochs.count).toBe(2);
    expect(contents.epochs.fixClass[0]).toBe(FixClass.unknown);
    expect(contents.epochs.flags[1]! & EpochFlag.invalid).not.toBe(0);
    expect(findingOf(contents, 'plan-only')?.values).toEqual({source: 'GLL', epochs: 2});
    expect(findingOf(contents, 'no-date')).toBeUndefined();
    expect(accountOf(contents).used).toBe(4);
  });

  test('are not mixed with those of GGA', () => {
    const {epochs} = readText(lines(rmc('115959.00', '050826'), gga('120000.00')));
    expect(epochs.count).toBe(1);
    expect(epochs.flags[0]).toBe(0);
  });
});

describe('satellites seen', () => {
  test('are sampled once in 30 s, with the strongest signal of each', () => {
    const text = [...Array(65).keys()]
      .map((k) => {
        const time = `12${String(Math.floor(k / 60)).padStart(2, '0')}${String(k % 60).padStart(2, '0')}.00`;
        return lines(
          gga(time),
          'GPGSV,1,1,02,13,45,100,40,16,20,200,,1',
          'GPGSV,1,1,02,13,45,100,44,16,20,200,00,6',
          'GLGSV,1,1,01,66,-3,010,30',
          'GNGSV,1,1,01,70,10,020,31',
        );
      })
      .join('');
    const contents = readText(`${lines(rmc('115959.00', '050826'))}${text}`);
    const {satellites, epochs} = contents;
    expect(satellites.count).toBe(3 * 4);
    expect([...satellites.satelliteId].slice(0, 4)).toEqual([13, 16, 66, 70]);
    expect([...satellites.system].slice(0, 4)).toEqual([
      SatelliteSystem.gps,
      SatelliteSystem.gps,
      SatelliteSystem.glonass,
      SatelliteSystem.glonass,
    ]);
    expect(satellites.carrierToNoiseDbHz[0]).toBe(44);
    expect(satellites.carrierToNoiseDbHz[1]).toBeNaN();
    expect(satellites.elevationDeg[2]).toBe(-3);
    const starts = [0, 4, 8].map((row) => satellites.gpsSeconds[row]! - epochs.gpsSeconds[0]!);
    expect(starts).toEqual([0, 30, 60]);
    const {lines: account} = accountOf(contents);
    expect(account.ignored).toEqual({GSV: 4 * 62});
  });

  test('a GSV sentence of a sample that cannot be read is rejected', () => {
    const account = accountOf(
      readText(lines(gga('120000.00'), 'GPGSV,1,1,01,13,45,x,40', gga('120040.00'))),
    );
    expect(account.lines.rejected).toEqual({'unreadable number': 1});
    expect(account.rejectedLines[0]?.lineNumber).toBe(2);
    expect(account.used + account.ignored + account.rejected).toBe(account.total);
  });
});

describe('datum', () => {
  test('is stated when DTM names another than WGS 84, or offsets', () => {
    const read = (body: string) => readText(lines(gga('120000.00'), body, body));
    expect(read('GNDTM,W84,,0.0,N,0.0,E,0.0,W84').datumStated).toBeNull();
    const other = read('GPDTM,999,CH95,0.08,N,0.07,E,-47.7,W84');
    expect(other.datumStated).toBe(
      '999 CH95 with offsets 0.08 minutes north, 0.07 minutes east, -47.7 m up',
    );
    expect(findingOf(other, 'datum-not-wgs84')).toBeDefined();
    const changing = readText(
      lines(gga('120000.00'), 'GPDTM,W84,,,,,,,W84', 'GPDTM,P90,,,,,,,W84', 'GPDTM,,,,,,,,'),
    );
    expect(findingOf(changing, 'datum-changes')?.values).toEqual({datums: 'W84, P90'});
  });
});

test('an epoch of every sentence start is counted where it stands', () => {
  const {epochs} = readText(`\n\n${sentence(gga('120000.00'))}\r\n`);
  expect([...epochs.lineNumber]).toEqual([3]);
});
