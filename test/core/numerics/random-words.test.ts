import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { randomWords } from '../../../src/core/numerics/random-words.ts';

const whole = fc.integer({ min: 0, max: Number.MAX_SAFE_INTEGER });
const wordsOf = (seed: number, place: number, count: number) => {
  const out = new Uint32Array(count);
  randomWords(seed, place, out);
  return [...out];
};

describe('random words', () => {
  test('depend on seed, place and position alone, not on how many are asked for', () => {
    fc.assert(
      fc.property(whole, whole, fc.integer({ min: 1, max: 30 }), (seed, place, count) => {
        expect(wordsOf(seed, place, count)).toEqual(wordsOf(seed, place, 40).slice(0, count));
      }),
    );
  });

  test('are others for every seed and place, neighbours and those that differ above 32 bits included', () => {
    const places = [0, 1, 2, 2 ** 32, 2 ** 32 + 1, Number.MAX_SAFE_INTEGER];
    const rows = places.flatMap((seed) => places.map((place) => wordsOf(seed, place, 4).join()));
    expect(new Set(rows).size).toBe(places.length ** 2);
  });

  test('change in half of their bits when one bit of seed or place changes', () => {
    for (let bit = 0; bit < 53; bit++) {
      const change = (seed: number, place: number) => {
        const [one, other] = [wordsOf(1, 1, 4), wordsOf(seed, place, 4)];
        return one.reduce((sum, word, k) => sum + ones(word ^ other[k]!), 0);
      };
      const flipped = 1 + (bit === 0 ? -1 : 2 ** bit);
      // 64 of 128 bits, standard deviation 5.7: five of them.
      expect(Math.abs(change(flipped, 1) - 64)).toBeLessThan(29);
      expect(Math.abs(change(1, flipped) - 64)).toBeLessThan(29);
    }
  });

  test('fill 100 equal intervals evenly, and those of two positions, of neighbouring places and of neighbouring seeds independently', () => {
    const count = 100_000;
    const pairs: Record<string, (place: number) => [number, number]> = {
      'two positions': (place) => wordsOf(7, place, 2) as [number, number],
      'positions of two blocks': (place) => [wordsOf(7, place, 5)[3]!, wordsOf(7, place, 5)[4]!],
      'neighbouring places': (place) => [wordsOf(7, place, 1)[0]!, wordsOf(7, place + 1, 1)[0]!],
      'neighbouring seeds': (place) => [wordsOf(7, place, 1)[0]!, wordsOf(8, place, 1)[0]!],
    };
    for (const [what, pair] of Object.entries(pairs)) {
      const cells = new Array<number>(100).fill(0);
      for (let place = 1; place <= count; place++) {
        const [x, y] = pair(place);
        cells[10 * Math.floor((x * 10) / 2 ** 32) + Math.floor((y * 10) / 2 ** 32)]! += 1;
      }
      const chiSquare = cells.reduce((sum, seen) => sum + (seen - count / 100) ** 2 / (count / 100), 0);
      // Chi-square with 99 degrees of freedom: outside 53 to 163 once in ten thousand samples.
      expect([what, chiSquare > 53, chiSquare < 163]).toEqual([what, true, true]);
    }
  });
});

function ones(word: number): number {
  let count = 0;
  for (let rest = word >>> 0; rest !== 0; rest &= rest - 1) count++;
  return count;
}
