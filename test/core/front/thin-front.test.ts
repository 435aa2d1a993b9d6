import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { thinFront } from '../../../src/core/front/thin-front.ts';
import { columnsOf, plainFront, plainlyDominates, randomStream } from './oracles.ts';

const thin = (rows: readonly (readonly number[])[], sizes: readonly number[]): number[] => [...thinFront(columnsOf(rows, sizes.length), sizes)];

const boxOf = (row: readonly number[], sizes: readonly number[]): number[] => row.map((value, j) => (sizes[j] === 0 ? value : Math.floor(value / sizes[j]!)));

/** The same, box by box and pair by pair; for finite values and at least one box side above 0. */
function plainThinning(rows: readonly (readonly number[])[], sizes: readonly number[]): number[] {
  const boxes = rows.map((row) => boxOf(row, sizes));
  const away = (i: number): number => {
    const sides = rows[i]!.map((value, j) => (sizes[j] === 0 ? 0 : value / sizes[j]! - boxes[i]![j]!));
    return sides.reduce((sum, side) => sum + side * side, 0);
  };
  return [...rows.keys()].filter((i) => {
    if (boxes.some((box) => plainlyDominates(box, boxes[i]!))) return false;
    const shared = [...rows.keys()].filter((k) => boxes[k]!.every((side, j) => side === boxes[i]![j]));
    return shared.every((k) => away(i) < away(k) || (away(i) === away(k) && i <= k));
  });
}

const setting = fc.integer({ min: 1, max: 4 }).chain((width) =>
  fc.record({
    sizes: fc.array(fc.constantFrom(0, 0.5, 1, 3), { minLength: width, maxLength: width }).filter((sizes) => sizes.some((size) => size > 0)),
    rows: fc.array(
      fc.array(
        fc.integer({ min: -12, max: 12 }).map((n) => n / 4),
        { minLength: width, maxLength: width },
      ),
      { maxLength: 50 },
    ),
  }),
);

describe('thinFront', () => {
  test('keeps one design per box: the one nearest the best corner', () => {
    expect(
      thin(
        [
          [0.9, 10.1],
          [0.2, 10.3],
          [1.5, 8.5],
        ],
        [1, 1],
      ),
    ).toEqual([1, 2]);
  });

  test('measures nearness in box sides, not in the units of an objective', () => {
    // In box sides the first lies 0.1 and 0.8 off, the second 0.9 and 0.1; in plain units the second would be nearer.
    expect(
      thin(
        [
          [10, 0.8],
          [90, 0.1],
        ],
        [100, 1],
      ),
    ).toEqual([0]);
    expect(
      thin(
        [
          [10, 0.95],
          [90, 0.1],
        ],
        [100, 1],
      ),
    ).toEqual([1]);
  });

  test('gives a tie to the lowest index', () => {
    expect(
      thin(
        [
          [0.75, 0.25],
          [0.25, 0.75],
        ],
        [1, 1],
      ),
    ).toEqual([0]);
    expect(
      thin(
        [
          [0.25, 0.75],
          [0.75, 0.25],
        ],
        [1, 1],
      ),
    ).toEqual([0]);
  });

  test('leaves out a box that another box dominates, though its design is on the exact front', () => {
    const rows = [
      [0.9, 5.9],
      [1.1, 5.8],
    ];
    expect(plainFront(rows)).toEqual([0, 1]);
    expect(thin(rows, [1, 1])).toEqual([0]);
  });

  test('takes the values themselves as boxes in an objective without resolution', () => {
    expect(
      thin(
        [
          [0.9, 5.9],
          [1.1, 5.8],
          [1.4, 5.8],
          [1.2, 5.7],
        ],
        [1, 0],
      ),
    ).toEqual([0, 3]);
  });

  test('thins nothing when no objective has a resolution: equal designs all stay', () => {
    expect(
      thin(
        [
          [1, 2],
          [2, 1],
          [1, 2],
        ],
        [0, 0],
      ),
    ).toEqual([0, 1, 2]);
  });

  test('counts boxes below zero downwards, as for an objective that was turned round', () => {
    expect(
      thin(
        [
          [-0.2, 0],
          [-0.9, 0],
        ],
        [1, 1],
      ),
    ).toEqual([1]);
    expect(
      thin(
        [
          [-0.2, 0],
          [0.2, -1],
        ],
        [1, 1],
      ),
    ).toEqual([0, 1]);
  });

  test('agrees with the plain thinning', () => {
    fc.assert(
      fc.property(setting, ({ rows, sizes }) => {
        expect(thin(rows, sizes)).toEqual(plainThinning(rows, sizes));
      }),
      { numRuns: 1000 },
    );
  });

  test('keeps, for every design, one whose box is no worse in any objective (epsilon-dominance)', () => {
    fc.assert(
      fc.property(setting, ({ rows, sizes }) => {
        const kept = thin(rows, sizes).map((i) => boxOf(rows[i]!, sizes));
        for (const row of rows) expect(kept.some((box) => box.every((side, j) => side <= boxOf(row, sizes)[j]!))).toBe(true);
      }),
    );
  });

  test('thins a thinned front no further', () => {
    fc.assert(
      fc.property(setting, ({ rows, sizes }) => {
        const once = thin(rows, sizes).map((i) => rows[i]!);
        expect(thin(once, sizes)).toEqual([...once.keys()]);
      }),
    );
  });

  test('never shows a missing value, and keeps its head with infinite ones', () => {
    const endless = Number.POSITIVE_INFINITY;
    expect(
      thin(
        [
          [Number.NaN, -9],
          [1, endless],
          [1.5, endless],
          [-endless, endless],
          [3, 1],
        ],
        [1, 1],
      ),
    ).toEqual([3, 4]);
  });

  test('measures nearness in the finite objectives where another is infinite', () => {
    const endless = Number.POSITIVE_INFINITY;
    const rows = [
      [1.9, endless],
      [1.1, endless],
      [1.5, endless],
    ];
    expect(thin(rows, [1, 1])).toEqual([1]);
  });

  test('thins a large front to a number that the box sides bound', () => {
    const random = randomStream(11);
    const rows = [...Array(20_000)].map(() => random()).map((x) => [x, 1 - Math.sqrt(x)]);
    const kept = thin(rows, [0.05, 0.05]);
    // A front that only falls passes at most one box per column and row: 20 + 20 - 1.
    expect(kept.length).toBeGreaterThan(10);
    expect(kept.length).toBeLessThanOrEqual(39);
  });

  test('shows nothing of an empty front', () => {
    expect(thin([], [1, 1])).toEqual([]);
  });
});
