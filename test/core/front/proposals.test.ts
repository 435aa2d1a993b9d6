import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { balancedDesign, bestInEach } from '../../../src/core/front/proposals.ts';
import { columnsOf } from './oracles.ts';

const balanced = (rows: readonly (readonly number[])[], width: number): number => balancedDesign(columnsOf(rows, width));
const best = (rows: readonly (readonly number[])[], width: number): number[] => bestInEach(columnsOf(rows, width));

const rowsOfIntegers = fc.integer({ min: 1, max: 4 }).chain((width) =>
  fc.record({
    width: fc.constant(width),
    rows: fc.array(fc.array(fc.integer({ min: 0, max: 8 }), { minLength: width, maxLength: width }), { minLength: 1, maxLength: 20 }),
  }),
);

describe('balancedDesign', () => {
  test('has the least sum of objectives, each scaled over the front', () => {
    // Scaled: (0, 1), (0.25, 0.5), (1, 0).
    expect(
      balanced(
        [
          [0, 2000],
          [1, 1500],
          [4, 1000],
        ],
        2,
      ),
    ).toBe(1);
  });

  test('is the same in any units', () => {
    fc.assert(
      fc.property(rowsOfIntegers, fc.constantFrom(0.25, 2, 1024), fc.integer({ min: -3, max: 3 }), ({ rows, width }, factor, shift) => {
        const rescaled = rows.map((row) => row.map((value, j) => (j === 0 ? value * factor + shift * factor : value)));
        expect(balanced(rescaled, width)).toBe(balanced(rows, width));
      }),
    );
  });

  test('gives a tie to the lowest index', () => {
    expect(
      balanced(
        [
          [0, 1],
          [1, 0],
        ],
        2,
      ),
    ).toBe(0);
    expect(
      balanced(
        [
          [1, 0],
          [0, 1],
        ],
        2,
      ),
    ).toBe(0);
  });

  test('counts nothing for an objective without extent', () => {
    expect(
      balanced(
        [
          [7, 3],
          [7, 1],
          [7, 2],
        ],
        2,
      ),
    ).toBe(1);
    expect(balanced([[7, 7]], 2)).toBe(0);
  });

  test('takes an infinite value as the end it stands for', () => {
    const endless = Number.POSITIVE_INFINITY;
    expect(
      balanced(
        [
          [0, 3],
          [endless, 2],
          [1, 2.5],
        ],
        2,
      ),
    ).toBe(2);
    expect(
      balanced(
        [
          [-endless, 3],
          [5, 1],
          [6, 1],
        ],
        2,
      ),
    ).toBe(0);
    expect(
      balanced(
        [
          [-endless, 3],
          [5, 1],
          [endless, 0],
        ],
        2,
      ),
    ).toBe(1);
  });

  test('is none on an empty front, and never a design with a missing value', () => {
    expect(balanced([], 2)).toBe(-1);
    expect(
      balanced(
        [
          [Number.NaN, 0],
          [1, 1],
        ],
        2,
      ),
    ).toBe(1);
  });

  test('has no design below its sum of scaled objectives', () => {
    fc.assert(
      fc.property(rowsOfIntegers, ({ rows, width }) => {
        const low = [...Array(width).keys()].map((j) => Math.min(...rows.map((row) => row[j]!)));
        const high = [...Array(width).keys()].map((j) => Math.max(...rows.map((row) => row[j]!)));
        const sum = (row: readonly number[]): number =>
          row.reduce((total, value, j) => total + (high[j] === low[j] ? 0 : (value - low[j]!) / (high[j]! - low[j]!)), 0);
        const found = balanced(rows, width);
        for (const [i, row] of rows.entries()) {
          if (i < found) expect(sum(row)).toBeGreaterThan(sum(rows[found]!));
          else expect(sum(row)).toBeGreaterThanOrEqual(sum(rows[found]!));
        }
      }),
    );
  });
});

describe('bestInEach', () => {
  test('names the best design of each objective', () => {
    expect(
      best(
        [
          [3, 1],
          [1, 3],
          [2, 2],
        ],
        2,
      ),
    ).toEqual([1, 0]);
  });

  test('among equals takes the better sum of the other objectives, scaled, then the lowest index', () => {
    // Equal in the first; the others scaled over the front: (0, 1), (0.5, 0.25) and (1, 0).
    expect(
      best(
        [
          [1, 0, 400],
          [1, 2, 100],
          [1, 4, 0],
          [2, 0, 0],
        ],
        3,
      )[0],
    ).toBe(1);
    expect(
      best(
        [
          [1, 5, 5],
          [1, 5, 5],
        ],
        3,
      ),
    ).toEqual([0, 0, 0]);
  });

  test('with a single objective takes the first of the best', () => {
    expect(best([[2], [1], [1]], 1)).toEqual([1]);
  });

  test('names a design with the least value in every objective', () => {
    fc.assert(
      fc.property(rowsOfIntegers, ({ rows, width }) => {
        for (const [j, i] of best(rows, width).entries()) expect(rows[i]![j]).toBe(Math.min(...rows.map((row) => row[j]!)));
      }),
    );
  });

  test('names none on an empty front', () => {
    expect(best([], 2)).toEqual([-1, -1]);
  });
});
