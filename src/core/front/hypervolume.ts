/**
 * Hypervolume: the size of the region that points dominate, up to a reference point (less is better). One number for
 * the quality of a front: Zitzler & Thiele, Multiobjective evolutionary algorithms: a comparative case study and the
 * strength Pareto approach, IEEE Transactions on Evolutionary Computation 3(4), 1999 (from memory).
 */
import { dominates } from './dominance.ts';

type Row = readonly number[];

/**
 * Exact hypervolume of points given as columns of finite objectives, up to `reference`. A point that is not better
 * than the reference in every objective, or has a NaN, adds nothing. Two and three objectives by a sweep; above, the
 * sum of exclusive volumes (While, Bradstreet, Barone, A fast way of calculating exact hypervolumes, IEEE Transactions
 * on Evolutionary Computation 16(1), 2012; from memory): fine for hundreds of points in up to six objectives.
 * Relative rounding error about 1e-15 times the number of points. An infinitely good point throws.
 */
export function hypervolume(objectives: readonly Float64Array[], reference: readonly number[]): number {
  const rows = [...(objectives[0] ?? []).keys()].map((i) => rowAt(objectives, i)).filter((row) => isInside(row, reference));
  return volume(rows, reference, reference.length);
}

/** For each point the hypervolume that is lost without it: 0 for a dominated or doubled one. Otherwise as `hypervolume`. */
export function exclusiveHypervolumes(objectives: readonly Float64Array[], reference: readonly number[]): Float64Array {
  const rows = [...(objectives[0] ?? []).keys()].map((i) => rowAt(objectives, i));
  const inside = rows.filter((row) => isInside(row, reference));
  return Float64Array.from(rows, (row) => {
    if (!isInside(row, reference)) return 0;
    const others = inside.filter((other) => other !== row);
    return Math.max(0, exclusiveVolume(row, others, reference, reference.length));
  });
}

function rowAt(objectives: readonly Float64Array[], i: number): Row {
  return objectives.map((column) => column[i]!);
}

function isInside(row: Row, reference: Row): boolean {
  if (row.includes(Number.NEGATIVE_INFINITY)) throw new RangeError(`no hypervolume with the infinitely good point (${row.join(', ')})`);
  return row.every((value, j) => value < reference[j]!);
}

/** Volume in the first `width` objectives of rows that are all inside. */
function volume(rows: readonly Row[], reference: Row, width: number): number {
  if (rows.length === 0) return 0;
  if (width === 1) return reference[0]! - rows.reduce((least, row) => Math.min(least, row[0]!), reference[0]!);
  if (width === 2) return area(rows, reference);
  if (width === 3) return sweep(rows, reference);
  // Worst first in the last objective: there, what a row shares with later rows reaches as far as the row itself.
  const last = width - 1;
  const ordered = standing(rows, width).sort((a, b) => b[last]! - a[last]!);
  let sum = 0;
  for (const [k, row] of ordered.entries()) {
    sum += (reference[last]! - row[last]!) * exclusiveVolume(row, ordered.slice(k + 1), reference, last);
  }
  return sum;
}

/** What `row` dominates and `others` do not, in the first `width` objectives. */
function exclusiveVolume(row: Row, others: readonly Row[], reference: Row, width: number): number {
  let box = 1;
  for (let j = 0; j < width; j++) box *= reference[j]! - row[j]!;
  const shared = others.map((other) => {
    const corner: number[] = [];
    for (let j = 0; j < width; j++) corner.push(Math.max(row[j]!, other[j]!));
    return corner;
  });
  return box - volume(shared, reference, width);
}

/** The rows that none other dominates in the first `width` objectives. */
function standing(rows: readonly Row[], width: number): Row[] {
  const ordered = rows.map((row) => row.slice(0, width)).sort(compareRows);
  const kept: Row[] = [];
  for (const row of ordered) {
    if (!kept.some((other) => dominates(other, row))) kept.push(row);
  }
  return kept;
}

function compareRows(a: Row, b: Row): number {
  for (let j = 0; j < a.length; j++) if (a[j] !== b[j]) return a[j]! - b[j]!;
  return 0;
}

function area(rows: readonly Row[], reference: Row): number {
  let sum = 0;
  let reached = reference[1]!;
  for (const [x, y] of [...rows].sort((a, b) => a[0]! - b[0]!) as [number, number][]) {
    if (y >= reached) continue;
    sum += (reference[0]! - x) * (reached - y);
    reached = y;
  }
  return sum;
}

/** Three objectives: rising in the third, with the area that the points so far cover in the other two. */
function sweep(rows: readonly Row[], reference: Row): number {
  const stairs = new Staircase(reference[0]!, reference[1]!);
  let sum = 0;
  let level = reference[2]!;
  for (const [x, y, z] of [...rows].sort((a, b) => a[2]! - b[2]!) as [number, number, number][]) {
    sum += stairs.area * (z - level);
    level = z;
    stairs.add(x, y);
  }
  return sum + stairs.area * (reference[2]! - level);
}

/** The steps of points in the plane, x rising and y falling, and the area between them and the reference corner. */
class Staircase {
  area = 0;
  private readonly endX: number;
  private readonly topY: number;
  private readonly xs: number[] = [];
  private readonly ys: number[] = [];

  constructor(endX: number, topY: number) {
    this.endX = endX;
    this.topY = topY;
  }

  /** Adds a point inside the reference corner. */
  add(x: number, y: number): void {
    const from = this.firstAtOrAfter(x);
    if (from > 0 && this.ys[from - 1]! <= y) return;
    let height = from > 0 ? this.ys[from - 1]! : this.topY;
    let left = x;
    let k = from;
    for (; k < this.xs.length && this.ys[k]! >= y; k++) {
      this.area += (this.xs[k]! - left) * (height - y);
      left = this.xs[k]!;
      height = this.ys[k]!;
    }
    this.area += ((this.xs[k] ?? this.endX) - left) * (height - y);
    this.xs.splice(from, k - from, x);
    this.ys.splice(from, k - from, y);
  }

  private firstAtOrAfter(x: number): number {
    let low = 0;
    let high = this.xs.length;
    while (low < high) {
      const middle = (low + high) >>> 1;
      if (this.xs[middle]! < x) low = middle + 1;
      else high = middle;
    }
    return low;
  }
}
