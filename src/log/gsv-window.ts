/** Satellites are sampled once in so many seconds. */
const SAMPLE_INTERVAL_S = 30;

/** How long after the first time of an interval the satellites are sampled: one burst at 1 Hz. */
export const ASSEMBLER_OPEN_S = 0.9;
export const DECODER_OPEN_S = 2 * ASSEMBLER_OPEN_S;

/**
 * Tells which GSV sentences belong to a sample: those that follow the first time of a new interval,
 * for a short while, as the sentences of one burst carry no time of their own.
 *
 * The decoder of a batch does not know what came before it and keeps a few sentences too many; the
 * assembler, which sees all times in order, decides. So the decoder must be open whenever the
 * assembler is: it starts open, and its while is twice as long, which covers times that run back
 * within an interval.
 */
export class SampleWindow {
  readonly #openS: number;
  #interval = Number.NaN;
  #startS = Number.NaN;
  #open: boolean;

  constructor(openS: number, openAtFirst: boolean) {
    this.#openS = openS;
    this.#open = openAtFirst;
  }

  get open(): boolean {
    return this.#open;
  }

  /** To be told every time that a sentence carries; says whether a new sample begins. */
  see(timeOfDayS: number): boolean {
    const interval = Math.floor(timeOfDayS / SAMPLE_INTERVAL_S);
    if (interval !== this.#interval) {
      this.#interval = interval;
      this.#startS = timeOfDayS;
      this.#open = true;
      return true;
    }
    if (Math.abs(timeOfDayS - this.#startS) > this.#openS) this.#open = false;
    return false;
  }
}
