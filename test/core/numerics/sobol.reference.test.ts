import { SobolSequenceGenerator } from 'sobol';
import { describe, expect, test } from 'vitest';
import { joeKuoRows } from '../../../src/core/numerics/joe-kuo-rows.ts';
import { sobolDimensions, sobolDirections, sobolWord } from '../../../src/core/numerics/sobol.ts';

const directions = Array.from({ length: sobolDimensions }, (_, dimension) => sobolDirections(dimension));
const point = (index: number) => directions.map((each) => sobolWord(each, index) / 2 ** 32);

describe("Sobol' points with the directions of Joe and Kuo (SIAM Journal on Scientific Computing 30, 2008), in Gray-code order", () => {
  test('begin as published', () => {
    expect(point(0)).toEqual(new Array(sobolDimensions).fill(0));
    expect(point(1)).toEqual(new Array(sobolDimensions).fill(0.5));
    expect(point(3).slice(0, 10)).toEqual([0.25, 0.75, 0.75, 0.75, 0.25, 0.25, 0.75, 0.25, 0.25, 0.25]);
    expect(point(7).slice(0, 10)).toEqual([0.125, 0.625, 0.375, 0.125, 0.125, 0.375, 0.625, 0.625, 0.625, 0.875]);
  });

  test('have the published coordinates at point 1000 in dimensions 1, 10, 20 and 40', () => {
    expect([1, 10, 20, 40].map((dimension) => point(1000)[dimension - 1])).toEqual([0.2197265625, 0.0693359375, 0.7255859375, 0.4794921875]);
  });

  test('have 19 as the last direction number of dimension 10, which one public copy of the table has as 1', () => {
    expect(joeKuoRows[8]?.at(-1)).toBe(19);
  });

  test('are those of an independent generator, one after another and in every dimension', () => {
    const generator = new SobolSequenceGenerator(sobolDimensions);
    for (let index = 0; index < 5000; index++) expect(point(index)).toEqual(generator.nextVector());
  });

  test('are those of an independent generator late in the sequence', () => {
    const generator = new SobolSequenceGenerator(3);
    // That package counts in 20 bits: its points are right up to 2^20.
    let last: number[] = [];
    for (let index = 0; index < 700_000; index++) last = generator.nextVector();
    expect(point(699_999).slice(0, 3)).toEqual(last);
  });

  test('are those of SciPy 1.17 (scipy.stats.qmc.Sobol, no scrambling, 30 bits) far beyond what can be counted through', () => {
    const bits = (index: number) => [0, 1, 9, 31, 63].map((dimension) => sobolWord(directions[dimension]!, index) >>> 2);
    expect(bits(123_456_789)).toEqual([1_047_862_216, 850_867_304, 433_713_256, 520_510_088, 271_909_448]);
    expect(bits(1_073_741_823)).toEqual([1, 858_993_459, 868_921_959, 906_207_283, 499_567_131]);
  });
});
