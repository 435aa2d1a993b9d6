import { describe, expect, test } from 'vitest';
import { hashNumber } from '../../../src/core/numerics/hash.ts';

describe('hashNumber', () => {
  test('gives the published finaliser of MurmurHash3: its hash of an empty text is the finaliser of the seed', () => {
    // Test vectors of MurmurHash3_x86_32 for the empty text with seeds 0, 1 and 0xffffffff (from memory).
    expect([0, 1, 0xffffffff].map(hashNumber)).toEqual([0, 0x514e28b7, 0x81f16f39]);
  });

  test('gives no two of the first hundred thousand numbers the same hash', () => {
    expect(new Set([...Array(100_000).keys()].map(hashNumber)).size).toBe(100_000);
  });

  test('gives whole numbers from 0 to 4294967295, also for numbers that 32 bits do not hold', () => {
    for (const n of [4294967295, 4294967296, 4294967297, 8_589_934_593, Number.MAX_SAFE_INTEGER]) {
      expect(Number.isInteger(hashNumber(n))).toBe(true);
      expect(hashNumber(n)).toBeGreaterThanOrEqual(0);
      expect(hashNumber(n)).toBeLessThanOrEqual(4294967295);
    }
    expect(new Set([1, 4294967297, 8589934593].map(hashNumber)).size).toBe(3);
  });

  test('flips each bit of the hash about half the time when one bit of the number changes', () => {
    for (let input = 0; input < 40; input++) {
      // Numbers without the bit, so that each pair counts once.
      const numbers = [...Array(8000).keys()].filter((n) => Math.floor(n / 2 ** input) % 2 === 0);
      const flips = new Array<number>(32).fill(0);
      for (const n of numbers) {
        const change = hashNumber(n) ^ hashNumber(n + 2 ** input);
        for (let bit = 0; bit < 32; bit++) flips[bit]! += (change >>> bit) & 1;
      }
      // Six standard deviations of a fair coin, over 1280 counts.
      for (const count of flips) expect(Math.abs(count / numbers.length - 0.5)).toBeLessThan(3 / Math.sqrt(numbers.length));
    }
  });

  test('spreads a choice of the lowest hashes evenly over the numbers', () => {
    const chosen = [...Array(60_000).keys()]
      .map((i) => i + 1)
      .sort((a, b) => hashNumber(a) - hashNumber(b))
      .slice(0, 6000);
    for (let tenth = 0; tenth < 10; tenth++) {
      const within = chosen.filter((n) => n > tenth * 6000 && n <= (tenth + 1) * 6000).length;
      // 600 expected, standard deviation 22: five of them.
      expect(Math.abs(within - 600)).toBeLessThan(110);
    }
  });
});
