/**
 * Convolution of a signal with a kernel of the same length, exact in its last `wanted` samples.
 *
 * Method: one complex radix-2 transform holds the signal as real and the kernel as imaginary part.
 * The transform is circular; its length is chosen so that what wraps around misses the wanted end.
 *
 * @returns `wanted` samples, the last ones of the linear convolution cut to the signal's length
 */
export function convolveTail(
  signal: Float64Array,
  kernel: Float64Array,
  wanted: number,
): Float64Array {
  const total = signal.length;
  let size = 1;
  while (size < total || 2 * total - 2 - size >= total - wanted) size *= 2;
  const real = new Float64Array(size);
  const imaginary = new Float64Array(size);
  real.set(signal);
  imaginary.set(kernel);
  transform(real, imaginary);
  multiplyParts(real, imaginary);
  // An inverse transform is the forward one with the two parts exchanged.
  transform(imaginary, real);
  return real.slice(total - wanted, total).map((value) => value / size);
}

/** Replaces the transform of s + i k by the product of the transforms of s and k (both real). */
function multiplyParts(real: Float64Array, imaginary: Float64Array): void {
  const size = real.length;
  for (let i = 0; i <= size / 2; i++) {
    const j = (size - i) % size;
    const sRe = (real[i]! + real[j]!) / 2;
    const sIm = (imaginary[i]! - imaginary[j]!) / 2;
    const kRe = (imaginary[i]! + imaginary[j]!) / 2;
    const kIm = (real[j]! - real[i]!) / 2;
    const re = sRe * kRe - sIm * kIm;
    const im = sRe * kIm + sIm * kRe;
    real[i] = re;
    real[j] = re;
    imaginary[i] = im;
    imaginary[j] = -im;
  }
}

/** Discrete Fourier transform in place, radix 2; the length is a power of two. */
function transform(real: Float64Array, imaginary: Float64Array): void {
  const size = real.length;
  reverseBits(real, imaginary);
  const cosine = new Float64Array(size / 2);
  const sine = new Float64Array(size / 2);
  for (let i = 0; i < size / 2; i++) {
    cosine[i] = Math.cos((2 * Math.PI * i) / size);
    sine[i] = -Math.sin((2 * Math.PI * i) / size);
  }
  for (let half = 1; half < size; half *= 2) {
    const stride = size / (2 * half);
    for (let start = 0; start < size; start += 2 * half) {
      for (let k = 0; k < half; k++) {
        const upper = start + k;
        const lower = upper + half;
        const c = cosine[k * stride]!;
        const s = sine[k * stride]!;
        const re = real[lower]! * c - imaginary[lower]! * s;
        const im = real[lower]! * s + imaginary[lower]! * c;
        real[lower] = real[upper]! - re;
        imaginary[lower] = imaginary[upper]! - im;
        real[upper] = real[upper]! + re;
        imaginary[upper] = imaginary[upper]! + im;
      }
    }
  }
}

function reverseBits(real: Float64Array, imaginary: Float64Array): void {
  const size = real.length;
  for (let i = 1, j = 0; i < size; i++) {
    let bit = size >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i >= j) continue;
    [real[i], real[j]] = [real[j]!, real[i]!];
    [imaginary[i], imaginary[j]] = [imaginary[j]!, imaginary[i]!];
  }
}
