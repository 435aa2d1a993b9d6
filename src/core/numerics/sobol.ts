/** Sobol' points: numbers that fill the unit cube evenly from the first few on; and their scrambling, which keeps that and makes them look random. */
import { joeKuoRows } from './joe-kuo-rows.ts';

/** Dimensions there are directions for. */
export const sobolDimensions = joeKuoRows.length + 1;

/**
 * Directions of a dimension (from 0): 32 words v₁ to v₃₂, each a binary fraction of 2^32. Of a dimension without a row throws.
 * Recurrence and order: P. Bratley and B. L. Fox, Algorithm 659, ACM Transactions on Mathematical Software 14 (1988), section 2.
 */
export function sobolDirections(dimension: number): Uint32Array {
  const row = dimension === 0 ? [] : joeKuoRows[dimension - 1];
  if (row === undefined) throw new RangeError(`no Sobol' directions for dimension ${dimension} of ${sobolDimensions}`);
  const [inner = 0, ...first] = row;
  const degree = first.length;
  const directions = new Uint32Array(32);
  for (let k = 0; k < 32; k++) {
    if (k < degree || degree === 0) {
      directions[k] = (first[k] ?? 1) << (31 - k);
      continue;
    }
    let word = directions[k - degree]! ^ (directions[k - degree]! >>> degree);
    for (let j = 1; j < degree; j++) if ((inner >>> (degree - 1 - j)) & 1) word ^= directions[k - j]!;
    directions[k] = word;
  }
  return directions;
}

/**
 * One coordinate of a Sobol' point as a fraction of 2^32 (0 to 4294967295), straight from the point's index (0 to 4294967295, else
 * it throws): exact, and independent of any other point. Gray-code order (I. A. Antonov and V. M. Saleev, USSR Computational
 * Mathematics and Mathematical Physics 19, 1979): any 2^m points whose indices begin at a multiple of 2^m are those of Sobol's own order.
 */
export function sobolWord(directions: Uint32Array, index: number): number {
  if (!(index >= 0 && index <= 0xffffffff)) throw new RangeError(`point ${index} is not one of the 2^32 of a Sobol' sequence`);
  let word = 0;
  let at = 0;
  for (let gray = index ^ (index >>> 1); gray !== 0; gray >>>= 1, at++) word ^= directions[at]! & -(gray & 1);
  return word >>> 0;
}

/**
 * Nested uniform scrambling (A. B. Owen, Randomly permuted (t,m,s)-nets and (t,s)-sequences, Monte Carlo and Quasi-Monte Carlo
 * Methods in Scientific Computing, Springer 1995) of a fraction of 2^32: each bit is flipped or not according to the key and the
 * bits above it, so that every interval of halves, quarters, … keeps its number of points. A bijection for each key, a well-mixed
 * 32-bit number. The flips come from a hash in the manner of S. Laine and T. Karras (Stratified sampling for stochastic transparency,
 * Computer Graphics Forum 30, 2011), with the multipliers of M. Pharr, W. Jakob and G. Humphreys (Physically Based Rendering, 4th
 * edition, 2023, section 8.7; from memory), whose variance the tests compare with that of scrambling bit by bit.
 */
export function scrambleWord(word: number, key: number): number {
  let x = reversedBits(word);
  // A product with an even number, a sum and an odd multiple pass bits upwards only: reversed, from the highest to the lower ones.
  x ^= Math.imul(x, 0x3d20adea);
  x = (x + key) | 0;
  x = Math.imul(x, (key >>> 16) | 1);
  x ^= Math.imul(x, 0x05526c56);
  x ^= Math.imul(x, 0x53a22864);
  return reversedBits(x);
}

function reversedBits(word: number): number {
  let x = ((word >>> 1) & 0x55555555) | ((word & 0x55555555) << 1);
  x = ((x >>> 2) & 0x33333333) | ((x & 0x33333333) << 2);
  x = ((x >>> 4) & 0x0f0f0f0f) | ((x & 0x0f0f0f0f) << 4);
  x = ((x >>> 8) & 0x00ff00ff) | ((x & 0x00ff00ff) << 8);
  return ((x >>> 16) | (x << 16)) >>> 0;
}
