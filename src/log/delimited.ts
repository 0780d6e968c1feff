import {COMMA} from './bytes.ts';

const TAB = 0x09;
const BLANK = 0x20;
const QUOTE = 0x22;
const SEMICOLON = 0x3b;

export type Delimiter = 'comma' | 'semicolon' | 'tab' | 'blanks';

const DELIMITER_BYTE: Readonly<Record<Exclude<Delimiter, 'blanks'>, number>> = {
  comma: COMMA,
  semicolon: SEMICOLON,
  tab: TAB,
};

/** Fields of a row that are told apart; what stands behind the last one is only counted. */
export const MOST_FIELDS = 256;

/**
 * Finds the fields of a row as byte ranges, without blanks and quotes around them.
 *
 * With `blanks`, any run of blanks and tabs parts two fields, so that a field cannot be empty. With
 * the other delimiters every delimiter counts. A field in double quotes may hold the delimiter.
 * Source of the quotes: RFC 4180; the doubling of quotes inside is not undone, because no number,
 * time or name needs it.
 */
export class FieldSplitter {
  /** Field `k` is the bytes from `starts[k]` to before `ends[k]`. */
  readonly starts = new Int32Array(MOST_FIELDS);
  readonly ends = new Int32Array(MOST_FIELDS);
  count = 0;
  readonly #delimiter: number;

  constructor(delimiter: Delimiter) {
    this.#delimiter = delimiter === 'blanks' ? BLANK : DELIMITER_BYTE[delimiter];
  }

  split(bytes: Uint8Array, from: number, to: number): void {
    this.count = 0;
    if (this.#delimiter === BLANK) this.#splitAtBlanks(bytes, from, to);
    else this.#splitAtDelimiter(bytes, from, to);
  }

  start(field: number): number {
    return this.starts[field] ?? 0;
  }

  end(field: number): number {
    return this.ends[field] ?? 0;
  }

  isEmpty(field: number): boolean {
    return this.end(field) <= this.start(field);
  }

  #splitAtBlanks(bytes: Uint8Array, from: number, to: number): void {
    let at = from;
    while (at < to) {
      while (at < to && isBlank(bytes[at])) at += 1;
      if (at === to) return;
      const start = at;
      if (bytes[at] === QUOTE) at = afterQuote(bytes, at, to);
      while (at < to && !isBlank(bytes[at])) at += 1;
      this.#take(bytes, start, at);
    }
  }

  #splitAtDelimiter(bytes: Uint8Array, from: number, to: number): void {
    const delimiter = this.#delimiter;
    let at = from;
    while (true) {
      while (at < to && bytes[at] !== delimiter && isBlank(bytes[at])) at += 1;
      const start = at;
      if (at < to && bytes[at] === QUOTE) at = afterQuote(bytes, at, to);
      while (at < to && bytes[at] !== delimiter) at += 1;
      let end = at;
      while (end > start && isBlank(bytes[end - 1])) end -= 1;
      this.#take(bytes, start, end);
      if (at >= to) return;
      at += 1;
    }
  }

  #take(bytes: Uint8Array, start: number, end: number): void {
    if (this.count < MOST_FIELDS) {
      const quoted = end - start >= 2 && bytes[start] === QUOTE && bytes[end - 1] === QUOTE;
      this.starts[this.count] = quoted ? start + 1 : start;
      this.ends[this.count] = quoted ? end - 1 : end;
    }
    this.count += 1;
  }
}

export function isBlank(byte: number | undefined): boolean {
  return byte === BLANK || byte === TAB;
}

/** Behind the closing quote; the field itself when the quote never closes. */
function afterQuote(bytes: Uint8Array, at: number, to: number): number {
  const closing = bytes.indexOf(QUOTE, at + 1);
  return closing < 0 || closing >= to ? at + 1 : closing + 1;
}

const decoder = new TextDecoder('utf-8', {ignoreBOM: true});

/** The bytes of a field as text. */
export function textOf(bytes: Uint8Array, from: number, to: number): string {
  return decoder.decode(bytes.subarray(from, to));
}

/** The fields of one line as texts, for the few lines that decide how a table is read. */
export function fieldTexts(line: string, delimiter: Delimiter): string[] {
  const bytes = new TextEncoder().encode(line);
  const splitter = new FieldSplitter(delimiter);
  splitter.split(bytes, 0, bytes.length);
  const texts: string[] = [];
  for (let k = 0; k < Math.min(splitter.count, MOST_FIELDS); k += 1) {
    texts.push(textOf(bytes, splitter.start(k), splitter.end(k)));
  }
  return texts;
}
