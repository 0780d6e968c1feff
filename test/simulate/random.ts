/** A stream of random numbers that a seed fixes for ever. */
export interface Random {
  /** Uniform in [0, 1), 53 bits. */
  uniform(): number;
  /** Uniform in [low, high). */
  between(low: number, high: number): number;
  /** Standard normal. */
  normal(): number;
}

/**
 * The generator xoshiro128**, its four words of state given.
 *
 * Source: Blackman & Vigna (2021), Scrambled Linear Pseudorandom Number Generators, ACM TOMS 47(4).
 */
export function xoshiro128(state: readonly [number, number, number, number]): () => number {
  let [a, b, c, d] = state;
  return () => {
    const scrambled = Math.imul(b, 5);
    const word = Math.imul((scrambled << 7) | (scrambled >>> 25), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = (d << 11) | (d >>> 21);
    return word;
  };
}

/**
 * A stream for one seed and one purpose; streams of different purposes are independent, so that a
 * change to one kind of noise leaves the others as they were.
 */
export function randomFrom(seed: number, purpose: string): Random {
  const next = xoshiro128(stateFrom(seed, purpose));
  let spare = Number.NaN;

  function uniform(): number {
    return ((next() >>> 5) * 67108864 + (next() >>> 6)) / 9007199254740992;
  }

  // Marsaglia's polar method gives two deviates at a time; the second waits in `spare`.
  function normal(): number {
    if (!Number.isNaN(spare)) {
      const waiting = spare;
      spare = Number.NaN;
      return waiting;
    }
    let x: number;
    let y: number;
    let squared: number;
    do {
      x = 2 * uniform() - 1;
      y = 2 * uniform() - 1;
      squared = x * x + y * y;
    } while (squared >= 1 || squared === 0);
    const factor = Math.sqrt((-2 * Math.log(squared)) / squared);
    spare = y * factor;
    return x * factor;
  }

  return {uniform, normal, between: (low, high) => low + (high - low) * uniform()};
}

/** Spreads seed and purpose over 128 bits, so that neighbouring seeds share nothing. */
function stateFrom(seed: number, purpose: string): [number, number, number, number] {
  let hash = mix(seed >>> 0) ^ mix(Math.floor(seed / 4294967296) >>> 0);
  for (let i = 0; i < purpose.length; i++) hash = mix(hash ^ purpose.charCodeAt(i));
  return [mix(hash + 1), mix(hash + 2), mix(hash + 3), mix(hash + 4)];
}

/** The 32-bit finaliser of MurmurHash3 (Appleby, public domain) on a Weyl sequence. */
function mix(word: number): number {
  let x = Math.imul(word, 0x9e3779b1) + 0x7f4a7c15;
  x = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
  x = Math.imul(x ^ (x >>> 13), 0xc2b2ae35);
  return (x ^ (x >>> 16)) >>> 0;
}
