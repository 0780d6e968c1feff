import {asciiOf} from './bytes.ts';
import {REJECTION_WORDS, type Rejection} from './rejections.ts';
import {SENTENCE_KINDS} from './sentence-columns.ts';

/** Examples kept of each reason. */
export const EXAMPLES_PER_REASON = 5;
const LONGEST_EXCERPT = 80;

export const LineEnd = {crlf: 0, lf: 1, crCrLf: 2, none: 3} as const;
export type LineEnd = (typeof LineEnd)[keyof typeof LineEnd];
export const LINE_END_NAMES = ['CRLF', 'LF', 'CR CR LF', 'none'] as const;

export const Checksum = {good: 0, bad: 1, absent: 2} as const;

/** What became of the bytes of one batch; plain data, so that it can travel between threads. */
export interface BatchAccount {
  lines: number;
  /** Line feeds, between lines too: the lines that an editor would count. */
  lineFeeds: number;
  blank: number;
  comments: number;
  text: number;
  betweenBytes: number;
  /** Positions of exactly 0° 0°, which are not believed. */
  zeroPositions: number;
  /** By `LineEnd`. */
  readonly lineEnds: Uint32Array;
  /** By `Checksum`. */
  readonly checksums: Uint32Array;
  /** Sentences decoded, by `SentenceKind`; of GSV and GLL those that might be needed. */
  readonly decoded: Uint32Array;
  /** Lines rejected, by `Rejection`. */
  readonly rejected: Uint32Array;
  readonly examples: RejectedExample[];
  /** Sentences with a believed checksum, by address. */
  sentences: ReadonlyArray<readonly [address: string, count: number]>;
  /** Whether the log ends inside a sentence. */
  endsCut: boolean;
}

export interface RejectedExample {
  readonly lineFeedsBefore: number;
  readonly reason: Rejection;
  readonly excerpt: string;
}

export function emptyAccount(): BatchAccount {
  return {
    lines: 0,
    lineFeeds: 0,
    blank: 0,
    comments: 0,
    text: 0,
    betweenBytes: 0,
    zeroPositions: 0,
    lineEnds: new Uint32Array(LINE_END_NAMES.length),
    checksums: new Uint32Array(3),
    decoded: new Uint32Array(SENTENCE_KINDS),
    rejected: new Uint32Array(REJECTION_WORDS.length),
    examples: [],
    sentences: [],
    endsCut: false,
  };
}

export function countOne(counts: Uint32Array, index: number): void {
  counts[index] = (counts[index] ?? 0) + 1;
}

/** The beginning of a line for a person to recognise it by. */
export function excerptOf(bytes: Uint8Array, from: number, to: number): string {
  return asciiOf(bytes, from, Math.min(to, from + LONGEST_EXCERPT));
}
