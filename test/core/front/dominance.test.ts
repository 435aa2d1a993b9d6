import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dominates } from '../../../src/core/front/dominance.ts';
import { plainlyDominates } from './oracles.ts';

const value = fc.oneof(fc.integer({ min: 0, max: 3 }), fc.constantFrom(Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NaN, -0));
const pair = fc.integer({ min: 1, max: 5 }).chain((width) => fc.tuple(...[0, 1].map(() => fc.array(value, { minLength: width, maxLength: width }))));

describe('dominates', () => {
  test('asks for no worse in all and better in one', () => {
    expect(dominates([1, 2, 3], [1, 2, 4])).toBe(true);
    expect(dominates([1, 2, 3], [0, 9, 9])).toBe(false);
    expect(dominates([1, 2], [1, 2])).toBe(false);
  });

  test('agrees with the definition, ties, infinities and missing values included', () => {
    fc.assert(
      fc.property(pair, ([a, b]) => dominates(a!, b!) === plainlyDominates(a!, b!)),
      { numRuns: 2000 },
    );
  });

  test('never holds both ways', () => {
    fc.assert(fc.property(pair, ([a, b]) => !(dominates(a!, b!) && dominates(b!, a!))));
  });
});
