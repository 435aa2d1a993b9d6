/**
 * Known fronts, recovered from samples on and off them. Formulas and sources in test-problems.ts. The rule here is
 * plain dominance among the designs that meet every requirement; the constraint domination of Deb et al., IEEE
 * Transactions on Evolutionary Computation 6(2), 2002, which ranks the others too, is not this project's rule.
 */
import { describe, expect, test } from 'vitest';
import { FrontFilter } from '../../../src/core/front/front-filter.ts';
import { balancedDesign } from '../../../src/core/front/proposals.ts';
import { columnsOf, rowsOf } from './oracles.ts';
import { dtlz2Angles, steps, zdt1, zdt2, zdt3 } from './test-problems.ts';

/** The front of rows that arrive as designs 1, 2, 3, … in batches of 1000. */
function frontOf(rows: readonly (readonly number[])[], width: number) {
  const filter = new FrontFilter(width);
  for (let from = 0; from < rows.length; from += 1000) {
    const part = rows.slice(from, from + 1000);
    filter.add(
      part.length,
      Float64Array.from(part, (_, k) => from + k + 1),
      columnsOf(part, width),
      new Uint8Array(part.length).fill(1),
    );
  }
  return filter.front();
}

const levels = [10, 3, 1.2, 1.01, 1, 1.001, 2];
const first = steps(400);

describe('fronts of known problems', () => {
  test.each([
    { name: 'ZDT1', problem: zdt1, curve: (x: number) => 1 - Math.sqrt(x) },
    { name: 'ZDT2', problem: zdt2, curve: (x: number) => 1 - x * x },
  ])('$name: exactly the samples with g = 1, on the published curve', ({ problem, curve }) => {
    const rows = levels.flatMap((g) => first.map((x) => problem(x, g)));
    const front = frontOf(rows, 2);
    const onFront = first.map((_, k) => levels.indexOf(1) * first.length + k + 1);
    expect([...front.numbers]).toEqual(onFront);
    for (const [x, y] of rowsOf(front.objectives)) expect(Math.abs(y! - curve(x!))).toBeLessThan(1e-15);
  });

  test('ZDT3: the samples in the five published pieces', () => {
    // Ends of the pieces from memory of the literature on ZDT3, to ten decimals.
    const pieces = [
      [0, 0.0830015349],
      [0.182228728, 0.2577623634],
      [0.4093136748, 0.4538821041],
      [0.6183967944, 0.6525117038],
      [0.8233317983, 0.8518328654],
    ];
    const fine = steps(20_000);
    const front = frontOf(
      levels.flatMap((g) => fine.map((x) => zdt3(x, g))),
      2,
    );
    const found = [...front.objectives[0]!];
    // A sample just outside a piece may stay: what dominates it lies between two samples. One step of 1/20000 each way.
    const inside = (x: number, margin: number): boolean => pieces.some(([low, high]) => x >= low! - margin && x <= high! + margin);
    expect(found.every((x) => inside(x, 1 / 20_000))).toBe(true);
    expect(fine.filter((x) => inside(x, -1 / 20_000)).every((x) => found.includes(x))).toBe(true);
  });

  test('DTLZ2: exactly the directions on the unit sphere', () => {
    const directions = dtlz2Angles(40);
    const g = [0.4, 0, 0.01, 1];
    const front = frontOf(
      g.flatMap((level) => directions.map(({ row }) => row(level))),
      3,
    );
    expect([...front.numbers]).toEqual(directions.map((_, k) => directions.length + k + 1));
    for (const row of rowsOf(front.objectives)) expect(Math.abs(row.reduce((sum, value) => sum + value * value, 0) - 1)).toBeLessThan(1e-15);
  });

  test('ZDT1: the balanced design is the knee by distance to the chord, f1 = 1/4 and f2 = 1/2', () => {
    // Over the front both objectives run from 0 to 1: the least sum is the greatest distance to the chord f1 + f2 = 1.
    const { objectives } = frontOf(
      first.map((x) => zdt1(x, 1)),
      2,
    );
    const balanced = balancedDesign(objectives);
    expect([objectives[0]![balanced], objectives[1]![balanced]]).toEqual([0.25, 0.5]);
  });
});
