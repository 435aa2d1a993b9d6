import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { FrontFilter } from '../../../src/core/front/front-filter.ts';
import { columnsOf, plainFront, randomStream, rowsOf } from './oracles.ts';

type Rows = readonly (readonly number[])[];

/** Adds rows as designs 1, 2, 3, … in the given order and batch size. */
function filterRows(rows: Rows, width: number, order = [...rows.keys()], batch = Math.max(1, rows.length), eligible?: readonly boolean[]) {
  const filter = new FrontFilter(width);
  for (let from = 0; from < order.length; from += batch) {
    const part = order.slice(from, from + batch);
    const columns = columnsOf(
      part.map((i) => rows[i]!),
      width,
    );
    filter.add(
      part.length,
      Float64Array.from(part, (i) => i + 1),
      columns,
      Uint8Array.from(part, (i) => ((eligible?.[i] ?? true) ? 1 : 0)),
    );
  }
  return filter;
}

const numbersOf = (filter: FrontFilter): number[] => [...filter.front().numbers];
const expected = (rows: Rows): number[] => plainFront(rows).map((i) => i + 1);

/** Few distinct values, so that ties and equal designs abound; now and then an infinity, a negative zero or no value. */
const coarse = fc.oneof(
  { weight: 20, arbitrary: fc.integer({ min: 0, max: 4 }) },
  { weight: 1, arbitrary: fc.constantFrom(Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NaN, -0) },
);
const fine = fc.double({ min: -1, max: 1, noNaN: true });
const rowsOfValues = (value: fc.Arbitrary<number>, maxLength: number) =>
  fc
    .integer({ min: 1, max: 8 })
    .chain((width) => fc.record({ width: fc.constant(width), rows: fc.array(fc.array(value, { minLength: width, maxLength: width }), { maxLength }) }));

describe('FrontFilter against all pairs', () => {
  test('finds the front of a few coarse designs', () => {
    fc.assert(
      fc.property(rowsOfValues(coarse, 60), ({ width, rows }) => {
        expect(numbersOf(filterRows(rows, width))).toEqual(expected(rows));
      }),
      { numRuns: 500 },
    );
  });

  test('finds the front of a few fine designs', () => {
    fc.assert(
      fc.property(rowsOfValues(fine, 60), ({ width, rows }) => {
        expect(numbersOf(filterRows(rows, width))).toEqual(expected(rows));
      }),
      { numRuns: 300 },
    );
  });

  // Long enough for many trees and merges: thousands of designs, in every count of objectives.
  test.each([1, 2, 3, 4, 5, 6, 7, 8])('finds the front of thousands of designs with %i objectives', (width) => {
    const random = randomStream(width);
    const spread = [...Array(3000)].map(() => [...Array(width)].map(random));
    const tied = [...Array(3000)].map(() => [...Array(width)].map(() => Math.floor(random() * 6)));
    for (const rows of [spread, tied]) expect(numbersOf(filterRows(rows, width))).toEqual(expected(rows));
  });

  test('finds a front that nearly every design is on', () => {
    const random = randomStream(7);
    const rows = [...Array(4000)].map(() => {
      const [a, b] = [random(), random()];
      return [a, b, 2 - a - b + (random() < 0.1 ? 0.5 : 0)];
    });
    const front = expected(rows);
    expect(front.length).toBeGreaterThan(3500);
    expect(numbersOf(filterRows(rows, 3, undefined, 100))).toEqual(front);
  });
});

describe('FrontFilter', () => {
  test('does not depend on the order of arrival or the sizes of the batches', () => {
    const setting = rowsOfValues(coarse, 700).chain(({ width, rows }) =>
      fc.record({
        width: fc.constant(width),
        rows: fc.constant(rows),
        order: fc.shuffledSubarray([...rows.keys()], { minLength: rows.length }),
        batch: fc.integer({ min: 1, max: 300 }),
      }),
    );
    fc.assert(
      fc.property(setting, ({ width, rows, order, batch }) => {
        expect(filterRows(rows, width, order, batch).front()).toEqual(filterRows(rows, width).front());
      }),
      { numRuns: 100 },
    );
  });

  test('is the same whether or not it is asked between batches', () => {
    const random = randomStream(3);
    const rows = [...Array(2000)].map(() => [random(), random(), random()]);
    const asked = new FrontFilter(3);
    for (let from = 0; from < rows.length; from += 90) {
      const part = rows.slice(from, from + 90);
      asked.add(
        part.length,
        Float64Array.from(part, (_, k) => from + k + 1),
        columnsOf(part, 3),
        new Uint8Array(part.length).fill(1),
      );
      expect([...asked.front().numbers]).toEqual(expected(rows.slice(0, from + 90)));
    }
  });

  test('keeps all designs that are equal in all objectives', () => {
    const rows = [...Array(2000)].map(
      (_, i) =>
        [
          [1, 2],
          [2, 1],
          [2, 2],
        ][i % 3]!,
    );
    expect(numbersOf(filterRows(rows, 2))).toEqual(expected(rows));
  });

  test('returns a front that is its own front', () => {
    fc.assert(
      fc.property(rowsOfValues(coarse, 60), ({ width, rows }) => {
        const front = rowsOf(filterRows(rows, width).front().objectives);
        expect(numbersOf(filterRows(front, width))).toEqual(front.map((_, i) => i + 1));
      }),
    );
  });

  test('returns the objectives of each design beside its number, in ascending number, and leaves its input alone', () => {
    const random = randomStream(5);
    const rows = [...Array(1500)].map(() => [random(), random(), random(), random()]);
    const columns = columnsOf(rows, 4);
    const numbers = Float64Array.from(rows, (_, i) => 5_000_000_000 - i);
    const filter = new FrontFilter(4);
    filter.add(rows.length, numbers, columns, new Uint8Array(rows.length).fill(1));
    const front = filter.front();
    expect([...front.numbers]).toEqual([...front.numbers].sort((a, b) => a - b));
    expect(rowsOf(front.objectives)).toEqual([...front.numbers].map((number) => rows[5_000_000_000 - number]));
    expect(rowsOf(columns)).toEqual(rows);
  });

  test('takes only the designs that may enter, and only the first ones of a batch when told so', () => {
    const rows = [[0], [1], [2], [1]];
    expect(numbersOf(filterRows(rows, 1, undefined, 4, [false, true, true, true]))).toEqual([2, 4]);
    const filter = new FrontFilter(1);
    filter.add(1, Float64Array.of(8, 9), [Float64Array.of(5, 1)], Uint8Array.of(1, 1));
    expect(numbersOf(filter)).toEqual([8]);
  });

  test('lets no missing value in, however good the rest is', () => {
    expect(
      numbersOf(
        filterRows(
          [
            [Number.NaN, -9],
            [1, 1],
            [0, Number.NaN],
            [2, 2],
          ],
          2,
        ),
      ),
    ).toEqual([2]);
  });

  test('compares infinite values like any other', () => {
    const endless = Number.POSITIVE_INFINITY;
    const rows = [
      [1, endless],
      [2, endless],
      [3, -endless],
      [endless, -endless],
      [endless, endless],
    ];
    expect(numbersOf(filterRows(rows, 2))).toEqual([1, 3]);
  });

  test('has an empty front before anything was added', () => {
    expect(new FrontFilter(2).front()).toEqual({ numbers: new Float64Array(0), objectives: [new Float64Array(0), new Float64Array(0)] });
  });

  test('refuses a count of objectives it was not made for', () => {
    for (const count of [0, 9, 1.5, Number.NaN]) expect(() => new FrontFilter(count)).toThrow(RangeError);
    expect(() => new FrontFilter(2).add(1, Float64Array.of(1), [Float64Array.of(1)], Uint8Array.of(1))).toThrow('1 columns of objectives where 2');
  });
});
