import {createHash} from 'node:crypto';
import {readdirSync, readFileSync} from 'node:fs';
import {join} from 'node:path';
import {describe, expect, test} from 'vitest';
import {FixClass} from '../../src/epochs/epochs.ts';
import type {LogContents} from '../../src/log/contents.ts';
import {accountOf, findingOf, REAL_NMEA_LOGS, readBytes, realLog} from './nmea-text.ts';

/**
 * Facts about the recordings, found by other programs before this one existed and printed in the list
 * of recordings that came with them; `gaps` and `spanS` are over GGA (or GLL) with a position.
 */
interface Facts {
  readonly positions: number;
  readonly intervalS?: number;
  readonly spanS?: number;
  readonly longestGapS?: number;
  /** The commonest, as in the list; `kinds` counts them all. */
  readonly sentences: Readonly<Record<string, number>>;
  readonly kinds: number;
  /** Of positions, by class; of GGA and GNS without a position. */
  readonly classes: Readonly<Record<number, number>>;
  readonly withoutPosition?: number;
  /** Decimals of the minutes. */
  readonly decimals?: number;
  readonly checksums: readonly [good: number, bad: number, absent: number];
  readonly lineEnds: Readonly<Record<string, number>>;
  /** Altitudes as printed; null where GGA has none. */
  readonly altitudesM?: readonly [number, number];
  readonly date?: string;
}

const FACTS: Readonly<Record<string, Facts>> = {
  s01: {
    positions: 120,
    intervalS: 0.5,
    spanS: 59.5,
    longestGapS: 0.5,
    sentences: {GNRMC: 120, GNGGA: 120},
    kinds: 2,
    classes: {[FixClass.fixed]: 120},
    decimals: 7,
    checksums: [240, 0, 0],
    lineEnds: {CRLF: 240},
    altitudesM: [419.015, 419.166],
    date: '2020-04-20',
  },
  s02: {
    positions: 1202,
    intervalS: 1,
    spanS: 1201,
    longestGapS: 1,
    sentences: {GPGGA: 1202, GPGSA: 1201, GPRMC: 1201, GPVTG: 1201, GPGSV: 943},
    kinds: 5,
    classes: {[FixClass.autonomous]: 1202},
    decimals: 4,
    checksums: [5748, 0, 0],
    lineEnds: {CRLF: 5747, none: 1},
    altitudesM: [1, 17.4],
    date: '2014-04-03',
  },
  s03: {
    positions: 15,
    intervalS: 1,
    spanS: 14,
    longestGapS: 1,
    sentences: {'!AIVDM': 696, GPGLL: 16, GPGBS: 16, GPRMC: 15, GPGGA: 15, '!AIVDO': 7},
    kinds: 6,
    classes: {[FixClass.differential]: 15},
    decimals: 5,
    checksums: [765, 0, 0],
    lineEnds: {CRLF: 765},
    altitudesM: [2.7, 3.6],
    date: '2014-04-16',
  },
  s04: {
    positions: 993,
    intervalS: 1,
    spanS: 1063,
    longestGapS: 72,
    sentences: {GPGSV: 5178, GLGSV: 3849, GPGSA: 1307, GPVTG: 1307, GPRMC: 1307, GPGGA: 1307},
    kinds: 6,
    classes: {[FixClass.differential]: 993},
    withoutPosition: 314,
    decimals: 6,
    checksums: [14_255, 0, 0],
    lineEnds: {CRLF: 14_255},
    altitudesM: [108, 2188],
    date: '2017-03-31',
  },
  s05: {
    positions: 122,
    intervalS: 0.1,
    spanS: 641.9,
    longestGapS: 629.9,
    sentences: {GPGGA: 72, GPRMC: 72, GNGGA: 50, GNRMC: 50},
    kinds: 4,
    classes: {[FixClass.differential]: 104, [FixClass.fixed]: 18},
    decimals: 8,
    checksums: [244, 0, 0],
    lineEnds: {CRLF: 244},
    altitudesM: [277.995, 280.833],
    date: '2020-03-18',
  },
  s06: {
    positions: 29,
    intervalS: 1,
    spanS: 28,
    longestGapS: 1,
    sentences: {
      GPGSV: 174,
      GLGSV: 174,
      GAGSV: 174,
      GBGSV: 174,
      GNGSA: 116,
      GNRMC: 29,
      GNVTG: 29,
      GNGGA: 29,
      GNGLL: 29,
      GNGST: 29,
      GNZDA: 29,
    },
    kinds: 12,
    classes: {[FixClass.autonomous]: 29},
    decimals: 5,
    checksums: [1015, 0, 0],
    lineEnds: {CRLF: 1015},
    altitudesM: [14.2, 14.8],
    date: '2019-04-12',
  },
  s07: {
    positions: 187,
    intervalS: 1,
    spanS: 186,
    longestGapS: 2,
    sentences: {GPGSV: 438, GPGGA: 224, GPGLL: 224, GPGSA: 224, GPRMC: 224, GPVTG: 224},
    kinds: 6,
    classes: {[FixClass.autonomous]: 187},
    withoutPosition: 37,
    decimals: 4,
    checksums: [1558, 0, 0],
    lineEnds: {LF: 1558},
    altitudesM: [102, 109.44],
    date: '2019-03-12',
  },
  s08: {
    positions: 73,
    intervalS: 1,
    spanS: 78,
    longestGapS: 2,
    sentences: {GPGSV: 79, GPRMC: 74, GPVTG: 73, GPGGA: 73, GPGSA: 26},
    kinds: 5,
    classes: {[FixClass.none]: 5, [FixClass.autonomous]: 68},
    decimals: 4,
    checksums: [325, 0, 0],
    lineEnds: {LF: 325},
    altitudesM: [2.5, 22.8],
    date: '2007-04-08',
  },
  s09: {
    positions: 5,
    intervalS: 1,
    spanS: 4,
    longestGapS: 1,
    sentences: {
      GPGSV: 25,
      GPGST: 5,
      GPGBS: 5,
      GPGGA: 5,
      GPGLL: 5,
      GPGNS: 5,
      GPRMC: 5,
      GPVTG: 5,
      GPZDA: 5,
      GPGRS: 5,
      GPGSA: 5,
    },
    kinds: 11,
    classes: {[FixClass.autonomous]: 5},
    decimals: 5,
    checksums: [75, 0, 0],
    // The list counts one more: the comment line, which is left out of the copy here.
    lineEnds: {LF: 75},
    date: '2012-03-22',
  },
  s10: {
    positions: 138,
    intervalS: 1,
    spanS: 143,
    longestGapS: 3,
    sentences: {
      SDHDG: 1457,
      GPGSV: 436,
      WIMWV: 300,
      GPZDA: 154,
      SDVLW: 150,
      SDVHW: 150,
      WIMWD: 150,
      SDDPT: 149,
      SDMTW: 149,
      GPBOD: 149,
      GPXTE: 149,
    },
    kinds: 22,
    classes: {[FixClass.autonomous]: 138},
    decimals: 4,
    checksums: [4999, 0, 0],
    // The list counts one more: the comment line, which is left out of the copy here.
    lineEnds: {CRLF: 4999},
    altitudesM: [-6, -4],
    date: '2018-08-20',
  },
  s11: {
    positions: 157,
    intervalS: 1,
    spanS: 156,
    longestGapS: 1,
    sentences: {
      GPGSV: 1114,
      GNGSA: 785,
      GBGSV: 720,
      GLGSV: 628,
      GAGSV: 628,
      GNGLL: 158,
      GNRMC: 157,
      GNVTG: 157,
      GNGGA: 157,
      GQGSV: 157,
    },
    kinds: 10,
    classes: {[FixClass.differential]: 157},
    decimals: 5,
    checksums: [4661, 0, 0],
    // The list counts line feeds anywhere, 4662 behind CR and 1308 alone; here only those that end
    // lines count, and those within binary data do not: 4661 sentences, three pieces of it that
    // happen to be text.
    lineEnds: {CRLF: 4661, LF: 3},
    altitudesM: [54.6, 54.6],
    date: '2022-02-08',
  },
  s12: {
    positions: 28,
    spanS: 80,
    longestGapS: 10,
    sentences: {
      '!AIVDM': 90,
      YDGSV: 84,
      YDMWV: 80,
      YDDPT: 55,
      YDHDG: 54,
      YDVTG: 45,
      YDVWR: 30,
      YDVWT: 30,
      YDGSA: 28,
      YDGGA: 28,
      YDMDA: 28,
    },
    kinds: 23,
    classes: {[FixClass.autonomous]: 28},
    decimals: 4,
    checksums: [867, 0, 0],
    lineEnds: {CRLF: 867},
    altitudesM: [-9.07, -7.93],
    date: '2021-04-05',
  },
  s13: {
    positions: 48,
    intervalS: 12,
    spanS: 564,
    longestGapS: 12,
    sentences: {GPGGA: 48, GPRMC: 48},
    kinds: 2,
    classes: {[FixClass.autonomous]: 48},
    decimals: 6,
    checksums: [96, 0, 0],
    lineEnds: {CRLF: 96},
    altitudesM: [39.6, 51.9],
    date: '2023-11-07',
  },
  s14: {
    positions: 36,
    intervalS: 1,
    spanS: 35,
    longestGapS: 1,
    sentences: {BDGSV: 140, GPGSV: 105, GNGSA: 70, GNGGA: 36, GNGLL: 35, GNRMC: 35, GNVTG: 35},
    kinds: 7,
    classes: {[FixClass.autonomous]: 36},
    decimals: 5,
    checksums: [456, 0, 0],
    lineEnds: {CRLF: 456},
    altitudesM: [21.4, 25],
    date: '2016-07-29',
  },
  s15: {
    positions: 0,
    sentences: {'!AIVDM': 5},
    kinds: 1,
    classes: {},
    checksums: [5, 0, 0],
    lineEnds: {LF: 5},
  },
  s19: {
    positions: 7250,
    sentences: {
      IIHDT: 14_500,
      IIVHW: 7250,
      IIVPW: 7250,
      IIVTG: 7250,
      IIMWV: 7250,
      IIVWT: 7250,
      GPWCV: 7250,
      GPXTE: 7250,
      GPZDA: 7250,
      IIDBT: 7250,
      GPGLL: 7250,
    },
    kinds: 15,
    // Counted with grep: 7097 GLL sentences with mode D, 153 with mode A.
    classes: {[FixClass.differential]: 7097, [FixClass.autonomous]: 153},
    decimals: 3,
    checksums: [116_000, 0, 0],
    lineEnds: {CRLF: 115_999, none: 1},
  },
  s20: {
    positions: 142,
    intervalS: 1,
    spanS: 141,
    longestGapS: 1,
    sentences: {
      '!AIVDM': 1507,
      SDHDG: 1375,
      GPGSV: 426,
      WIMWV: 282,
      GPGGA: 142,
      GPGLL: 142,
      GPGSA: 142,
      GPRMC: 142,
      GPVTG: 142,
      GPZDA: 142,
    },
    // The list has one kind more, SDVLW: its 1136 sentences are glued to one another, all of them
    // cut or with a wrong checksum, and only sentences that are believed are counted here.
    kinds: 23,
    classes: {[FixClass.autonomous]: 142},
    decimals: 4,
    checksums: [6182, 142, 994],
    // Of the glued sentences only the last of each line has the line end; the last line has none.
    lineEnds: {CRLF: 6323, none: 994 + 1},
    altitudesM: [-2, 10],
    date: '2014-04-16',
  },
  s22: {
    positions: 21,
    intervalS: 0.5,
    spanS: 10,
    longestGapS: 0.5,
    sentences: {GPHDT: 215, GPGGA: 215, GPVTG: 215, GPZDA: 108},
    kinds: 4,
    classes: {[FixClass.fixed]: 0, [FixClass.autonomous]: 21},
    withoutPosition: 194,
    decimals: 7,
    checksums: [753, 0, 0],
    lineEnds: {LF: 753},
    altitudesM: [6.668, 11.706],
    date: '2018-09-07',
  },
  s24: {
    positions: 0,
    sentences: {GPGSV: 12, GPGGA: 9, GPGLL: 9, GPGSA: 9, GPRMC: 9, GPVTG: 9, GPMSS: 9},
    kinds: 7,
    classes: {},
    withoutPosition: 9,
    checksums: [66, 0, 0],
    lineEnds: {LF: 66},
  },
};

function stepsS({epochs}: LogContents): number[] {
  const {gpsSeconds, count} = epochs;
  return Array.from(
    {length: Math.max(count - 1, 0)},
    (_, i) => gpsSeconds[i + 1]! - gpsSeconds[i]!,
  );
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
}

function isoDay(gpsSeconds: number): string {
  // Days of 86,400 s from the beginning of GPS time; the offset of at most 18 s does not matter to
  // logs that were not recorded at midnight.
  return new Date(Date.UTC(1980, 0, 6) + (gpsSeconds - 18) * 1000).toISOString().slice(0, 10);
}

describe('real recordings', () => {
  test('every NMEA recording in the folder is read', () => {
    const files = readdirSync(join(import.meta.dirname, '../real-logs'));
    const numbered = files.filter((file) => /^s\d\d-/.test(file) && !/^s(16|17|18|23)/.test(file));
    expect(numbered.sort()).toEqual([...REAL_NMEA_LOGS]);
  });

  test('the copies are those that README.md describes', () => {
    const readme = readFileSync(join(import.meta.dirname, '../real-logs/README.md'), 'utf8');
    for (const file of REAL_NMEA_LOGS) {
      const sum = createHash('sha256').update(realLog(file)).digest('hex');
      const section = readme.slice(readme.indexOf(`## ${file}`));
      expect(section.slice(0, section.indexOf('\n## '))).toContain(sum);
    }
  });

  test.each(REAL_NMEA_LOGS)('reference: the published facts about %s are found', (file) => {
    const facts = FACTS[file.slice(0, 3)]!;
    const contents = readBytes(realLog(file));
    const account = accountOf(contents);
    const {epochs} = contents;
    expect(epochs.count).toBe(facts.positions);
    expect(account.sentences).toMatchObject(facts.sentences);
    expect(Object.keys(account.sentences)).toHaveLength(facts.kinds);
    const {good, bad, absent} = account.checksums;
    expect([good, bad, absent]).toEqual(facts.checksums);
    const noEnds = {CRLF: 0, LF: 0, 'CR CR LF': 0, none: 0};
    expect(account.lineEnds).toEqual({...noEnds, ...facts.lineEnds});
    expect(account.used + account.ignored + account.rejected).toBe(account.total);
    for (const [fixClass, count] of Object.entries(facts.classes)) {
      expect(epochs.fixClass.filter((one) => one === Number(fixClass))).toHaveLength(count);
    }
    expect(findingOf(contents, 'no-position')?.values.sentences ?? 0).toBe(
      facts.withoutPosition ?? 0,
    );
    if (facts.decimals !== undefined) {
      const stepDeg = 10 ** -facts.decimals / 60;
      expect(contents.resolution.latitudeDeg).toBeCloseTo(stepDeg, 15);
      expect(contents.resolution.longitudeDeg).toBeCloseTo(stepDeg, 15);
    }
    const steps = stepsS(contents);
    // The list prints one decimal.
    if (facts.intervalS !== undefined) expect(median(steps)).toBeCloseTo(facts.intervalS, 1);
    if (facts.longestGapS !== undefined) {
      expect(Math.max(...steps)).toBeCloseTo(facts.longestGapS, 1);
    }
    const spanS = epochs.gpsSeconds.at(-1)! - epochs.gpsSeconds[0]!;
    if (facts.spanS !== undefined) expect(Math.abs(spanS - facts.spanS)).toBeLessThan(0.05);
    if (facts.altitudesM !== undefined) {
      expect([Math.min(...epochs.altitudeM), Math.max(...epochs.altitudeM)]).toEqual(
        facts.altitudesM,
      );
    }
    if (facts.date !== undefined) expect(isoDay(epochs.gpsSeconds[0]!)).toBe(facts.date);
  });

  test('reference: empty separations leave the ellipsoidal height absent', () => {
    for (const file of [
      's07-cold-start-no-geoid-time-back.log',
      's20-moored-bad-checksums-ais.log.gz',
    ]) {
      const {epochs} = readBytes(realLog(file));
      expect(epochs.separationM.every((value) => Number.isNaN(value))).toBe(true);
      expect(epochs.ellipsoidalHeightM.every((value) => Number.isNaN(value))).toBe(true);
      expect(epochs.altitudeM.some((value) => Number.isNaN(value))).toBe(false);
    }
  });

  test('reference: time runs back once in s07, at the sentence where the list says so', () => {
    const contents = readBytes(realLog('s07-cold-start-no-geoid-time-back.log'));
    expect(findingOf(contents, 'time-back')?.values).toMatchObject({times: 1});
    const {gpsSeconds} = contents.epochs;
    expect(gpsSeconds.every((value, i) => i === 0 || value >= gpsSeconds[i - 1]!)).toBe(true);
  });

  test('reference: GST of s06 has the medians that the list prints', () => {
    const {epochs} = readBytes(realLog('s06-south-east-gst-signal-ids.log'));
    expect(median([...epochs.sigmaNorthM])).toBeCloseTo(2.3, 5);
    expect(median([...epochs.sigmaEastM])).toBeCloseTo(3.5, 5);
    expect(median([...epochs.sigmaUpM])).toBeCloseTo(4.1, 5);
  });

  test('reference: s24 has nine zero positions, none believed', () => {
    const contents = readBytes(realLog('s24-zero-positions-mss.log'));
    expect(contents.epochs.count).toBe(0);
    expect(findingOf(contents, 'zero-position')?.values).toEqual({sentences: 9});
  });

  test('a log of GLL alone gives plan positions and asks for a date', () => {
    const contents = readBytes(realLog('s19-sailing-gll-zda-only.log.gz'));
    expect(findingOf(contents, 'plan-only')?.values).toEqual({source: 'GLL', epochs: 7250});
    expect(findingOf(contents, 'no-date')).toBeDefined();
  });

  test('satellites used are those of the GSA sentences of all systems together', () => {
    // First burst of s06: 8 GPS, 3 GLONASS, 3 Galileo, 6 BeiDou, counted by hand.
    const {epochs} = readBytes(realLog('s06-south-east-gst-signal-ids.log'));
    expect(epochs.satellites[0]).toBe(20);
    expect(epochs.pdop[0]).toBeCloseTo(1.05, 6);
    expect(epochs.vdop[0]).toBeCloseTo(0.83, 6);
  });
});
