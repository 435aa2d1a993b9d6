/** A front thinned to what people can tell apart. */
import { FrontFilter } from './front-filter.ts';

/**
 * The designs to show, as ascending indices into the columns of `objectives` (less is better): one per box whose
 * sides are the `resolutions`, the one nearest the box's best corner (distance in box sides; ties to the lowest
 * index); boxes that another box dominates are left out, and so are designs with a NaN. In an objective of resolution
 * 0 every value is a box of its own; when all resolutions are 0 there are no boxes and equal designs all stay.
 * Epsilon-dominance: Laumanns, Thiele, Deb, Zitzler, Combining convergence and diversity in evolutionary
 * multiobjective optimization, Evolutionary Computation 10(3), 2002 (from memory), here with boxes of constant sides.
 */
export function thinFront(objectives: readonly Float64Array[], resolutions: readonly number[]): Uint32Array {
  const count = objectives[0]?.length ?? 0;
  const boxes = objectives.map((column, j) => boxColumn(column, resolutions[j]!));
  const filter = new FrontFilter(objectives.length);
  filter.add(count, Float64Array.from(boxes[0]!.keys()), boxes, new Uint8Array(count).fill(1));
  const candidates = filter.front().numbers;
  if (resolutions.every((size) => size === 0)) return Uint32Array.from(candidates);
  return Uint32Array.from(nearestPerBox(candidates, objectives, boxes, resolutions)).sort();
}

function boxColumn(column: Float64Array, size: number): Float64Array {
  return size === 0 ? column : column.map((value) => Math.floor(value / size));
}

/** Of the candidates (ascending) of each box, the one nearest its best corner. */
function nearestPerBox(
  candidates: Float64Array,
  objectives: readonly Float64Array[],
  boxes: readonly Float64Array[],
  resolutions: readonly number[],
): number[] {
  const nearest = new Map<string, { index: number; distance: number }>();
  for (const index of candidates) {
    const box = boxes.map((column) => column[index]).join(' ');
    const distance = squaredDistance(index, objectives, boxes, resolutions);
    const known = nearest.get(box);
    if (known === undefined || distance < known.distance) nearest.set(box, { index, distance });
  }
  return [...nearest.values()].map(({ index }) => index);
}

/** From the best corner of the design's box, in box sides; an infinite value is its own corner. */
function squaredDistance(index: number, objectives: readonly Float64Array[], boxes: readonly Float64Array[], resolutions: readonly number[]): number {
  let sum = 0;
  for (const [j, size] of resolutions.entries()) {
    if (size === 0) continue;
    const away = objectives[j]![index]! / size - boxes[j]![index]!;
    if (!Number.isNaN(away)) sum += away * away;
  }
  return sum;
}
