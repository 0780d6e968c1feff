import {LF} from './bytes.ts';
import {BATCH_PADDING_BYTES, LONGEST_PIECE_BYTES} from './decode.ts';

/** What takes the batches: `bytes` as `NmeaDecoder.decode` wants them. */
export type TakeBatch = (bytes: Uint8Array, length: number, isLast: boolean) => void;

/**
 * Cuts a stream of chunks of any size into batches that end at line feeds.
 *
 * The bytes are copied into one buffer, which is handed out when it is full; what follows the last
 * line feed stays for the next batch. A buffer without a line feed is cut into whole pieces of the
 * greatest length, as the decoder would cut it.
 */
export class BatchCutter {
  readonly #batchBytes: number;
  readonly #take: TakeBatch;
  readonly #buffer: Uint8Array;
  #filled = 0;

  /** @param batchBytes at least twice `LONGEST_PIECE_BYTES` */
  constructor(batchBytes: number, take: TakeBatch) {
    if (batchBytes < 2 * LONGEST_PIECE_BYTES) {
      throw new RangeError(`BatchCutter: a batch of ${batchBytes} bytes is too short`);
    }
    this.#batchBytes = batchBytes;
    this.#take = take;
    this.#buffer = new Uint8Array(batchBytes + BATCH_PADDING_BYTES);
  }

  add(chunk: Uint8Array): void {
    let from = 0;
    while (from < chunk.length) {
      const bytes = Math.min(chunk.length - from, this.#batchBytes - this.#filled);
      this.#buffer.set(chunk.subarray(from, from + bytes), this.#filled);
      this.#filled += bytes;
      from += bytes;
      if (this.#filled === this.#batchBytes) this.#cut();
    }
  }

  /** Hands out what is left; `endsLog` says whether the log ends with it. */
  finish(endsLog: boolean): void {
    this.#take(this.#buffer, this.#filled, endsLog);
    this.#filled = 0;
  }

  #cut(): void {
    const lineFeed = this.#buffer.lastIndexOf(LF, this.#filled - 1);
    const length =
      lineFeed >= 0
        ? lineFeed + 1
        : Math.trunc(this.#filled / LONGEST_PIECE_BYTES) * LONGEST_PIECE_BYTES;
    this.#take(this.#buffer, length, false);
    this.#buffer.copyWithin(0, length, this.#filled);
    this.#filled -= length;
  }
}
