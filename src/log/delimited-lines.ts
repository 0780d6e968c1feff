import {CR, LF} from './bytes.ts';

/** A longer line is no row of a table; its first bytes are kept for the account. */
export const MOST_LINE_BYTES = 65_536;
const KEPT_OF_LONG_LINE = 80;

export type LineEnd = 'CRLF' | 'LF' | 'CR CR LF' | 'none';

/** Takes the bytes `from` to before `to`, line end left off. */
export type TakeLine = (bytes: Uint8Array, from: number, to: number, tooLong: boolean) => void;

/**
 * Cuts bytes that arrive in chunks of any size into lines.
 *
 * A line inside one chunk is handed on in place; only a line that a chunk boundary cuts is copied.
 */
export class LineCutter {
  readonly lineEnds: Record<LineEnd, number> = {CRLF: 0, LF: 0, 'CR CR LF': 0, none: 0};
  #carry = new Uint8Array(1024);
  #carried = 0;
  #skipping = false;
  /** The last two bytes of a cut line, which tell its line end. */
  readonly #tail = new Uint8Array(2);
  readonly #take: TakeLine;

  constructor(take: TakeLine) {
    this.#take = take;
  }

  add(chunk: Uint8Array): void {
    let from = 0;
    while (from < chunk.length) {
      const end = chunk.indexOf(LF, from);
      if (end < 0) {
        this.#keep(chunk, from, chunk.length);
        return;
      }
      if (this.#carried === 0 && !this.#skipping) {
        this.#end(chunk, from, end, true);
      } else {
        this.#keep(chunk, from, end);
        this.#endCarried(true);
      }
      from = end + 1;
    }
  }

  /** Hands on what stands behind the last line feed. */
  finish(): void {
    if (this.#carried > 0 || this.#skipping) this.#endCarried(false);
  }

  #endCarried(closed: boolean): void {
    const length = this.#carried;
    const skipped = this.#skipping;
    this.#carried = 0;
    this.#skipping = false;
    if (skipped) {
      this.#count(closed, returnsBefore(this.#tail, 0, 2));
      this.#take(this.#carry, 0, KEPT_OF_LONG_LINE, true);
    } else {
      this.#end(this.#carry, 0, length, closed);
    }
  }

  #end(bytes: Uint8Array, from: number, lineFeed: number, closed: boolean): void {
    const returns = returnsBefore(bytes, from, lineFeed);
    this.#count(closed, returns);
    if (lineFeed - from > MOST_LINE_BYTES) this.#take(bytes, from, from + KEPT_OF_LONG_LINE, true);
    else this.#take(bytes, from, lineFeed - returns, false);
  }

  #count(closed: boolean, returns: number): void {
    if (!closed) this.lineEnds.none += 1;
    else if (returns === 2) this.lineEnds['CR CR LF'] += 1;
    else this.lineEnds[returns === 1 ? 'CRLF' : 'LF'] += 1;
  }

  #keep(bytes: Uint8Array, from: number, to: number): void {
    if (this.#carried + to - from > MOST_LINE_BYTES) this.#skipping = true;
    for (let at = Math.max(from, to - 2); at < to; at += 1) {
      this.#tail[0] = this.#tail[1] ?? 0;
      this.#tail[1] = bytes[at] ?? 0;
    }
    const end = Math.min(to, from + MOST_LINE_BYTES - this.#carried);
    const kept = this.#carried + end - from;
    if (kept > this.#carry.length) {
      const larger = new Uint8Array(Math.max(kept, this.#carry.length * 2));
      larger.set(this.#carry.subarray(0, this.#carried));
      this.#carry = larger;
    }
    this.#carry.set(bytes.subarray(from, end), this.#carried);
    this.#carried = kept;
  }
}

/** Carriage returns, at most two, right before a line feed. */
function returnsBefore(bytes: Uint8Array, from: number, lineFeed: number): number {
  if (lineFeed <= from || bytes[lineFeed - 1] !== CR) return 0;
  return lineFeed - 1 > from && bytes[lineFeed - 2] === CR ? 2 : 1;
}
