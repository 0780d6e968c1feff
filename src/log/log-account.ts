import {
  type BatchAccount,
  Checksum,
  EXAMPLES_PER_REASON,
  emptyAccount,
  LINE_END_NAMES,
} from './account.ts';
import {kindOfAddress, typeOfAddress} from './addresses.ts';
import type {InputLog, RejectedLine} from './contents.ts';
import {REJECTION_WORDS, type Rejection} from './rejections.ts';
import {SentenceKind} from './sentence-columns.ts';

/** Kinds of which every sentence that could be decoded is used. */
const ALWAYS_USED: readonly SentenceKind[] = [
  SentenceKind.gga,
  SentenceKind.gns,
  SentenceKind.rmc,
  SentenceKind.gst,
  SentenceKind.gsa,
  SentenceKind.zda,
  SentenceKind.dtm,
];

/** The account of a log, summed over its batches: used + ignored + rejected = total. */
export class LogAccount {
  readonly #sum: BatchAccount = emptyAccount();
  readonly #sentences = new Map<string, number>();
  readonly #examples: RejectedLine[] = [];
  readonly #examplesOf = new Uint8Array(REJECTION_WORDS.length);
  #gsvSampled = 0;
  #gsvRejected = 0;

  /** Line feeds in the batches so far: the lines before the next one. */
  get lineFeeds(): number {
    return this.#sum.lineFeeds;
  }

  get betweenBytes(): number {
    return this.#sum.betweenBytes;
  }

  get zeroPositions(): number {
    return this.#sum.zeroPositions;
  }

  get endsCut(): boolean {
    return this.#sum.endsCut;
  }

  get checksums(): InputLog['checksums'] {
    const count = (kind: number) => this.#sum.checksums[kind] ?? 0;
    return {
      good: count(Checksum.good),
      bad: count(Checksum.bad),
      absent: count(Checksum.absent),
    };
  }

  /** Batches are to be added in their order in the log. */
  add(batch: BatchAccount): void {
    const sum = this.#sum;
    for (const {lineFeedsBefore, reason, excerpt} of batch.examples) {
      this.#example(reason, sum.lineFeeds + lineFeedsBefore + 1, excerpt);
    }
    sum.lines += batch.lines;
    sum.lineFeeds += batch.lineFeeds;
    sum.blank += batch.blank;
    sum.comments += batch.comments;
    sum.text += batch.text;
    sum.betweenBytes += batch.betweenBytes;
    sum.zeroPositions += batch.zeroPositions;
    sum.endsCut = batch.endsCut;
    addCounts(sum.lineEnds, batch.lineEnds);
    addCounts(sum.checksums, batch.checksums);
    addCounts(sum.decoded, batch.decoded);
    addCounts(sum.rejected, batch.rejected);
    for (const [address, count] of batch.sentences) {
      this.#sentences.set(address, (this.#sentences.get(address) ?? 0) + count);
    }
  }

  /** A GSV sentence that belongs to a sample has been decoded, or could not be. */
  sampledGsv(reason: Rejection, lineNumber: number, excerpt: () => string): void {
    if (reason === 0) this.#gsvSampled += 1;
    else {
      this.#gsvRejected += 1;
      this.#sum.rejected[reason] = (this.#sum.rejected[reason] ?? 0) + 1;
      this.#example(reason, lineNumber, excerpt());
    }
  }

  #example(reason: Rejection, lineNumber: number, excerpt: string): void {
    const kept = this.#examplesOf[reason] ?? 0;
    if (kept >= EXAMPLES_PER_REASON) return;
    this.#examplesOf[reason] = kept + 1;
    this.#examples.push({lineNumber, reason: REJECTION_WORDS[reason] ?? '', excerpt});
  }

  /** @param gllUsed whether the positions are those of GLL sentences */
  lines(gllUsed: boolean): InputLog['lines'] {
    const {decoded, lines} = this.#sum;
    const gllUsedLines = gllUsed ? (decoded[SentenceKind.gll] ?? 0) : 0;
    const used = ALWAYS_USED.reduce<number>((sum, kind) => sum + (decoded[kind] ?? 0), 0);
    return {
      total: lines,
      used: used + gllUsedLines + this.#gsvSampled,
      ignored: this.#ignored(gllUsed),
      rejected: counted(
        REJECTION_WORDS.map((words, reason): [string, number] => [
          words,
          this.#sum.rejected[reason] ?? 0,
        ]),
      ),
    };
  }

  #ignored(gllUsed: boolean): Record<string, number> {
    const ignored = new Map<string, number>([
      ['blank', this.#sum.blank],
      ['comment', this.#sum.comments],
      ['text', this.#sum.text],
      ['GSV', -this.#gsvSampled - this.#gsvRejected],
    ]);
    for (const [address, count] of this.#sentences) {
      const kind = kindOfAddress(address);
      if (ALWAYS_USED.includes(kind) || (kind === SentenceKind.gll && gllUsed)) continue;
      const type = typeOfAddress(address);
      ignored.set(type, (ignored.get(type) ?? 0) + count);
    }
    return counted([...ignored]);
  }

  rejectedLines(): RejectedLine[] {
    return [...this.#examples].sort((a, b) => a.lineNumber - b.lineNumber);
  }

  /** By talker and type. */
  sentences(): Record<string, number> {
    return counted([...this.#sentences]);
  }

  lineEnds(): InputLog['lineEnds'] {
    const [crlf, lf, crCrLf, none] = LINE_END_NAMES;
    const count = (end: number) => this.#sum.lineEnds[end] ?? 0;
    return {[crlf]: count(0), [lf]: count(1), [crCrLf]: count(2), [none]: count(3)};
  }
}

function addCounts(to: Uint32Array, from: Uint32Array): void {
  for (let k = 0; k < to.length; k += 1) to[k] = (to[k] ?? 0) + (from[k] ?? 0);
}

/** Those that occur, by name, so that the order of the log leaves no trace. */
function counted(counts: ReadonlyArray<readonly [string, number]>): Record<string, number> {
  const occurring = counts.filter(([, count]) => count > 0);
  return Object.fromEntries(occurring.sort(([a], [b]) => (a < b ? -1 : 1)));
}
