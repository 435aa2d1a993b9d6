/** The full grid: every point of every axis with every point of the others. */
import type { Axis, GridSearch } from '../study/study.ts';
import { checkDesignNumber, inputOffsets, type Search, type SearchMethod } from './search-method.ts';

/**
 * Numbers the grid in the order of nested lists: the first axis of the study changes slowest, the last fastest, so
 * that neighbouring numbers differ in the last axis. A study without axes has an empty grid (its one design is the
 * reference). Exact up to 2^53 - 1 designs; more throw.
 */
export const gridSearch: SearchMethod<GridSearch> = ({ axes }): Search => {
  const count = gridSize(axes);
  const walk = (designNumber: number, visit: (axis: number, point: number) => void): void => {
    checkDesignNumber(designNumber, count);
    // Remainders of doubles, not bit operations: counts pass 2^32.
    let rest = designNumber - 1;
    for (let k = axes.length - 1; k >= 0; k--) {
      const size = axes[k]!.points.length;
      const point = rest % size;
      visit(k, point);
      rest = (rest - point) / size;
    }
  };
  const offsets = inputOffsets(axes);
  return {
    count,
    inputNames: axes.flatMap((axis) => axis.sets),
    inputs: (designNumber, out, at) =>
      walk(designNumber, (axis, point) => {
        const values = axes[axis]!.points[point]!;
        for (let k = 0; k < values.length; k++) out[at + offsets[axis]! + k] = values[k]!;
      }),
    points: (designNumber, out) =>
      walk(designNumber, (axis, point) => {
        out[axis] = point;
      }),
  };
};

function gridSize(axes: readonly Axis[]): number {
  if (axes.length === 0) return 0;
  const count = axes.reduce((product, axis) => product * axis.points.length, 1);
  if (count > Number.MAX_SAFE_INTEGER) throw new RangeError(`a grid of ${count} designs cannot be numbered exactly`);
  return count;
}
