import {SatellitesBuilder} from '../epochs/satellites-builder.ts';
import {SECONDS_PER_DAY} from '../time/calendar.ts';
import {asciiOf} from './bytes.ts';
import type {DayTrack} from './day-track.ts';
import {SatelliteSample} from './gsv.ts';
import {ASSEMBLER_OPEN_S, SampleWindow} from './gsv-window.ts';
import type {LogAccount} from './log-account.ts';
import {type SentenceColumns, SentenceKind} from './sentence-columns.ts';
import {SentenceFields} from './sentence-fields.ts';

/** Where the fields of a GSV sentence begin: behind `$`, the address and a comma. */
const FIELDS_AT = 7;

/** Decodes GSV once per 30 s. */
export class SatelliteSampler {
  /** Until the days are known, times are days from the first × 86,400 + time of day. */
  readonly satellites = new SatellitesBuilder();
  /** Epoch at which each sample was taken, and its first row. */
  readonly samples: Array<{readonly epoch: number; readonly firstRow: number}> = [];
  readonly #window = new SampleWindow(ASSEMBLER_OPEN_S, false);
  readonly #sample = new SatelliteSample();
  readonly #fields = new SentenceFields();
  #sampleS = 0;
  #sampleEpoch = 0;
  #textAt = 0;

  beginBatch(): void {
    this.#textAt = 0;
  }

  /** To be told every time that the log prints, with the epoch that it belongs to. */
  seeTime(timeOfDayS: number, days: DayTrack, epoch: number): void {
    if (!this.#window.see(timeOfDayS)) return;
    this.finish();
    this.#sampleS = days.dayOf(timeOfDayS) * SECONDS_PER_DAY + timeOfDayS;
    this.#sampleEpoch = epoch;
  }

  /** Takes the next GSV row of the batch. */
  take({gsv, gsvText}: SentenceColumns, row: number, account: LogAccount): void {
    const from = this.#textAt;
    const end = from + (gsv.bytes[row] ?? 0);
    this.#textAt = end;
    if (!this.#window.open) return;
    this.#fields.begin(gsvText.byte, from + FIELDS_AT, end, SentenceKind.gsv);
    const talker = ((gsvText.byte[from + 1] ?? 0) << 8) | (gsvText.byte[from + 2] ?? 0);
    const reason = this.#sample.take(this.#fields, talker);
    const lineNumber = account.lineFeeds + (gsv.lineFeedsBefore[row] ?? 0) + 1;
    account.sampledGsv(reason, lineNumber, () => asciiOf(gsvText.byte, from, end));
  }

  /** Ends the sample in work. */
  finish(): void {
    this.samples.push({epoch: this.#sampleEpoch, firstRow: this.satellites.count});
    this.#sample.moveTo(this.satellites, this.#sampleS);
  }
}
