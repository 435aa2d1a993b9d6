/** Random numbers by number: any of them straight from seed and place, in any order and in any thread. */

/**
 * Fills `out` with random words (0 to 4294967295, uniform) of one place, such as a design: word k depends on seed, place and k
 * alone, not on how many are asked for. Seed and place are whole numbers from 0 to 2^53 - 1; neighbouring ones have nothing in
 * common. Exact integer arithmetic: Philox4x32-10 (J. K. Salmon, M. A. Moraes, R. O. Dror and D. E. Shaw, Parallel random numbers: as
 * easy as 1, 2, 3, Proceedings of SC11, 2011; constants from memory, checked by its test vectors), the seed as key, place and k/4 as counter.
 */
export function randomWords(seed: number, place: number, out: Uint32Array): void {
  for (let k = 0; k < out.length; k += 4) philox(place, high(place), k >>> 2, 0, seed, high(seed), out, k);
}

/** Ten rounds of Philox4x32 over a counter (c0 to c3) with a key (k0, k1), low 32 bits of each; four words to `out[at…]`, as far as it goes. */
export function philox(c0: number, c1: number, c2: number, c3: number, k0: number, k1: number, out: Uint32Array, at: number): void {
  let [a, b, c, d, first, second] = [c0 | 0, c1 | 0, c2 | 0, c3 | 0, k0 | 0, k1 | 0];
  for (let round = 0; round < 10; round++) {
    const left = highProduct(c, 0xcd9e8d57) ^ b ^ first;
    const right = highProduct(a, 0xd2511f53) ^ d ^ second;
    b = Math.imul(c, 0xcd9e8d57);
    d = Math.imul(a, 0xd2511f53);
    a = left;
    c = right;
    first = (first + 0x9e3779b9) | 0;
    second = (second + 0xbb67ae85) | 0;
  }
  // Beyond the end of a typed array nothing is written.
  out[at] = a;
  out[at + 1] = b;
  out[at + 2] = c;
  out[at + 3] = d;
}

/** Upper 32 bits of the product of two 32-bit words, as a signed number. */
function highProduct(x: number, y: number): number {
  const [xLow, xHigh, yLow, yHigh] = [x & 0xffff, x >>> 16, y & 0xffff, y >>> 16];
  // Products of 16-bit halves wrap at 2^32 and no sum passes it, so that >>> sees all of it.
  const middle = Math.imul(xHigh, yLow) + (Math.imul(xLow, yLow) >>> 16);
  const other = Math.imul(xLow, yHigh) + (middle & 0xffff);
  return (Math.imul(xHigh, yHigh) + (middle >>> 16) + (other >>> 16)) | 0;
}

/** The part of a whole number above 2^32. */
function high(n: number): number {
  return Math.floor(n / 4294967296);
}
