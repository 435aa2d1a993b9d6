/** Corners hold the extremes that a full enumeration of the designs finds. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Axis } from '../../../src/core/study/study.ts';
import { placesInText } from '../../../src/core/study/text/place-in-text.ts';
import { cornersOf, endReach, extentOf } from '../../../src/core/study/warn/design-corners.ts';
import { harbour } from './study-from-disk.ts';

const range = (name: string, values: readonly number[]): Axis => ({ name, sets: [name], points: values.map((value) => [value]), labels: null, range: null });
const options = (name: string, sets: readonly string[], points: readonly (readonly number[])[]): Axis => ({
  name,
  sets,
  points,
  labels: points.map((_, k) => `option ${k}`),
  range: null,
});

describe('corners of a search', () => {
  it('hold the extremes of whatever rises or falls with each number', () => {
    const figures = fc.array(fc.double({ min: 0.1, max: 10, noNaN: true }), { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(
        figures,
        figures,
        fc.array(fc.tuple(fc.double({ min: 1, max: 2, noNaN: true }), fc.double({ min: 1, max: 2, noNaN: true })), { minLength: 1, maxLength: 4 }),
        (a, b, pairs) => {
          const axes = [range('a', a), range('b', b), options('motors', ['c', 'd'], pairs), range('apart', [1, 2, 3])];
          const figure = ({ a: x, b: y, c, d }: Readonly<Record<string, number>>) => ((x as number) / (y as number)) * (c as number) - (d as number);
          const all = a.flatMap((x) => b.flatMap((y) => pairs.map(([c, d]) => figure({ a: x, b: y, c, d }))));
          const corners = cornersOf({ values: { a: 5, b: 5, c: 1, d: 1, apart: 0 }, axes }, (name) => name.length === 1);
          expect(extentOf(corners.map(figure))).toEqual({ low: Math.min(...all), high: Math.max(...all) });
          expect(corners.every(({ apart }) => apart === 0)).toBe(true);
        },
      ),
    );
  });

  it('are the reference alone where nothing that matters varies', () => {
    expect(cornersOf({ values: { a: 1 }, axes: [range('b', [1, 2])] }, (name) => name === 'a')).toEqual([{ a: 1 }]);
  });

  it('leave out a number that an option leaves without a part to play', () => {
    const axes = [options('gearing on offer', ['one', 'two'], [[Number.NaN, 3]])];
    expect(cornersOf({ values: { one: 1 }, axes }, () => true)).toEqual([{ two: 3 }]);
  });

  it('stay few, whatever varies', () => {
    const axes = Array.from({ length: 40 }, (_, k) => range(`number ${k}`, [1, 2, 3]));
    expect(cornersOf({ values: {}, axes }, () => true)).toHaveLength(8192);
  });
});

describe('the end of a range', () => {
  it('is reached at its very point where it has steps, within a hundredth of the range where any value is drawn', () => {
    expect(endReach({ from: 100, to: 300, stepped: true })).toBe(0);
    expect(endReach({ from: 100, to: 300, stepped: false })).toBe(2);
  });
});

describe('places in a study', () => {
  const lineOf = (path: string) => harbour.slice(0, placesInText(harbour)(path)).split('\n').length;
  const lineWith = (text: string) => harbour.slice(0, harbour.indexOf(text)).split('\n').length;

  it('are found by dotted name, or by the nearest section above', () => {
    expect(lineOf('vary.gearing.ratio')).toBe(lineWith('gearing.ratio:'));
    expect(lineOf('requirements.ramp.grade')).toBe(lineWith('ramp.grade:'));
    expect(lineOf('trials.from rest 400 m')).toBe(lineWith('from rest 400 m:'));
    expect(lineOf('trials.stops.cycle')).toBe(lineWith('stops:     {'));
    expect(lineOf('battery.discharge')).toBe(lineWith('battery: {'));
    expect(lineOf('motor.nothing.like.it')).toBe(lineWith('motor:'));
    expect(lineOf('nothing')).toBe(1);
  });
});
