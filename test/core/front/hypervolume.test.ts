import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { exclusiveHypervolumes, hypervolume } from '../../../src/core/front/hypervolume.ts';
import { columnsOf, randomStream } from './oracles.ts';

const corner = 4;

/** Points on a lattice: the unit cells that one of them dominates, counted one by one up to the corner (4, 4, …). */
function countCells(rows: readonly (readonly number[])[], width: number): number {
  let cells = 0;
  for (let code = 0; code < corner ** width; code++) {
    const cell = [...Array(width).keys()].map((j) => Math.floor(code / corner ** j) % corner);
    if (rows.some((row) => row.every((value, j) => value <= cell[j]!))) cells++;
  }
  return cells;
}

const lattice = fc.integer({ min: 1, max: 6 }).chain((width) =>
  fc.record({
    width: fc.constant(width),
    // Values at and beyond the corner too: they dominate nothing inside.
    rows: fc.array(fc.array(fc.integer({ min: 0, max: corner + 1 }), { minLength: width, maxLength: width }), { maxLength: 9 }),
  }),
);
const reference = (width: number): number[] => new Array<number>(width).fill(corner);

describe('hypervolume', () => {
  test('counts exactly the cells that points on a lattice dominate, in one to six objectives', () => {
    fc.assert(
      fc.property(lattice, ({ rows, width }) => {
        expect(hypervolume(columnsOf(rows, width), reference(width))).toBe(countCells(rows, width));
      }),
      { numRuns: 300 },
    );
  });

  test('does not depend on the order of the points, nor on dominated or doubled ones', () => {
    const random = randomStream(9);
    const rows = [...Array(60)].map(() => [random(), random(), random(), random()]);
    const once = hypervolume(columnsOf(rows, 4), [1, 1, 1, 1]);
    const more = [...rows.map((row) => row.map((value) => Math.min(1, value + 0.01))), ...rows].reverse();
    expect(Math.abs(hypervolume(columnsOf(more, 4), [1, 1, 1, 1]) - once)).toBeLessThan(1e-13);
  });

  test('is the same seen in three objectives as in five of which two are constant', () => {
    const random = randomStream(2);
    const rows = [...Array(200)].map(() => [random(), random(), random()]);
    const padded = rows.map((row) => [0, ...row, 0.5]);
    const three = hypervolume(columnsOf(rows, 3), [1, 1, 1]);
    expect(Math.abs(hypervolume(columnsOf(padded, 5), [2, 1, 1, 1, 1]) - three)).toBeLessThan(1e-13);
  });

  test('adds nothing for a missing value or a point on the edge of the reference', () => {
    expect(
      hypervolume(
        columnsOf(
          [
            [Number.NaN, 0],
            [0, 4],
            [5, 1],
            [2, 2],
          ],
          2,
        ),
        [4, 4],
      ),
    ).toBe(4);
    expect(hypervolume([new Float64Array(0), new Float64Array(0)], [4, 4])).toBe(0);
  });

  test('refuses an infinitely good point', () => {
    expect(() => hypervolume(columnsOf([[Number.NEGATIVE_INFINITY, 0]], 2), [4, 4])).toThrow('infinitely good point (-Infinity, 0)');
  });
});

describe('exclusiveHypervolumes', () => {
  test('are what is lost without each point', () => {
    fc.assert(
      fc.property(lattice, ({ rows, width }) => {
        const whole = countCells(rows, width);
        const lost = rows.map(
          (_, i) =>
            whole -
            countCells(
              rows.filter((_row, k) => k !== i),
              width,
            ),
        );
        expect([...exclusiveHypervolumes(columnsOf(rows, width), reference(width))]).toEqual(lost);
      }),
      { numRuns: 200 },
    );
  });
});
