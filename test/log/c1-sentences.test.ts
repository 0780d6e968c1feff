import {describe, expect, test} from 'vitest';
import {datumOfDtm} from '../../src/log/uncommon.ts';
import {readReference} from '../reference/read.ts';
import {decoded} from './decoded.ts';
import {accountOf, bytesOf, readText} from './nmea-text.ts';

interface Published {
  readonly sentences: ReadonlyArray<{
    readonly sentence: string;
    readonly talker: string;
    readonly type: string;
    readonly checksum_valid: boolean;
    readonly source: string;
    readonly decoded?: Readonly<Record<string, string | null>>;
  }>;
  readonly constructed_checksums: ReadonlyArray<{
    readonly body: string;
    readonly checksum: string;
  }>;
}

const {sentences, constructed_checksums} = readReference<Published>('c1_nmea');
const valid = sentences.filter((one) => one.checksum_valid);
const POSITIONS = ['GGA', 'GNS', 'RMC', 'GLL'];

/** What a decoded column says, in the terms of the published decodings. */
function ourValues(sentence: string, type: string): Readonly<Record<string, number>> {
  const {columns} = decoded(bytesOf(`${sentence}\r\n`));
  const {fixes, rmc, gll} = columns;
  if (type === 'RMC') {
    return {
      time: rmc.timeOfDayS[0]!,
      lat: rmc.latitudeDeg[0]!,
      lon: rmc.longitudeDeg[0]!,
      date: rmc.dateDays[0]!,
    };
  }
  if (type === 'GLL') {
    return {time: gll.timeOfDayS[0]!, lat: gll.latitudeDeg[0]!, lon: gll.longitudeDeg[0]!};
  }
  return {
    time: fixes.timeOfDayS[0]!,
    lat: fixes.latitudeDeg[0]!,
    lon: fixes.longitudeDeg[0]!,
    satellites: fixes.satellites[0]! === 255 ? Number.NaN : fixes.satellites[0]!,
    hdop: fixes.hdop[0]!,
    altitude: fixes.altitudeM[0]!,
    separation: fixes.separationM[0]!,
    ellipsoid_height: fixes.altitudeM[0]! + fixes.separationM[0]!,
  };
}

function numberOf(name: string, text: string | null | undefined): number {
  if (text === null || text === undefined || text === '') return Number.NaN;
  if (name === 'time') {
    const [hh, mm, ss] = [text.slice(0, 2), text.slice(2, 4), text.slice(4)].map(Number);
    return hh! * 3600 + mm! * 60 + ss!;
  }
  if (name === 'date') {
    const [day, month, short] = [text.slice(0, 2), text.slice(2, 4), text.slice(4)].map(Number);
    return Date.UTC(short! < 80 ? 2000 + short! : 1900 + short!, month! - 1, day) / 86_400_000;
  }
  return Number(text);
}

describe('published sentences', () => {
  test('there are as many as the collection says', () => {
    expect(sentences).toHaveLength(75);
    expect(valid).toHaveLength(73);
  });

  test.each(valid)('reference: $source: $sentence is accepted', ({sentence, talker, type}) => {
    const account = accountOf(readText(`${sentence}\r\n`));
    expect(account.total).toBe(1);
    expect(account.rejected).toBe(0);
    expect(account.checksums).toEqual({good: 1, bad: 0, absent: 0});
    expect(account.sentences).toEqual({[`${talker}${type}`]: 1});
  });

  const withValues = valid.filter((one) => one.decoded && POSITIONS.includes(one.type));
  test.each(withValues)('reference: $source: $sentence has its values', (published) => {
    const ours = ourValues(published.sentence, published.type);
    let compared = 0;
    for (const name of Object.keys(ours)) {
      if (!(name in published.decoded!)) continue;
      const theirs = numberOf(name, published.decoded![name]);
      compared += 1;
      if (name === 'date' && Number.isNaN(theirs)) expect(ours[name]).toBe(-(2 ** 31));
      else if (Number.isNaN(theirs)) expect(ours[name]).toBeNaN();
      // Twelve decimals are printed.
      else expect(Math.abs(ours[name]! - theirs)).toBeLessThan(6e-13 * Math.max(1, theirs));
    }
    expect(compared).toBeGreaterThanOrEqual(3);
  });

  test.each(sentences.filter((one) => !one.checksum_valid))(
    'reference: $source: $sentence has a wrong checksum and is refused',
    ({sentence}) => {
      const account = accountOf(readText(`${sentence}\r\n`));
      expect(account.lines.rejected).toEqual({'bad checksum': 1});
      expect(account.used + account.ignored).toBe(0);
    },
  );

  test.each(constructed_checksums)('reference: $body has the checksum $checksum', (one) => {
    const {checksums} = accountOf(readText(`$${one.body}*${one.checksum}\r\n`));
    // An address has at least three characters: "A" is none.
    expect(checksums).toEqual({good: one.body === 'A' ? 0 : 1, bad: 0, absent: 0});
    const wrong = one.checksum === '00' ? '01' : '00';
    const refused = accountOf(readText(`$${one.body}*${wrong}\r\n`));
    expect(refused.checksums.good).toBe(0);
    expect(refused.rejected).toBe(1);
  });

  test('reference: the published DTM sentences name WGS 84 without offsets', () => {
    const datums = valid.filter(({type}) => type === 'DTM');
    expect(datums.length).toBeGreaterThanOrEqual(2);
    for (const {sentence} of datums) {
      expect(datumOfDtm(sentence.slice(0, sentence.indexOf('*')))).toBe('W84');
    }
  });
});
