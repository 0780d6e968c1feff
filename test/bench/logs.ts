import {closeSync, openSync, writeSync} from 'node:fs';
import {nmeaSentences} from '../simulate/nmea-writer.ts';
import {above, HARBOUR_NMEA} from '../simulate/quillmere.ts';
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
