import {asciiOf, isDigit, isUpperLetter} from './bytes.ts';
import {SentenceKind} from './sentence-columns.ts';

const KIND_OF_TYPE: Readonly<Record<string, SentenceKind>> = {
  GGA: SentenceKind.gga,
  GNS: SentenceKind.gns,
  RMC: SentenceKind.rmc,
  GST: SentenceKind.gst,
  GSA: SentenceKind.gsa,
  ZDA: SentenceKind.zda,
  GSV: SentenceKind.gsv,
  GLL: SentenceKind.gll,
  DTM: SentenceKind.dtm,
};

/** Letters and digits of the longest address; proprietary ones have no fixed length. */
export const LONGEST_ADDRESS = 15;
const SHORTEST_ADDRESS = 3;
const STANDARD_ADDRESS = 5;
const FIRST_SLOTS = 256;

/** The number of address characters that follow `$` or `!`; 0 when they cannot be an address. */
export function addressLength(bytes: Uint8Array, from: number): number {
  if (!isUpperLetter(bytes[from] ?? 0)) return 0;
  let length = 1;
  while (length <= LONGEST_ADDRESS && isAddressByte(bytes[from + length] ?? 0)) length += 1;
  return length >= SHORTEST_ADDRESS && length <= LONGEST_ADDRESS ? length : 0;
}

function isAddressByte(byte: number): boolean {
  return isUpperLetter(byte) || isDigit(byte);
}

/** The kind of a sentence by its address, such as `GNGGA`; the address after `!` is `!AIVDM`. */
export function kindOfAddress(address: string): SentenceKind {
  if (address.startsWith('P')) return SentenceKind.proprietary;
  if (address.startsWith('!') || address.length !== STANDARD_ADDRESS) return SentenceKind.ignored;
  return KIND_OF_TYPE[address.slice(2)] ?? SentenceKind.ignored;
}

/** The type under which the account lists ignored sentences: `VTG`, `!AIVDM`, `proprietary`. */
export function typeOfAddress(address: string): string {
  if (address.startsWith('!')) return address;
  if (address.startsWith('P')) return 'proprietary';
  return address.length === STANDARD_ADDRESS ? address.slice(2) : address;
}

/**
 * Counts of sentences by address, without a string per sentence.
 *
 * Method: a hash table with open addressing; an address of five characters is told by two integers
 * that hold its bytes, one of another length by comparing its characters.
 */
export class AddressCounts {
  #mask = FIRST_SLOTS - 1;
  #heads = new Int32Array(FIRST_SLOTS);
  #tails = new Int32Array(FIRST_SLOTS);
  #kinds = new Uint8Array(FIRST_SLOTS);
  #counts = new Uint32Array(FIRST_SLOTS);
  /** By slot; empty where no address has been entered. */
  #names: string[] = Array(FIRST_SLOTS).fill('');
  #entered = 0;

  /**
   * Counts one sentence and tells its kind.
   *
   * @param start  place of `$` or `!`
   * @param length of the address
   * @returns      −1 when these characters are no address
   */
  count(bytes: Uint8Array, start: number, length: number): SentenceKind | -1 {
    const head =
      ((bytes[start] ?? 0) << 16) | ((bytes[start + 1] ?? 0) << 8) | (bytes[start + 2] ?? 0);
    const tail =
      length === STANDARD_ADDRESS
        ? ((bytes[start + 3] ?? 0) << 16) | ((bytes[start + 4] ?? 0) << 8) | (bytes[start + 5] ?? 0)
        : hashOf(bytes, start, length);
    let slot = slotOf(head, tail) & this.#mask;
    while (this.#heads[slot] !== 0) {
      if (this.#heads[slot] === head && this.#tails[slot] === tail) {
        if (length === STANDARD_ADDRESS || isName(this.#names[slot], bytes, start, length)) {
          this.#counts[slot] = (this.#counts[slot] ?? 0) + 1;
          return this.#kinds[slot] as SentenceKind;
        }
      }
      slot = (slot + 1) & this.#mask;
    }
    if (addressLength(bytes, start + 1) !== length) return -1;
    const name = asciiOf(bytes, start, start + 1 + length);
    this.#enter(head, tail, name, 1);
    return kindOfAddress(addressOf(name));
  }

  /** What was counted since the last call, without the `$`; the counts start again from zero. */
  take(): Array<[address: string, count: number]> {
    const counts: Array<[string, number]> = [];
    this.#names.forEach((name, slot) => {
      const count = this.#counts[slot] ?? 0;
      if (count > 0) counts.push([addressOf(name), count]);
    });
    this.#counts.fill(0);
    return counts;
  }

  #enter(head: number, tail: number, name: string, count: number): void {
    let slot = slotOf(head, tail) & this.#mask;
    while (this.#heads[slot] !== 0) slot = (slot + 1) & this.#mask;
    this.#heads[slot] = head;
    this.#tails[slot] = tail;
    this.#kinds[slot] = kindOfAddress(addressOf(name));
    this.#counts[slot] = count;
    this.#names[slot] = name;
    this.#entered += 1;
    if (this.#entered * 2 > this.#mask) this.#widen();
  }

  #widen(): void {
    const [heads, tails, counts, names] = [this.#heads, this.#tails, this.#counts, this.#names];
    const slots = names.length * 2;
    this.#mask = slots - 1;
    this.#heads = new Int32Array(slots);
    this.#tails = new Int32Array(slots);
    this.#kinds = new Uint8Array(slots);
    this.#counts = new Uint32Array(slots);
    this.#names = Array(slots).fill('');
    this.#entered = 0;
    names.forEach((name, slot) => {
      if (name !== '') this.#enter(heads[slot] ?? 0, tails[slot] ?? 0, name, counts[slot] ?? 0);
    });
  }
}

/** `$` is left out, as it is the rule; `!` stays. */
function addressOf(name: string): string {
  return name.startsWith('$') ? name.slice(1) : name;
}

/** Multiplicative hashing (Knuth, The Art of Computer Programming, vol. 3, section 6.4). */
function slotOf(head: number, tail: number): number {
  return Math.imul(head ^ Math.imul(tail, 0x9e3779b1), 0x85ebca6b) >>> 12;
}

function hashOf(bytes: Uint8Array, start: number, length: number): number {
  let hash = -length;
  for (let k = 3; k <= length; k += 1) hash = (Math.imul(hash, 31) - (bytes[start + k] ?? 0)) | 0;
  return hash;
}

function isName(name: string | undefined, bytes: Uint8Array, start: number, length: number) {
  if (name?.length !== length + 1) return false;
  for (let k = 0; k <= length; k += 1) if (name.charCodeAt(k) !== bytes[start + k]) return false;
  return true;
}
