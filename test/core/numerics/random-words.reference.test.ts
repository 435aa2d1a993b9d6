import { describe, expect, test } from 'vitest';
import { philox, randomWords } from '../../../src/core/numerics/random-words.ts';

type Six = [number, number, number, number, number, number];
const words = (...counterAndKey: Six) => {
  const out = new Uint32Array(4);
  philox(...counterAndKey, out, 0);
  return [...out];
};

describe('Philox4x32-10', () => {
  // Test vectors of its authors (Random123, file kat_vectors; from memory).
  const most = 0xffffffff;
  test.each<[Six, number[]]>([
    [
      [0, 0, 0, 0, 0, 0],
      [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8],
    ],
    [
      [most, most, most, most, most, most],
      [0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd],
    ],
    [
      [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344, 0xa4093822, 0x299f31d0],
      [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1],
    ],
  ])('gives its published words for counter and key %j', (counterAndKey, expected) => {
    expect(words(...counterAndKey)).toEqual(expected);
  });

  test('stands behind the words of a place: the seed as key, place and block as counter, low words first', () => {
    const [seed, place] = [0x299f31d0 + 5 * 2 ** 32, 0x85a308d3 + 7 * 2 ** 32];
    const out = new Uint32Array(7);
    randomWords(seed, place, out);
    expect([...out]).toEqual([...words(0x85a308d3, 7, 0, 0, 0x299f31d0, 5), ...words(0x85a308d3, 7, 1, 0, 0x299f31d0, 5).slice(0, 3)]);
  });
});
