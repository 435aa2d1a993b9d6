/**
 * The exact front of designs that arrive in batches. New designs that nothing known dominates wait in a small store;
 * when it is full, its own front becomes a tree, and trees of like size are merged, so that a design is rearranged
 * only about log n times (the logarithmic method: Bentley & Saxe, Decomposable searching problems, Journal of
 * Algorithms 1, 1980; from memory). The front is a property of the set: the order and the sizes of the batches, and
 * where the store happens to be emptied, change only the time it takes.
 */
import { rowDominates } from './dominance.ts';
import { DominanceTree, type PointRows } from './dominance-tree.ts';

const waitingCapacity = 256;
const mostObjectives = 8;

/** A front in ascending design number: one column per objective, less is better. */
export interface Front {
  readonly numbers: Float64Array;
  readonly objectives: Float64Array[];
}

/** Collects the designs that no other dominates. Designs equal in all objectives are all kept. */
export class FrontFilter {
  private readonly width: number;
  /** From old and large to new and small; no point is dominated by one of an older tree. */
  private readonly trees: DominanceTree[] = [];
  private readonly waiting: Float64Array;
  private readonly waitingNumbers = new Float64Array(waitingCapacity);
  private waitingCount = 0;
  private readonly point: Float64Array;

  /** For 1 to 8 objectives; another count throws. */
  constructor(objectiveCount: number) {
    if (!Number.isInteger(objectiveCount) || objectiveCount < 1 || objectiveCount > mostObjectives) {
      throw new RangeError(`a front needs 1 to ${mostObjectives} objectives, not ${objectiveCount}`);
    }
    this.width = objectiveCount;
    this.waiting = new Float64Array(waitingCapacity * objectiveCount);
    this.point = new Float64Array(objectiveCount);
  }

  /**
   * Takes the first `count` designs of a batch: their numbers (each design once), one column per objective (less is
   * better), and 1 where a design may enter the front. A design with a NaN objective never enters; infinite values
   * are compared like any other. The arrays are only read and may be used again afterwards.
   */
  add(count: number, numbers: Float64Array, objectives: readonly Float64Array[], eligible: Uint8Array): void {
    if (objectives.length !== this.width) throw new RangeError(`${objectives.length} columns of objectives where ${this.width} were expected`);
    for (let i = 0; i < count; i++) {
      if (eligible[i] === 0 || !this.load(objectives, i) || this.isDominated()) continue;
      this.waiting.set(this.point, this.waitingCount * this.width);
      this.waitingNumbers[this.waitingCount++] = numbers[i]!;
      if (this.waitingCount === waitingCapacity) this.plant();
    }
  }

  /** The front of everything added so far, as copies; more may be added afterwards. */
  front(): Front {
    const tree = this.settle();
    if (tree === undefined) return { numbers: new Float64Array(0), objectives: Array.from({ length: this.width }, () => new Float64Array(0)) };
    const order = Uint32Array.from(tree.numbers.keys()).sort((a, b) => tree.numbers[a]! - tree.numbers[b]!);
    const column = (j: number): Float64Array => Float64Array.from(order, (i) => tree.rows[i * this.width + j]!);
    return { numbers: Float64Array.from(order, (i) => tree.numbers[i]!), objectives: Array.from({ length: this.width }, (_, j) => column(j)) };
  }

  /** How many designs are on the front of everything added so far. */
  get size(): number {
    return this.settle()?.count ?? 0;
  }

  /** All points in one tree; undefined where there are none. */
  private settle(): DominanceTree | undefined {
    this.plant();
    while (this.trees.length > 1) this.mergeNewest();
    return this.trees[0];
  }

  /** Copies design i into `point`; false when one of its objectives does not exist. */
  private load(objectives: readonly Float64Array[], i: number): boolean {
    for (let j = 0; j < this.width; j++) {
      const value = objectives[j]![i]!;
      if (Number.isNaN(value)) return false;
      this.point[j] = value;
    }
    return true;
  }

  private isDominated(): boolean {
    for (const tree of this.trees) if (tree.dominates(this.point)) return true;
    return false;
  }

  /** Makes the front of the waiting designs the newest tree and keeps the trees' sizes falling by halves. */
  private plant(): void {
    if (this.waitingCount === 0) return;
    const { waiting: rows, waitingNumbers: numbers, waitingCount: count, width } = this;
    this.trees.push(new DominanceTree(frontOfFew({ count, width, rows, numbers })));
    this.waitingCount = 0;
    while (this.trees.length > 1 && this.trees.at(-2)!.count < 2 * this.trees.at(-1)!.count) this.mergeNewest();
  }

  private mergeNewest(): void {
    const newer = this.trees.pop()!;
    const older = this.trees.pop()!;
    this.trees.push(new DominanceTree(mergePoints(older, newer)));
  }
}

/** The points of `older` that `newer` leaves standing, and all of `newer`, which `older` does not dominate. */
function mergePoints(older: DominanceTree, newer: DominanceTree): PointRows {
  const { width } = older;
  const rows = new Float64Array((older.count + newer.count) * width);
  const numbers = new Float64Array(older.count + newer.count);
  const point = new Float64Array(width);
  let count = 0;
  for (let i = 0; i < older.count; i++) {
    for (let j = 0; j < width; j++) point[j] = older.rows[i * width + j]!;
    if (newer.dominates(point)) continue;
    rows.set(point, count * width);
    numbers[count++] = older.numbers[i]!;
  }
  rows.set(newer.rows, count * width);
  numbers.set(newer.numbers, count);
  return { count: count + newer.count, width, rows, numbers };
}

/** The front of a few points: in lexicographic order a point is dominated only by points before it. */
function frontOfFew(points: PointRows): PointRows {
  const { count, width } = points;
  const order = new Uint32Array(count).map((_, i) => i).sort((a, b) => compareRows(points.rows, a * width, b * width, width));
  const rows = new Float64Array(count * width);
  const numbers = new Float64Array(count);
  let kept = 0;
  const point = new Float64Array(width);
  for (const i of order) {
    for (let j = 0; j < width; j++) point[j] = points.rows[i * width + j]!;
    if (anyDominates(rows, kept, point)) continue;
    rows.set(point, kept * width);
    numbers[kept++] = points.numbers[i]!;
  }
  return { count: kept, width, rows, numbers };
}

function compareRows(rows: Float64Array, a: number, b: number, width: number): number {
  for (let j = 0; j < width; j++) {
    if (rows[a + j]! < rows[b + j]!) return -1;
    if (rows[a + j]! > rows[b + j]!) return 1;
  }
  return 0;
}

function anyDominates(rows: Float64Array, count: number, point: Float64Array): boolean {
  for (let k = 0; k < count; k++) if (rowDominates(rows, k, point)) return true;
  return false;
}
