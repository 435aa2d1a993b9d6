/** Who dominates whom, when less is better in every objective. */

/**
 * True when `a` is no worse than `b` in all objectives and better in one (less is better). Points equal in all
 * objectives do not dominate each other; a point with a NaN neither dominates nor is dominated.
 */
export function dominates(a: ArrayLike<number>, b: ArrayLike<number>): boolean {
  let better = false;
  for (let j = 0; j < a.length; j++) {
    if (!(a[j]! <= b[j]!)) return false;
    if (a[j]! < b[j]!) better = true;
  }
  return better;
}

/**
 * The same for row `index` of points stored row by row (`rows[index * x.length + j]`) and the point `x`, neither with
 * a NaN; the form that the inner loops use.
 */
export function rowDominates(rows: Float64Array, index: number, x: Float64Array): boolean {
  const width = x.length;
  const at = index * width;
  let better = false;
  for (let j = 0; j < width; j++) {
    const value = rows[at + j]!;
    if (value > x[j]!) return false;
    if (value < x[j]!) better = true;
  }
  return better;
}
