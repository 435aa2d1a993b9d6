/** What every method of search offers. */
import type { Study } from '../study/study.ts';

/**
 * Which designs to evaluate. Designs are numbered from 1 to `count`; number 0 is the reference design, which no
 * search makes. A design depends on its number and the study alone.
 */
export interface Search {
  readonly count: number;
  /** Dotted names of the numbers a design sets: the `sets` of the axes, one after another. */
  readonly inputNames: readonly string[];
  /** Writes the inputs of a design (SI, in the order of `inputNames`) to `out[at…]`. A number outside 1…count throws. */
  inputs(designNumber: number, out: Float64Array, at: number): void;
  /** Writes the index of the design's point on each axis to `out`. A number outside 1…count throws. */
  points(designNumber: number, out: Int32Array): void;
}

/** A method: the part of a study that it needs, to its search. */
export type SearchMethod = (study: Pick<Study, 'axes' | 'search'>) => Search;
