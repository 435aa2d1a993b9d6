/** A hash of whole numbers, for choices that look random and never change. */

/**
 * A well-mixed 32-bit number (0 to 4294967295) from a whole number from 0 to 2^53 - 1. No two numbers below 2^32 share
 * one. Exact integer arithmetic: the 32-bit finaliser of MurmurHash3 (A. Appleby, public domain; constants from
 * memory), taken over the low word and, above 2^32, over the high word first.
 */
export function hashNumber(n: number): number {
  return mix((n >>> 0) ^ mix(Math.floor(n / 4294967296)));
}

function mix(word: number): number {
  let h = word >>> 0;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}
