/** Searches that draw designs: from a range without steps any value, from every other axis one of its points. */
import { randomWords } from '../numerics/random-words.ts';
import { scrambleWord, sobolDirections, sobolWord } from '../numerics/sobol.ts';
import type { Axis, SampledSearch } from '../study/study.ts';
import { checkDesignNumber, inputOffsets, type Search, type SearchMethod } from './search-method.ts';

/** Where a design lies: a fraction of 2^32 for each axis, 0 to 4294967295. */
type Place = (designNumber: number, words: Uint32Array) => void;

/**
 * Design n is point n - 1 of a Sobol' sequence with a dimension for each axis, so that the first 2^m designs are the even
 * ones; scrambled with a key of its own for each axis, drawn from the seed.
 */
export const sobolSearch: SearchMethod<SampledSearch> = ({ axes, search }) => {
  const directions = axes.map((_, dimension) => sobolDirections(dimension));
  const keys = new Uint32Array(axes.length);
  // Designs have numbers from 1: place 0 is free.
  randomWords(search.seed, 0, keys);
  return drawnSearch(axes, search, (designNumber, words) => {
    for (let k = 0; k < words.length; k++) words[k] = scrambleWord(sobolWord(directions[k]!, designNumber - 1), keys[k]!);
  });
};

/** Design n is the n-th place of the seed's random words, uniform in 32 bits on each axis. */
export const randomSearch: SearchMethod<SampledSearch> = ({ axes, search }) =>
  drawnSearch(axes, search, (designNumber, words) => randomWords(search.seed, designNumber, words));

/** A study without axes has an empty search, as in a grid: its one design is the reference. */
function drawnSearch(axes: readonly Axis[], { designs }: SampledSearch, place: Place): Search {
  const count = axes.length === 0 ? 0 : designs;
  const offsets = inputOffsets(axes);
  const words = new Uint32Array(axes.length);
  // Inputs and points of one design are asked for one after the other.
  let drawn = 0;
  const draw = (designNumber: number): void => {
    checkDesignNumber(designNumber, count);
    if (designNumber !== drawn) place(designNumber, words);
    drawn = designNumber;
  };
  return {
    count,
    inputNames: axes.flatMap((axis) => axis.sets),
    inputs(designNumber, out, at) {
      draw(designNumber);
      for (let k = 0; k < words.length; k++) {
        const { range, points } = axes[k]!;
        if (range?.stepped === false) out[at + offsets[k]!] = valueIn(range, words[k]!);
        else out.set(points[pointOf(words[k]!, points.length)]!, at + offsets[k]!);
      }
    },
    points(designNumber, out) {
      draw(designNumber);
      for (let k = 0; k < words.length; k++) out[k] = axes[k]!.range?.stepped === false ? -1 : pointOf(words[k]!, axes[k]!.points.length);
    },
  };
}

/** Between the ends, at the middle of the word's 2^-32: rounding never leads beyond them. */
function valueIn({ from, to }: { readonly from: number; readonly to: number }, word: number): number {
  return from + ((word + 0.5) / 4294967296) * (to - from);
}

/** Each of `size` points gets an equal part of all words. Exact for up to 2^21 points. */
function pointOf(word: number, size: number): number {
  return Math.floor((word * size) / 4294967296);
}
