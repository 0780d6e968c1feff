/** What RMC and GLL say of their own position. */
export const SentenceStatus = {notGiven: 0, valid: 1, void: 2} as const;
export type SentenceStatus = (typeof SentenceStatus)[keyof typeof SentenceStatus];

/** By the status letter, `A` or `V`. */
export function statusOf(letter: number): SentenceStatus {
  if (letter === 0x41) return SentenceStatus.valid;
  return letter === 0x56 ? SentenceStatus.void : SentenceStatus.notGiven;
}
