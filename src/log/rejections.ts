/**
 * Why a line is rejected. A reason is a code of one byte while decoding and these words in the
 * account.
 */
export const Rejection = {
  none: 0,
  /** `*hh` does not match the bytes before it. */
  badChecksum: 1,
  /** A whole sentence without `*hh`, and the options do not trust such sentences. */
  noChecksum: 2,
  /** Ends before its checksum: another sentence, binary data or the end of the log follows. */
  cutShort: 3,
  /** Text that ends in `*hh` but has no beginning, as at the start of a log. */
  noStart: 4,
  /** Begins like a sentence, but no address (letters and digits, then a comma) follows. */
  noAddress: 5,
  tooLong: 6,
  number: 7,
  time: 8,
  position: 9,
  date: 10,
  unit: 11,
  positionWithoutTime: 12,
} as const;
export type Rejection = (typeof Rejection)[keyof typeof Rejection];

export const REJECTION_WORDS: readonly string[] = [
  '',
  'bad checksum',
  'no checksum',
  'cut short',
  'no start',
  'no address',
  'too long',
  'unreadable number',
  'unreadable time',
  'unreadable position',
  'unreadable date',
  'height not in metres',
  'position without time',
];
