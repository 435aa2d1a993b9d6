import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { createSearch } from '../../../src/core/search/search.ts';
import type { Axis } from '../../../src/core/study/study.ts';

const numberAxis = (name: string, values: readonly number[]): Axis => ({ name, sets: [name], points: values.map((v) => [v]), labels: null, range: null });
const gridOf = (axes: readonly Axis[]) => createSearch({ axes, search: { method: 'grid' } });

/** Every design of a grid as rows of inputs, in order of number. */
function rowsOf(search: ReturnType<typeof gridOf>): number[][] {
  const out = new Float64Array(search.inputNames.length);
  return [...Array(search.count).keys()].map((i) => {
    search.inputs(i + 1, out, 0);
    return [...out];
  });
}

const axesArbitrary = fc.array(fc.integer({ min: 1, max: 5 }), { minLength: 1, maxLength: 5 }).map((sizes) =>
  sizes.map((size, k) =>
    numberAxis(
      `axis ${k}`,
      [...Array(size).keys()].map((p) => 100 * k + p),
    ),
  ),
);

describe('the grid', () => {
  test('runs through the last axis first, like nested lists', () => {
    const search = gridOf([numberAxis('gearing.ratio', [8, 9]), numberAxis('motor.peakTorque', [200, 250, 300])]);
    expect(search.count).toBe(6);
    expect(search.inputNames).toEqual(['gearing.ratio', 'motor.peakTorque']);
    expect(rowsOf(search)).toEqual([
      [8, 200],
      [8, 250],
      [8, 300],
      [9, 200],
      [9, 250],
      [9, 300],
    ]);
  });

  test('lets one point of an options list set several numbers', () => {
    const options: Axis = {
      name: 'motor on offer',
      sets: ['motor.peakTorque', 'motor.baseSpeed'],
      points: [
        [310, 377],
        [230, 565],
      ],
      labels: ['slow', 'fast'],
      range: null,
    };
    const search = gridOf([options, numberAxis('gearing.ratio', [8, 9])]);
    expect(search.inputNames).toEqual(['motor.peakTorque', 'motor.baseSpeed', 'gearing.ratio']);
    expect(rowsOf(search)).toEqual([
      [310, 377, 8],
      [310, 377, 9],
      [230, 565, 8],
      [230, 565, 9],
    ]);
  });

  test('makes every combination once', () => {
    fc.assert(
      fc.property(axesArbitrary, (axes) => {
        const rows = rowsOf(gridOf(axes));
        expect(rows).toHaveLength(axes.reduce((product, axis) => product * axis.points.length, 1));
        expect(new Set(rows.map((row) => row.join())).size).toBe(rows.length);
        for (const row of rows) for (const [k, value] of row.entries()) expect(axes[k]!.points).toContainEqual([value]);
      }),
    );
  });

  test('names the points that the inputs are taken from', () => {
    fc.assert(
      fc.property(axesArbitrary, fc.nat(), (axes, pick) => {
        const search = gridOf(axes);
        const number = 1 + (pick % search.count);
        const inputs = new Float64Array(axes.length);
        const points = new Int32Array(axes.length);
        search.inputs(number, inputs, 0);
        search.points(number, points);
        expect([...inputs]).toEqual([...points].map((point, k) => axes[k]!.points[point]![0]));
      }),
    );
  });

  test('writes where it is told and nowhere else', () => {
    const out = new Float64Array(5).fill(-1);
    gridOf([numberAxis('a', [1, 2]), numberAxis('b', [3, 4])]).inputs(3, out, 2);
    expect([...out]).toEqual([-1, -1, 2, 3, -1]);
  });

  test('stays exact where 32 bits overflow', () => {
    // 65,536 squared is 2^32: a truncated product or remainder would start over.
    const axis = (name: string) => numberAxis(name, [...Array(65_536).keys()]);
    const search = gridOf([numberAxis('a', [7, 8]), axis('b'), axis('c')]);
    expect(search.count).toBe(8_589_934_592);
    const points = new Int32Array(3);
    const at = (number: number): number[] => {
      search.points(number, points);
      return [...points];
    };
    expect(at(1)).toEqual([0, 0, 0]);
    expect(at(4_000_000_000)).toEqual([0, Math.floor(3_999_999_999 / 65_536), 3_999_999_999 % 65_536]);
    expect(at(4_294_967_296)).toEqual([0, 65_535, 65_535]);
    expect(at(4_294_967_297)).toEqual([1, 0, 0]);
    expect(at(8_589_934_592)).toEqual([1, 65_535, 65_535]);
  });

  test('stays exact where the rest after the last axis overflows 32 bits', () => {
    const axis = (name: string) => numberAxis(name, [...Array(65_536).keys()]);
    const points = new Int32Array(3);
    gridOf([axis('a'), axis('b'), numberAxis('c', [7, 8])]).points(8_589_934_592, points);
    expect([...points]).toEqual([65_535, 65_535, 1]);
  });

  test('is empty without axes: the reference design is not one of the search', () => {
    expect(gridOf([]).count).toBe(0);
  });

  test('refuses a number that is not one of its designs, and a grid too large to number', () => {
    const search = gridOf([numberAxis('a', [1, 2])]);
    for (const number of [0, 3, 1.5, Number.NaN]) {
      expect(() => search.inputs(number, new Float64Array(1), 0)).toThrow(`design ${number} is not one of 1 to 2`);
      expect(() => search.points(number, new Int32Array(1))).toThrow(RangeError);
    }
    const wide = [...Array(6).keys()].map((k) => numberAxis(`axis ${k}`, [...Array(1000).keys()]));
    expect(() => gridOf(wide)).toThrow('cannot be numbered exactly');
  });
});
