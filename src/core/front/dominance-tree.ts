/**
 * A fixed set of points that answers one question fast: does any of them dominate this one? A k-d tree (Bentley,
 * Multidimensional binary search trees used for associative searching, Communications of the ACM 18(9), 1975; from
 * memory) whose nodes know the best corner of their points: where that corner does not dominate the asking point,
 * nothing in the node does. Only comparisons, so infinities are ordinary values.
 */
import { rowDominates } from './dominance.ts';

// The fastest by trial on fronts of 500 to 100,000 designs in four objectives; 8 and 20 are within a few per cent.
const leafSize = 12;

/** Points in rows: `rows[i * width + j]` is objective j of point i, whose design number is `numbers[i]`. */
export interface PointRows {
  readonly count: number;
  readonly width: number;
  readonly rows: Float64Array;
  readonly numbers: Float64Array;
}

/** Points arranged for dominance questions; less is better in every objective, and no value is NaN. */
export class DominanceTree implements PointRows {
  readonly count: number;
  readonly width: number;
  readonly rows: Float64Array;
  readonly numbers: Float64Array;
  private readonly firstLeaf: number;
  /** Leaf k holds the points from leafStart[k] to before leafStart[k + 1]. */
  private readonly leafStart: Uint32Array;
  /** The best value of each objective by node, in heap order: the children of node i are 2i + 1 and 2i + 2. */
  private readonly corners: Float64Array;
  private readonly stack = new Int32Array(64);
  private lastDominator = 0;

  /** Copies at least one point; the order of the points inside the tree is its own. */
  constructor(points: PointRows) {
    const { count, width } = points;
    this.count = count;
    this.width = width;
    let leaves = 1;
    while (leaves * leafSize < count) leaves *= 2;
    this.firstLeaf = leaves - 1;
    this.leafStart = new Uint32Array(leaves + 1);
    const order = this.arrange(points);
    this.rows = new Float64Array(count * width);
    this.numbers = new Float64Array(count);
    for (let i = 0; i < count; i++) {
      const from = order[i]! * width;
      for (let j = 0; j < width; j++) this.rows[i * width + j] = points.rows[from + j]!;
      this.numbers[i] = points.numbers[order[i]!]!;
    }
    this.corners = new Float64Array((2 * leaves - 1) * width).fill(Number.POSITIVE_INFINITY);
    this.findCorners(leaves);
  }

  /** True when a point of the tree dominates the point `x` (`width` values, none of them NaN). */
  dominates(x: Float64Array): boolean {
    // Neighbouring designs often fall to the same dominator.
    if (rowDominates(this.rows, this.lastDominator, x)) return true;
    const { stack, firstLeaf } = this;
    let depth = 0;
    stack[depth++] = 0;
    while (depth > 0) {
      const node = stack[--depth]!;
      // A corner equal to the point does not dominate it, so whole nodes of equal points are passed by as well.
      if (!rowDominates(this.corners, node, x)) continue;
      if (node >= firstLeaf) {
        if (this.leafDominates(node - firstLeaf, x)) return true;
      } else {
        stack[depth++] = 2 * node + 2;
        stack[depth++] = 2 * node + 1;
      }
    }
    return false;
  }

  private leafDominates(leaf: number, x: Float64Array): boolean {
    const end = this.leafStart[leaf + 1]!;
    for (let i = this.leafStart[leaf]!; i < end; i++) {
      if (rowDominates(this.rows, i, x)) {
        this.lastDominator = i;
        return true;
      }
    }
    return false;
  }

  /** Halves the points along one objective after another until the leaves are small; fills leafStart. */
  private arrange(points: PointRows): Uint32Array {
    const order = new Uint32Array(points.count);
    for (let i = 0; i < points.count; i++) order[i] = i;
    const split = (node: number, from: number, to: number, objective: number): void => {
      if (node >= this.firstLeaf) {
        this.leafStart[node - this.firstLeaf + 1] = to;
        return;
      }
      const middle = (from + to) >>> 1;
      selectMiddle(order, points, objective, from, to, middle);
      const next = (objective + 1) % points.width;
      split(2 * node + 1, from, middle, next);
      split(2 * node + 2, middle, to, next);
    };
    split(0, 0, points.count, 0);
    return order;
  }

  private findCorners(leaves: number): void {
    for (let leaf = 0; leaf < leaves; leaf++) {
      for (let i = this.leafStart[leaf]!; i < this.leafStart[leaf + 1]!; i++) this.widen(this.firstLeaf + leaf, this.rows, i);
    }
    for (let node = this.firstLeaf - 1; node >= 0; node--) {
      this.widen(node, this.corners, 2 * node + 1);
      this.widen(node, this.corners, 2 * node + 2);
    }
  }

  /** Takes row `index` of `rows` into the corner of a node. */
  private widen(node: number, rows: Float64Array, index: number): void {
    for (let j = 0; j < this.width; j++) {
      const value = rows[index * this.width + j]!;
      if (value < this.corners[node * this.width + j]!) this.corners[node * this.width + j] = value;
    }
  }
}

/**
 * Orders `order[from..to)` so that no value of `objective` before `middle` exceeds one at or after it: Hoare's
 * selection (Algorithm 65: Find, Communications of the ACM 4(7), 1961; from memory), the middle element as pivot.
 */
function selectMiddle(order: Uint32Array, points: PointRows, objective: number, from: number, to: number, middle: number): void {
  const { rows, width } = points;
  const valueAt = (k: number): number => rows[order[k]! * width + objective]!;
  let low = from;
  let high = to - 1;
  while (low < high) {
    const pivot = valueAt((low + high) >>> 1);
    let i = low;
    let j = high;
    while (i <= j) {
      while (valueAt(i) < pivot) i++;
      while (valueAt(j) > pivot) j--;
      if (i <= j) {
        const swapped = order[i]!;
        order[i++] = order[j]!;
        order[j--] = swapped;
      }
    }
    if (middle <= j) high = j;
    else if (middle >= i) low = i;
    else return;
  }
}
