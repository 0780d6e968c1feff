import {describe, expect, test} from 'vitest';
import {EpochFlag} from '../../src/epochs/epochs.ts';
import {randomFrom} from '../simulate/random.ts';
import {accountOf, readBytes, realLog} from './nmea-text.ts';
import {uglyLog} from './ugly.ts';

const LOGS = 10_000;

/** Short beginnings of logs of every kind. */
const SEEDS = [
  uglyLog(),
  realLog('s01-rtk-fixed-static-2hz.nmea').subarray(0, 1500),
  realLog('s06-south-east-gst-signal-ids.log').subarray(0, 2600),
  realLog('s07-cold-start-no-geoid-time-back.log').subarray(15_000, 17_000),
  realLog('s09-poor-geometry-gns-gst-grs.log').subarray(0, 2000),
  realLog('s11-base-fixed-position-rtcm-mixed.bin.gz').subarray(0, 4000),
  realLog('s13-phone-prefixed-lines-12s.nmea').subarray(0, 1500),
  realLog('s15-ais-tag-blocks.nmea'),
  realLog('s20-moored-bad-checksums-ais.log.gz').subarray(0, 3000),
  realLog('s24-zero-positions-mss.log').subarray(0, 1500),
];

describe('mutated logs', () => {
  test(`property: the accounts of ${LOGS} of them add up`, {timeout: 300_000}, () => {
    const random = randomFrom(20_260_805, 'mutated logs');
    const below = (limit: number) => Math.floor(random.uniform() * limit);

    /** Changes, removes, repeats or inserts bytes at one to eight places. */
    function mutated(seed: Uint8Array): Uint8Array {
      let bytes = Buffer.from(seed);
      for (let change = below(8); change >= 0; change -= 1) {
        const at = below(bytes.length);
        const length = below(60);
        const [head, part, tail] = [
          bytes.subarray(0, at),
          bytes.subarray(at, at + length),
          bytes.subarray(at + length),
        ];
        switch (below(6)) {
          case 0:
            bytes[at] = below(256);
            break;
          case 1:
            bytes = Buffer.concat([head, tail]);
            break;
          case 2:
            bytes = Buffer.concat([head, part, part, tail]);
            break;
          case 3:
            bytes = Buffer.concat([
              head,
              Buffer.from([...Array(length)].map(() => below(256))),
              tail,
            ]);
            break;
          case 4:
            bytes = Buffer.concat([head, Buffer.from('$\r\n*,!\\'[below(7)]!), part, tail]);
            break;
          default:
            bytes = Buffer.concat([tail, head]);
        }
        if (bytes.length === 0) return bytes;
      }
      return bytes;
    }

    let lines = 0;
    let rejected = 0;
    for (let k = 0; k < LOGS; k += 1) {
      const bytes = mutated(SEEDS[k % SEEDS.length]!);
      const contents = readBytes(bytes, {trustAbsentChecksum: k % 2 === 0}, 1 + below(3000));
      const account = accountOf(contents);
      const {good, bad, absent} = account.checksums;
      const ends = Object.values(account.lineEnds).reduce((a, b) => a + b, 0);
      const {epochs} = contents;
      const ascending = epochs.gpsSeconds.every(
        (t, i) => i === 0 || t >= epochs.gpsSeconds[i - 1]!,
      );
      const believable = epochs.latitudeDeg.every((lat) => Math.abs(lat) <= 90);
      if (
        account.used + account.ignored + account.rejected !== account.total ||
        ends !== account.total ||
        good + bad + absent > account.total ||
        account.betweenBytes > bytes.length ||
        account.bytes !== bytes.length ||
        !ascending ||
        !believable ||
        epochs.flags.some((flags) => flags >= EpochFlag.planOnly * 2)
      ) {
        expect.fail(`log ${k}: ${JSON.stringify(Buffer.from(bytes).toString('latin1'))}`);
      }
      lines += account.total;
      rejected += account.rejected;
    }
    expect(lines).toBeGreaterThan(LOGS * 20);
    expect(rejected).toBeGreaterThan(LOGS / 2);
  });
});
