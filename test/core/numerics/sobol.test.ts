import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { joeKuoRows } from '../../../src/core/numerics/joe-kuo-rows.ts';
import { randomWords } from '../../../src/core/numerics/random-words.ts';
import { scrambleWord, sobolDimensions, sobolDirections, sobolWord } from '../../../src/core/numerics/sobol.ts';

const directions = Array.from({ length: sobolDimensions }, (_, dimension) => sobolDirections(dimension));
const word32 = fc.integer({ min: 0, max: 0xffffffff });
const keysOf = (seed: number, count: number) => {
  const keys = new Uint32Array(count);
  randomWords(seed, 0, keys);
  return [...keys];
};

describe('the table of directions', () => {
  /** Multiplication by x in the field of two elements modulo the polynomial x^s + … + 1. */
  const timesX = (element: number, polynomial: number, degree: number) => {
    const shifted = element << 1;
    return (shifted >>> degree) & 1 ? shifted ^ polynomial : shifted;
  };

  test('has a primitive polynomial of its own in every dimension', () => {
    const polynomials = joeKuoRows.map(([inner, ...first]) => ({ degree: first.length, polynomial: (1 << first.length) | (inner! << 1) | 1 }));
    for (const { degree, polynomial } of polynomials) {
      let element = timesX(1, polynomial, degree);
      let order = 1;
      for (; element !== 1 && order < 2 ** degree; order++) element = timesX(element, polynomial, degree);
      expect([polynomial, order]).toEqual([polynomial, 2 ** degree - 1]);
    }
    expect(new Set(polynomials.map(({ polynomial }) => polynomial)).size).toBe(polynomials.length);
  });

  test('has odd numbers, the k-th below 2 to the k', () => {
    for (const [, ...first] of joeKuoRows) for (const [k, m] of first.entries()) expect([m % 2, m < 2 ** (k + 1)]).toEqual([1, true]);
  });

  test('says which dimension it lacks', () => {
    expect(() => sobolDirections(sobolDimensions)).toThrow(`dimension ${sobolDimensions} of ${sobolDimensions}`);
  });
});

describe('a coordinate by index', () => {
  test('is the one before with a single direction added: the one of the lowest zero bit', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 0xffffffff }), fc.nat(sobolDimensions - 1), (index, dimension) => {
        const change = sobolWord(directions[dimension]!, index) ^ sobolWord(directions[dimension]!, index - 1);
        const lowest = 31 - Math.clz32(index & -index);
        expect(change >>> 0).toBe(directions[dimension]![lowest]);
      }),
    );
  });

  test('refuses an index that 32 bits do not hold', () => {
    for (const index of [-1, 2 ** 32, Number.NaN]) expect(() => sobolWord(directions[0]!, index)).toThrow('2^32');
  });
});

describe('scrambling', () => {
  test('keeps the number of leading bits that two words share: what is nested stays nested', () => {
    fc.assert(
      fc.property(word32, fc.integer({ min: 0, max: 31 }), word32, word32, (word, shared, below, key) => {
        const rest = 0xffffffff >>> shared;
        const other = ((word & ~rest) | ((~word & rest & ~(rest >>> 1)) >>> 0) | (below & (rest >>> 1))) >>> 0;
        expect(Math.clz32(word ^ other)).toBe(shared);
        expect(Math.clz32(scrambleWord(word, key) ^ scrambleWord(other, key))).toBe(shared);
      }),
      { numRuns: 2000 },
    );
  });

  test('leaves one point of 2^m in every interval of width 2^-m, in every dimension and any aligned block of the sequence', () => {
    fc.assert(
      fc.property(fc.nat(sobolDimensions - 1), fc.integer({ min: 0, max: 9 }), fc.nat(2 ** 20), word32, (dimension, m, block, key) => {
        const intervals = Array.from({ length: 2 ** m }, (_, k) => scrambleWord(sobolWord(directions[dimension]!, block * 2 ** m + k), key) / 2 ** 32);
        expect(new Set(intervals.map((u) => Math.floor(u * 2 ** m))).size).toBe(2 ** m);
      }),
    );
  });

  test('leaves one point of 2^m in every box of area 2^-m of the first two dimensions, whatever its sides', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9 }), fc.nat(2 ** 20), word32, word32, (m, block, first, second) => {
        const points = Array.from({ length: 2 ** m }, (_, k) => [
          scrambleWord(sobolWord(directions[0]!, block * 2 ** m + k), first) / 2 ** 32,
          scrambleWord(sobolWord(directions[1]!, block * 2 ** m + k), second) / 2 ** 32,
        ]);
        for (let wide = 0; wide <= m; wide++) {
          const boxes = points.map(([x, y]) => `${Math.floor(x! * 2 ** wide)} ${Math.floor(y! * 2 ** (m - wide))}`);
          expect(new Set(boxes).size).toBe(2 ** m);
        }
      }),
    );
  });

  test('flips each bit of a word with half of the keys, and bits below different beginnings independently of each other', () => {
    const keys = keysOf(11, 8000);
    for (const [one, other] of [
      [0, 0x80000000],
      [0x12345678, 0x92345678],
      [0x12345678, 0x12345679],
      [0xffff0000, 0xfffe0000],
    ] as const) {
      const from = Math.clz32(one ^ other) + 1;
      for (let bit = 0; bit < 32; bit++) {
        const flips = (word: number) => keys.map((key) => ((scrambleWord(word, key) ^ word) >>> (31 - bit)) & 1);
        const [own, others] = [flips(one), flips(other)];
        const ones = own.reduce((sum, flip) => sum + flip, 0);
        const alike = own.filter((flip, k) => flip === others[k]).length;
        // Five standard deviations of 8000 tosses: 224.
        expect(Math.abs(ones - 4000)).toBeLessThan(224);
        if (bit >= from) expect(Math.abs(alike - 4000)).toBeLessThan(224);
        else expect(alike).toBe(8000);
      }
    }
  });
});

describe("integrals over scrambled Sobol' points", () => {
  /** The definition of nested uniform scrambling, bit by bit: a toss of its own for every beginning. */
  function scrambledBitByBit(word: number, key: number): number {
    const toss = new Uint32Array(1);
    let scrambled = 0;
    for (let bit = 0; bit < 32; bit++) {
      const beginning = bit === 0 ? 0 : word >>> (32 - bit);
      randomWords(key, bit * 2 ** 32 + beginning, toss);
      scrambled = (scrambled << 1) | (((word >>> (31 - bit)) ^ toss[0]!) & 1);
    }
    return scrambled >>> 0;
  }

  const integrands: readonly ((u: readonly number[]) => number)[] = [
    (u) => u.reduce((sum, x) => sum + x, 0) - u.length / 2,
    (u) => u.reduce((product, x) => product * (0.75 + 0.75 * x * x), 1) - 1,
    (u) => u.reduce((product, x) => product * ((Math.abs(4 * x - 2) + 1) / 2), 1) - 1,
  ];

  /** Mean and variance over scramblings of the mean of each integrand, whose integral is 0, over 2^m points. */
  function spread(scramble: typeof scrambleWord, dimensions: number, m: number, scramblings: number) {
    const sums = integrands.map(() => ({ sum: 0, squares: 0 }));
    const words = Array.from({ length: 2 ** m }, (_, index) => directions.slice(0, dimensions).map((each) => sobolWord(each, index)));
    for (let seed = 1; seed <= scramblings; seed++) {
      const keys = keysOf(seed, dimensions);
      const points = words.map((each) => each.map((word, k) => (scramble(word, keys[k]!) + 0.5) / 2 ** 32));
      for (const [k, integrand] of integrands.entries()) {
        const mean = points.reduce((sum, point) => sum + integrand(point), 0) / points.length;
        sums[k]!.sum += mean;
        sums[k]!.squares += mean * mean;
      }
    }
    return sums.map(({ sum, squares }) => ({ mean: sum / scramblings, variance: squares / scramblings - (sum / scramblings) ** 2 }));
  }

  test('are right on average over the seeds, and vary as little as with scrambling bit by bit', () => {
    for (const [dimensions, m] of [
      [2, 6],
      [4, 5],
    ] as const) {
      const [fast, plain] = [spread(scrambleWord, dimensions, m, 400), spread(scrambledBitByBit, dimensions, m, 400)];
      for (const [k, { mean, variance }] of fast.entries()) {
        // Four standard errors of the mean; the ratio of two variances over 400 each has a standard deviation of about 0.1.
        expect(Math.abs(mean)).toBeLessThan(4 * Math.sqrt(variance / 400));
        expect(variance / plain[k]!.variance).toBeGreaterThan(0.7);
        expect(variance / plain[k]!.variance).toBeLessThan(1.45);
      }
    }
  });

  test('err at least ten times less than over as many random points', () => {
    const [linear] = spread(scrambleWord, 4, 8, 200);
    // The variance of the mean of 256 random points for a sum of four uniform numbers.
    expect(linear!.variance).toBeLessThan(4 / 12 / 256 / 100);
  });
});
