/**
 * Hypervolumes from outside. Small sets: test values of the open-source libraries pagmo (European Space Agency) and
 * moarchiving, read there. Whole fronts: the closed forms of the test problems of Zitzler, Deb, Thiele, Comparison of
 * multiobjective evolutionary algorithms: empirical results, Evolutionary Computation 8(2), 2000 (ZDT), and Deb,
 * Thiele, Laumanns, Zitzler, Scalable multi-objective optimization test problems, CEC 2002 (DTLZ2), to six decimals.
 */
import { describe, expect, test } from 'vitest';
import { exclusiveHypervolumes, hypervolume } from '../../../src/core/front/hypervolume.ts';
import { compare } from '../../reference-table.ts';
import { columnsOf } from './oracles.ts';
import { dtlz2Angles, steps, zdt1, zdt2, zdt3, zdt6 } from './test-problems.ts';

describe('hypervolume of small sets', () => {
  test.each([
    {
      rows: [
        [1, 2],
        [2, 1],
      ],
      reference: [3, 3],
      expected: 3,
    },
    {
      rows: [
        [2.3, 4.5],
        [3.4, 3.4],
        [6.0, 1.2],
      ],
      reference: [7, 7],
      expected: 17.91,
    },
    {
      rows: [
        [1, 2, 3],
        [2, 3, 1],
        [3, 1, 2],
      ],
      reference: [4, 4, 4],
      expected: 13,
    },
  ])('up to $reference is $expected', ({ rows, reference, expected }) => {
    const got = hypervolume(columnsOf(rows, reference.length), reference);
    compare({ check: `hypervolume up to ${reference}`, source: 'pagmo and moarchiving test values (read)', expected, got, within: 1e-14 });
  });

  test('six points in three objectives: 18, 2, 12, 1, 18 and 2 are each point’s own', () => {
    const rows = [
      [-6, -1, -6],
      [-1, -3, -5],
      [-3, -4, -4],
      [-4, -2, -3],
      [-5, -5, -2],
      [-2, -6, -1],
    ];
    expect([...exclusiveHypervolumes(columnsOf(rows, 3), [0, 0, 0])]).toEqual([18, 2, 12, 1, 18, 2]);
  });
});

describe('hypervolume of densely sampled fronts', () => {
  const samples = 200_000;
  test.each([
    { name: 'ZDT1', front: (x: number) => zdt1(x, 1), published: 0.876667 },
    { name: 'ZDT2', front: (x: number) => zdt2(x, 1), published: 0.543333 },
    { name: 'ZDT3', front: (x: number) => zdt3(x, 1), published: 1.331763 },
    { name: 'ZDT6', front: (x: number) => zdt6(x, 1), published: 0.507878 },
  ])('$name up to (1.1, 1.1) is $published', ({ name, front, published }) => {
    const rows = steps(samples).map(front);
    const measured = hypervolume(columnsOf(rows, 2), [1.1, 1.1]);
    // Stairs through samples of a curve lie inside it, by half the rectangles between neighbours and second-order
    // terms (below 1e-7 at this spacing). The published value is rounded to six decimals.
    expect(measured).toBeLessThan(published + 5e-7);
    const got = measured + rectanglesBetween(rows) / 2;
    compare({
      check: `hypervolume of ${name} up to (1.1, 1.1)`,
      source: 'Zitzler, Deb, Thiele 2000, closed form',
      expected: published,
      got,
      within: 6e-7 / published,
    });
  });

  test('DTLZ2 with three objectives up to (1.1, 1.1, 1.1) is 0.807401', () => {
    const sampled = (n: number): number =>
      hypervolume(
        columnsOf(
          dtlz2Angles(n).map(({ row }) => row(0)),
          3,
        ),
        [1.1, 1.1, 1.1],
      );
    const [coarse, fine] = [sampled(150), sampled(300)];
    // What the samples leave out falls in proportion to their spacing, so that two spacings give the limit.
    expect(coarse).toBeLessThan(fine);
    expect(fine).toBeLessThan(0.807401);
    compare({
      check: 'hypervolume of DTLZ2 up to 1.1³',
      source: 'Deb et al. 2002, closed form',
      expected: 0.807401,
      got: 2 * fine - coarse,
      within: 5e-5 / 0.807401,
    });
  });
});

/** Between neighbours on the front of the rows (two objectives): the sum of width times height; a gap between pieces of a front holds no curve. */
function rectanglesBetween(rows: readonly (readonly number[])[]): number {
  let sum = 0;
  let last: readonly number[] | null = null;
  for (const row of [...rows].sort((a, b) => a[0]! - b[0]!)) {
    if (last !== null && row[1]! >= last[1]!) continue;
    if (last !== null && row[0]! - last[0]! < 0.01) sum += (row[0]! - last[0]!) * (last[1]! - row[1]!);
    last = row;
  }
  return sum;
}
