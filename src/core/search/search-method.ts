/** What every method of search offers, and what they have in common. */
import type { Axis, Study } from '../study/study.ts';

/**
 * Which designs to evaluate. Designs are numbered from 1 to `count`; number 0 is the reference design, which no
 * search makes. A design depends on its number and the study alone. Not shared between threads.
 */
export interface Search {
  readonly count: number;
  /** Dotted names of the numbers a design sets: the `sets` of the axes, one after another. */
  readonly inputNames: readonly string[];
  /** Writes the inputs of a design (SI, in the order of `inputNames`) to `out[at…]`. A number outside 1…count throws. */
  inputs(designNumber: number, out: Float64Array, at: number): void;
  /** Writes the index of the design's point on each axis to `out`, -1 on a range without steps. A number outside 1…count throws. */
  points(designNumber: number, out: Int32Array): void;
}

/** A method: the part of a study that it needs, to its search. */
export type SearchMethod<Method extends Study['search'] = Study['search']> = (study: { readonly axes: readonly Axis[]; readonly search: Method }) => Search;

/** Throws where a number is not one of 1…count. */
export function checkDesignNumber(designNumber: number, count: number): void {
  if (!Number.isInteger(designNumber) || designNumber < 1 || designNumber > count) {
    throw new RangeError(`design ${designNumber} is not one of 1 to ${count}`);
  }
}

/** Where each axis begins in a row of inputs. */
export function inputOffsets(axes: readonly Axis[]): number[] {
  let next = 0;
  return axes.map((axis) => {
    const offset = next;
    next += axis.sets.length;
    return offset;
  });
}
