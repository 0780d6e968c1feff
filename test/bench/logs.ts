import {closeSync, openSync, writeSync} from 'node:fs';
import {sentence} from '../simulate/nmea-fields.ts';
import {nmeaSentences} from '../simulate/nmea-writer.ts';
import {above, HARBOUR_NMEA} from '../simulate/quillmere.ts';
import {randomFrom} from '../simulate/random.ts';
import {scenarioNamed} from '../simulate/scenarios.ts';
import {simulate} from '../simulate/simulate.ts';

/** The usual seven sentences of one epoch. */
const SENTENCES = ['GGA', 'RMC', 'GSA', 'GST', 'VTG', 'GLL', 'ZDA'] as const;

/**
 * Writes a day at 1 Hz, seven sentences an epoch and satellites twice a minute, again and again on
 * following days until the file holds so many days.
 */
export function writeDays(path: string, days: number): void {
  const occupation = simulate(scenarioNamed('F'), 1);
  const file = openSync(path, 'w');
  for (let day = 0; day < days; day++) {
    const lines = nmeaSentences(occupation, {
      ...HARBOUR_NMEA,
      place: above('MOLE', 1.742),
      startS: 0,
      date: {year: 2026, month: 5, day: 4 + day},
      sentences: [...SENTENCES.map((type) => [type, 1] as const), ['GSV', 30]],
    });
    for (let i = 0; i < lines.length; i += 50_000) {
      writeSync(file, `${lines.slice(i, i + 50_000).join('\r\n')}\r\n`);
    }
  }
  closeSync(file);
}

const RATE_HZ = 20;

/**
 * Writes days at 20 Hz with a position and an error estimate an epoch, a date and dilutions a second,
 * so that every column of the epochs is filled. The scatter is white: the log measures memory.
 */
export function writeTwentyHertz(path: string, days: number): void {
  const random = randomFrom(1, 'twenty hertz');
  const file = openSync(path, 'w');
  for (let day = 0; day < days; day++) {
    const date = `${String(4 + day).padStart(2, '0')}0526`;
    for (let minute = 0; minute < 1440; minute++) {
      const hourMinute = `${pad(Math.floor(minute / 60))}${pad(minute % 60)}`;
      const lines: string[] = [];
      for (let k = 0; k < 60 * RATE_HZ; k++) {
        const time = `${hourMinute}${(k / RATE_HZ).toFixed(2).padStart(5, '0')}`;
        const north = (41.993_224_6 + 3e-6 * random.normal()).toFixed(8);
        const east = (18.418_888_9 + 4e-6 * random.normal()).toFixed(8);
        const heightM = (6.9476 + 0.01 * random.normal()).toFixed(4);
        lines.push(
          sentence(
            `GNGGA,${time},41${north},N,152${east},W,4,26,0.57,${heightM},M,-14.600,M,1.0,0731`,
          ),
        );
        if (k % RATE_HZ === 0) {
          lines.push(sentence(`GNRMC,${time},A,,,,,,,${date},,,R,V`));
          lines.push(sentence('GNGSA,A,3,03,07,11,,,,,,,,,,1.09,0.57,0.93,1'));
        }
        lines.push(sentence(`GNGST,${time},,,,,0.0068,0.0061,0.0123`));
      }
      writeSync(file, `${lines.join('\r\n')}\r\n`);
    }
  }
  closeSync(file);
}

function pad(number: number): string {
  return String(number).padStart(2, '0');
}
