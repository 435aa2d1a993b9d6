/** Searches that draw designs: by number, by seed, from every kind of axis. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { randomWords } from '../../../src/core/numerics/random-words.ts';
import { scrambleWord, sobolDirections, sobolWord } from '../../../src/core/numerics/sobol.ts';
import { createSearch } from '../../../src/core/search/search.ts';
import type { Axis, SampledSearch } from '../../../src/core/study/study.ts';

const free = (name: string, from: number, to: number): Axis => ({
  name,
  sets: [name],
  points: [[from], [to]],
  labels: null,
  range: { from, to, stepped: false },
});
const stepped = (name: string, values: readonly number[]): Axis => ({
  name,
  sets: [name],
  points: values.map((value) => [value]),
  labels: null,
  range: { from: values[0]!, to: values.at(-1)!, stepped: true },
});
const listed = (name: string, values: readonly number[]): Axis => ({ ...stepped(name, values), range: null });
const options: Axis = {
  name: 'motor on offer',
  sets: ['motor.peakTorque', 'motor.baseSpeed'],
  points: [
    [310, 377],
    [230, 565],
    [270, Number.NaN],
  ],
  labels: ['slow', 'fast', 'plain'],
  range: null,
};
const mixed: readonly Axis[] = [free('gearing.ratio', 7.5, 12.25), stepped('vehicle.kerbMass', [1500, 1600, 1700, 1800]), options, listed('a', [3, 1, 2])];

const methods = ['sobol', 'random'] as const;
const searchOf = (method: SampledSearch['method'], axes: readonly Axis[], designs: number, seed = 1) =>
  createSearch({ axes, search: { method, designs, seed } });

/** Inputs of the given designs, in that order. */
function inputsOf(search: ReturnType<typeof searchOf>, numbers: readonly number[]): number[][] {
  const out = new Float64Array(search.inputNames.length);
  return numbers.map((number) => {
    search.inputs(number, out, 0);
    return [...out];
  });
}

const upTo = (count: number) => Array.from({ length: count }, (_, k) => k + 1);

describe.each(methods)('method %s', (method) => {
  test('fills whole ranges and takes the points of every other axis, an option with all that it sets', () => {
    const search = searchOf(method, mixed, 500);
    expect(search.count).toBe(500);
    expect(search.inputNames).toEqual(['gearing.ratio', 'vehicle.kerbMass', 'motor.peakTorque', 'motor.baseSpeed', 'a']);
    const rows = inputsOf(search, upTo(500));
    expect(new Set(rows.map(([ratio]) => ratio)).size).toBe(500);
    for (const [ratio] of rows) expect(ratio! > 7.5 && ratio! < 12.25).toBe(true);
    expect(new Set(rows.map(([, mass]) => mass))).toEqual(new Set([1500, 1600, 1700, 1800]));
    expect(new Set(rows.map(([, , torque, speed]) => `${torque} ${speed}`))).toEqual(new Set(['310 377', '230 565', '270 NaN']));
    expect(new Set(rows.map((row) => row[4]))).toEqual(new Set([1, 2, 3]));
  });

  test('names the points that the inputs are taken from, and none on a range without steps', () => {
    const search = searchOf(method, mixed, 300);
    const points = new Int32Array(mixed.length);
    for (const [k, row] of inputsOf(search, upTo(300)).entries()) {
      search.points(k + 1, points);
      expect(points[0]).toBe(-1);
      expect(row.slice(1)).toEqual([1, 2, 3].flatMap((axis) => mixed[axis]!.points[points[axis]!]));
    }
  });

  test('makes a design from its number alone: in any order, in another thread, between others', () => {
    const sequential = inputsOf(searchOf(method, mixed, 1000), upTo(1000));
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 1000 }), { minLength: 1, maxLength: 30 }), (numbers) => {
        expect(inputsOf(searchOf(method, mixed, 1000), numbers)).toEqual(numbers.map((number) => sequential[number - 1]));
      }),
      { numRuns: 50 },
    );
  });

  test('keeps every design when more are asked for', () => {
    const numbers = [1, 2, 3, 64, 65, 999, 1000];
    const few = inputsOf(searchOf(method, mixed, 1000, 5), numbers);
    for (const more of [1001, 4096, 4e9]) expect(inputsOf(searchOf(method, mixed, more, 5), numbers)).toEqual(few);
  });

  test('keeps what one axis has when further axes come after it', () => {
    const first = inputsOf(searchOf(method, mixed.slice(0, 1), 100), upTo(100));
    expect(inputsOf(searchOf(method, mixed, 100), upTo(100)).map((row) => row.slice(0, 1))).toEqual(first);
  });

  test('draws other designs for another seed, a neighbour or one beyond 32 bits', () => {
    const seeds = [0, 1, 2, 3, 2 ** 32, 2 ** 32 + 1, Number.MAX_SAFE_INTEGER];
    const ratios = seeds.map((seed) => inputsOf(searchOf(method, mixed, 100, seed), upTo(100)).map(([ratio]) => ratio));
    expect(new Set(ratios.flat()).size).toBe(seeds.length * 100);
  });

  test('reaches the last of four thousand million designs', () => {
    const search = searchOf(method, mixed, 4e9);
    const [row] = inputsOf(search, [4e9]);
    expect(row![0]! > 7.5 && row![0]! < 12.25).toBe(true);
    expect(row).not.toEqual(inputsOf(search, [4e9 - 2 ** 31])[0]);
  });

  test('never leaves a range, however narrow', () => {
    const finite = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 });
    fc.assert(
      fc.property(finite, finite, fc.integer({ min: 1, max: 4e9 }), fc.nat(), (one, other, number, seed) => {
        fc.pre(one !== other);
        for (const [from, to] of [
          [Math.min(one, other), Math.max(one, other)],
          [one, one + Math.abs(one) * Number.EPSILON],
        ] as const) {
          const [row] = inputsOf(searchOf(method, [free('x', from, to)], 4e9, seed), [number]);
          expect(row![0]! >= from && row![0]! <= to).toBe(true);
        }
      }),
    );
  });

  test('writes where it is told and nowhere else', () => {
    const out = new Float64Array(8).fill(-1);
    searchOf(method, mixed, 9).inputs(3, out, 2);
    expect([...out].map((value) => value === -1)).toEqual([true, true, false, false, false, false, false, true]);
  });

  test('is empty without axes: the reference design is not one of the search', () => {
    expect(searchOf(method, [], 100).count).toBe(0);
  });

  test('refuses a number that is not one of its designs', () => {
    const search = searchOf(method, mixed, 10);
    for (const number of [0, 11, 1.5, Number.NaN]) {
      expect(() => search.inputs(number, new Float64Array(5), 0)).toThrow(`design ${number} is not one of 1 to 10`);
      expect(() => search.points(number, new Int32Array(4))).toThrow(RangeError);
    }
  });
});

describe("a Sobol' search", () => {
  const square = [free('x', 0, 1), free('y', 0, 1)];

  test('takes for design n point n - 1 of the sequence, scrambled, a dimension for each axis', () => {
    const keys = new Uint32Array(2);
    randomWords(9, 0, keys);
    const expected = upTo(50).map((n) => [0, 1].map((k) => (scrambleWord(sobolWord(sobolDirections(k), n - 1), keys[k]!) + 0.5) / 2 ** 32));
    expect(inputsOf(searchOf('sobol', square, 50, 9), upTo(50))).toEqual(expected);
  });

  test('gives every combination of points its equal share of 2^m designs where their numbers are powers of two', () => {
    const search = searchOf('sobol', [stepped('x', [1, 2, 3, 4]), listed('y', upTo(8))], 128, 3);
    const shares = new Map<string, number>();
    for (const row of inputsOf(search, upTo(128))) shares.set(row.join(), (shares.get(row.join()) ?? 0) + 1);
    expect([...shares.values()]).toEqual(new Array(32).fill(4));
  });

  test('gives other numbers of points shares that differ by less than two designs', () => {
    for (const size of [3, 7, 100]) {
      const shares = new Array<number>(size).fill(0);
      for (const [point] of inputsOf(searchOf('sobol', [listed('x', [...Array(size).keys()])], 1024, 4), upTo(1024))) shares[point!]! += 1;
      expect(Math.max(...shares.map((share) => Math.abs(share - 1024 / size)))).toBeLessThan(2);
    }
  });

  test('has one of the first 2^m designs in every box of area 2^-m', () => {
    for (const seed of [1, 2, 77]) {
      const points = inputsOf(searchOf('sobol', square, 256, seed), upTo(256));
      for (let wide = 0; wide <= 8; wide++) {
        expect(new Set(points.map(([x, y]) => `${Math.floor(x! * 2 ** wide)} ${Math.floor(y! * 2 ** (8 - wide))}`)).size).toBe(256);
      }
    }
  });
});

describe('a random search', () => {
  const cube = [free('x', 0, 1), free('y', 0, 1), free('z', 0, 1)];
  const rows = inputsOf(searchOf('random', cube, 20_000, 12), upTo(20_000));

  test('is uniform on each axis and on each pair of axes', () => {
    for (const [a, b] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      const cells = new Array<number>(100).fill(0);
      for (const row of rows) cells[10 * Math.floor(10 * row[a]!) + Math.floor(10 * row[b]!)]! += 1;
      const chiSquare = cells.reduce((sum, seen) => sum + (seen - 200) ** 2 / 200, 0);
      // Chi-square with 99 degrees of freedom: outside 53 to 163 once in ten thousand samples.
      expect([chiSquare > 53, chiSquare < 163]).toEqual([true, true]);
    }
  });

  test('gives no two axes the same sequence, nor the one the other shifted', () => {
    const columns = [0, 1, 2].map((axis) => new Set(rows.map((row) => row[axis])));
    // 20,000 of 2^32 words twice: 0.09 expected in common.
    for (const [a, b] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const)
      expect([...columns[a]!].filter((value) => columns[b]!.has(value)).length).toBeLessThan(4);
  });
});
